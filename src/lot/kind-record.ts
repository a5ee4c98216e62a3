/** The record behind the letter of a kind. */
import type { CoilRecord } from '../record/schema.ts';

/** @throws Error for a letter without a record: the lot and its kinds were not made together */
export function recordOfKind(kinds: ReadonlyMap<string, CoilRecord>, kind: string): CoilRecord {
  const record = kinds.get(kind);
  if (record === undefined) throw new Error(`kind ${kind} of the lot has no record`);
  return record;
}
