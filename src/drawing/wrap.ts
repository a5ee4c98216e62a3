/** Text in columns: where its lines end. */
import type { Measure } from './boxes.ts';

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
