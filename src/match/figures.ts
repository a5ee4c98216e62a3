/** Figures of an inferred coil with their 95 % limits, from the fit and from every set of whole turns that fits. */
import { type Jacobian, jacobian } from './fit.ts';
import { dot, varianceBy } from './linear.ts';
import type { Problem, Row } from './problem.ts';
import type { State } from './state.ts';
import type { Estimate } from './types.ts';
import { type Candidate, type Linear, shiftOf } from './whole-turns.ts';

/** A figure as a row without a reading, so that its slopes come about as those of the readings do. */
export function figure(predict: (state: State) => number, tap: number | null = null, electrical = false): Row {
  return { key: '', unit: '', value: 0, sigma: 1, electrical, granted: true, bound: false, tap, predict };
}

/** Normal distributions and their shares. */
export interface Mixture {
  readonly centres: readonly number[];
  readonly weights: readonly number[];
  readonly sigma: number;
}

/** Probability that a standard normal value is below x (Abramowitz & Stegun 7.1.26, 1.5e-7). */
export function below(x: number): number {
  const t = 1 / (1 + (0.3275911 * Math.abs(x)) / Math.SQRT2);
  const tail =
    ((((1.061405429 * t - 1.453152027) * t + 1.421413741) * t - 0.284496736) * t + 0.254829592) *
    t *
    Math.exp((-x * x) / 2);
  return x >= 0 ? 1 - tail / 2 : tail / 2;
}

export function quantile({ centres, weights, sigma }: Mixture, share: number): number {
  const width = 8 * sigma + 1e-12;
  let low = Math.min(...centres) - width;
  let high = Math.max(...centres) + width;
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    let sum = 0;
    for (let i = 0; i < centres.length; i++)
      sum += weights[i]! * below((middle - centres[i]!) / Math.max(sigma, 1e-12));
    if (sum < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

export interface Solved {
  readonly problem: Problem;
  readonly state: State;
  readonly linear: Linear;
  readonly candidates: readonly Candidate[];
}

/** What a row's value becomes with another set of whole turns, all else following, and its slopes over the other unknowns. */
function shifts(slopes: { x: Float64Array; turns: Float64Array }, solved: Solved): number[] {
  const { state, linear, candidates } = solved;
  return candidates.map(({ turns }) => {
    const others = shiftOf(linear, state.turns, turns);
    let by = linear.free.length === 0 ? 0 : dot(slopes.x, others);
    for (const t of linear.free) by += slopes.turns[t]! * (turns[t]! - state.turns[t]!);
    return by;
  });
}

/** Angles of taps are spread that no other reading narrows: what they do to a row. */
export function angleVariance({ problem }: Solved, turns: Float64Array): number {
  return problem.known.reduce((sum, { angleSigma }, t) => sum + (angleSigma * turns[t]!) ** 2, 0);
}

export interface Spread {
  readonly value: number;
  /** Standard deviation with the likeliest turns. */
  readonly sigma: number;
  /** Of the figure with each set of whole turns, about the value. */
  readonly shifts: readonly number[];
  /** Slopes over the unknowns and over turns. */
  readonly slopes: { readonly x: Float64Array; readonly turns: Float64Array };
}

export function spreadsOf(solved: Solved, figures: readonly Row[]): Spread[] {
  const { problem, state, linear } = solved;
  const slopes: Jacobian = jacobian(problem, figures, state);
  return figures.map((row, i) => {
    const own = { x: slopes.x[i]!, turns: slopes.turns[i]! };
    const variance = varianceBy(linear.lower, own.x) + angleVariance(solved, own.turns);
    return { value: row.predict(state), sigma: Math.sqrt(variance), shifts: shifts(own, solved), slopes: own };
  });
}

/** 95 % limits; of what cannot be negative in ratio, so that they stay above 0. */
export function estimateOf(
  { value, sigma, shifts }: Spread,
  candidates: readonly Candidate[],
  positive = true,
): Estimate {
  const weights = candidates.map((one) => one.weight);
  if (!positive || value <= 0) {
    const mixture = { centres: shifts.map((by) => value + by), weights, sigma };
    return { value, low: quantile(mixture, 0.025), high: quantile(mixture, 0.975) };
  }
  const mixture = { centres: shifts.map((by) => by / value), weights, sigma: sigma / value };
  return {
    value,
    low: value * Math.exp(quantile(mixture, 0.025)),
    high: value * Math.exp(quantile(mixture, 0.975)),
  };
}
