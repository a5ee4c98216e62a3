/**
 * Which whole turns fit: the real-valued solution and how its chi-square rises around it decide how much weight every set of
 * whole turns has. All other unknowns follow the turns, so the rise is that of the turns with the rest fitted anew, to first order
 * (integer least squares as for the cycles of a carrier phase: Teunissen 1995).
 */
import { type Jacobian, residuals } from './fit.ts';
import { cholesky, dot, gram, type Matrix, solveWith, zeros } from './linear.ts';
import type { Problem, Row } from './problem.ts';
import type { State } from './state.ts';

/** One set of whole turns that fits. */
export interface Candidate {
  /** Of all known taps. */
  readonly turns: readonly number[];
  readonly weight: number;
}

/** How everything follows when turns change, about one state. */
export interface Linear {
  readonly rows: readonly Row[];
  readonly slopes: Jacobian;
  /** Known taps whose turns are not counted. */
  readonly free: readonly number[];
  /** Of J'J over the other unknowns. */
  readonly lower: Matrix;
  /** For each free tap, how the other unknowns follow a turn more. */
  readonly follow: readonly Float64Array[];
}

export function linearised(rows: readonly Row[], slopes: Jacobian, free: readonly number[]): Linear | null {
  const count = slopes.x[0]!.length;
  const lower = cholesky(gram(slopes.x, count));
  if (lower === null) return null;
  const follow = free.map((t) => {
    const pull = new Float64Array(count);
    rows.forEach((_, i) => {
      const slope = slopes.turns[i]![t]!;
      if (slope !== 0) for (let k = 0; k < count; k++) pull[k]! -= slopes.x[i]![k]! * slope;
    });
    return solveWith(lower, pull);
  });
  return { rows, slopes, free, lower, follow };
}

/** Weights below this part of the greatest are not listed: chi-square above by 18. */
const RISE = 18;
const MOST = 1500;
const NODES = 60_000;
const SAMPLES = 1500;

/** The sets of whole turns that fit, the likeliest first, weights adding to 1; empty when none rises. */
export function wholeTurns(problem: Problem, linear: Linear, state: State): Candidate[] {
  const { rows, slopes, free, follow } = linear;
  const n = free.length;
  if (n === 0) return [{ turns: state.turns, weight: 1 }];
  const left = residuals(rows, state);
  // Rows as functions of the free turns alone, the rest following.
  const count = slopes.x[0]!.length;
  const total = rows.map((_, i) =>
    Float64Array.from(free, (t, j) => slopes.turns[i]![t]! + dot(slopes.x[i]!, follow[j]!)),
  );
  const rest = solveWith(linear.lower, negatedPull(slopes.x, left, count));
  const settled = left.map((value, i) => value + dot(slopes.x[i]!, rest));
  const rise = gram(total, n);
  const lower = cholesky(rise);
  if (lower === null) return [];
  const b = new Float64Array(n);
  total.forEach((row, i) => {
    for (let j = 0; j < n; j++) b[j]! -= row[j]! * settled[i]!;
  });
  const best = solveWith(lower, b);
  const at = free.map((t, j) => state.turns[t]! + best[j]!);
  const fractions = free.map((t) => problem.known[t]!.fraction);
  const search = { n, upper: transposed(lower), at, fractions };
  const found = enumerate(search) ?? sample(search);
  const ordered = found
    .map(({ turns, rise: above }) => {
      const all = [...state.turns];
      free.forEach((t, j) => {
        all[t] = turns[j]!;
      });
      return { turns: all, rise: above };
    })
    .filter(({ turns }) => turns.every((turn, i) => turn > 0.2 && (i === 0 || turn > turns[i - 1]! + 1e-6)));
  if (ordered.length === 0) return [];
  const least = Math.min(...ordered.map((one) => one.rise));
  const weights = ordered.map((one) => Math.exp(-(one.rise - least) / 2));
  const sum = weights.reduce((a, w) => a + w, 0);
  return ordered.map(({ turns }, i) => ({ turns, weight: weights[i]! / sum })).sort((a, b) => b.weight - a.weight);
}

function negatedPull(x: Matrix, left: Float64Array, count: number): Float64Array {
  const pull = new Float64Array(count);
  x.forEach((row, i) => {
    for (let k = 0; k < count; k++) pull[k]! -= row[k]! * left[i]!;
  });
  return pull;
}

function transposed(lower: Matrix): Float64Array[] {
  const n = lower.length;
  const upper = zeros(n, n);
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) upper[j]![i] = lower[i]![j]!;
  return upper;
}

interface Search {
  readonly n: number;
  readonly upper: Matrix;
  /** Where the real-valued solution lies. */
  readonly at: readonly number[];
  readonly fractions: readonly number[];
}

interface Fitting {
  readonly turns: readonly number[];
  readonly rise: number;
}

/** Where turn j should be, given those behind it, and its stiffness. */
function centre({ n, upper, at }: Search, turns: readonly number[], j: number): { centre: number; stiff: number } {
  const stiff = upper[j]![j]!;
  let pull = 0;
  for (let k = j + 1; k < n; k++) pull += upper[j]![k]! * (turns[k]! - at[k]!);
  return { centre: at[j]! - pull / stiff, stiff };
}

/** All whole turns within the rise of the best; null when they are too many to list. */
function enumerate(search: Search): Fitting[] | null {
  const { n, fractions } = search;
  let limit = Number.POSITIVE_INFINITY;
  let nodes = 0;
  const found: Fitting[] = [];
  const turns = new Array<number>(n).fill(0);
  let tooMany = false;
  const visit = (j: number, rise: number) => {
    if (tooMany) return;
    if (j < 0) {
      found.push({ turns: [...turns], rise });
      limit = Math.min(limit, rise + RISE);
      if (found.length > 4 * MOST) tooMany = true;
      return;
    }
    const { centre: middle, stiff } = centre(search, turns, j);
    const f = fractions[j]!;
    const nearest = Math.round(middle - f);
    const side = middle - f >= nearest ? 1 : -1;
    for (let k = 0; ; k++) {
      // Outwards from the middle: 0, +1, -1, +2, -2 ... on the side that is nearer first.
      const offset = k === 0 ? 0 : (k % 2 === 1 ? 1 : -1) * side * Math.ceil(k / 2);
      const turn = nearest + offset + f;
      const more = rise + (stiff * (turn - middle)) ** 2;
      if (more > limit) break;
      if (++nodes > NODES) {
        tooMany = true;
        return;
      }
      turns[j] = turn;
      visit(j - 1, more);
      if (tooMany) return;
    }
  };
  visit(n - 1, 0);
  if (tooMany) return null;
  const kept = found.filter(({ rise }) => rise <= limit);
  return kept.length > MOST ? null : kept;
}

/** A fixed sequence in [0, 1): the same coil has the same answer. */
function sequence(): () => number {
  let seed = 0x2545f491;
  return () => {
    seed = (Math.imul(seed ^ (seed >>> 15), 0x2c1b3c6d) + 0x9e3779b9) | 0;
    let mixed = seed;
    mixed = Math.imul(mixed ^ (mixed >>> 12), 0x297a2d39);
    return ((mixed ^ (mixed >>> 15)) >>> 0) / 2 ** 32;
  };
}

/** Whole turns drawn one behind the other, each given those behind it; the rise carries what the drawing left out. */
function sample(search: Search): Fitting[] {
  const { n, fractions } = search;
  const random = sequence();
  const drawn = new Map<string, Fitting & { count: number }>();
  for (let s = 0; s < SAMPLES; s++) {
    const turns = new Array<number>(n).fill(0);
    let logScale = 0;
    for (let j = n - 1; j >= 0; j--) {
      const { centre: middle, stiff } = centre(search, turns, j);
      const f = fractions[j]!;
      const reach = Math.ceil(6 / stiff) + 1;
      const first = Math.round(middle - f) - Math.min(reach, 200);
      const options = Array.from({ length: 2 * Math.min(reach, 200) + 1 }, (_, k) => first + k + f);
      const weights = options.map((turn) => Math.exp(-((stiff * (turn - middle)) ** 2) / 2));
      const sum = weights.reduce((a, w) => a + w, 0);
      let draw = random() * sum;
      let k = 0;
      while (k < options.length - 1 && draw > weights[k]!) draw -= weights[k++]!;
      turns[j] = options[k]!;
      logScale += Math.log(sum * stiff);
    }
    const key = turns.join(' ');
    const known = drawn.get(key);
    // Drawn with probability exp(-rise/2)/scale: its weight is the scale, once a draw.
    if (known === undefined) drawn.set(key, { turns, rise: -2 * logScale, count: 1 });
    else drawn.set(key, { ...known, count: known.count + 1 });
  }
  return [...drawn.values()].map(({ turns, rise, count }) => ({ turns, rise: rise - 2 * Math.log(count) }));
}

/** The others of a set follow a change of turns: their shift, to first order. */
export function shiftOf(linear: Linear, from: readonly number[], to: readonly number[]): Float64Array {
  const shift = new Float64Array(linear.follow[0]?.length ?? 0);
  linear.free.forEach((t, j) => {
    const by = to[t]! - from[t]!;
    if (by !== 0) for (let k = 0; k < shift.length; k++) shift[k]! += by * linear.follow[j]![k]!;
  });
  return shift;
}
