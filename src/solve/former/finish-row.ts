/**
 * The row of finish holes, and how both ends of the wire are held without glue.
 *
 * At the start the end goes in through the anchor hole A and out through S; at the finish in through the hole where the
 * winding ends and out through the next one of the row. Either way the wire turns four right angles round edges of plastic,
 * which holds exp(2 pi mu) times what pulls at the free end: some five times, with 0.25 for the friction (an estimate),
 * and the stiffness of the bent copper besides. So every hole of the row needs its neighbour: a row to trim by runs from
 * three turns back to two turns on and has one more hole to tie the last of them. Holes of a pair are no nearer than
 * a millimetre of wall, whichever turn they belong to, so a row needs no second row of holes beside it, and a
 * turn taken off leaves free again what held it.
 */
import type { Coil } from '../../coil/coil.ts';
import { ribFinishStep } from '../ribs.ts';
import { WEB_MM, wireHoleMm } from '../tap-methods.ts';
import type { Around } from './around.ts';
import { insideMm } from './wall.ts';

/** Turns that may come off or go on in trimming. */
const FINISH_BACK = 3;
const FINISH_ON = 2;
/** Holes beyond the last place to end: the end is tied through it. */
const TIE = 1;

export interface FinishHole {
  readonly turn: number;
  /** Turns more or fewer than planned. */
  readonly offset: number;
}

/** Turns from one finish hole to the next: a turn and the part of it that keeps the holes apart, also inside the wall. */
function finishStep(around: Around): number {
  const { ribs } = around.job.former;
  if (ribs !== null) return ribFinishStep(ribs, around.overallMm, around.pitchMm);
  const apart = wireHoleMm(around.overallMm, 1) + WEB_MM;
  const arc = Math.sqrt(Math.max(0, apart ** 2 - around.pitchMm ** 2));
  return 1 + arc / (Math.PI * insideMm(around));
}

/** All holes of the row, ascending; the last one only ties the end. */
export function finishHoles(around: Around, coil: Coil): FinishHole[] {
  return finishRow(around.job.winding.finishTrim, coil.turns, finishStep(around));
}

/** The row of a winding of so many turns, whose holes are `step` turns apart. */
export function finishRow(trim: boolean, turns: number, step: number): FinishHole[] {
  const back = trim ? Math.min(FINISH_BACK, Math.floor(turns - 1)) : 0;
  const on = (trim ? FINISH_ON : 0) + TIE;
  const row: FinishHole[] = [];
  for (let k = -back; k <= on; k++) row.push({ turn: turns + k * step, offset: k });
  return row;
}

/** The last turn at which a winding may end. */
export function lastEnd(around: Around, coil: Coil): number {
  const row = finishHoles(around, coil);
  return row[row.length - 1 - TIE]!.turn;
}
