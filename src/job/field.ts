/**
 * Fields of a job: each reads one value as written and answers with the value in the unit of the code, or with what
 * was wrong, as an issue whose `params` are the parts of a fault. Each carries its own piece of JSON Schema.
 */
import * as z from 'zod';
import type { KindName } from '../quantity/kind.ts';
import { KINDS } from '../quantity/kind.ts';
import { type Allowed, type Parsed, parseQuantity, quote, type Range, type Refused } from '../quantity/parse.ts';
import { isRange, parseRange, parseSize } from '../quantity/range.ts';
import { nearest } from './nearest.ts';

/** JSON Schema of one field, beside its description. */
type Json = Readonly<Record<string, unknown>>;

/** One plain sentence: what the key is. */
export type Doc = string;

export function field<T>(read: (raw: unknown) => Parsed<T>, doc: Doc, json: Json) {
  return z
    .unknown()
    .transform((raw, context): T => {
      const parsed = read(raw);
      if (parsed.ok) return parsed.value;
      refuse(context, parsed);
      return z.NEVER;
    })
    .meta({ description: doc, ...json });
}

interface Context {
  addIssue(issue: {
    code: 'custom';
    message: string;
    path?: (string | number)[];
    params: Record<string, unknown>;
  }): void;
}

function refuse(context: Context, refused: Refused, path: (string | number)[] = []): void {
  const { got, expected, todo } = refused;
  context.addIssue({ code: 'custom', message: got, path, params: { got, expected, todo } });
}

/** A value that is no text, as a person would recognise it. */
export function shown(raw: unknown): string {
  if (raw === undefined || raw === null) return 'nothing';
  if (typeof raw === 'string') return raw === '' ? 'nothing' : quote(raw);
  if (typeof raw === 'number') return Number.isNaN(raw) ? 'NaN, which is no number' : String(raw);
  if (Array.isArray(raw)) return `a list of ${raw.length}`;
  return typeof raw === 'object' ? 'a group of keys' : String(raw);
}

function readQuantity(raw: unknown, kind: KindName, allowed: Allowed): Parsed<number> {
  if (typeof raw === 'string') return parseQuantity(raw, kind, allowed);
  if (typeof raw === 'number' && Number.isFinite(raw)) return parseQuantity(String(raw), kind, allowed);
  const { noun, example } = KINDS[kind];
  return { ok: false, got: shown(raw), expected: `${noun}, such as ${example}`, todo: 'write one number and its unit' };
}

/** The sentence with what the value measures and how one is written. */
const described = (doc: Doc, kind: KindName): Doc =>
  `${doc} ${capital(KINDS[kind].noun)}, such as ${KINDS[kind].example}.`;
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** The sentence with how one is written, unless it shows that itself, in quotes. */
const shownHow = (doc: Doc, how: string): Doc => (/"[^"]*\d[^"]*"/.test(doc) ? doc : `${doc} ${capital(how)}.`);

/** What is expected where nothing is written: how one is written, with an example. */
const howWritten = (refused: Parsed<unknown>): string => (refused.ok ? '' : refused.expected);

/** One quantity, in the unit of its kind. */
export function quantity(kind: KindName, doc: Doc, allowed: Allowed = {}) {
  const type = KINDS[kind].unit === '1' ? ['string', 'number'] : 'string';
  return field((raw) => readQuantity(raw, kind, allowed), described(doc, kind), { type });
}

/** A range, low end first. */
export function range(kind: KindName, doc: Doc) {
  const told = shownHow(doc, howWritten(parseRange('', kind)));
  return field((raw) => (typeof raw === 'string' ? parseRange(raw, kind) : readRangeOf(raw, kind)), told, {
    type: 'string',
  });
}

function readRangeOf(raw: unknown, kind: KindName): Parsed<Range> {
  const refused = parseRange('', kind);
  return refused.ok ? refused : { ...refused, got: shown(raw) };
}

/** A range, one value, or a list of values: `{ low, high }` or `{ list }`. */
export type Values = Range | { readonly list: readonly number[] };

export function values(kind: KindName, doc: Doc) {
  return z
    .unknown()
    .transform((raw, context): Values => {
      if (typeof raw === 'string' && isRange(raw)) {
        const parsed = parseRange(raw, kind);
        if (parsed.ok) return parsed.value;
        refuse(context, parsed);
        return z.NEVER;
      }
      return { list: readList(raw, context, (one) => readQuantity(one, kind, {}), KINDS[kind].noun) };
    })
    .meta({ description: listed(doc, kind), anyOf: [{ type: 'string' }, jsonList({ type: 'string' })] });
}

const listed = (doc: Doc, kind: KindName): Doc =>
  shownHow(doc, `${KINDS[kind].noun}, such as ${KINDS[kind].example}, or a list`);

/** One entry, or a list of at least one. */
export function listOf<T>(read: (raw: unknown) => Parsed<T>, noun: string, doc: Doc, json: Json) {
  return z
    .unknown()
    .transform((raw, context): readonly T[] => readList(raw, context, read, noun))
    .meta({ description: doc, anyOf: [json, jsonList(json)] });
}

/** Quantities, one or a list. */
export function quantities(kind: KindName, doc: Doc) {
  return listOf((raw) => readQuantity(raw, kind, {}), KINDS[kind].noun, listed(doc, kind), { type: 'string' });
}

const MOST = 200;
const jsonList = (items: Json): Json => ({ type: 'array', items, minItems: 1, maxItems: MOST });

function readList<T>(raw: unknown, context: Context, read: (raw: unknown) => Parsed<T>, noun: string): T[] {
  const entries = Array.isArray(raw) ? raw : [raw];
  if (entries.length === 0 || entries.length > MOST) {
    refuse(context, {
      ok: false,
      got: entries.length === 0 ? 'an empty list' : `a list of ${entries.length}`,
      expected: `${noun}, or a list of 1 to ${MOST}`,
      todo: entries.length === 0 ? 'write at least one entry, or leave the key out' : 'shorten the list',
    });
    return z.NEVER;
  }
  const found: T[] = [];
  entries.forEach((entry, index) => {
    const parsed = read(entry);
    if (parsed.ok) found.push(parsed.value);
    else refuse(context, parsed, Array.isArray(raw) ? [index] : []);
  });
  return found;
}

/** One of a few words. */
export function choice<const W extends string>(words: readonly W[], doc: Doc) {
  return field((raw) => readChoice(raw, words), doc, { enum: [...words] });
}

export function readChoice<W extends string>(raw: unknown, words: readonly W[]): Parsed<W> {
  const found = words.find((word) => word === raw);
  if (found !== undefined) return { ok: true, value: found };
  const near = typeof raw === 'string' ? nearest(raw, words) : null;
  return {
    ok: false,
    got: shown(raw),
    expected: `one of: ${words.join(', ')}`,
    todo: near === null ? 'choose one of these words' : `did you mean ${near}?`,
  };
}

/** One scale for all axes, or a list of one each for x, y and z. */
export function scales(doc: Doc) {
  return z
    .unknown()
    .transform((raw, context): readonly [x: number, y: number, z: number] => {
      const list = readList(raw, context, (one) => readQuantity(one, 'scale', {}), KINDS.scale.noun);
      if (list.length === 3) return [list[0]!, list[1]!, list[2]!];
      if (list.length === 1) return [list[0]!, list[0]!, list[0]!];
      const count = Array.isArray(raw) ? raw.length : 0;
      if (count === 2 || count > 3)
        refuse(context, {
          ok: false,
          got: `a list of ${count}`,
          expected: 'one scale, or three: for x, y and z',
          todo: 'write 100.3 % or [100.3 %, 100.3 %, 100 %]',
        });
      return z.NEVER;
    })
    .meta({
      description: shownHow(doc, `${KINDS.scale.noun}, such as ${KINDS.scale.example}`),
      anyOf: [{ type: ['string', 'number'] }, jsonList({ type: ['string', 'number'] })],
    });
}

/** Words, or else a length: the pitch. */
export function choiceOrLength<const W extends string>(words: readonly W[], doc: Doc) {
  return choiceOr(words, 'length', doc, '0.6 mm');
}

/** Words, or else a quantity of a kind. */
export function choiceOr<const W extends string>(
  words: readonly W[],
  kind: KindName,
  doc: Doc,
  example = KINDS[kind].example,
) {
  return field<W | number>(
    (raw) => {
      if (typeof raw === 'string' && !/\d/.test(raw)) {
        const chosen = readChoice(raw, words);
        const { noun } = KINDS[kind];
        return chosen.ok ? chosen : { ...chosen, expected: `${chosen.expected}, or ${noun} such as ${example}` };
      }
      return readQuantity(raw, kind, {});
    },
    shownHow(doc, `one of these words, or ${KINDS[kind].noun} such as ${example}`),
    { anyOf: [{ enum: [...words] }, { type: 'string' }] },
  );
}

/** Words, or else a list of quantities: the spacing of the taps. */
export function choiceOrList<const W extends string>(words: readonly W[], kind: KindName, doc: Doc) {
  return z
    .unknown()
    .transform((raw, context): W | readonly number[] => {
      if (Array.isArray(raw)) return readList(raw, context, (one) => readQuantity(one, kind, {}), KINDS[kind].noun);
      const chosen = readChoice(raw, words);
      if (chosen.ok) return chosen.value;
      refuse(context, { ...chosen, expected: `${chosen.expected}, or a list such as [20 uH, 80 uH, 240 uH]` });
      return z.NEVER;
    })
    .meta({
      description: shownHow(doc, `of a list each is ${KINDS[kind].noun}, such as ${KINDS[kind].example}`),
      anyOf: [{ enum: [...words] }, jsonList({ type: 'string' })],
    });
}

/** A whole number. */
export function count(low: number, high: number, doc: Doc) {
  const read = (raw: unknown): Parsed<number> => {
    if (typeof raw === 'number' && Number.isInteger(raw) && raw >= low && raw <= high) return { ok: true, value: raw };
    return {
      ok: false,
      got: shown(raw),
      expected: `a whole number from ${low} to ${high}`,
      todo:
        typeof raw === 'number' ? 'write a whole number within these limits' : 'write the number alone, without a unit',
    };
  };
  return field(read, doc, { type: 'integer', minimum: low, maximum: high });
}

/** Yes or no. */
export function flag(doc: Doc) {
  const read = (raw: unknown): Parsed<boolean> => {
    if (raw === true || raw === 'yes') return { ok: true, value: true };
    if (raw === false || raw === 'no') return { ok: true, value: false };
    return { ok: false, got: shown(raw), expected: 'true or false', todo: 'write true or false' };
  };
  return field(read, doc, { type: 'boolean' });
}

/** Width and depth. */
export function size(doc: Doc) {
  const read = (raw: unknown) => {
    if (typeof raw === 'string') return parseSize(raw);
    const refused = parseSize('');
    return refused.ok ? refused : { ...refused, got: shown(raw) };
  };
  return field(read, shownHow(doc, howWritten(parseSize(''))), { type: 'string' });
}
