import fc from 'fast-check';
import { expect, test } from 'vitest';
import { ellipticKE } from '../../src/physics/elliptic.ts';
import { nagaokaK, sheetInductance } from '../../src/physics/nagaoka.ts';
import { ringSumMatrixFree } from '../../src/physics/rings.ts';
import { rosaA, rosaB, roundWireInductance } from '../../src/physics/rosa.ts';
import { wheeler1928, wheeler1982, wheelerTurns } from '../../src/physics/wheeler.ts';
import { accuracy, off, spread } from '../published/accuracy.ts';

const SEED = 20260803;

test("Nagaoka's coefficient at its edges", () => {
  // Short: (2 x/pi)(ln(4/x) - 1/2) with x = l/D; what follows is of relative order x^2 ln.
  const short = spread(1e-9, 1e-4, 20).map((x) => off(nagaokaK(1, x), ((2 * x) / Math.PI) * (Math.log(4 / x) - 0.5)));
  accuracy('Nagaoka, very short coils, limiting form (relative)', short, 5e-9);
  // Long: 1 - 4/(3 pi) D/l + (D/l)^2/8 - ...
  const long = spread(1e3, 1e6, 20).map((x) => nagaokaK(1, x) - (1 - 4 / (3 * Math.PI * x) + 1 / (8 * x * x)));
  accuracy('Nagaoka, very long coils, limiting form (absolute)', long, 1e-12);
});

test("Nagaoka's coefficient falls with diameter and depends on the ratio only", () => {
  const values = spread(1e-4, 1e4, 400).map((ratio) => nagaokaK(ratio, 1));
  for (let i = 1; i < values.length; i++) expect(values[i]).toBeLessThan(values[i - 1]!);
  for (const ratio of spread(0.01, 100, 30)) expect(off(nagaokaK(ratio, 1), nagaokaK(7 * ratio, 7))).toBeCloseTo(0, 13);
});

test('elliptic integrals and the laws refuse what they cannot take', () => {
  expect(ellipticKE(1)).toEqual({ K: Math.PI / 2, E: Math.PI / 2 });
  for (const bad of [0, -1, 1.1, Number.NaN]) expect(() => ellipticKE(bad)).toThrow(RangeError);
  expect(() => nagaokaK(0, 1)).toThrow(/diameter/);
  expect(() => nagaokaK(1, Number.NaN)).toThrow(/length/);
  expect(() => rosaA(0)).toThrow(RangeError);
  expect(() => rosaB(0.5)).toThrow(RangeError);
  expect(() => wheelerTurns(-1, 1, 1)).toThrow(/inductance/);
});

test("Rosa's B is its sum at every whole turn and rises smoothly between", () => {
  const errors = Array.from({ length: 1000 }, (_, i) => rosaB(i + 1) - sumB(i + 1));
  // The sum's own rounding is 1e-15 of its terms; closing it over twelve small turns costs two digits.
  accuracy("Rosa's B, its sum for 1 to 1000 turns (absolute)", errors, 5e-13);
  let before = -1e-12;
  for (let n = 1; n < 40; n += 0.01) {
    const b = rosaB(n);
    expect(b).toBeGreaterThan(before);
    before = b;
  }
  expect(rosaB(1e7)).toBeCloseTo(Math.log(2 * Math.PI) - 1.5, 6);
});

test('sheet with Rosa follows the ring sum', () => {
  // Grover 1946: exact for strips; close-wound coils of thin wire within 20 ppm, drifting to 0.1 % at a pitch of D/10.
  const error = (turns: number, pitch: number) => {
    const places = Array.from({ length: turns }, (_, i) => i * pitch);
    return off(roundWireInductance(turns, 0.1, pitch, 0.8 * pitch), ringSumMatrixFree(places, 0.05, 0.4 * pitch));
  };
  const counts = [2, 5, 20, 100, 300];
  accuracy(
    'Rosa against rings, p = D/100 to D/200 (relative)',
    counts.flatMap((n) => [error(n, 1e-3), error(n, 5e-4)]),
    3e-5,
  );
  accuracy(
    'Rosa against rings, p = D/10 (relative)',
    counts.map((n) => error(n, 1e-2)),
    2e-3,
  );
});

test('inverse of Wheeler 1982', () => {
  const errors: number[] = [];
  fc.assert(
    fc.property(
      fc.double({ min: Math.log(0.3), max: Math.log(2000), noNaN: true }),
      fc.double({ min: 0.005, max: 0.3, noNaN: true }),
      fc.double({ min: 5e-5, max: 0.02, noNaN: true }),
      (logTurns, diameter, pitch) => {
        const turns = Math.exp(logTurns);
        errors.push(off(wheelerTurns(wheeler1982(turns, diameter, turns * pitch), diameter, pitch), turns));
      },
    ),
    { seed: SEED, numRuns: 500 },
  );
  // Solved to 1e-13 in ln N, in fact to rounding, since Newton's last step doubles the digits.
  accuracy('turns from Wheeler 1982 and back (relative)', errors, 1e-13);
});

test('more turns, more inductance, by every law', () => {
  const laws = [
    (n: number) => sheetInductance(n, 0.076, n * 6e-4),
    (n: number) => roundWireInductance(n, 0.076, 6e-4, 5e-4),
    (n: number) => wheeler1928(n, 0.076, n * 6e-4),
    (n: number) => wheeler1982(n, 0.076, n * 6e-4),
  ];
  for (const law of laws) for (let n = 1; n < 200; n += 0.5) expect(law(n + 0.5)).toBeGreaterThan(law(n));
});

/** B by its definition; ln m - ln R_m by the series in 1/m, which cancels nothing. */
function sumB(turns: number): number {
  let sum = 0;
  for (let m = turns - 1; m >= 1; m--) sum += (turns - m) * LACK[m]!;
  return (2 * sum) / turns;
}

/** ln m - ln R_m = sum over j of m^-2j/(2 j (j + 1)(2 j + 1)); at m = 1 the closed form 3/2 - 2 ln 2. */
const LACK = Array.from({ length: 1000 }, (_, m) => {
  if (m === 0) return 0;
  if (m === 1) return 1.5 - 2 * Math.LN2;
  let sum = 0;
  for (let j = 40; j >= 1; j--) sum += m ** (-2 * j) / (2 * j * (j + 1) * (2 * j + 1));
  return sum;
});
