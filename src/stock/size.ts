/**
 * Bare sizes in stock, 0.05 to 3 mm: American Wire Gauge, Standard Wire Gauge, metric.
 */
import { AWG_STANDARD, awgDiameterMm } from './awg.ts';
import { IEC_ROWS, IEC_STANDARD, nearestIecRow } from './iec60317.ts';
import { MM_PER_MIL, NEMA_ROWS, NEMA_STANDARD } from './nemaMw1000.ts';
import { SWG_INCHES, SWG_STANDARD } from './swg.ts';

export type Series = 'AWG' | 'SWG' | 'mm';

/** A bare wire before a covering is chosen. `number` is the gauge, or the diameter in mm. */
export interface Size {
  readonly series: Series;
  readonly number: number;
  /** As a person writes it: `24 AWG`, `0.5 mm`. */
  readonly name: string;
  readonly bareMm: number;
  readonly bareLowMm: number;
  readonly bareHighMm: number;
  readonly standard: string;
  readonly status: string;
}

const THINNEST_MM = 0.05;
const THICKEST_MM = 3;
const AWG_NUMBERS = { first: 9, last: 44 } as const;

export function sizeName(series: Series, number: number): string {
  return `${number} ${series}`;
}

/** Limits by NEMA MW 1000 where it has the size; thinner sizes take 0.1 mil either way, the step of its thinnest rows. */
function awgSize(number: number): Size {
  const bareMm = awgDiameterMm(number);
  const row = NEMA_ROWS.get(number);
  return {
    series: 'AWG',
    number,
    name: sizeName('AWG', number),
    bareMm,
    bareLowMm: row ? row.bareMinMil * MM_PER_MIL : bareMm - 0.1 * MM_PER_MIL,
    bareHighMm: row ? row.bareMaxMil * MM_PER_MIL : bareMm + 0.1 * MM_PER_MIL,
    standard: row ? `${AWG_STANDARD}, ${NEMA_STANDARD}` : AWG_STANDARD,
    status: row ? 'computed; limits read' : 'computed; limits estimated',
  };
}

/** The tolerance is that of the nearest metric size, an estimate, scaled up with the diameter beyond the metric table. */
function swgSize(number: number, inches: number): Size {
  const bareMm = inches * 25.4;
  const row = nearestIecRow(bareMm);
  const tolerance = row.toleranceMm * Math.max(1, bareMm / row.bareMm);
  return {
    series: 'SWG',
    number,
    name: sizeName('SWG', number),
    bareMm,
    bareLowMm: bareMm - tolerance,
    bareHighMm: bareMm + tolerance,
    standard: SWG_STANDARD,
    status: 'from memory; limits estimated from the nearest metric size',
  };
}

const awg = (): readonly Size[] => {
  const sizes: Size[] = [];
  for (let number = AWG_NUMBERS.first; number <= AWG_NUMBERS.last; number++) sizes.push(awgSize(number));
  return sizes;
};

const swg = (): readonly Size[] =>
  [...SWG_INCHES]
    .filter(([, inches]) => inches * 25.4 >= THINNEST_MM && inches * 25.4 <= THICKEST_MM)
    .map(([number, inches]) => swgSize(number, inches));

const metric = (): readonly Size[] =>
  IEC_ROWS.map((row) => ({
    series: 'mm',
    number: row.bareMm,
    name: sizeName('mm', row.bareMm),
    bareMm: row.bareMm,
    bareLowMm: row.bareMm - row.toleranceMm,
    bareHighMm: row.bareMm + row.toleranceMm,
    standard: IEC_STANDARD,
    status: row.status,
  }));

/** Every bare size, series after series, each in the order of its numbers. */
export function allSizes(): readonly Size[] {
  return [...awg(), ...swg(), ...metric()];
}
