/**
 * Turns and place of a second winding for what is asked of it. Turns that are not given are the fewest from a tenth of the main coil's
 * on with which the coupling can be had: few turns keep its capacitance to the main coil small and its own resonance high, and as
 * an aerial winding transforms by about their ratio (common practice, from memory). Of the two places with a coupling it takes the
 * one towards the end that is asked for.
 */
import { type JobSecond, slides } from '../../job/around/second.ts';
import { MOST_SECOND_TURNS } from '../../job/around/second-schema.ts';
import type { Room } from './room.ts';
import type { SecondTurns } from './turns.ts';

/** A coupling is met when it is off by no more than this share of it. */
export const MET = 5e-3;
/** With its distance given, whole turns may be all there is to meet it by; farther off it is refused. */
export const NEAR_ENOUGH = 0.05;
/** Share of the main coil's turns to begin with. */
const FIRST_SHARE = 0.1;
/** Where more turns couple by this share of the most that fewer did, still more are not tried. */
const PAST = 0.97;
/** Longer than so many times the main coil more turns couple no tighter. */
const LONGEST_SHARE = 1.5;

export interface ChosenSecond {
  readonly turns: number;
  /** Of its start hole, at the tightest place. */
  readonly startMm: number;
  /** At the loosest place; the same where it does not slide. */
  readonly looseMm: number;
}

/** What could be had: couplings over all turns that were tried. */
export interface Unreached {
  readonly leastCoupling: number;
  readonly mostCoupling: number;
  readonly fromTurns: number;
  readonly toTurns: number;
}

export type Choice = ChosenSecond | Unreached | 'no room';

/** Whole turns whose inductance alone comes nearest. */
function turnsForInductance(turns: SecondTurns, uh: number): number {
  let n = 1;
  while (n < MOST_SECOND_TURNS && turns.inductanceUh(n) < uh) n++;
  return n > 1 && uh / turns.inductanceUh(n - 1) < turns.inductanceUh(n) / uh ? n - 1 : n;
}

interface Reached {
  readonly turns: number;
  readonly tightMm: number;
  readonly farMm: number;
  readonly most: number;
  readonly least: number;
}

/** Couplings that so many turns can have; null without room. */
function reached(turns: SecondTurns, room: Room, n: number, highest: number | null): Reached | null {
  const { lowMm, highMm } = room.bounds(n);
  if (lowMm > highMm) return null;
  const tightMm = turns.tightest(n, lowMm, highMm);
  const most = turns.exactCoupling(n, tightMm);
  const end = room.way > 0 ? highMm : lowMm;
  // Where it slides, the way is counted from the tightest place that is used.
  const from =
    highest !== null && highest < most && turns.coupling(n, end) < highest
      ? turns.placeFor(n, highest, tightMm, end)
      : tightMm;
  const farMm = highest === null ? end : room.farthestMm(n, from);
  const least = turns.exactCoupling(n, farMm);
  return { turns: n, tightMm, farMm, most, least };
}

export function chooseSecond(
  turns: SecondTurns,
  room: Room,
  second: JobSecond,
  mainTurns: number,
  mainMm: number,
): Choice {
  const { coupling, inductanceUh } = second;
  const given = second.turns ?? (inductanceUh === null ? null : turnsForInductance(turns, inductanceUh));
  if (coupling === null) {
    const n = given!;
    const { lowMm, highMm } = room.bounds(n);
    if (lowMm > highMm) return 'no room';
    const place = turns.tightest(n, lowMm, highMm);
    return { turns: n, startMm: place, looseMm: place };
  }
  if (given === null && second.distanceMm !== null) return nearestTurns(turns, room, coupling.lowest);
  const sliding = slides(second);
  const first = given ?? Math.max(1, Math.round(FIRST_SHARE * mainTurns));
  const last =
    given ?? Math.max(first, Math.min(MOST_SECOND_TURNS, Math.ceil((LONGEST_SHARE * mainMm) / turns.shape.pitchMm)));
  const tried: Reached[] = [];
  let most = 0;
  for (let n = first; n <= last; n++) {
    const one = reached(turns, room, n, sliding ? coupling.highest : null);
    if (one === null) break;
    tried.push(one);
    most = Math.max(most, one.most);
    if (one.most < PAST * most) break;
    if (one.most < coupling.highest || one.least > coupling.lowest) continue;
    const far = room.way > 0 ? room.bounds(n).highMm : room.bounds(n).lowMm;
    const startMm = turns.placeFor(n, coupling.highest, one.tightMm, far);
    const looseMm = sliding ? turns.placeFor(n, coupling.lowest, startMm, one.farMm) : startMm;
    return { turns: n, startMm, looseMm };
  }
  if (tried.length === 0) return 'no room';
  return {
    leastCoupling: Math.min(...tried.map(({ least }) => least)),
    mostCoupling: Math.max(...tried.map(({ most }) => most)),
    fromTurns: first,
    toTurns: tried.at(-1)!.turns,
  };
}

/** With the place given: the fewest turns that meet the coupling, else those that come nearest, if they are near. */
function nearestTurns(turns: SecondTurns, room: Room, coupling: number): Choice {
  let best: (ChosenSecond & { off: number }) | null = null;
  let [least, most, last] = [Number.POSITIVE_INFINITY, 0, 0];
  for (let n = 1; n <= MOST_SECOND_TURNS; n++) {
    const { lowMm, highMm } = room.bounds(n);
    if (lowMm > highMm) break;
    const k = turns.exactCoupling(n, lowMm);
    [least, most, last] = [Math.min(least, k), Math.max(most, k), n];
    const off = Math.abs(k / coupling - 1);
    if (best === null || off < best.off) best = { turns: n, startMm: lowMm, looseMm: lowMm, off };
    if (off <= MET) break;
    // More turns reach ever farther from the main coil.
    if (k < 0.5 * most) break;
  }
  if (best === null) return 'no room';
  if (best.off <= NEAR_ENOUGH) return best;
  return { leastCoupling: least, mostCoupling: most, fromTurns: 1, toTurns: last };
}
