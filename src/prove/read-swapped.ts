/** Whether limits stand where the reading should: the columns of a table that were mixed up. */

import type { Question } from '../bench/api.ts';
import { questionsOf } from '../bench/judge.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Conditions, What } from './read-words.ts';
import type { FileNote } from './types.ts';

interface Stated {
  readonly what: What;
  readonly tap: number | null;
  readonly conditions: Conditions;
  readonly value: number;
}

const questions = new WeakMap<CoilRecord, readonly Question[]>();

function questionsFor(record: CoilRecord): readonly Question[] {
  const known = questions.get(record) ?? questionsOf(record);
  questions.set(record, known);
  return known;
}

/** Limits are written with the figures of the record: a reading meets one by chance, but not while its column holds another. */
const SAME = 1e-6;
const same = (a: number, b: number) => Math.abs(a - b) <= SAME * Math.abs(b);

/**
 * The value is a limit as the record has it, and the column of that limit holds something else.
 * A reading that happens to equal a limit beside its own limit is left alone.
 */
export function swappedWith(
  record: CoilRecord,
  { what, tap, conditions, value }: Stated,
  cells: { readonly low: number | null; readonly high: number | null },
): Pick<FileNote, 'code' | 'got' | 'expected' | 'todo'> | null {
  if (cells.low === null && cells.high === null) return null;
  const question = questionsFor(record).find(
    (one) =>
      one.quantity === what &&
      one.tap === tap &&
      (one.capacitancePf === null || one.capacitancePf === conditions.capacitancePf),
  );
  if (question === undefined) return null;
  for (const side of ['low', 'high'] as const) {
    const [limit, cell] = [question[side], cells[side]];
    if (limit === null || cell === null || !same(value, limit) || same(cell, limit)) continue;
    return {
      code: 'swapped',
      got: `${value}, which is the ${side === 'low' ? 'lower' : 'upper'} limit, while the column of that limit holds ${cell}`,
      expected: 'the reading',
      todo: 'the titles over the two columns look swapped; put them right and run again',
    };
  }
  return null;
}
