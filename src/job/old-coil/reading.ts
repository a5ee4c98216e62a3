/**
 * A measured value with its uncertainty, as a person writes it: `76.2 mm`, `76.2 mm ± 0.2 mm`, or
 * `{ value: 76.2 mm, uncertainty: 0.2 mm }`. The uncertainty may be a percentage of the value.
 */
import type { KindName } from '../../quantity/kind.ts';
import { KINDS } from '../../quantity/kind.ts';
import { type Allowed, type Parsed, parseQuantity, quote } from '../../quantity/parse.ts';
import { isData } from '../defaults.ts';
import { type Doc, field, shown } from '../field.ts';
import { nearest } from '../nearest.ts';

/** `uncertainty` null: not written, what is usual for the tool is taken. */
export interface Written {
  readonly value: number;
  readonly uncertainty: number | null;
}

/** How one value of a kind is read. */
export type ReadValue = (raw: unknown) => Parsed<number>;

/** Between a value and its uncertainty. */
export const PLUS_MINUS = /\s*(?:±|\+\/-|\+-)\s*/u;

/** Reads a value of a kind, or a plain number of a noun. */
export function valueReader(kind: KindName, allowed: Allowed = {}): ReadValue {
  const { noun, example } = KINDS[kind];
  return (raw) => {
    const text = typeof raw === 'number' && Number.isFinite(raw) ? String(raw) : raw;
    if (typeof text === 'string') return parseQuantity(text, kind, allowed);
    return {
      ok: false,
      got: shown(raw),
      expected: `${noun}, such as ${example}`,
      todo: 'write one number and its unit',
    };
  };
}

/** A number without a unit, within bounds. */
export function plain(low: number, high: number, noun: string, example: string): ReadValue {
  return (raw) => {
    const value = typeof raw === 'string' && /^\d+(?:\.\d+)?$/.test(raw.trim()) ? Number(raw) : raw;
    if (typeof value === 'number' && value >= low && value <= high) return { ok: true, value };
    return {
      ok: false,
      got: shown(raw),
      expected: `${noun}, a number from ${low} to ${high}, without a unit`,
      todo: `write a number, such as ${example}`,
    };
  };
}

/** Half width: of the same kind, 0 too, or a percentage of the value. */
function halfWidth(raw: unknown, value: number, read: ReadValue): Parsed<number> {
  const text = typeof raw === 'number' ? String(raw) : raw;
  if (typeof text === 'string' && /%|percent/.test(text)) {
    const share = parseQuantity(text, 'ratio', { zero: true });
    return share.ok ? { ok: true, value: share.value * Math.abs(value) } : share;
  }
  if (typeof text === 'string' && /^\s*0(?:\.0*)?(?:\s*[a-zA-Z%°]+)?\s*$/.test(text)) return { ok: true, value: 0 };
  // A half width may be smaller than any value that makes sense.
  const own = typeof text === 'string' ? smaller(text, read) : read(text);
  if (own.ok) return own;
  return {
    ...own,
    got: `${own.got}, as an uncertainty`,
    expected: `half of the 95 % limits, in the unit of the value or as a percentage`,
    todo: 'write uncertainty: 0.2 mm, or 0.5 %',
  };
}

/** Read a thousand times as large, because what bounds a value does not bound its uncertainty. */
function smaller(text: string, read: ReadValue): Parsed<number> {
  const own = read(text);
  const number = /^\s*(\d*\.?\d+)(.*)$/s.exec(text);
  if (own.ok || number === null) return own;
  const larger = read(`${Number((Number(number[1]) * 1000).toPrecision(12))}${number[2]}`);
  return larger.ok ? { ok: true, value: larger.value / 1000 } : own;
}

/** A reading, with keys besides that `more` names and reads. */
export function readWritten(raw: unknown, read: ReadValue, noun: string): Parsed<Written> {
  if (isData(raw)) {
    const strange = Object.keys(raw).find((key) => key !== 'value' && key !== 'uncertainty');
    if (strange !== undefined || !Object.hasOwn(raw, 'value')) {
      const near = strange === undefined ? null : nearest(strange, ['value', 'uncertainty']);
      return {
        ok: false,
        got: strange === undefined ? 'a group of keys without value' : `the key ${quote(strange)}`,
        expected: `${noun}, alone or as { value, uncertainty }`,
        todo: near === null ? 'write value and, when it is known, uncertainty' : `did you mean ${near}?`,
      };
    }
    const value = read(raw.value);
    if (!value.ok) return value;
    if (raw.uncertainty === undefined || raw.uncertainty === null)
      return { ok: true, value: { value: value.value, uncertainty: null } };
    const half = halfWidth(raw.uncertainty, value.value, read);
    return half.ok ? { ok: true, value: { value: value.value, uncertainty: half.value } } : half;
  }
  if (typeof raw === 'string' && PLUS_MINUS.test(raw)) {
    const [first = '', second = '', ...rest] = raw.split(PLUS_MINUS);
    const unit = /[\d.]\s*([a-zA-Z"µΩ°].*)$/u.exec(second)?.[1] ?? '';
    // 76.2 ± 0.2 mm: the unit stands behind both.
    const both = /[a-zA-Z"%°]/.test(first) ? first : `${first} ${unit}`;
    const value = read(/[a-zA-Z"]/.test(unit) ? both : first);
    if (!value.ok || rest.length > 0) return value.ok ? (read(raw) as Parsed<never>) : value;
    const half = halfWidth(second, value.value, read);
    return half.ok ? { ok: true, value: { value: value.value, uncertainty: half.value } } : half;
  }
  const value = read(raw);
  return value.ok ? { ok: true, value: { value: value.value, uncertainty: null } } : value;
}

const json = (type: string | string[], how: string) => ({
  anyOf: [
    { type },
    {
      type: 'object',
      properties: {
        value: { type, description: `What was measured: ${how}.` },
        uncertainty: {
          type: ['string', 'number'],
          description:
            'Half of the 95 % limits, in the unit of the value or as a percentage such as 0.5 %; what is usual for the tool when left out.',
        },
      },
      required: ['value'],
      additionalProperties: false,
    },
  ],
});

/** A field of a measured quantity. */
export function reading(kind: KindName, doc: Doc, allowed: Allowed = {}) {
  const { noun, example } = KINDS[kind];
  return field(
    (raw) => readWritten(raw, valueReader(kind, allowed), noun),
    `${doc} ${noun.charAt(0).toUpperCase()}${noun.slice(1)}, such as ${example}; or with ± and its uncertainty.`,
    json('string', `${noun}, such as ${example}`),
  );
}

/** A field of a measured plain number. */
export function plainReading(read: ReadValue, noun: string, doc: Doc) {
  return field(
    (raw) => readWritten(raw, read, noun),
    doc,
    json(['number', 'string'], `${noun}, a number without a unit`),
  );
}
