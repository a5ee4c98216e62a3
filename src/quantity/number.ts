/** Numbers as written in a workshop: 76, 76.2, .5, 2e3, 1/4, 3 1/2, 3-1/2. */

export type Reading =
  | { readonly found: 'number'; readonly value: number; readonly unit: string }
  | { readonly found: 'comma'; readonly meant: string }
  | { readonly found: 'zero divisor' }
  | { readonly found: 'nothing' };

const MIXED = /^([+-]?)(\d{1,6})(?: | ?- ?)(\d{1,6}) ?\/ ?(\d{1,6})/;
const FRACTION = /^([+-]?)(\d{1,6}) ?\/ ?(\d{1,6})/;
// A digit must not follow an exponent's e unless it is one: 5 em is not a number with an exponent.
const DECIMAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/;
const COMMA = /^([+-]?\d+),(\d+)(.*)$/;

/** Splits normalised text into a number and what follows it. */
export function readNumber(text: string): Reading {
  const comma = COMMA.exec(text);
  if (comma) return { found: 'comma', meant: `${comma[1]}.${comma[2]}${comma[3]}` };
  const mixed = MIXED.exec(text);
  if (mixed)
    return fraction(mixed[1], Number(mixed[2]), Number(mixed[3]), Number(mixed[4]), text.slice(mixed[0].length));
  const plain = FRACTION.exec(text);
  if (plain) return fraction(plain[1], 0, Number(plain[2]), Number(plain[3]), text.slice(plain[0].length));
  const decimal = DECIMAL.exec(text);
  if (!decimal) return { found: 'nothing' };
  return { found: 'number', value: Number(decimal[0]), unit: text.slice(decimal[0].length).trim() };
}

function fraction(sign: string | undefined, whole: number, over: number, under: number, rest: string): Reading {
  if (under === 0) return { found: 'zero divisor' };
  const value = whole + over / under;
  return { found: 'number', value: sign === '-' ? -value : value, unit: rest.trim() };
}
