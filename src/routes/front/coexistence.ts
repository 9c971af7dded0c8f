/**
 * Two phases of a fluid below its critical point: where the isotherm turns (spinodal), and the
 * pressure at which liquid and vapour have the same Gibbs energy (coexistence; Maxwell's equal
 * areas, J. C. Maxwell, Nature 11, 357 (1875), stated as an equality of −ln Q + pV/(NkT)).
 */
import { bracketRoot } from './bracketRoot.ts';
import type { CriticalPoint, Fluid } from './criticalPoint.ts';

/** Volumes at which the slope of the isotherm vanishes. */
export interface Spinodal {
  readonly liquid: number;
  readonly vapour: number;
}

export interface Coexistence {
  readonly temperature: number;
  readonly pressure: number;
  readonly liquid: number;
  readonly vapour: number;
}

const STEP = 1.02;
const WIDEST = 1e7;

/** Walks from `start` by factors until f changes sign, and finds the root in the last step. */
function walkToRoot(
  f: (volume: number) => number,
  start: number,
  factor: number,
): number | undefined {
  let previous = start;
  const sign = Math.sign(f(start));
  for (let volume = start * factor; ; volume *= factor) {
    if (volume > start * WIDEST || volume < start / WIDEST) return undefined;
    const value = f(volume);
    if (!Number.isFinite(value)) {
      // The edge of the domain: closer steps may still find the root before it.
      return Math.abs(factor - 1) < 1e-4
        ? undefined
        : walkToRoot(f, previous, 1 + (factor - 1) / 8);
    }
    if (Math.sign(value) !== sign) return bracketRoot(f, previous, volume, 1e-10);
    previous = volume;
  }
}

/** The two turning points of the isotherm; undefined where it does not turn. */
export function findSpinodal(
  fluid: Fluid,
  critical: CriticalPoint,
  temperature: number,
): Spinodal | undefined {
  const slope = (volume: number) => fluid.slope(temperature, volume);
  if (!(slope(critical.volume) > 0)) return undefined;
  const liquid = walkToRoot(slope, critical.volume, 1 / STEP);
  const vapour = walkToRoot(slope, critical.volume, STEP);
  return liquid === undefined || vapour === undefined ? undefined : { liquid, vapour };
}

/** Liquid and vapour in equilibrium at a temperature below the critical one. */
export function findCoexistence(
  fluid: Fluid,
  critical: CriticalPoint,
  temperature: number,
): Coexistence | undefined {
  const spinodal = findSpinodal(fluid, critical, temperature);
  if (!spinodal) return undefined;
  const lowest = Math.max(fluid.pressure(temperature, spinodal.liquid), 0);
  const highest = fluid.pressure(temperature, spinodal.vapour);
  if (!(highest > lowest)) return undefined;

  const volumesAt = (pressure: number) => {
    const excess = (volume: number) => fluid.pressure(temperature, volume) - pressure;
    return {
      liquid: walkToRoot(excess, spinodal.liquid, 1 / STEP),
      vapour: walkToRoot(excess, spinodal.vapour, STEP),
    };
  };
  const gibbs = (volume: number, pressure: number) =>
    (pressure * volume) / (fluid.gasConstant * temperature) -
    fluid.lnQ(temperature, volume) / moleculesPer(fluid);
  const difference = (pressure: number) => {
    const { liquid, vapour } = volumesAt(pressure);
    if (liquid === undefined || vapour === undefined) return Number.NaN;
    return gibbs(liquid, pressure) - gibbs(vapour, pressure);
  };

  const width = highest - lowest;
  const pressure = bracketRoot(difference, lowest + 1e-4 * width, highest - 1e-6 * width, 1e-9);
  if (pressure === undefined) return undefined;
  const { liquid, vapour } = volumesAt(pressure);
  if (liquid === undefined || vapour === undefined) return undefined;
  return { temperature, pressure, liquid, vapour };
}

const BOLTZMANN = 1.380649e-23;

function moleculesPer(fluid: Fluid): number {
  return fluid.gasConstant / BOLTZMANN;
}
