/**
 * The words in which the trade asks for wire: coverings with their synonyms, sizes, numbers. Everything is lower case with
 * single blanks, as {@link tidy} leaves it.
 */

import { closest } from 'fastest-levenshtein';
import { quote } from '../quantity/parse.ts';
import type { Series } from './size.ts';
import type { Covering } from './wire.ts';

/** Every accepted writing of a covering on solid wire. */
export const COVERING_WORDS: ReadonlyMap<string, Covering> = new Map<string, Covering>([
  ['bare', 'bare'],
  ['bare copper', 'bare'],
  ['enamel', 'enamel'],
  ['enamelled', 'enamel'],
  ['enameled', 'enamel'],
  ['grade 1', 'enamel'],
  ['single build', 'enamel'],
  ['enamel grade 1', 'enamel'],
  ['enamel single build', 'enamel'],
  ['enamel heavy', 'enamel heavy'],
  ['heavy enamel', 'enamel heavy'],
  ['grade 2', 'enamel heavy'],
  ['heavy build', 'enamel heavy'],
  ['enamel grade 2', 'enamel heavy'],
  ['enamel heavy build', 'enamel heavy'],
  ['single cotton', 'single cotton'],
  ['single cotton covered', 'single cotton'],
  ['scc', 'single cotton'],
  ['double cotton', 'double cotton'],
  ['double cotton covered', 'double cotton'],
  ['dcc', 'double cotton'],
  ['single silk', 'single silk'],
  ['single silk covered', 'single silk'],
  ['ssc', 'single silk'],
  ['double silk', 'double silk'],
  ['double silk covered', 'double silk'],
  ['dsc', 'double silk'],
]);

/** Lower case, `×` as `x`, every run of blanks as one. */
export function tidy(text: string): string {
  return text.normalize('NFKC').toLowerCase().replaceAll('×', 'x').replace(/\s+/g, ' ').trim();
}

/** A size and what is written behind it. */
export interface SizedText {
  readonly series: Series;
  /** As a number, so that `0.50 mm` is `0.5 mm`. */
  readonly number: number;
  readonly rest: string;
}

const GAUGE_BEHIND = /^(\d+(?:\.\d+)?) ?(awg|swg)\b ?(.*)$/;
const GAUGE_BEFORE = /^(awg|swg) ?(\d+(?:\.\d+)?)(?: (.*))?$/;
const MILLIMETRES = /^(\d+(?:\.\d+)?|\.\d+) ?mm\b ?(.*)$/;

const gauge = (word: string): Series => (word === 'awg' ? 'AWG' : 'SWG');

/** Splits a size off the front of a tidy text; undefined when none stands there. */
export function splitSize(text: string): SizedText | undefined {
  const behind = GAUGE_BEHIND.exec(text);
  if (behind !== null) return { series: gauge(behind[2]!), number: Number(behind[1]), rest: behind[3]! };
  const before = GAUGE_BEFORE.exec(text);
  if (before !== null) return { series: gauge(before[1]!), number: Number(before[2]), rest: before[3] ?? '' };
  const metric = MILLIMETRES.exec(text);
  if (metric !== null) return { series: 'mm', number: Number(metric[1]), rest: metric[2]! };
  return undefined;
}

/** The covering that `words` most likely mean: one that contains them (`silk`), else the one written most like them. */
export function nearestCovering(words: string): Covering {
  const writings = [...COVERING_WORDS.keys()];
  const containing = writings.filter((writing) => ` ${writing} `.includes(` ${words} `));
  return COVERING_WORDS.get(closest(words, containing.length > 0 ? containing : writings))!;
}

/** The unit of size nearest to `word`. */
export function nearestSeries(word: string): Series {
  const found = closest(word, ['awg', 'swg', 'mm']);
  return found === 'mm' ? 'mm' : gauge(found);
}

/** Long input is cut, so that a message stays readable. */
export const quoted = quote;
