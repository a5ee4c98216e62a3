/** The best cutting of reels that is found, and what is proven of it. */

import { boundOf, fillable } from './spools-bounds.ts';
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

/** Steps of the search for one wire: counted, not timed, so that the plan is the same on every machine. About 0.2 s. */
const STEPS = 2_000_000;

/**
 * A good cutting by rules of thumb, proven by its bound, or by the search of all others as far as `steps` of it reach.
 * @param problem with lengths of which one at least is cut; no reels are needed
 */
export function cutting(problem: Cutting, steps = STEPS): Found {
  const full = fillable(problem);
  const fit = fitted(problem, full);
  const fitScore = scoreOf(problem, fit);
  const fitBound = boundOf(problem, full, fitScore);
  if (compareScores(fitScore, fitBound) <= 0) return { cuts: fit, exact: true, bound: fitBound };
  const { cuts, complete } = branchAndBound(problem, full, fit, steps);
  const score = scoreOf(problem, cuts);
  if (complete) return { cuts, exact: true, bound: score };
  const bound = boundOf(problem, full, score);
  return { cuts, exact: compareScores(score, bound) <= 0, bound };
}
