/** Two quantities in one text: a range `20 uH to 240 uH`, `60 to 90 mm`, or a size `220 x 220 mm`. */
import { KINDS, type KindName } from './kind.ts';
import { normalise } from './normalise.ts';
import { type Parsed, parseQuantity, quote, type Range } from './parse.ts';

/** Longest text that is looked at: runs of blanks are gone through again from each of them. */
const LONGEST = 200;

const BETWEEN = / *(?:\bto\b|(?<=\d)to(?=\d)|\.\.\.?|\u2026|[\u2013\u2014]) */u;
/** A number that waits for the unit behind the second one. */
const UNITLESS = /^[+-]?[\d./ -]+(?:[eE][+-]?\d+)?$/;

/** Whether the text is meant as a range. */
export function isRange(written: string): boolean {
  return written.length <= LONGEST && BETWEEN.test(written);
}

/** A range, low end first; `60 to 90 mm` gives both ends the unit. Ends must differ. */
export function parseRange(written: string, kind: KindName): Parsed<Range> {
  const { noun, offered } = KINDS[kind];
  const unit = offered[0] ?? '';
  const expected = `a range of ${noun.replace(/^an? /, '')}, such as ${sample(kind)}`;
  const parts = pair(written, BETWEEN);
  if (parts === null) {
    return {
      ok: false,
      got: quote(written),
      expected,
      todo: `write both ends with "to" between them and their unit, ${unit}`,
    };
  }
  const low = parseQuantity(parts[0], kind);
  if (!low.ok) return { ...low, got: `${low.got} (lower end of ${quote(written)})` };
  const high = parseQuantity(parts[1], kind);
  if (!high.ok) return { ...high, got: `${high.got} (upper end of ${quote(written)})` };
  if (low.value > high.value) {
    return {
      ok: false,
      got: `${quote(written)}, whose first end lies above its second`,
      expected,
      todo: 'write the lower end first',
    };
  }
  if (low.value === high.value) {
    return {
      ok: false,
      got: `${quote(written)}, whose ends are equal`,
      expected,
      todo: 'write two different ends, or one value alone where one will do',
    };
  }
  return { ok: true, value: { low: low.value, high: high.value } };
}

/** Width and depth, `220 x 220 mm`, in mm. */
export function parseSize(written: string): Parsed<{ readonly x: number; readonly y: number }> {
  const parts = pair(normalise(written), / *(?<=[\d" ]|[a-z])x(?=[ \d.]) */u);
  if (parts === null) {
    return {
      ok: false,
      got: quote(written),
      expected: 'a width and a depth, such as 220 x 220 mm',
      todo: 'write both with x between them',
    };
  }
  const x = parseQuantity(parts[0], 'length');
  if (!x.ok) return x;
  const y = parseQuantity(parts[1], 'length');
  return y.ok ? { ok: true, value: { x: x.value, y: y.value } } : y;
}

/** Splits once; the first part borrows the unit of the second when it has none. Null when there are not two parts. */
function pair(written: string, between: RegExp): readonly [string, string] | null {
  if (written.length > LONGEST) return null;
  const parts = written.split(between);
  if (parts.length !== 2 || parts[0] === undefined || parts[1] === undefined) return null;
  const first = normalise(parts[0]);
  const second = normalise(parts[1]);
  const unit = /[^\d./ +-].*$/u.exec(second.replace(/^[+-]?[\d.]+[eE][+-]?\d+/, ''))?.[0];
  return [UNITLESS.test(first) && unit !== undefined ? `${first} ${unit}` : first, second];
}

function sample(kind: KindName): string {
  const samples: Readonly<Record<KindName, string>> = {
    length: '60 mm to 90 mm',
    inductance: '20 uH to 240 uH',
    capacitance: '15 pF to 380 pF',
    frequency: '530 kHz to 1700 kHz',
    width: '2 kHz to 5 kHz',
    ratio: '5 % to 10 %',
    scale: '100 % to 100.5 %',
    resistance: '1 ohm to 5 ohm',
    angle: '0 deg to 90 deg',
    temperature: '0 degC to 40 degC',
    mass: '20 g to 40 g',
    wire: '10 m to 20 m',
    height: '5 m to 10 m',
  };
  return samples[kind];
}
