import { arcOwnShare } from './arc.ts';
import { allPositive, needPositive } from './domain.ts';
import { countTurns, placeAt, TURN_SLACK } from './turn-places.ts';
import { shapeOf, type TurnShape } from './turn-shape.ts';

/**
 * Low-frequency inductance L (H) of a winding as coaxial rings at the axial `positions` of their wire centres, in any order.
 *
 * Units: m; `turn` is the radius of round turns, or another shape of turn (`polygonTurn`); `wireRadius` is the bare radius. The last
 * ring may be only `lastFraction` of a turn (0 to 1): its mutual terms are taken times that fraction, which is exact by symmetry
 * (of a polygon, at its corners), and its own term is that of an arc (`arcOwnShare`).
 * Domain: at least one position, no two alike (Infinity), 0 < wireRadius < radius.
 * Source: Maxwell 1873, art. 701 and 706; Grover 1946, ch. 16. Evenly spaced rings cost N evaluations of M, others N^2/2.
 * Accuracy: 2e-9 relative against the 5 largest of 11 independently computed ring sums, 1e-6 (rounding of the table) against
 * all; against the true helix 0.2 % at worst (10 turns at a pitch of a tenth of the diameter), 0.005 % for pitches below D/80.
 *
 * Example: ringSumMatrixFree([0, 0.002], 0.05, 0.0005) = 1.034779e-6
 */
export function ringSumMatrixFree(
  positions: ArrayLike<number>,
  turn: number | TurnShape,
  wireRadius: number,
  lastFraction = 1,
): number {
  const shape = shapeOf(turn);
  const count = positions.length;
  if (count === 0) throw new RangeError('a winding needs at least one ring');
  if (lastFraction === 1) return prefixes(positions, count, shape, wireRadius)[count]!;
  const whole = prefixes(positions, count - 1, shape, wireRadius)[count - 1]!;
  return whole + arcAfter(positions, count - 1, positions[count - 1]!, lastFraction, shape, wireRadius);
}

/** Steepest pitch over diameter at which rings were held against the true helix. */
const STEEPEST = 0.1;

/**
 * Whether turns of this pitch (m) on this diameter (m) are flat enough to count as rings to 0.2 %.
 *
 * Example: ringsValid(0.006, 0.05) = false
 */
export function ringsValid(pitch: number, diameter: number): boolean {
  return pitch <= STEEPEST * diameter;
}

export interface CumulativeInductance {
  /** Inductance (H) of turns 0 to `turn`, for any real turn from 0 (where it is 0) to the number of turns; RangeError beyond. */
  at(turn: number): number;
}

/**
 * Low-frequency inductance L (H) from the start of a winding to any turn of it: what a tap there sees with the rest open.
 *
 * Units: m. `positions[k]` is the wire centre at the middle of turn k, that is at u = k + 1/2 turns from the start. A winding that
 * ends in a part of a turn has one more position, at the middle of that part, u = (whole turns + turns)/2, and says so by `turns`
 * (default: the number of positions, all whole).
 * A tap at K + f turns has the rings 0 to K - 1 whole, and an arc f at the place that the positions, joined by straight lines,
 * have at u = K + f/2.
 * Domain: turns > 0, as many positions as turns rounded up. Continuous in `turn`; at a whole turn the ring sum of the first ones.
 * Source: as `ringSumMatrixFree`. Cost: N evaluations of M to prepare evenly spaced turns, N^2/2 otherwise (500 turns: about 3 ms);
 * after that nothing at a whole turn and N evaluations between two.
 *
 * Example: cumulativeInductance([0, 0.002], 0.05, 0.0005).at(2) = 1.034779e-6
 */
export function cumulativeInductance(
  positions: ArrayLike<number>,
  turn: number | TurnShape,
  wireRadius: number,
  turns = positions.length,
): CumulativeInductance {
  const shape = shapeOf(turn);
  if (!allPositive(turns)) needPositive({ turns });
  const { whole, count } = countTurns(turns);
  if (positions.length !== count) {
    throw new RangeError(`${turns} turns need ${count} positions, got ${positions.length}`);
  }
  const prefix = prefixes(positions, whole, shape, wireRadius);
  return {
    at(turn) {
      if (!(turn >= 0 && turn <= turns + TURN_SLACK)) throw new RangeError(`turn ${turn} is not in [0, ${turns}]`);
      const complete = Math.min(Math.floor(turn + TURN_SLACK), whole);
      const part = turn - complete;
      if (part <= TURN_SLACK) return prefix[complete]!;
      const arc = arcAfter(
        positions,
        complete,
        placeAt(positions, turns, complete + part / 2),
        part,
        shape,
        wireRadius,
      );
      return prefix[complete]! + arc;
    },
  };
}

/** What an arc of `fraction` of a turn at `place` adds to the first `count` rings. */
function arcAfter(
  positions: ArrayLike<number>,
  count: number,
  place: number,
  fraction: number,
  shape: TurnShape,
  wireRadius: number,
): number {
  let mutual = 0;
  for (let i = 0; i < count; i++) mutual += shape.mutual(place - positions[i]!);
  return 2 * fraction * mutual + shape.own(wireRadius) * arcOwnShare(fraction, shape.radius, wireRadius);
}

/** Inductance of the first 0, 1, ... `count` rings, all whole. */
function prefixes(positions: ArrayLike<number>, count: number, shape: TurnShape, wireRadius: number): Float64Array {
  const own = shape.own(wireRadius);
  const sums = new Float64Array(count + 1);
  const pitch = evenPitch(positions, count);
  let mutual = 0;
  for (let k = 0; k < count; k++) {
    if (pitch === undefined) {
      mutual = 0;
      for (let i = 0; i < k; i++) mutual += shape.mutual(positions[k]! - positions[i]!);
    } else if (k > 0) {
      mutual += shape.mutual(k * pitch);
    }
    sums[k + 1] = sums[k]! + own + 2 * mutual;
  }
  return sums;
}

/** The pitch of evenly spaced rings; undefined when a ring is off by more than a thousandth of a millionth of it. */
function evenPitch(positions: ArrayLike<number>, count: number): number | undefined {
  if (count < 3) return undefined;
  const first = positions[0]!;
  const pitch = (positions[count - 1]! - first) / (count - 1);
  for (let i = 1; i < count - 1; i++) {
    if (!(Math.abs(positions[i]! - first - i * pitch) <= 1e-9 * Math.abs(pitch))) return undefined;
  }
  return pitch;
}
