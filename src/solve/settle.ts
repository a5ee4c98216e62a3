/**
 * Turns, tap places, diameter and pitch of a candidate, settled together: taps push the turns after them aside, which
 * changes the inductance, which moves the taps. A few rounds bring it to rest.
 *
 * What is free takes up the last fraction so that the whole coil meets its inductance: the diameter inside the range of
 * the job, or the pitch of a groove (by a tenth of a layer at most, so that it still prints as whole layers), or the
 * angle of the finish hole. A bought tube wound in one line leaves nothing free.
 */
import { Coil } from '../coil/coil.ts';
import type { Gap } from '../coil/layout.ts';
import type { Job } from '../job/job.ts';
import type { Candidate } from './candidates.ts';
import { type CoilView, type Demand, fixedTurnsOf, setCapacitance, tapsBetween } from './demand.ts';
import { meanDiameterMm, roundDiameterMm, turnsFor } from './estimate.ts';
import { finishRow } from './former/finish-row.ts';
import { type NoPlace, type Placing, placeTaps, STAGGER_STEPS, stillClear } from './place-taps.ts';
import { cornersOn, ribFinishStep, ribSection } from './ribs.ts';
import type { TapLayout, TapMethod } from './tap-methods.ts';
import { placeBothSwitches } from './two-switches.ts';
import { actingSelfPf, type Section } from './working.ts';

/** `more` and `fewer`: the diameter or pitch follows the whole turns above or below instead of the nearest. */
export type Freedom = 'nearest' | 'more' | 'fewer' | 'finish angle' | 'none';

export interface Settled {
  readonly outsideMm: number;
  readonly pitchMm: number;
  readonly turns: number;
  /** Turns of the taps below the whole coil. */
  readonly taps: readonly number[];
  /** Turns of the taps of the units switch; empty for one switch. */
  readonly unitTaps: readonly number[];
}

export interface Setting {
  readonly job: Job;
  readonly demand: Demand;
  readonly candidate: Candidate;
  readonly method: TapMethod;
  readonly layout: TapLayout;
  readonly startMm: number;
  /** What the coupled circuit found over the estimate of a coil's own capacitance, pF, by turn; none before it was asked. */
  readonly correction?: readonly { readonly turn: number; readonly pf: number }[];
}

/** Largest change of a groove's pitch, as a part of a layer, that still prints as whole layers. */
const PITCH_PLAY_LAYERS = 0.1;
const ROUNDS = 18;
const TRIMS = 8;
/** Two places for a tap can call for one another without end; from this round on it stays where it was, if it may. */
const TAPS_STAY_FROM = 9;
/**
 * The finish hole of a printed former stands at whole degrees; of few turns a degree is too much, there at tenths. On ribs it stands
 * in one of them.
 */
const finishSteps = ({ job }: Setting, turns: number) => job.former.ribs ?? (turns < 10 ? 3600 : 360);

const roundTo = (value: number, steps: number) => Math.round(value * steps) / steps;

/** What may take up the fraction, the best first. */
export function freedomsOf(job: Job, candidate: Candidate): readonly Freedom[] {
  if (job.former.kind !== 'printed') return ['none'];
  const groove = candidate.pitch.kind === 'groove' && typeof job.winding.pitch !== 'number';
  // The turns of two switches are fixed: what the diameter or the pitch cannot take up is told.
  if (job.winding.units !== null) return hasDiameterRange(job) || groove ? ['nearest', 'none'] : ['none'];
  return hasDiameterRange(job) || groove ? ['nearest', 'more', 'fewer', 'finish angle'] : ['finish angle'];
}

/** The diameter may be chosen freely inside a range. */
export function hasDiameterRange(job: Job): boolean {
  const wanted = job.former.diametersMm;
  return 'lowMm' in wanted && wanted.highMm > wanted.lowMm;
}

export function coilOf(setting: Setting, state: Settled, turns: number): Coil {
  const { candidate, method } = setting;
  const gaps: Gap[] =
    method.gapMm > 0 ? [...state.unitTaps, ...state.taps].map((turn) => ({ turn, gapMm: method.gapMm })) : [];
  const meanMm = meanDiameterMm(setting.job, { ...candidate, formerMm: state.outsideMm });
  return new Coil({
    wire: candidate.wire,
    meanDiameterMm: meanMm,
    ...cornersOn(ribSection(setting.job, candidate.wire.overallMm, method), meanMm),
    pitchMm: state.pitchMm,
    turns,
    gaps,
    startMm: setting.startMm,
  });
}

function within(setting: Setting, state: Settled): boolean {
  const wanted = setting.job.former.diametersMm;
  const play = PITCH_PLAY_LAYERS * setting.job.printer.layerMm;
  if (Math.abs(state.pitchMm - setting.candidate.pitch.mm) > play) return false;
  if ('lowMm' in wanted && wanted.highMm > wanted.lowMm)
    return state.outsideMm >= wanted.lowMm - 1e-9 && state.outsideMm <= wanted.highMm + 1e-9;
  return true;
}

/** The section up to a turn of a coil of `turns` turns, for the estimate of its tuning. */
export function sectionAt(coil: Coil, turn: number, turns: number, taps: readonly number[]): Section {
  const used = Math.min(turn, turns);
  return {
    share: used / turns,
    usedUh: coil.nearUh(used),
    wholeUh: coil.nearUh(turns),
    // The dead turns by themselves: as many turns at the start, which lie alike but for the gaps.
    deadUh: used < turns ? coil.nearUh(turns - used) : 0,
    wholePf: coil.selfPf(turns),
    sectionPf: coil.selfPf(used),
    leads: [...taps, turns].map((tap) => tap / turns),
  };
}

function correctionAt({ correction }: Setting, turn: number): number {
  if (correction === undefined || correction.length === 0) return 0;
  const next = correction.findIndex((one) => one.turn >= turn);
  if (next < 0) return correction[correction.length - 1]!.pf;
  const [a, b] = [correction[next - 1], correction[next]!];
  if (a === undefined || b.turn - a.turn < 1e-9) return b.pf;
  return a.pf + ((b.pf - a.pf) * (turn - a.turn)) / (b.turn - a.turn);
}

/** The view of a coil that the demand asks; sections beyond the whole coil count as the whole coil. */
function viewOf(setting: Setting, coil: Coil, wholeUh: number, taps: readonly number[]): CoilView {
  const { job } = setting;
  const turns = Math.min(coil.nearTurn(wholeUh), coil.turns);
  return {
    selfPf: (uh) => {
      const turn = uh >= wholeUh ? turns : Math.min(coil.nearTurn(uh), turns);
      if (job.set === null) return coil.selfPf(turn);
      const { outPf } = setCapacitance(job.set);
      return actingSelfPf(job, sectionAt(coil, turn, turns, taps), outPf) + correctionAt(setting, turn);
    },
    at: (turn) => coil.inductanceUh(turn),
    turnFor: (uh) => coil.turnFor(uh),
  };
}

/** Inductance of the whole coil: its own capacitance and that of the leads decide for a band. */
function wholeTarget(setting: Setting, coil: Coil, taps: readonly number[]): number {
  const { demand } = setting;
  let wholeUh = demand.wholeUh(coil.selfPf(coil.turns));
  if (demand.kind === 'band')
    for (let k = 0; k < 3; k++) wholeUh = demand.wholeUh(viewOf(setting, coil, wholeUh, taps).selfPf(wholeUh));
  return wholeUh;
}

function wholeTurns(setting: Setting, freedom: Freedom, exact: number): number {
  const fixed = fixedTurnsOf(setting.demand);
  if (fixed !== null) return fixed;
  const fine = finishSteps(setting, exact);
  if (freedom === 'finish angle') return Math.max(1 / fine, roundTo(exact, fine));
  // A pitch is stretched by little: from rib to rib it has to make up less.
  const { ribs } = setting.job.former;
  if (freedom === 'nearest' && ribs !== null && !hasDiameterRange(setting.job))
    return Math.max(1, roundTo(exact, ribs));
  if (freedom === 'nearest') return Math.max(1, Math.round(exact));
  if (freedom === 'more') return Math.ceil(exact);
  if (freedom === 'fewer') return Math.max(1, Math.floor(exact));
  const steps = setting.layout === 'in line' ? 1 : STAGGER_STEPS;
  // On a tube that leaves nothing free a band is reached at its lower edge, so rather a little too much.
  if (setting.demand.kind === 'band') return Math.ceil(exact * steps - 1e-6) / steps;
  return Math.max(1 / steps, roundTo(exact, steps));
}

/**
 * The coil at rest; or the first tap that finds no place; or `no room` when this freedom cannot take up the fraction
 * inside what the job permits.
 */
export function settle(setting: Setting, freedom: Freedom): Settled | NoPlace | 'no room' {
  const { demand, candidate, method } = setting;
  const mean = roundDiameterMm(setting.job, candidate, method);
  const gapsMm = method.gapMm * tapsBetween(demand);
  const guess = turnsFor(demand.wholeUh(mean * 0.05), mean, candidate.pitch.mm, candidate.wire.bareMm, gapsMm);
  let length = Math.ceil(Math.max(guess, fixedTurnsOf(demand) ?? 0) * 1.05) + 5;
  let state: Settled = { outsideMm: candidate.formerMm, pitchMm: candidate.pitch.mm, turns: 0, taps: [], unitTaps: [] };
  let fixedTurns: number | null = null;
  for (let round = 0; round < ROUNDS; round++) {
    const coil = coilOf(setting, state, length);
    const wholeUh = wholeTarget(setting, coil, state.taps);
    const exact = coil.turnFor(wholeUh);
    if (exact > length - 2) {
      length = Math.ceil(exact * 1.05) + 5;
      continue;
    }
    // Whole turns are chosen once, or a diameter that follows them could chase them for ever.
    const turns: number = fixedTurns ?? wholeTurns(setting, freedom, exact);
    const next = { ...state, turns };
    if (freedom !== 'finish angle' && freedom !== 'none') {
      fixedTurns = turns;
      const ratio = wholeUh / coil.inductanceUh(turns);
      // L goes with about D^1.65 and p^-0.6.
      if (hasDiameterRange(setting.job)) next.outsideMm = roundTo(state.outsideMm * ratio ** (1 / 1.65), 100);
      else next.pitchMm = roundTo(state.pitchMm * ratio ** (-1 / 0.6), 1e4);
      if (!within(setting, next)) return 'no room';
    }
    const placing = placingOf(setting, turns, next.pitchMm);
    if (demand.units !== null) {
      const placed = placeBothSwitches(demand.units, demand.taps, placing);
      if ('noPlaceFor' in placed) return placed;
      next.taps = placed.taps;
      next.unitTaps = placed.unitTaps;
    } else if (round < TAPS_STAY_FROM || !stillClear(state.taps, placing)) {
      const targets = demand.targetsUh(viewOf(setting, coil, wholeUh, state.taps)).slice(0, -1);
      const placed = placeTaps(coil, targets, placing);
      if ('noPlaceFor' in placed) return placed;
      next.taps = placed.turns;
    }
    const previous: Settled = state;
    const atRest =
      next.turns === previous.turns &&
      next.outsideMm === previous.outsideMm &&
      next.pitchMm === previous.pitchMm &&
      next.taps.every((turn, i) => turn === previous.taps[i]);
    if (atRest) break;
    state = next;
  }
  return freedom === 'finish angle' ? trimmed(setting, state) : state;
}

/**
 * The finish moved by its own steps until the coil that ends there is right. A longer trial coil has a whole last turn where
 * this one has a part of one, and with a tap in that turn the two differ by a few tenths of a percent.
 */
function trimmed(setting: Setting, settled: Settled): Settled {
  const steps = finishSteps(setting, settled.turns);
  let state = settled;
  let best = settled;
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < TRIMS; round++) {
    const coil = coilOf(setting, state, state.turns);
    const wholeUh = wholeTarget(setting, coil, state.taps);
    const ratio = wholeUh / coil.inductanceUh(state.turns);
    if (Math.abs(ratio - 1) < least) {
      best = state;
      least = Math.abs(ratio - 1);
    }
    // L goes with the turns to about the power of 1.7.
    const move = Math.round(state.turns * (ratio ** (1 / 1.7) - 1) * steps);
    if (move === 0) break;
    const turns = roundTo(state.turns + move / steps, steps);
    const taps = tapsKept(setting, coil, state.taps, turns, wholeUh);
    if (taps === null) break;
    state = { ...state, turns, taps };
  }
  return best;
}

/** The taps as they are when they clear the finish at `turns`, else placed anew; null when that cannot be. */
function tapsKept(setting: Setting, coil: Coil, taps: readonly number[], turns: number, wholeUh: number) {
  const placing = placingOf(setting, turns, coil.shape.pitchMm);
  if (stillClear(taps, placing)) return taps;
  const placed = placeTaps(coil, setting.demand.targetsUh(viewOf(setting, coil, wholeUh, taps)).slice(0, -1), placing);
  return 'noPlaceFor' in placed ? null : placed.turns;
}

function placingOf(setting: Setting, turns: number, pitchMm: number): Placing {
  const { job, layout, method, demand } = setting;
  const { ribs } = job.former;
  const firstNotAbove = demand.kind === 'band';
  if (ribs === null) return { layout, method, turns, firstNotAbove };
  const row = finishRow(job.winding.finishTrim, turns, ribFinishStep(ribs, setting.candidate.wire.overallMm, pitchMm));
  return { layout, method, turns, firstNotAbove, ribs: { count: ribs, finishRow: row.map(({ turn }) => turn) } };
}

/** Targets of the final coil with these taps (the whole coil not among them), the whole coil's last. */
export function targetsOf(setting: Setting, coil: Coil, taps: readonly number[]): number[] {
  return setting.demand.targetsUh(viewOf(setting, coil, coil.inductanceUh(coil.turns), taps));
}
