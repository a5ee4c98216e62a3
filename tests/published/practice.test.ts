import fc from 'fast-check';
import { expect, test } from 'vitest';
import { selfCapacitance } from '../../src/physics/medhurst.ts';
import { cumulativeInductance } from '../../src/physics/rings.ts';
import { capacitanceFor, inductanceFor, resonance, wavelength } from '../../src/physics/tuning.ts';
import { accuracy, off, spread } from './accuracy.ts';

test('common practice: every turn more tunes lower', () => {
  // Each tap by itself with a capacitor and the self-capacitance of its own turns.
  const coil = cumulativeInductance(
    Array.from({ length: 100 }, (_, i) => i * 6e-4),
    0.0383,
    2.5e-4,
  );
  const tuned = (turns: number, farad: number) =>
    resonance(coil.at(turns), farad + selfCapacitance(turns * 6e-4, 0.0766));
  let cases = 0;
  for (const farad of [27e-12, 92e-12, 400e-12]) {
    // Below 13 turns the coil is shorter than the shortest that Medhurst measured.
    for (let turns = 14; turns <= 100; turns++) {
      expect(tuned(turns, farad)).toBeLessThan(tuned(turns - 1, farad));
      cases++;
    }
  }
  console.log(`more turns tune lower: ${cases} cases`);
  expect(cases).toBe(261);
});

test('a coil worked out elsewhere: 100 turns, D = 76.6, p = 0.6, d = 0.5 mm', () => {
  // COMPUTED: rings give 607.8 uH, Medhurst's table 3.54 pF, and 92 pF with them tunes to 0.660 MHz.
  const coil = cumulativeInductance(
    Array.from({ length: 100 }, (_, i) => i * 6e-4),
    0.0383,
    2.5e-4,
  );
  expect(coil.at(100) * 1e6).toBeCloseTo(607.8, 1);
  const own = selfCapacitance(0.06, 0.0766);
  // Interpolation between 0.7 and 0.8 of the two-digit table: half a unit of its last digit is 1 %.
  expect(Math.abs(off(own, 3.54e-12))).toBeLessThan(0.01);
  // Three digits, and 0.1 % of 95.5 pF by that.
  expect(Math.abs(resonance(coil.at(100), 92e-12 + own) / 1e6 - 0.66)).toBeLessThan(0.001);
  // COMPUTED: tap sections alone, self-capacitance of their own turns.
  const alone = [
    [20, 400, 1.092],
    [20, 92, 2.223],
    [40, 92, 1.285],
    [40, 27, 2.248],
  ].map(([tap, pico, megahertz]) => {
    const c = pico! * 1e-12 + selfCapacitance(tap! * 6e-4, 0.0766);
    return off(resonance(coil.at(tap!), c), megahertz! * 1e6);
  });
  accuracy('tap sections alone, first resonance (relative)', alone, 2e-3);
});

test('the tuned circuit and its inverses', () => {
  fc.assert(
    fc.property(
      fc.double({ min: 1e-7, max: 1e-2, noNaN: true }),
      fc.double({ min: 1e-12, max: 1e-8, noNaN: true }),
      (henry, farad) => {
        const f = resonance(henry, farad);
        expect(off(inductanceFor(f, farad), henry)).toBeCloseTo(0, 12);
        expect(off(capacitanceFor(f, henry), farad)).toBeCloseTo(0, 12);
      },
    ),
    { seed: 20260805 },
  );
  // Common practice: lambda[m] = 1885 sqrt(L[uH] C[nF]/1000), rounded up from 1883.7.
  const rule = spread(10, 1000, 10).map((micro) =>
    off(1885 * Math.sqrt((micro * 0.1) / 1000), wavelength(resonance(micro * 1e-6, 1e-10)) / 1),
  );
  accuracy('wavelength rule 1885 sqrt(LC), common practice (relative)', rule, 1e-3);
});
