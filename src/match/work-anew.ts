/** What electrical readings need of the coil at work, worked out anew once its unknowns have moved. */
import { Coil } from '../coil/coil.ts';
import { WorkingCoil } from '../coil/working-coil.ts';
import { stateOf } from './fit.ts';
import type { Problem, Row } from './problem.ts';
import { crowdedAt, ownPfAt } from './readings.ts';
import type { State } from './state.ts';

/** Turns of a fit that has not settled may overlap; for the field they lie clear of one another by this part of the wire. */
const CLEAR = 1.01;

function clearOf(coil: Coil): Coil {
  const least = CLEAR * coil.shape.wire.bareMm;
  const places = Float64Array.from(coil.places);
  let moved = false;
  for (let i = 1; i < places.length; i++)
    if (places[i]! - places[i - 1]! < least) {
      places[i] = places[i - 1]! + least;
      moved = true;
    }
  return moved ? new Coil(coil.shape, places) : coil;
}

/** Crowding takes a few percent of an inductance and hardly changes with the turns: within this part of them it is kept. */
const SAME = 0.03;
/** From this share of the tuning capacitance on, how the coil's own changes with the turns is looked at. */
const COUNTS = 0.1;

/** Crowding and own capacitance of every tap with an electrical reading, and what both leave in doubt, at these values. */
export function workAnew(problem: Problem, state: State): void {
  const electrical = problem.rows.filter((row) => row.electrical);
  if (electrical.length === 0) return;
  const coil = clearOf(state.coilOf(Math.max(...state.turns)));
  const around = { leadPf: 0, earthed: problem.old.earthed, celsius: problem.old.celsius };
  const workingWith = (turns: readonly number[]) =>
    new WorkingCoil(
      coil,
      [...new Set(turns)].sort((a, b) => a - b),
      around,
    );
  const working = workingWith(state.turns);
  for (const row of electrical) {
    const { inductance, resonance } = problem.known[row.tap!]!.tap;
    const turn = state.turns[row.tap!]!;
    const [kHz, capacitorPf] =
      row.unit === 'kHz' ? [resonance!.kHz.value, resonance!.capacitorPf.value] : [inductance!.kHz, undefined];
    const ownPf = ownPfAt(working, turn, kHz, capacitorPf);
    const selfPf = coil.selfPf(turn);
    const pf = capacitorPf ?? 1e18 / ((2e3 * Math.PI * kHz) ** 2 * coil.inductanceUh(turn));
    let power = 0;
    if (ownPf > COUNTS * pf && ownPf > USUAL * selfPf) {
      const next = turn + 1 < coil.turns ? turn + 1 : turn - 1;
      const others = state.turns.filter((_, t) => t !== row.tap);
      const there = ownPfAt(workingWith([...others, next]), next, kHz, capacitorPf);
      if (there > 0) power = -Math.log(there / ownPf) / Math.log(next / turn);
    }
    const before = problem.atWork.get(row.key);
    const crowded =
      before !== undefined && Math.abs(before.crowdedTurn / turn - 1) < SAME
        ? { crowded: before.crowded, crowdedTurn: before.crowdedTurn }
        : { crowded: crowdedAt(working, turn, kHz), crowdedTurn: turn };
    problem.atWork.set(row.key, { ...crowded, ownPf, turn, power });
    problem.doubt.set(row.key, doubtOf(problem, row, state, selfPf));
  }
}

/**
 * Capacitance that a coil adds to a tap is a few times that of the tap alone. Near a resonance of the dead turns it is far more, and
 * hangs on what nobody measures: what it has beyond this many times is in doubt by this part.
 */
const USUAL = 3;
const DOUBTED = 0.1;

/** By how much a reading may be off because of the tap's angle and of dead turns near their resonance: a standard deviation. */
function doubtOf(problem: Problem, row: Row, state: State, selfPf: number): number {
  const base = row.predict(state);
  const { angleSigma } = problem.known[row.tap!]!;
  let variance = 0;
  if (angleSigma > 0) {
    const turns = state.turns.map((turn, t) => (t === row.tap ? turn + angleSigma : turn));
    variance += (row.predict(stateOf(problem, state.x, turns)) - base) ** 2;
  }
  const work = problem.atWork.get(row.key)!;
  const excess = Math.abs(work.ownPf - selfPf) - (USUAL - 1) * selfPf;
  if (excess > 0) {
    problem.atWork.set(row.key, { ...work, ownPf: work.ownPf + DOUBTED * excess });
    variance += (row.predict(state) - base) ** 2;
    problem.atWork.set(row.key, work);
  }
  return Math.sqrt(variance);
}
