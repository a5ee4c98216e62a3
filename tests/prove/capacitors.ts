/** Variable capacitors as their makers cut them, and a coil tuned by them, to read a dial of. */
import type { CoilReadings, DialReading } from '../../src/prove/types.ts';

export const LAWS = ['capacitance', 'wavelength', 'ratio', 'frequency', 'between'] as const;
export type Law = (typeof LAWS)[number];

/** Even steps of capacitance, wavelength, ratio or frequency over the turn, or half way between the last two; pF, the stray in it. */
export function capacitance(law: Law, degrees: number, spanDeg: number, low: number, high: number): number {
  const t = degrees / spanDeg;
  const power = (p: number) => (high ** p + t * (low ** p - high ** p)) ** (1 / p);
  if (law === 'ratio') return high * (low / high) ** t;
  if (law === 'between') return (high * (low / high) ** t + power(-0.5)) / 2;
  return power(law === 'capacitance' ? 1 : law === 'wavelength' ? 0.5 : -0.5);
}

export interface Tuned {
  readonly law: Law;
  readonly spanDeg: number;
  readonly inductancesUh: readonly number[];
  readonly lowPf?: number;
  readonly highPf?: number;
}

/** kHz of a position, counted from 1, at an angle. Its stray is not the same at each: a law of the dial is not one of the capacitor. */
export function tunedKhz(
  { law, spanDeg, inductancesUh, lowPf = 40, highPf = 410 }: Tuned,
  tap: number,
  degrees: number,
) {
  const pf = capacitance(law, degrees, spanDeg, lowPf, highPf) + 6 + 2 * tap;
  return 1e6 / (2 * Math.PI * Math.sqrt(inductancesUh[tap - 1]! * pf));
}

/** Readings at even angles, to the digits of a counter. */
export function dialReadings(tuned: Tuned, count: number): CoilReadings {
  let line = 1;
  const dial = tuned.inductancesUh.flatMap((_, i) =>
    Array.from({ length: count }, (_, k): DialReading => {
      const degrees = (tuned.spanDeg * k) / (count - 1);
      const frequencyKhz = Number(tunedKhz(tuned, i + 1, degrees).toPrecision(6));
      return { line: ++line, tap: i + 1, degrees, frequencyKhz };
    }),
  );
  return { serial: 'LAKE-0007', readings: [], dial, remarks: [] };
}
