/** Litz by name: `20 x 0.1 mm litz single silk`, `20x0.1 mm litz`, `7 x 40 AWG litz DSC`. */
import { closest } from 'fastest-levenshtein';
import { eitherSide, type FoundWire, type Refusal, refuse } from './found.ts';
import {
  allStrands,
  LITZ_BUNDLE_MOST_MM,
  LITZ_STRAND_MOST_MM,
  LITZ_STRANDS,
  type LitzCovering,
  litzWire,
} from './litz.ts';
import { quoted, type SizedText, splitSize } from './names.ts';
import { sizeName } from './size.ts';

const WORDS: ReadonlyMap<string, LitzCovering> = new Map<string, LitzCovering>([
  ['litz', 'litz single silk'],
  ['litz single silk', 'litz single silk'],
  ['litz single silk covered', 'litz single silk'],
  ['litz ssc', 'litz single silk'],
  ['single silk litz', 'litz single silk'],
  ['litz double silk', 'litz double silk'],
  ['litz double silk covered', 'litz double silk'],
  ['litz dsc', 'litz double silk'],
  ['double silk litz', 'litz double silk'],
]);

const EXPECTED = 'strands, size and serving, such as `20 x 0.1 mm litz single silk`';

function noStrand(text: string, count: number, { series, number }: SizedText): Refusal {
  const offered = allStrands()
    .filter((strand) => strand.size.series === series)
    .map((strand) => ({ name: `${count} x ${strand.name} litz single silk`, value: strand.size.number }));
  return refuse(
    quoted(text),
    `a strand that is in stock enamelled, up to ${LITZ_STRAND_MOST_MM} mm`,
    `take ${eitherSide(offered, number)}, the nearest in stock`,
  );
}

/** Undefined when the text does not speak of litz at all. */
export function findLitz(text: string, tidied: string): FoundWire | Refusal | undefined {
  const counted = /^(\d+) ?x ?(.*)$/.exec(tidied);
  if (counted === null) {
    if (!/\blitz\b/.test(tidied)) return undefined;
    return refuse(quoted(text), EXPECTED, 'put the number of strands and `x` before the size');
  }
  const count = Number(counted[1]);
  const sized = splitSize(counted[2]!);
  if (sized === undefined)
    return refuse(quoted(text), EXPECTED, 'write the size of a strand in mm, AWG or SWG behind `x`');
  if (count < LITZ_STRANDS.least || count > LITZ_STRANDS.most) {
    return refuse(
      quoted(text),
      `${LITZ_STRANDS.least} to ${LITZ_STRANDS.most} strands`,
      'change the number of strands, or take solid wire',
    );
  }
  const size = sizeName(sized.series, sized.number);
  const covering = WORDS.get(sized.rest);
  if (covering === undefined) {
    const nearest = WORDS.get(closest(sized.rest, [...WORDS.keys()]))!;
    return refuse(
      quoted(text),
      'litz single silk or litz double silk behind the size of a strand',
      `did you mean \`${count} x ${size} ${nearest}\`?`,
    );
  }
  const strand = allStrands().find((one) => one.name === size);
  if (strand === undefined) return noStrand(text, count, sized);
  const wire = litzWire(count, strand, covering);
  if (wire.bareMm > LITZ_BUNDLE_MOST_MM) {
    return refuse(
      quoted(text),
      `a bundle up to ${LITZ_BUNDLE_MOST_MM} mm; this one has ${wire.bareMm.toFixed(2)} mm`,
      'take fewer or thinner strands',
    );
  }
  return { ok: true, wire, coveringAssumed: sized.rest === 'litz' };
}
