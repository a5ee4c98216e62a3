/** The known word that somebody who mistyped most likely meant. */
import { closest, distance } from 'fastest-levenshtein';

/** Two letters that changed places: one slip to a person, two to the distance. */
const sameLetters = (a: string, b: string) => [...a].sort().join('') === [...b].sort().join('');

/**
 * Null when nothing is near: more than two slips, or more than a third of a longer word; in a word of four letters or
 * fewer one slip, for two make almost any other of them.
 */
export function nearest(word: string, known: readonly string[]): string | null {
  if (known.length === 0 || word.length > 60) return null;
  const plain = word.toLowerCase().replace(/[_ ]+/g, '-');
  const same = known.find((one) => one.toLowerCase().replace(/[_ ]+/g, '-') === plain);
  if (same !== undefined) return same;
  const best = closest(word.toLowerCase(), known as string[]);
  const lower = word.toLowerCase();
  const slips = best.length <= 4 ? 1 : Math.max(2, Math.floor(best.length / 3));
  return distance(lower, best) <= slips || sameLetters(lower, best.toLowerCase()) ? best : null;
}
