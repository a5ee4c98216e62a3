import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type Box, overlap, shapeBox, textBox } from '../../src/drawing/boxes.ts';
import { dimensioned } from '../../src/drawing/dimensioned.ts';
import type { Line, Polyline, Shape, Text } from '../../src/drawing/drawing.ts';
import { rectangle, SMALL_MM } from '../../src/drawing/shapes.ts';
import type { View } from '../../src/drawing/views.ts';
import { Paper } from '../../src/sheets/page.ts';
import { anyView, callout, mark, plateViews, span, tubeViews } from './sample-views.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const SCALES = [0.2, 0.4, 0.5, 1, 2];

const texts = (shapes: readonly Shape[]) => shapes.filter((shape): shape is Text => shape.shape === 'text');
const isHead = (shape: Shape): shape is Polyline => shape.shape === 'polyline' && shape.fill === 0;

/** What stands over a word: another word, or the head of an arrow. Boxes may share 0.05 mm, as descenders count in them. */
function covered(shapes: readonly Shape[], view: View): string[] {
  const words = texts(shapes);
  const heads = shapes.slice(view.shapes.length).filter(isHead);
  const faults: string[] = [];
  words.forEach((one, i) => {
    const box = textBox(one, measure);
    for (const other of words.slice(i + 1))
      if (overlap(box, textBox(other, measure), 0.05)) faults.push(`${one.text} / ${other.text}`);
    for (const head of heads) if (overlap(box, shapeBox(head, measure), 0.05)) faults.push(`${one.text} / arrow`);
  });
  return faults;
}

/** Thin lines that run through a word. */
function struck(shapes: readonly Shape[], view: View): string[] {
  const boxes = texts(shapes).map((text) => ({ text: text.text, box: textBox(text, measure) }));
  const thin = shapes
    .slice(view.shapes.length)
    .filter((shape): shape is Line => shape.shape === 'line' && shape.weight === 'hair');
  return boxes.flatMap(({ text, box }) => (thin.some((each) => through(each, box)) ? [text] : []));
}

function through(each: Line, box: Box): boolean {
  for (let i = 0; i <= 50; i++) {
    const x = each.x1 + ((each.x2 - each.x1) * i) / 50;
    const y = each.y1 + ((each.y2 - each.y1) * i) / 50;
    if (x > box.left + 0.01 && x < box.right - 0.01 && y > box.bottom + 0.01 && y < box.top - 0.01) return true;
  }
  return false;
}

describe('dimensioned view', () => {
  test('keeps the outline to scale, and words and their number as they are', () => {
    let views = 0;
    for (const view of [...tubeViews(), ...plateViews()])
      for (const scale of SCALES) {
        const { shapes, missing, box } = dimensioned(view, scale, measure);
        view.shapes.forEach((shape, i) => {
          const [a, b] = [shapeBox(shape, measure), shapeBox(shapes[i]!, measure)];
          for (const key of ['left', 'right', 'bottom', 'top'] as const) expect(b[key]).toBeCloseTo(a[key] * scale, 9);
        });
        for (const text of texts(shapes)) expect(text.sizeMm).toBe(SMALL_MM);
        // Callouts may take several lines: their words are compared, not their lines.
        const printed = [...texts(shapes).map((text) => text.text), ...missing].join(' ').split(' ').sort();
        expect(printed).toEqual(view.dimensions.flatMap((each) => each.text.split(' ')).sort());
        for (const shape of shapes) {
          const each = shapeBox(shape, measure);
          expect(
            each.left >= box.left && each.right <= box.right && each.bottom >= box.bottom && each.top <= box.top,
          ).toBe(true);
        }
        views++;
      }
    console.log(`dimensioned: ${views} views to scale`);
    expect(views).toBe(25);
  });

  test('no word covers another, no arrow or thin line a word', () => {
    let runs = 0;
    let words = 0;
    fc.assert(
      fc.property(anyView, fc.constantFrom(...SCALES), (view, scale) => {
        const { shapes } = dimensioned(view, scale, measure);
        expect(covered(shapes, view)).toEqual([]);
        expect(struck(shapes, view)).toEqual([]);
        words += texts(shapes).length;
        runs++;
      }),
      { seed: 11, numRuns: 300 },
    );
    for (const view of [...tubeViews(), ...plateViews()])
      for (const scale of SCALES) {
        const { shapes } = dimensioned(view, scale, measure);
        expect(covered(shapes, view)).toEqual([]);
        expect(struck(shapes, view)).toEqual([]);
      }
    console.log(`dimensioned: ${runs} random views, ${words} words`);
    expect(runs).toBe(300);
    expect(words).toBeGreaterThan(1500);
  });

  test('arrows of a length stand on its ends', () => {
    let checked = 0;
    for (const scale of SCALES)
      for (const side of ['above', 'below'] as const) {
        const [from, to] = [
          [-12, 3],
          [28, -5],
        ] as const;
        const view: View = {
          title: 'plan',
          shapes: [rectangle(-20, -10, 60, 20, 'outline')],
          dimensions: [span('x', from, to, side, '40')],
        };
        const heads = dimensioned(view, scale, measure).shapes.slice(1).filter(isHead);
        // The first point of a head is its tip.
        const tips = heads.map((head) => head.points[0]![0]).sort((a, b) => a - b);
        expect(tips[0]).toBeCloseTo(-12 * scale, 9);
        expect(tips[1]).toBeCloseTo(28 * scale, 9);
        checked++;
      }
    expect(checked).toBe(10);
  });

  test('a slanting length has its line beside the points, as long as they are apart', () => {
    const view: View = {
      title: 'plan',
      shapes: [rectangle(0, 0, 60, 40, 'outline')],
      dimensions: [span('straight', [10, 5], [50, 35], 'above', '50')],
    };
    const tips = dimensioned(view, 1, measure)
      .shapes.slice(1)
      .filter(isHead)
      .map((head) => head.points[0]!);
    const [[x1, y1], [x2, y2]] = tips as [readonly [number, number], readonly [number, number]];
    expect(Math.hypot(x2 - x1, y2 - y1)).toBeCloseTo(50, 9);
    expect(Math.min(y1, y2)).toBeGreaterThan(40);
  });

  test('lengths that would share a line are stacked outwards in their order', () => {
    const view: View = {
      title: 'elevation',
      shapes: [rectangle(0, 0, 60, 40, 'outline')],
      dimensions: [
        span('y', [60, 0], [60, 12], 'right', '12.00'),
        span('y', [60, 0], [60, 25], 'right', '25.00'),
        span('y', [60, 0], [60, 40], 'right', '40.00'),
      ],
    };
    const places = texts(dimensioned(view, 1, measure).shapes).map((text) => text.x);
    expect(places).toEqual([...places].sort((a, b) => a - b));
    expect(new Set(places).size).toBe(3);
    expect(Math.min(...places)).toBeGreaterThan(60);
  });

  test('marks: in a circle that holds them, beside one that does not, named when there is no room at all', () => {
    const [plate] = plateViews();
    const found = dimensioned(plate!, 1, measure);
    const shaft = texts(found.shapes).find((text) => text.text === 'shaft')!;
    expect([shaft.x, shaft.y]).toEqual([40, 20]);
    const crowd: View = {
      title: 'plan',
      shapes: [rectangle(0, 0, 10, 5, 'outline')],
      dimensions: Array.from({ length: 40 }, (_, i) => mark([5, 2.5], `mark ${i}`)),
    };
    const { shapes, missing } = dimensioned(crowd, 1, measure);
    expect(missing.length).toBeGreaterThan(0);
    expect(missing.length + texts(shapes).length).toBe(40);
    expect(covered(shapes, crowd)).toEqual([]);
  });

  test('an empty view, and one without dimensions', () => {
    expect(dimensioned({ title: 'plan', shapes: [], dimensions: [] }, 1, measure).shapes).toEqual([]);
    const bare = dimensioned({ title: 'plan', shapes: [rectangle(0, 0, 9, 4)], dimensions: [] }, 0.5, measure);
    expect(bare.box).toEqual({ left: 0, right: 4.5, bottom: 0, top: 2 });
    const only = dimensioned({ title: 'plan', shapes: [], dimensions: [callout([0, 0], 'left', 'a')] }, 1, measure);
    expect(texts(only.shapes).length).toBe(1);
  });
});
