/** Beds, runs, plastic and what else is bought, on the lot sheet. */
import { BED, BOUGHT, MATERIALS, RUNS } from '../../templates/wording/lot-sheet.ts';
import { type BedPiece, bedPicture } from '../drawing/bed-picture.ts';
import type { Measure } from '../drawing/boxes.ts';
import { BODY_MM, label, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { boughtFor } from '../lot/bought.ts';
import { recordOfKind } from '../lot/kind-record.ts';
import type { LotBed, LotRecord } from '../lot/schema.ts';
import { serialRanges } from '../lot/serial-ranges.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, heading, LEADING, paragraph, stack } from './block.ts';
import { CENTRE, columnsOf, RIGHT, TICK } from './check-blocks-columns.ts';
import { gramsCell } from './lot-sheet-wire.ts';
import { type Parted, parted } from './parted.ts';
import { table } from './table.ts';
import { short } from './text.ts';

type Kinds = ReadonlyMap<string, CoilRecord>;

const CARD_GAP_MM = 5;
const CARDS = 3;
/** Of a bed on paper. */
const PICTURE_MM = 54;

/** The pieces of a bed, equal names under one number. */
function piecesOf(bed: LotBed, kinds: Kinds): BedPiece[] {
  const numbers = new Map<string, number>();
  return bed.items.map(({ kind, part, name, xMm, yMm, turned }) => {
    const number = numbers.get(name) ?? numbers.size + 1;
    numbers.set(name, number);
    const entry = recordOfKind(kinds, kind).parts.find((each) => each.part === part);
    if (entry === undefined) throw new Error(`part ${part} on bed ${bed.bed} is not in the record of kind ${kind}`);
    const [across, deep] = entry.sizeMm as [number, number, number];
    return { number, name, xMm, yMm, widthMm: turned ? deep : across, depthMm: turned ? across : deep };
  });
}

function bedCard(bed: LotBed, kinds: Kinds, widthMm: number, measure: Measure): Block {
  const pieces = piecesOf(bed, kinds);
  const scale = Math.min(PICTURE_MM / bed.bedXMm, PICTURE_MM / bed.bedYMm);
  const size = `${short(bed.bedXMm, 1)} × ${short(bed.bedYMm, 1)}`;
  const high = bed.bedYMm * scale;
  const picture = bedPicture({ xMm: bed.bedXMm, yMm: bed.bedYMm }, pieces, scale, measure);
  const front = label(widthMm / 2, -high - SMALL_MM, BED.front, { align: 'centre' });
  const drawn: Block = {
    widthMm,
    heightMm: high + SMALL_MM * LEADING,
    shapes: [...movedAll({ shapes: picture }, (widthMm - bed.bedXMm * scale) / 2, -high), front],
  };
  const title = paragraph(BED.title(bed.bed, bed.count), widthMm - 4, measure, { sizeMm: BODY_MM, bold: true });
  const strip = title.heightMm + 1.6;
  const small = (text: string) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM });
  const legend = [...new Map(pieces.map((piece) => [piece.number, piece.name]))].map(([number, name]) =>
    BED.holds(number, name, pieces.filter((piece) => piece.number === number).length),
  );
  return {
    ...stack(
      [
        {
          widthMm,
          heightMm: strip,
          shapes: [rectangle(0, -strip, widthMm, strip, 'hair', 0.92), ...movedAll(title, 2, -0.9)],
        },
        small(BED.facts(bed.material, short(bed.layerMm, 3), short(bed.nozzleMm, 3), gramsCell(bed.massG))),
        small(BED.where(bed.path, bed.printer, size)),
        drawn,
        small(legend.join('; ')),
      ],
      1,
    ),
    widthMm,
  };
}

/** Beds in rows, the heading over the first. */
export function bedRows(lot: LotRecord, kinds: Kinds, widthMm: number, measure: Measure): Block[] {
  const width = (widthMm - (CARDS - 1) * CARD_GAP_MM) / CARDS;
  const rows: Block[] = [];
  for (let from = 0; from < lot.beds.length; from += CARDS) {
    const cards = lot.beds.slice(from, from + CARDS).map((bed) => bedCard(bed, kinds, width, measure));
    const row = beside(cards, CARD_GAP_MM);
    rows.push(from === 0 ? stack([heading(BED.heading, widthMm, measure), row], 0) : row);
  }
  return rows;
}

/** Null where nothing is printed. */
export function runList(lot: LotRecord, widthMm: number, measure: Measure): Parted | null {
  const groups = lot.runs.flatMap(({ printer, runs }) =>
    runs.map(({ run, bed, serials, massG }) => [
      ['', printer, `${run}`, `${bed}`, gramsCell(massG), serials.length === 0 ? RUNS.jigs : serialRanges(serials)],
    ]),
  );
  if (groups.length === 0) return null;
  const heads = [
    ['', 6, TICK],
    [RUNS.machine, 34, { bold: true }],
    [RUNS.run, 11, RIGHT],
    [RUNS.bed, 11, { ...RIGHT, bold: true }],
    [RUNS.mass, 14, RIGHT],
    [RUNS.serials, 110, {}],
  ] as const;
  return parted({ heading: RUNS.heading, more: RUNS.more }, heads, groups, widthMm, measure);
}

/** Null where nothing is printed. */
export function materials(lot: LotRecord, widthMm: number, measure: Measure): Block | null {
  if (lot.materials.length === 0) return null;
  const rows = lot.materials.map(({ material, solidG }) => [material, gramsCell(solidG)]);
  const all = lot.materials.reduce((sum, { solidG }) => sum + solidG, 0);
  if (rows.length > 1) rows.push([MATERIALS.total, gramsCell(all)]);
  const columns = columnsOf(widthMm, [
    [MATERIALS.material, 30, { bold: true }],
    [MATERIALS.mass, 30, { ...RIGHT, bold: true }],
  ]);
  return stack(
    [
      heading(MATERIALS.heading, widthMm, measure),
      table(columns, rows, measure, { rowMm: 4.7, sizeMm: SMALL_MM }),
      stack([paragraph(MATERIALS.how, widthMm, measure, { sizeMm: SMALL_MM })], 0),
    ],
    0.6,
  );
}

export function boughtList(lot: LotRecord, kinds: Kinds, widthMm: number, measure: Measure): Parted | null {
  const groups = boughtFor(lot, kinds).map(({ what, amount, kinds: letters }) => [
    [what, amount, letters.length === 1 ? BOUGHT.kind(letters[0]!) : BOUGHT.kindsOf(letters.join(', '))],
  ]);
  if (groups.length === 0) return null;
  const heads = [
    [BOUGHT.what, 96, { bold: true }],
    [BOUGHT.count, 40, CENTRE],
    [BOUGHT.kinds, 50, {}],
  ] as const;
  return parted({ heading: BOUGHT.heading, more: BOUGHT.more }, heads, groups, widthMm, measure);
}

export const nothingBought = (widthMm: number, measure: Measure): Block =>
  stack([heading(BOUGHT.heading, widthMm, measure), paragraph(BOUGHT.none, widthMm, measure)], 0);
