/** The blocks before the drawings of parts: the list, what lies on which bed, the printer, what to measure, cautions. */
import { BEDS, CAUTIONS, FINISHED, LIST, PRINTER } from '../../templates/wording/parts-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { findMaterial } from '../stock/materials.ts';
import { type Block, columns, heading, list, paragraph, stack } from './block.ts';
import { grams, PART_STYLE, titleOf } from './parts-sheet-card.ts';
import { type Column, shares, table } from './table.ts';
import { sentence, short } from './text.ts';
import {
  lengthCell,
  lengthCells,
  lengthHeads,
  lengthsText,
  lengthText,
  lengthWord,
  type Units,
  unitsOf,
} from './units.ts';

/** Numbers of the beds that hold a part, counted from 1; a record without beds is one of a lot, which has them. */
export function bedsWith(record: CoilRecord, part: string): string {
  if (record.beds.length === 0) return LIST.ofLot;
  const numbers = record.beds.flatMap((bed, i) => (bed.items.some((item) => item.part === part) ? [`${i + 1}`] : []));
  return numbers.join(', ');
}

function columnsOf(
  widthMm: number,
  parts: readonly (readonly [head: string, share: number, more?: Partial<Column>])[],
): Column[] {
  const widths = shares(
    widthMm,
    parts.map(([, share]) => share),
  );
  return parts.map(([head, , more], i) => ({ head, widthMm: widths[i]!, ...more }));
}

/** Sizes in a cell, each unit on a line of its own; with the unit only where the head of the column does not have it. */
function sizeCell(sizeMm: readonly number[], units: Units, bare = true): string {
  const lines = units === 'both' ? (['metric', 'inch'] as const) : [units];
  const cell = (unit: Units) => sizeMm.map((mm) => lengthCell(mm, unit, PART_STYLE)).join(' × ');
  return lines.map((unit) => (bare ? cell(unit) : lengthsText(sizeMm, unit, ' × ', PART_STYLE))).join('\n');
}

/** The parts `from` up to `to`; `sheetOf` tells where each is drawn. */
export function partList(
  record: CoilRecord,
  from: number,
  to: number,
  sheetOf: (part: string) => number,
  widthMm: number,
  measure: Measure,
): Block {
  const units = unitsOf(record);
  const rows = record.parts
    .slice(from, to)
    .map(({ part, name, quantity, material, massG, sizeMm, path }) => [
      titleOf(name),
      `${quantity}`,
      material,
      grams(massG),
      sizeCell(sizeMm, units),
      path,
      bedsWith(record, part) || '–',
      `${sheetOf(part)}`,
    ]);
  const asked = columnsOf(widthMm, [
    [LIST.part, 46, { bold: true }],
    [LIST.pieces, 12, { align: 'right' }],
    [LIST.material, 16],
    [LIST.mass, 14, { align: 'right' }],
    [LIST.size(lengthWord(units)), 33, { align: 'right' }],
    [LIST.file, 45],
    [LIST.bed, 9, { align: 'centre' }],
    [LIST.sheet, 11, { align: 'right' }],
  ]);
  const head = heading(from === 0 ? LIST.heading : LIST.continued, widthMm, measure);
  return stack([head, table(asked, rows, measure, { rowMm: 5 })], 0);
}

export function totals(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const pieces = record.parts.reduce((sum, part) => sum + part.quantity, 0);
  const names = [...new Set(record.parts.map((part) => part.material))];
  const massOf = (wanted: (material: string) => boolean) =>
    record.parts.reduce((sum, part) => sum + (wanted(part.material) ? part.quantity * part.massG : 0), 0);
  const each = names.map((name) => LIST.ofMaterial(name, grams(massOf((other) => other === name)))).join(', ');
  return paragraph(LIST.total(LIST.piece(pieces), grams(massOf(() => true)), each), widthMm, measure, { bold: true });
}

/** What lies on the beds `from` up to `to`. */
export function bedList(record: CoilRecord, from: number, to: number, widthMm: number, measure: Measure): Block {
  const rows = record.beds.slice(from, to).map(({ path, material, items }, i) => {
    const parts = [...new Set(items.map((item) => item.part))];
    const holds = parts.map((part) => BEDS.copies(part, items.filter((item) => item.part === part).length));
    return [`${from + i + 1}`, path, material, holds.join(', ')];
  });
  const asked = columnsOf(widthMm, [
    [BEDS.bed, 10, { align: 'centre', bold: true }],
    [BEDS.file, 28],
    [BEDS.material, 20],
    [BEDS.holds, 128],
  ]);
  const head = heading(from === 0 ? BEDS.heading : BEDS.continued, widthMm, measure);
  return stack([head, table(asked, rows, measure, { rowMm: 5, sizeMm: SMALL_MM })], 0);
}

/** Every setting with whether the job gave it. */
export function printer(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const { printer, shop, parts, assumed } = record;
  const inShop = (...sizes: number[]) => sizeCell(sizes, unitsOf(record), false);
  // What a slicer is set to is millimetres everywhere.
  const mm = (...sizes: number[]) => PRINTER.mm(sizes.map((size) => short(size, 3)).join(' × '));
  const rows: (readonly [key: string, what: string, value: string])[] = [
    ['printer.bed', PRINTER.bed, mm(printer.bedXMm, printer.bedYMm)],
    ['printer.height', PRINTER.height, mm(printer.heightMm)],
    ['printer.nozzle', PRINTER.nozzle, mm(printer.nozzleMm)],
    ['printer.line', PRINTER.line, mm(printer.lineMm)],
    ['printer.layer', PRINTER.layer, mm(printer.layerMm)],
    ['printer.hole-compensation', PRINTER.holes, mm(printer.holeCompensationMm)],
    ['printer.clearance', PRINTER.clearance, mm(printer.clearanceMm)],
    ['printer.scale', PRINTER.scale, PRINTER.percent(printer.scale.map((scale) => short(100 * scale, 3)).join(', '))],
    ['printer.material', PRINTER.material, printer.material],
  ];
  if (parts.some((part) => part.kind === 'arbor' || part.kind === 'stand'))
    rows.push(['shop.shaft', PRINTER.shaft[shop.shaftForm], inShop(shop.shaftMm)]);
  if (parts.some((part) => part.kind === 'stand'))
    rows.push(
      ['shop.spool', PRINTER.spool, inShop(shop.spoolDiameterMm, shop.spoolWidthMm)],
      ['shop.spool-bore', PRINTER.spoolBore, inShop(shop.spoolBoreMm)],
    );
  const asked = columnsOf(widthMm, [
    [PRINTER.what, 47],
    [PRINTER.value, 26, { align: 'right', bold: true }],
    [PRINTER.from, 17],
  ]);
  const cells = rows.map(([key, what, value]) => [
    what,
    value,
    Object.hasOwn(assumed, key) ? PRINTER.assumed : PRINTER.given,
  ]);
  const note = paragraph(PRINTER.note, widthMm, measure, { sizeMm: SMALL_MM });
  const head = heading(PRINTER.heading, widthMm, measure);
  return stack([stack([head, table(asked, cells, measure, { rowMm: 4.8, sizeMm: SMALL_MM })], 0), note], 1);
}

/** Sizes that decide the inductance, with room for the reading; nothing when no former is printed. */
export function finished(record: CoilRecord, widthMm: number, measure: Measure): Block | null {
  if (!record.parts.some((part) => part.kind === 'former')) return null;
  const { former } = record;
  const units = unitsOf(record);
  const asked = columnsOf(widthMm, [
    [FINISHED.what, 38],
    ...lengthHeads(units).map((unit) => [unit, 18, { align: 'right', bold: true }] as const),
    [FINISHED.reading, 26, { kind: 'blank' }],
  ]);
  const rows = [
    [FINISHED.outside, ...lengthCells(former.outsideDiameterMm, units), ''],
    [FINISHED.length, ...lengthCells(former.lengthMm, units), ''],
  ];
  const words = [
    FINISHED.tenth(
      lengthText(0.1, units, { digits: 1 }),
      short(Math.abs(former.tenthMmPercent), 3),
      former.tenthMmPercent >= 0,
    ),
    FINISHED.scale,
    sentence(former.stiffness),
  ].map((text) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM }));
  const head = heading(FINISHED.heading, widthMm, measure);
  return stack([stack([head, table(asked, rows, measure, { rowMm: 7 })], 0), ...words], 1);
}

/** Cautions in a frame. */
export function cautions(record: CoilRecord, widthMm: number, count: 1 | 2, measure: Measure): Block {
  const materials = [...new Set(record.parts.map((part) => part.material))];
  const words: string[] = [CAUTIONS.hot];
  for (const material of materials) {
    const found = findMaterial(material);
    if (found.ok && found.material.softensC !== null) words.push(CAUTIONS.softens(material, found.material.softensC));
    if (FUMING.includes(material)) words.push(CAUTIONS.fumes(material));
  }
  words.push(CAUTIONS.filled, CAUTIONS.edges);
  if (record.parts.some((part) => part.kind === 'arbor')) words.push(CAUTIONS.turning);
  const inner = widthMm - 5;
  const items = list(
    words.map((text) => ({ mark: '•', text })),
    count === 1 ? inner : (inner - 5) / 2,
    measure,
  );
  const body = stack([heading(CAUTIONS.heading, inner, measure), columns(items, count, 5, 0.5)], 0);
  const heightMm = body.heightMm + 3;
  return {
    widthMm,
    heightMm,
    shapes: [rectangle(0, -heightMm, widthMm, heightMm, 'outline'), ...movedAll(body, 2.5, -1.5)],
  };
}

/** Materials whose fumes are worse than others' (common practice, from memory). */
const FUMING: readonly string[] = ['ABS', 'ASA'];
