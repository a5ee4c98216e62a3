/** The head of a traveller and the strip under it: what is the same on every coil of a kind, and where the rest goes. */
import { STRIP, TRAVELLER } from '../../templates/wording/lot-traveller.ts';
import { FACTS } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { coilText, qrCode } from '../drawing/qr.ts';
import { BODY_MM, label, line, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import type { LotKind, LotRecord } from '../lot/schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, paragraph, stack } from './block.ts';
import { shares } from './table.ts';
import { fixed, short } from './text.ts';
import { forcesText, lengthsText, lengthText, unitsOf, wireText } from './units.ts';

/** Edge of the code with its quiet zone; the code itself is 25 mm or more. */
const CODE_MM = 31;
/** Height of the row that names the coil. */
const ROW_MM = 15;
const RIGHT_MM = 50;
const KIND_MM = 18;
const SERIAL_SIZES_MM = [10, 9, 8, 7, 6, 5, 4.2, 3.6];
/** Baseline of a serial on one line, from the top. */
const SERIAL_BASE_MM = 12.6;

/** A text in the largest of some sizes in which it takes one line, else two, else as many as the smallest type needs. */
function shrunk(text: string, widthMm: number, sizesMm: readonly number[], measure: Measure): Block {
  for (const most of [1, 2])
    for (const sizeMm of sizesMm) {
      const lines = paragraph(text, widthMm, measure, { sizeMm, bold: true });
      if (lines.shapes.length <= most) return lines;
    }
  return paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold: true });
}

/** Head of every coil of a kind, from the upper left corner; the part says which sheet of the coil it is. */
export function kindHead(
  lot: LotRecord,
  kind: LotKind,
  record: CoilRecord,
  part: string | null,
  widthMm: number,
  measure: Measure,
): Block {
  const left = widthMm - CODE_MM - 1;
  const right = left - RIGHT_MM;
  const jobWidth = right - KIND_MM - 4;
  const job = shrunk(record.job, jobWidth, [5, 4.4, 3.9, 3.5], measure);
  const lotName = shrunk(lot.lot, RIGHT_MM - 4, [4.2, 3.6, 3.2], measure);
  const made = paragraph(TRAVELLER.made(lot.program, lot.date), RIGHT_MM - 4, measure, { sizeMm: SMALL_MM });
  const under = stack([lotName, made], 0.4);
  const heightMm = Math.max(CODE_MM + 1, ROW_MM + 6 + Math.max(job.heightMm, under.heightMm));
  const kindX = right - KIND_MM;
  const shapes: Shape[] = [
    rectangle(0, -heightMm, widthMm, heightMm, 'outline'),
    line(left, 0, left, -heightMm, 'thin'),
    line(right, 0, right, -heightMm, 'thin'),
    line(kindX, -ROW_MM, kindX, -heightMm, 'thin'),
    line(0, -ROW_MM, left, -ROW_MM, 'thin'),
    label(2, -3.7, TRAVELLER.serial),
    label(right + 2, -4.6, TRAVELLER.document, { sizeMm: 4.2, bold: true }),
    label(right + 2, -13, TRAVELLER.record(kind.hash.slice(0, 12))),
    label(2, -ROW_MM - 3.7, TRAVELLER.job),
    ...movedAll(job, 2, -ROW_MM - 4.9),
    label(kindX + 2, -ROW_MM - 3.7, TRAVELLER.kind),
    label(kindX + KIND_MM / 2, -ROW_MM - 13, kind.kind, {
      sizeMm: Math.min(9, (9 * (KIND_MM - 3)) / Math.max(1, measure.width(kind.kind, 9, true))),
      bold: true,
      align: 'centre',
    }),
    label(right + 2, -ROW_MM - 3.7, TRAVELLER.lot),
    ...movedAll(under, right + 2, -ROW_MM - 4.9),
  ];
  if (part !== null) shapes.push(label(right - 2, -3.7, part, { align: 'right', bold: true }));
  return { widthMm, heightMm, shapes };
}

/** What differs from coil to coil in the head: serial, page, and the code. Same corner as the head's. */
export function coilHead(serial: string, hash: string, page: string, head: Block, measure: Measure): Shape[] {
  const left = head.widthMm - CODE_MM - 1;
  const right = left - RIGHT_MM;
  const room = right - 4;
  const sizeMm = SERIAL_SIZES_MM.find((size) => measure.width(serial, size, true) <= room);
  const told =
    sizeMm === undefined
      ? movedAll(paragraph(serial, room, measure, { sizeMm: SMALL_MM, bold: true }), 2, -4.4)
      : [label(2, -SERIAL_BASE_MM, serial, { sizeMm, bold: true })];
  const code = qrCode(coilText(serial, hash), CODE_MM, 'quartile');
  const low = -(head.heightMm + CODE_MM) / 2;
  return [...told, label(right + 2, -8.9, page, { sizeMm: BODY_MM, bold: true }), ...movedAll(code, left + 0.5, low)];
}

interface Cell {
  readonly name: string;
  readonly value: string;
  readonly more: string;
}

const REEL = 1;
/** Of the cells of the strip. */
const SHARES = [32, 24, 29, 31, 32, 39] as const;
const VALUE_MM = 3.4;
/** Lines of a reel's name in its cell; with more it has a row of its own. */
const REEL_LINES = 2;

function cellBlock({ name, value, more }: Cell, widthMm: number, measure: Measure): Block {
  const inner = widthMm - 3;
  const parts = [
    paragraph(name, inner, measure, { sizeMm: SMALL_MM }),
    paragraph(value, inner, measure, { sizeMm: VALUE_MM, bold: true }),
    paragraph(more, inner, measure, { sizeMm: SMALL_MM }),
  ];
  return { ...stack(parts, 0.4), widthMm };
}

const reelCell = (spool: string | null): Cell => ({
  name: STRIP.reel,
  value: spool ?? STRIP.toBuy,
  more: spool === null ? STRIP.toBuyHow : STRIP.reelHow,
});

function kindCells(kind: LotKind, record: CoilRecord): Cell[] {
  const winding = record.windings[0]!;
  const { wire } = winding;
  const { former, frame } = record;
  const units = unitsOf(record);
  const named = (mm: number) => lengthText(mm, units, { digits: 3, trim: true });
  const how = { close: STRIP.close, groove: STRIP.groove, spacer: STRIP.spacer(winding.spacerName) };
  return [
    {
      name: STRIP.wire,
      value: wire.name,
      more: FACTS[wire.covering === 'bare' ? 'uncovered' : 'overall'](named(wire.overallMm)),
    },
    {
      name: STRIP.cut,
      value: wireText(kind.cutM, units),
      more: STRIP.ends(wireText(winding.leadsM, units, 1), fixed(kind.cutG, 1)),
    },
    {
      name: STRIP.winding,
      value: STRIP.turns(short(winding.turns, 3)),
      more: STRIP.pitch(FACTS.hand[frame.hand], named(winding.pitchMm), how[winding.pitchKind]),
    },
    { name: STRIP.drag, value: forcesText([winding.tensionLowN, winding.tensionHighN], units), more: STRIP.steady },
    {
      name: STRIP.former,
      value: `⌀ ${lengthsText([former.outsideDiameterMm, former.lengthMm], units, ' × ', { digits: 2, trim: true })}`,
      more: STRIP.made[former.kind](former.material),
    },
  ];
}

/** The strip of a kind with its reel left out, as high as any of its reels needs; and each reel as it goes there. */
export interface Strip {
  readonly block: Block;
  readonly reels: ReadonlyMap<string | null, readonly Shape[]>;
}

/** A long name of a reel, in a row over the whole width. */
function reelRow(spool: string | null, widthMm: number, measure: Measure): Block {
  const { name, value, more } = reelCell(spool);
  const indent = measure.width(name, SMALL_MM) + 3;
  const told = paragraph(`${value}; ${more}`, widthMm - 3 - indent, measure, { sizeMm: SMALL_MM, bold: true });
  const named = paragraph(name, indent, measure, { sizeMm: SMALL_MM });
  return { widthMm, heightMm: told.heightMm, shapes: [...named.shapes, ...movedAll(told, indent, 0)] };
}

export function kindStrip(
  kind: LotKind,
  record: CoilRecord,
  spools: Iterable<string | null>,
  widthMm: number,
  measure: Measure,
): Strip {
  const all = [...spools];
  const reelWidth = shares(widthMm, SHARES)[REEL]!;
  const isLong = all.some((spool) => {
    const value = paragraph(reelCell(spool).value, reelWidth - 3, measure, { sizeMm: VALUE_MM, bold: true });
    return value.shapes.length > REEL_LINES;
  });
  const widths = shares(widthMm, isLong ? SHARES.toSpliced(REEL, 1) : SHARES);
  const starts = widths.map((_, i) => widths.slice(0, i).reduce((sum, width) => sum + width, 0));
  const cells: (Cell | null)[] = kindCells(kind, record);
  if (!isLong) cells.splice(REEL, 0, null);
  const blocks = cells.map((cell, i) => cell && cellBlock(cell, widths[i]!, measure));
  const reels = new Map(
    all.map((spool) => [
      spool,
      isLong ? reelRow(spool, widthMm, measure) : cellBlock(reelCell(spool), reelWidth, measure),
    ]),
  );
  const most = (some: Iterable<Block | null>) => Math.max(0, ...[...some].map((block) => block?.heightMm ?? 0));
  const cellsMm = Math.max(most(blocks), isLong ? 0 : most(reels.values())) + 2;
  const heightMm = cellsMm + (isLong ? most(reels.values()) + 2 : 0);
  const shapes: Shape[] = [
    rectangle(0, -heightMm, widthMm, heightMm, 'thin'),
    ...starts.slice(1).map((x) => line(x, 0, x, -cellsMm, 'hair')),
    ...(isLong ? [line(0, -cellsMm, widthMm, -cellsMm, 'hair')] : []),
    ...blocks.flatMap((block, i) => (block ? movedAll(block, starts[i]! + 1.5, -1.2) : [])),
  ];
  const placed = (block: Block) =>
    isLong ? movedAll(block, 1.5, -cellsMm - 1.2) : movedAll(block, starts[REEL]! + 1.5, -1.2);
  return {
    block: { widthMm, heightMm, shapes },
    reels: new Map([...reels].map(([spool, block]) => [spool, placed(block)])),
  };
}
