/**
 * Words with lengths in them, kept apart from what a length is written as: a sheet in inches and one in millimetres are drawn
 * from the same view.
 */
import type { View } from './views.ts';

/** A length in words, in millimetres. */
export interface Length {
  readonly mm: number;
}
export type Piece = string | Length;
/** What may be said of a part: plain words, one length, or words with lengths between them. */
export type Wording = string | Length | readonly Piece[];

/** Millimetres to a hundredth, without noughts at the end. */
export const mmText = (mm: number): string => `${Number(mm.toFixed(2))}`;

const piecesOf = (wording: Wording | number): readonly Piece[] => {
  if (typeof wording === 'number') return [`${wording}`];
  return typeof wording === 'string' || 'mm' in wording ? [wording] : wording;
};

/** A template whose lengths stay lengths: `said`groove ${mm(0.3)} deep``. Plain numbers are counts and stay as they are. */
export function said(strings: TemplateStringsArray, ...values: readonly (Wording | number)[]): readonly Piece[] {
  const found: Piece[] = [];
  const add = (piece: Piece) => {
    const last = found.at(-1);
    if (piece === '') return;
    if (typeof piece === 'string' && typeof last === 'string') found[found.length - 1] = last + piece;
    else found.push(piece);
  };
  strings.forEach((text, i) => {
    if (i > 0) piecesOf(values[i - 1]!).forEach(add);
    add(text);
  });
  return found;
}

const written = (pieces: readonly Piece[], length: (mm: number) => string): string =>
  pieces.map((piece) => (typeof piece === 'string' ? piece : length(piece.mm))).join('');

/** The words in millimetres, and the pieces that other units are written from where there are lengths in them. */
export function worded(wording: Wording): { readonly text: string; readonly pieces?: readonly Piece[] } {
  const pieces = piecesOf(wording);
  const text = written(pieces, mmText);
  return pieces.some((piece) => typeof piece !== 'string') ? { text, pieces } : { text };
}

/** The same view with its lengths written otherwise. */
export function reworded(view: View, length: (mm: number) => string): View {
  const dimensions = view.dimensions.map((each) =>
    each.pieces === undefined ? each : { ...each, text: written(each.pieces, length) },
  );
  return { ...view, dimensions };
}
