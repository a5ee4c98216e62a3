/** A kind of a lot once it is planned. */
import type { CoilRecord } from '../record/schema.ts';
import type { KindToPlan } from './kinds.ts';
import type { Unit } from './work.ts';

export interface PlannedKind extends KindToPlan {
  readonly record: CoilRecord;
  /** Its files on the disk. */
  readonly unit: Unit;
}
