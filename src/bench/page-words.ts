/** How stops and turns are called on the page. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { short } from '../quantity/decimals.ts';
import type { Stop } from './api.ts';

type Named = Pick<Stop, 'kind' | 'number'>;

/** 12, 12.25: turns as people count them. */
export const turnsText = (turns: number): string => short(turns, 2);

/** `Tap 3`, `Tap u1`, `Check`, `Finish`. */
export function nameOf({ kind, number }: Named): string {
  if (kind === 'tap' || kind === 'unit') return BENCH.stop[kind](number!);
  return BENCH.stop[kind];
}

/** The same where there is room for a letter or two. */
export function markOf({ kind, number }: Named): string {
  return kind === 'finish' ? 'F' : kind === 'check' ? '✓' : kind === 'unit' ? `u${number}` : String(number);
}
