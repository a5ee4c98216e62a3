import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arcOwnShare, cumulativeInductance, ringMutual, ringSelf, ringSumMatrixFree } from '../../src/physics/rings.ts';
import { accuracy, off } from '../published/accuracy.ts';
import { neumannMutual } from './neumann.ts';

const SEED = 20260802;
const R = 0.038;
const A = 2.5e-4;
/** Thirty turns with a wider step after every seventh, as lifted taps make them. */
const TAPPED = Array.from({ length: 30 }, (_, i) => 6e-4 * i + 3e-4 * Math.floor(i / 7));

describe('inductance up to a turn', () => {
  test('section identity at every whole turn', () => {
    // L = L1 + L2 + 2 M with M of the two sections by Neumann's integral, which shares nothing with Maxwell's form.
    const coil = cumulativeInductance(TAPPED, R, A);
    const whole = coil.at(30);
    const errors = Array.from({ length: 29 }, (_, i) => {
      const tap = i + 1;
      const rest = cumulativeInductance(TAPPED.slice(tap), R, A).at(30 - tap);
      let mutual = 0;
      for (const low of TAPPED.slice(0, tap)) {
        for (const high of TAPPED.slice(tap)) mutual += neumannAt(high - low);
      }
      return off(coil.at(tap) + rest + 2 * mutual, whole);
    });
    // Rounding of some hundred terms.
    accuracy("section identity L1 + L2 + 2M, M by Neumann's integral (relative)", errors, 1e-12);
  });

  test('at whole turns it is the ring sum of the first turns', () => {
    let cases = 0;
    const gaps = fc.array(fc.double({ min: 3e-4, max: 3e-3, noNaN: true }), { minLength: 1, maxLength: 25 });
    fc.assert(
      fc.property(gaps, (list) => {
        const places = list.map((_, i) => list.slice(0, i).reduce((sum, gap) => sum + gap, 0));
        const coil = cumulativeInductance(places, R, A);
        for (let k = 1; k <= places.length; k++) {
          expect(off(coil.at(k), ringSumMatrixFree(places.slice(0, k), R, A))).toBeCloseTo(0, 12);
          cases++;
        }
        expect(coil.at(0)).toBe(0);
      }),
      { seed: SEED, numRuns: 60 },
    );
    console.log(`prefixes of windings: ${cases}`);
    expect(cases).toBeGreaterThan(100);
  });

  test('continuous across whole turns and rising everywhere', () => {
    const coil = cumulativeInductance(TAPPED, R, A);
    for (let k = 1; k < 30; k++) {
      // A microturn is worth at most 2e-6 of the largest step between turns, 1.1e-5 H.
      expect(Math.abs(coil.at(k - 1e-6) - coil.at(k))).toBeLessThan(3e-11);
      expect(Math.abs(coil.at(k + 1e-6) - coil.at(k))).toBeLessThan(3e-11);
    }
    let before = 0;
    for (let i = 1; i <= 600; i++) {
      const now = coil.at(i / 20);
      expect(now).toBeGreaterThan(before);
      before = now;
    }
  });

  test('between turns: whole rings, and an arc where the helix has it', () => {
    // Turn 9 + 0.3: rings 0..8 and an arc at u = 9.15, between positions 8 (u = 8.5) and 9 (u = 9.5).
    const z = TAPPED[8]! + 0.65 * (TAPPED[9]! - TAPPED[8]!);
    let expected = ringSumMatrixFree(TAPPED.slice(0, 9), R, A) + ringSelf(R, A) * arcOwnShare(0.3, R, A);
    for (const ring of TAPPED.slice(0, 9)) expected += 2 * 0.3 * ringMutual(R, z - ring);
    expect(off(cumulativeInductance(TAPPED, R, A).at(9.3), expected)).toBeCloseTo(0, 12);
    // Below half a turn there is no ring to couple with.
    expect(cumulativeInductance(TAPPED, R, A).at(0.25)).toBe(ringSelf(R, A) * arcOwnShare(0.25, R, A));
  });

  test('a winding that ends in a part of a turn', () => {
    const places = [...TAPPED.slice(0, 10), TAPPED[9]! + 0.7 * 6e-4];
    const coil = cumulativeInductance(places, R, A, 10.4);
    expect(off(coil.at(10.4), ringSumMatrixFree(places, R, A, 0.4))).toBeCloseTo(0, 12);
    expect(off(coil.at(10), ringSumMatrixFree(places.slice(0, 10), R, A))).toBeCloseTo(0, 12);
    // On an even pitch the tap sees nothing of whether the winding goes on.
    const long = cumulativeInductance(
      TAPPED.slice(0, 7).map((_, i) => i * 6e-4),
      R,
      A,
    );
    const short = cumulativeInductance(
      [...Array(5).keys(), 4.75].map((u) => u * 6e-4),
      R,
      A,
      5.5,
    );
    for (const turn of [0.2, 1, 4.6, 5, 5.3, 5.5]) expect(off(short.at(turn), long.at(turn))).toBeCloseTo(0, 12);
    const single = cumulativeInductance([0], R, A, 0.6);
    expect(off(single.at(0.6), ringSelf(R, A) * arcOwnShare(0.6, R, A))).toBeCloseTo(0, 12);
  });

  test('refuses turns outside the winding and positions that do not match', () => {
    const coil = cumulativeInductance(TAPPED, R, A);
    for (const turn of [-1, 30.1, Number.NaN]) expect(() => coil.at(turn)).toThrow(RangeError);
    expect(() => cumulativeInductance(TAPPED, R, A, 29.5 - 1)).toThrow(/29 positions/);
    expect(() => cumulativeInductance([], R, A)).toThrow(RangeError);
  });

  test('five hundred turns take milliseconds', () => {
    const places = Array.from({ length: 500 }, (_, i) => 6e-4 * i + (i > 250 ? 3e-4 : 0));
    const runs = Array.from({ length: 5 }, () => {
      const start = performance.now();
      cumulativeInductance(places, R, A).at(250.5);
      return performance.now() - start;
    });
    // Measured 3 ms; a wide margin, for a busy machine.
    expect(Math.min(...runs)).toBeLessThan(40);
  });
});

const known = new Map<string, number>();
/** M of two rings by Neumann's integral, each distance (to a picometre) once. */
function neumannAt(distance: number): number {
  const key = distance.toFixed(12);
  const value = known.get(key) ?? neumannMutual(R, R, distance);
  known.set(key, value);
  return value;
}
