import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { MU0 } from '../../src/physics/constants.ts';
import { coaxialMutual, ringMutual, ringSelf, ringSumMatrixFree } from '../../src/physics/rings.ts';
import { accuracy, off, spread } from '../published/accuracy.ts';
import { neumannMutual } from './neumann.ts';

const SEED = 20260801;
const even = (count: number, pitch: number) => Array.from({ length: count }, (_, i) => i * pitch);
/** Positions of a winding with a few wider steps, as taps make them. */
const stepped = (steps: readonly number[]) => {
  let z = 0;
  return steps.map((step) => {
    z += step;
    return z;
  });
};
const steps = fc.array(fc.double({ min: 3e-4, max: 3e-3, noNaN: true }), { minLength: 2, maxLength: 40 });
const radii = fc.double({ min: 0.01, max: 0.1, noNaN: true });

describe('two circles', () => {
  test("Maxwell's form against Neumann's integral", () => {
    const equal = spread(0.02, 50, 60).map((z) => off(ringMutual(0.04, 0.04 * z), neumannMutual(0.04, 0.04, 0.04 * z)));
    // The integral of the farthest circles cancels to 1e-5 of its terms, which costs it five digits; nearer ones have 1e-14.
    accuracy("Maxwell's M of equal circles, Neumann (relative)", equal.slice(0, 40), 2e-13);
    const unequal = spread(0.02, 2, 40).map((z) =>
      off(coaxialMutual(0.05, 0.03, 0.05 * z), neumannMutual(0.05, 0.03, 0.05 * z)),
    );
    accuracy("Maxwell's M of unequal circles, Neumann (relative)", unequal, 2e-13);
  });

  test('distant circles are dipoles', () => {
    // mu0 pi R^4/(2 z^3) (1 - 3 R^2/z^2): the next term is (R/z)^4, 1e-12 and less at a thousand radii.
    const errors = spread(1e3, 1e6, 20).map((z) =>
      off(ringMutual(1, z), ((MU0 * Math.PI) / (2 * z ** 3)) * (1 - 3 / z ** 2)),
    );
    accuracy('distant circles as dipoles (relative)', errors, 2e-11);
  });

  test('coaxialMutual of equal radii is ringMutual, either way round and either sign', () => {
    fc.assert(
      fc.property(radii, radii, fc.double({ min: 1e-4, max: 1, noNaN: true }), (r1, r2, z) => {
        expect(off(coaxialMutual(r1, r1, z), ringMutual(r1, z))).toBeCloseTo(0, 13);
        expect(off(coaxialMutual(r1, r2, z), coaxialMutual(r2, r1, -z))).toBeCloseTo(0, 13);
        expect(ringMutual(r1, -z)).toBe(ringMutual(r1, z));
      }),
      { seed: SEED },
    );
  });

  test('the same circle twice couples without limit', () => {
    expect(ringMutual(0.05, 0)).toBe(Number.POSITIVE_INFINITY);
    expect(coaxialMutual(0.05, 0.05, 0)).toBe(Number.POSITIVE_INFINITY);
  });

  test('own term: M at the mean distance a exp(-1/4) of the section for thin wire', () => {
    // Leading order of both; what differs goes as (a/R)^2 ln.
    for (const a of [1e-5, 1e-4, 1e-3]) {
      expect(Math.abs(off(ringSelf(1, a), ringMutual(1, a * Math.exp(-0.25))))).toBeLessThan(2 * a * a);
    }
    expect(() => ringSelf(0.05, 0)).toThrow(RangeError);
  });
});

describe('the sum over rings', () => {
  test('evenly spaced rings give the same by N evaluations and by N^2/2', () => {
    for (const count of [3, 10, 100]) {
      const places = even(count, 6e-4);
      const shuffled = [...places.slice(1), places[0]!];
      // Out of order they are not even, so every pair is evaluated.
      expect(off(ringSumMatrixFree(places, 0.038, 2.5e-4), ringSumMatrixFree(shuffled, 0.038, 2.5e-4))).toBeCloseTo(
        0,
        12,
      );
    }
  });

  test('the same from either end, upside down or shifted', () => {
    let cases = 0;
    fc.assert(
      fc.property(steps, radii, (list, radius) => {
        const places = stepped(list);
        const whole = ringSumMatrixFree(places, radius, 1e-4);
        expect(off(ringSumMatrixFree([...places].reverse(), radius, 1e-4), whole)).toBeCloseTo(0, 12);
        expect(
          off(
            ringSumMatrixFree(
              places.map((z) => 0.3 - z),
              radius,
              1e-4,
            ),
            whole,
          ),
        ).toBeCloseTo(0, 11);
        cases++;
      }),
      { seed: SEED },
    );
    console.log(`ring sums from both ends: ${cases}`);
  });

  test('inductance scales with size', () => {
    fc.assert(
      fc.property(steps, radii, fc.double({ min: 0.1, max: 10, noNaN: true }), (list, radius, scale) => {
        const places = stepped(list);
        const scaled = ringSumMatrixFree(
          places.map((z) => z * scale),
          radius * scale,
          1e-4 * scale,
        );
        expect(off(scaled, scale * ringSumMatrixFree(places, radius, 1e-4))).toBeCloseTo(0, 12);
      }),
      { seed: SEED },
    );
  });

  test('spreading a winding lowers it, one turn more raises it, thicker wire lowers it', () => {
    fc.assert(
      fc.property(steps, radii, (list, radius) => {
        const places = stepped(list);
        const whole = ringSumMatrixFree(places, radius, 1e-4);
        expect(
          ringSumMatrixFree(
            places.map((z) => 1.01 * z),
            radius,
            1e-4,
          ),
        ).toBeLessThan(whole);
        expect(ringSumMatrixFree(places.slice(0, -1), radius, 1e-4)).toBeLessThan(whole);
        expect(ringSumMatrixFree(places, radius, 1.1e-4)).toBeLessThan(whole);
      }),
      { seed: SEED },
    );
  });

  test('a part of a last turn goes from nothing to all of it', () => {
    const places = even(20, 1e-3);
    const at = (fraction: number) => ringSumMatrixFree(places, 0.04, 3e-4, fraction);
    expect(at(0)).toBe(ringSumMatrixFree(places.slice(0, -1), 0.04, 3e-4));
    // The share has slope 2 and the coupling slope 1 there: 1e-9 of a turn is 1e-9 of the last turn.
    expect(off(at(1 - 1e-9), at(1))).toBeCloseTo(0, 8);
    const values = Array.from({ length: 101 }, (_, i) => at(i / 100));
    for (let i = 1; i <= 100; i++) expect(values[i]).toBeGreaterThan(values[i - 1]!);
  });

  test('asks for at least one ring and positive radii', () => {
    expect(() => ringSumMatrixFree([], 0.04, 1e-4)).toThrow(RangeError);
    expect(() => ringSumMatrixFree([0], -0.04, 1e-4)).toThrow(RangeError);
    expect(() => ringSumMatrixFree([0, 1e-3], 0.04, 1e-4, 1.5)).toThrow(RangeError);
  });
});
