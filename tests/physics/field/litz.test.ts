import { expect, test } from 'vitest';
import { dcResistance } from '../../../src/physics/copper.ts';
import { type Bundle, fieldTables, solveField, solveLitz } from '../../../src/physics/field/field.ts';
import { cumulativeInductance } from '../../../src/physics/rings.ts';
import { accuracy, off } from '../../published/accuracy.ts';
import { TRANSVERSE_LOSS } from '../../published/transverse.ts';
import { even } from './coils.ts';

const RHO = 1.7241e-8;
const BUNDLE: Bundle = { strands: 20, strandDiameter: 1e-4, takeUp: 1.015 };
const places = even(40, 8e-4);
const tables = fieldTables(places, 0.03, 3e-4);

test('litz: direct current and ring sum, and no inductance lost to crowding', () => {
  for (const frequency of [0, 1e6]) {
    const z = solveLitz(tables, frequency, RHO, BUNDLE, [{ from: 0, to: 25 }]);
    expect(off(z.inductance[0]!, cumulativeInductance(places, 0.03, 3e-4).at(25))).toBeCloseTo(0, 12);
    const direct = dcResistance(25 * 2 * Math.PI * 0.03 * 1.015, 1e-4, 20);
    if (frequency === 0) expect(off(z.resistance[0]!, direct)).toBeCloseTo(0, 12);
    else expect(z.resistance[0]!).toBeGreaterThan(direct);
  }
});

test("litz: a strand's loss in the bundle's own field, one turn of a huge ring", () => {
  const errors = TRANSVERSE_LOSS.filter(([mm, f]) => mm < 0.1 || f < 5e5).map(([mm, frequency, , limit]) => {
    const bundle = { strands: 100, strandDiameter: mm / 1e3, takeUp: 1 };
    const huge = fieldTables([0], 1e6, 1e-3);
    const at = (f: number) => solveLitz(huge, f, RHO, bundle, [{ from: 0, to: 1 }]).resistance[0]!;
    const squared = 1 / (8 * Math.PI ** 2 * 1e-3 ** 2);
    return off((at(frequency) - at(0)) / 2 / 100 / (2 * Math.PI * 1e6), limit * squared);
  });
  // Seven digits of the table, and the difference of two resistances.
  accuracy('litz, strand loss at low frequency (relative)', errors, 2e-6);
});

test('litz: the coil field of dead and living turns, by the solid wire at low frequency', () => {
  // A solid wire of the same radius, thin against the skin, loses pi omega^2 sigma a^4 B^2/8 in the same field, and nothing else of
  // the second order in frequency but its own skin effect, which the dead turns do not have.
  const f = 20;
  const sections = [
    { from: 0, to: 15 },
    { from: 15, to: 40 },
  ];
  const bundle = { strands: 1, strandDiameter: 6e-4, takeUp: 1 };
  const wide = fieldTables(even(40, 6e-3), 0.03, 3e-4, { order: 1 });
  const litz = solveLitz(wide, f, RHO, bundle, sections);
  const solid = solveField(wide, f, RHO, sections);
  // Mutual resistances are eddy losses alone.
  expect(off(litz.resistance[1]!, solid.resistance[1]!)).toBeCloseTo(0, 4);
  expect(litz.resistance[1]).toBe(litz.resistance[2]);
});

test('litz: eddy losses go as frequency squared; common practice against solid wire', () => {
  const at = (f: number) => solveLitz(tables, f, RHO, BUNDLE, [{ from: 0, to: 40 }]).resistance[0]!;
  expect(off(at(2e6) - at(0), 4 * (at(1e6) - at(0)))).toBeCloseTo(0, 10);
  // Common practice: fine litz beats solid wire of its size below about 1 MHz and loses its advantage far above.
  const gain = (f: number) => {
    const fine = { strands: 60, strandDiameter: 5e-5, takeUp: 1.015 };
    const part = [{ from: 0, to: 40 }];
    return solveLitz(tables, f, RHO, fine, part).resistance[0]! / solveField(tables, f, RHO, part).resistance[0]!;
  };
  expect(gain(5e5)).toBeLessThan(0.7);
  expect(gain(2e7)).toBeGreaterThan(1);
  expect(() => solveLitz(tables, 1e6, RHO, { ...BUNDLE, strands: 0 }, [{ from: 0, to: 1 }])).toThrow(/strands/);
  expect(() => solveLitz(tables, Number.NaN, RHO, BUNDLE, [{ from: 0, to: 1 }])).toThrow(/frequency/);
});
