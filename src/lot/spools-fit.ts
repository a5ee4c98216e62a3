/** A good cutting by rules of thumb: the longest coil first on the reel it fills best, then moves and swaps while they help. */
import { fewestReels, mostServed } from './spools-bounds.ts';
import { improve } from './spools-moves.ts';
import { type Cuts, type Cutting, compareScores, type Score, scoreOf } from './spools-problem.ts';

/** Moves that are weighed at most. Counted, not timed: the plan is the same on every machine. About 0.05 s. */
const WEIGHED = 1_500_000;
/** So many coils fewer than could be served are tried for a start. */
const FEWER = 8;

/** @param full as from `fillable` */
export function fitted(problem: Cutting, full: readonly number[]): Cuts {
  const most = mostServed(problem, full);
  const all = most === problem.counts.reduce((sum, n) => sum + n, 0) ? allServed(problem, full) : null;
  if (all?.score[0] === 0) return all.cuts;
  return mostOf(problem, most).reduce(better, all)!.cuts;
}

/** All on as few reels as can be, the longest; scrap is the reason to take more. */
function allServed(problem: Cutting, full: readonly number[]): Scored | null {
  const needed = problem.lengths.reduce((sum, length, kind) => sum + length * problem.counts[kind]!, 0);
  let left = WEIGHED;
  let best: Scored | null = null;
  for (let reels = fewestReels(full, needed); reels <= problem.reels.length; reels++) {
    const few = { ...problem, reels: problem.reels.slice(0, reels) };
    const others = problem.reels.slice(reels).map(() => problem.lengths.map(() => 0));
    const scored = (cuts: Cuts): Scored => ({
      cuts: [...cuts, ...others],
      score: scoreOf(problem, [...cuts, ...others]),
    });
    for (const start of STARTS) {
      const cuts = start(few, few.counts);
      best = better(best, scored(cuts));
      if (best.score[0] === 0 && best.score[2] === 0) return best;
      const work = { left: Math.min(left, WEIGHED / 5) };
      left -= work.left;
      best = better(best, scored(improve(few, cuts, work)));
      left += Math.max(0, work.left);
      if (best.score[0] === 0 && best.score[2] === 0) return best;
    }
  }
  return best;
}

/** As many as can be: of so many, the shortest are the ones to start with. */
function mostOf(problem: Cutting, most: number): readonly Scored[] {
  return STARTS.map((start) => {
    let best: Scored | null = null;
    for (let coils = most; coils >= Math.max(0, most - FEWER); coils--) {
      const cuts = start(problem, shortest(problem, coils));
      best = better(best, { cuts, score: scoreOf(problem, cuts) });
      if (cuts.flat().reduce((sum, n) => sum + n, 0) === coils) break;
    }
    const cuts = improve(problem, best!.cuts, { left: WEIGHED });
    return { cuts, score: scoreOf(problem, cuts) };
  });
}

interface Scored {
  readonly cuts: Cuts;
  readonly score: Score;
}

const better = (a: Scored | null, b: Scored): Scored => (a && compareScores(a.score, b.score) <= 0 ? a : b);

/** So many of each length, the shortest first. */
function shortest({ counts }: Cutting, coils: number): readonly number[] {
  let left = coils;
  return counts
    .toReversed()
    .map((count) => {
      const taken = Math.min(count, left);
      left -= taken;
      return taken;
    })
    .reverse();
}

/** The longest first, each from the reel on which it leaves least. */
function bestFit({ reels, lengths }: Cutting, counts: readonly number[]): Cuts {
  const rest = [...reels];
  const cuts = reels.map(() => lengths.map(() => 0));
  for (const [kind, length] of lengths.entries())
    for (let n = 0; n < counts[kind]!; n++) {
      let best = -1;
      for (const [reel, left] of rest.entries()) if (left >= length && (best < 0 || left < rest[best]!)) best = reel;
      if (best < 0) break;
      rest[best]! -= length;
      cuts[best]![kind]! += 1;
    }
  return cuts;
}

/** Choices that are made to fill one reel. */
const CHOICES = 3000;

/** Reel by reel, the shortest first: each is filled as far as can be, with the longest coils that do it. */
function fullest({ reels, lengths }: Cutting, counts: readonly number[]): Cuts {
  const left = [...counts];
  return reels
    .toReversed()
    .map((reel) => {
      let best = lengths.map(() => 0);
      let leastMm = Number.POSITIVE_INFINITY;
      let choices = CHOICES;
      const cut = lengths.map(() => 0);
      const fill = (kind: number, restMm: number): void => {
        choices--;
        if (restMm < leastMm) {
          leastMm = restMm;
          best = [...cut];
        }
        if (kind === lengths.length) return;
        for (let n = Math.min(left[kind]!, Math.floor(restMm / lengths[kind]!)); n >= 0; n--) {
          if (choices <= 0 || leastMm === 0) break;
          cut[kind] = n;
          fill(kind + 1, restMm - n * lengths[kind]!);
        }
        cut[kind] = 0;
      };
      fill(0, reel);
      for (const [kind, n] of best.entries()) left[kind]! -= n;
      return best;
    })
    .reverse();
}

const STARTS = [bestFit, fullest] as const;
