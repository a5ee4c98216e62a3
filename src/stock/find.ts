/**
 * From what a person writes to a wire in stock: `24 AWG enamel`, `AWG 24`, `0.5mm grade 2`, `22 AWG DCC`,
 * `20 x 0.1 mm litz single silk`. Free in case, blanks and trade synonyms, strict in everything else: a size or a covering
 * that is not in stock is refused with the nearest that are, never replaced.
 */
import { findLitz } from './findLitz.ts';
import { eitherSide, type FoundWire, type Refusal, refuse } from './found.ts';
import { COVERING_WORDS, nearestCovering, quoted, type SizedText, splitSize, tidy } from './names.ts';
import { allSizes, sizeName } from './size.ts';
import { noSize } from './sizeHint.ts';
import { COVERINGS, type Covering } from './wire.ts';
import { wireNamed } from './wires.ts';

export type { FoundWire, Refusal } from './found.ts';

/** The covering is known, but not this size of it. */
function notStocked(text: string, { series, number }: SizedText, covering: Covering): Refusal {
  const size = sizeName(series, number);
  const stocked = allSizes()
    .filter((one) => one.series === series && wireNamed(`${one.name} ${covering}`) !== undefined)
    .map((one) => ({ name: `${one.name} ${covering}`, value: one.number }));
  const numbers = stocked.map((one) => one.value);
  const range = `${Math.min(...numbers)} to ${sizeName(series, Math.max(...numbers))}`;
  const others = COVERINGS.filter((other) => wireNamed(`${size} ${other}`) !== undefined);
  const kind = series === 'mm' ? 'a metric size of the IEC 60317-0-1 table' : `a whole ${series} number`;
  return refuse(
    quoted(text),
    `${kind}, ${range} in stock as ${covering}`,
    `take ${eitherSide(stocked, number)}${others.length > 0 ? `; ${size} is in stock as ${others.join(', ')}` : ''}`,
  );
}

/** Finds the wire that `text` names. Never throws; nothing outside the stock is ever returned. */
export function findWire(text: string): FoundWire | Refusal {
  const tidied = tidy(text);
  const litz = findLitz(text, tidied);
  if (litz !== undefined) return litz;
  const sized = splitSize(tidied);
  if (sized === undefined) return noSize(text, tidied);
  const size = sizeName(sized.series, sized.number);
  const covering = sized.rest === '' ? 'enamel' : COVERING_WORDS.get(sized.rest);
  if (covering === undefined) {
    return refuse(
      quoted(text),
      'bare, enamel, enamel heavy, single cotton, double cotton, single silk or double silk behind the size',
      `did you mean \`${size} ${nearestCovering(sized.rest)}\`?`,
    );
  }
  const wire = wireNamed(`${size} ${covering}`);
  if (wire === undefined) return notStocked(text, sized, covering);
  return { ok: true, wire, coveringAssumed: sized.rest === '' };
}
