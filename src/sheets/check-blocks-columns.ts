/** Columns of the tables to check by. */
import { type Column, shares } from './table.ts';

/** A head, a share of the width, and the rest of each column. */
export type Parts = readonly (readonly [string, number, Partial<Column>])[];

/** Columns of a table, their widths in shares. */
export function columnsOf(widthMm: number, parts: Parts): Column[] {
  const widths = shares(
    widthMm,
    parts.map(([, part]) => part),
  );
  return parts.map(([head, , rest], i) => ({ head, widthMm: widths[i]!, ...rest }));
}

export const RIGHT = { align: 'right' } as const;
export const CENTRE = { align: 'centre' } as const;
export const BLANK = { kind: 'blank', align: 'centre' } as const;
export const TICK = { kind: 'tick', align: 'centre' } as const;
