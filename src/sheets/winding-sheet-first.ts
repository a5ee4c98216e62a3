/** The page to wind from, and those that its steps and taps run on to. */
import { STEPS, TITLE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { BODY_MM, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, closer, stack } from './block.ts';
import * as wind from './wind-blocks.ts';
import {
  type Arrangement,
  type Body,
  COLUMN_GAP,
  fits,
  GAP,
  height,
  pairs,
  present,
  type Room,
  stepsBlock,
} from './winding-sheet-body.ts';

/** Height of the drawing of the coil on page 1, the largest first. */
const DRAWING_MM = [90, 84, 72, 60, 48, 42, 30, 24];
/** How closely the rest is set: a row of the tap table, the space between steps, their type, and the space between blocks. */
interface Closeness {
  readonly rowMm: number;
  readonly gapMm: number;
  readonly sizeMm: number;
  readonly betweenMm?: number;
  /** Lines nearer to one another. */
  readonly close?: true;
}

const CLOSENESS: readonly Closeness[] = [
  { rowMm: 5.4, gapMm: 1.4, sizeMm: BODY_MM },
  { rowMm: 5, gapMm: 1, sizeMm: BODY_MM },
  { rowMm: 4.7, gapMm: 0.6, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: SMALL_MM },
  { rowMm: 4.2, gapMm: 0.2, sizeMm: SMALL_MM, betweenMm: 2 },
  { rowMm: 4.2, gapMm: 0.2, sizeMm: SMALL_MM, betweenMm: 2, close: true },
];

/** The most leading steps that `holds` lets pass; 0 when not one. */
function mostSteps(items: readonly Block[], holds: (first: readonly Block[]) => boolean): number {
  let count = items.length;
  while (count > 0 && !holds(items.slice(0, count))) count--;
  return count;
}

/** Steps that found no place on the first page, in two columns a page. */
function moreSteps(rest: readonly Block[], first: boolean, heightMm: number, measure: Measure): Body[] {
  const bodies: Body[] = [];
  let left = rest;
  while (left.length > 0) {
    const words = first && bodies.length === 0 ? STEPS.heading : STEPS.more;
    const count = Math.max(
      1,
      mostSteps(left, (some) => stepsBlock(some, words, 2, 1.4, measure).heightMm <= heightMm),
    );
    bodies.push({ part: TITLE.more, blocks: [stepsBlock(left.slice(0, count), words, 2, 1.4, measure)] });
    left = left.slice(count);
  }
  return bodies;
}

/** Least height of a row of the tap table where it is long. */
const TAP_ROW_MM = 4.7;

/** The tap table in parts that are no higher than a page. */
function tapTables(record: CoilRecord, widthMm: number, heightMm: number, measure: Measure): [Block, ...Block[]] {
  const rows = wind.tapRows(record);
  const part = (from: number, count: number) =>
    wind.tapTable(record, widthMm, TAP_ROW_MM, measure, from, Math.min(from + count, rows));
  const whole = part(0, rows);
  if (whole.heightMm <= heightMm) return [whole];
  const least = part(rows - 1, 1).heightMm;
  const most = 1 + Math.floor((heightMm - least) / ((whole.heightMm - least) / (rows - 1)));
  const more: Block[] = [];
  for (let from = most; from < rows; from += most) more.push(part(from, most));
  return [part(0, most), ...more];
}

/** The blocks of page 1 that hang on how near lines are, and the drawing at each of its sizes. */
function settled(record: CoilRecord, { widthMm }: Room, measure: Measure) {
  const column = (widthMm - COLUMN_GAP) / 2;
  const drawn: Block[] = [];
  return {
    measure,
    strip: wind.facts(record, widthMm, measure),
    method: wind.tapMethod(record, column, measure),
    brief: wind.tapBriefly(record, column, measure),
    angles: present(wind.tapAngles(record, column, measure)),
    wide: wind.cautions(record, widthMm, 2, measure),
    narrow: wind.cautions(record, column, 1, measure),
    drawingOf: (size: number) => {
      drawn[size] ??= wind.coilDrawing(record, column, DRAWING_MM[size]!, measure);
      return drawn[size];
    },
  };
}
type Settled = ReturnType<typeof settled>;

/** Page 1: of the arrangements that hold everything the first, set as widely as it allows; else the steps run on. */
export function toWindFrom(record: CoilRecord, room: Room, measure: Measure, part: 'all' | 'winding' = 'all'): Body[] {
  const column = (room.widthMm - COLUMN_GAP) / 2;
  const page = ({ left, right, foot }: Arrangement, strip: Block, betweenMm = GAP): Body => ({
    part: TITLE.wind,
    blocks: [strip, beside([{ ...stack(left, betweenMm), widthMm: column }, stack(right, betweenMm)], COLUMN_GAP)],
    ...(foot ? { foot } : {}),
    gapMm: betweenMm,
  });
  // Most sheets take the first setting: the others are set only when asked for.
  const loose = settled(record, room, measure);
  let close: Settled | null = null;
  const at = ({ rowMm, gapMm, sizeMm, betweenMm = GAP, close: isClose }: Closeness, sizes: Iterable<number>) => {
    if (isClose) close ??= settled(record, room, closer(measure));
    const set = isClose && close ? close : loose;
    const { strip, method, brief, angles, wide, narrow } = set;
    const free = room.heightMm + GAP - strip.heightMm - 2 * betweenMm;
    const stepsOf = (of: wind.StepPart, words: string) => {
      const items = wind.stepItems(record, column, set.measure, sizeMm, of);
      return items.length === 0 ? null : stepsBlock(items, words, 1, gapMm, set.measure);
    };
    const steps = stepsOf(part, STEPS.heading)!;
    const during = stepsOf('during', STEPS.heading)!;
    const after = part === 'all' ? present(stepsOf('after', STEPS.after)) : [];
    const taps = wind.tapTable(record, column, rowMm, set.measure, 0, undefined, sizeMm);
    for (const size of sizes) {
      const drawing = set.drawingOf(size);
      const whole: Arrangement[] = [
        { left: [drawing, method, ...angles], right: [taps, steps], foot: wide },
        { left: [drawing, method], right: [taps, ...angles, steps], foot: wide },
        { left: [drawing, ...angles], right: [taps, steps, method], foot: wide },
        { left: [drawing, method, narrow], right: [taps, ...angles, steps] },
        { left: [drawing, method, ...angles, narrow], right: [taps, steps] },
        { left: [drawing, ...angles, narrow], right: [taps, steps, method] },
        { left: [drawing, taps], right: [steps, method, ...angles], foot: wide },
        { left: [drawing, taps, ...angles], right: [steps, method], foot: wide },
        // The pictures alone tell how a tap is made, when there is no room for more.
        ...(sizeMm === SMALL_MM
          ? [
              { left: [drawing, brief], right: [taps, steps], foot: wide },
              { left: [drawing, steps], right: [taps, brief], foot: wide },
              { left: [drawing, taps], right: [steps, brief], foot: wide },
              ...(after.length > 0 ? [{ left: [drawing, during], right: [taps, brief, ...after], foot: wide }] : []),
              { left: [drawing, taps], right: [steps, brief, narrow] },
              { left: [drawing, brief, narrow], right: [taps, steps] },
            ]
          : []),
      ];
      const found = whole.find((each) => fits(each, free, betweenMm));
      if (found) return page(found, strip, betweenMm);
    }
    return null;
  };
  // What does not go in at its closest, beside the least drawing, is not tried at every size before.
  if (at(CLOSENESS.at(-1)!, [DRAWING_MM.length - 1]) !== null)
    for (const closeness of CLOSENESS) {
      const found = at(closeness, DRAWING_MM.keys());
      if (found !== null) return [found];
    }

  const { strip, method, angles, wide, narrow, drawingOf } = loose;
  const free = room.heightMm - strip.heightMm - GAP;
  const items = wind.stepItems(record, column, measure, BODY_MM, part);
  // Not all of it fits: the steps run on over the next pages, and what is left finds its place there too.
  const [taps, ...moreTaps] = tapTables(record, column, free, measure);
  const some: ((drawing: Block) => Arrangement)[] = [
    (drawing) => ({ left: [drawing, method, ...angles], right: [taps], foot: wide }),
    (drawing) => ({ left: [drawing, method], right: [taps, ...angles], foot: wide }),
    (drawing) => ({ left: [drawing, method, narrow], right: [taps, ...angles] }),
    (drawing) => ({ left: [drawing, method], right: [taps], foot: wide }),
    (drawing) => ({ left: [drawing, narrow], right: [taps, ...angles] }),
    (drawing) => ({ left: [drawing], right: [taps], foot: wide }),
  ];
  const tries = some.flatMap((arranged) => [1, 2, 3, 4, 6].map((size) => arranged(drawingOf(size))));
  const first = tries.find((each) => fits(each, free)) ?? { left: [drawingOf(3)], right: [taps] };
  const under = (begun: readonly Block[]) => ({
    ...first,
    right: [...first.right, stepsBlock(begun, STEPS.heading, 1, 1, measure)],
  });
  const most = mostSteps(items, (begun) => fits(under(begun), free));
  // A few steps torn off from the rest are worse than all of them on the next page.
  const count = most >= 4 ? most : 0;
  const placed = new Set([...first.left, ...first.right, first.foot, ...(first.left.includes(narrow) ? [wide] : [])]);
  const bodies: Body[] = [
    page(count > 0 ? under(items.slice(0, count)) : first, strip),
    ...pairs(moreTaps).map((pair) => ({ part: TITLE.more, blocks: [beside(pair, COLUMN_GAP)] })),
    ...moreSteps(items.slice(count), count === 0, room.heightMm, measure),
  ];
  for (const block of [method, ...angles, wide]) {
    if (placed.has(block)) continue;
    const last = bodies[bodies.length - 1]!;
    if (bodies.length > 1 && height([...last.blocks, block]) <= room.heightMm) last.blocks.push(block);
    else bodies.push({ part: TITLE.more, blocks: [block] });
  }
  return bodies;
}
