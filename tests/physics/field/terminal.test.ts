import { expect, test } from 'vitest';
import { fieldTables, type Rest, solveField, terminalImpedance } from '../../../src/physics/field/field.ts';
import { off } from '../../published/accuracy.ts';
import { evenCoil, randomCoil, sectionsOf, seeded } from './coils.ts';

const RHO = 1.7241e-8;

test('what the switch does with the rest: 30 turns, tap at 10', () => {
  // COMPUTED by finite elements and by a solution of this kind: D = 76, p = 0.45, d = 0.4 mm, 1.5 MHz. uH within 0.06 % (half a unit of the
  // last digit is up to that), Q to the unit.
  const tables = fieldTables(...evenCoil(30, 76, 0.45, 0.4));
  const z = solveField(tables, 1.5e6, RHO, sectionsOf([0, 10, 15, 20, 25, 30]));
  const at = (rest: Rest) => terminalImpedance(z, { from: 0, to: 1 }, rest);
  expect(Math.abs(off(at('open').inductance * 1e6, 16.84))).toBeLessThan(6e-4);
  expect(Math.round(at('open').q)).toBe(49);
  expect(Math.abs(off(at('shorted').inductance * 1e6, 10.43))).toBeLessThan(6e-4);
  expect(Math.round(at('shorted').q)).toBe(19);
  expect(Math.abs(off(at('shorted in sections').inductance * 1e6, 8.41))).toBeLessThan(6e-4);
  expect(Math.round(at('shorted in sections').q)).toBe(13);
  expect(at('disconnected')).toEqual(at('open'));
});

test('one loop by its formula, on both sides of the turns in use', () => {
  const tables = fieldTables(...evenCoil(12, 40, 1, 0.8));
  const z = solveField(tables, 2e6, RHO, sectionsOf([0, 4, 9, 12]));
  const omega = 4e6 * Math.PI;
  // Z = Z_ss - Z_st Z_ts/Z_tt with the last section dead and the others in series.
  const series = (cells: readonly number[]) =>
    cells.reduce((sum, at) => [sum[0]! + z.resistance[at]!, sum[1]! + omega * z.inductance[at]!], [0, 0]) as [
      number,
      number,
    ];
  const [used, between, own] = [series([0, 1, 3, 4]), series([2, 5]), series([8])];
  const square = [between[0] ** 2 - between[1] ** 2, 2 * between[0] * between[1]] as const;
  const size = own[0] ** 2 + own[1] ** 2;
  const got = terminalImpedance(z, { from: 0, to: 2 }, 'shorted');
  expect(got.resistance).toBeCloseTo(used[0] - (square[0] * own[0] + square[1] * own[1]) / size, 12);
  expect(got.inductance * omega).toBeCloseTo(used[1] - (square[1] * own[0] - square[0] * own[1]) / size, 10);
  // Three sections, the middle one in use: two loops either way.
  const middle = { from: 1, to: 2 };
  expect(terminalImpedance(z, middle, 'shorted')).toEqual(terminalImpedance(z, middle, 'shorted in sections'));
  const whole = terminalImpedance(z, { from: 0, to: 3 }, 'shorted');
  expect(whole).toEqual(terminalImpedance(z, { from: 0, to: 3 }, 'open'));
});

test('a short lowers inductance and never makes power; at direct current it does nothing', () => {
  const random = seeded(11);
  let cases = 0;
  for (let round = 0; round < 150; round++) {
    const coil = randomCoil(random, 20);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    const sections = sectionsOf(coil.cuts);
    if (sections.length === 1) continue;
    for (const frequency of [0, coil.frequency]) {
      const z = solveField(tables, frequency, RHO, sections);
      const used = { from: 0, to: Math.max(1, sections.length - 2) };
      const open = terminalImpedance(z, used, 'open');
      for (const rest of ['shorted', 'shorted in sections'] as const) {
        const shorted = terminalImpedance(z, used, rest);
        if (frequency === 0) expect(shorted).toEqual(open);
        else {
          expect(shorted.inductance).toBeLessThan(open.inductance);
          expect(shorted.inductance).toBeGreaterThan(0);
          expect(shorted.resistance).toBeGreaterThan(0);
        }
        cases++;
      }
    }
  }
  console.log(`shorted rests: ${cases} cases`);
  expect(cases).toBeGreaterThan(300);
  const z = solveField(fieldTables([0, 1e-3], 0.03, 4e-4), 1e6, RHO, [{ from: 0, to: 2 }]);
  for (const [from, to] of [
    [0, 2],
    [1, 1],
    [-1, 1],
    [0.5, 1],
  ] as const) {
    expect(() => terminalImpedance(z, { from, to }, 'open')).toThrow(RangeError);
  }
});
