/** The line under the title of a model: latest version, how it stands, hash, who froze it when. */
import { Link } from 'react-router-dom';
import type { Model } from '../../../shared/contracts/models.ts';
import { DerivationState, Hash, RelativeTime } from '../../components/index.ts';
import { paths } from '../paths.ts';

export function ModelState({ model }: { readonly model: Model }) {
  const version = model.latestVersion;
  if (!version) {
    return (
      <>
        <span className="text-ink">draft</span>
        <span>no version is frozen yet</span>
      </>
    );
  }
  return (
    <>
      <Link
        to={paths.version(model.id, version.number)}
        className="text-ink no-underline hover:underline"
      >
        version {version.number}
      </Link>
      <DerivationState derivation={version.derivation} />
      <Hash hash={version.hash} />
      <span>
        frozen <RelativeTime at={version.frozenAt} style="date" /> by {version.frozenBy.name}
      </span>
    </>
  );
}
