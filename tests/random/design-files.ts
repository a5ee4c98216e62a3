/** All outputs of a random design, read back. */
import type { Kernel } from '../../src/kernel/client.ts';
import { makeBed, makePart, pictured } from '../../src/kernel/make.ts';
import type { OutputFile } from '../../src/record/listing.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import type { Claims } from '../plain/claims.ts';
import { fileClaims } from '../plain/files.ts';
import { plainCoilOf } from '../plain/winding.ts';
import { sheetFaults } from './sheets.ts';

/** The parts in this thread, one after the other: children are threads enough. */
export const kernelHere = (): Kernel => ({
  part: async (solid, scale) => pictured(await makePart(solid, scale)),
  bed: async (order) => makeBed(order),
  close: async () => undefined,
});

export async function wholeClaims(claims: Claims, record: CoilRecord, files: readonly OutputFile[]): Promise<void> {
  await fileClaims(claims, record, files, plainCoilOf(record));
  claims.faults.push(...sheetFaults(record).faults);
}
