/** Tuning curves as the record holds them: the frequency of each position against the capacitance across it. */
import type { Conditions, Position } from '../coil/positions.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import { significant } from './rounding.ts';
import type { Tap } from './schema.ts';

/**
 * Points of a curve. On logarithmic axes it is a straight line but for the share that coil and leads add: nine points
 * draw it within two thousandths of a frequency, the worst measured where the dead turns bend it most.
 */
const POINTS = 9;

/**
 * Points in equal ratios of capacitance from capacitor out to capacitor in, ends included, as those of the range. Between the ends
 * the crowding of the current is taken in between in the logarithm of the capacitance, for a field at every point would
 * cost more than all the rest of the record. Empty without a set.
 */
export function curveOf(coil: WorkingCoil, { turn, span }: Position, { tuning, rest }: Conditions): Tap['curve'] {
  if (tuning === null || span === null) return [];
  const { outPf, inPf } = tuning;
  const plain = Array.from({ length: POINTS }, (_, i) => {
    const share = i / (POINTS - 1);
    const pf = outPf * (inPf / outPf) ** share;
    return { share, pf, kHz: coil.tuned(turn, pf, rest).kHz };
  });
  const rise = Math.log(span.high.kHz / plain[0]!.kHz);
  const fall = Math.log(span.low.kHz / plain[POINTS - 1]!.kHz);
  return plain.map(({ share, pf, kHz }) => ({
    capacitancePf: significant(pf, 5),
    frequencyKhz: significant(kHz * Math.exp(rise + (fall - rise) * share), 5),
  }));
}
