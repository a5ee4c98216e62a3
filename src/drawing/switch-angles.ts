/**
 * Where the positions of a rotary switch lie. Angles in degrees clockwise from the top, seen from the front (the knob's
 * side); seen from behind the same places lie mirrored. The free part of the turn lies at the bottom.
 */

/** Angles between the positions of switches that can be had, degrees, widest first: common practice, from memory. */
const USUAL_DEG = [30, 22.5, 20, 18, 15, 12, 10, 7.5, 6] as const;

/** The widest usual angle at which so many places go round; where none does, the turn shared out evenly. Degrees. */
export function stepFor(places: number): number {
  return USUAL_DEG.find((deg) => places * deg <= 360 + 1e-9) ?? 360 / places;
}

/** Angle of position `index` (from 0) of `count`, the middle one at the top. Degrees, clockwise from the front. */
export function positionDeg(index: number, count: number, stepDeg: number): number {
  return (index - (count - 1) / 2) * stepDeg;
}

/**
 * How many places a switch must have for so many positions: one each; but where the rotor itself joins all the contacts beyond the one
 * in use it covers as many as there are positions, and those that it leaves behind must be out of its reach.
 */
export function placesFor(positions: number, rest: 'open' | 'shorted' | 'shorted in sections' | 'disconnected') {
  return rest === 'shorted in sections' ? 2 * positions - 1 : positions;
}
