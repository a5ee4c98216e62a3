/** The explanation that a command asks for, loaded only then. */
import type { ExplainedRecord, Explanation } from '../src/explain/explain.ts';

/** Null when none is asked for. Throws a Fault with exit code 2 for a tap that the coil has not. */
export async function explainedTap(record: ExplainedRecord, asked: string | undefined): Promise<Explanation | null> {
  return asked === undefined ? null : (await import('../src/explain/explain.ts')).explainTap(record, asked);
}
