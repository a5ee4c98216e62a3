/** Numbers with so many decimals or figures, as sheets, steps and pages print them. */

/** A number with a fixed count of decimals, never `-0`. */
export function fixed(value: number, digits: number): string {
  const text = value.toFixed(digits);
  return Number(text) === 0 ? text.replace('-', '') : text;
}

/** A number with up to `digits` decimals and no zeros at its end: turns, diameters. */
export function short(value: number, digits: number): string {
  return `${Number(value.toFixed(digits))}`;
}

/** About four figures: `20.13`, `240.1`, `0.8712`. */
export function figures(value: number): string {
  const size = Math.abs(value);
  return fixed(value, size >= 1000 ? 0 : size >= 100 ? 1 : size >= 10 ? 2 : size >= 1 ? 3 : 4);
}

/** With its sign, also when it is positive. */
export function signed(value: number, digits: number): string {
  const text = fixed(value, digits);
  return Number(text) > 0 ? `+${text}` : text.replace('-', '−');
}
