/**
 * The inference of `match`, without I/O:
 *
 *     old coil ──> rows (problem) ──> start ──> real turns (fit) ──> whole turns ──> all else fitted anew ──┬──> figures, limits
 *        │             ▲                                                  ▲               │                 ├──> contradictions
 *        │             └────────── crowding, own capacitance (readings) ──┴───────────────┘                 ├──> lost taps (patterns)
 *        └──> too little, impossible: fault 3 (doubts)                                                      └──> what to measure next
 */
import { angleOf } from '../coil/layout.ts';
import { contradictionsIn, residualsOf, tested } from './contradictions.ts';
import { refuseImpossible, tooLittle, tooNearResonance } from './doubts.ts';
import { estimateOf, figure, type Mixture, quantile, type Solved, type Spread, spreadsOf } from './figures.ts';
import { jacobian, leastSquares, stateOf } from './fit.ts';
import { type LostWidth, nextMeasurements } from './next.ts';
import { type LostTap, lostTaps } from './patterns.ts';
import { boundsOf, type Problem, problemOf, type Row } from './problem.ts';
import { startOf } from './start.ts';
import type { State } from './state.ts';
import type { Estimate, InferredCoil, InferredTap, OldCoil } from './types.ts';
import { type Candidate, linearised, wholeTurns } from './whole-turns.ts';
import { workAnew } from './work-anew.ts';

export interface InferOptions {
  /** Readings that do not go with the others are left out of the fit instead of pulling at it. */
  readonly leaveOut?: boolean;
}

/** More than this of the weight on one number of turns settles it. */
const DETERMINED = 0.95;
/** Whole turns that are looked for again about the ones found before; two do mostly. */
const ROUNDS = 4;

/** The coil that fits; throws a Fault (exit 3) when there is too little to decide, or what there is cannot be. */
export function infer(old: OldCoil, options: InferOptions = {}): InferredCoil {
  const problem = problemOf(old);
  refuseImpossible(old);
  const { state: first, untold } = startOf(problem);
  if (untold.length > 0) throw tooLittle(problem, untold, null);
  const free = problem.known.flatMap(({ exact }, t) => (exact === null ? [t] : []));
  const bounds = boundsOf(problem, first.x, first.turns);
  let rows: readonly Row[] = [...problem.rows, ...bounds];
  // Without the coil's own capacitance a resonance would pull every turn.
  workAnew(problem, first);
  let solved = solve(problem, rows, first, free);
  const near = tooNearResonance(problem, solved.state);
  if (near !== null) throw near;
  const test = contradictionsIn(problem, rows, solved.state, free);
  if (options.leaveOut === true && test.contradictions.length > 0) {
    rows = test.kept;
    solved = solve(problem, rows, test.state, free);
  }
  const doubt = tooLittle(problem, [], solved);
  if (doubt !== null) throw doubt;
  return described(solved, rows, test.contradictions);
}

function solve(problem: Problem, rows: readonly Row[], from: State, free: readonly number[]): Solved {
  let state = leastSquares(problem, rows, from, free).state;
  let candidates: Candidate[] = [{ turns: state.turns, weight: 1 }];
  for (let round = 0; round < ROUNDS; round++) {
    const before = state.turns;
    const slopes = jacobian(problem, rows, state);
    const linear = linearised(rows, slopes, free);
    const found = linear === null ? [] : wholeTurns(problem, linear, state);
    if (found.length > 0) candidates = found;
    const turns = found[0]?.turns ?? state.turns;
    workAnew(problem, stateOf(problem, state.x, turns));
    state = leastSquares(problem, rows, stateOf(problem, state.x, turns), []).state;
    const same = round > 0 && turns.every((turn, t) => Math.abs(turn - before[t]!) < 1e-6);
    if (same) break;
  }
  const slopes = jacobian(problem, rows, state);
  const linear = linearised(rows, slopes, free);
  if (linear === null) throw tooLittle(problem, [], null);
  const found = wholeTurns(problem, linear, state);
  if (found.length > 0) candidates = found;
  // The fit stands at the likeliest; should the last look prefer a neighbour, all follows it.
  const best = candidates[0]!.turns;
  if (best.some((turn, t) => Math.abs(turn - state.turns[t]!) > 1e-6)) {
    state = leastSquares(problem, rows, stateOf(problem, state.x, best), []).state;
    return { problem, state, linear: linearised(rows, jacobian(problem, rows, state), free) ?? linear, candidates };
  }
  return { problem, state, linear, candidates };
}

/** Weights of each number of turns of a known tap, the likeliest first. */
function marginal(candidates: readonly Candidate[], t: number): { turn: number; weight: number }[] {
  const weights = new Map<number, number>();
  for (const { turns, weight } of candidates) {
    const turn = Number(turns[t]!.toFixed(6));
    weights.set(turn, (weights.get(turn) ?? 0) + weight);
  }
  return [...weights].map(([turn, weight]) => ({ turn, weight })).sort((a, b) => b.weight - a.weight);
}

const LISTED = 0.005;

function described(solved: Solved, rows: readonly Row[], contradictions: InferredCoil['contradictions']): InferredCoil {
  const { problem, state, candidates } = solved;
  const { old, known } = problem;
  const lost = lostOf(solved);
  const inductances = spreadsOf(
    solved,
    known.map((_, t) => figure((s) => s.inductanceUh(s.turns[t]!), t, true)),
  );
  const places = spreadsOf(
    solved,
    known.map((_, t) => figure((s) => s.placeMm(s.turns[t]!), t)),
  );
  const byIndex = new Map<number, InferredTap>();
  known.forEach(({ index, exact, tap }, t) => {
    const list = marginal(candidates, t);
    const shown = list.filter(({ weight }) => weight >= LISTED);
    const turn = state.turns[t]!;
    byIndex.set(index, {
      name: tap.name,
      by: exact === null ? 'inferred' : 'counted',
      turn,
      determined: (list.find((one) => Math.abs(one.turn - turn) < 1e-6)?.weight ?? 0) > DETERMINED,
      candidates: shown,
      positionMm: estimateOf(places[t]!, candidates, false),
      angleDeg: angleOf(turn, old.hand),
      inductanceUh: estimateOf(inductances[t]!, candidates),
    });
  });
  for (const one of lost) byIndex.set(one.index, proposedTap(solved, one));
  const taps = old.taps.map((_, index) => byIndex.get(index)!);
  const measures = measuresOf(solved);
  const all = tested(problem, rows, state);
  const measured = all.filter(({ row }) => !row.bound && !row.granted);
  const chiSquare = rows.reduce(
    (sum, row) => sum + (row.bound ? 0 : ((row.predict(state) - row.value) / row.sigma) ** 2),
    0,
  );
  const freedom = rows.filter((row) => !row.bound).length - state.x.length - solved.linear.free.length;
  return {
    ...measures,
    taps,
    wire: { ...problem.wire, ...inferredWire(measures) },
    sectionTurns: state.ends.map((end, s) => end - (s === 0 ? 0 : state.ends[s - 1]!)),
    turnPositionsMm: Array.from(withLost(solved, taps).places),
    fit: measured.length === 0 || freedom <= 0 ? null : { chiSquare, freedom },
    residuals: residualsOf(all),
    contradictions,
    proposals: lost.flatMap(({ proposals }) => proposals),
    next: nextMeasurements(solved, inductances, lostWidths(solved, lost, byIndex)),
    assumed: problem.assumed,
  };
}

/** Place of a trace, mm, half width. */
const TRACE_MM = 0.3;

function lostWidths({ state }: Solved, lost: readonly LostTap[], taps: ReadonlyMap<number, InferredTap>): LostWidth[] {
  return lost.map(({ index, name }) => {
    const { turn, inductanceUh } = taps.get(index)!;
    const turns = TRACE_MM / (state.placeMm(turn + 0.5) - state.placeMm(turn - 0.5));
    // Within less than half a turn a place settles the turn.
    const then = turns < 0.5 ? 0 : (turns * state.perTurnUh(turn)) / inductanceUh.value;
    return {
      key: `old.taps[${index + 1}].position`,
      name,
      now: (inductanceUh.high - inductanceUh.low) / 2 / inductanceUh.value,
      then,
    };
  });
}

type Measured = Pick<
  InferredCoil,
  | 'meanDiameterMm'
  | 'formerDiameterMm'
  | 'bareMm'
  | 'overallMm'
  | 'pitchMm'
  | 'sectionGapMm'
  | 'tapGapMm'
  | 'windingLengthMm'
  | 'wireLengthM'
>;

function measuresOf(solved: Solved): Measured {
  const { state, candidates } = solved;
  const { sections } = state.shape;
  const of = [
    figure((s) => s.measures.meanMm),
    figure((s) => s.measures.meanMm - s.measures.overallMm),
    figure((s) => s.measures.bareMm),
    figure((s) => s.measures.overallMm),
    figure((s) => s.placeMm(s.whole) + s.measures.overallMm),
    figure((s) => s.wireM(s.whole)),
    figure((s) => s.measures.tapGapMm),
    ...Array.from({ length: sections }, (_, i) => figure((s) => s.measures.pitchMm[i]!)),
    ...Array.from({ length: sections - 1 }, (_, i) => figure((s) => s.measures.sectionGapMm[i]!)),
  ];
  const spreads: readonly Spread[] = spreadsOf(solved, of);
  const at = (i: number): Estimate => estimateOf(spreads[i]!, candidates, i !== 6 && i < 7 + sections);
  return {
    meanDiameterMm: at(0),
    formerDiameterMm: at(1),
    bareMm: at(2),
    overallMm: at(3),
    windingLengthMm: at(4),
    wireLengthM: at(5),
    tapGapMm: at(6),
    pitchMm: Array.from({ length: sections }, (_, i) => at(7 + i)),
    sectionGapMm: Array.from({ length: sections - 1 }, (_, i) => at(7 + sections + i)),
  };
}

function inferredWire({ bareMm, overallMm }: Measured) {
  return {
    bareMm: bareMm.value,
    bareLowMm: bareMm.low,
    bareHighMm: bareMm.high,
    overallMm: overallMm.value,
    overallLowMm: overallMm.low,
    overallHighMm: overallMm.high,
  };
}

function lostOf({ problem, state }: Solved): LostTap[] {
  const { old, known } = problem;
  const told = new Set(known.map(({ index }) => index));
  const lost = old.taps.flatMap(({ name }, index) => (told.has(index) ? [] : [{ index, name }]));
  if (lost.length === 0) return [];
  const found = lostTaps(
    lost,
    known.map(({ index }, t) => ({ index, turn: state.turns[t]! })),
  );
  const none = found.filter(({ candidates }) => candidates.length === 0);
  if (none.length > 0) throw tooLittle(problem, [], null, none);
  return found;
}

/** A lost tap: its turns are those of the patterns, its figures those of the coil at them. */
function proposedTap(solved: Solved, { name, candidates }: LostTap): InferredTap {
  const { state, problem } = solved;
  const turn = candidates[0]!.turn;
  const [inductance, place] = spreadsOf(solved, [
    figure((s) => s.inductanceUh(turn), null, true),
    figure((s) => s.placeMm(turn)),
  ]) as [Spread, Spread];
  const weights = candidates.map(({ weight }) => weight);
  const sigma = (one: Spread, shifts: readonly number[]) =>
    Math.hypot(
      one.sigma,
      spreadOver(
        solved.candidates.map((c) => c.weight),
        shifts,
      ),
    );
  const mixed = (one: Spread, at: (turn: number) => number, relative: boolean): Estimate => {
    const value = at(turn);
    const scale = relative ? value : 1;
    const centres = candidates.map((c) => (relative ? Math.log(at(c.turn) / value) : at(c.turn)));
    const mixture: Mixture = { centres, weights, sigma: sigma(one, one.shifts) / scale };
    const limit = (share: number) => (relative ? value * Math.exp(quantile(mixture, share)) : quantile(mixture, share));
    return { value, low: limit(0.025), high: limit(0.975) };
  };
  return {
    name,
    by: 'proposed',
    turn,
    determined: candidates[0]!.weight > DETERMINED,
    candidates: candidates.filter(({ weight }) => weight >= LISTED),
    positionMm: mixed(place, (t) => state.placeMm(t), false),
    angleDeg: angleOf(turn, problem.old.hand),
    inductanceUh: mixed(inductance, (t) => state.inductanceUh(t), true),
  };
}

function spreadOver(weights: readonly number[], shifts: readonly number[]): number {
  const mean = weights.reduce((sum, w, i) => sum + w * shifts[i]!, 0);
  return Math.sqrt(weights.reduce((sum, w, i) => sum + w * (shifts[i]! - mean) ** 2, 0));
}

/** The likeliest coil, its finish where it is. */
function withLost({ state }: Solved, taps: readonly InferredTap[]) {
  return state.coilOf(taps[taps.length - 1]!.turn);
}
