/**
 * What people write over a column, into the column `quantity`, or as a condition: `tap 3 100 pF (kHz)`, `former mm`,
 * `length turns-20`, `23.5 degC`. Words are known in a few spellings; nothing is guessed from what is not known.
 */
import type { Quantity } from '../bench/api.ts';
import type { KindName } from '../quantity/kind.ts';
import { normalise } from '../quantity/normalise.ts';

export type What = Quantity | 'turns' | 'dial';

/** What a reading was taken with or at. */
export interface Conditions {
  readonly capacitancePf: number | null;
  readonly frequencyKhz: number | null;
  readonly celsius: number | null;
  readonly degrees: number | null;
  /** With generator and probe on the coil. */
  readonly probed: boolean;
}

export const NO_CONDITIONS: Conditions = {
  capacitancePf: null,
  frequencyKhz: null,
  celsius: null,
  degrees: null,
  probed: false,
};

export interface Words {
  /** Null: none is named. */
  readonly what: What | null;
  /** Of the bench's question, where there is no tap. */
  readonly key: string | null;
  readonly tap: number | 'whole' | null;
  readonly unit: Unit | null;
  readonly conditions: Conditions;
  /** Words that mean nothing here. */
  readonly rest: string;
}

export interface Unit {
  /** As the unit library calls it. */
  readonly name: string;
  readonly kind: KindName | 'turns';
}

/** Units by their spelling without capitals, which people mix up: no coil is measured in megahenry. */
const UNITS: Readonly<Record<string, Unit>> = Object.fromEntries(
  (
    [
      ['inductance', { nh: 'nH', uh: 'uH', mh: 'mH', h: 'H' }],
      ['frequency', { hz: 'Hz', khz: 'kHz', mhz: 'MHz' }],
      ['resistance', { ohm: 'ohm', ohms: 'ohm', kohm: 'kohm' }],
      ['capacitance', { pf: 'pF', nf: 'nF', uf: 'uF' }],
      [
        'length',
        { mm: 'mm', cm: 'cm', m: 'm', in: 'in', inch: 'in', inches: 'in', '"': 'in', thou: 'mil', mil: 'mil' },
      ],
      ['temperature', { degc: 'degC', c: 'degC', celsius: 'degC', degf: 'degF' }],
      ['angle', { deg: 'deg', degree: 'deg', degrees: 'deg' }],
      ['turns', { turns: 'turns', turn: 'turns' }],
    ] as const
  ).flatMap(([kind, names]) => Object.entries(names).map(([written, name]) => [written, { kind, name }])),
);

/** The unit of this spelling; null when it is none that a reading has. */
export function unitOf(written: string): Unit | null {
  const word = normalise(written)
    .replace(/\s|\.$/g, '')
    .toLowerCase();
  // Of all units these two alone are parted by a capital.
  const milli = /^([mM])ohms?$/i.exec(normalise(written).replace(/\s/g, ''));
  if (milli !== null) return { kind: 'resistance', name: `${milli[1]}ohm` };
  return Object.hasOwn(UNITS, word) ? UNITS[word]! : null;
}

const FACTORS: Readonly<Record<string, number>> = {
  pF: 1,
  nF: 1e3,
  uF: 1e6,
  Hz: 1e-3,
  kHz: 1,
  MHz: 1e3,
  degC: 1,
  deg: 1,
};

/** A number and a unit of a condition. */
const CONDITION = /([+-]?\d+(?:[.,]\d+)?)\s*(pf|nf|uf|hz|khz|mhz|deg\s?c|deg\s?f|celsius|c|degrees?|deg)(?![a-z])/gi;

/** Said of a reading that was taken with generator and probe on the coil. */
const PROBE = /\b(?:(?:signal )?generator (?:and|with) )?(?:oscilloscope )?probed?\b/gi;

/** The conditions named in a text, and what of it is none. */
export function conditionsIn(text: string): { readonly conditions: Conditions; readonly rest: string } {
  let conditions = NO_CONDITIONS;
  const rest = normalise(text).replace(CONDITION, (_all, digits: string, written: string) => {
    const number = Number(digits.replace(',', '.'));
    const unit = unitOf(written)!;
    const value = unit.name === 'degF' ? ((number - 32) * 5) / 9 : number * FACTORS[unit.name]!;
    const key = {
      capacitance: 'capacitancePf',
      frequency: 'frequencyKhz',
      temperature: 'celsius',
      angle: 'degrees',
    }[unit.kind as 'capacitance' | 'frequency' | 'temperature' | 'angle'];
    conditions = { ...conditions, [key]: Number(value.toPrecision(12)) };
    return ' ';
  });
  const bare = rest.replace(PROBE, () => {
    conditions = { ...conditions, probed: true };
    return ' ';
  });
  return { conditions, rest: tidied(bare.replace(/(?<![a-z])(?:at|with|and)(?![a-z])|[;,:/]/gi, ' ')) };
}

const tidied = (text: string) => text.replace(/\s+/g, ' ').trim();

/** Quantities by what their name holds, the most particular first. */
const NAMES: readonly (readonly [RegExp, What, string | null])[] = [
  [/\bdial\b/, 'dial', null],
  [/\bturns?-20\b|\b20 ?turns\b|\btwenty turns\b/, 'length', 'turns-20'],
  [/\bcheck-\d+\b/, 'other', null],
  [/\bformer\b|\bdiameter\b/, 'diameter', 'former'],
  [/\bturns\b/, 'turns', null],
  [/\blength\b/, 'length', null],
  [/\bresistance\b|\bdc\b|^r$/, 'resistance', null],
  [/\binductance\b|^l$/, 'inductance', null],
  [/\b(?:band)?width(?: of resonance)?\b/, 'width', null],
  [/\bresonance\b|\bresonant\b|\bfrequency\b|^f$/, 'resonance', null],
];
/** Said beside a quantity, and told by it already. */
const FILLERS = /\b(?:wound|actually|as|counted|outside|over|of|to|up|the|dc|edge|reading|measured|coil|no)\b/g;

/** Takes apart what stands over a column or in the column of quantities. */
export function wordsOf(written: string): Words {
  const { conditions, rest: plain } = conditionsIn(written);
  let text = ` ${plain} `;
  let tap: Words['tap'] = null;
  let unit: Unit | null = null;
  text = text.replace(/[([]([^)\]]*)[)\]]/g, (_all, inside: string) => {
    unit ??= unitOf(inside);
    return unitOf(inside) === null ? ` ${inside} ` : ' ';
  });
  text = text.replace(/\b(?:tap|t)[ .#]?(\d+)\b/i, (_all, digits: string) => {
    tap = Number(digits);
    return ' ';
  });
  text = text.replace(/\bwhole(?: coil)?\b/i, () => {
    tap ??= 'whole';
    return ' ';
  });
  const words = tidied(text).split(' ');
  const last = words.at(-1)!;
  // Without brackets a word of one letter is more likely a name than a unit.
  const bare = last.length > 1 && last.toLowerCase() !== 'turns' ? unitOf(last) : null;
  if (unit === null && bare !== null) {
    unit = bare;
    words.pop();
  }
  const name = words.join(' ').toLowerCase();
  const found = NAMES.find(([pattern]) => pattern.test(name));
  const [pattern, what, key] = found ?? [null, null, null];
  const rest = tidied((pattern === null ? name : name.replace(pattern, ' ')).replace(FILLERS, ' '));
  return {
    what,
    key: what === 'other' ? /check-\d+/.exec(name)![0] : key,
    tap,
    unit,
    conditions,
    // `diameter former`, as the bench page writes it.
    rest:
      what === 'diameter' || what === 'length'
        ? tidied(rest.replace(/\b(?:former|diameter|length|turns-20)\b/g, ' '))
        : rest,
  };
}

/** What a figure of this unit measures, where nobody says; null: it may be several things. */
export function whatOf({ kind }: Unit): What | null {
  switch (kind) {
    case 'inductance':
    case 'resistance':
    case 'turns':
      return kind;
    case 'frequency':
      return 'resonance';
    default:
      return null;
  }
}

/** A tap as written: `3`, `tap 3`, `3.0`, `whole`; undefined when it is none. */
export function tapOf(written: string): number | 'whole' | undefined {
  const text = normalise(written).toLowerCase();
  if (/^(?:whole(?: coil)?|all|finish|f)$/.test(text)) return 'whole';
  const digits = /^(?:tap|t)?[ .#]?(\d{1,4})(?:[.,]0+)?$/.exec(text)?.[1];
  return digits === undefined ? undefined : Number(digits);
}
