/** The Properties section: the sheet of a version, or of the draft while there is no version. */
import { Link, useSearchParams } from 'react-router-dom';
import { useDraft, useVersion, useVersions } from '../../api/index.ts';
import { DerivationProgress, Empty, Fault, Loading, Note, Stale } from '../../components/index.ts';
import { useModelContext } from '../../routes/model/modelContext.ts';
import { useLiveDerivation } from '../../workers/useLiveDerivation.ts';
import { PropertySheet } from './PropertySheet.tsx';
import './properties.css';

export function Properties() {
  const { model } = useModelContext();
  const [parameters] = useSearchParams();
  const asked = parameters.get('version') ?? '';
  const latest = model.latestVersion?.number ?? 0;
  const number = asked === 'draft' ? 0 : /^[1-9]\d{0,8}$/.test(asked) ? Number(asked) : latest;
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
      <DerivationProgress modelId={model.id} version={version} mayAct={model.mayEdit} />
      {version.result && (
        <PropertySheet
          source={version.source}
          derivation={version.result}
          verification={version.verification}
        />
      )}
    </>
  );
}

/** Which version is shown, with the way to the others and to the draft; number 0 is the draft. */
function VersionChoice({ number }: { readonly number: number }) {
  const { model } = useModelContext();
  const { data: versions } = useVersions(model.id);
  const [parameters, setParameters] = useSearchParams();
  if (!versions || versions.length === 0) return null;
  return (
    <label className="text-label text-ink-3 mb-14 flex min-w-0 flex-wrap items-baseline gap-10 font-mono">
      properties of
      <select
        value={number === 0 ? 'draft' : number}
        onChange={(event) => {
          parameters.set('version', event.target.value);
          setParameters(parameters);
        }}
        className="border-ink-3 bg-sheet text-ink min-h-28 max-w-full rounded border px-8"
      >
        {versions.map((version) => (
          <option key={version.number} value={version.number}>
            version {version.number}
            {version.note === '' ? '' : `, ${version.note}`}
          </option>
        ))}
        <option value="draft">the draft</option>
      </select>
    </label>
  );
}

function OfDraft() {
  const { model } = useModelContext();
  const { data: draft, error, isPending, refetch } = useDraft(model.id);
  if (isPending) return <Loading what="the draft" />;
  if (!draft) return <Fault fault={error} onRetry={() => void refetch()} />;
  return (
    <>
      <VersionChoice number={0} />
      <LiveSheet source={draft.source} />
    </>
  );
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
        <PropertySheet source={source} derivation={live.derivation} verification={null} />
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
