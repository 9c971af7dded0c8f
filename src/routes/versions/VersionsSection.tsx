/** The line of versions of a model, the latest first. */
import { useModelContext } from '../model/modelContext.ts';
import { useVersions } from '../../api/index.ts';
import {
  Empty,
  Fault,
  Loading,
  Margin,
  Note,
  QuietLink,
  Sheet,
  SmallHeading,
  Stale,
  TwoColumns,
} from '../../components/index.ts';
import { paths } from '../paths.ts';
import { VersionEntry } from './VersionEntry.tsx';

export function Component() {
  const { model, stream } = useModelContext();
  const { data: versions, error, isPending, refetch } = useVersions(model.id);
  return (
    <TwoColumns>
      <Sheet>
        <SmallHeading>Versions</SmallHeading>
        {isPending && <Loading what="the versions" />}
        {error && !versions && <Fault fault={error} onRetry={() => void refetch()} />}
        {error && versions && (
          <Stale>These are the versions as last read; the server does not answer now.</Stale>
        )}
        {versions?.length === 0 && (
          <Empty
            action={
              model.mayEdit && (
                <QuietLink to={paths.model(model.id)}>Go to the formulation</QuietLink>
              )
            }
          >
            A version is a draft frozen for good, with everything derived from it and checked. None
            has been frozen yet.
          </Empty>
        )}
        {versions && versions.length > 0 && (
          <ol>
            {versions.map((version, index) => (
              <VersionEntry
                key={version.id}
                model={model}
                version={version}
                earlier={versions[index + 1]}
              />
            ))}
          </ol>
        )}
      </Sheet>
      <Margin label="About versions">
        <SmallHeading>How versions stand</SmallHeading>
        <p>
          A version never changes again. Its hash is the SHA-256 of the source in its normal
          writing: the same source has the same hash and the same result on every machine.
        </p>
        {stream === 'lost' && (
          <Note tone="ochre">
            <b className="text-ochre">No news arrive.</b> The connection to the server is lost and
            will be taken up again by itself; states shown here may be out of date.
          </Note>
        )}
      </Margin>
    </TwoColumns>
  );
}
