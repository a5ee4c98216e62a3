/** The coil from outside where its former is not one plain tube: seams of sections, ribs; and lengths in other units. */
import { describe, expect, test } from 'vitest';
import { type Box, overlap, textBox } from '../../src/drawing/boxes.ts';
import { elevation, elevationScale, frontOfTurn } from '../../src/drawing/elevation.ts';
import { seamLines } from '../../src/drawing/seam-lines.ts';
import { lengthCell } from '../../src/quantity/written.ts';
import { Paper } from '../../src/sheets/page.ts';
import { DRAWING } from '../../templates/wording/winding-sheet.ts';
import { splitRecord } from '../helpers/joints.ts';
import { ribbedRecord } from '../helpers/ribbed.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

describe('a former in sections', () => {
  test.each(['right', 'left'] as const)(
    '%s hand: the seam runs between turns and is named clear of every other word',
    (hand) => {
      let named = 0;
      for (const share of [0.35, 0.55, 0.75, 0.95]) {
        const whole = sampleRecord({ hand });
        const record = splitRecord(whole, share * whole.former.lengthMm);
        const scale = elevationScale(record, 90, 90, DRAWING, measure);
        const drawn = elevation(record, scale, DRAWING, measure);
        const texts = drawn.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape] : []));
        const words = texts.filter(({ text }) => text === DRAWING.seam);
        expect(words.length).toBe(record.former.joints.length);
        const boxes: Box[] = texts.map((text) => textBox(text, measure));
        texts.forEach((text, i) => {
          expect(boxes[i]!.left).toBeGreaterThan(-drawn.leftMm - 0.01);
          if (text.text !== DRAWING.seam) return;
          boxes.forEach((other, k) => {
            if (k !== i) expect(overlap(boxes[i]!, other), `seam and ${texts[k]!.text}`).toBe(false);
          });
          named++;
        });
        // Within its step, to what the record rounds to.
        for (const [i, places] of seamLines(record, -90, 90).entries()) {
          const { turn, seamMm, climbMm } = record.former.joints[i]!;
          const heights = places.map(([, z]) => z);
          expect(Math.min(...heights)).toBeGreaterThan(seamMm - 0.001);
          expect(Math.max(...heights)).toBeLessThan(seamMm + climbMm + 0.001);
          // Flat outside the winding; among turns it rises by its step, all of it seen or not.
          if (turn === null) expect(Math.max(...heights)).toBe(Math.min(...heights));
          else expect(Math.max(...heights)).toBeGreaterThan(Math.min(...heights) + climbMm / 4);
        }
      }
      console.log(`elevation, ${hand}: ${named} seams named`);
      expect(named).toBeGreaterThan(3);
    },
  );

  test('none on a former that is printed whole', () => {
    expect(seamLines(sampleRecord(), -90, 90)).toEqual([]);
  });
});

test('over ribs the wire turns only at ribs, and ribs stand where they are', () => {
  for (const hand of ['right', 'left'] as const) {
    const record = ribbedRecord({ hand, count: 12 });
    const r = record.windings[0]!.meanDiameterMm / 2;
    const points = frontOfTurn(record, 20, 1);
    // From a quarter turn before to a quarter after: seven ribs, 30 degrees apart.
    expect(points.length).toBe(7);
    points.forEach(([x], i) => {
      const side = hand === 'right' ? 1 : -1;
      expect(x).toBeCloseTo(side * r * Math.sin(((i * 30 - 90) * Math.PI) / 180), 6);
    });
    // A turn that ends between two ribs ends on the straight wire.
    const part = frontOfTurn(
      { ...record, windings: [{ ...record.windings[0]!, turns: 20 + 1 / 24 }, ...record.windings.slice(1)] },
      20,
      1,
    );
    const end = part.at(-1)![0];
    expect(Math.abs(end)).toBeCloseTo((r * Math.sin(Math.PI / 6)) / 2, 6);
    const drawn = elevation(record, 1, DRAWING, measure);
    const ribs = drawn.shapes.filter(
      (shape) => shape.shape === 'polyline' && shape.weight === 'thin' && shape.fill === 1,
    );
    const middles = ribs.map((rib) => {
      if (rib.shape !== 'polyline') throw new Error('no rib');
      return (rib.points[0]![0] + rib.points[1]![0]) / 2;
    });
    expect(middles.length).toBe(7);
    expect(middles.some((x) => Math.abs(x) < 1e-9)).toBe(true);
  }
});

test('heights and diameter in inches where they are asked for', () => {
  const record = sampleRecord();
  const length = (mm: number) => lengthCell(mm, 'inch');
  const drawn = elevation(record, 0.5, DRAWING, measure, length);
  const texts = drawn.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : []));
  for (const tap of record.windings[0]!.taps) expect(texts).toContain((tap.positionMm / 25.4).toFixed(4));
  expect(texts).toContain(`⌀ ${(record.former.outsideDiameterMm / 25.4).toFixed(4)}`);
});
