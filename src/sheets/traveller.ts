/**
 * Travellers: a page that goes with each coil of a lot from the reel to the shelf, after a contents that leads to them. They read
 * the record of the lot and those of its kinds and nothing else: same records, same bytes. What coils of a kind share is laid out
 * once, and pages are made while they are written, so that memory does not grow with the lot.
 */
import { TRAVELLER } from '../../templates/wording/lot-traveller.ts';
import type { Measure } from '../drawing/boxes.ts';
import { recordOfKind } from '../lot/kind-record.ts';
import type { LotRecord } from '../lot/schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Page, Paper } from './page.ts';
import { frameOf } from './sheet-frame.ts';
import { contentsPages } from './traveller-contents.ts';
import { coilPages, type KindPages, kindPages } from './traveller-kind.ts';

type Kinds = ReadonlyMap<string, CoilRecord>;

function allKinds(lot: LotRecord, kinds: Kinds, measure: Measure): Map<string, KindPages> {
  return new Map(
    lot.kinds.map((kind) => {
      const spools = new Set(lot.coils.filter((coil) => coil.kind === kind.kind).map(({ spool }) => spool));
      return [kind.kind, kindPages(lot, kind, recordOfKind(kinds, kind.kind), spools, measure)];
    }),
  );
}

/**
 * The pages as drawings, the contents first, each made when it is asked for.
 * @param kinds the record of each kind by its letter
 * @throws Error where a coil's kind has no record or no line in the lot
 */
export function* layOutTravellers(lot: LotRecord, kinds: Kinds, measure: Measure): Generator<Page> {
  const known = allKinds(lot, kinds, measure);
  const of = (kind: string) => {
    const found = known.get(kind);
    if (found === undefined) throw new Error(`kind ${kind} is not among the kinds of the lot`);
    return found;
  };
  const sheets = lot.coils.map(({ kind }) => of(kind).pages.length);
  const contents = contentsPages(lot, sheets, measure);
  const total = contents.length + sheets.reduce((sum, count) => sum + count, 0);
  yield* contents;
  let first = contents.length + 1;
  for (const [i, coil] of lot.coils.entries()) {
    yield* coilPages(lot, of(coil.kind), coil, first, (page) => TRAVELLER.page(page, total), measure);
    first += sheets[i]!;
  }
}

export { frameOf as travellerFrame };

/** The travellers piece by piece, for lots of any length: what is given to `take` is not kept. */
export async function streamTravellers(lot: LotRecord, kinds: Kinds, take: (chunk: Uint8Array) => void): Promise<void> {
  const paper = new Paper({
    title: `${TRAVELLER.all}: ${lot.lot}`,
    subject: TRAVELLER.record(lot.hash.slice(0, 12)),
  });
  await paper.stream(layOutTravellers(lot, kinds, paper), take);
}

/** The travellers of a lot as the bytes of one PDF. */
export async function travellers(lot: LotRecord, kinds: Kinds): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  await streamTravellers(lot, kinds, (chunk) => chunks.push(chunk));
  return Buffer.concat(chunks);
}
