/** The views of every part of a record, by part: whatever draws parts asks here. */
import type { PartKind } from '../../job/job.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { arborViews } from './arbor-views.ts';
import { carriageViews } from './carriage-views.ts';
import { combViews } from './comb-views.ts';
import { couponViews } from './coupon-views.ts';
import { formerViews } from './former-views.ts';
import { loopGaugeViews } from './loop-gauge-views.ts';
import { saddleViews } from './saddle-views.ts';
import { secondViews } from './second-views.ts';
import { standViews } from './stand-views.ts';

const MAKERS: Partial<Record<PartKind, (record: PartsRecord) => Readonly<Record<string, readonly View[]>>>> = {
  former: formerViews,
  'second former': secondViews,
  carriage: carriageViews,
  arbor: arborViews,
  stand: standViews,
  saddle: saddleViews,
  comb: combViews,
  'loop gauge': loopGaugeViews,
  coupon: couponViews,
};

/** Parts without views of their own are left out; `boxViews` shows those by their size. */
export function viewsOf(record: PartsRecord): ReadonlyMap<string, readonly View[]> {
  return new Map(record.wanted.flatMap((kind) => Object.entries(MAKERS[kind]?.(record) ?? {})));
}
