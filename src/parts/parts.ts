/**
 * Every printed part of a record, in the order in which they are listed: what is wanted, part by part, as descriptions.
 * Whatever asks for parts asks here.
 */
import type { PartKind } from '../job/job.ts';
import type { PartsRecord } from '../record/schema.ts';
import { combParts } from './comb.ts';
import { couponParts } from './coupon.ts';
import { formerParts } from './former.ts';
import { loopGaugeParts } from './loop-gauge.ts';
import { saddleParts } from './saddle.ts';
import type { Solid } from './solid.ts';

const MAKERS: Partial<Record<PartKind, (record: PartsRecord) => Solid[]>> = {
  former: formerParts,
  saddle: saddleParts,
  comb: combParts,
  'loop gauge': loopGaugeParts,
  coupon: couponParts,
};

/** @throws Fault (exit 4) that names every dimension that cannot be */
export function partsOf(record: PartsRecord): Solid[] {
  return record.wanted.flatMap((kind) => MAKERS[kind]?.(record) ?? []);
}
