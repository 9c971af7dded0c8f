/**
 * States to try a model at: seeded, so that the same model is always tried at the same states,
 * logarithmically even over scales that make sense for molecules, and inside the domain.
 */
import type { NaturalVariable } from '../language/formulation.ts';
import { equalDimensions, isDimensionless } from '../units/dimension.ts';
import { PRESSURE } from './catalogue/dimensions.ts';
import type { Model } from './model.ts';

/** Values of the natural variables by name, in SI units. */
export type State = ReadonlyMap<string, number>;

/** Numbers between 0 and 1 from a seed (a Weyl sequence through a mixing of its bits). */
export function seededNumbers(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 2 ** 32;
  };
}

const AVOGADRO = 6.02214076e23;
const BOLTZMANN = 1.380649e-23;

/** Extent per molecule in the powers of the metre: 3 for a volume, 0 for sites. */
const EXTENT_PER_MOLECULE: Readonly<Record<number, readonly [number, number]>> = {
  3: [2e-29, 1e-24],
  2: [2e-20, 1e-16],
  1: [1e-10, 1e-7],
  0: [1.05, 100],
};

/** A state at molecular scales; it need not be inside the domain. */
export function drawState(model: Model, next: () => number): State {
  const between = (low: number, high: number): number => low * (high / low) ** next();
  const state = new Map<string, number>();
  const temperature = between(50, 2000);
  const total = between(0.5 * AVOGADRO, 2 * AVOGADRO);
  const variables = model.surroundings.naturals;
  const count = variables.filter(({ role }) => role === 'number').length;
  for (const variable of variables) {
    state.set(variable.name, draw(variable, { temperature, total, count, between }));
  }
  return state;
}

function draw(
  variable: NaturalVariable,
  context: {
    temperature: number;
    total: number;
    count: number;
    between: (low: number, high: number) => number;
  },
): number {
  const { temperature, total, count, between } = context;
  switch (variable.role) {
    case 'temperature':
      return temperature;
    case 'number':
      return count === 1 ? total : (total * between(0.1, 10)) / count;
    case 'extent': {
      const lengths = Number(variable.dimension[0]?.numerator ?? 3n);
      const [low, high] = EXTENT_PER_MOLECULE[lengths] ?? [1e-29, 1e-24];
      return total * between(low, high);
    }
    case 'pressure': {
      if (equalDimensions(variable.dimension, PRESSURE)) return between(1e2, 1e8);
      const lengths = 2 - Number(variable.dimension[0]?.numerator ?? 0n);
      const [low, high] = EXTENT_PER_MOLECULE[lengths] ?? [1e-29, 1e-24];
      return (BOLTZMANN * temperature) / between(low, high);
    }
    case 'chemical potential':
      return -BOLTZMANN * temperature * between(1, 30);
    case 'energy':
      return total * BOLTZMANN * temperature * between(0.5, 5);
    case 'field':
      return isDimensionless(variable.dimension) ? between(0.1, 10) : between(0.05, 20);
  }
}
