/** A cell to a figure in the unit of its quantity; a decimal comma is taken as one, which job files refuse. */
import type { KindName } from '../quantity/kind.ts';
import { normalise } from '../quantity/normalise.ts';
import { parseQuantity, quote } from '../quantity/parse.ts';
import { type Unit, unitOf, type What } from './read-words.ts';

export type Figure =
  | { readonly ok: true; readonly value: number }
  | {
      readonly ok: false;
      readonly code: string;
      readonly got: string;
      readonly expected: string;
      readonly todo: string;
    };

const KIND: Readonly<Record<Exclude<What, 'turns' | 'other'>, KindName>> = {
  diameter: 'length',
  length: 'length',
  resistance: 'resistance',
  inductance: 'inductance',
  resonance: 'frequency',
  'probed resonance': 'frequency',
  width: 'width',
  dial: 'frequency',
};

/** Cells that say that nothing was measured. */
export const isMissing = (cell: string): boolean => /^[-–—.\s]*$/.test(cell);

/** Digits in groups parted by spaces, with a point or one comma before the decimals, and what follows. */
const FIGURE = /^([+-]?\d{1,3}(?: \d{3})+|[+-]?\d*)(?:[.,](\d+))?(e[+-]?\d+)?(.*)$/i;

/** More turns are on no coil. */
const MOST_TURNS = 1e5;

/**
 * `98.2`, `98,2`, `98.2 uH`, `3 1/2 in`. The unit in the cell goes before `unit`, that of its column. A comma is never a mark
 * between thousands: the reading is then far off, which is told.
 */
export function figureOf(cell: string, what: What, unit: Unit | null): Figure {
  const text = normalise(cell);
  if (what === 'turns' || what === 'other') return plainFigure(text, what);
  const [, whole = '', part, power = '', after = ''] = FIGURE.exec(text) ?? [];
  const fraction = /^ ?-? ?\d+ ?\//.test(after) || after.startsWith('/');
  const number = fraction || whole + (part ?? '') === '' ? null : `${whole.replaceAll(' ', '')}.${part ?? '0'}${power}`;
  const own = number === null ? '' : after.trim();
  const spelled = own === '' ? null : (unitOf(own)?.name ?? own);
  const plain = number === null ? text : `${number} ${spelled ?? unit?.name ?? ''}`.trim();
  const parsed = parseQuantity(
    number === null && unit !== null && /\d$/.test(text) ? `${text} ${unit.name}` : plain,
    KIND[what],
  );
  if (parsed.ok) return { ok: true, value: parsed.value };
  const { expected, todo } = parsed;
  // As it stands in the file, not as it was put together for the parser.
  const got = number === null ? parsed.got : parsed.got.replace(quote(plain), quote(cell));
  return { ok: false, code: number === null ? 'no-number' : 'figure-refused', got, expected, todo };
}

/** A count of turns, or what has no kind of its own. */
function plainFigure(text: string, what: 'turns' | 'other'): Figure {
  const [, whole = '', part = '0', power = '', after = ''] = FIGURE.exec(text) ?? [];
  const value = whole === '' ? Number.NaN : Number(`${whole.replaceAll(' ', '')}.${part}${power}`);
  const unit = after.trim();
  const fits = what === 'other' ? /^[a-zA-Z%]*$/.test(unit) : unit === '' || unitOf(unit)?.kind === 'turns';
  if (Number.isFinite(value) && value > 0 && value <= MOST_TURNS && fits) return { ok: true, value };
  const expected = what === 'turns' ? 'a count of turns, such as 24 or 24.5' : 'a figure above 0';
  return { ok: false, code: 'no-number', got: quote(text), expected, todo: 'write the number alone' };
}
