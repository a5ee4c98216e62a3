/** Names round a circle: none over another, none over a leader, however the places crowd. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { type Box, overlap, textBox } from '../../src/drawing/boxes.ts';
import { ringNames } from '../../src/drawing/ring-labels.ts';
import { Paper } from '../../src/sheets/page.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const RING = { rimMm: 11, nearMm: 15.5, stepDeg: 22 };

const boxesOf = (shapes: ReturnType<typeof ringNames>): Box[] =>
  shapes.flatMap((shape) => (shape.shape === 'text' ? [textBox(shape, measure)] : []));

/** Whether a leader comes into a box, tried at so many of its points that a word of 2 mm is not missed. */
function runsInto(shape: ReturnType<typeof ringNames>[number], box: Box): boolean {
  if (shape.shape !== 'line') return false;
  const { x1, y1, x2, y2 } = shape;
  return Array.from({ length: 60 }, (_, i) => i / 59).some((t) => {
    const [x, y] = [x1 + (x2 - x1) * t, y1 + (y2 - y1) * t];
    return x > box.left && x < box.right && y > box.bottom && y < box.top;
  });
}

test('names stand clear of one another and of all leaders', () => {
  let names = 0;
  const place = fc.record({
    angle: fc.oneof(fc.integer({ min: 0, max: 119 }), fc.integer({ min: 0, max: 10 })).map((step) => 3 * step),
    words: fc.array(fc.constantFrom('1', '12', 'S', 'F24', '1-11', 'u3'), { minLength: 1, maxLength: 4 }),
  });
  fc.assert(
    fc.property(fc.array(place, { minLength: 3, maxLength: 12 }), (places) => {
      // Places that nearly coincide are one name before they come here.
      const asked = [...places]
        .sort((a, b) => a.angle - b.angle)
        .filter(({ angle }, i, all) => i === 0 || angle > all[i - 1]!.angle);
      const shapes = ringNames(asked, RING, measure);
      const boxes = boxesOf(shapes);
      boxes.forEach((box, i) => {
        for (const other of boxes.slice(i + 1)) expect(overlap(box, other)).toBe(false);
        for (const shape of shapes) expect(runsInto(shape, box)).toBe(false);
      });
      // Every word is told.
      const told = shapes.flatMap((shape) => (shape.shape === 'text' ? shape.text.split(' ') : []));
      expect(told.sort()).toEqual(asked.flatMap(({ words }) => words).sort());
      names += asked.length;
    }),
    { seed: 5, numRuns: 60 },
  );
  console.log(`names round a circle: ${names} placed`);
  expect(names).toBeGreaterThan(200);
});

test('alone a name stands at its place', () => {
  const [leader, text] = ringNames([{ angle: 90, words: ['7'] }], RING, measure);
  if (leader?.shape !== 'line' || text?.shape !== 'text') throw new Error('no leader or no name');
  expect(leader.y1).toBeCloseTo(0, 9);
  expect(leader.x1).toBeCloseTo(RING.rimMm, 9);
  expect(textBox(text, measure).left).toBeCloseTo(RING.nearMm, 1);
});
