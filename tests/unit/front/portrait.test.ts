import { describe, expect, it } from 'vitest';
import { bracketRoot } from '../../../src/routes/front/bracketRoot.ts';
import { findCoexistence, findSpinodal } from '../../../src/routes/front/coexistence.ts';
import { findCriticalPoint } from '../../../src/routes/front/criticalPoint.ts';
import type { Fluid } from '../../../src/routes/front/criticalPoint.ts';
import { portray } from '../../../src/routes/front/portrait.ts';

const k = 1.380649e-23;
const N = 6.02214076e23;

/** p = N k T/(V − N b) − a N²/V², for which everything is known in closed form. */
function hardCore(a: number, b: number): Fluid {
  const inside = (V: number) => (V > N * b ? 1 : Number.NaN);
  return {
    pressure: (T, V) => ((N * k * T) / (V - N * b) - (a * N * N) / V ** 2) * inside(V),
    slope: (T, V) => ((-N * k * T) / (V - N * b) ** 2 + (2 * a * N * N) / V ** 3) * inside(V),
    lnQ: (T, V) => N * (Math.log((V - N * b) / N) + (a * N) / (V * k * T) + 1.5 * Math.log(T)),
    gasConstant: N * k,
  };
}

const a = 3.7e-49;
const b = 5.3e-29;
const fluid = hardCore(a, b);

describe('the critical point of a fluid', () => {
  it('stands where theory puts it: V_c = 3 N b, k T_c = 8 a/(27 b), p_c = a/(27 b²)', () => {
    const found = findCriticalPoint(fluid);
    expect(found?.temperature).toBeCloseTo((8 * a) / (27 * b * k), 5);
    expect((found?.volume ?? 0) / (3 * N * b)).toBeCloseTo(1, 4);
    expect((found?.pressure ?? 0) / (a / (27 * b * b))).toBeCloseTo(1, 6);
  });

  it('is not found where there is none', () => {
    expect(findCriticalPoint(hardCore(0, b))).toBeUndefined();
    expect(findCriticalPoint(hardCore(0, 0))).toBeUndefined();
  });
});

describe('coexistence', () => {
  it('has the vapour pressure of the reduced equation at T = 0.9 T_c', () => {
    const critical = findCriticalPoint(fluid);
    if (!critical) throw new Error('no critical point');
    const phases = findCoexistence(fluid, critical, 0.9 * critical.temperature);
    // p/p_c = 0.64700, V_l/V_c = 0.60340, V_g/V_c = 2.34884: equal areas of the reduced equation,
    // solved independently to five figures.
    expect((phases?.pressure ?? 0) / critical.pressure).toBeCloseTo(0.647, 3);
    expect((phases?.liquid ?? 0) / critical.volume).toBeCloseTo(0.6034, 3);
    expect((phases?.vapour ?? 0) / critical.volume).toBeCloseTo(2.3488, 3);
  });

  it('lies outside the spinodal', () => {
    const critical = findCriticalPoint(fluid);
    if (!critical) throw new Error('no critical point');
    for (const reduced of [0.8, 0.9, 0.98]) {
      const phases = findCoexistence(fluid, critical, reduced * critical.temperature);
      const turning = findSpinodal(fluid, critical, reduced * critical.temperature);
      expect(phases?.liquid).toBeLessThan(turning?.liquid ?? 0);
      expect(phases?.vapour).toBeGreaterThan(turning?.vapour ?? Infinity);
    }
  });
});

describe('the portrait of a fluid', () => {
  it('is reduced by the critical point and has both curves', () => {
    const portrait = portray(fluid);
    expect(portrait?.isotherms.map(({ label }) => label)).toEqual([
      '0.8',
      '0.9',
      '1.0',
      '1.1',
      '1.3',
    ]);
    expect(portrait?.coexistence.length).toBeGreaterThan(15);
    expect(portrait?.spinodal.length).toBeGreaterThan(15);
  });

  it('is molar for a gas without critical point', () => {
    const portrait = portray(hardCore(0, 0));
    expect(portrait?.critical).toBeUndefined();
    expect(portrait?.isotherms[1]?.label).toBe('300 K');
    const [x, y] = portrait?.isotherms[1]?.points[0] ?? [0, 0];
    expect(x * y).toBeCloseTo(N * k * 300, 6);
  });

  it('is absent where the pressure has no values', () => {
    const nothing = () => Number.NaN;
    expect(
      portray({ pressure: nothing, slope: nothing, lnQ: nothing, gasConstant: N * k }),
    ).toBeUndefined();
  });
});

describe('a bracketed root', () => {
  it('is found to the tolerance and refused without a change of sign', () => {
    expect(bracketRoot((x) => x * x - 2, 0, 2)).toBeCloseTo(Math.SQRT2, 10);
    expect(bracketRoot((x) => x * x + 1, 0, 2)).toBeUndefined();
    expect(bracketRoot(() => Number.NaN, 0, 2)).toBeUndefined();
  });
});
