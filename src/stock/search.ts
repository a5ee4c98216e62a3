/**
 * Narrowing a list of the stock: by words of the name and by a range of diameters.
 */
import { COVERING_WORDS, tidy } from './names.ts';

/** Both ends belong to the range; an end that is left out is open. Millimetres. */
export interface DiameterRange {
  readonly fromMm?: number | undefined;
  readonly toMm?: number | undefined;
}

/** `0.5mm` is two words, and an abbreviation such as `dcc` stands for the words of its covering. */
function words(text: string): readonly string[] {
  return tidy(text)
    .replace(/(\d)(?=[a-z])/g, '$1 ')
    .replace(/([a-z])(?=\d)/g, '$1 ')
    .split(' ')
    .filter((word) => word !== '')
    .flatMap((word) => COVERING_WORDS.get(word)?.split(' ') ?? [word]);
}

/** Numbers match as numbers (`0.50` finds 0.5, not 0.56); other words match the beginning of a word. */
function matches(asked: string, word: string): boolean {
  const number = Number(asked);
  return Number.isNaN(number) ? word.startsWith(asked) : Number(word) === number;
}

/** Those whose name has every word of `filter`, in any order. An empty filter keeps all. */
export function byWords<T extends { readonly name: string }>(stock: readonly T[], filter: string): readonly T[] {
  const asked = words(filter);
  return stock.filter((one) => {
    const own = words(one.name);
    return asked.every((word) => own.some((other) => matches(word, other)));
  });
}

/** Those whose diameter lies within the range. */
export function byDiameter<T>(stock: readonly T[], diameterMm: (one: T) => number, range: DiameterRange): readonly T[] {
  const { fromMm = 0, toMm = Number.POSITIVE_INFINITY } = range;
  return stock.filter((one) => diameterMm(one) >= fromMm && diameterMm(one) <= toMm);
}
