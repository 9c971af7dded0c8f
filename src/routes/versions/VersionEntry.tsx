/** One version in the line: who froze it when and why, how it stands, what changed in it. */
import { useId, useState } from 'react';
import { Link } from 'react-router-dom';
import type { Model, VersionSummary } from '../../../shared/contracts/models.ts';
import { useVersionPair } from '../../api/index.ts';
import {
  DerivationProgress,
  DerivationState,
  Fault,
  Hash,
  Loading,
  QuietButton,
  QuietLink,
  RelativeTime,
} from '../../components/index.ts';
import { SourceDifference } from '../../components/SourceDifference.tsx';
import { paths } from '../paths.ts';

interface VersionEntryProps {
  readonly model: Model;
  readonly version: VersionSummary;
  readonly earlier: VersionSummary | undefined;
}

export function VersionEntry({ model, version, earlier }: VersionEntryProps) {
  const [isOpen, setOpen] = useState(false);
  const id = useId();
  return (
    <li className="border-hair border-t py-14">
      <div className="flex flex-wrap items-baseline gap-x-14 gap-y-4">
        <h3 className="text-lede font-[480]">
          <Link to={paths.version(model.id, version.number)} className="text-ink decoration-rule">
            version {version.number}
          </Link>
        </h3>
        <DerivationState derivation={version.derivation} />
        <span className="text-label text-ink-3 desk:ml-auto font-mono">
          <Hash hash={version.hash} />
        </span>
      </div>
      <p className="text-label text-ink-3 font-mono">
        frozen <RelativeTime at={version.frozenAt} /> by {version.frozenBy.name}
      </p>
      {version.note && <p className="max-w-text text-ink-2 mt-4 break-words">{version.note}</p>}
      <div className="max-w-text mt-8">
        <DerivationProgress modelId={model.id} version={version} mayAct={model.mayEdit} />
      </div>
      <div className="mt-8 flex flex-wrap gap-10">
        <QuietLink to={paths.version(model.id, version.number)}>Read this version</QuietLink>
        {earlier && (
          <QuietButton aria-expanded={isOpen} aria-controls={id} onClick={() => setOpen(!isOpen)}>
            {isOpen ? 'Hide' : 'Show'} what changed since version {earlier.number}
          </QuietButton>
        )}
      </div>
      {isOpen && earlier && (
        <div id={id} className="border-rule mt-14 border-l-2 pl-14">
          <Changes modelId={model.id} earlier={earlier.number} later={version.number} />
        </div>
      )}
    </li>
  );
}

function Changes({
  modelId,
  earlier,
  later,
}: {
  readonly modelId: string;
  readonly earlier: number;
  readonly later: number;
}) {
  const [before, after] = useVersionPair(modelId, earlier, later);
  if (before?.data && after?.data) {
    return <SourceDifference before={before.data.source} after={after.data.source} />;
  }
  const fault = before?.error ?? after?.error;
  if (fault) return <Fault fault={fault} />;
  return <Loading what="both sources" />;
}
