/** The best cutting of reels that is found, and what is proven of it. */

import { boundOf } from './spools-bounds.ts';
import { branchAndBound } from './spools-exact.ts';
import { fitted } from './spools-fit.ts';
import { type Cuts, type Cutting, compareScores, type Score, scoreOf } from './spools-problem.ts';

export interface Found {
  readonly cuts: Cuts;
  /** Proven to be a best one. */
  readonly exact: boolean;
  /** No cutting is better in any figure whose forerunners are equal; the score itself when `exact`. */
  readonly bound: Score;
}

/** A good cutting by hand's rules; proven by its bound, or by the search of all others, as far as `nodes` of it reach. */
export function cutting(problem: Cutting, nodes = NODES): Found {
  const start = fitted(problem);
  const bound = boundOf(problem, scoreOf(problem, start));
  if (compareScores(scoreOf(problem, start), bound) <= 0) return { cuts: start, exact: true, bound };
  const { cuts, complete } = branchAndBound(problem, start, nodes);
  const score = scoreOf(problem, cuts);
  if (complete) return { cuts, exact: true, bound: score };
  const proven = boundOf(problem, score);
  return { cuts, exact: compareScores(score, proven) <= 0, bound: proven };
}

/** Steps of the search for one wire: counted, not timed, so that the plan is the same on every machine. About 0.1 s. */
export const NODES = 100_000;
