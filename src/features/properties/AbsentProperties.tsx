/** What the catalogue has and this model has not, with the reasons. */
import type { Derivation } from '../../../shared/contracts/derivation.ts';

export function AbsentProperties({
  absent,
}: {
  readonly absent: NonNullable<Derivation['absent']>;
}) {
  if (absent.length === 0) return null;
  return (
    <details className="max-w-text mt-22">
      <summary className="text-label text-ultramarine min-h-28 font-mono">
        Not derived: {absent.map(({ symbol }) => symbol).join(', ')}
      </summary>
      <dl className="text-note text-ink-2 mt-8">
        {absent.map(({ symbol, reason }) => (
          <div key={symbol} className="flex gap-14 py-2">
            <dt className="text-label text-ink min-w-[70px] font-mono">{symbol}</dt>
            <dd>{reason}</dd>
          </div>
        ))}
      </dl>
    </details>
  );
}
