import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { diameterFor, drawDial, MOUNT_MM, positionsOn, ringsOf } from '../../src/drawing/dial-scale.ts';
import type { Line, Shape, Text } from '../../src/drawing/drawing.ts';
import { HOLE_MM } from '../../src/drawing/range-plate.ts';
import { dialOf } from '../../src/prove/dial.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { dialFrame, dialSheet, largestDialMm, layOutDialSheet } from '../../src/sheets/dial-sheet.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { turnedFaults } from '../helpers/turned.ts';
import { dialReadings, LAWS, type Law, type Tuned, tunedKhz } from '../prove/capacitors.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const turnsOf = (count: number) => Array.from({ length: count }, (_, i) => 6 + 5 * i);

interface Made {
  readonly law: Law;
  readonly spanDeg: number;
  readonly count: number;
  readonly diameterMm: number;
  readonly readings: number;
  /** Of all inductances: what the scales lie at. */
  readonly times: number;
  readonly paper: 'A4' | 'Letter';
}

function make({ law, spanDeg, count, readings, times, paper }: Made) {
  const record: CoilRecord = sampleRecord({ turns: turnsOf(count), paper });
  const inductancesUh = record.windings[0]!.taps.map((tap) => tap.inductanceUh * times);
  const tuned: Tuned = { law, spanDeg, inductancesUh };
  return { record, tuned, dial: dialOf(record, dialReadings(tuned, readings), { spanDeg }) };
}

const madeArb: fc.Arbitrary<Made> = fc.record({
  law: fc.constantFrom(...LAWS),
  spanDeg: fc.constantFrom(90, 170, 180, 180, 270, 300),
  count: fc.integer({ min: 1, max: 9 }),
  diameterMm: fc.integer({ min: 68, max: 174 }),
  readings: fc.integer({ min: 4, max: 10 }),
  times: fc.constantFrom(0.01, 0.3, 1, 20),
  paper: fc.constantFrom('A4' as const, 'Letter' as const),
});

const clockwise = (x: number, y: number) => (Math.atan2(x, y) * 180) / Math.PI;
const isText = (shape: Shape): shape is Text => shape.shape === 'text';

/** Marks that stand on the arc of this radius. */
const marksOn = (shapes: readonly Shape[], radius: number): Line[] =>
  shapes.filter(
    (shape): shape is Line => shape.shape === 'line' && Math.abs(Math.hypot(shape.x1, shape.y1) - radius) < 1e-6,
  );

/** The text that stands over a mark: its middle on the same ray, a little farther out. */
function over(shapes: readonly Shape[], mark: Line): Text | undefined {
  const end = Math.hypot(mark.x2, mark.y2);
  return shapes.filter(isText).find(({ x, y }) => {
    const out = Math.hypot(x, y) - end;
    return out > 0 && out < 1.5 && Math.abs(clockwise(x, y) - clockwise(mark.x2, mark.y2)) < 1e-6;
  });
}

describe('dial, drawn', () => {
  test('whatever the set: no text over another, in the frame, within the cut, and each written mark true to the capacitor', () => {
    let [dials, written] = [0, 0];
    fc.assert(
      fc.property(madeArb, (made) => {
        const { record, dial, tuned } = make(made);
        const { diameterMm, spanDeg } = made;
        const pages = layOutDialSheet(record, dial, { diameterMm }, measure);
        for (const page of pages) {
          expect(turnedFaults(page.shapes, measure)).toEqual([]);
          // Turned texts are held against one another as they lie, above; the boxes round them are too wide for that.
          const level = page.shapes.filter((shape) => !(isText(shape) && (shape.turnDeg ?? 0) % 90 !== 0));
          expect(layoutFaults([{ ...page, shapes: level }], dialFrame, measure)).toEqual([]);
          expect(layoutFaults([page], dialFrame, measure).filter((fault) => !fault.startsWith('overlap'))).toEqual([]);
        }
        const positions = dial.positions.slice(0, positionsOn(diameterMm));
        const { shapes } = drawDial({ diameterMm, spanDeg, positions, serial: dial.serial }, measure);
        for (const text of shapes.filter(isText))
          expect(Math.hypot(text.x, text.y) + text.sizeMm).toBeLessThan(diameterMm / 2 + 0.5);
        const rings = ringsOf(diameterMm, positions.length);
        positions.forEach((position, i) => {
          const marks = marksOn(shapes, rings[i]!.radius);
          let own = 0;
          for (const mark of marks) {
            const degrees = clockwise(mark.x1, mark.y1) + spanDeg / 2;
            expect(degrees).toBeGreaterThan(-1e-6);
            expect(degrees).toBeLessThan(spanDeg + 1e-6);
            const text = over(shapes, mark);
            if (text === undefined) continue;
            const kHz = Number(text.text) * (position.highKhz >= 3000 ? 1000 : 1);
            // Four readings of the worst law are 0.4 % off, tests/prove/dial.test.ts.
            expect(
              Math.abs(100 * (kHz / tunedKhz(tuned, position.tap, Math.min(spanDeg, Math.max(0, degrees))) - 1)),
            ).toBeLessThan(0.45);
            own++;
          }
          expect(own).toBeGreaterThanOrEqual(1);
          expect(marks.length).toBeGreaterThan(own);
          written += own;
        });
        dials++;
      }),
      { seed: 20261204, numRuns: 16 },
    );
    console.log(`dials drawn: ${dials}, marks with a frequency read back from the drawing: ${written}`);
    expect(dials).toBe(16);
    expect(written).toBeGreaterThan(300);
  }, 15_000);

  test('the most positions go on the least diameter for them, and one more does not', () => {
    for (let count = 1; count <= 9; count++) {
      expect(positionsOn(diameterFor(count))).toBe(count);
      expect(positionsOn(diameterFor(count) - 1)).toBe(count - 1);
    }
    const { dial } = make({ law: 'ratio', spanDeg: 180, count: 3, diameterMm: 80, readings: 5, times: 1, paper: 'A4' });
    expect(() => drawDial({ diameterMm: 80, spanDeg: 180, positions: dial.positions, serial: 'A' }, measure)).toThrow(
      RangeError,
    );
  });
});

describe('dial sheet, read back', () => {
  const made = {
    law: 'wavelength',
    spanDeg: 180,
    count: 5,
    diameterMm: 150,
    readings: 8,
    times: 1,
    paper: 'A4',
  } as const;

  test('circles and rulers true to scale in both axes, marks at their angles, plate with the measured ends', async () => {
    const { record, dial, tuned } = make(made);
    const bytes = await dialSheet(record, dial, { diameterMm: 150 });
    const pdf = await readPdf(bytes);
    expect([pdf.pages.length, pdf.printScaling]).toEqual([2, 'None']);
    const [page, second] = pdf.pages;
    const has = (r: number) => page!.circles.filter((one) => Math.abs(one.r - r) < 0.005);
    expect([has(75).length, has(HOLE_MM / 2).length, has(MOUNT_MM / 2).length]).toEqual([1, 1, 4]);
    const middle = has(75)[0]!;
    const lines = page!.paths.filter(({ points }) => points.length === 2).map(({ points }) => points);
    const long = (way: 0 | 1) =>
      lines.filter(
        ([a, b]) => Math.abs(Math.abs(b![way] - a![way]) - 100) < 0.01 && Math.abs(b![1 - way]! - a![1 - way]!) < 0.001,
      );
    expect([long(0).length, long(1).length]).toEqual([1, 1]);
    // The outermost arc is the whole coil: each of its written marks, from its place on paper.
    const [, , , , outer] = ringsOf(150, 5);
    const texts = page!.texts.map(({ text }) => text);
    let found = 0;
    for (const [from] of lines) {
      const [x, y] = [from![0] - middle.x, from![1] - middle.y];
      if (Math.abs(Math.hypot(x, y) - outer!.radius) > 0.003) continue;
      const kHz = tunedKhz(tuned, 5, Math.min(180, Math.max(0, clockwise(x, y) + 90)));
      // Marks of this arc stand at every 5 kHz at least; 0.1 kHz is 0.02 mm at the narrowest: rounding of the document.
      expect(Math.abs(kHz / 5 - Math.round(kHz / 5)) * 5).toBeLessThan(0.15);
      found++;
    }
    expect(found).toBeGreaterThan(60);
    for (const text of ['MHz', 'F', 'E', '1', '5']) expect(texts).toContain(text);
    const plated = second!.texts.map(({ text }) => text);
    for (const { lowKhz, highKhz } of dial.positions)
      expect(plated).toContain(`${lowKhz.toFixed(0)}–${highKhz.toFixed(0)}`);
    expect(Buffer.compare(Buffer.from(bytes), Buffer.from(await dialSheet(record, dial, { diameterMm: 150 })))).toBe(0);
  });

  test('a size that cannot be drawn is refused with the nearest that can', () => {
    const { record, dial } = make(made);
    const largest = largestDialMm('A4');
    for (const [diameterMm, nearest] of [
      [largest + 1, largest],
      [60, diameterFor(1)],
    ] as const) {
      const todo = expect.stringContaining(`${nearest} mm`);
      expect(() => layOutDialSheet(record, dial, { diameterMm }, measure)).toThrow(
        expect.objectContaining({ exit: 4, faults: [expect.objectContaining({ code: 'dial-size', todo })] }),
      );
      expect(layOutDialSheet(record, dial, { diameterMm: nearest }, measure).length).toBeGreaterThan(1);
    }
  });
});
