/** Faults planted in a record: every number of a field moved a little, or one of them far. */
import type { CoilRecord } from '../../src/record/schema.ts';

type Json = unknown;

/** The record with the first number at a path moved by a share of it (whole numbers by 1); null where it has none there. */
export function planted(record: CoilRecord, path: string, share: number): CoilRecord | null {
  const copy = structuredClone(record) as Json;
  const steps = path.split('.').flatMap((step) => {
    const depth = (step.match(/\[\]/g) ?? []).length;
    return [step.replaceAll('[]', ''), ...new Array<string>(depth).fill('[]')];
  });
  const move = (node: Json, at: number): Json | undefined => {
    if (at === steps.length) {
      if (typeof node !== 'number') return undefined;
      return Number.isInteger(node) && Math.abs(node * share) < 1 ? node + 1 : node * (1 + share);
    }
    if (node === null || typeof node !== 'object') return undefined;
    const step = steps[at]!;
    const keys = step === '[]' ? Object.keys(node) : [step];
    for (const key of keys) {
      const inner = (node as Record<string, Json>)[key];
      const moved = move(inner, at + 1);
      if (moved !== undefined) {
        (node as Record<string, Json>)[key] = moved;
        return node;
      }
    }
    return undefined;
  };
  return move(copy, 0) === undefined ? null : (copy as CoilRecord);
}
