/**
 * Dimension lines outside a view, on one of its sides: which of them share a line, where the arrows and figures go.
 * Millimetres on paper. A side is reckoned along itself (u) and outwards (v), so that all four are laid out by one rule.
 */
import { type Box, type Measure, overlap, shapeBox } from './boxes.ts';
import type { Line, Shape, Text } from './drawing.ts';
import { arrowHead, label, line, SMALL_MM } from './shapes.ts';
import type { Span } from './views.ts';
import { wrap } from './wrap.ts';

export type Side = 'left' | 'right' | 'above' | 'below';

/** From the view to the first dimension line, and from one to the next. */
const FIRST_MM = 6.5;
const STEP_MM = 4.8;
const HEAD_MM = 2;
/** Line that shows beside the figures, at least. */
const SHOW_MM = 1.2;
/** Between a line and the figures that stand in it. */
const CLEAR_MM = 0.9;
/** Words beyond the arrows that are wider are set in several lines. */
const WIDEST_MM = 34;
const LINE_MM = SMALL_MM * 1.2;
/** Tail of an arrow that stands outside its dimension. */
const TAIL_MM = 4.2;
/** An extension line starts this far from the point and ends this far beyond the arrow. */
const OFF_MM = 0.8;
const BEYOND_MM = 1;

/** What a side looks like when it is drawn. */
export interface SideLines {
  /** Thin lines that may be broken where words stand. */
  readonly lines: Line[];
  readonly heads: Shape[];
  readonly texts: Text[];
}

/** On which side a length is drawn: one along x stands above or below, one along y left or right, one on the slant by its lean. */
export function sideOf(span: Span): Side {
  const [dx, dy] = [Math.abs(span.to[0] - span.from[0]), Math.abs(span.to[1] - span.from[1])];
  const flat = span.along === 'straight' ? dx >= dy : span.along === 'x';
  if (flat) return span.side === 'above' || span.side === 'right' ? 'above' : 'below';
  return span.side === 'right' || span.side === 'above' ? 'right' : 'left';
}

type Place = readonly [number, number];

/** To x and y from along the side and outwards. */
export function placed(side: Side, u: number, v: number): Place {
  switch (side) {
    case 'above':
      return [u, v];
    case 'below':
      return [u, -v];
    case 'right':
      return [v, u];
    default:
      return [-v, u];
  }
}

export const along = (side: Side, [x, y]: Place): number => (side === 'above' || side === 'below' ? x : y);
export const outwards = (side: Side, [x, y]: Place): number =>
  side === 'above' ? y : side === 'below' ? -y : side === 'right' ? x : -x;

/** How far a box reaches outwards, and its ends along the side. */
export const edgeOf = (side: Side, box: Box): number =>
  outwards(side, [side === 'left' ? box.left : box.right, side === 'below' ? box.bottom : box.top]);
const endsOf = (side: Side, box: Box): Place =>
  side === 'above' || side === 'below' ? [box.left, box.right] : [box.bottom, box.top];

/** One length, measured: its ends in order along the side, where its figures go, and what it takes of its line. */
interface Laid {
  readonly u1: number;
  readonly v1: number;
  readonly u2: number;
  readonly v2: number;
  /** Rise of a slanting dimension line from end to end; 0 for one along the side. */
  readonly rise: number;
  /** One line between the arrows; beyond them more where the words are many. */
  readonly words: readonly string[];
  readonly width: number;
  /** Figures between the arrows, or beyond an end with the arrows inside or outside. */
  readonly set: 'between' | 'beyond' | 'squeezed';
  readonly end: 'low' | 'high';
  readonly low: number;
  readonly high: number;
}

function laid(span: Span, side: Side, scale: number, body: Box, measure: Measure): Laid {
  const scaled = ([x, y]: Place): Place => [x * scale, y * scale];
  const ends = [scaled(span.from), scaled(span.to)].sort((a, b) => along(side, a) - along(side, b));
  const [a, b] = ends as [Place, Place];
  const [u1, v1, u2, v2] = [along(side, a), outwards(side, a), along(side, b), outwards(side, b)];
  const rise = span.along === 'straight' ? v2 - v1 : 0;
  const length = Math.hypot(u2 - u1, rise);
  const widthOf = (text: string) => measure.width(text, SMALL_MM, true);
  const whole = widthOf(span.text);
  const places = { u1, v1, u2, v2, rise };
  if (length >= whole + 2 * (HEAD_MM + SHOW_MM + CLEAR_MM))
    return { ...places, words: [span.text], width: whole, set: 'between', end: 'high', low: u1, high: u2 };
  // On the slant a line stays whole: the boxes of several would meet.
  const words = rise === 0 ? wrap(span.text, WIDEST_MM, SMALL_MM, true, measure) : [span.text];
  const width = Math.max(...words.map(widthOf));
  const set = length >= 2 * HEAD_MM + 1 ? 'beyond' : 'squeezed';
  const tail = set === 'squeezed' ? TAIL_MM : CLEAR_MM + 1;
  const room = tail + CLEAR_MM + width;
  const [first, last] = endsOf(side, body);
  const end = u2 + room - last > first - (u1 - room) + 1e-6 ? 'low' : 'high';
  const other = set === 'squeezed' ? TAIL_MM : 0;
  return {
    ...places,
    words,
    width,
    set,
    end,
    low: u1 - (end === 'low' ? room : other),
    high: u2 + (end === 'high' ? room : other),
  };
}

/** Lines from the view outwards: each length on the first line that is free of those before it. */
function levels(all: readonly Laid[]): number[] {
  const found: number[] = [];
  all.forEach((one, i) => {
    let level = 0;
    for (let k = 0; k < i; k++) {
      const other = all[k]!;
      if (one.low < other.high + 1.2 && other.low < one.high + 1.2) level = Math.max(level, found[k]! + 1);
    }
    found.push(level);
  });
  return found;
}

/** Middle of figures between arrows: moved aside where a length further out sends its lines through. */
function middle(one: Laid, crossing: readonly number[]): number {
  const centre = (one.u1 + one.u2) / 2;
  const free = (one.u2 - one.u1 - one.width) / 2 - HEAD_MM - SHOW_MM - CLEAR_MM;
  for (let off = 0; off <= free; off += 0.5)
    for (const at of [centre + off, centre - off])
      if (crossing.every((u) => Math.abs(u - at) > one.width / 2 + 0.8)) return at;
  return centre;
}

/** One length at a distance outwards. */
function drawn(one: Laid, side: Side, v: number, crossing: readonly number[]): SideLines {
  const lines: Line[] = [];
  const { u1, u2, rise } = one;
  const base = v - Math.min(0, rise);
  const slope = u2 > u1 ? rise / (u2 - u1) : 0;
  const length = Math.hypot(u2 - u1, rise) || 1;
  const [cu, cv] = u2 > u1 ? [(u2 - u1) / length, rise / length] : [1, 0];
  /** A place on the dimension line, by its distance from the lower end. */
  const on = (s: number): Place => placed(side, u1 + s * cu, base + s * cv);
  const segment = (s: number, t: number) => {
    const [x1, y1] = on(s);
    const [x2, y2] = on(t);
    lines.push(line(x1, y1, x2, y2, 'hair'));
  };
  for (const [u, from] of [
    [u1, one.v1],
    [u2, one.v2],
  ] as const) {
    const to = base + slope * (u - u1);
    const [x1, y1] = placed(side, u, from + OFF_MM);
    const [x2, y2] = placed(side, u, to + BEYOND_MM);
    if (to + BEYOND_MM > from + OFF_MM) lines.push(line(x1, y1, x2, y2, 'hair'));
  }
  const whole = u2 > u1 ? length : 0;
  const [dx, dy] = [on(1)[0] - on(0)[0], on(1)[1] - on(0)[1]];
  const degrees = (Math.atan2(dy, dx) * 180) / Math.PI;
  const head = (s: number, forward: boolean) => {
    const [x, y] = on(s);
    return arrowHead(x, y, forward ? degrees : degrees + 180, HEAD_MM);
  };
  const inward = one.set === 'squeezed';
  const heads = [head(0, inward), head(whole, !inward)];
  let at: number;
  if (one.set === 'between') {
    at = (middle(one, crossing) - u1) / cu;
    const half = one.width / 2 + CLEAR_MM;
    segment(0, at - half);
    segment(at + half, whole);
  } else {
    const tail = inward ? TAIL_MM : CLEAR_MM + 1;
    const [low, high] = [
      one.end === 'low' ? tail : inward ? TAIL_MM : 0,
      one.end === 'high' ? tail : inward ? TAIL_MM : 0,
    ];
    segment(-low, whole + high);
    at = one.end === 'high' ? whole + tail + CLEAR_MM + one.width / 2 : -tail - CLEAR_MM - one.width / 2;
  }
  // Read from below or from the right, whichever way the line runs.
  const [x, y] = on(at);
  const turn = degrees > 90.01 ? degrees - 180 : degrees < -89.99 ? degrees + 180 : degrees;
  const down = (turn * Math.PI) / 180;
  const texts = one.words.map((text, i) => {
    const off = (i - (one.words.length - 1) / 2) * LINE_MM;
    const at = [x + off * Math.sin(down), y - off * Math.cos(down)] as const;
    return label(at[0], at[1], text, { align: 'centre', anchor: 'middle', bold: true, turnDeg: turn });
  });
  return { lines, heads, texts };
}

/**
 * The lengths of one side, stacked outwards in their order, as near to the view as what is taken already allows.
 * @param body the view itself, on paper
 * @param taken boxes of words and arrows that stand already
 */
export function sideLines(
  spans: readonly Span[],
  side: Side,
  scale: number,
  body: Box,
  taken: readonly Box[],
  measure: Measure,
): SideLines {
  const all = spans.map((span) => laid(span, side, scale, body, measure));
  const flat = all.filter((one) => Math.abs(one.rise) < 1e-6);
  const slanting = all.filter((one) => Math.abs(one.rise) >= 1e-6);
  const level = levels(flat);
  const count = Math.max(-1, ...level) + 1;
  /** What words of several lines take more than one, on each level. */
  const extra = Array.from({ length: count }, (_, k) =>
    Math.max(...flat.map((one, i) => (level[i] === k ? (one.words.length - 1) * LINE_MM : 0))),
  );
  const upTo = (k: number) => k * STEP_MM + extra.slice(0, k).reduce((sum, mm) => sum + mm, 0);
  const first = edgeOf(side, body) + FIRST_MM;
  const stacked = (more: number): SideLines =>
    joined(
      flat.map((one, i) => {
        const on = level[i]!;
        const crossing = flat.flatMap((other, k) => (level[k]! > on ? [other.u1, other.u2] : []));
        for (const other of slanting) crossing.push(other.u1, other.u2);
        return drawn(one, side, first + more + upTo(on) + extra[on]! / 2, crossing);
      }),
    );
  const parts = [nearestClear(stacked, taken, measure)];
  // Slanting ones reach in and out: each goes as near as those before it allow.
  for (const one of slanting) {
    const before = [...taken, ...parts.flatMap((part) => boxesOf(part, measure))];
    parts.push(nearestClear((more) => drawn(one, side, first + upTo(count) + more, []), before, measure));
  }
  return joined(parts);
}

const joined = (parts: readonly SideLines[]): SideLines => ({
  lines: parts.flatMap((part) => part.lines),
  heads: parts.flatMap((part) => part.heads),
  texts: parts.flatMap((part) => part.texts),
});

/** What its words and arrows take. */
export const boxesOf = ({ texts, heads }: SideLines, measure: Measure): Box[] =>
  [...texts, ...heads].map((shape) => shapeBox(shape, measure));

/** Farther than this out nothing is tried: the words then stand as they fall. */
const FARTHEST_MM = 160;

/** Words and arrows as near to the view as they are clear of what is taken. */
export function nearestClear(made: (moreMm: number) => SideLines, taken: readonly Box[], measure: Measure): SideLines {
  for (let more = 0; ; more += 2) {
    const found = made(more);
    const boxes = boxesOf(found, measure);
    if (more >= FARTHEST_MM || !boxes.some((box) => taken.some((other) => overlap(box, other)))) return found;
  }
}
