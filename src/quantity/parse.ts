/**
 * Text to numbers with a unit. Every function is total: it answers with a value or with what was wrong, and throws
 * nothing. Values are in the unit that {@link KINDS} states for their kind: mm, uH, pF, kHz, ohm, deg, degC; a
 * proportion is a plain fraction (5 % is 0.05).
 *
 * Example: `parseQuantity('3 1/2 in', 'length')` is `{ ok: true, value: 88.9 }`.
 */
import { tidy } from './format.ts';
import { KINDS, type KindName } from './kind.ts';
import { normalise } from './normalise.ts';
import { readNumber } from './number.ts';
import { convert } from './units.ts';

export interface Refused {
  readonly ok: false;
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}
export type Parsed<T> = { readonly ok: true; readonly value: T } | Refused;
/** One quantity in the unit of its kind. */
export type Quantity = Parsed<number>;
/** Lower and upper end in the unit of their kind, low < high. */
export interface Range {
  readonly low: number;
  readonly high: number;
}

export interface Allowed {
  /** Zero is a sensible answer (stray capacitance, hole compensation). */
  readonly zero?: boolean;
  /** Below zero is a sensible answer (hole compensation, temperature). */
  readonly negative?: boolean;
}

/** Longest text that is looked at; a quantity is a few words. */
const LONGEST = 120;

/** A quantity with its unit. Ratios take `%`, `percent` or a plain fraction. */
export function parseQuantity(written: string, kind: KindName, allowed: Allowed = {}): Quantity {
  const { noun, example, offered } = KINDS[kind];
  const refuse = (got: string, todo: string): Refused => ({
    ok: false,
    got,
    expected: `${noun}, such as ${example}`,
    todo,
  });
  if (written.length > LONGEST) return refuse(`${written.length} characters`, 'write one number and its unit');
  const text = normalise(written);
  if (text === '') return refuse('nothing', `write ${noun} with its unit, such as ${example}`);
  const shown = quote(written);
  const reading = readNumber(text);
  if (reading.found === 'comma') {
    return refuse(
      `${shown}, with a comma`,
      `write the decimal point as a point, and no mark between thousands: ${reading.meant}`,
    );
  }
  if (reading.found === 'zero divisor')
    return refuse(`${shown}, a fraction over zero`, `write ${noun}, such as ${example}`);
  if (reading.found === 'nothing')
    return refuse(`${shown}, which has no number in front`, `write a number and then its unit, such as ${example}`);
  if (!Number.isFinite(reading.value)) return refuse(`${shown}, more than a number can hold`, 'check the exponent');
  if (KINDS[kind].unit === '1')
    return bounded(ratio(reading.value, reading.unit, refuse, shown), kind, allowed, refuse, shown);
  if (reading.unit === '') {
    return refuse(
      `${shown}, a number without a unit`,
      `write the unit: ${offered.map((unit) => `${text} ${unit}`).join(' or ')}`,
    );
  }
  const converted = convert(reading.value, reading.unit, kind);
  if (converted.found === 'unknown') {
    if (/^(?:-|to\b|\.\.)/.test(reading.unit)) {
      return refuse(
        `${shown}, which looks like a range`,
        'write one value; where a range will do, write "to" between its ends',
      );
    }
    const hint =
      converted.meant === null ? `use ${offered.join(' or ')}` : `capitals count in units: write ${converted.meant}`;
    return refuse(`${shown}, whose unit ${quote(reading.unit)} is not known`, hint);
  }
  if (converted.found === 'other') {
    const what = converted.what === null ? `does not measure ${noun}` : `measures ${converted.what}`;
    return refuse(`${shown}, whose unit ${what}`, `give ${noun} in ${offered.join(' or ')}`);
  }
  return bounded({ ok: true, value: converted.value }, kind, allowed, refuse, shown);
}

type Refuse = (got: string, todo: string) => Refused;

function ratio(number: number, unit: string, refuse: Refuse, shown: string): Quantity {
  if (unit === '') return { ok: true, value: number };
  if (unit === '%' || unit === 'percent' || unit === 'per cent')
    return { ok: true, value: Number((number / 100).toPrecision(12)) };
  return refuse(`${shown}, whose unit ${quote(unit)} is not a proportion`, 'write 5 % or 0.05');
}

function bounded(quantity: Quantity, kind: KindName, allowed: Allowed, refuse: Refuse, shown: string): Quantity {
  if (!quantity.ok) return quantity;
  const { low, high, unit, offered } = KINDS[kind];
  const value = quantity.value === 0 ? 0 : quantity.value;
  const signed = allowed.negative === true || low < 0;
  if (value < 0 && !signed) return refuse(`${shown}, which is negative`, 'write a value above zero');
  if (value === 0 && !allowed.zero && !signed) return refuse(`${shown}, which is zero`, 'write a value above zero');
  const size = signed && low > 0 ? Math.abs(value) : value;
  const name = unit === '1' ? '' : ` ${unit}`;
  if (size > high) {
    const todo =
      unit === '1'
        ? 'write a percentage with its sign, such as 5 %'
        : `check the unit (${offered.join(' or ')}?) and the number`;
    return refuse(`${shown}, which is above the ${tidy(high)}${name} that make sense here`, todo);
  }
  if (value !== 0 && size < low) {
    return refuse(
      `${shown}, which is below the ${tidy(low)}${name} that make sense here`,
      `check the unit (${offered.join(' or ')}?) and the number`,
    );
  }
  return { ok: true, value };
}

/** The text as written, in quotes, cut when long, without characters that would disturb a terminal. */
export function quote(text: string): string {
  // Looked at from the front only: a cell may hold a whole file.
  const plain = visible(cut(text, 120));
  return plain.length > 60 ? `"${cut(plain, 57)}..."` : `"${plain}"`;
}

/** At most so many UTF-16 units from the front, no character cut in half. */
export function cut(text: string, most: number): string {
  return text.slice(0, most).replace(/[\ud800-\udbff]$/, '');
}

/** On one line, without characters that steer a terminal or are no text. */
export const visible = (text: string): string => text.replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, '?');
