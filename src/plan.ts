/**
 * The pipeline of `plan`, without I/O:
 *
 *     job ──> demand ──> candidates ──> designs ──> chosen coil ──> record ──┬──> winding sheet (PDF)
 *      │    (solve/     (solve/        (solve/     (solve/        (record/   ├──> wrap template, range sheet (PDF)
 *      │     demand)     candidates)    design)     search)        make)     ├──> former (STL, in a worker)
 *      └────────────────────── nothing fits: solve/refusal ──> fault 4       └──> plan.json
 *
 * Everything right of the record reads the record and nothing else. The worker that builds the former warms up while the
 * search runs, and works while the pages are written.
 */
import { createHash } from 'node:crypto';
import type { Job } from './job/job.ts';
import { startKernel } from './kernel/client.ts';
import { makeRecord, partsRecordOf } from './record/make.ts';
import type { CoilRecord } from './record/schema.ts';
import { refusal } from './solve/refusal.ts';
import { type Found, search } from './solve/search.ts';

export interface PlanFile {
  readonly path: string;
  readonly kind: string;
  readonly bytes: Uint8Array;
  /** For people: size and use, printed after the run. */
  readonly note: string;
}

export interface Plan {
  readonly record: CoilRecord;
  /** plan.json first. */
  readonly files: readonly PlanFile[];
}

/** The record alone; throws the fault of exit 4 when nothing fits. */
export function recordOf(job: Job, version: string): CoilRecord {
  return makeRecord(job, foundFor(job), version);
}

function foundFor(job: Job): Found {
  const found = search(job);
  if (!('chosen' in found)) throw refusal(job, found);
  return found;
}

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

/** The record and every file of the output folder. */
export async function planJob(job: Job, options: { version: string }): Promise<Plan> {
  const kernel = job.former.kind === 'printed' ? startKernel() : null;
  try {
    const found = foundFor(job);
    // The parts need no figures at work: they are made while those are worked out.
    const parts = kernel?.make(partsRecordOf(job, found)) ?? Promise.resolve([]);
    // A fault of the worker is reported when it is awaited below, not as an unhandled rejection meanwhile.
    parts.catch(() => undefined);
    const record = makeRecord(job, found, options.version);
    const { windingSheet } = await import('./sheets/winding-sheet.ts');
    const { wrapTemplate } = await import('./sheets/wrap-template.ts');
    const { rangeSheet } = await import('./sheets/range-sheet.ts');
    const sheet = await windingSheet(record);
    const template = await wrapTemplate(record);
    const ranges = await rangeSheet(record);
    const files: PlanFile[] = [
      { path: 'winding-sheet.pdf', kind: 'pdf', bytes: sheet, note: 'to wind from and to check by' },
      { path: 'wrap-template.pdf', kind: 'pdf', bytes: template, note: 'true scale, print at 100 %' },
      { path: 'range-sheet.pdf', kind: 'pdf', bytes: ranges, note: 'what every position tunes, and its figures' },
    ];
    for (const part of await parts) {
      const { boxMm, massG, printNote } = part.report;
      const note = `${boxMm.map((mm) => mm.toFixed(1)).join(' x ')} mm, ${massG.toFixed(0)} g of ${record.former.material}; ${printNote}`;
      files.push({ path: part.path, kind: part.kind, bytes: part.bytes, note });
    }
    const listed = { ...record, files: files.map(({ path, kind, bytes }) => ({ path, kind, sha256: sha256(bytes) })) };
    const json = new TextEncoder().encode(`${JSON.stringify(listed, null, 2)}\n`);
    return { record: listed, files: [{ path: 'plan.json', kind: 'json', bytes: json, note: 'the record' }, ...files] };
  } finally {
    await kernel?.close();
  }
}
