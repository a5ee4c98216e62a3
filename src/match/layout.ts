/** Where the turns of an old coil lie, as its unknowns place them. Millimetres, Z = 0 at the wire centre of the start. */
import { turnMiddles } from '../coil/layout.ts';

/** What is unknown of a winding besides its turns. */
export interface Measures {
  readonly meanMm: number;
  readonly bareMm: number;
  readonly overallMm: number;
  /** A tap pushes the next turn aside by this. */
  readonly tapGapMm: number;
  /** One a section. */
  readonly pitchMm: readonly number[];
  /** Clear, edge to edge; one fewer than sections. */
  readonly sectionGapMm: readonly number[];
}

const clamp = (value: number) => Math.min(1, Math.max(0, value));

/**
 * Place along the axis of the wire centre at `turn`. Within a section a pitch a turn; the wire crosses to the next within the
 * turn around its end, by the gap and a wire; a tap's gap is spread over the turn around it, as in `coil/layout.ts`.
 * `ends` are the turns at which the sections end, the last that of the coil; `pushed` those at which a tap makes a gap.
 */
export function placeAt(measures: Measures, ends: readonly number[], pushed: readonly number[], turn: number): number {
  const { pitchMm, sectionGapMm, overallMm, tapGapMm } = measures;
  const last = ends.length - 1;
  let from = 0;
  let z = 0;
  for (let s = 0; s <= last; s++) {
    const low = s === 0 ? 0 : from + 0.5;
    const high = s === last ? turn : Math.min(turn, ends[s]! - 0.5);
    if (high > low) z += (high - low) * pitchMm[s]!;
    if (s < last) z += (sectionGapMm[s]! + overallMm) * clamp(turn - ends[s]! + 0.5);
    from = ends[s]!;
  }
  if (tapGapMm !== 0) for (const tap of pushed) z += tapGapMm * clamp(turn - tap + 0.5);
  return z;
}

/** Middles of so many turns; see `coil/layout.ts`. */
export function placesOf(
  measures: Measures,
  ends: readonly number[],
  pushed: readonly number[],
  turns: number,
): Float64Array {
  return turnMiddles(turns).map((middle) => placeAt(measures, ends, pushed, middle));
}
