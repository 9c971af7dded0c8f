/** Moves one isotherm through the plot, and says where the critical point lies. */
import type { CriticalPoint } from './criticalPoint.ts';

interface MovingTemperatureProps {
  /** Temperature over that of the critical point, or over 300 K where there is none. */
  readonly reduced: number;
  /** In K. */
  readonly temperature: number;
  readonly critical: CriticalPoint | undefined;
  readonly onChange: (reduced: number) => void;
}

const significant = (value: number, digits = 4) =>
  new Intl.NumberFormat('en', {
    maximumSignificantDigits: digits,
    useGrouping: false,
  }).format(value);

export function MovingTemperature({
  reduced,
  temperature,
  critical,
  onChange,
}: MovingTemperatureProps) {
  return (
    <div className="text-label text-ink-3 mt-8 font-mono">
      <label className="flex items-center gap-14">
        <span className="text-ultramarine">move an isotherm</span>
        <input
          type="range"
          min={0.7}
          max={1.5}
          step={0.005}
          value={reduced}
          onChange={(event) => onChange(event.target.valueAsNumber)}
          aria-valuetext={`${significant(temperature)} K`}
          className="slider min-w-[80px] flex-1"
        />
        <span className="text-ink flex-none text-right tabular-nums">
          {significant(temperature)} <span className="text-ink-3">K</span>
        </span>
      </label>
      {critical && (
        <p className="mt-8">
          critical point: <span className="text-ink">{significant(critical.temperature)}</span> K,{' '}
          <span className="text-ink">{significant(critical.pressure / 1e6)}</span> MPa,{' '}
          <span className="text-ink">{significant(critical.volume * 1e6)}</span> cm³/mol
        </p>
      )}
    </div>
  );
}
