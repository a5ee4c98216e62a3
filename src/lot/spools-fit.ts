/** A good cutting by rules of thumb: the longest coil first on the reel it fills best, then moves and swaps while they help. */
import { fewestReels, fillable, mostServed } from './spools-bounds.ts';
import { improve, type Work } from './spools-moves.ts';
import { type Cuts, type Cutting, compareScores, type Score, scoreOf } from './spools-problem.ts';

/** Moves that are weighed for one wire. Counted, not timed: the plan is the same on every machine. About 0.1 s. */
const WEIGHED = 8_000_000;
/** So many coils fewer than could be served are tried for a start. */
const FEWER = 8;

export function fitted(problem: Cutting): Cuts {
  const full = fillable(problem);
  const work: Work = { left: WEIGHED };
  let best = served(problem, full, work);
  let score = scoreOf(problem, best);
  if (score[0] > 0) return best;
  // All are served: on as few reels as can be, the longest, while scrap is the reason to take more.
  const needed = problem.lengths.reduce((sum, length, kind) => sum + length * problem.counts[kind]!, 0);
  for (let reels = fewestReels(full, needed); reels <= problem.reels.length; reels++) {
    const few = { ...problem, reels: problem.reels.slice(0, reels) };
    const cuts = improve(few, bestFit(few, few.counts), work);
    const all = [...cuts, ...problem.reels.slice(reels).map(() => problem.lengths.map(() => 0))];
    const found = scoreOf(problem, all);
    if (compareScores(found, score) < 0) [best, score] = [all, found];
    if (score[0] === 0 && score[2] === 0 && score[3] <= reels) break;
  }
  return best;
}

/** As many as can be: of so many, the shortest are the ones to start with. */
function served(problem: Cutting, full: readonly number[], work: Work): Cuts {
  const most = mostServed(problem, full);
  let best: { readonly cuts: Cuts; readonly score: Score } | null = null;
  for (let coils = most; coils >= Math.max(0, most - FEWER); coils--) {
    const cuts = bestFit(problem, shortest(problem, coils));
    const score = scoreOf(problem, cuts);
    if (!best || compareScores(score, best.score) < 0) best = { cuts, score };
    if (cuts.flat().reduce((sum, n) => sum + n, 0) === coils) break;
  }
  return improve(problem, best!.cuts, work);
}

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
