/** Turns nearer than this are the same. */
export const TURN_SLACK = 1e-9;

/** Whole turns of a winding, and the entries of its list of positions: one a turn, and one for a last part turn. */
export function countTurns(turns: number): { whole: number; count: number } {
  const whole = Math.floor(turns + TURN_SLACK);
  return { whole, count: turns - whole > TURN_SLACK ? whole + 1 : whole };
}

/**
 * Axial place of the wire at `u` turns from the start: straight lines between the middles of the turns, u = k + 1/2, and of the
 * last part turn; beyond the outermost middles the nearest line runs on.
 */
export function placeAt(positions: ArrayLike<number>, turns: number, u: number): number {
  const { whole, count } = countTurns(turns);
  if (count === 1) return positions[0]!;
  const middle = (i: number) => (i < whole ? i + 0.5 : (whole + turns) / 2);
  const i = Math.min(Math.max(Math.floor(u - 0.5), 0), count - 2);
  const before = positions[i]!;
  return before + ((positions[i + 1]! - before) * (u - middle(i))) / (middle(i + 1) - middle(i));
}
