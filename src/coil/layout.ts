/**
 * Where the turns lie. A coil is a list of turn middles: ring k (k = 0, 1, ...) stands for the turn from u = k to
 * u = k + 1 and is placed at its middle, u = k + 1/2. A last part turn from K to N has an entry too, at u = (K + N)/2.
 * Between the middles the wire runs straight on the developed surface; before the first and after the last it runs on
 * with the plain pitch. Everything that asks for a place along the axis asks here, so that a hole, a line on the
 * template and a ring of the sum cannot differ.
 *
 * Lengths in millimetres, turns as real numbers counted from the start hole.
 */

export type Hand = 'right' | 'left';

/** A tap's root pushes what follows aside by `gapMm`, spread over the turn around it. */
export interface Gap {
  readonly turn: number;
  readonly gapMm: number;
}

/** The u (turns from the start) at which each entry of the position list stands. */
export function turnMiddles(turns: number): Float64Array {
  const whole = Math.floor(turns + 1e-9);
  const part = turns - whole > 1e-9;
  const middles = new Float64Array(whole + (part ? 1 : 0));
  for (let k = 0; k < whole; k++) middles[k] = k + 0.5;
  if (part) middles[whole] = (whole + turns) / 2;
  return middles;
}

/**
 * Axial places of the turn middles, from a start hole at `startMm`.
 * A gap at turn t moves a wire at u aside by gap * clamp(u - t + 1/2, 0, 1): ring t - 1 stays, ring t stands a whole gap
 * farther on, and at a fractional t the ring that holds the tap is moved by its share.
 */
export function layTurns(turns: number, pitchMm: number, gaps: readonly Gap[], startMm: number): Float64Array {
  const places = turnMiddles(turns);
  for (let i = 0; i < places.length; i++) {
    const u = places[i]!;
    let z = startMm + pitchMm * u;
    for (const gap of gaps) z += gap.gapMm * Math.min(1, Math.max(0, u - gap.turn + 0.5));
    places[i] = z;
  }
  return places;
}

/** Axial place of the wire centre at u turns from the start; u may lie before 0 or after the last turn. */
export function axialAt(places: ArrayLike<number>, turns: number, pitchMm: number, u: number): number {
  const whole = Math.floor(turns + 1e-9);
  const last = places.length - 1;
  const middle = (i: number) => (i < whole ? i + 0.5 : (whole + turns) / 2);
  if (u <= middle(0)) return places[0]! + (u - middle(0)) * pitchMm;
  if (u >= middle(last)) return places[last]! + (u - middle(last)) * pitchMm;
  const i = Math.min(Math.max(Math.floor(u - 0.5), 0), last - 1);
  const from = middle(i);
  return places[i]! + ((u - from) / (middle(i + 1) - from)) * (places[i + 1]! - places[i]!);
}

/** Angle in the frame, 0 <= angle < 360, of a place `turn` turns from the start. */
export function angleOf(turn: number, hand: Hand): number {
  const fraction = turn - Math.floor(turn);
  const angle = hand === 'right' ? 360 * fraction : 360 - 360 * fraction;
  const rounded = Math.round(angle * 1e4) / 1e4;
  return rounded >= 360 ? rounded - 360 : rounded;
}
