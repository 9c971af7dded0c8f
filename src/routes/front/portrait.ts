/** What the plot of the front door shows of a fluid, in the coordinates in which it is drawn. */
import { findCoexistence, findSpinodal } from './coexistence.ts';
import { findCriticalPoint } from './criticalPoint.ts';
import type { CriticalPoint, Fluid } from './criticalPoint.ts';

export type Point = readonly [x: number, y: number];

export interface Isotherm {
  /** Said at its end: `0.9` for T/T_c, `300 K`. */
  readonly label: string;
  readonly points: readonly Point[];
}

export interface Portrait {
  /** Present where the axes are reduced by it. */
  readonly critical: CriticalPoint | undefined;
  readonly isotherms: readonly Isotherm[];
  /** Both branches of each, from the liquid over the critical point to the vapour. */
  readonly coexistence: readonly Point[];
  readonly spinodal: readonly Point[];
  readonly xRange: readonly [number, number];
  readonly yRange: readonly [number, number];
}

const REDUCED_TEMPERATURES = [0.8, 0.9, 1, 1.1, 1.3];
const REDUCED_VOLUMES: readonly [number, number] = [0.4, 12];
const REDUCED_PRESSURES: readonly [number, number] = [-0.2, 1.6];
/** Closer together towards the critical point, where the dome is round. */
const DOME = [0.72, 0.76, 0.8, 0.84, 0.88, 0.92, 0.95, 0.97, 0.985, 0.994, 0.998];
const TEMPERATURES = [200, 300, 400, 600];
const POINTS = 220;

/** The points of an isotherm over a logarithmic range; those outside the domain are left out. */
export function traceIsotherm(
  fluid: Fluid,
  temperature: number,
  range: readonly [number, number],
  unit: { readonly volume: number; readonly pressure: number },
): Point[] {
  const points: Point[] = [];
  for (let i = 0; i < POINTS; i++) {
    const x = range[0] * (range[1] / range[0]) ** (i / (POINTS - 1));
    const y = fluid.pressure(temperature, x * unit.volume) / unit.pressure;
    if (Number.isFinite(y)) points.push([x, y]);
  }
  return points;
}

function reducedPortrait(fluid: Fluid, critical: CriticalPoint): Portrait {
  const { temperature: tc, volume: vc, pressure: pc } = critical;
  const isotherms = REDUCED_TEMPERATURES.map<Isotherm>((reduced) => ({
    label: reduced.toFixed(1),
    points: traceIsotherm(fluid, reduced * tc, REDUCED_VOLUMES, { volume: vc, pressure: pc }),
  }));
  const liquid: Point[] = [];
  const vapour: Point[] = [];
  const turningLiquid: Point[] = [];
  const turningVapour: Point[] = [];
  for (const reduced of DOME) {
    const phases = findCoexistence(fluid, critical, reduced * tc);
    if (phases) {
      liquid.push([phases.liquid / vc, phases.pressure / pc]);
      vapour.unshift([phases.vapour / vc, phases.pressure / pc]);
    }
  }
  for (const reduced of [0.14, 0.2, 0.26, 0.33, 0.4, 0.5, 0.6, 0.68, ...DOME]) {
    const turning = findSpinodal(fluid, critical, reduced * tc);
    if (turning) {
      turningLiquid.push([turning.liquid / vc, fluid.pressure(reduced * tc, turning.liquid) / pc]);
      turningVapour.unshift([
        turning.vapour / vc,
        fluid.pressure(reduced * tc, turning.vapour) / pc,
      ]);
    }
  }
  const top: Point = [1, 1];
  return {
    critical,
    isotherms,
    coexistence: liquid.length > 0 ? [...liquid, top, ...vapour] : [],
    spinodal: turningLiquid.length > 0 ? [...turningLiquid, top, ...turningVapour] : [],
    xRange: REDUCED_VOLUMES,
    yRange: REDUCED_PRESSURES,
  };
}

/** Molar volume in cm³ and pressure in MPa, for a fluid without critical point. */
export const MOLAR_UNIT = { volume: 1e-6, pressure: 1e6 };
const MOLAR_VOLUMES: readonly [number, number] = [60, 6000];

function molarPortrait(fluid: Fluid): Portrait | undefined {
  const isotherms = TEMPERATURES.map<Isotherm>((temperature) => ({
    label: `${temperature} K`,
    points: traceIsotherm(fluid, temperature, MOLAR_VOLUMES, MOLAR_UNIT),
  }));
  const middle = isotherms[1]?.points.map(([, y]) => y).sort((a, b) => a - b) ?? [];
  const upper = middle[Math.floor(0.97 * (middle.length - 1))];
  const lowest = Math.min(...isotherms.flatMap(({ points }) => points.map(([, y]) => y)));
  if (upper === undefined || !(upper > 0)) return undefined;
  return {
    critical: undefined,
    isotherms,
    coexistence: [],
    spinodal: [],
    xRange: MOLAR_VOLUMES,
    yRange: [Math.max(Math.min(0, lowest), -0.25 * upper), upper],
  };
}

/** The portrait of a fluid; undefined where its pressure has no values to show. */
export function portray(fluid: Fluid): Portrait | undefined {
  const critical = findCriticalPoint(fluid);
  return critical ? reducedPortrait(fluid, critical) : molarPortrait(fluid);
}
