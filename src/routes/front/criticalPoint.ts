/**
 * The critical point of a fluid by its pressure: the highest temperature at which an isotherm still
 * has a point of zero slope, ∂p/∂V = 0 = ∂²p/∂V².
 */
import { bracketRoot } from './bracketRoot.ts';

/** A fluid of a fixed number of molecules, as functions of T in K and V in m³. */
export interface Fluid {
  /** Pressure in Pa; not a number outside the domain of the model. */
  readonly pressure: (temperature: number, volume: number) => number;
  /** ∂p/∂V at constant T, in Pa/m³. */
  readonly slope: (temperature: number, volume: number) => number;
  /** ln of the partition function. */
  readonly lnQ: (temperature: number, volume: number) => number;
  /** N k in J/K. */
  readonly gasConstant: number;
}

export interface CriticalPoint {
  readonly temperature: number;
  readonly volume: number;
  readonly pressure: number;
}

/** Molar volumes are looked through from 1 cm³ to 1 m³, temperatures from 1 K to 20,000 K. */
const SMALLEST_VOLUME = 1e-6;
const LARGEST_VOLUME = 1;
const VOLUMES = 240;
const STIFFEST = 1e4;
const LOWEST_TEMPERATURE = 1;
const HIGHEST_TEMPERATURE = 2e4;
const TEMPERATURES = 36;

function volumeAt(index: number): number {
  return SMALLEST_VOLUME * (LARGEST_VOLUME / SMALLEST_VOLUME) ** (index / (VOLUMES - 1));
}

/** −V² ∂p/∂V /(N k T): 1 for an ideal gas, below 0 where the fluid is unstable. */
function stiffness(fluid: Fluid, temperature: number, volume: number): number {
  return (-volume * volume * fluid.slope(temperature, volume)) / (fluid.gasConstant * temperature);
}

/** The least stiffness along an isotherm and where it stands; undefined where there is no minimum. */
function softest(
  fluid: Fluid,
  temperature: number,
): { readonly volume: number; readonly value: number } | undefined {
  let best = -1;
  let least = Infinity;
  // From the gas to denser states, up to where the fluid is as stiff as a packing without room:
  // what seems to lie beyond belongs to another branch of the formula.
  for (let i = VOLUMES - 1; i >= 0; i--) {
    const value = stiffness(fluid, temperature, volumeAt(i));
    if (!(value < STIFFEST)) break;
    if (value < least) {
      least = value;
      best = i;
    }
  }
  // At an end of the range, or beside the edge of the domain, it is no minimum.
  if (best <= 0 || best >= VOLUMES - 1) return undefined;
  if (!Number.isFinite(stiffness(fluid, temperature, volumeAt(best - 1)))) return undefined;
  let low = Math.log(volumeAt(best - 1));
  let high = Math.log(volumeAt(best + 1));
  const golden = (Math.sqrt(5) - 1) / 2;
  while (high - low > 1e-9) {
    const a = high - golden * (high - low);
    const b = low + golden * (high - low);
    if (stiffness(fluid, temperature, Math.exp(a)) < stiffness(fluid, temperature, Math.exp(b))) {
      high = b;
    } else {
      low = a;
    }
  }
  const volume = Math.exp((low + high) / 2);
  return { volume, value: stiffness(fluid, temperature, volume) };
}

/** The critical point, or undefined where the fluid has none in the range looked through. */
export function findCriticalPoint(fluid: Fluid): CriticalPoint | undefined {
  const ratio = (HIGHEST_TEMPERATURE / LOWEST_TEMPERATURE) ** (1 / (TEMPERATURES - 1));
  let stable: number | undefined;
  for (let i = TEMPERATURES - 1; i >= 0; i--) {
    const temperature = LOWEST_TEMPERATURE * ratio ** i;
    const value = softest(fluid, temperature)?.value;
    if (value === undefined) continue;
    if (value > 0) {
      stable = temperature;
      continue;
    }
    if (stable === undefined) return undefined;
    const found = bracketRoot(
      (t) => softest(fluid, t)?.value ?? Number.NaN,
      temperature,
      stable,
      1e-10,
    );
    const volume = found === undefined ? undefined : softest(fluid, found)?.volume;
    if (found === undefined || volume === undefined) return undefined;
    const pressure = fluid.pressure(found, volume);
    return pressure > 0 ? { temperature: found, volume, pressure } : undefined;
  }
  return undefined;
}
