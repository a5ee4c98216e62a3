/** Blocks with pictures in them, and how they are set in rows. */
import { movedAll } from '../drawing/shapes.ts';
import type { Block } from './block.ts';
import type { PlacedPicture } from './page.ts';

/** A block that may hold pictures; they are placed by the same corner. */
export interface Card extends Block {
  readonly pictures: readonly PlacedPicture[];
}

/** Between the cards of a page, and between what stands in one. */
export const GAP_MM = 5;
export const plain = (block: Block): Card => ({ ...block, pictures: [] });

/** The same card, moved. */
export function shifted(card: Card, dx: number, dy: number): Card {
  return {
    ...card,
    shapes: movedAll(card, dx, dy),
    pictures: card.pictures.map((each) => ({ ...each, x: each.x + dx, y: each.y + dy })),
  };
}

/** One below the other, each in the middle. */
export function over(cards: readonly Card[], gapMm: number): Card {
  let y = 0;
  const widthMm = Math.max(0, ...cards.map((card) => card.widthMm));
  const placed = cards.map((card) => {
    const at = shifted(card, (widthMm - card.widthMm) / 2, y);
    y -= card.heightMm + gapMm;
    return at;
  });
  return {
    widthMm,
    heightMm: Math.max(0, -y - gapMm),
    shapes: placed.flatMap((card) => card.shapes),
    pictures: placed.flatMap((card) => card.pictures),
  };
}

/** Rows filled in order. */
export function rowsOf(cards: readonly Card[], widthMm: number): Card[][] {
  const rows: Card[][] = [];
  let left = 0;
  for (const card of cards) {
    if (rows.length === 0 || card.widthMm + GAP_MM > left + 1e-9) {
      rows.push([card]);
      left = widthMm - card.widthMm;
    } else {
      rows[rows.length - 1]!.push(card);
      left -= card.widthMm + GAP_MM;
    }
  }
  return rows;
}

/** Height of a row. */
export const rowHeight = (row: readonly Card[]) => Math.max(...row.map((card) => card.heightMm));

/** Rows one over the other, what is left of their width shared out between their cards. */
export function set(rows: readonly (readonly Card[])[], widthMm: number): Card {
  const parts = rows.map((row): Card => {
    const heightMm = rowHeight(row);
    const free = widthMm - row.reduce((sum, card) => sum + card.widthMm, 0);
    const space = Math.max(0, free) / (row.length + 1);
    let x = 0;
    const placed = row.map((card) => {
      const at = shifted(card, x + space, -(heightMm - card.heightMm) / 2);
      x += space + card.widthMm;
      return at;
    });
    const shapes = placed.flatMap((card) => card.shapes);
    return { widthMm, heightMm, shapes, pictures: placed.flatMap((card) => card.pictures) };
  });
  return over(parts, GAP_MM);
}

function orders<T>(items: readonly T[]): T[][] {
  if (items.length <= 1) return [[...items]];
  return items.flatMap((first, i) =>
    orders([...items.slice(0, i), ...items.slice(i + 1)]).map((rest) => [first, ...rest]),
  );
}

/** With more than this in a card only the order given is tried. */
const MANY = 6;

/** The lowest rows of cards in any order; the order given where it does as well. */
export function lowest(cards: readonly Card[], widthMm: number): Card[][] {
  const tries = cards.length > MANY ? [[...cards]] : orders(cards);
  let best: { rows: Card[][]; height: number } | null = null;
  for (const order of tries) {
    const rows = rowsOf(order, widthMm);
    const height = rows.reduce((sum, row) => sum + rowHeight(row) + GAP_MM, 0);
    if (!best || height < best.height - 0.01) best = { rows, height };
  }
  return best?.rows ?? [];
}

/** The cards in two columns, the first on the left, shared out so that they are lowest; null where no two are narrow enough. */
export function twoColumns(cards: readonly Card[], widthMm: number): Card | null {
  if (cards.length < 2 || cards.length > MANY) return null;
  let best: { columns: [Card, Card]; height: number } | null = null;
  for (let mask = 1; mask < 2 ** cards.length - 1; mask += 2) {
    const left = cards.filter((_, i) => mask & (1 << i));
    const right = cards.filter((_, i) => !(mask & (1 << i)));
    const width = (column: readonly Card[]) => Math.max(...column.map((card) => card.widthMm));
    if (width(left) + GAP_MM + width(right) > widthMm) continue;
    const columns: [Card, Card] = [over(left, GAP_MM), over(right, GAP_MM)];
    const height = rowHeight(columns);
    if (!best || height < best.height - 0.01) best = { columns, height };
  }
  return best && set([best.columns], widthMm);
}
