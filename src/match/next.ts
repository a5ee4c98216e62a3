/** Which one further measurement would narrow the widest limit of a tap most, each at its usual uncertainty. */

import { lengthText } from '../quantity/format.ts';
import { nameOf } from './contradictions.ts';
import { figure, quantile, type Solved, type Spread, spreadsOf } from './figures.ts';
import { dot, solveWith } from './linear.ts';
import type { Row } from './problem.ts';
import { isTextile, SIGMA, tapKey } from './problem.ts';
import { placesIn, type State } from './state.ts';
import type { NextMeasurement } from './types.ts';
import { INDUCTANCE_FLOOR_UH, RESISTANCE_FLOOR_OHM } from './uncertainty.ts';

interface Possible {
  readonly key: string;
  readonly text: string;
  readonly row: Row;
  /** Half width; null: a count, exact. */
  readonly half: number | null;
}

/** What was not measured yet, and could be. */
function possible({ problem, state }: Solved): Possible[] {
  const { old, known, shape } = problem;
  const at = placesIn(shape);
  const list: Possible[] = [];
  const add = (
    key: string,
    text: string,
    half: number | null,
    predict: (state: State) => number,
    tap: number | null = null,
    electrical = false,
  ) => list.push({ key, text, half, row: figure(predict, tap, electrical) });
  const { measures } = state;
  const last = known.length - 1;
  add(
    'old.former-diameter',
    `the diameter of the form to ± ${lengthText(0.2)}`,
    0.2,
    (s) => s.measures.meanMm - s.measures.overallMm,
  );
  add(
    'old.over-wire-circumference',
    `the circumference over the wire to ± ${lengthText(0.5)}`,
    0.5 / Math.PI,
    (s) => s.measures.meanMm + s.measures.overallMm,
  );
  if (old.wire.bareMm === null)
    add('old.wire.bare', `the bare wire to ± ${lengthText(0.01)}`, 0.01, (s) => s.measures.bareMm);
  if (old.wire.overallMm === null)
    add(
      'old.wire.overall',
      `the wire over its ${isTextile(problem.wire.covering) ? 'textile' : 'enamel'} to ± ${lengthText(0.01)}`,
      0.01,
      (s) => s.measures.overallMm,
    );
  if ((old.pitchMm === null || old.pitchMm === 'close') && old.sections.length === 0)
    add('old.pitch', 'the pitch over many turns to 1 %', 0.01 * measures.pitchMm[0]!, (s) => s.measures.pitchMm[0]!);
  if (old.windingLengthMm === null)
    add(
      'old.winding-length',
      `the length over the winding to ± ${lengthText(0.3)}`,
      0.3,
      (s) => s.placeMm(s.whole) + s.measures.overallMm,
      last,
    );
  if (old.wire.massG === null) {
    const grams = (s: State) => s.wireM(s.whole) * s.measures.bareMm ** 2 * (1 + s.x[at.length]!);
    add('old.wire.weight', 'the weight of the wire taken off to 2 %', 0.02 * grams(state), grams, last);
  }
  known.forEach(({ tap, index, exact }, t) => {
    const key = index === old.taps.length - 1 ? 'old.whole' : `old.${tapKey(old, index)}`;
    const name = nameOf(problem, index);
    const turn = state.turns[t]!;
    if (exact === null)
      add(t === last ? 'old.turns' : `${key}.turns`, `the turns of ${name}, counted`, null, (s) => s.turns[t]!, t);
    if (tap.positionMm === null && t !== last)
      add(`${key}.position`, `the place of ${name} to ± ${lengthText(0.3)}`, 0.3, (s) => s.placeMm(s.turns[t]!), t);
    if (tap.inductance === null && tap.resonance === null) {
      const uh = state.inductanceUh(turn);
      add(
        `${key}.inductance`,
        `the inductance of ${name} at a low frequency, by a meter good to 1 %`,
        0.005 * uh + INDUCTANCE_FLOOR_UH,
        (s) => s.inductanceUh(s.turns[t]!) * (1 + s.x[at.meter]!),
        t,
        true,
      );
    }
    if (tap.resistanceOhm === null && t === last) {
      const ohm = state.resistanceOhm(turn);
      add(
        `${key}.resistance`,
        'the DC resistance of the whole coil to 1 %',
        0.01 * ohm + RESISTANCE_FLOOR_OHM,
        (s) => s.resistanceOhm(s.turns[t]!) * (1 + s.x[at.length]!),
        t,
      );
    }
  });
  return list;
}

/** Sets of whole turns that a look ahead needs; the rest weigh little. */
const LOOKED = 40;

/** Half of the 95 % limits over the value. */
function half(one: Spread, sigma2: number, weights: readonly number[]): number {
  const used = weights.slice(0, LOOKED);
  const sum = used.reduce((a, b) => a + b, 0);
  const mixture = {
    centres: one.shifts.slice(0, LOOKED),
    weights: used.map((weight) => weight / sum),
    sigma: Math.sqrt(Math.max(0, sigma2)),
  };
  return (quantile(mixture, 0.975) - quantile(mixture, 0.025)) / 2 / one.value;
}

/** Worth saying from a tenth of the limit on. */
const WORTH = 0.9;
const SHOWN = 4;

/** A lost tap whose limits, half over value, are these now, and what they would be with its place known. */
export interface LostWidth {
  readonly key: string;
  readonly name: string;
  readonly now: number;
  readonly then: number;
}

/**
 * `inductances` are the spreads of the inductance of each known tap. Where a lost tap is the widest of all, only a trace of it
 * helps.
 */
export function nextMeasurements(
  solved: Solved,
  inductances: readonly Spread[],
  lost: readonly LostWidth[] = [],
): NextMeasurement[] {
  const known = amongKnown(solved, inductances);
  const weights = solved.candidates.map((one) => one.weight);
  const widest = Math.max(...inductances.map((one) => half(one, one.sigma ** 2, weights)));
  const worst = [...lost].sort((a, b) => b.now - a.now)[0];
  if (worst === undefined || worst.now <= widest) return known;
  const others = Math.max(widest, worst.then, ...lost.filter((one) => one !== worst).map((one) => one.now));
  if (others >= WORTH * worst.now) return known;
  const text = `a trace of tap ${worst.name}, such as its hole: its place to ± ${lengthText(0.3)}`;
  return [{ key: worst.key, text, nowPercent: 100 * worst.now, thenPercent: 100 * others }, ...known].slice(0, SHOWN);
}

function amongKnown(solved: Solved, inductances: readonly Spread[]): NextMeasurement[] {
  const { linear, candidates, state } = solved;
  const weights = candidates.map((one) => one.weight);
  const now = Math.max(...inductances.map((one) => half(one, one.sigma ** 2, weights)));
  const list = possible(solved);
  const spreads = spreadsOf(
    solved,
    list.map(({ row }) => row),
  );
  const found = list.map(({ key, text, half: width, row }, i): NextMeasurement => {
    const by = spreads[i]!;
    const sigma = (width ?? 0) * SIGMA;
    const own = by.sigma ** 2 + sigma ** 2;
    const kept =
      width === null
        ? candidates.map(({ turns, weight }) =>
            Math.abs(turns[row.tap!]! - state.turns[row.tap!]!) < 1e-6 ? weight : 0,
          )
        : weights.map((weight, j) => weight * Math.exp(-(by.shifts[j]! ** 2) / (2 * own)));
    const solvedRow = width === null ? null : solveWith(linear.lower, by.slopes.x);
    const then = Math.max(
      ...inductances.map((one) => {
        const shared = solvedRow === null ? 0 : dot(one.slopes.x, solvedRow) ** 2 / own;
        return half(one, one.sigma ** 2 - shared, kept);
      }),
    );
    return { key, text, nowPercent: 100 * now, thenPercent: 100 * then };
  });
  return found
    .filter(({ nowPercent, thenPercent }) => thenPercent < WORTH * nowPercent)
    .sort((a, b) => a.thenPercent - b.thenPercent)
    .slice(0, SHOWN);
}
