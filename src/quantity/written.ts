/**
 * Lengths as the job wants them, on paper and in the words of the record: millimetres, inches, or both with the inches in brackets. Angles, masses,
 * inductances and resistances have one unit on every sheet; the sizes that machines read (nozzle, layer, rulers in
 * millimetres, files to cut from) stay millimetres as well and do not come here.
 *
 * **Rounding.** Each figure is rounded once, from the record, never from the other text. Inches get two decimals more than
 * the millimetres would, so that nothing is lost by asking for them: where 0.1 mm is told, 0.001 in (0.025 mm) is; where
 * 0.01 mm is, 0.0001 in. Wire is told in metres with n decimals, or in feet and inches with n - 1 decimals of an inch
 * (0.01 m: 0.1 in). Decimal inches, not fractions: no fraction that is read off a rule is as fine.
 */
import { fixed, short } from './decimals.ts';

/** What a job may ask for; a record that does not say is metric. */
export type Units = 'metric' | 'inch' | 'both';

export interface LengthStyle {
  /** Decimals of the millimetres; the inches get two more. */
  readonly digits?: number;
  /** No zeros at the end: for sizes that are named rather than measured, such as a wire's. */
  readonly trim?: boolean;
}

const MM_PER_INCH = 25.4;
const INCHES_PER_FOOT = 12;
const N_PER_LBF = 4.4482216152605;

/** Of a record. */
export const unitsOf = (record: { readonly units?: Units | undefined }): Units => record.units ?? 'metric';

const number = (value: number, digits: number, trim: boolean) => (trim ? short(value, digits) : fixed(value, digits));
const mmNumber = (mm: number, { digits = 2, trim = false }: LengthStyle) => number(mm, digits, trim);
const inchNumber = (mm: number, { digits = 2, trim = false }: LengthStyle) =>
  number(mm / MM_PER_INCH, digits + 2, trim);

const told = (units: Units, metric: () => string, inch: () => string): string =>
  units === 'metric' ? metric() : units === 'inch' ? inch() : `${metric()} (${inch()})`;

/** A length with its unit: `76.20 mm`, `3.0000 in`, `76.20 mm (3.0000 in)`. Two decimals of a millimetre by default. */
export function lengthText(mm: number, units: Units, style: LengthStyle = {}): string {
  return lengthsText([mm], units, '', style);
}

/** Several lengths with the unit once: `80.0 × 130.0 mm`, `80.0 × 130.0 mm (3.150 × 5.118 in)`; `between` parts them. */
export function lengthsText(mm: readonly number[], units: Units, between = ' × ', style: LengthStyle = {}): string {
  const all = (one: (value: number, style: LengthStyle) => string) =>
    mm.map((value) => one(value, style)).join(between);
  return told(
    units,
    () => `${all(mmNumber)} mm`,
    () => `${all(inchNumber)} in`,
  );
}

/** The same in a column or beside a dimension line, where the head or a note tells the unit: `76.20`, `3.0000`, `76.20 (3.0000)`. */
export function lengthCell(mm: number, units: Units, style: LengthStyle = {}): string {
  return told(
    units,
    () => mmNumber(mm, style),
    () => inchNumber(mm, style),
  );
}

/** Unit for the head of a column of `lengthCell`: `mm`, `in`, `mm (in)`. */
export const lengthUnit = (units: Units): string =>
  told(
    units,
    () => 'mm',
    () => 'in',
  );

/** The same as a word in a sentence, where `in` would be read as one: `mm`, `inches`, `mm (inches)`. */
export const lengthWord = (units: Units): string =>
  told(
    units,
    () => 'mm',
    () => 'inches',
  );

/** One cell a column, for tables that give each unit its own: with the heads of `lengthHeads`. */
export function lengthCells(mm: number, units: Units, style: LengthStyle = {}): string[] {
  if (units === 'both') return [mmNumber(mm, style), inchNumber(mm, style)];
  return [lengthCell(mm, units, style)];
}

/** `mm`, `in`, or both, a head for each column of `lengthCells`. */
export const lengthHeads = (units: Units): string[] => (units === 'both' ? ['mm', 'in'] : [lengthUnit(units)]);

/** A length in whole feet and inches; an inch that rounds up to twelve goes to the feet. */
function feetAndInches(m: number, digits: number): { feet: string; inches: string } {
  const places = Math.max(0, digits - 1);
  const inches = Number(((Math.abs(m) * 1000) / MM_PER_INCH).toFixed(places));
  const feet = Math.floor(inches / INCHES_PER_FOOT);
  return { feet: `${m < 0 ? '-' : ''}${feet}`, inches: fixed(inches - feet * INCHES_PER_FOOT, places) };
}

/** Wire in metres: `12.34 m`, `40 ft 5.8 in`, `12.34 m (40 ft 5.8 in)`. Two decimals of a metre by default. */
export function wireText(m: number, units: Units, digits = 2): string {
  return told(
    units,
    () => `${fixed(m, digits)} m`,
    () => {
      const { feet, inches } = feetAndInches(m, digits);
      return `${feet} ft ${inches} in`;
    },
  );
}

/** The same in a column: `12.34`, `40-5.8`, `12.34 (40-5.8)`; its head is `wireUnit`. */
export function wireCell(m: number, units: Units, digits = 2): string {
  return told(
    units,
    () => fixed(m, digits),
    () => {
      const { feet, inches } = feetAndInches(m, digits);
      return `${feet}-${inches}`;
    },
  );
}

/** Unit for the head of a column of `wireCell`: `m`, `ft-in`, `m (ft-in)`. */
export const wireUnit = (units: Units): string =>
  told(
    units,
    () => 'm',
    () => 'ft-in',
  );

/**
 * A force in newtons, with pounds-force in brackets where inches are wanted: spring balances there are marked in pounds.
 * `9.8 N`, `9.8 N (2.20 lbf)`. One decimal more than the newtons have.
 */
export function forceText(newtons: number, units: Units, digits = 1): string {
  return forcesText([newtons], units, '', digits);
}

/** Several forces with the unit once: `4 to 6 N (0.9 to 1.3 lbf)`. */
export function forcesText(newtons: readonly number[], units: Units, between = ' to ', digits = 1): string {
  const metric = `${newtons.map((value) => fixed(value, digits)).join(between)} N`;
  if (units === 'metric') return metric;
  return `${metric} (${newtons.map((value) => fixed(value / N_PER_LBF, digits + 1)).join(between)} lbf)`;
}
