/**
 * Names round a circle, each as near to its place on the circle as those before it leave it: along the ring or farther
 * out, in one line or in several. Angles in degrees from the bottom, counterclockwise; millimetres, the origin in the middle.
 */
import { type Box, type Measure, overlap, textBox } from './boxes.ts';
import type { Line, Shape, Text } from './drawing.ts';
import { label, line } from './shapes.ts';
import { spread } from './spread.ts';

export interface RingName {
  /** Of its place on the circle. */
  readonly angle: number;
  readonly words: readonly string[];
}

/** Leaders begin on the circle at `rimMm`, names at `nearMm`; names had best stand `stepDeg` apart. */
export interface Ring {
  readonly rimMm: number;
  readonly nearMm: number;
  readonly stepDeg: number;
}

/** A name, and where round the ring it had best stand. */
interface Wanted extends RingName {
  readonly wanted: number;
}

/** Baseline to baseline of a name in several lines. */
const LINE_MM = 3.3;
/** How many words stand in a line, the best first. */
const WORDS_A_LINE = [4, 2, 1];
/** Steps outwards and along the ring that are tried, and how far. */
const OUT_MM = { step: 1.2, most: 24 };
const ASIDE_DEG = { step: 4, most: 60 };
/** What they cost, in millimetres outwards: a degree along the ring, a line more, and a leader across another. */
const ASIDE_COST = 0.12;
const LINE_COST = 1.5;
const CROSSED_COST = 15;
/** Free round a name, and between it and the end of its leader. */
const FREE_MM = 0.5;
const LEADER_FREE_MM = 0.8;

type Place = readonly [number, number];

const at = (degrees: number, r: number): Place => {
  const a = (degrees * Math.PI) / 180;
  return [r * Math.sin(a), -r * Math.cos(a)];
};

/** The point of a circle. */
export const onRing = at;

const grown = (box: Box, by: number): Box => ({
  left: box.left - by,
  right: box.right + by,
  bottom: box.bottom - by,
  top: box.top + by,
});

function boxOf(texts: readonly Text[], measure: Measure): Box {
  const boxes = texts.map((text) => textBox(text, measure));
  return {
    left: Math.min(...boxes.map((box) => box.left)),
    right: Math.max(...boxes.map((box) => box.right)),
    bottom: Math.min(...boxes.map((box) => box.bottom)),
    top: Math.max(...boxes.map((box) => box.top)),
  };
}

/** On which side of a line a point lies. */
const side = ({ x1, y1, x2, y2 }: Line, x: number, y: number) => (x2 - x1) * (y - y1) - (y2 - y1) * (x - x1);

function cross(a: Line, b: Line): boolean {
  return side(a, b.x1, b.y1) * side(a, b.x2, b.y2) < 0 && side(b, a.x1, a.y1) * side(b, a.x2, a.y2) < 0;
}

/** True when a line touches a box: it crosses a diagonal or has an end inside. */
function touches(one: Line, box: Box): boolean {
  const { left, right, bottom, top } = box;
  const within = (x: number, y: number) => x > left && x < right && y > bottom && y < top;
  return (
    within(one.x1, one.y1) ||
    within(one.x2, one.y2) ||
    cross(one, line(left, bottom, right, top)) ||
    cross(one, line(left, top, right, bottom))
  );
}

interface Candidate {
  readonly texts: readonly Text[];
  readonly box: Box;
  readonly leader: Line;
  readonly cost: number;
}

/** A name with its nearest point on the ring at `degrees` and `r`. */
function candidate(
  name: Wanted,
  lines: readonly string[],
  degrees: number,
  r: number,
  rimMm: number,
  measure: Measure,
) {
  const [dx, dy] = at(degrees, 1);
  const [x, y] = at(degrees, r);
  const width = Math.max(...lines.map((text) => measure.width(text, label(0, 0, text).sizeMm, true)));
  const middle = [x + (dx * width) / 2, y + (dy * (lines.length - 1) * LINE_MM) / 2] as const;
  const texts = lines.map((text, i) =>
    label(middle[0], middle[1] + ((lines.length - 1) / 2 - i) * LINE_MM, text, {
      anchor: 'middle',
      align: 'centre',
      bold: true,
    }),
  );
  const [x1, y1] = at(name.angle, rimMm);
  const [x2, y2] = at(degrees, r - LEADER_FREE_MM - 1.2);
  return { texts, box: boxOf(texts, measure), leader: line(x1, y1, x2, y2, 'hair') };
}

/** Lines of at most `most` words. */
function inLines(words: readonly string[], most: number): string[] {
  const lines: string[] = [];
  for (let i = 0; i < words.length; i += most) lines.push(words.slice(i, i + most).join(' '));
  return lines;
}

/** The ring is cut where the gap between neighbours is widest, then names are moved apart along it. */
function spreadOut(names: readonly RingName[], { stepDeg }: Ring): Wanted[] {
  const gaps = names.map(({ angle }, i) => (names[(i + 1) % names.length]!.angle - angle + 360) % 360 || 360);
  const widest = gaps.indexOf(Math.max(...gaps));
  const order = [...names.slice(widest + 1), ...names.slice(0, widest + 1)];
  const first = order[0]!.angle;
  const step = Math.min(stepDeg, 360 / order.length);
  const middle = gaps[widest]! / 2;
  const angles = order.map(({ angle }) => (angle - first + 360) % 360);
  const places = spread(angles, step, -middle + step / 2, 360 - middle - step / 2);
  return order.map((name, i) => ({ ...name, wanted: places[i]! + first }));
}

/** Farther out nothing is tried: the name then stands as it falls. */
const FARTHEST_MM = 60;

/** Names, one or more in ascending order of their angles, with their leaders: no name over another or over a leader. */
export function ringNames(names: readonly RingName[], ring: Ring, measure: Measure): Shape[] {
  const boxes: Box[] = [];
  const leaders: Line[] = [];
  const shapes: Shape[] = [];
  /** The cheapest place; where `crowded`, leaders may run under names. */
  const best = (name: Wanted, crowded: boolean): Candidate | null => {
    let found: Candidate | null = null;
    const settings = WORDS_A_LINE.map((most) => inLines(name.words, most)).filter(
      (lines, i, all) => i === 0 || lines.length !== all[i - 1]!.length,
    );
    for (let out = 0; out <= OUT_MM.most && (!found || out < found.cost); out += OUT_MM.step)
      for (let aside = 0; aside <= ASIDE_DEG.most; aside += ASIDE_DEG.step)
        for (const sense of aside === 0 ? [0] : [1, -1])
          for (const lines of settings) {
            const least = out + aside * ASIDE_COST + (lines.length - settings[0]!.length) * LINE_COST;
            if (found && least >= found.cost) continue;
            const degrees = name.wanted + sense * aside;
            const one = candidate(name, lines, degrees, ring.nearMm + out, ring.rimMm, measure);
            const box = grown(one.box, FREE_MM);
            if (boxes.some((other) => overlap(box, other))) continue;
            const hidden =
              touches(one.leader, one.box) ||
              leaders.some((other) => touches(other, box)) ||
              boxes.some((other) => touches(one.leader, other));
            if (hidden && !crowded) continue;
            const cost = least + leaders.filter((other) => cross(one.leader, other)).length * CROSSED_COST;
            if (!found || cost < found.cost) found = { ...one, cost };
          }
    return found;
  };
  for (const name of spreadOut(names, ring)) {
    const found =
      best(name, false) ??
      best(name, true) ??
      candidate(name, name.words, name.wanted, FARTHEST_MM, ring.rimMm, measure);
    boxes.push(found.box);
    leaders.push(found.leader);
    shapes.push(found.leader, ...found.texts);
  }
  return shapes;
}
