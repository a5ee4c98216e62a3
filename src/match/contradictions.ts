/**
 * Readings that do not go with the others: the residual of each over its own standard deviation (Baarda 1968), the worst first, and what
 * the rest say once it is left out.
 */

import { lengthText, tidy } from '../quantity/format.ts';
import { jacobian, leastSquares, residuals, stateOf } from './fit.ts';
import { varianceBy } from './linear.ts';
import { boundsOf, type Problem, type Row, tapKey } from './problem.ts';
import type { State } from './state.ts';
import type { Contradiction, Residual } from './types.ts';
import { linearised } from './whole-turns.ts';

/** A reading farther off than this does not go with the others; of 30 good readings one in seventy does so by chance. */
export const FAR = 3.5;
/** So little redundancy tells nothing: the reading itself decides its figure. */
const LEAST_FREE = 0.02;

export interface Tested {
  readonly row: Row;
  /** Signed. */
  readonly sigmas: number;
  readonly fitted: number;
}

/** Every row against the fit, in standard deviations of its residual. */
export function tested(problem: Problem, rows: readonly Row[], state: State): Tested[] {
  const slopes = jacobian(problem, rows, state);
  const linear = linearised(rows, slopes, []);
  const left = residuals(rows, state);
  return rows.map((row, i) => {
    const explained = linear === null ? 0 : varianceBy(linear.lower, slopes.x[i]!);
    const free = 1 - explained;
    const sigmas = free < LEAST_FREE ? 0 : left[i]! / Math.sqrt(free);
    return { row, sigmas, fitted: row.predict(state) };
  });
}

export function residualsOf(all: readonly Tested[]): Residual[] {
  return all
    .filter(({ row }) => !row.bound && !row.granted)
    .map(({ row, sigmas, fitted }) => ({ key: row.key, measured: row.value, fitted, unit: row.unit, sigmas }));
}

/** Contradictions, the worst first; each is left out before the next is looked for. `kept` are the rows that go together. */
export function contradictionsIn(
  problem: Problem,
  rows: readonly Row[],
  state: State,
  free: readonly number[],
): { contradictions: Contradiction[]; kept: readonly Row[]; state: State } {
  let kept = rows;
  let current = state;
  const contradictions: Contradiction[] = [];
  while (contradictions.length < 6) {
    const worst = tested(problem, kept, current)
      .filter(({ row }) => !row.bound && !row.granted)
      .sort((a, b) => Math.abs(b.sigmas) - Math.abs(a.sigmas))[0];
    if (worst === undefined || Math.abs(worst.sigmas) < FAR) break;
    kept = kept.filter((row) => row !== worst.row);
    const told = free.filter((t) => kept.some((row) => row.tap === t && !row.bound));
    const next = leastSquares(problem, [...kept, ...boundsOf(problem, current.x, current.turns)], current, []).state;
    const expected = worst.row.predict(next);
    contradictions.push(contradictionOf(problem, worst, expected, next, told));
    current = stateOf(problem, next.x, next.turns);
  }
  return { contradictions, kept, state: current };
}

function contradictionOf(
  problem: Problem,
  { row, sigmas }: Tested,
  expected: number,
  state: State,
  told: readonly number[],
): Contradiction {
  const number = row.tap === null ? null : problem.known[row.tap]!;
  const name = number === null ? null : nameOf(problem, number.index);
  const show = (value: number) => (row.unit === 'mm' ? lengthText(value, 3) : `${tidy(value, 4)} ${row.unit}`);
  const counted = number !== null && row.tap !== null && !told.includes(row.tap) && number.exact !== null;
  const turn = row.tap === null ? 0 : state.turns[row.tap]!;
  let text = `${name === null ? row.key : `${name}: ${row.key.split('.').at(-1)?.replaceAll('-', ' ')}`} ${show(row.value)} does not go with the others, by which it is ${show(expected)}`;
  if (counted && row.key.endsWith('.position')) {
    const pitch = expected / turn;
    text = `${name}: ${tidy(turn)} turns do not fit ${show(row.value)} at the pitch of the others, ${lengthText(pitch, 3)}: they would lie at ${show(expected)}; ${show(row.value)} is ${tidy(row.value / pitch, 4)} turns`;
  } else if (counted)
    text = `${name}: ${tidy(turn)} turns do not fit ${show(row.value)}; by the others they would show ${show(expected)}`;
  return { key: row.key, text, sigmas, got: row.value, expected, unit: row.unit };
}

export const nameOf = (problem: Problem, index: number): string =>
  tapKey(problem.old, index) === 'whole' ? 'the whole coil' : `tap ${problem.old.taps[index]!.name}`;
