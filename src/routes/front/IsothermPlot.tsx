/**
 * Isotherms of a fluid: curves told apart by dash and width, named at their ends, with the region
 * of two phases washed and the spinodal dashed.
 */
import { useId, useMemo } from 'react';
import { scaleLinear, scaleLog } from 'd3-scale';
import { curveMonotoneX, line } from 'd3-shape';
import { useElementWidth } from '../../components/useElementWidth.ts';
import type { Isotherm, Point, Portrait } from './portrait.ts';

const DASHES = ['2 3', '7 3', '', '12 3 2 3', ''];
const TEXT = 11;
const CLOSEST_LABELS = 14;

interface IsothermPlotProps {
  readonly portrait: Portrait;
  /** The isotherm that the reader moves. */
  readonly moving: Isotherm | undefined;
}

/** `p/p_c` with its index lowered. */
function Reduced({ symbol }: { readonly symbol: string }) {
  return (
    <>
      {symbol}/{symbol}
      <tspan dy="3" fontSize="9">
        c
      </tspan>
    </>
  );
}

/** Moves labels apart that would overlap, keeping their order from top to bottom. */
function spread(ends: readonly { readonly label: string; readonly y: number }[]) {
  const sorted = [...ends].sort((a, b) => a.y - b.y);
  const placed: { label: string; y: number }[] = [];
  for (const { label, y } of sorted) {
    const above = placed.at(-1);
    placed.push({ label, y: above ? Math.max(y, above.y + CLOSEST_LABELS) : y });
  }
  return placed;
}

export function IsothermPlot({ portrait, moving }: IsothermPlotProps) {
  const [box, width] = useElementWidth<HTMLDivElement>();
  return (
    <div ref={box} className="min-h-[280px]">
      {width > 0 && <Drawing portrait={portrait} moving={moving} width={width} />}
    </div>
  );
}

function Drawing({ portrait, moving, width }: IsothermPlotProps & { readonly width: number }) {
  const clip = useId();
  const height = Math.round(Math.max(280, Math.min(420, 0.56 * width)));
  const area = { left: 46, right: width - 44, top: 14, bottom: height - 44 };
  const isReduced = portrait.critical !== undefined;

  const { x, y } = useMemo(
    () => ({
      x: scaleLog(portrait.xRange, [area.left, area.right]),
      y: scaleLinear(portrait.yRange, [area.bottom, area.top]),
    }),
    [portrait.xRange, portrait.yRange, area.left, area.right, area.bottom, area.top],
  );
  const trace = line<Point>(
    ([px]) => x(px),
    // Far outside the clip a curve need not be exact, only finite.
    ([, py]) => Math.max(-2000, Math.min(4000, y(py))),
  );
  const dome = line<Point>(
    ([px]) => x(px),
    ([, py]) => y(py),
  ).curve(curveMonotoneX);

  const xTicks = isReduced ? [0.5, 1, 2, 5, 10] : [100, 300, 1000, 3000];
  const yTicks = y.ticks(4);
  const yFormat = y.tickFormat(4);
  const ends = spread(
    portrait.isotherms.flatMap(({ label, points }) => {
      const last = points.at(-1);
      return last ? [{ label, y: y(last[1]) }] : [];
    }),
  ).filter(({ y: at }) => at > area.top - 4 && at < area.bottom + 8);

  return (
    <svg
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={
        isReduced
          ? `Pressure against volume, both reduced by the critical point, at T/T_c of ${portrait.isotherms.map(({ label }) => label).join(', ')}${portrait.coexistence.length > 0 ? ', with coexistence and spinodal curves' : ''}`
          : `Pressure against molar volume at ${portrait.isotherms.map(({ label }) => label).join(', ')}`
      }
      className="block font-mono"
      fontSize={TEXT}
    >
      <clipPath id={clip}>
        <rect
          x={area.left}
          y={area.top}
          width={area.right - area.left}
          height={area.bottom - area.top}
        />
      </clipPath>
      <g className="stroke-hair">
        {xTicks.map((tick) => (
          <line key={tick} x1={x(tick)} x2={x(tick)} y1={area.top} y2={area.bottom} />
        ))}
        {yTicks.map((tick) => (
          <line key={tick} x1={area.left} x2={area.right} y1={y(tick)} y2={y(tick)} />
        ))}
      </g>
      <g className="fill-ink-3">
        {xTicks.map((tick) => (
          <text key={tick} x={x(tick)} y={area.bottom + 16} textAnchor="middle">
            {tick}
          </text>
        ))}
        {yTicks.map((tick) => (
          <text key={tick} x={area.left - 7} y={y(tick) + 4} textAnchor="end">
            {yFormat(tick)}
          </text>
        ))}
        <text x={(area.left + area.right) / 2} y={height - 8} textAnchor="middle">
          {isReduced ? (
            <>
              volume, <Reduced symbol="V" />
            </>
          ) : (
            'molar volume / (cm³/mol)'
          )}
        </text>
        <text
          transform={`translate(11 ${(area.top + area.bottom) / 2}) rotate(-90)`}
          textAnchor="middle"
        >
          {isReduced ? (
            <>
              pressure, <Reduced symbol="p" />
            </>
          ) : (
            'pressure / MPa'
          )}
        </text>
      </g>
      <g clipPath={`url(#${clip})`} fill="none">
        {portrait.coexistence.length > 0 && (
          <>
            <path d={dome(portrait.coexistence) ?? ''} className="fill-verdigris-wash" />
            <path
              d={dome(portrait.coexistence) ?? ''}
              className="stroke-verdigris"
              strokeWidth="2"
            />
          </>
        )}
        {portrait.spinodal.length > 0 && (
          <path
            d={dome(portrait.spinodal) ?? ''}
            className="stroke-cinnabar"
            strokeWidth="1.6"
            strokeDasharray="4 3"
          />
        )}
        {portrait.isotherms.map(({ label, points }, index) => (
          <path
            key={label}
            d={trace(points) ?? ''}
            className="stroke-ink"
            strokeWidth={index === 2 ? 2.2 : 1.4}
            strokeDasharray={DASHES[index]}
          />
        ))}
        {moving && (
          <path d={trace(moving.points) ?? ''} className="stroke-ultramarine" strokeWidth="2.6" />
        )}
        {isReduced && (
          <circle cx={x(1)} cy={y(1)} r="4.5" className="fill-sheet stroke-ink" strokeWidth="2" />
        )}
      </g>
      <g className="fill-ink-2">
        {ends.map(({ label, y: at }) => (
          <text key={label} x={area.right + 5} y={at + 4}>
            {label}
          </text>
        ))}
        {isReduced && (
          <>
            <text x={area.right + 5} y={area.top + 6}>
              <Reduced symbol="T" />
            </text>
            <text x={x(1) + 8} y={y(1) - 12} className="plot-halo">
              critical point
            </text>
          </>
        )}
      </g>
      {portrait.coexistence.length > 0 && (
        <text x={x(1.55)} y={y(0.33)} className="plot-halo fill-verdigris">
          coexistence
        </text>
      )}
      {portrait.spinodal.length > 0 && (
        <text x={x(2.9)} y={y(0.14)} className="plot-halo fill-cinnabar">
          spinodal
        </text>
      )}
    </svg>
  );
}
