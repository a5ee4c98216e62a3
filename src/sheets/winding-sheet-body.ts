/** What pages of the winding sheet are put together of. */
import type { Measure } from '../drawing/boxes.ts';
import { type Block, columns, heading, stack } from './block.ts';

/** Between blocks, and between columns; where room is short the first may be less. */
export const GAP = 3.5;
export const COLUMN_GAP = 6;

/** A sheet without its head: what it is called, and its blocks from the top. */
export interface Body {
  readonly part: string;
  readonly blocks: Block[];
  /** Stands at the foot of the sheet. */
  readonly foot?: Block;
  /** Between the blocks; `GAP` where nothing is said. */
  readonly gapMm?: number;
}

export interface Room {
  readonly widthMm: number;
  readonly heightMm: number;
}

/** Of blocks one below the other. */
export const height = (blocks: readonly Block[], gapMm = GAP) =>
  blocks.reduce((sum, block) => sum + block.heightMm, Math.max(0, blocks.length - 1) * gapMm);
export const present = (block: Block | null): Block[] => (block === null ? [] : [block]);

/** A page in two columns over an optional foot that takes the whole width. */
export interface Arrangement {
  readonly left: readonly Block[];
  readonly right: readonly Block[];
  readonly foot?: Block;
}

/** Whether both columns with the foot go into a height. */
export function fits(arrangement: Arrangement, heightMm: number, gapMm = GAP): boolean {
  const foot = arrangement.foot ? arrangement.foot.heightMm + gapMm : 0;
  return Math.max(height(arrangement.left, gapMm), height(arrangement.right, gapMm)) + foot <= heightMm + 1e-9;
}

/** Steps under their heading, in one column or two. */
export function stepsBlock(
  items: readonly Block[],
  words: string,
  count: 1 | 2,
  gapMm: number,
  measure: Measure,
): Block {
  const head = heading(words, items[0]!.widthMm, measure);
  return stack([head, columns(items, count, COLUMN_GAP, gapMm)], 0.3);
}

/** Two and two. */
export function pairs(blocks: readonly Block[]): Block[][] {
  return Array.from({ length: Math.ceil(blocks.length / 2) }, (_, i) => blocks.slice(2 * i, 2 * i + 2));
}
