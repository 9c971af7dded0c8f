/** The properties that the specimen shows, as they derive. */
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { ScrollingFormula } from '../../components/Formula.tsx';
import { SealMark } from '../../components/Seal.tsx';
import { classes } from '../../components/classes.ts';
import { SPECIMEN_PROPERTIES } from './specimenSource.ts';

const OUTCOME = { passed: 'holds', failed: 'does not hold', undecided: 'not decided' } as const;

export function Consequences({
  derivation,
  isStale,
}: {
  readonly derivation: Derivation;
  readonly isStale: boolean;
}) {
  const shown = SPECIMEN_PROPERTIES.flatMap((symbol) =>
    derivation.properties.filter((property) => property.symbol === symbol),
  );
  return (
    <div
      className={classes(
        'transition-opacity duration-[120ms]', // At 62 % ink still has the contrast of text; lighter inks would not.
        isStale && '[&_*]:!text-ink opacity-[0.62]',
      )}
    >
      <dl>
        {shown.map((property) => (
          <div
            key={property.symbol}
            className="border-rule flex items-center gap-14 border-b border-dotted py-10"
          >
            <dt className="text-label text-ink-3 desk:w-[140px] w-[112px] flex-none font-mono">
              {property.name}
            </dt>
            <dd className="min-w-0 flex-1">
              <ScrollingFormula
                tex={`${property.symbolTex} = ${property.tex}`}
                text={`${property.symbol} = ${property.text}`}
                label={property.name}
              />
            </dd>
          </div>
        ))}
      </dl>
      {derivation.claims.map((claim) => (
        <p
          key={claim.line}
          className="text-note text-ink-2 mt-10 flex flex-wrap items-baseline gap-x-8"
        >
          <SealMark status={claim.status} />
          {claim.title || claim.text}
          <span className="text-label text-ink-3 font-mono">
            {OUTCOME[claim.status]}
            {claim.method && `, ${claim.method}`}
          </span>
        </p>
      ))}
    </div>
  );
}
