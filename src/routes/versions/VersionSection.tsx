/** One version to be read: its source as it was frozen, what follows from it, what was checked. */
import { useParams } from 'react-router-dom';
import { isProblem, useVersion } from '../../api/index.ts';
import {
  DerivationProgress,
  DerivationState,
  DisplayFormula,
  Empty,
  Fault,
  Hash,
  Loading,
  Margin,
  QuietButton,
  QuietLink,
  RelativeTime,
  Sheet,
  SmallHeading,
  SourceText,
  Tools,
  TwoColumns,
  say,
} from '../../components/index.ts';
import { useModelContext } from '../model/modelContext.ts';
import { paths } from '../paths.ts';
import { Checks } from './Checks.tsx';

export function Component() {
  const { model } = useModelContext();
  const number = Number(useParams()['number']);
  const isNumber = Number.isSafeInteger(number) && number > 0;
  const { data: version, error, isPending, refetch } = useVersion(model.id, isNumber ? number : 0);

  if (!isNumber || isProblem(error, 'not-found')) {
    return (
      <Empty action={<QuietLink to={paths.versions(model.id)}>All versions</QuietLink>}>
        This model has no such version.
      </Empty>
    );
  }
  if (!version) {
    return (
      <>
        {isPending && <Loading what={`version ${number}`} />}
        {error && <Fault fault={error} onRetry={() => void refetch()} />}
      </>
    );
  }

  const copy = async () => {
    await navigator.clipboard.writeText(version.source);
    say('The source is copied.');
  };
  return (
    <TwoColumns>
      <Sheet>
        <Tools>
          <span className="text-ink">version {version.number}</span>
          <DerivationState derivation={version.derivation} />
          <Hash hash={version.hash} />
          <span className="flex-1" />
          <QuietButton onClick={() => void copy()}>Copy the source</QuietButton>
          <QuietLink to={paths.versions(model.id)}>All versions</QuietLink>
        </Tools>
        <SourceText source={version.source} label={`Source of version ${version.number}`} />
        {version.result && (
          <section aria-label="Properties" className="border-rule mt-22 border-t pt-14">
            <SmallHeading>What follows from it</SmallHeading>
            <dl>
              {version.result.properties.map((property) => (
                <div
                  key={property.symbol}
                  className="border-rule desk:grid-cols-[190px_minmax(0,1fr)] desk:items-center grid grid-cols-[minmax(0,1fr)] border-b border-dotted py-8"
                >
                  <dt className="text-label text-ink-3 font-mono">
                    {property.name} {property.unit !== '1' && <>/ {property.unit}</>}
                  </dt>
                  <dd className="min-w-0">
                    <DisplayFormula
                      tex={`${property.symbolTex} = ${property.tex}`}
                      text={`${property.symbol} = ${property.text}`}
                      label={property.name}
                    />
                  </dd>
                </div>
              ))}
            </dl>
          </section>
        )}
      </Sheet>
      <Margin label="About this version">
        <SmallHeading>Version {version.number}</SmallHeading>
        <p>
          Frozen <RelativeTime at={version.frozenAt} style="date" /> by {version.frozenBy.name}.
        </p>
        {version.note && <p className="text-ink mt-8 break-words">{version.note}</p>}
        <div className="my-14">
          <DerivationProgress modelId={model.id} version={version} mayAct={model.mayEdit} />
        </div>
        {version.verification && (
          <Checks verification={version.verification} claims={version.result?.claims ?? []} />
        )}
      </Margin>
    </TwoColumns>
  );
}
