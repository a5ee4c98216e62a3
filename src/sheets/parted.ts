/** Tables that go on over several pages, and pages that are filled from the top. */
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { type Block, heading, stack } from './block.ts';
import { type Column, shares, table } from './table.ts';

/** A table that may be parted between two groups of rows. */
export interface Parted {
  /** Rows that stay together. */
  readonly groups: readonly (readonly (readonly string[])[])[];
  block(groups: readonly (readonly (readonly string[])[])[], continued: boolean): Block;
}

export type Head = readonly [head: string, share: number, rest: Partial<Column>];

const ROW_MM = 4.7;

export function parted(
  words: { heading: string; more: string },
  heads: readonly Head[],
  groups: Parted['groups'],
  widthMm: number,
  measure: Measure,
): Parted {
  const widths = shares(
    widthMm,
    heads.map(([, share]) => share),
  );
  const columns = heads.map(([head, , rest], i): Column => ({ head, widthMm: widths[i]!, ...rest }));
  return {
    groups,
    block: (some, continued) =>
      stack(
        [
          heading(continued ? words.more : words.heading, widthMm, measure),
          table(columns, some.flat(), measure, { rowMm: ROW_MM, sizeMm: SMALL_MM }),
        ],
        0,
      ),
  };
}

export interface Body {
  readonly part: string;
  readonly blocks: Block[];
}

/** Between two blocks of a page, mm. */
export const GAP_MM = 3;
/** Between two items of a list, mm. */
const ITEM_GAP_MM = 0.5;

/** Pages that are filled from the top. */
export class Filling {
  readonly bodies: Body[] = [];
  #left = 0;
  readonly #heightMm: number;

  constructor(heightMm: number) {
    this.#heightMm = heightMm;
  }

  page(part: string): void {
    this.bodies.push({ part, blocks: [] });
    this.#left = this.#heightMm;
  }

  get left(): number {
    return this.#left - (this.bodies.at(-1)!.blocks.length > 0 ? GAP_MM : 0);
  }

  put(block: Block, part: string): void {
    if (block.heightMm > this.left + 1e-9) this.page(part);
    this.#left = this.left - block.heightMm;
    this.bodies.at(-1)!.blocks.push(block);
  }

  /** As many groups as the page holds, the rest on the next; two at least, or none. */
  putParted(part: Parted, name: string): void {
    let from = 0;
    while (from < part.groups.length) {
      let to = part.groups.length;
      while (to > from && part.block(part.groups.slice(from, to), from > 0).heightMm > this.left + 1e-9) to--;
      // No row stands alone on the next page.
      if (part.groups.length - to === 1 && to - from > 2) to--;
      const some = to - from;
      if (some < Math.min(2, part.groups.length - from) && this.bodies.at(-1)!.blocks.length > 0) {
        this.page(name);
        continue;
      }
      to = Math.max(to, from + 1);
      this.put(part.block(part.groups.slice(from, to), from > 0), name);
      from = to;
    }
  }

  /** A heading with its items, as many as each page holds; the heading never without its first item. */
  putList(group: readonly Block[], part: string): void {
    const [head, first, ...rest] = group;
    if (head === undefined) return;
    const whole = (items: readonly Block[]) => stack(items, ITEM_GAP_MM);
    let items = [first === undefined ? head : whole([head, first]), ...rest];
    while (items.length > 0) {
      let count = items.length;
      while (count > 1 && whole(items.slice(0, count)).heightMm > this.left + 1e-9) count--;
      this.put(whole(items.slice(0, count)), part);
      items = items.slice(count);
    }
  }
}
