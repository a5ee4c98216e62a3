/** Serials of a lot: patterns, lists, and the numbers that run through the whole lot. */
import type { Parsed } from '../../quantity/parse.ts';
import { shown } from '../field.ts';
import { slug } from '../name.ts';

/** A pattern has one run of #, which a number with leading zeros replaces; a list has one serial a coil. */
export type Numbering = { readonly pattern: string } | { readonly list: readonly string[] };

export const LONGEST_SERIAL = 40;
/** Most coils of a lot. */
export const MOST_COILS = 10_000;
/** Greatest number of a first coil. */
export const LARGEST_NUMBER = 999_999_999;
/** Digits of a number; more than a lot can ever need. */
const MOST_DIGITS = 9;

const RULE = `letters, digits, hyphens, points and underscores, ${LONGEST_SERIAL} at most, a letter or a digit first and last`;

/** Why the text is no serial, or null. It becomes part of file names, codes on labels and cells of spreadsheets. */
function unfit(text: string): { readonly got: string; readonly todo: string } | null {
  if (text.length > LONGEST_SERIAL)
    return { got: `a serial of ${text.length} characters`, todo: 'write a shorter one' };
  if (!/^[A-Za-z0-9](?:[A-Za-z0-9._-]*[A-Za-z0-9])?$/.test(text))
    return { got: `the serial ${shown(text)}`, todo: 'write it without blanks and other signs' };
  if (!Number.isNaN(Number(text)))
    return {
      got: `the serial ${shown(text)}, which a spreadsheet takes for a number`,
      todo: `put letters in front, such as C-${text}`,
    };
  return null;
}

/** A pattern such as `HS-###`. */
export function readPattern(raw: unknown): Parsed<string> {
  const expected = 'a pattern with one run of #, such as HS-###';
  if (typeof raw !== 'string') return { ok: false, got: shown(raw), expected, todo: 'write letters, a hyphen and ###' };
  const text = raw.trim();
  const runs = text.match(/#+/g) ?? [];
  if (runs.length === 0)
    return {
      ok: false,
      got: text === '' ? 'nothing' : `${shown(text)}, without #`,
      expected,
      todo: `write ${unfit(`${text}1`) === null ? `${text}${/[-._]$/.test(text) ? '' : '-'}` : 'HS-'}###; a # behind a blank begins a remark`,
    };
  if (runs.length > 1)
    return { ok: false, got: `${shown(text)}, with ${runs.length} runs of #`, expected, todo: 'leave one run of #' };
  if (runs[0]!.length > MOST_DIGITS)
    return { ok: false, got: `${shown(text)}, with ${runs[0]!.length} digits`, expected, todo: `leave ${MOST_DIGITS}` };
  const faulty = unfit(text.replace(/#+/, (run) => '1'.repeat(run.length)));
  if (faulty === null) return { ok: true, value: text };
  return {
    ok: false,
    got: faulty.got.replace(/1+/, () => runs[0]!),
    expected: RULE,
    todo: faulty.todo.replace(/1+/, () => runs[0]!),
  };
}

/** A pattern, or serials as a list or in one text between blanks or commas. */
export function readNumbering(raw: unknown): Parsed<Numbering> {
  if (typeof raw === 'string' && (raw.includes('#') || raw.trim() === '')) {
    const pattern = readPattern(raw);
    return pattern.ok ? { ok: true, value: { pattern: pattern.value } } : pattern;
  }
  const list = Array.isArray(raw) ? raw : typeof raw === 'string' ? raw.trim().split(/[\s,;]+/) : [raw];
  const expected = `a pattern such as HS-###, or a list of serials: ${RULE}`;
  if (list.length === 0 || list.length > MOST_COILS)
    return { ok: false, got: shown(raw), expected, todo: 'write one serial a coil' };
  for (const one of list) {
    if (typeof one !== 'string')
      return { ok: false, got: shown(one), expected, todo: 'write letters too: a number alone is none' };
    const faulty = unfit(one);
    if (faulty !== null) return { ok: false, got: faulty.got, expected, todo: faulty.todo };
  }
  return { ok: true, value: { list } };
}

/** Initials of a lot without a pattern: `Harbour stock` gives `HS`, a name without letters `C`. */
function initials(name: string): string {
  const words = slug(name).split('-');
  const letters = words
    .map((word) => word.charAt(0))
    .join('')
    .slice(0, 4)
    .toUpperCase();
  return /[A-Z]/.test(letters) ? letters : `C${letters}`;
}

export interface Asked {
  readonly quantity: number;
  readonly numbering: Numbering | null;
  /** Number of its first coil; null: on from the coils before. */
  readonly first: number | null;
}

export interface SerialFault {
  readonly code: string;
  /** The entry. */
  readonly at: number;
  readonly key: 'serials' | 'quantity' | 'first-serial';
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
  /** The entry that has it too. */
  readonly other?: number;
}

export interface Numbered {
  readonly serials: readonly (readonly string[])[];
  readonly faults: readonly SerialFault[];
}

/**
 * The serials of all entries. Numbers run on from entry to entry of the same pattern, from `first` where nothing else is said.
 * Without a pattern it is made of the initials of `name` and of as many # as the lot needs, three at least.
 */
export function numberLot(asked: readonly Asked[], pattern: string | null, first: number, name: string): Numbered {
  const common = pattern ?? `${initials(name)}-${'#'.repeat(digitsFor(asked, first))}`;
  const next = new Map<string, number>();
  const faults: SerialFault[] = [];
  const serials = asked.map(({ quantity, numbering, first: own }, at): readonly string[] => {
    if (numbering !== null && 'list' in numbering) {
      const { list } = numbering;
      if (list.length !== quantity)
        faults.push({
          code: 'serial-count',
          at,
          key: 'serials',
          got: `${list.length} ${list.length === 1 ? 'serial' : 'serials'} for ${quantity} coils`,
          expected: 'one serial a coil',
          todo: `write quantity: ${list.length}, or mend the list`,
        });
      if (own !== null)
        faults.push({
          code: 'not-used',
          at,
          key: 'first-serial',
          got: 'a first serial for coils whose serials are listed',
          expected: 'one of the two',
          todo: 'remove first-serial',
        });
      return list;
    }
    const mine = numbering?.pattern ?? common;
    const key = mine.toLowerCase();
    const from = own ?? next.get(key) ?? first;
    const last = from + quantity - 1;
    next.set(key, Math.max(last + 1, next.get(key) ?? 0));
    const width = /#+/.exec(mine)![0].length;
    if (String(last).length > width) {
      faults.push({
        code: 'serial-digits',
        at,
        key: numbering === null && own === null ? 'quantity' : numbering === null ? 'first-serial' : 'serials',
        got: `numbers up to ${last} for the pattern ${mine}`,
        expected: `at most ${'9'.repeat(width)}`,
        todo: `write serials: ${mine.replace(/#+/, '#'.repeat(String(last).length))}`,
      });
      return [];
    }
    const write = (number: number) => mine.replace(/#+/, () => String(number).padStart(width, '0'));
    return Array.from({ length: quantity }, (_, i) => write(from + i));
  });
  return { serials, faults: [...faults, ...repeated(serials, asked)] };
}

function digitsFor(asked: readonly Asked[], first: number): number {
  const common = asked.filter(({ numbering }) => numbering === null);
  const highest = Math.max(first, ...common.map((one) => one.first ?? 0));
  const coils = common.reduce((sum, { quantity }) => sum + quantity, 0);
  return Math.max(3, String(highest + Math.max(0, coils - 1)).length);
}

/** The first serial of each two entries that is in both; capitals make no difference, as in the names of files. */
function repeated(serials: readonly (readonly string[])[], asked: readonly Asked[]): SerialFault[] {
  const faults: SerialFault[] = [];
  const owner = new Map<string, number>();
  const told = new Set<string>();
  serials.forEach((list, at) => {
    for (const serial of list) {
      const key = serial.toLowerCase();
      const other = owner.get(key);
      if (other === undefined) owner.set(key, at);
      else if (!told.has(`${other} ${at}`)) {
        told.add(`${other} ${at}`);
        const { first } = asked[at]!;
        faults.push({
          code: 'serial-twice',
          at,
          key: first === null ? 'serials' : 'first-serial',
          got: `the serial ${shown(serial)} a second time`,
          expected: 'a serial of its own for each coil, capitals or not',
          todo: first === null ? 'change one of the two' : 'leave first-serial out: numbers run on by themselves',
          other,
        });
      }
    }
  });
  return faults;
}
