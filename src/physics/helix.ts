import { allPositive, needPositive } from './domain.ts';

/**
 * Length of wire (m) of `turns` turns of a helix that together advance `axialAdvance` along the axis: the sum of
 * sqrt((pi D)^2 + p^2) per turn.
 *
 * Units: m; D to the wire's centre. Domain: diameter > 0, turns >= 0 (any fraction), advance of either sign; exact for an even helix.
 * Source: Pythagoras on the unrolled cylinder. For turns of unequal advance see `helixLengthOfTurns`.
 *
 * Example: helixLength(0.076, 100, 0.06) = 23.8762
 */
export function helixLength(diameter: number, turns: number, axialAdvance: number): number {
  if (!allPositive(diameter)) needPositive({ diameter });
  if (!(turns >= 0)) throw new RangeError(`turns must be 0 or more, got ${turns}`);
  return Math.hypot(Math.PI * diameter * turns, axialAdvance);
}

/**
 * Length of wire (m) of whole turns that advance by `advances` (m), one value a turn, each turn an even helix.
 *
 * Domain: diameter > 0; no advances: 0. Source: as `helixLength`.
 *
 * Example: helixLengthOfTurns(0.076, [0.0006, 0.0012]) = 0.477526
 */
export function helixLengthOfTurns(diameter: number, advances: ArrayLike<number>): number {
  if (!allPositive(diameter)) needPositive({ diameter });
  let sum = 0;
  for (let i = 0; i < advances.length; i++) sum += Math.hypot(Math.PI * diameter, advances[i]!);
  return sum;
}
