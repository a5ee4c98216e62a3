/** The lists of the lot sheet that concern coils and wire. */
import { BUY, KINDS, LOT_SHEET, REELS, WIRES } from '../../templates/wording/lot-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import type { LotRecord, LotWire, ToBuy } from '../lot/schema.ts';
import { serialRanges } from '../lot/serial-ranges.ts';
import { type Block, paragraph, stack } from './block.ts';
import { CENTRE, RIGHT } from './check-blocks-columns.ts';
import { type Parted, parted } from './parted.ts';
import { fixed, short } from './text.ts';
import { type Units, wireCell, wireText, wireUnit } from './units.ts';

/** Grams in a list: to a tenth below a hundred. */
export const gramsCell = (massG: number): string => fixed(massG, massG < 100 ? 1 : 0);

export function kindList(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Parted {
  const heads = [
    [KINDS.kind, 10, { ...CENTRE, bold: true }],
    [KINDS.job, 42, {}],
    [KINDS.coils, 11, { ...RIGHT, bold: true }],
    [KINDS.taps, 10, RIGHT],
    [KINDS.turns, 12, RIGHT],
    [KINDS.wire, 33, {}],
    [KINDS.cut(wireUnit(units)), 17, RIGHT],
    [KINDS.cutG, 12, RIGHT],
    [KINDS.plastic, 14, RIGHT],
    [KINDS.serials, 34, {}],
  ] as const;
  const groups = lot.kinds.map((kind) => [
    [
      kind.kind,
      kind.job,
      `${kind.quantity}`,
      `${kind.taps}`,
      short(kind.turns, 2),
      kind.wire,
      wireCell(kind.cutM, units),
      gramsCell(kind.cutG),
      kind.plasticG === 0 ? LOT_SHEET.none : gramsCell(kind.plasticG),
      serialRanges(lot.coils.flatMap((coil) => (coil.kind === kind.kind ? [coil.serial] : []))),
    ],
  ]);
  return parted({ heading: KINDS.heading, more: KINDS.more }, heads, groups, widthMm, measure);
}

const sum = <T>(all: readonly T[], of: (one: T) => number) => all.reduce((total, one) => total + of(one), 0);

export function totals(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Block {
  const text = KINDS.total(
    KINDS.coilsOf(lot.coils.length),
    KINDS.kindsOf(lot.kinds.length),
    KINDS.totalWire(
      wireText(
        sum(lot.wires, (wire) => wire.neededM),
        units,
      ),
    ),
    gramsCell(sum(lot.wires, (wire) => wire.neededG)),
  );
  return paragraph(text, widthMm, measure, { bold: true });
}

/** Whether the plan is a best one, or what none can go below. */
function planWords(wire: LotWire, units: Units): string {
  if (wire.exact) return WIRES.best;
  const parts = [
    ...(wire.unserved > 0 ? [WIRES.boundUnserved(wire.unservedBound)] : []),
    ...(wire.buyM > 0 ? [WIRES.boundBuy(wireText(wire.buyBoundM, units))] : []),
    WIRES.boundScrap(wireText(wire.scrapBoundM, units)),
  ];
  return WIRES.bound(parts);
}

export function wireList(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Parted {
  const unit = wireUnit(units);
  const heads = [
    [WIRES.wire, 38, { bold: true }],
    [WIRES.coils, 11, RIGHT],
    [WIRES.needed(unit), 18, RIGHT],
    [WIRES.neededG, 15, RIGHT],
    [WIRES.shelf(unit), 18, RIGHT],
    [WIRES.buy(unit), 18, { ...RIGHT, bold: true }],
    [WIRES.scrap(unit), 21, RIGHT],
    [WIRES.plan, 49, {}],
  ] as const;
  const groups = lot.wires.map((wire) => [
    [
      wire.wire,
      `${wire.coils}`,
      wireCell(wire.neededM, units),
      gramsCell(wire.neededG),
      wireCell(wire.shelfM, units),
      wire.buyM === 0 ? LOT_SHEET.none : wireCell(wire.buyM, units),
      wireCell(wire.scrapM, units),
      planWords(wire, units),
    ],
  ]);
  return parted({ heading: WIRES.heading, more: WIRES.more }, heads, groups, widthMm, measure);
}

export const wireWords = (widthMm: number, measure: Measure): Block =>
  paragraph(WIRES.how, widthMm, measure, { sizeMm: SMALL_MM });

/** Null without reels. */
export function reelList(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Parted | null {
  if (lot.spools.length === 0) return null;
  const unit = wireUnit(units);
  const heads = [
    [REELS.reel, 24, { bold: true }],
    [REELS.wire, 47, {}],
    [REELS.left(unit), 17, RIGHT],
    [REELS.used(unit), 17, RIGHT],
    [REELS.rest(unit), 17, { ...RIGHT, bold: true }],
    [REELS.coils, 11, RIGHT],
    [REELS.serials, 54, {}],
  ] as const;
  const groups = lot.spools.map((spool) => [
    [
      spool.spool,
      spool.wire,
      wireCell(spool.leftM, units),
      wireCell(spool.usedM, units),
      wireCell(spool.restM, units),
      `${spool.serials.length}`,
      spool.serials.length === 0 ? REELS.untouched : serialRanges(spool.serials),
    ],
  ]);
  return parted({ heading: REELS.heading, more: REELS.more }, heads, groups, widthMm, measure);
}

/** Coils that take the same length, in the order of their first. */
function alike({ coils }: ToBuy): { cutM: number; serials: string[] }[] {
  const found = new Map<number, string[]>();
  for (const { serial, cutM } of coils) found.set(cutM, [...(found.get(cutM) ?? []), serial]);
  return [...found].map(([cutM, serials]) => ({ cutM, serials }));
}

/** Null where the reels do. */
export function buyList(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Parted | null {
  if (lot.toBuy.length === 0) return null;
  const unit = wireUnit(units);
  const heads = [
    [BUY.wire, 48, { bold: true }],
    [BUY.pieces, 13, { ...RIGHT, bold: true }],
    [BUY.each(unit), 17, { ...RIGHT, bold: true }],
    [BUY.all(unit), 22, RIGHT],
    [BUY.serials, 86, {}],
  ] as const;
  const groups = lot.toBuy.flatMap((buy) =>
    alike(buy).map(({ cutM, serials }) => [
      [
        buy.wire,
        `${serials.length}`,
        wireCell(cutM, units),
        wireCell(cutM * serials.length, units),
        serialRanges(serials),
      ],
    ]),
  );
  return parted({ heading: BUY.heading, more: BUY.more }, heads, groups, widthMm, measure);
}

/** What is bought of each wire; null where nothing is. */
export function buyTotals(lot: LotRecord, units: Units, widthMm: number, measure: Measure): Block | null {
  if (lot.toBuy.length === 0) return null;
  const lines = lot.toBuy.map(({ wire, totalM, totalG }) =>
    paragraph(BUY.total(wire, wireText(totalM, units), gramsCell(totalG)), widthMm, measure, { bold: true }),
  );
  return stack(lines, 0.3);
}
