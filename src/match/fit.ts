/**
 * Weighted least squares by damped Gauss-Newton steps (Levenberg 1944, Marquardt 1963), derivatives by differences. Turns that
 * are not counted move as real numbers, or stand still at whole ones.
 */
import { cholesky, dot, gram, solveWith } from './linear.ts';
import type { Problem, Row } from './problem.ts';
import { placesIn, State, UNKNOWN } from './state.ts';

export interface Fit {
  readonly state: State;
  readonly chiSquare: number;
}

export function stateOf(problem: Problem, x: Float64Array, turns: readonly number[]): State {
  return new State(problem.shape, problem.ends, problem.wire, x, turns);
}

export const residuals = (rows: readonly Row[], state: State): Float64Array =>
  Float64Array.from(rows, (row) => (row.predict(state) - row.value) / row.sigma);

/** Rows over their unknowns, and over the turns of the known taps, in standard deviations. */
export interface Jacobian {
  readonly x: Float64Array[];
  readonly turns: Float64Array[];
}

/** What an unknown is moved by to see what follows. */
const stepOf = (value: number, k: number) => (k === UNKNOWN.tapGap ? 1e-3 : 1e-5 * Math.max(Math.abs(value), 0.1));

export function jacobian(problem: Problem, rows: readonly Row[], state: State): Jacobian {
  const base = rows.map((row) => row.predict(state));
  const { meter } = placesIn(problem.shape);
  const x = rows.map(() => new Float64Array(state.x.length));
  const turns = rows.map(() => new Float64Array(state.turns.length));
  const electrical = rows.some((row) => row.electrical);
  for (let k = 0; k < state.x.length; k++) {
    const moved = Float64Array.from(state.x);
    const step = stepOf(moved[k]!, k);
    moved[k]! += step;
    // What is only spread does not change the coil.
    const coil = k >= meter && electrical ? state.coil : null;
    const next = new State(problem.shape, problem.ends, problem.wire, moved, state.turns, coil);
    rows.forEach((row, i) => {
      x[i]![k] = (row.predict(next) - base[i]!) / step / row.sigma;
    });
  }
  for (let t = 0; t < state.turns.length; t++) {
    const step = 1e-3;
    const moved = state.turns.map((turn, i) => (i === t ? turn + step : turn));
    const next = new State(problem.shape, problem.ends, problem.wire, state.x, moved, electrical ? state.coil : null);
    // A whole turn either way: a part turn's own inductance bends.
    const wider = electrical ? turnsMoved(problem, state, t) : null;
    rows.forEach((row, i) => {
      if (!row.electrical) turns[i]![t] = (row.predict(next) - base[i]!) / step / row.sigma;
      else if (row.tap === t && wider !== null)
        turns[i]![t] = (row.predict(wider.up) - row.predict(wider.down)) / wider.by / row.sigma;
    });
  }
  return { x, turns };
}

function turnsMoved(problem: Problem, state: State, t: number) {
  const back = Math.min(1, state.turns[t]! / 2);
  const at = (by: number) =>
    new State(
      problem.shape,
      problem.ends,
      problem.wire,
      state.x,
      state.turns.map((turn, i) => (i === t ? turn + by : turn)),
      state.coil,
    );
  return { up: at(1), down: at(-back), by: 1 + back };
}

const square = (list: Float64Array) => dot(list, list);

/** Of a step, at most this part of a length or of turns at once. */
const LONGEST_STEP = 0.25;
const ROUNDS = 40;

/** Least squares from a state; `free` are the known taps whose turns move. */
export function leastSquares(problem: Problem, rows: readonly Row[], from: State, free: readonly number[]): Fit {
  let state = from;
  let left = residuals(rows, state);
  let chi = square(left);
  let damping = 1e-6;
  const count = state.x.length;
  for (let round = 0; round < ROUNDS; round++) {
    const slopes = jacobian(problem, rows, state);
    const all = rows.map((_, i) => Float64Array.from([...slopes.x[i]!, ...free.map((t) => slopes.turns[i]![t]!)]));
    const a = gram(all, count + free.length);
    const b = new Float64Array(count + free.length);
    all.forEach((row, i) => {
      for (let k = 0; k < b.length; k++) b[k]! -= row[k]! * left[i]!;
    });
    let gained = 0;
    for (let trial = 0; trial < 8; trial++) {
      const damped = a.map((row, i) => row.map((value, j) => (i === j ? value * (1 + damping) + 1e-12 : value)));
      const lower = cholesky(damped);
      if (lower === null) {
        damping = Math.max(damping * 100, 1e-4);
        continue;
      }
      const next = moved(problem, state, solveWith(lower, b), free);
      const nextLeft = residuals(rows, next);
      const nextChi = square(nextLeft);
      if (nextChi <= chi || !Number.isFinite(chi)) {
        gained = chi - nextChi;
        [state, left, chi] = [next, nextLeft, nextChi];
        damping = Math.max(damping / 10, 1e-9);
        break;
      }
      damping = Math.max(damping * 10, 1e-6);
    }
    if (gained < 1e-7 * (1 + chi)) break;
  }
  return { state, chiSquare: chi };
}

function moved(problem: Problem, state: State, step: Float64Array, free: readonly number[]): State {
  const count = state.x.length;
  const { meter } = placesIn(problem.shape);
  let share = 1;
  for (let k = 0; k < meter; k++) {
    if (k === UNKNOWN.tapGap || k >= UNKNOWN.pitch + problem.shape.sections) continue;
    share = Math.min(share, (LONGEST_STEP * state.x[k]!) / Math.max(Math.abs(step[k]!), 1e-12));
  }
  free.forEach((t, i) => {
    share = Math.min(share, (LONGEST_STEP * state.turns[t]! + 0.5) / Math.max(Math.abs(step[count + i]!), 1e-12));
  });
  const x = state.x.map((value, k) => value + share * step[k]!);
  const turns = [...state.turns];
  free.forEach((t, i) => {
    turns[t] = Math.max(0.25, turns[t]! + share * step[count + i]!);
  });
  return stateOf(problem, x, turns);
}
