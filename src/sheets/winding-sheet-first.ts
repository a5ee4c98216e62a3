/** The page to wind from, and those that its steps and taps run on to. */
import { STEPS, TITLE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { BODY_MM, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, stack } from './block.ts';
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
}

const CLOSENESS: readonly Closeness[] = [
  { rowMm: 5.4, gapMm: 1.4, sizeMm: BODY_MM },
  { rowMm: 5, gapMm: 1, sizeMm: BODY_MM },
  { rowMm: 4.7, gapMm: 0.6, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: BODY_MM },
  { rowMm: 4.5, gapMm: 0.4, sizeMm: SMALL_MM },
  { rowMm: 4.2, gapMm: 0.2, sizeMm: SMALL_MM, betweenMm: 2 },
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

/** Page 1: of the arrangements that hold everything the first, set as widely as it allows; else the steps run on. */
export function toWindFrom(record: CoilRecord, room: Room, measure: Measure, part: 'all' | 'winding' = 'all'): Body[] {
  const column = (room.widthMm - COLUMN_GAP) / 2;
  const strip = wind.facts(record, room.widthMm, measure);
  const freeWith = (betweenMm: number) => room.heightMm + GAP - strip.heightMm - 2 * betweenMm;
  const free = freeWith(GAP);
  const method = wind.tapMethod(record, column, measure);
  const brief = wind.tapBriefly(record, column, measure);
  const angles = present(wind.tapAngles(record, column, measure));
  const wide = wind.cautions(record, room.widthMm, 2, measure);
  const narrow = wind.cautions(record, column, 1, measure);
  const items = wind.stepItems(record, column, measure, BODY_MM, part);
  const page = ({ left, right, foot }: Arrangement, betweenMm = GAP): Body => ({
    part: TITLE.wind,
    blocks: [strip, beside([{ ...stack(left, betweenMm), widthMm: column }, stack(right, betweenMm)], COLUMN_GAP)],
    ...(foot ? { foot } : {}),
    gapMm: betweenMm,
  });
  // Most sheets take the first size: the others are drawn only when asked for.
  const drawn: Block[] = [];
  const drawingOf = (size: number) => {
    drawn[size] ??= wind.coilDrawing(record, column, DRAWING_MM[size]!, measure);
    return drawn[size];
  };
  for (const { rowMm, gapMm, sizeMm, betweenMm = GAP } of CLOSENESS) {
    const items = wind.stepItems(record, column, measure, sizeMm, part);
    const taps = wind.tapTable(record, column, rowMm, measure, 0, undefined, sizeMm);
    const steps = stepsBlock(items, STEPS.heading, 1, gapMm, measure);
    for (const size of DRAWING_MM.keys()) {
      const drawing = drawingOf(size);
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
              { left: [drawing, taps], right: [steps, brief, narrow] },
              { left: [drawing, brief, narrow], right: [taps, steps] },
            ]
          : []),
      ];
      const found = whole.find((each) => fits(each, freeWith(betweenMm), betweenMm));
      if (found) return [page(found, betweenMm)];
    }
  }

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
    page(count > 0 ? under(items.slice(0, count)) : first),
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
