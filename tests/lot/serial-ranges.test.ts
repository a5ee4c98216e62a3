/** Serials in words: nothing is lost, and nothing is called a run that is none. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { serialRanges, serialRuns } from '../../src/lot/serial-ranges.ts';

test('runs, pairs, gaps, widths and order', () => {
  expect(serialRanges(['HS-001', 'HS-002', 'HS-003', 'HS-007'])).toBe('HS-001 to HS-003, HS-007');
  expect(serialRanges(['HS-001', 'HS-002'])).toBe('HS-001, HS-002');
  expect(serialRanges(['HS-009', 'HS-010', 'HS-011'])).toBe('HS-009 to HS-011');
  expect(serialRanges(['A9', 'A10', 'A11'])).toBe('A9 to A11');
  expect(serialRanges(['A09', 'A010', 'A011'])).toBe('A09, A010, A011');
  expect(serialRanges(['HS-3', 'HS-2', 'HS-1'])).toBe('HS-3, HS-2, HS-1');
  expect(serialRanges(['a1x', 'a2x', 'a3x', 'a4y'])).toBe('a1x to a3x, a4y');
  expect(serialRanges(['north', 'south', 'south'])).toBe('north, south, south');
  expect(serialRanges([])).toBe('');
});

test('spelled out again, any list is the list it was', () => {
  let lists = 0;
  const serial = fc.record({ prefix: fc.constantFrom('HS-', 'B.', 'x'), n: fc.integer({ min: 0, max: 130 }) });
  fc.assert(
    fc.property(fc.array(serial, { maxLength: 40 }), (some) => {
      const serials = some
        .toSorted((a, b) => a.prefix.localeCompare(b.prefix) || a.n - b.n)
        .map(({ prefix, n }) => `${prefix}${`${n}`.padStart(2, '0')}`);
      const spelled = serialRuns(serials).flatMap(({ first, last, count }) => {
        const [, prefix, digits] = /^(.*?)(\d+)$/.exec(first)!;
        const all = Array.from(
          { length: count },
          (_, i) => `${prefix}${`${Number(digits) + i}`.padStart(digits!.length, '0')}`,
        );
        expect(all.at(-1)).toBe(last);
        return all;
      });
      expect(spelled).toEqual(serials);
      lists++;
    }),
    { seed: 4, numRuns: 300 },
  );
  console.log(`serial ranges: ${lists} lists spelled out again`);
  expect(lists).toBe(300);
});
