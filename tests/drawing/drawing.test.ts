import fc from 'fast-check';
import { expect, test } from 'vitest';
import { inside, overlap, textBox } from '../../src/drawing/boxes.ts';
import { clipped } from '../../src/drawing/clip.ts';
import { elevation, elevationScale, scaleText } from '../../src/drawing/elevation.ts';
import { endView, isStaggered } from '../../src/drawing/end-view.ts';
import { freePlace, placeLabels } from '../../src/drawing/labels.ts';
import { circle, label, line, moved, rectangle } from '../../src/drawing/shapes.ts';
import { spread } from '../../src/drawing/spread.ts';
import { tapPicture } from '../../src/drawing/tap-picture.ts';
import { seamOf } from '../../src/drawing/template.ts';
import { joints, SHARED_MM, tile } from '../../src/sheets/tiles.ts';
import { DRAWING } from '../../templates/wording/winding-sheet.ts';
import { sampleRecord } from '../helpers/sample.ts';

/** Every sign half as wide as it is high: enough to lay out by. */
const measure = { width: (text: string, sizeMm: number) => text.length * sizeMm * 0.5 };

test('labels are spread apart, in order, and no farther than they need', () => {
  let cases = 0;
  fc.assert(
    fc.property(fc.array(fc.double({ min: 0, max: 50, noNaN: true }), { minLength: 1, maxLength: 25 }), (wanted) => {
      wanted.sort((a, b) => a - b);
      const places = spread(wanted, 3);
      places.slice(1).forEach((place, i) => {
        expect(place - places[i]!).toBeGreaterThanOrEqual(3 - 1e-9);
      });
      // Least squares: the mean of all shifts is 0, and who has room stays.
      expect(places.reduce((sum, place, i) => sum + place - wanted[i]!, 0)).toBeCloseTo(0, 6);
      if (wanted.slice(1).every((place, i) => place - wanted[i]! > 3)) expect(places).toEqual(wanted);
      const held = spread(wanted, 3, -10, 200);
      expect(held[0]).toBeGreaterThanOrEqual(-10 - 1e-9);
      cases++;
    }),
    { seed: 1, numRuns: 200 },
  );
  expect(cases).toBe(200);
});

test('a clipped line stays on itself and in the window', () => {
  const window = { left: 0, right: 10, bottom: 0, top: 5 };
  let kept = 0;
  const place = fc.double({ min: -20, max: 20, noNaN: true });
  fc.assert(
    fc.property(place, place, place, place, (x1, y1, x2, y2) => {
      for (const shape of clipped([line(x1, y1, x2, y2)], window, measure)) {
        if (shape.shape !== 'line') throw new Error('a line became something else');
        expect(
          inside(
            {
              left: Math.min(shape.x1, shape.x2),
              right: Math.max(shape.x1, shape.x2),
              bottom: Math.min(shape.y1, shape.y2),
              top: Math.max(shape.y1, shape.y2),
            },
            window,
            1e-9,
          ),
        ).toBe(true);
        const across = (x2 - x1) * (shape.y1 - y1) - (y2 - y1) * (shape.x1 - x1);
        expect(Math.abs(across) / Math.max(1e-9, Math.hypot(x2 - x1, y2 - y1))).toBeLessThan(1e-6);
        kept++;
      }
    }),
    { seed: 2, numRuns: 300 },
  );
  expect(kept).toBeGreaterThan(30);
  expect(clipped([line(-5, 2, 15, 2)], window, measure)).toEqual([line(0, 2, 10, 2)]);
  expect(clipped([circle(9, 4, 2), circle(5, 2, 1)], window, measure)).toEqual([circle(5, 2, 1)]);
  expect(clipped([rectangle(-5, 1, 30, 20)], window, measure)).toEqual([line(0, 1, 10, 1)]);
});

test('a turned text takes a turned box', () => {
  const box = textBox(label(10, 20, 'abcd', { sizeMm: 4, turnDeg: 90 }), measure);
  expect(box.top - box.bottom).toBeCloseTo(8, 9);
  expect(box.bottom).toBeCloseTo(20, 9);
  expect(box.left).toBeLessThan(10);
});

test.each([
  ['right', 1],
  ['left', -1],
] as const)('the elevation of a %s-hand coil climbs to its side', (hand, side) => {
  const record = sampleRecord({ hand });
  const scale = elevationScale(record, 90, 90, DRAWING, measure);
  const drawn = elevation(record, scale, DRAWING, measure);
  const radius = (record.former.outsideDiameterMm / 2) * scale;
  // A quarter turn from the start, on the side that is seen: tap 1 at 12.25 turns.
  const tap = drawn.shapes.find((shape) => shape.shape === 'circle' && shape.name === 'tap 1');
  if (tap?.shape !== 'circle') throw new Error('tap 1 is not drawn');
  expect(tap.x).toBeCloseTo(side * radius, 6);
  expect(tap.y).toBeCloseTo(record.windings[0]!.taps[0]!.positionMm * scale, 6);
  // Every turn that is drawn whole rises towards that side.
  const turns = drawn.shapes.filter((shape) => shape.shape === 'polyline' && shape.points.length === 11);
  let rising = 0;
  for (const turn of turns) {
    if (turn.shape !== 'polyline') continue;
    const [x1, y1] = turn.points[0]!;
    const [x2, y2] = turn.points[10]!;
    expect(Math.sign((x2 - x1) * (y2 - y1))).toBe(side);
    rising++;
  }
  // 60.75 turns: the 60 that pass the front from edge to edge, and the first quarter.
  expect(rising).toBe(61);
  // The arrow over the coil points there too.
  const words = drawn.shapes.some((shape) => shape.shape === 'text' && shape.text === DRAWING[`${hand}Hand`]);
  expect(words).toBe(true);
});

test('the elevation states each height as the record has it', () => {
  const record = sampleRecord();
  const drawn = elevation(record, 0.5, DRAWING, measure);
  const texts = drawn.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : []));
  for (const tap of record.windings[0]!.taps) expect(texts).toContain(tap.positionMm.toFixed(2));
  expect(texts).toContain('0.00');
  expect(scaleText(0.5)).toBe('1:2');
  expect(scaleText(1 / 1.5)).toBe('1:1.5');
  expect(scaleText(2)).toBe('2:1');
});

test('seen from above, angles run counterclockwise from the bottom', () => {
  const record = sampleRecord({ turns: [12.25, 60] });
  const { shapes } = endView(record, 10, measure);
  const at = (name: string) => {
    const text = shapes.find((shape) => shape.shape === 'text' && shape.text.split(' ').includes(name));
    if (text?.shape !== 'text') throw new Error(`${name} is not drawn`);
    return text;
  };
  // The start at the bottom (towards the viewer of the elevation), a quarter turn of a right hand on the right.
  expect(at('S').y).toBeLessThan(-10);
  expect(at('1').x).toBeGreaterThan(10);
  expect(isStaggered(record)).toBe(true);
  expect(isStaggered(sampleRecord({ turns: [12, 60] }))).toBe(false);
});

test('the seam keeps away from holes', () => {
  expect(seamOf([0, 0, 0])).toBe(180);
  expect(seamOf([350, 10])).toBe(180);
  expect(seamOf([0, 90, 180])).toBe(270);
  expect(seamOf([100, 280])).toBe(190);
});

test('labels keep clear of marks, of one another and of the edge', () => {
  const marks = Array.from({ length: 20 }, (_, i) => ({
    text: `F-${i}`,
    x: 20 + i * 1.5,
    y: 20 + i * 0.4,
    reachMm: 1.2,
  }));
  const region = { left: 0, right: 80, bottom: 0, top: 60 };
  const { shapes } = placeLabels(marks, region, [], [], measure);
  const boxes = shapes.flatMap((shape) => (shape.shape === 'text' ? [textBox(shape, measure)] : []));
  expect(boxes.length).toBe(20);
  boxes.forEach((box, i) => {
    expect(inside(box, region)).toBe(true);
    for (const other of boxes.slice(i + 1)) expect(overlap(box, other)).toBe(false);
    for (const mark of marks)
      expect(overlap(box, { left: mark.x - 1, right: mark.x + 1, bottom: mark.y - 1, top: mark.y + 1 })).toBe(false);
  });
  expect(placeLabels(marks, region, [], [], measure).missing).toEqual([]);
  const tight = placeLabels(marks, { left: 20, right: 24, bottom: 20, top: 24 }, [], [], measure);
  expect([tight.shapes.length, tight.missing.length]).toEqual([0, 20]);
  expect(
    freePlace({ left: 0, right: 10, bottom: 0, top: 10 }, [{ left: 0, right: 6, bottom: 0, top: 10 }], 5, 5),
  ).toBeNull();
});

test('tiles cover the whole, overlap, and share their crosses', () => {
  const whole = { left: 0, right: 420, bottom: 3, top: 260 };
  const tiling = tile(whole, 200, 150);
  expect([tiling.rows, tiling.columns]).toEqual([2, 3]);
  for (const each of tiling.tiles) {
    expect(each.window.right - each.window.left).toBeLessThanOrEqual(200);
    expect(each.window.top - each.window.bottom).toBeLessThanOrEqual(150);
  }
  const [a1, a2] = tiling.tiles as [(typeof tiling.tiles)[0], (typeof tiling.tiles)[0]];
  expect([a1.name, a2.name, tiling.tiles[3]!.name]).toEqual(['A1', 'A2', 'B1']);
  expect(a1.window.right - a2.window.left).toBeCloseTo(SHARED_MM, 9);
  expect(tiling.tiles[5]!.window.right).toBeCloseTo(420, 9);
  expect(tiling.tiles[5]!.window.top).toBeCloseTo(260, 9);
  for (const cross of joints(tiling)) {
    const on = tiling.tiles.filter((each) =>
      inside({ left: cross.x - 5, right: cross.x + 5, bottom: cross.y - 5, top: cross.y + 5 }, each.window),
    );
    expect(on.length).toBeGreaterThanOrEqual(2);
  }
});

test('every tap method has its three pictures, each inside its panel', () => {
  for (const method of ['twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in'] as const)
    for (const stage of [0, 1, 2] as const) {
      const { shapes } = tapPicture(method, stage);
      expect(shapes.length).toBeGreaterThan(3);
      for (const shape of shapes) {
        const points =
          shape.shape === 'polyline'
            ? shape.points
            : shape.shape === 'line'
              ? [
                  [shape.x1, shape.y1],
                  [shape.x2, shape.y2],
                ]
              : [[shape.x, shape.y]];
        for (const [x, y] of points) {
          expect(x).toBeGreaterThanOrEqual(0);
          expect(x).toBeLessThanOrEqual(29.5);
          expect(y).toBeGreaterThanOrEqual(0);
          expect(y).toBeLessThanOrEqual(22.5);
        }
      }
    }
});

test('a shape moves whole', () => {
  expect(moved(line(0, 1, 2, 3), 10, 20)).toEqual(line(10, 21, 12, 23));
  expect(moved(circle(1, 1, 5), 1, 2)).toEqual(circle(2, 3, 5));
});
