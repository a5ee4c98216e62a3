/** Text in columns: wrapping and numbers as the sheets print them. */
import type { Measure } from '../drawing/boxes.ts';

/** A word that is wider than the column, cut into pieces that are not. */
function pieces(word: string, widthMm: number, sizeMm: number, bold: boolean, measure: Measure): string[] {
  const found: string[] = [];
  let piece = '';
  for (const sign of word) {
    if (piece !== '' && measure.width(piece + sign, sizeMm, bold) > widthMm) {
      found.push(piece);
      piece = '';
    }
    piece += sign;
  }
  return [...found, piece];
}

/** The lines of a text in a column; never wider than it. At least one line, which may be empty. */
export function wrap(text: string, widthMm: number, sizeMm: number, bold: boolean, measure: Measure): string[] {
  const lines: string[] = [];
  for (const paragraph of text.split('\n')) {
    let line = '';
    for (const word of paragraph.split(/\s+/).filter((each) => each !== '')) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (measure.width(longer, sizeMm, bold) <= widthMm) {
        line = longer;
        continue;
      }
      if (line !== '') lines.push(line);
      const parts = pieces(word, widthMm, sizeMm, bold, measure);
      lines.push(...parts.slice(0, -1));
      line = parts[parts.length - 1]!;
    }
    lines.push(line);
  }
  return lines;
}

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

/** With a capital first and a full stop last. */
export function sentence(text: string): string {
  const whole = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(whole) ? whole : `${whole}.`;
}
