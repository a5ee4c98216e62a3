/** Views of invented parts for tests of the renderer and of the sheet: a tube with rims, a plate with holes, random ones. */
import fc from 'fast-check';
import { circle, line, rectangle } from '../../src/drawing/shapes.ts';
import type { Callout, Mark, Span, View } from '../../src/drawing/views.ts';

type Side = Span['side'];
type Place = readonly [number, number];

export const span = (along: Span['along'], from: Place, to: Place, side: Side, text: string): Span => ({
  kind: 'span',
  along,
  from,
  to,
  side,
  text,
});
export const callout = (at: Place, side: Side, text: string): Callout => ({ kind: 'callout', at, side, text });
export const mark = (at: Place, text: string): Mark => ({ kind: 'mark', at, text });

/** A tube of 60 x 90 mm with rims of 68 mm: elevation, end view and surface. */
export function tubeViews(): View[] {
  const holes = [0, 1, 2, 3, 4].map((i) => [30 + 28 * i, 14 + 16 * i] as const);
  return [
    {
      title: 'elevation',
      shapes: [
        rectangle(-30, 3, 60, 84, 'outline'),
        rectangle(-34, 0, 68, 3, 'outline'),
        rectangle(-34, 87, 68, 3, 'outline'),
        line(0, -4, 0, 94, 'hair', 'centre'),
        circle(0, 12, 0.8, 'thin'),
        circle(12, 40, 0.8, 'thin'),
      ],
      dimensions: [
        span('x', [-30, 45], [30, 45], 'below', '⌀ 60.00'),
        span('x', [-34, 0], [34, 0], 'below', '⌀ 68.00'),
        span('y', [34, 0], [34, 90], 'right', '90.00'),
        span('y', [34, 0], [34, 3], 'right', '3.00'),
        span('y', [34, 87], [34, 90], 'right', '3.00'),
        span('y', [-34, 0], [0, 12], 'left', '12.00'),
        span('y', [-34, 0], [12, 40], 'left', '40.00'),
        callout([0, 12], 'left', 'S: start hole, 1.2 mm, drilled along a radius'),
        callout([12, 40], 'right', 'tap 1'),
        callout([12, 41], 'right', 'tap 2, lug 3 mm away'),
        callout([30, 60], 'right', 'groove 0.27 deep, 70 turns at 1.20'),
        callout([0, 90], 'above', 'numbers, 3.2 high'),
      ],
    },
    {
      title: 'end view',
      shapes: [circle(0, 0, 34, 'outline'), circle(0, 0, 30, 'thin'), circle(0, 0, 27.3, 'outline')],
      dimensions: [
        span('straight', [-19.3, -19.3], [19.3, 19.3], 'right', 'bore ⌀ 54.60'),
        span('x', [-34, 0], [34, 0], 'below', '⌀ 68.00'),
        mark([32, 0], 'S'),
        mark([0, 32], '1'),
        mark([-32, 0], '2'),
        mark([0, -32], '3'),
      ],
    },
    {
      title: 'developed surface',
      shapes: [rectangle(0, 0, 188.5, 90, 'outline'), ...holes.map(([x, y]) => circle(x, y, 0.8, 'thin'))],
      dimensions: [
        span('x', [0, 0], [188.5, 0], 'below', '188.50 round'),
        ...holes.map(([x, y], i) => span('x', [0, 0], [x, y], 'below', `${x}.0 (tap ${i + 1})`)),
        ...holes.map(([x, y]) => span('y', [0, 0], [x, y], 'left', `${y}.0`)),
        ...holes.map(([x, y], i) => mark([x, y], `tap ${i + 1}`)),
      ],
    },
  ];
}

/** A plate of 80 x 40 x 4 mm with four holes, two of them alike, and one large one that its name goes into. */
export function plateViews(): View[] {
  return [
    {
      title: 'plan',
      shapes: [
        rectangle(0, 0, 80, 40, 'outline'),
        circle(8, 8, 2.2, 'outline'),
        circle(72, 8, 2.2, 'outline'),
        circle(8, 32, 2.2, 'outline'),
        circle(40, 20, 10, 'outline'),
      ],
      dimensions: [
        span('x', [0, 0], [80, 0], 'below', '80.00'),
        span('x', [0, 0], [8, 8], 'below', '8.00'),
        span('x', [8, 8], [72, 8], 'below', '64.00'),
        span('y', [80, 0], [80, 40], 'right', '40.00'),
        span('straight', [8, 8], [40, 20], 'above', '34.18'),
        callout([8, 32], 'above', '3 holes ⌀ 4.40'),
        callout([40, 30], 'above', '⌀ 20.00'),
        mark([40, 20], 'shaft'),
        mark([72, 8], 'A'),
        mark([8, 8], 'B'),
      ],
    },
    {
      title: 'elevation',
      shapes: [rectangle(0, 0, 80, 4, 'outline')],
      dimensions: [span('y', [0, 0], [0, 4], 'left', '4.00')],
    },
  ];
}

const coordinate = fc.integer({ min: -40, max: 40 });
const place = fc.tuple(coordinate, coordinate);
const side = fc.constantFrom('left' as const, 'right' as const, 'above' as const, 'below' as const);
const words = fc.constantFrom(
  '⌀ 12.30',
  '3.00',
  'wall 2.70',
  'four holes ⌀ 4.40 on a circle of 86.00, evenly round',
  '7',
);

/** Any view: shapes and dimensions that have nothing to do with one another. */
export const anyView: fc.Arbitrary<View> = fc.record({
  title: fc.constantFrom('elevation' as const, 'plan' as const, 'section' as const),
  shapes: fc.array(
    fc.oneof(
      fc.tuple(place, fc.integer({ min: 1, max: 30 })).map(([[x, y], r]) => circle(x, y, r, 'thin')),
      fc.tuple(place, place).map(([[x1, y1], [x2, y2]]) => line(x1, y1, x2, y2, 'outline')),
    ),
    { minLength: 1, maxLength: 8 },
  ),
  dimensions: fc.array(
    fc.oneof(
      {
        weight: 5,
        arbitrary: fc
          .tuple(fc.constantFrom('x' as const, 'y' as const, 'straight' as const), place, place, side, words)
          .map(([along, from, to, at, text]) => span(along, from, to, at, text)),
      },
      { weight: 3, arbitrary: fc.tuple(place, side, words).map(([at, on, text]) => callout(at, on, text)) },
      {
        weight: 2,
        arbitrary: fc.tuple(place, fc.constantFrom('A', 'S', '12', 'F+2')).map(([at, text]) => mark(at, text)),
      },
    ),
    { maxLength: 14 },
  ),
});
