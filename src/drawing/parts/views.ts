/** The views of every part of a record, by part: whatever draws parts asks here. */
import type { PartKind } from '../../job/job.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';

const MAKERS: Partial<
  Record<PartKind, readonly ((record: PartsRecord) => Readonly<Record<string, readonly View[]>>)[]>
> = {};

/** Parts without views of their own are left out; `boxViews` shows those by their size. */
export function viewsOf(record: PartsRecord): ReadonlyMap<string, readonly View[]> {
  const made = record.wanted.flatMap((kind) => (MAKERS[kind] ?? []).map((views) => views(record)));
  return new Map(made.flatMap((views) => Object.entries(views)));
}
