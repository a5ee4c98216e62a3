/**
 * The pages of a kind, laid out once: all of its coils share them. One page holds a coil of up to 24 taps; with more the table may
 * go on on a next one.
 */
import { TRAVELLER } from '../../templates/wording/lot-traveller.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, movedAll, SMALL_MM } from '../drawing/shapes.ts';
import type { LotCoil, LotKind, LotRecord } from '../lot/schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, stack } from './block.ts';
import { PAPER_MM, type Page } from './page.ts';
import { MARGIN_MM } from './sheet-frame.ts';
import {
  LINE_MM,
  otherReadings,
  result,
  type StepWords,
  signatures,
  steps,
  stepsElsewhere,
} from './traveller-blocks.ts';
import { coilHead, kindHead, kindStrip, type Strip } from './traveller-head.ts';
import { travellerRows, travellerTable } from './traveller-taps.ts';

export interface KindPages {
  readonly kind: LotKind;
  readonly hash: string;
  /** What stands on each page of every coil, in millimetres of the page. */
  readonly pages: readonly (readonly Shape[])[];
  readonly heads: readonly Block[];
  readonly strip: Strip;
}

const GAP_MM = 2.6;
const COLUMN_GAP_MM = 6;
/** Of the width, where the readings stand beside the result. */
const READINGS_SHARE = 0.56;
/** Lines for remarks: as many at least, and no more. */
const LINES = { least: 2, most: 14 } as const;

interface Setting {
  /** `sheet`: as the winding sheet says them. */
  readonly words: StepWords | 'sheet';
  readonly rowMm: number;
  readonly sizeMm: number;
}

/** How closely a page is set, the widest first: what is said of the steps, a row of the tables, and type. */
const SETTINGS: readonly Setting[] = (
  [
    ['whole', 9, BODY_MM],
    ['whole', 8.2, BODY_MM],
    ['whole', 7.4, BODY_MM],
    ['whole', 6.6, BODY_MM],
    ['whole', 6.6, SMALL_MM],
    ['first', 7, BODY_MM],
    ['first', 6.4, BODY_MM],
    ['first', 6, SMALL_MM],
    ['first', 5.4, SMALL_MM],
    ['first', 4.9, SMALL_MM],
    ['sheet', 5.4, SMALL_MM],
    ['sheet', 4.9, SMALL_MM],
    ['sheet', 4.5, SMALL_MM],
    ['sheet', 4.1, SMALL_MM],
  ] as const
).map(([words, rowMm, sizeMm]) => ({ words, rowMm, sizeMm }));

const height = (blocks: readonly Block[]) => blocks.reduce((sum, { heightMm }) => sum + heightMm + GAP_MM, 0) - GAP_MM;

/** What does not hang on how many taps there are. */
interface Around {
  readonly record: CoilRecord;
  readonly checkedBy: string | null;
  readonly widthMm: number;
  readonly measure: Measure;
}

/** Two columns of which either may be empty, and how wide the left one is. */
function columns(left: Block | null, right: Block | null, leftMm: number): Block[] {
  if (left === null && right === null) return [];
  const blank: Block = { widthMm: leftMm, heightMm: 0, shapes: [] };
  return [beside([{ ...(left ?? blank), widthMm: leftMm }, right ?? blank], COLUMN_GAP_MM)];
}

/** Steps and readings over the table; nothing where room is short. */
function above({ record, widthMm, measure }: Around, setting: Setting): Block[] {
  const { words, rowMm, sizeMm } = setting;
  if (words === 'sheet') return [];
  const column = (widthMm - COLUMN_GAP_MM) / 2;
  const readings = otherReadings(record, Math.min(rowMm, 7), sizeMm, column, measure);
  return columns(steps(record, 'before', { words, sizeMm }, column, measure), readings, column);
}

/**
 * Steps and result under it, where room is short the readings too, as high as `freeMm` lets the lines for remarks be; null where it
 * holds too few of them.
 */
function below({ record, widthMm, measure }: Around, setting: Setting, freeMm: number): Block[] | null {
  const { words, rowMm, sizeMm } = setting;
  const short = words === 'sheet';
  const leftMm = (widthMm - COLUMN_GAP_MM) * (short ? READINGS_SHARE : 0.5);
  const rightMm = widthMm - COLUMN_GAP_MM - leftMm;
  const left = short
    ? otherReadings(record, rowMm, sizeMm, leftMm, measure)
    : steps(record, 'after', { words, sizeMm }, leftMm, measure);
  const over = short ? stepsElsewhere(record, rightMm, measure) : null;
  const overMm = over === null ? 0 : over.heightMm + GAP_MM;
  const bare = result(0, rightMm, measure).heightMm;
  const lines = Math.min(LINES.most, Math.floor((freeMm - overMm - bare) / LINE_MM));
  if (lines < LINES.least || (left?.heightMm ?? 0) > freeMm) return null;
  return columns(left, stack([...(over ? [over] : []), result(lines, rightMm, measure)], GAP_MM), leftMm);
}

interface Room {
  /** Under the head. */
  readonly firstMm: number;
  readonly nextMm: number;
}

/** Everything on one page, or null. The last block stands at the foot of the page. */
function onOnePage(around: Around, strip: Block, room: Room): Block[][] | null {
  const { record, widthMm, measure } = around;
  const rows = travellerRows(record);
  const foot = signatures(around.checkedBy, widthMm, measure);
  const set = (setting: Setting): Block[][] | null => {
    const table = travellerTable(record, rows, [0, rows.length], setting, widthMm, measure);
    const before = [strip, ...above(around, setting), table];
    const under = below(around, setting, room.firstMm - height(before) - foot.heightMm - 2 * GAP_MM);
    return under && [[...before, ...under, foot]];
  };
  // Each is set more closely than the one before: the widest that fits is found by halving.
  let fits = SETTINGS.length - 1;
  let found = set(SETTINGS[fits]!);
  if (found === null) return null;
  let tooWide = -1;
  while (fits - tooWide > 1) {
    const middle = (fits + tooWide) >> 1;
    const tried = set(SETTINGS[middle]!);
    if (tried) [fits, found] = [middle, tried];
    else tooWide = middle;
  }
  return found;
}

const LONG: Setting = { words: 'first', rowMm: 6.6, sizeMm: SMALL_MM };

/** As many rows as each page holds; what comes after the table goes on the last. */
function onSeveral(around: Around, strip: Block, room: Room): Block[][] {
  const { record, widthMm, measure } = around;
  const rows = travellerRows(record);
  const foot = signatures(around.checkedBy, widthMm, measure);
  const pages: Block[][] = [];
  let begun = [strip, ...above(around, LONG)];
  let from = 0;
  for (;;) {
    const free = (pages.length === 0 ? room.firstMm : room.nextMm) - (begun.length > 0 ? height(begun) + GAP_MM : 0);
    const part = (to: number) => travellerTable(record, rows, [from, to], LONG, widthMm, measure);
    const whole = part(rows.length);
    const under = below(around, LONG, free - whole.heightMm - foot.heightMm - 2 * GAP_MM);
    if (under) return [...pages, [...begun, whole, ...under, foot]];
    let to = rows.length - 1;
    while (to > from + 1 && part(to).heightMm > free) to--;
    pages.push([...begun, part(to)]);
    begun = [];
    from = to;
  }
}

export function kindPages(
  lot: LotRecord,
  kind: LotKind,
  record: CoilRecord,
  spools: Iterable<string | null>,
  measure: Measure,
): KindPages {
  const [paperWidth, paperHeight] = PAPER_MM[lot.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const innerMm = paperHeight - 2 * MARGIN_MM.along;
  const headOf = (part: string | null) => kindHead(lot, kind, record, part, widthMm, measure);
  const strip = kindStrip(kind, record, spools, widthMm, measure);
  const room = { firstMm: innerMm - headOf(null).heightMm - GAP_MM, nextMm: innerMm - headOf(null).heightMm - GAP_MM };
  const around = { record, checkedBy: lot.checkedBy, widthMm, measure };
  const bodies = onOnePage(around, strip.block, room) ?? onSeveral(around, strip.block, room);
  const heads = bodies.map((_, i) => headOf(bodies.length === 1 ? null : TRAVELLER.part(i + 1, bodies.length)));
  const pages = bodies.map((body, i) => {
    const last = i === bodies.length - 1;
    const flow = stack([heads[i]!, ...(last ? body.slice(0, -1) : body)], GAP_MM);
    const foot = last ? body.at(-1)! : null;
    return [
      ...movedAll(flow, MARGIN_MM.across, paperHeight - MARGIN_MM.along),
      ...(foot ? movedAll(foot, MARGIN_MM.across, MARGIN_MM.along + foot.heightMm) : []),
    ];
  });
  return { kind, hash: record.hash, pages, heads, strip };
}

/** The pages of one coil, numbered from `first`. */
export function coilPages(
  lot: Pick<LotRecord, 'paper'>,
  { hash, pages, heads, strip }: KindPages,
  coil: LotCoil,
  first: number,
  words: (page: number) => string,
  measure: Measure,
): Page[] {
  const [widthMm, heightMm] = PAPER_MM[lot.paper];
  const top = heightMm - MARGIN_MM.along;
  return pages.map((shared, i) => {
    const head = heads[i]!;
    const own: Shape[] = [...coilHead(coil.serial, hash, words(first + i), head, measure)];
    const placed = movedAll({ shapes: own }, MARGIN_MM.across, top);
    const reel =
      i === 0 ? movedAll({ shapes: strip.reels.get(coil.spool)! }, MARGIN_MM.across, top - head.heightMm - GAP_MM) : [];
    return {
      widthMm,
      heightMm,
      shapes: [...shared, ...placed, ...reel],
      ...(i === 0 ? { anchor: anchorOf(first) } : {}),
    };
  });
}

/** What a link to the coil that begins on this page leads to. */
export const anchorOf = (page: number): string => `page-${page}`;
