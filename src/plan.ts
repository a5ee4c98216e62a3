/**
 * The pipeline of `plan`, without I/O:
 *
 *     job ──> demand ──> candidates ──> designs ──> chosen coil ──> record ──┬──> winding sheet (PDF)
 *      │    (solve/     (solve/        (solve/     (solve/        (record/   ├──> wrap template, range sheet (PDF), netlist
 *      │     demand)     candidates)    design)     search)        make)     ├──> hole pattern (SVG, DXF), former (STL, in a worker)
 *      └────────────────────── nothing fits: solve/refusal ──> fault 4       └──> plan.json
 *
 * Everything right of the record reads the record and nothing else. The worker that builds the former warms up while the
 * search runs, and works while the pages are written.
 */
import type { Job } from './job/job.ts';
import { startKernel } from './kernel/client.ts';
import { netlistFile } from './netlist/file.ts';
import { listed, type Output, type OutputFile } from './record/listing.ts';
import { makeRecord, partsRecordOf } from './record/make.ts';
import type { CoilRecord } from './record/schema.ts';
import { refusal } from './solve/refusal.ts';
import { type Found, search } from './solve/search.ts';

/** The record alone; throws the fault of exit 4 when nothing fits. */
export function recordOf(job: Job, version: string): CoilRecord {
  return makeRecord(job, foundFor(job), version);
}

function foundFor(job: Job): Found {
  const found = search(job);
  if (!('chosen' in found)) throw refusal(job, found);
  return found;
}

/** The record and every file of the output folder. */
export async function planJob(job: Job, options: { version: string }): Promise<Output<CoilRecord>> {
  const kernel = startKernel();
  try {
    const found = foundFor(job);
    // The parts need no figures at work: they are made while those are worked out.
    const parts = kernel.make(partsRecordOf(job, found));
    // A fault of the worker is reported when it is awaited below, not as an unhandled rejection meanwhile.
    parts.catch(() => undefined);
    const record = makeRecord(job, found, options.version);
    const { windingSheet } = await import('./sheets/winding-sheet.ts');
    const { wrapTemplate } = await import('./sheets/wrap-template.ts');
    const { rangeSheet } = await import('./sheets/range-sheet.ts');
    const { holePatternFiles } = await import('./sheets/hole-pattern.ts');
    const sheet = await windingSheet(record);
    const template = await wrapTemplate(record);
    const ranges = await rangeSheet(record);
    const files: OutputFile[] = [
      { path: 'winding-sheet.pdf', kind: 'pdf', bytes: sheet, note: 'to wind from and to check by' },
      { path: 'wrap-template.pdf', kind: 'pdf', bytes: template, note: 'true scale, print at 100 %' },
      ...holePatternFiles(record),
      { path: 'range-sheet.pdf', kind: 'pdf', bytes: ranges, note: 'what every position tunes, and its figures' },
      netlistFile(record),
    ];
    for (const { part, path, kind, bytes } of await parts) {
      const { sizeMm, massG, material, quantity, printNote } = record.parts.find((one) => one.part === part)!;
      const note = `${quantity > 1 ? `${quantity} of ` : ''}${sizeMm.map((mm) => mm.toFixed(1)).join(' x ')} mm, ${massG.toFixed(0)} g of ${material}; ${printNote}`;
      files.push({ path, kind, bytes, note });
    }
    return listed(record, files);
  } finally {
    await kernel.close();
  }
}
