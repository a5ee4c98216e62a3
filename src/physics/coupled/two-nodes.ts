import { allPositive, needPositive } from '../domain.ts';

/** A tapped winding seen from its tap and its far end alone; inductances in H, capacitances in F. */
export interface TwoNodes {
  /** Turns in use over all turns, above 0 and below 1. */
  readonly share: number;
  /** Of the turns in use, of the whole winding, and of the dead turns by themselves. */
  readonly usedInductance: number;
  readonly wholeInductance: number;
  readonly deadInductance: number;
  /** Of the whole winding with the start earthed. */
  readonly selfCapacitance: number;
  /** Across the turns in use. */
  readonly tuning: number;
}

/**
 * Capacitance C' (F) that, added to the tuning capacitor, makes 1/(2 pi sqrt(L C)) of the turns in use give the first resonance of a
 * tapped winding whose dead turns are open: what the self-capacitance of all turns is worth at the tap. An ESTIMATE for a search.
 *
 * Units: H, F. Domain: all positive, share below 1 (RangeError). Edges: share -> 1 gives the self-capacitance of the whole winding.
 * Method: two nodes, tap and far end, voltage straight between them; the spread self-capacitance as the consistent matrix of such
 * stretches and, apart from it, all at the far end; the mean of both resonances. Two by two, in closed form.
 * Source: Rayleigh 1877 and Ritz 1909 for the method, Medhurst 1947 for the capacitance. Accuracy: of 100 turns with 27, 92 and
 * 400 pF the resonance is 2.5 % above that of `resonanceBracket` at worst for taps from 20 to 80 (0.3 % from 40 on with 92 pF), 3.4 % for tap 10.
 *
 * Example: deadEndCapacitance({ share: 0.2, usedInductance: 52.2e-6, wholeInductance: 607e-6, deadInductance: 445e-6, selfCapacitance: 3.54e-12, tuning: 92e-12 }) = 2.234e-11
 */
export function deadEndCapacitance(winding: TwoNodes): number {
  const { share, usedInductance: used, wholeInductance: whole, deadInductance: dead, tuning } = winding;
  const own = winding.selfCapacitance;
  if (!allPositive(used, whole, dead, tuning) || !allPositive(share, 1 - share, own))
    needPositive({ share, rest: 1 - share, used, whole, dead, tuning, own });
  const mutual = (whole + used - dead) / 2;
  // A capacitance c to earth a turn is worth c N/3 at the end of N turns whose voltage rises evenly.
  const inUse = 3 * own * share;
  const beyond = 3 * own * (1 - share);
  const spread = largest(used, mutual, whole, tuning + inUse / 3 + beyond / 3, beyond / 6, beyond / 3);
  const single = largest(used, mutual, whole, tuning, 0, own);
  // Mean of the frequencies, as `resonanceBracket` has it.
  const period = 2 / (1 / Math.sqrt(spread) + 1 / Math.sqrt(single));
  return period ** 2 / used - tuning;
}

/** Larger eigenvalue of [[a, b], [b, c]] [[p, q], [q, r]]. */
function largest(a: number, b: number, c: number, p: number, q: number, r: number): number {
  const trace = a * p + 2 * b * q + c * r;
  const determinant = (a * c - b * b) * (p * r - q * q);
  return (trace + Math.sqrt(Math.max(0, trace * trace - 4 * determinant))) / 2;
}
