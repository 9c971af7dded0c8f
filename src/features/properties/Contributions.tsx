/** What each term of ln Q contributes to a property: formula, signed bar, share at the state. */
import type { Derivation, DerivedProperty } from '../../../shared/contracts/derivation.ts';
import { ScrollingFormula, classes } from '../../components/index.ts';
import { valueAt, type StatePoint } from './statePoint.ts';

interface ContributionsProps {
  readonly property: DerivedProperty;
  readonly derivation: Derivation;
  readonly state: StatePoint;
}

export function Contributions({ property, derivation, state }: ContributionsProps) {
  const rows = property.contributions.map((contribution) => ({
    contribution,
    value: valueAt(contribution.tree, derivation, state),
  }));
  const total = rows.reduce((sum, { value }) => sum + (value ?? NaN), 0);
  const largest = Math.max(...rows.map(({ value }) => Math.abs(value ?? 0)));
  return (
    <table className="contributions text-label text-ink-2 mt-8 mb-4 w-full font-mono">
      <caption className="text-ink-3 border-rule border-t border-dotted pt-8 pb-2 text-left">
        Contributions
      </caption>
      <tbody>
        {rows.map(({ contribution, value }, index) => {
          const share = value === undefined ? undefined : value / total;
          return (
            <tr key={contribution.label}>
              <th scope="row" className="text-left font-normal">
                <span className={classes('swatch', `swatch-${index % 4}`)} aria-hidden="true" />
                {contribution.label}
              </th>
              <td className="contribution-formula">
                <ScrollingFormula
                  tex={contribution.tex}
                  text={contribution.text}
                  label={`contribution of ${contribution.label}`}
                />
              </td>
              <td className="contribution-bar" aria-hidden="true">
                {value !== undefined && largest > 0 && (
                  <Bar fraction={value / largest} pattern={index % 4} />
                )}
              </td>
              <td className="text-right whitespace-nowrap tabular-nums">
                {share !== undefined && Number.isFinite(share) && share !== 0
                  ? percent(share)
                  : '–'}
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

/** From the middle to the right for what adds, to the left for what takes away. */
function Bar({ fraction, pattern }: { readonly fraction: number; readonly pattern: number }) {
  const width = `${Math.max(1, Math.abs(fraction) * 50)}%`;
  return (
    <span className="relative block h-8">
      <span
        className={classes('absolute top-0 block h-[7px]', `swatch-${pattern}`)}
        style={fraction < 0 ? { right: '50%', width } : { left: '50%', width }}
      />
      <span className="bg-rule absolute -top-2 left-1/2 block h-[11px] w-[1px]" />
    </span>
  );
}

function percent(share: number): string {
  const value = 100 * share;
  const digits = Math.abs(value) >= 0.05 ? value.toFixed(1) : value.toExponential(1);
  return `${value > 0 ? '+' : ''}${digits.replace('-', '−')} %`;
}
