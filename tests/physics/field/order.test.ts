import { expect, test } from 'vitest';
import { fieldOrder, fieldTables, solveField } from '../../../src/physics/field/field.ts';
import { even, sectionsOf } from './coils.ts';

test('the next order changes the resistance by less than 0.2 %', () => {
  let cases = 0;
  let worst = 0;
  for (const fill of [0.1, 0.2, 0.3, 0.55, 0.65, 0.75, 0.8, 0.85, 0.88, 0.9, 0.93, 0.95]) {
    const order = fieldOrder(fill);
    for (const turns of [2, 3, 5, 20]) {
      for (const shape of [0.15, 1, 6]) {
        for (const frequency of [1e5, 1e6, 1e9]) {
          const pitch = 5e-4 / fill;
          const radius = Math.max((turns * pitch) / shape / 2, 1e-3);
          const sections = sectionsOf(turns > 2 ? [0, Math.ceil(turns / 3), turns] : [0, turns]);
          const [here, next] = [order, order + 1].map((m) => {
            const tables = fieldTables(even(turns, pitch), radius, 2.5e-4, { order: m });
            return solveField(tables, frequency, 1.7241e-8, sections).resistance[0]!;
          }) as [number, number];
          worst = Math.max(worst, Math.abs(next / here - 1));
          cases++;
        }
      }
    }
  }
  console.log(`next order: ${cases} cases, largest change of R ${(100 * worst).toFixed(3)} %`);
  expect(cases).toBe(432);
  expect(worst).toBeLessThan(0.002);
  // It is no idle demand: nothing lower would do.
  expect(worst).toBeGreaterThan(0.001);
});

test('orders rise with the wire, up to touching turns', () => {
  let before = 0;
  for (let fill = 0; fill <= 1.0001; fill += 0.01) {
    const order = fieldOrder(Math.min(fill, 1));
    expect(order).toBeGreaterThanOrEqual(before);
    before = order;
  }
  expect(before).toBe(13);
  for (const fill of [-0.1, 1.01, Number.NaN]) expect(() => fieldOrder(fill)).toThrow(RangeError);
  // The narrowest spacing of an uneven winding decides.
  expect(fieldTables([0, 1e-3, 6e-3], 0.03, 4e-4).order).toBe(fieldOrder(0.8));
});
