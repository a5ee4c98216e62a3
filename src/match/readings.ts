/**
 * What a bench shows of a coil: the inductance on a meter, the resonance with a known capacitor. Both are taken with the turns
 * beyond the tap open, one end of the coil at the earth of the meter.
 */
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { AtWork } from './state.ts';

/** Below this the current does not crowd by as much as a meter tells; up to 1.5 mm of wire (common practice, from memory). */
const CROWDS_FROM_KHZ = 15;
/** The capacitance that a coil adds hardly changes with what is across it; with more than this it is lost in rounding. */
const MOST_PF = 2000;

const omegaOf = (kHz: number) => 2e3 * Math.PI * kHz;

/** pF that tunes uH to kHz. */
const tuningPf = (uh: number, kHz: number) => 1e18 / (omegaOf(kHz) ** 2 * uh);

/**
 * What the coil itself puts across a tap, pF, for readings near this frequency; `capacitorPf` for a resonance with it. Dead turns raise
 * it the more, the nearer they are to a resonance of their own.
 */
export function ownPfAt(working: WorkingCoil, turn: number, kHz: number, capacitorPf?: number): number {
  const lowUh = working.inductanceUh(0, turn);
  const pf = capacitorPf ?? Math.min(MOST_PF, Math.max(20, tuningPf(lowUh, kHz)));
  return tuningPf(lowUh, working.tuned(turn, pf, 'open').kHz) - pf;
}

/** Working over low-frequency inductance at a tap: current crowds in the wire. */
export const crowdedAt = (working: WorkingCoil, turn: number, kHz: number): number =>
  kHz < CROWDS_FROM_KHZ ? 1 : 1 / working.crowding(turn, kHz);

/** Both at a tap. */
export const atWork = (working: WorkingCoil, turn: number, kHz: number, capacitorPf?: number): AtWork => ({
  crowded: crowdedAt(working, turn, kHz),
  ownPf: ownPfAt(working, turn, kHz, capacitorPf),
});

/** Inductance that a meter at this frequency shows, uH: crowded, and raised by the coil's own capacitance. */
export function shownUh(lowUh: number, kHz: number, { crowded, ownPf }: AtWork): number {
  const uh = lowUh * crowded;
  return uh / (1 - omegaOf(kHz) ** 2 * uh * ownPf * 1e-18);
}

/** Resonance with a capacitor across the tap, kHz. */
export function resonantKhz(lowUh: number, capacitorPf: number, { crowded, ownPf }: AtWork): number {
  return 1e9 / (2e3 * Math.PI * Math.sqrt(lowUh * crowded * (capacitorPf + ownPf)));
}
