/**
 * Which pairs of contacts to use for what. All three are judged by their means over the frequencies of the table, among the pairs that
 * tune the most of them with both contacts on turns in use (dead turns have resonances of their own, which let strong signals in):
 *
 * - strongest: the most power into the detector;
 * - most selective: what is left of a channel 9 kHz off is least, of the pairs that are at most 12 dB below the strongest;
 * - balanced: most output less what is left of that channel, both in dB, so that a decibel of the one is worth one of the other. With
 *   one tuned circuit and both couplings free that is where aerial and detector together halve the coil's own Q, 6 dB below the strongest.
 *
 * Of equals the first of the table stands, which has the lower taps.
 */
import type { TablePair } from './table.ts';

/** The most selective pair may be this much weaker than the strongest, dB. */
export const WEAKEST_DB = 12;

export const USES = ['strongest', 'most selective', 'balanced'] as const;

/** Means of a pair over the frequencies of the table. */
export interface Judged {
  readonly pair: TablePair;
  /** Power into the detector against the best of the table at each frequency. */
  readonly outputDb: number;
  /** What is left of a channel 9 kHz off. */
  readonly off9Db: number;
}

export const decibels = (ratio: number): number => 20 * Math.log10(ratio);

/** Greatest power into the detector at every frequency of a table, contacts on dead turns counted. */
export function mostPower(pairs: readonly TablePair[]): ReadonlyMap<number, number> {
  const most = new Map<number, number>();
  for (const { rows } of pairs)
    for (const { kHz, tuned } of rows) most.set(kHz, Math.max(most.get(kHz) ?? 0, tuned.power));
  return most;
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;

const inUse = ({ rows }: TablePair): number => rows.filter(({ dead }) => !dead).length;

/** Frequencies that the pairs judged tune with both contacts on turns in use. */
export const tunesMost = (pairs: readonly TablePair[]): number => Math.max(0, ...pairs.map(inUse));

/** The pairs that tune the most frequencies, judged by those; empty where none tunes any. */
export function judged(pairs: readonly TablePair[]): Judged[] {
  const count = tunesMost(pairs);
  if (count === 0) return [];
  const most = mostPower(pairs);
  return pairs
    .filter((pair) => inUse(pair) === count)
    .map((pair) => {
      const rows = pair.rows.filter(({ dead }) => !dead);
      return {
        pair,
        outputDb: mean(rows.map(({ kHz, tuned }) => decibels(tuned.power / most.get(kHz)!) / 2)),
        off9Db: mean(rows.map(({ left }) => decibels(left[0]!))),
      };
    });
}

/** The three, in the order of `USES`; null where no pair tunes anything. */
export function bestOf(pairs: readonly TablePair[]): Readonly<Record<(typeof USES)[number], Judged>> | null {
  const all = judged(pairs);
  const [first] = all;
  if (first === undefined) return null;
  const by = (of: readonly Judged[], value: (one: Judged) => number) =>
    of.reduce((best, one) => (value(one) > value(best) + 1e-9 ? one : best));
  const strongest = by(all, ({ outputDb }) => outputDb);
  const heard = all.filter(({ outputDb }) => outputDb >= strongest.outputDb - WEAKEST_DB);
  return {
    strongest,
    'most selective': by([strongest, ...heard], ({ off9Db }) => -off9Db),
    balanced: by(all, ({ outputDb, off9Db }) => outputDb - off9Db),
  };
}
