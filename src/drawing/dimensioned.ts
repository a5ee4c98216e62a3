/**
 * A view of a part at a scale, dimensioned: outlines to scale, everything that is written at one size. Lengths stand in
 * stacks on the sides of the view, callouts outside them, marks on the view where there is room. No word covers another;
 * thin lines are broken where a word stands.
 */
import { type Box, inside, type Measure, overlap, shapeBox, textBox } from './boxes.ts';
import { calloutsOf, dotsOf } from './callouts.ts';
import type { Circle, Drawing, Line, Shape, Text } from './drawing.ts';
import { placeLabels } from './labels.ts';
import { CAP_SHARE, label, line, SMALL_MM } from './shapes.ts';
import { boxesOf, edgeOf, type Side, type SideLines, sideLines, sideOf } from './span-lines.ts';
import type { Callout, Mark, Span, View } from './views.ts';

export interface Dimensioned extends Drawing {
  /** All that is drawn, words included; the origin is the view's own. */
  readonly box: Box;
  /** The view without its dimensions. */
  readonly bodyBox: Box;
  /** Marks for which there was no room. */
  readonly missing: readonly string[];
}

/** Rows go first: they are as wide as the view, and columns then find their place beside them. */
const SIDES: readonly Side[] = ['below', 'above', 'left', 'right'];
/** Round the view, where marks may stand. */
const ROUND_MM = 7;
/** Between a broken line and the word that breaks it. */
const BREAK_MM = 0.5;

/** @param scale millimetres on paper for a millimetre of the part */
export function dimensioned(view: View, scale: number, measure: Measure): Dimensioned {
  const body = view.shapes.map((shape) => scaled(shape, scale));
  const bodyBox = boxAround(body, measure) ?? { left: 0, right: 0, bottom: 0, top: 0 };
  const spans = view.dimensions.filter((each): each is Span => each.kind === 'span');
  const callouts = view.dimensions.filter((each): each is Callout => each.kind === 'callout');
  const marks = view.dimensions.filter((each): each is Mark => each.kind === 'mark');

  const placed: SideLines[] = [dotsOf(callouts, scale)];
  const taken = () => placed.flatMap((part) => boxesOf(part, measure).map((box) => grown(box, 0.3)));
  for (const side of SIDES) {
    const here = spans.filter((span) => sideOf(span) === side);
    if (here.length > 0) placed.push(sideLines(here, side, scale, bodyBox, taken(), measure));
  }
  const stacks = placed.slice(1);
  for (const side of SIDES) {
    const here = callouts.filter((callout) => callout.side === side);
    if (here.length === 0) continue;
    const around = stacks.flatMap((part) => [...part.texts, ...part.heads, ...part.lines]);
    const edge = Math.max(edgeOf(side, bodyBox), edgeOf(side, boxAround(around, measure) ?? bodyBox));
    placed.push(calloutsOf(here, side, scale, bodyBox, edge, taken(), measure));
  }

  const named = placeMarks(marks, view, scale, body, bodyBox, taken(), measure);
  const texts = [...placed.flatMap((part) => part.texts), ...named.texts];
  const gaps = texts.map((text) => grown(textBox(text, measure), BREAK_MM));
  const thin = [...placed.flatMap((part) => part.lines), ...named.lines].flatMap((each) => withGaps(each, gaps));
  const shapes = [...body, ...thin, ...placed.flatMap((part) => part.heads), ...texts];
  return { shapes, box: boxAround(shapes, measure) ?? bodyBox, bodyBox, missing: named.missing };
}

type BodyShape = View['shapes'][number];

function scaled(shape: BodyShape, s: number): BodyShape {
  switch (shape.shape) {
    case 'line':
      return { ...shape, x1: shape.x1 * s, y1: shape.y1 * s, x2: shape.x2 * s, y2: shape.y2 * s };
    case 'circle':
      return { ...shape, x: shape.x * s, y: shape.y * s, r: shape.r * s };
    default:
      return { ...shape, points: shape.points.map(([x, y]) => [x * s, y * s] as const) };
  }
}

const grown = (box: Box, by: number): Box => ({
  left: box.left - by,
  right: box.right + by,
  bottom: box.bottom - by,
  top: box.top + by,
});

function boxAround(shapes: readonly Shape[], measure: Measure): Box | null {
  if (shapes.length === 0) return null;
  const box = { left: Infinity, right: -Infinity, bottom: Infinity, top: -Infinity };
  for (const shape of shapes) {
    const one = shapeBox(shape, measure);
    box.left = Math.min(box.left, one.left);
    box.right = Math.max(box.right, one.right);
    box.bottom = Math.min(box.bottom, one.bottom);
    box.top = Math.max(box.top, one.top);
  }
  return box;
}

/** Short pieces along the outlines: what a mark had better not stand on. */
function pieces(shapes: readonly BodyShape[], region: Box): Box[] {
  const found: Box[] = [];
  const add = (x1: number, y1: number, x2: number, y2: number) => {
    const count = Math.min(400, Math.max(1, Math.ceil(Math.hypot(x2 - x1, y2 - y1) / 2)));
    for (let i = 0; i < count; i++) {
      const [a, b] = [i / count, (i + 1) / count];
      const [u1, v1, u2, v2] = [x1 + (x2 - x1) * a, y1 + (y2 - y1) * a, x1 + (x2 - x1) * b, y1 + (y2 - y1) * b];
      const box = {
        left: Math.min(u1, u2) - 0.15,
        right: Math.max(u1, u2) + 0.15,
        bottom: Math.min(v1, v2) - 0.15,
        top: Math.max(v1, v2) + 0.15,
      };
      if (overlap(box, region)) found.push(box);
    }
  };
  for (const shape of shapes) {
    if (shape.shape === 'line') add(shape.x1, shape.y1, shape.x2, shape.y2);
    else if (shape.shape === 'circle')
      for (let i = 0; i < 16; i++) {
        const at = (k: number) => [
          shape.x + shape.r * Math.cos((k * Math.PI) / 8),
          shape.y + shape.r * Math.sin((k * Math.PI) / 8),
        ];
        const [[x1, y1], [x2, y2]] = [at(i), at(i + 1)] as [[number, number], [number, number]];
        add(x1, y1, x2, y2);
      }
    else
      shape.points.forEach(([x, y], i) => {
        const before = i > 0 ? shape.points[i - 1] : shape.closed ? shape.points[shape.points.length - 1] : undefined;
        if (before) add(before[0], before[1], x, y);
      });
  }
  return found;
}

/** A mark stands in the circle it names where it fits, else beside it. */
function placeMarks(
  marks: readonly Mark[],
  view: View,
  scale: number,
  body: readonly BodyShape[],
  bodyBox: Box,
  taken: readonly Box[],
  measure: Measure,
): { texts: Text[]; lines: Line[]; missing: string[] } {
  const texts: Text[] = [];
  const beside: { text: string; x: number; y: number; reachMm: number }[] = [];
  const circles = view.shapes.filter((shape): shape is Circle => shape.shape === 'circle');
  for (const { at, text } of marks) {
    const [x, y] = [at[0] * scale, at[1] * scale];
    const round = circles.filter((each) => Math.hypot(each.x - at[0], each.y - at[1]) < 0.01).map((each) => each.r);
    const reachMm = round.length > 0 ? Math.min(...round) * scale : 0.4;
    const fits = Math.hypot(measure.width(text, SMALL_MM, true), CAP_SHARE * SMALL_MM) / 2 + 0.4 < reachMm;
    const written = label(x, y, text, { align: 'centre', anchor: 'middle', bold: true });
    const box = textBox(written, measure);
    const free = !taken.some((other) => overlap(box, other)) && inside(box, grown(bodyBox, ROUND_MM));
    if (fits && free) texts.push(written);
    else beside.push({ text, x, y, reachMm: Math.min(reachMm, 6) });
  }
  if (beside.length === 0) return { texts, lines: [], missing: [] };
  const region = grown(bodyBox, ROUND_MM);
  const all = [...taken, ...texts.map((text) => textBox(text, measure))];
  const found = placeLabels(beside, region, all, pieces(body, region), measure);
  return {
    texts: [...texts, ...found.shapes.filter((shape): shape is Text => shape.shape === 'text')],
    lines: found.shapes.filter((shape): shape is Line => shape.shape === 'line'),
    missing: found.missing,
  };
}

/** What is left of a line outside the boxes. */
function withGaps(whole: Line, boxes: readonly Box[]): Line[] {
  const [dx, dy] = [whole.x2 - whole.x1, whole.y2 - whole.y1];
  const length = Math.hypot(dx, dy);
  let left: [number, number][] = [[0, 1]];
  for (const box of boxes) {
    const cut = within(whole, dx, dy, box);
    if (!cut) continue;
    left = left.flatMap(([from, to]): [number, number][] => {
      const before: [number, number] = [from, Math.min(to, cut[0])];
      const after: [number, number] = [Math.max(from, cut[1]), to];
      return [before, after].filter(([a, b]) => (b - a) * length > 0.3);
    });
  }
  return left.map(([from, to]) =>
    line(whole.x1 + dx * from, whole.y1 + dy * from, whole.x1 + dx * to, whole.y1 + dy * to, whole.weight),
  );
}

/** From where to where, as shares of its length, a line runs inside a box. */
function within(whole: Line, dx: number, dy: number, box: Box): [number, number] | null {
  let [from, to] = [0, 1];
  for (const [start, step, low, high] of [
    [whole.x1, dx, box.left, box.right],
    [whole.y1, dy, box.bottom, box.top],
  ] as const) {
    if (Math.abs(step) < 1e-12) {
      if (start <= low || start >= high) return null;
      continue;
    }
    const [a, b] = [(low - start) / step, (high - start) / step];
    from = Math.max(from, Math.min(a, b));
    to = Math.min(to, Math.max(a, b));
  }
  return from < to ? [from, to] : null;
}
