/** The second winding as a position's network takes it, at one frequency. */
import type { CoilPair } from '../coil/pair.ts';
import type { SecondSide } from './position.ts';

/** Of the gap between two windings, partly plastic and partly air: an estimate. */
export const BETWEEN_PERMITTIVITY = 2;

/** `permittivity` of what lies between the two, for their capacitance. */
export function secondSide(pair: CoilPair, turn: number, kHz: number, permittivity: number): SecondSide {
  const at = pair.at(turn, kHz);
  // The crowding of the currents lowers the coupling to every stretch alike.
  const share = at.mutualUh / pair.mutualUh(0, turn);
  return {
    inductance: at.secondUh * 1e-6,
    resistance: at.secondOhm,
    added: at.addedOhm,
    mutual: (from, to) => share * pair.mutualUh(from, to) * 1e-6,
    selfCapacitance: pair.second.selfPf(pair.second.turns) * 1e-12,
    between: pair.betweenPf(permittivity).map(({ turn: where, pf }) => ({ turn: where, capacitance: pf * 1e-12 })),
  };
}
