import { ringMutual, ringSelf } from './maxwell.ts';

/** A turn of a winding as the sums over turns see it: closed, flat, coaxial with the others and like them. */
export interface TurnShape {
  /** Radius of the circle of equal area, m: the turn itself when round, and what stands for it wherever only a circle can. */
  readonly radius: number;
  /** Length of its wire, m. */
  readonly length: number;
  /** Mutual inductance of two such turns this far apart along the axis (m, either sign), H. */
  mutual(distance: number): number;
  /** Own inductance in round wire of this bare radius (m), current spread evenly over its section, H. */
  own(wireRadius: number): number;
}

/**
 * A round turn.
 *
 * Units: m, H; to the wire's centre. Domain: radius > 0. Source and accuracy: `ringMutual` and `ringSelf`.
 *
 * Example: roundTurn(0.05).length = 0.314159
 */
export function roundTurn(radius: number): TurnShape {
  return {
    radius,
    length: 2 * Math.PI * radius,
    mutual: (distance) => ringMutual(radius, distance),
    own: (wireRadius) => ringSelf(radius, wireRadius),
  };
}

/** A bare number is the radius of a round turn. */
export const shapeOf = (turn: number | TurnShape): TurnShape => (typeof turn === 'number' ? roundTurn(turn) : turn);
