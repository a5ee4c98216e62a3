/**
 * Unit conversion by the unit library, and only by its units: numbers are read here, never by its expression parser.
 */
import {
  BigNumberDependencies,
  ComplexDependencies,
  create,
  createUnitClass,
  FractionDependencies,
  type Unit as MathUnit,
} from 'mathjs';
import * as plain from 'mathjs/number';
import { KINDS, type KindName } from './kind.ts';

/** Units over plain numbers: ready in a third of the time that units over every kind of number take. */
const library = create({
  createUnitClass,
  ...BigNumberDependencies,
  ...ComplexDependencies,
  ...FractionDependencies,
  ...plain.absDependencies,
  ...plain.addScalarDependencies,
  ...plain.divideScalarDependencies,
  ...plain.equalDependencies,
  ...plain.fixDependencies,
  ...plain.formatDependencies,
  ...plain.isNumericDependencies,
  ...plain.multiplyScalarDependencies,
  ...plain.numberDependencies,
  ...plain.powDependencies,
  ...plain.roundDependencies,
  ...plain.subtractScalarDependencies,
});
const { Unit } = library;

/** Spellings that people use and the library does not know. */
const SPELLINGS: Readonly<Record<string, string>> = {
  '"': 'in',
  "'": 'ft',
  'in.': 'in',
  thou: 'mil',
  thous: 'mil',
  mils: 'mil',
  millimetre: 'mm',
  millimetres: 'mm',
  centimetre: 'cm',
  centimetres: 'cm',
  metre: 'm',
  metres: 'm',
  C: 'degC',
  F: 'degF',
};

/** Their factor is a fraction, which units over plain numbers do not take. */
const FAHRENHEIT: ReadonlySet<string> = new Set(['degF', 'fahrenheit']);

export type Converted =
  | { readonly found: 'value'; readonly value: number }
  /** The unit exists and measures something else; `what` says what, when it is one of our kinds. */
  | { readonly found: 'other'; readonly what: string | null }
  | { readonly found: 'unknown'; readonly meant: string | null };

/** `number` of `unit` in the unit of `kind`. Twelve digits are kept, so that 3 in is 76.2 mm and not 76.19999999999999. */
export function convert(number: number, unit: string, kind: KindName): Converted {
  const name = spelled(unit, kind);
  if (FAHRENHEIT.has(name)) return convert(((number - 32) * 5) / 9, 'degC', kind);
  if (!Unit.isValuelessUnit(name)) return { found: 'unknown', meant: nearMiss(unit, kind) };
  const target = KINDS[kind].unit;
  try {
    const quantity = new Unit(number, name);
    if (target === '1' || !quantity.equalBase(new Unit(1, target))) {
      return { found: 'other', what: measuredBy(quantity) };
    }
    return { found: 'value', value: Number(quantity.toNumber(target).toPrecision(12)) };
  } catch {
    // Rankine, and multiples of Fahrenheit: known to the library, but not to its plain numbers.
    return { found: 'unknown', meant: null };
  }
}

function spelled(unit: string, kind: KindName): string {
  // C and F are coulomb and farad, except where a temperature is asked for.
  if ((unit === 'C' || unit === 'F') && kind !== 'temperature') return unit;
  return Object.hasOwn(SPELLINGS, unit) ? (SPELLINGS[unit] as string) : unit;
}

function measuredBy(quantity: MathUnit): string | null {
  for (const kind of Object.values(KINDS)) {
    if (kind.unit !== '1' && quantity.equalBase(new Unit(1, kind.unit))) return kind.noun;
  }
  return null;
}

/** The unit that differs only in capitals: uh for uH, khz for kHz. */
function nearMiss(unit: string, kind: KindName): string | null {
  const lower = unit.toLowerCase();
  const candidates = [...KINDS[kind].offered, 'mm', 'cm', 'in', 'uH', 'mH', 'nH', 'pF', 'nF', 'uF', 'Hz', 'kHz', 'MHz'];
  return candidates.find((candidate) => candidate.toLowerCase() === lower) ?? null;
}
