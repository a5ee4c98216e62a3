/** Columns of tables: as wide together as was asked, and no figure broken while there is room. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { shapeBox } from '../../src/drawing/boxes.ts';
import { SMALL_MM } from '../../src/drawing/shapes.ts';
import { Paper } from '../../src/sheets/page.ts';
import { type Column, shares, table } from '../../src/sheets/table.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const options = { sizeMm: SMALL_MM, rowMm: 4.8 };

test('a table that can be is as wide as was asked, and figures stay whole', () => {
  let tables = 0;
  const cell = fc.integer({ min: 0, max: 99_999 }).map(String);
  const cases = fc.integer({ min: 2, max: 9 }).chain((count) =>
    fc.record({
      parts: fc.array(fc.integer({ min: 1, max: 30 }), { minLength: count, maxLength: count }),
      rows: fc.array(fc.array(cell, { minLength: count, maxLength: count }), { minLength: 1, maxLength: 4 }),
      spare: fc.double({ min: 0, max: 40, noNaN: true }),
    }),
  );
  fc.assert(
    fc.property(cases, ({ parts, rows, spare }) => {
      // What the widest cells take, with the least room beside them (0.6 mm a side) and a hundredth.
      const least = parts.reduce(
        (sum, _, c) =>
          sum +
          Math.max(...[...rows.map((row) => row[c]!), 'no.'].map((text) => measure.width(text, SMALL_MM, true))) +
          1.22,
        0,
      );
      const widths = shares(least + spare, parts);
      const columns = widths.map((widthMm): Column => ({ head: 'no.', widthMm, align: 'right' }));
      const { widthMm, shapes } = table(columns, rows, measure, options);
      expect(widthMm).toBeCloseTo(least + spare, 6);
      const texts = shapes.filter(({ shape }) => shape === 'text');
      expect(texts.length).toBe(parts.length * (rows.length + 1));
      for (const text of texts) {
        const box = shapeBox(text, measure);
        expect(box.left).toBeGreaterThan(0);
        expect(box.right).toBeLessThan(widthMm);
      }
      tables++;
    }),
    { seed: 3, numRuns: 150 },
  );
  console.log(`tables: ${tables} of the width asked for`);
  expect(tables).toBe(150);
});

test('a box to tick stays in its column', () => {
  const columns: Column[] = [
    { head: 'what', widthMm: 40 },
    { head: '', widthMm: 1, kind: 'tick' },
  ];
  const { widthMm, shapes } = table(columns, [['thing', '']], measure);
  expect(widthMm).toBeCloseTo(41, 6);
  for (const shape of shapes) expect(shapeBox(shape, measure).right).toBeLessThan(41.01);
});
