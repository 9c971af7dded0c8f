/** What follows from the formulation, beside it: properties, warnings, claims. */
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import {
  Margin,
  Note,
  ScrollingFormula,
  SealMark,
  SmallHeading,
  classes,
} from '../../components/index.ts';
import { CONSEQUENCES } from './consequences.ts';
import type { LiveDerivation } from '../../workers/useLiveDerivation.ts';

const MOST_SHOWN = 7;
const OUTCOME = { passed: 'holds', failed: 'does not hold', undecided: 'not decided' } as const;
const OUTCOME_COLOUR = {
  passed: 'text-verdigris',
  failed: 'text-cinnabar',
  undecided: 'text-ochre',
} as const;

export function ConsequencesMargin({ live }: { readonly live: LiveDerivation }) {
  const { derivation, diagnostics, isStale, milliseconds, failure, source, soundSource } = live;
  const faults = diagnostics.filter(({ severity }) => severity === 'error');
  const remarks = diagnostics.filter(({ severity }) => severity !== 'error');
  const shown = (derivation?.properties ?? [])
    .filter(({ symbol }) => CONSEQUENCES.includes(symbol))
    .sort((a, b) => CONSEQUENCES.indexOf(a.symbol) - CONSEQUENCES.indexOf(b.symbol))
    .slice(0, MOST_SHOWN);
  const aside =
    soundSource === undefined || milliseconds === undefined
      ? undefined
      : `as of line ${soundSource.trimEnd().split('\n').length} · ${Math.round(milliseconds)} ms`;
  return (
    <Margin label="Consequences">
      <SmallHeading aside={aside}>Consequences</SmallHeading>
      {source === undefined && <p role="status">Deriving for the first time</p>}
      <dl
        data-stale={isStale || undefined}
        className={classes(isStale && '[&_*]:!text-ink opacity-[0.66]')}
      >
        {shown.map((property) => (
          <div
            key={property.symbol}
            className="border-rule flex items-center gap-14 border-b border-dotted py-8"
          >
            <dt className="text-ink-3 min-w-38 flex-none" title={property.name}>
              <ScrollingFormula
                tex={property.symbolTex}
                text={property.symbol}
                label={property.name}
              />
            </dt>
            <dd className="text-ink min-w-0 flex-1">
              <ScrollingFormula tex={property.tex} text={property.text} label={property.name} />
            </dd>
          </div>
        ))}
      </dl>
      {failure !== undefined && (
        <Note tone="cinnabar" role="status">
          {failure} What is shown follows from the text before.
        </Note>
      )}
      {failure === undefined && faults.length > 0 && (
        <Note tone="cinnabar" role="status">
          {linesInWords(faults)} must be mended before{' '}
          {derivation ? 'these follow again' : 'anything follows'}.
          {derivation && ' They show the last sound text.'}
        </Note>
      )}
      {remarks.map((remark) => (
        <Note key={`${remark.code} ${remark.span.start}`} tone="ochre">
          <b className="text-ochre">Line {remark.line}.</b> {remark.message} {remark.hint}
        </Note>
      ))}
      {derivation && derivation.claims.length > 0 && (
        <>
          <h3 className="text-note text-ink mt-22 font-[560]">Claims</h3>
          <ul className={classes(isStale && '[&_*]:!text-ink opacity-[0.66]')}>
            {derivation.claims.map((claim) => (
              <li key={claim.line} className="flex flex-wrap items-baseline gap-x-8 py-2">
                <SealMark status={claim.status} />
                {claim.title || claim.text}
                <span className={classes('text-label font-mono', OUTCOME_COLOUR[claim.status])}>
                  {OUTCOME[claim.status]}
                  {claim.method && `, ${claim.method}`}
                </span>
                {claim.status === 'failed' && <span className="w-full">{claim.detail}</span>}
              </li>
            ))}
          </ul>
        </>
      )}
    </Margin>
  );
}

/** `Line 10`, `Lines 10 and 12`. */
function linesInWords(faults: readonly Diagnostic[]): string {
  const lines = [...new Set(faults.map(({ line }) => line))].sort((a, b) => a - b);
  const last = lines.pop();
  return lines.length === 0 ? `Line ${last}` : `Lines ${lines.join(', ')} and ${last}`;
}
