/** What client and worker say to one another. */
import type { FaultExit, FaultParts } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import type { PartFile } from './make.ts';

export interface MakeRequest {
  readonly id: number;
  readonly record: PartsRecord;
  /** Of its parts these; all when left out. */
  readonly named: readonly string[] | undefined;
}

export type MakeReply =
  | { readonly id: number; readonly kind: 'made'; readonly parts: PartFile[] }
  | { readonly id: number; readonly kind: 'fault'; readonly exit: FaultExit; readonly faults: readonly FaultParts[] }
  | { readonly id: number; readonly kind: 'error'; readonly text: string };
