/**
 * How far off a finished coil may be: 95 % limits of every tap from the spread of what it is made of.
 *
 * Each input is moved by its half width, the ring sum is taken again, and the changes are added as squares (the inputs are
 * independent and the response is nearly linear over these widths: JCGM 100:2008, 5.1.2). Half widths are taken as 95 %
 * limits. Where no standard states one it is common practice, and the record lists it among what was assumed.
 */
import type { Coil } from './coil.ts';

/** Half widths at 95 %. */
export interface Spread {
  /** Mean diameter: former and how the wire beds on it, mm. */
  readonly diameterMm: number;
  /** Pitch, a fraction. */
  readonly pitch: number;
  readonly bareMm: number;
  /** Gap that a tap makes, a fraction of it. */
  readonly gap: number;
  /** Place of a tap along the wire, turns. */
  readonly turn: number;
  /** Lead of a tap, uH. */
  readonly leadUh: number;
}

/** Length of wire on a coil wound by hand, against its helix: a percent either way (common practice). */
export const WIRE_SPREAD = 0.01;

export type SpreadInput = keyof Spread;

export interface Limits {
  readonly lowUh: number;
  readonly highUh: number;
  readonly dominant: SpreadInput;
  /** What each input moved by its half width does to the inductance, uH. */
  readonly changes: Readonly<Record<SpreadInput, number>>;
}

/** Limits of the sections up to each of `turns`, in their order. */
export function limitsOf(coil: Coil, turns: readonly number[], spread: Spread): Limits[] {
  const { shape } = coil;
  const coils = {
    diameterMm: coil.changed({ meanDiameterMm: shape.meanDiameterMm + spread.diameterMm }),
    pitch: coil.changed({ pitchMm: shape.pitchMm * (1 + spread.pitch) }),
    bareMm: coil.changed({ wire: { ...shape.wire, bareMm: shape.wire.bareMm + spread.bareMm } }),
    gap: coil.changed({ gaps: shape.gaps.map((gap) => ({ ...gap, gapMm: gap.gapMm * (1 + spread.gap) })) }),
  };
  return turns.map((turn) => {
    const nominal = coil.inductanceUh(turn);
    // A tap may end a little early or late; at the finish only early, the slope is the same.
    const back = Math.min(spread.turn, turn / 2);
    const perTurn = back > 0 ? (nominal - coil.inductanceUh(turn - back)) / back : 0;
    const by = (other: Coil) => other.inductanceUh(turn) - nominal;
    const changes = {
      diameterMm: by(coils.diameterMm),
      pitch: by(coils.pitch),
      bareMm: by(coils.bareMm),
      gap: by(coils.gap),
      turn: perTurn * spread.turn,
      leadUh: spread.leadUh,
    };
    const half = Math.hypot(...Object.values(changes));
    const names = Object.keys(changes) as SpreadInput[];
    const dominant = names.reduce((a, b) => (Math.abs(changes[b]) > Math.abs(changes[a]) ? b : a));
    return { lowUh: nominal - half, highUh: nominal + half, dominant, changes };
  });
}
