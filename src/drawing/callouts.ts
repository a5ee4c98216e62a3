/** Words beside a view with a line to the point they are about: a column left or right of it, rows above or below. */
import type { Box, Measure } from './boxes.ts';
import type { Line, Text } from './drawing.ts';
import { CAP_SHARE, circle, label, line, SMALL_MM } from './shapes.ts';
import { along, nearestClear, placed, type Side, type SideLines } from './span-lines.ts';
import { spread } from './spread.ts';
import type { Callout } from './views.ts';
import { wrap } from './wrap.ts';

/** Longer words are set in several lines. */
const WIDEST_MM = 36;
const LINE_MM = SMALL_MM * 1.25;
/** Between one callout and the next. */
const GAP_MM = 1.6;
/** From what stands already to the words. */
const AWAY_MM = 5;
const DOT_MM = 0.45;

/** The points that callouts are about. */
export function dotsOf(callouts: readonly Callout[], scale: number): SideLines {
  const heads = callouts.map(({ at: [x, y] }) => circle(x * scale, y * scale, DOT_MM, 'hair', 0));
  return { lines: [], heads, texts: [] };
}

interface Words {
  readonly callout: Callout;
  readonly lines: readonly string[];
  readonly width: number;
  readonly height: number;
  readonly at: readonly [number, number];
}

/** Places in order, each `sizes` apart from the next with a gap, as near as can be to the wanted ones. */
function spreadSizes(wanted: readonly number[], sizes: readonly number[]): number[] {
  const offsets = [0];
  for (let i = 1; i < sizes.length; i++) offsets.push(offsets[i - 1]! + (sizes[i - 1]! + sizes[i]!) / 2 + GAP_MM);
  return spread(
    wanted.map((place, i) => place - offsets[i]!),
    0,
  ).map((place, i) => place + offsets[i]!);
}

/** Callouts of one side, outside `edge` and clear of what is taken. */
export function calloutsOf(
  callouts: readonly Callout[],
  side: Side,
  scale: number,
  body: Box,
  edge: number,
  taken: readonly Box[],
  measure: Measure,
): SideLines {
  const words = callouts
    .map((callout): Words => {
      const lines = wrap(callout.text, WIDEST_MM, SMALL_MM, false, measure);
      return {
        callout,
        lines,
        width: Math.max(...lines.map((text) => measure.width(text, SMALL_MM))),
        height: lines.length * LINE_MM,
        at: [callout.at[0] * scale, callout.at[1] * scale],
      };
    })
    .sort((a, b) => along(side, a.at) - along(side, b.at));
  if (words.length === 0) return { lines: [], heads: [], texts: [] };
  const upright = side === 'left' || side === 'right';
  const rows = upright ? [words] : inRows(words, Math.max(60, body.right - body.left + 30));
  return nearestClear((more) => drawn(rows, side, edge + AWAY_MM + more), taken, measure);
}

/** Neighbours on different rows, so that the line of one passes between the words of others. */
function inRows(words: readonly Words[], widthMm: number): Words[][] {
  const total = words.reduce((sum, each) => sum + each.width + GAP_MM, 0);
  const count = Math.ceil(total / widthMm);
  return Array.from({ length: count }, (_, row) => words.filter((_, i) => i % count === row));
}

function drawn(rows: readonly (readonly Words[])[], side: Side, from: number): SideLines {
  const lines: Line[] = [];
  const texts: Text[] = [];
  const upright = side === 'left' || side === 'right';
  let v = from;
  for (const row of rows) {
    const sizes = row.map((each) => (upright ? each.height : each.width));
    const places = spreadSizes(
      row.map((each) => along(side, each.at)),
      sizes,
    );
    const deepest = Math.max(...row.map((each) => each.height));
    row.forEach((each, i) => {
      const [x, y] = placed(side, places[i]!, v);
      // The middle of the first line's capitals.
      const top = upright
        ? y + (each.height - LINE_MM) / 2
        : side === 'above'
          ? y + each.height - LINE_MM / 2
          : y - LINE_MM / 2;
      each.lines.forEach((text, k) => {
        const align = side === 'left' ? 'right' : side === 'right' ? 'left' : 'centre';
        texts.push(label(x, top - k * LINE_MM, text, { align, anchor: 'middle' }));
      });
      const [ex, ey] = placed(side, places[i]!, v - 0.8);
      const [kx, ky] = placed(side, places[i]!, v - 2.4);
      lines.push(line(each.at[0], each.at[1], kx, ky, 'hair'), line(kx, ky, ex, ey, 'hair'));
    });
    v += deepest + GAP_MM + (1 - CAP_SHARE) * SMALL_MM;
  }
  return { lines, heads: [], texts };
}
