/**
 * What a lot takes besides wire and plastic, as far as the records of its kinds name it: tubes and spacers by their own figures,
 * screws, shafts and strips by the words in which a part or a tap is described.
 */
import { BOUGHT } from '../../templates/wording/lot-sheet.ts';
import { lengthsText, lengthText, unitsOf, wireText } from '../quantity/written.ts';
import type { CoilRecord } from '../record/schema.ts';
import { recordOfKind } from './kind-record.ts';
import type { LotRecord } from './schema.ts';

export interface Bought {
  readonly what: string;
  readonly amount: string;
  /** Letters of the kinds that take it. */
  readonly kinds: readonly string[];
}

interface Item {
  readonly what: string;
  /** Pieces, or metres of what is sold by length. */
  readonly amount: number;
  readonly told: (amount: number) => string;
}

const COUNTS: Readonly<Record<string, number>> = { a: 1, an: 1, two: 2, three: 3, four: 4, six: 6 };
const pieces = (amount: number) => BOUGHT.pieces(amount);

/** What the words of a part name, for one piece of it. */
function namedBy(use: string): Item[] {
  const screws = [
    ...use.matchAll(/(?:\b(an?|two|three|four|six) )?(M\d+ x \d+(?: countersunk)?) screws?(?: (and|with) nuts?)?/g),
  ];
  const washer = /\bwasher of ([\d.]+ mm)/.exec(use);
  return [
    ...screws.map(([, count = 'a', size, nut]) => ({
      what: `${size} screw${nut === undefined ? '' : ' and nut'}`,
      amount: COUNTS[count]!,
      told: pieces,
    })),
    ...(washer ? [{ what: BOUGHT.washer(washer[1]!), amount: 1, told: pieces }] : []),
  ];
}

/** What the words of a part name, once however many pieces there are. */
function namedOnce(use: string): Item[] {
  const shaft = /\bshaft of ([\d.]+ mm), ([\d.]+ mm) long/.exec(use);
  return [
    ...(shaft ? [{ what: BOUGHT.shaft(shaft[1]!, shaft[2]!), amount: 1, told: pieces }] : []),
    ...(/rubber band/.test(use) ? [{ what: BOUGHT.band, amount: 1, told: pieces }] : []),
  ];
}

/** What every coil of a kind takes. */
function perCoil(record: CoilRecord): Item[] {
  const { former, tapMethod } = record;
  const winding = record.windings[0]!;
  const units = unitsOf(record);
  const size = { digits: 2, trim: true } as const;
  const found: Item[] = [];
  if (former.kind === 'tube') {
    const across = lengthsText([former.outsideDiameterMm, former.lengthMm], units, ' × ', size);
    found.push({
      what: BOUGHT.tube(former.material, across, lengthText(former.boreDiameterMm, units, size)),
      amount: 1,
      told: pieces,
    });
  }
  if (winding.pitchKind === 'spacer')
    found.push({
      what: BOUGHT.spacer(winding.spacerName),
      amount: winding.wireLengthM,
      told: (metres) => BOUGHT.spacerHow(wireText(Math.ceil(metres), units, units === 'metric' ? 0 : 1)),
    });
  const strip = /\b((?:lug|strip) of .+?), under the turn/.exec(tapMethod.how.join(' '));
  const taps = winding.taps.length - 1 + (winding.unitTaps?.length ?? 0);
  if (strip && taps > 0) found.push({ what: strip[1]!, amount: taps, told: pieces });
  if (former.joints.length > 0) found.push({ what: BOUGHT.glue, amount: 1, told: BOUGHT.formers });
  return found;
}

/** In the order in which the kinds first take it. */
export function boughtFor(lot: Pick<LotRecord, 'kinds' | 'beds'>, kinds: ReadonlyMap<string, CoilRecord>): Bought[] {
  const all = new Map<string, { item: Item; amount: number; kinds: string[] }>();
  const add = (kind: string, item: Item, times: number) => {
    if (times === 0) return;
    const known = all.get(item.what) ?? { item, amount: 0, kinds: [] };
    known.amount += item.amount * times;
    if (!known.kinds.includes(kind)) known.kinds.push(kind);
    all.set(item.what, known);
  };
  for (const { kind, quantity } of lot.kinds)
    for (const item of perCoil(recordOfKind(kinds, kind))) add(kind, item, quantity);
  for (const { kind } of lot.kinds)
    for (const { part, use } of recordOfKind(kinds, kind).parts) {
      const printed = lot.beds.reduce(
        (sum, bed) => sum + bed.count * bed.items.filter((item) => item.kind === kind && item.part === part).length,
        0,
      );
      for (const item of namedBy(use)) add(kind, item, printed);
      for (const item of namedOnce(use)) add(kind, item, Math.min(1, printed));
    }
  return [...all].map(([what, { item, amount, kinds: of }]) => ({ what, amount: item.told(amount), kinds: of }));
}
