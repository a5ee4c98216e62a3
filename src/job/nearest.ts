/** The known word that somebody who mistyped most likely meant. */
import { closest, distance } from 'fastest-levenshtein';

/** Null when nothing is near: more than two slips, or more than a third of the word. */
export function nearest(word: string, known: readonly string[]): string | null {
  if (known.length === 0 || word.length > 60) return null;
  const plain = word.toLowerCase().replace(/[_ ]+/g, '-');
  const same = known.find((one) => one.toLowerCase().replace(/[_ ]+/g, '-') === plain);
  if (same !== undefined) return same;
  const best = closest(word.toLowerCase(), known as string[]);
  return distance(word.toLowerCase(), best) <= Math.max(2, Math.floor(best.length / 3)) ? best : null;
}
