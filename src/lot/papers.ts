/** The papers of a lot, each a file of its own, and loaded only where it is written. */
import type { OutputFile } from '../record/listing.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { LotRecord } from './schema.ts';

type Kinds = ReadonlyMap<string, CoilRecord>;

/** In the order in which they are listed. */
export const LOT_PAPERS = ['travellers', 'lot-sheet', 'labels', 'readings'] as const;
export type LotPaper = (typeof LOT_PAPERS)[number];

export async function paperFile(paper: LotPaper, lot: LotRecord, kinds: Kinds): Promise<OutputFile> {
  switch (paper) {
    case 'travellers': {
      const { travellers } = await import('../sheets/traveller.ts');
      const bytes = await travellers(lot, kinds);
      return { path: 'travellers.pdf', kind: 'pdf', bytes, note: 'a page for each coil, to go with it' };
    }
    case 'lot-sheet': {
      const { lotSheet } = await import('../sheets/lot-sheet.ts');
      const bytes = await lotSheet(lot, kinds);
      return {
        path: 'lot-sheet.pdf',
        kind: 'pdf',
        bytes,
        note: 'the lot: reels, what to buy, beds and runs, materials',
      };
    }
    case 'labels': {
      const { labels } = await import('../sheets/labels.ts');
      return {
        path: 'labels.pdf',
        kind: 'pdf',
        bytes: await labels(lot),
        note: 'for the coils, true scale, print at 100 %',
      };
    }
    case 'readings': {
      const { readingsSheet } = await import('./readings-sheet.ts');
      const bytes = new TextEncoder().encode(readingsSheet(lot, kinds));
      return { path: 'readings.csv', kind: 'csv', bytes, note: 'every reading of every coil, to be filled in' };
    }
  }
}
