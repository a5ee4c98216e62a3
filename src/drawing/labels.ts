/** Finds room for labels and small pictures among what is drawn already. Millimetres. */
import { type Box, inside, type Measure, overlap, textBox } from './boxes.ts';
import type { Line, Shape, Text } from './drawing.ts';
import { label, line } from './shapes.ts';

export interface Marked {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  /** Half the height of what stands at the point. */
  readonly reachMm: number;
}

const around = (x: number, y: number, reach: number): Box => ({
  left: x - reach,
  right: x + reach,
  bottom: y - reach,
  top: y + reach,
});

/** True when a straight leader would run through a box. */
function runsThrough(x1: number, y1: number, x2: number, y2: number, box: Box): boolean {
  for (let i = 0; i <= 20; i++) {
    const x = x1 + ((x2 - x1) * i) / 20;
    const y = y1 + ((y2 - y1) * i) / 20;
    if (x > box.left && x < box.right && y > box.bottom && y < box.top) return true;
  }
  return false;
}

export interface Placed {
  readonly shapes: Shape[];
  /** What is now taken: the marks and their labels. */
  readonly taken: Box[];
  /** Labels for which there was no room. */
  readonly missing: string[];
}

/** Directions of a label from its mark, the handiest first. */
const TURNS = [0, 180, 30, 150, -30, -150, 15, 165, -15, -165, 45, 135, -45, -135, 60, 120, -60, -120, 90, -90];
/** What it costs a label, in millimetres of distance, to stand on a line or to send its leader over something. */
const ON_LINE = 5;
const OVER = 12;

/** The cheapest free place of a label round its mark. */
function findPlace(mark: Marked, region: Box, taken: readonly Box[], lines: readonly Box[], measure: Measure) {
  const others = taken.filter((box) => !inside(around(mark.x, mark.y, 0), box));
  let best: { text: Text; box: Box; leader: Line | null; cost: number } | null = null;
  for (let out = mark.reachMm + 0.8; out < 80 && (!best || out < best.cost); out += 0.8)
    for (const turn of TURNS) {
      const a = (turn * Math.PI) / 180;
      const x = mark.x + out * Math.cos(a);
      const y = mark.y + out * Math.sin(a);
      const align = Math.abs(turn) < 80 ? 'left' : Math.abs(turn) > 100 ? 'right' : 'centre';
      const text = label(x, y, mark.text, { align, anchor: 'middle', bold: true });
      const tight = textBox(text, measure);
      const box = {
        left: tight.left - 0.4,
        right: tight.right + 0.4,
        bottom: tight.bottom - 0.3,
        top: tight.top + 0.3,
      };
      if (!inside(box, region) || taken.some((other) => overlap(box, other))) continue;
      let cost = out + (lines.some((other) => overlap(box, other)) ? ON_LINE : 0);
      let leader: Line | null = null;
      if (out >= mark.reachMm + 2) {
        const from = mark.reachMm * 0.7;
        const sideways = Math.abs(turn) === 90 ? 0 : 0.5 * Math.sign(Math.cos(a));
        const end = turn === 90 ? box.bottom : turn === -90 ? box.top : y;
        leader = line(mark.x + from * Math.cos(a), mark.y + from * Math.sin(a), x - sideways, end, 'hair');
        const { x1, y1, x2, y2 } = leader;
        cost += OVER * others.filter((other) => runsThrough(x1, y1, x2, y2, other)).length;
      }
      if (!best || cost < best.cost) best = { text, box, leader, cost };
    }
  return best;
}

/**
 * A label beside every mark, clear of all marks and labels and inside `region`; a thin leader joins the two where they
 * are not side by side. `lines` may be written over where there is no better place. What found no room at all is named.
 */
export function placeLabels(
  marks: readonly Marked[],
  region: Box,
  taken: readonly Box[],
  lines: readonly Box[],
  measure: Measure,
): Placed {
  const all = [...taken, ...marks.map((mark) => around(mark.x, mark.y, mark.reachMm))];
  const shapes: Shape[] = [];
  const missing: string[] = [];
  for (const mark of marks) {
    const found = findPlace(mark, region, all, lines, measure);
    if (!found) {
      missing.push(mark.text);
      continue;
    }
    if (found.leader) {
      shapes.push(found.leader);
      // What is placed later keeps off the leader's middle.
      const x = (found.leader.x1 + found.leader.x2) / 2;
      const y = (found.leader.y1 + found.leader.y2) / 2;
      all.push(around(x, y, 0.4));
    }
    shapes.push(found.text);
    all.push(found.box);
  }
  return { shapes, taken: all, missing };
}

/** Lower left corner of a free rectangle in a region, nearest to the region's middle, or null. */
export function freePlace(
  region: Box,
  taken: readonly Box[],
  widthMm: number,
  heightMm: number,
  stepMm = 2,
): { x: number; y: number } | null {
  const middle = { x: (region.left + region.right - widthMm) / 2, y: (region.bottom + region.top - heightMm) / 2 };
  let best: { x: number; y: number; away: number } | null = null;
  for (let x = region.left; x + widthMm <= region.right; x += stepMm)
    for (let y = region.bottom; y + heightMm <= region.top; y += stepMm) {
      const away = Math.hypot(x - middle.x, y - middle.y);
      if (best && away >= best.away) continue;
      const box = { left: x, right: x + widthMm, bottom: y, top: y + heightMm };
      if (!taken.some((other) => overlap(box, other))) best = { x, y, away };
    }
  return best && { x: best.x, y: best.y };
}
