/** Cutting coils of few lengths from reels, as numbers: whole millimetres, coils of one length alike. */

export interface Cutting {
  /** Longest first, as `lengths`. */
  readonly reels: readonly number[];
  /** All different. */
  readonly lengths: readonly number[];
  /** Coils of each length, at least 1. */
  readonly counts: readonly number[];
}

/** How many of each length are cut from each reel. */
export type Cuts = readonly (readonly number[])[];

/** Coils unserved, their length, scrap, reels cut from: smaller is better, the first that differs decides. */
export type Score = readonly [unserved: number, buyMm: number, scrapMm: number, opened: number];

/** Negative when a is better. */
export function compareScores(a: Score, b: Score): number {
  return a[0] - b[0] || a[1] - b[1] || a[2] - b[2] || a[3] - b[3];
}

export function scoreOf({ reels, lengths, counts }: Cutting, cuts: Cuts): Score {
  let unserved = 0;
  let buyMm = 0;
  for (const [kind, count] of counts.entries()) {
    const left = count - cuts.reduce((sum, cut) => sum + cut[kind]!, 0);
    unserved += left;
    buyMm += left * lengths[kind]!;
  }
  let scrapMm = 0;
  let opened = 0;
  for (const [reel, cut] of cuts.entries()) {
    const used = cut.reduce((sum, n, kind) => sum + n * lengths[kind]!, 0);
    if (used === 0) continue;
    opened++;
    scrapMm += scrapOf(reels[reel]! - used, lengths.at(-1)!);
  }
  return [unserved, buyMm, scrapMm, opened];
}

/** A rest that another coil could be cut from is none. */
export const scrapOf = (restMm: number, shortestMm: number): number => (restMm < shortestMm ? restMm : 0);
