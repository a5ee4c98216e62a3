/**
 * Where each tap goes: the nearest place to its inductance that a person can make. In one line the places are whole
 * turns; staggered they are steps of 5 degrees, which a protractor can set out too, or the ribs of a ribbed former.
 * Neighbours keep the distance that their tap method needs, in turns or else in angle; who stands too near moves to the
 * next free place.
 */
import type { Coil } from '../coil/coil.ts';
import type { TapLayout, TapMethod } from './tap-methods.ts';

export const STAGGER_STEPS = 72;
/** How far from its best place a tap may be moved to clear its neighbours, turns; on few ribs two of them. */
const REACH = 1 / 4;
/** Turns over which the row of finish holes reaches back from the finish, and the angle that it needs. */
const FINISH_ROW_TURNS = 3;
const FINISH_ROW_DEGREES = 15;

/** Angle between two places on the winding, 0..180 degrees. */
export function degreesBetween(a: number, b: number): number {
  const fraction = Math.abs(a - b) % 1;
  return 360 * Math.min(fraction, 1 - fraction);
}

/** Whether a tap at `turn` clears the start, the `others` and the finish. */
export function clears(
  turn: number,
  others: readonly number[],
  placing: Pick<Placing, 'turns' | 'method' | 'ribs'>,
): boolean {
  const { turns: wholeTurns, method, ribs } = placing;
  for (const other of ribs === undefined ? others : [...others, ...ribs.finishRow]) {
    if (Math.abs(turn - other) < method.turnsApart - 1e-9 && degreesBetween(turn, other) < method.degreesApart - 1e-9)
      return false;
  }
  // The start hole is a neighbour too: within a turn of it nothing can be tied off at the same angle.
  if (turn < 1 && degreesBetween(turn, 0) < method.degreesApart) return false;
  if (ribs !== undefined) return true;
  const row = method.holes > 0 ? FINISH_ROW_TURNS + method.turnsApart : method.turnsApart;
  const needed = method.holes > 0 ? method.degreesApart + FINISH_ROW_DEGREES : method.degreesApart;
  return wholeTurns - turn >= row - 1e-9 || degreesBetween(turn, wholeTurns) >= needed - 1e-9;
}

export interface Placing {
  readonly layout: TapLayout;
  readonly method: TapMethod;
  /** Turns of the whole coil. */
  readonly turns: number;
  /** The first tap may not lie above its target: it has to reach the upper edge of a band. */
  readonly firstNotAbove: boolean;
  /** Of a ribbed former: places are ribs, and each finish hole is a neighbour. */
  readonly ribs?: { readonly count: number; readonly finishRow: readonly number[] };
}

/** Why a tap (numbered from 1) finds no place: its neighbours are too near, or it asks for more than the whole coil has. */
export interface NoPlace {
  readonly noPlaceFor: number;
  /** It is a tap of the units switch. */
  readonly unit?: true;
  readonly beyond: boolean;
}

/** Whether taps that were placed for another number of turns still clear the start, one another and the finish. */
export function stillClear(taps: readonly number[], placing: Placing): boolean {
  const { turns } = placing;
  return taps.every((turn, index) => turn < turns - 1e-9 && clears(turn, taps.slice(0, index), placing));
}

/**
 * Turns of the taps below the whole coil for these target inductances (lowest first, the whole coil's not among them),
 * or the first tap that finds no place.
 */
export function placeTaps(coil: Coil, targetsUh: readonly number[], placing: Placing): { turns: number[] } | NoPlace {
  const steps = placing.layout === 'in line' ? 1 : (placing.ribs?.count ?? STAGGER_STEPS);
  const step = 1 / steps;
  const reach = placing.layout === 'in line' ? 0 : Math.max(2, Math.round(steps * REACH));
  const placed: number[] = [];
  for (const [index, target] of targetsUh.entries()) {
    const ideal = coil.turnFor(target);
    if (ideal >= coil.turns) return { noPlaceFor: index + 1, beyond: true };
    const onlyBelow = index === 0 && placing.firstNotAbove;
    const off = (place: number) => {
      const turn = place * step;
      return turn > 0 && turn <= coil.turns ? Math.abs(coil.inductanceUh(turn) - target) : Number.POSITIVE_INFINITY;
    };
    // Places are counted in whole numbers so that a place is the same number whichever way it was reached; they are tried
    // from the target outwards, each time on the side that is nearer in inductance.
    let below = Math.floor(ideal / step + 1e-9);
    let above = below + 1;
    let belowOff = off(below);
    let aboveOff = onlyBelow ? Number.POSITIVE_INFINITY : off(above);
    let found: number | null = null;
    for (let k = 0; k <= 2 * reach && found === null && Math.min(belowOff, aboveOff) < Number.POSITIVE_INFINITY; k++) {
      const takeBelow = belowOff <= aboveOff;
      const turn = (takeBelow ? below : above) * step;
      if (takeBelow) belowOff = off(--below);
      else aboveOff = off(++above);
      const previous = placed[index - 1] ?? 0;
      if (turn <= previous + 1e-9 || turn >= placing.turns - 1e-9 || turn < Math.min(0.5, placing.turns)) continue;
      if (clears(turn, placed, placing)) found = turn;
    }
    if (found === null) return { noPlaceFor: index + 1, beyond: ideal >= placing.turns };
    placed.push(found);
  }
  return { turns: placed };
}
