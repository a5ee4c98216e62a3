/** What `plan` and `match` say of the set around the coil: second winding, ranges in the set, which contacts to use for what. */
import { capacitanceText, inductanceText, lengthText, tidy } from '../src/quantity/format.ts';
import type { Around, BestEntry, SecondEntry } from '../src/record/around-schema.ts';
import { contactText } from '../src/record/around-words.ts';
import type { CoilRecord } from '../src/record/schema.ts';
import { list, type Page } from './page.ts';

const share = (value: number) => tidy(Number(value.toFixed(3)));

function secondFact({ kind, turns, wire, coupling, mutualUh, slide, startMm }: SecondEntry): string {
  const loosest = slide?.scale.at(-1);
  const reach =
    loosest === undefined || slide === null
      ? ''
      : `, down to ${share(loosest.coupling)} when moved by ${lengthText(Math.abs(slide.travelMm), 1)}`;
  return `second winding, ${kind}: ${share(turns)} turns of ${wire.name}, start at ${lengthText(startMm, 2)}; coupling ${share(coupling)}${reach}, M ${inductanceText(mutualUh)}`;
}

function connectedFacts({ aerial, detector, best }: Around): string[] {
  const facts: string[] = [];
  if (aerial !== null) facts.push(`aerial, ${aerial.kind}: ${capacitanceText(aerial.capacitancePf)}`);
  if (detector !== null)
    facts.push(
      `detector, ${detector.kind}: ${tidy(detector.resistanceKohm, 4)} kΩ and ${capacitanceText(detector.capacitancePf)}`,
    );
  // Uses that the same contacts serve are told together.
  const uses = new Map<string, BestEntry[]>();
  for (const one of best) {
    const key = `${one.aerial} ${one.detector}`;
    uses.set(key, [...(uses.get(key) ?? []), one]);
  }
  for (const same of uses.values()) {
    const { aerial: at, detector: on, outputDb, off9Db } = same[0]!;
    const output =
      Math.abs(outputDb) < 0.05 ? 'none gives more' : `${tidy(Number(outputDb.toFixed(1)))} dB from the strongest`;
    facts.push(
      `${same.map(({ use }) => use).join(', ')}: aerial on ${contactText(at)}, detector on ${contactText(on)}; ${output}, ${tidy(Number(off9Db.toFixed(1)))} dB left 9 kHz off`,
    );
  }
  return facts;
}

export function showAround({ around }: CoilRecord, page: Page): string[] {
  if (around === undefined) return [];
  const second = around.second === null ? [] : [secondFact(around.second)];
  const heard = around.aerial === null && around.detector === null ? [] : connectedFacts(around);
  return list(page, 'The set around the coil', [...second, ...heard]);
}
