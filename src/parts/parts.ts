/**
 * Every printed part of a record, in the order in which they are listed: what is wanted, part by part, as descriptions.
 * Whatever asks for parts asks here.
 */
import { Fault, type FaultParts } from '../fault.ts';
import type { PartKind } from '../job/job.ts';
import type { PartsRecord } from '../record/schema.ts';
import { arborParts } from './arbor.ts';
import { carriageParts } from './carriage.ts';
import { combParts } from './comb.ts';
import { couponParts } from './coupon.ts';
import { formerParts } from './former.ts';
import { loopGaugeParts } from './loop-gauge.ts';
import { saddleParts } from './saddle.ts';
import { secondParts } from './second.ts';
import type { Solid } from './solid.ts';
import { standParts } from './stand.ts';

const MAKERS: Readonly<Record<PartKind, (record: PartsRecord) => Solid[]>> = {
  former: formerParts,
  'second former': secondParts,
  carriage: carriageParts,
  arbor: arborParts,
  stand: standParts,
  saddle: saddleParts,
  comb: combParts,
  'loop gauge': loopGaugeParts,
  coupon: couponParts,
};

export interface Possible {
  readonly solids: readonly Solid[];
  /** Kinds that cannot be, and why. */
  readonly leftOut: readonly { readonly kind: PartKind; readonly faults: readonly FaultParts[] }[];
}

/**
 * As `partsOf`, but a kind that nobody asked for by name is left out when it cannot be made for this coil.
 * @throws Fault (exit 4) for what was asked for, and for the former
 */
export function possibleParts(record: PartsRecord, asked: ReadonlySet<PartKind>): Possible {
  const leftOut: { kind: PartKind; faults: readonly FaultParts[] }[] = [];
  const solids = record.wanted.flatMap((kind) => {
    try {
      return MAKERS[kind](record);
    } catch (error) {
      if (!(error instanceof Fault) || kind === 'former' || asked.has(kind)) throw error;
      leftOut.push({ kind, faults: error.faults });
      return [];
    }
  });
  return { solids, leftOut };
}

/** @throws Fault (exit 4) that names every dimension that cannot be */
export function partsOf(record: PartsRecord): Solid[] {
  return record.wanted.flatMap((kind) => MAKERS[kind](record));
}
