import { expect, test } from 'vitest';
import { fieldTables, solveField } from '../../../src/physics/field/field.ts';
import { even } from './coils.ts';

const RHO = 1.7241e-8;

test('twelve taps of a hundred turns, each at its own frequency', () => {
  const uneven = even(100, 6e-4).map((z, i) => z + 3e-4 * Math.floor(i / 8));
  const run = () => {
    const start = performance.now();
    const tables = fieldTables(uneven, 0.0383, 2.5e-4);
    for (let tap = 8; tap < 104; tap += 8) {
      const to = Math.min(tap, 100);
      const sections =
        to < 100
          ? [
              { from: 0, to },
              { from: to, to: 100 },
            ]
          : [{ from: 0, to }];
      solveField(tables, 4e5 + 1e4 * (100 - tap), RHO, sections);
    }
    return performance.now() - start;
  };
  const runs = [run(), run(), run()];
  console.log(`12 taps of 100 uneven turns: ${runs.map((ms) => ms.toFixed(0)).join(', ')} ms`);
  // Measured 0.1 s; the margin is for a busy machine.
  expect(Math.min(...runs)).toBeLessThan(800);
});

test('five hundred turns at one frequency: the square of the turns', () => {
  const time = (turns: number) => {
    const runs = Array.from({ length: 3 }, () => {
      const tables = fieldTables(even(turns, 6e-4), 0.0383, 2.5e-4);
      const start = performance.now();
      const half = turns / 2;
      solveField(tables, 1e6, RHO, [
        { from: 0, to: half },
        { from: half, to: turns },
      ]);
      return performance.now() - start;
    });
    return Math.min(...runs);
  };
  time(100);
  const [small, large] = [time(100), time(500)];
  console.log(`100 turns ${small.toFixed(1)} ms, 500 turns ${large.toFixed(1)} ms`);
  // 25 times the pairs; twice that for a busy machine.
  expect(large).toBeLessThan(50 * small);
});
