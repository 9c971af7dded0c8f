/** The Properties section: the sheet of a version, or of the draft while there is no version. */
import { Link, useSearchParams } from 'react-router-dom';
import { isSettled, useDraft, useVersion, useVersions } from '../../api/index.ts';
import { DerivationProgress, Empty, Fault, Loading, Note, Stale } from '../../components/index.ts';
import { useModelContext } from '../../routes/model/modelContext.ts';
import { useLiveDerivation } from '../../workers/useLiveDerivation.ts';
import { PropertySheet } from './PropertySheet.tsx';
import './properties.css';

export function Properties() {
  const { model } = useModelContext();
  const [parameters] = useSearchParams();
  const asked = Number(parameters.get('version'));
  const number = Number.isInteger(asked) && asked > 0 ? asked : (model.latestVersion?.number ?? 0);
  return number === 0 ? <OfDraft /> : <OfVersion key={number} number={number} />;
}

function OfVersion({ number }: { readonly number: number }) {
  const { model } = useModelContext();
  const { data: version, error, isPending, refetch } = useVersion(model.id, number);
  if (isPending) return <Loading what={`version ${number}`} />;
  if (!version) return <Fault fault={error} onRetry={() => void refetch()} />;
  return (
    <>
      <VersionChoice number={number} />
      {!isSettled(version.derivation.state) || version.derivation.state !== 'complete' ? (
        <DerivationProgress modelId={model.id} version={version} mayAct={model.mayEdit} />
      ) : null}
      {version.result && (
        <PropertySheet derivation={version.result} verification={version.verification} />
      )}
    </>
  );
}

/** Which version is shown, with the way to the others. */
function VersionChoice({ number }: { readonly number: number }) {
  const { model } = useModelContext();
  const { data: versions } = useVersions(model.id);
  const [parameters, setParameters] = useSearchParams();
  if (!versions || versions.length < 2) return null;
  return (
    <label className="text-label text-ink-3 mb-14 flex items-baseline gap-10 font-mono">
      of version
      <select
        value={number}
        onChange={(event) => {
          parameters.set('version', event.target.value);
          setParameters(parameters);
        }}
        className="border-rule bg-sheet text-ink min-h-28 rounded border px-8"
      >
        {versions.map((version) => (
          <option key={version.number} value={version.number}>
            {version.number}
            {version.note === '' ? '' : `, ${version.note}`}
          </option>
        ))}
      </select>
    </label>
  );
}

function OfDraft() {
  const { model } = useModelContext();
  const { data: draft, error, isPending, refetch } = useDraft(model.id);
  if (isPending) return <Loading what="the draft" />;
  if (!draft) return <Fault fault={error} onRetry={() => void refetch()} />;
  return <LiveSheet source={draft.source} />;
}

function LiveSheet({ source }: { readonly source: string }) {
  const { model } = useModelContext();
  const live = useLiveDerivation(source);
  if (live.derivation) {
    return (
      <>
        <Stale>
          These follow from the draft, which has not been verified. Freeze a version to have every
          property verified and kept.
        </Stale>
        <PropertySheet derivation={live.derivation} verification={null} />
      </>
    );
  }
  if (live.source === undefined) return <Loading what="the derivation" />;
  const fault = live.diagnostics.find(({ severity }) => severity === 'error');
  return (
    <>
      <Empty>Properties appear here as soon as the formulation is sound.</Empty>
      <Note tone="cinnabar">
        {fault ? `Line ${fault.line}. ${fault.message} ${fault.hint}` : live.failure}{' '}
        <Link to={`/models/${model.id}`}>Go to the formulation</Link>
      </Note>
    </>
  );
}
