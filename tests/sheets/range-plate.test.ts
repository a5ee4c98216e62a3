import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { textBox } from '../../src/drawing/boxes.ts';
import { drawPlate, HOLE_MM } from '../../src/drawing/range-plate.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutRangePlate, plateFrame, platesOf, rangePlate } from '../../src/sheets/range-plate.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const RESTS = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;
const turnsOf = (count: number) => Array.from({ length: count }, (_, i) => 10 + 2 * i);

function without(record: CoilRecord): CoilRecord {
  const winding = record.windings[0]!;
  const settings = (record.settings ?? []).map((row) => ({ ...row, lowKhz: null, highKhz: null }));
  const taps = winding.taps.map((tap) => ({ ...tap, range: null, ends: [], curve: [] }));
  return { ...record, settings, windings: [{ ...winding, taps }] };
}

const recordArb = fc
  .record({
    count: fc.integer({ min: 2, max: 60 }),
    units: fc.constantFrom(0, 0, 1, 4, 9),
    rest: fc.constantFrom(...RESTS),
    paper: fc.constantFrom('A4' as const, 'Letter' as const),
    job: fc.constantFrom('Short', 'A name of some length for a coil '.repeat(2).trim()),
    set: fc.boolean(),
    low: fc.double({ min: 40, max: 20_000, noNaN: true }),
  })
  .map(({ count, units, rest, paper, job, set, low }) => {
    const unitTurns = Array.from({ length: units }, (_, i) => i + 1);
    const record = sampleRecord({ turns: turnsOf(units > 0 ? Math.min(count, 12) : count), unitTurns, paper, job });
    const winding = record.windings[0]!;
    const taps = winding.taps.map((tap) => ({ ...tap, range: { ...tap.range!, lowKhz: low, highKhz: 2.3 * low } }));
    const ranged = { ...record, windings: [{ ...winding, taps }], surroundings: { ...record.surroundings, rest } };
    return set ? ranged : without(ranged);
  });

describe('range plate, laid out', () => {
  test('whatever the switch: no text over another or outside, no mark through a text, all within the cut', () => {
    let plates = 0;
    fc.assert(
      fc.property(recordArb, (record) => {
        expect(layoutFaults(layOutRangePlate(record, measure), plateFrame, measure)).toEqual([]);
        for (const plate of platesOf(record)) {
          const { shapes, radiusMm } = drawPlate(plate, measure);
          const boxes = shapes.flatMap((shape) => (shape.shape === 'text' ? [textBox(shape, measure)] : []));
          for (const { left, right, bottom, top } of boxes)
            expect(Math.hypot(Math.max(-left, right), Math.max(-bottom, top))).toBeLessThan(radiusMm);
          for (const shape of shapes) {
            if (shape.shape !== 'line') continue;
            for (const share of [0, 0.25, 0.5, 0.75, 1]) {
              const x = shape.x1 + share * (shape.x2 - shape.x1);
              const y = shape.y1 + share * (shape.y2 - shape.y1);
              expect(boxes.some((box) => x > box.left && x < box.right && y > box.bottom && y < box.top)).toBe(false);
            }
          }
          plates++;
        }
      }),
      { seed: 20261202, numRuns: 40 },
    );
    console.log(`range plates laid out: ${plates}`);
    expect(plates).toBeGreaterThan(40);
  });

  test('none for a coil of one position', async () => {
    const record = sampleRecord({ turns: [20] });
    expect(layOutRangePlate(record, measure)).toEqual([]);
    expect(await rangePlate(record)).toBeNull();
  });
});

/** Lines of a plate that run along a radius about this middle, as degrees clockwise from the top. */
function marksAbout(
  paths: readonly { points: readonly (readonly [number, number])[] }[],
  x: number,
  y: number,
): number[] {
  return paths
    .filter(({ points }) => points.length === 2)
    .map(({ points }) => points.map(([px, py]) => [px - x, py - y] as const))
    .filter(([from]) => Math.abs(Math.hypot(from![0], from![1]) - 16.5) < 0.01)
    .map(([, to]) => (Math.atan2(to![0], to![1]) * 180) / Math.PI);
}

describe('range plate, read back', () => {
  test.each([
    [4, 'open', 30],
    [12, 'open', 30],
    [17, 'shorted', 20],
    [7, 'shorted in sections', 22.5],
    [60, 'open', 6],
  ] as const)(
    '%d positions, %s: marks %d degrees apart, ranges those of the record, ruler and square true',
    async (count, rest, step) => {
      const plain = sampleRecord({ turns: turnsOf(count) });
      const record = { ...plain, surroundings: { ...plain.surroundings, rest } };
      const pdf = await readPdf((await rangePlate(record))!);
      const [page] = pdf.pages;
      const hole = page!.circles.find(({ r }) => Math.abs(r - HOLE_MM / 2) < 0.005)!;
      const marks = marksAbout(page!.paths, hole.x, hole.y);
      expect(marks.length).toBe(count);
      // 0.01 degrees is 3 um at the end of a mark: rounding of the document.
      marks.forEach((deg, i) => {
        expect(Math.abs(deg - (i - (count - 1) / 2) * step)).toBeLessThan(0.01);
      });
      const texts = pdf.pages.flatMap(({ texts }) => texts.map(({ text }) => text));
      for (const { tap, range } of record.windings[0]!.taps) {
        expect(texts).toContain(`${tap}`);
        expect(texts).toContain(`${range!.lowKhz.toFixed(0)}–${range!.highKhz.toFixed(0)}`);
      }
      // Each number in its direction: the number of a position lies along its mark.
      if (count <= 12)
        for (const { tap } of record.windings[0]!.taps) {
          const own = page!.texts.filter(({ text, sizeMm }) => text === `${tap}` && sizeMm > 4);
          expect(own.length).toBe(1);
          const { x, y, width } = own[0]!;
          // Below it stands the range: the middle of both is 3.6 mm under the number's baseline less its half height.
          const middle = [x + width / 2 - hole.x, y + 1.6 - 2 - hole.y] as const;
          const deg = (Math.atan2(middle[0], middle[1]) * 180) / Math.PI;
          expect(Math.abs(deg - (tap - 1 - (count - 1) / 2) * step)).toBeLessThan(0.5);
        }
      // The ruler's line and the sides of the square, 0.01 mm for the rounding of the document.
      const long = page!.paths.filter(
        ({ points }) => points.length === 2 && Math.abs(Math.abs(points[1]![0] - points[0]![0]) - 100) < 0.01,
      );
      expect(long.length).toBe(1);
      const square = page!.paths.filter(({ points, closed }) => {
        const xs = points.map(([x]) => x);
        const ys = points.map(([, y]) => y);
        return (
          closed &&
          Math.abs(Math.max(...xs) - Math.min(...xs) - 50) < 0.01 &&
          Math.abs(Math.max(...ys) - Math.min(...ys) - 50) < 0.01
        );
      });
      expect(square.length).toBe(1);
      expect([pdf.title, pdf.printScaling]).toEqual(['Range plate: Sample coil for tests', 'None']);
    },
  );

  test('two switches have a plate each, the tens with what the settings tune', async () => {
    const record = sampleRecord({ turns: [10, 20, 30], unitTurns: [1, 2, 3, 4, 5, 6, 7, 8, 9] });
    const pdf = await readPdf((await rangePlate(record))!);
    expect(pdf.pages[0]!.circles.filter(({ r }) => Math.abs(r - HOLE_MM / 2) < 0.005).length).toBe(2);
    const texts = pdf.pages[0]!.texts.map(({ text }) => text);
    for (const { lowKhz, highKhz } of record.settings!) expect(texts).toContain(`${lowKhz}–${highKhz}`);
    expect(texts).toEqual(expect.arrayContaining(['tens, kHz', 'units', '0', '9']));
  });

  test('without a set it holds inductances, and it is the same for the same record', async () => {
    const record = without(sampleRecord());
    const bytes = (await rangePlate(record))!;
    const texts = (await readPdf(bytes)).pages[0]!.texts.map(({ text }) => text);
    expect(texts).toContain('µH');
    for (const { inductanceUh } of record.windings[0]!.taps) expect(texts).toContain(inductanceUh.toPrecision(4));
    expect(Buffer.compare(Buffer.from(bytes), Buffer.from((await rangePlate(record))!))).toBe(0);
  });
});
