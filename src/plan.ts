/**
 * The pipeline of `plan`, without I/O:
 *
 *     job ──> demand ──> candidates ──> designs ──> chosen coil ──> record ──┬──> winding sheet (PDF)
 *      │    (solve/     (solve/        (solve/     (solve/        (record/   ├──> wrap template, reference sheet, range plate (PDF), netlist
 *      │     demand)     candidates)    design)     search)        make)     ├──> hole pattern (SVG, DXF), former (STL, in a worker)
 *      └────────────────────── nothing fits: solve/refusal ──> fault 4       └──> plan.json
 *
 * Everything right of the record reads the record and nothing else. The worker that builds the former warms up while the
 * search runs, and works while the pages are written.
 */
import type { Job } from './job/job.ts';
import { type Kernel, type PicturedPart, startKernel } from './kernel/client.ts';
import { bedFiles, partFiles } from './kernel/files.ts';
import { netlistFile } from './netlist/file.ts';
import { setNetlistFiles } from './netlist/set.ts';
import { listed, type Output, type OutputFile } from './record/listing.ts';
import { makeRecord, printedOf, type RecordExtra } from './record/make.ts';
import type { CoilRecord } from './record/schema.ts';
import { refusal } from './solve/refusal.ts';
import { type Found, search } from './solve/search.ts';
import { withSecond } from './solve/second.ts';

/** The record alone; throws the fault of exit 4 when nothing fits. */
export function recordOf(job: Job, version: string): CoilRecord {
  return makeRecord(job, foundFor(job), version);
}

function foundFor(job: Job): Found {
  const found = search(job);
  if (!('chosen' in found)) throw refusal(job, found);
  return withSecond(job, found);
}

/** What is wrapped round a former or laid on it; nothing round ribs, whose holes are printed and between which is air. */
async function surfaceFiles(record: CoilRecord): Promise<OutputFile[]> {
  if (record.former.ribs !== null) return [];
  const { wrapTemplate } = await import('./sheets/wrap-template.ts');
  const { holePatternFiles } = await import('./sheets/hole-pattern.ts');
  const bytes = await wrapTemplate(record);
  return [
    { path: 'wrap-template.pdf', kind: 'pdf', bytes, note: 'true scale, print at 100 %' },
    ...holePatternFiles(record),
  ];
}

/** The sheet of the printed parts; none when nothing is printed. */
async function partsSheetFile(record: CoilRecord, made: readonly PicturedPart[]): Promise<OutputFile[]> {
  if (made.length === 0) return [];
  const { partsSheet } = await import('./sheets/parts-sheet.ts');
  const bytes = await partsSheet(record, new Map(made.map(({ part, pictures }) => [part, pictures])));
  return [
    { path: 'parts-sheet.pdf', kind: 'pdf', bytes, note: 'every printed part, dimensioned, and how to print it' },
  ];
}

/** The plate of the range switch; none for a coil of one position. */
async function rangePlateFile(record: CoilRecord): Promise<OutputFile[]> {
  const { rangePlate } = await import('./sheets/range-plate.ts');
  const bytes = await rangePlate(record);
  return bytes === null
    ? []
    : [{ path: 'range-plate.pdf', kind: 'pdf', bytes, note: 'for the switch, true scale, print at 100 %' }];
}

/** What is made into a folder: a job, the coil found for it, and what the record of another verb holds besides. */
export interface Produced {
  readonly job: Job;
  readonly found: Found;
  readonly extra?: RecordExtra;
}

export interface ProduceOptions {
  readonly version: string;
  /** Starts what makes the parts; threads of their own when left out. */
  readonly kernel?: () => Kernel;
  /** Told what begins, in words for a person who waits. */
  readonly tell?: ((stage: string) => void) | undefined;
}

/** The record and every file of the output folder. */
export async function planJob(job: Job, options: ProduceOptions): Promise<Output<CoilRecord>> {
  return produce(() => ({ job, found: foundFor(job) }), options);
}

/** As {@link planJob} for a kind of a lot, whose parts lie on the beds of the lot. */
export async function planKind(job: Job, options: ProduceOptions): Promise<Output<CoilRecord>> {
  return produce(() => ({ job, found: foundFor(job), extra: { verb: 'plan', bedsOfLot: true } }), options);
}

/** Finds, and makes every file; `more` are files that only another verb has. */
export async function produce(
  find: () => Produced,
  options: ProduceOptions,
  more: (record: CoilRecord) => Promise<readonly OutputFile[]> = async () => [],
): Promise<Output<CoilRecord>> {
  const kernel = (options.kernel ?? startKernel)();
  try {
    options.tell?.('choosing the coil');
    const { job, found, extra } = find();
    // The parts need no figures at work: they are made while those are worked out.
    const parts = printedOf(job, found);
    const { scale } = parts.record.printer;
    const making = Promise.all(parts.solids.map((solid) => kernel.part(solid, scale)));
    // A failure of a thread is reported when it is awaited below, not as an unhandled rejection meanwhile.
    making.catch(() => undefined);
    options.tell?.('its figures at work');
    const record = makeRecord(job, found, options.version, parts, extra);
    options.tell?.('the sheets');
    const beds = making.then((parts) => bedFiles(kernel, record, parts));
    beds.catch(() => undefined);
    const { windingSheet } = await import('./sheets/winding-sheet.ts');
    const { referenceSheet } = await import('./sheets/reference-sheet.ts');
    const sheet = await windingSheet(record);
    const ranges = await referenceSheet(record);
    const { benchPage } = await import('./bench/page.ts');
    const page = await benchPage(record);
    options.tell?.('the parts');
    const made = await making;
    const partsSheet = await partsSheetFile(record, made);
    const files: OutputFile[] = [
      { path: 'winding-sheet.pdf', kind: 'pdf', bytes: sheet, note: 'to wind from and to check by' },
      { path: 'bench-page.html', kind: 'html', bytes: page, note: 'to wind by, in a browser, without a network' },
      ...(await more(record)),
      ...(await surfaceFiles(record)),
      {
        path: 'reference-sheet.pdf',
        kind: 'pdf',
        bytes: ranges,
        note: 'ranges, curves, switch wiring, and how the figures come about',
      },
      ...(await rangePlateFile(record)),
      netlistFile(record),
      ...setNetlistFiles(record),
      ...partsSheet,
      ...partFiles(record, made),
      ...(await beds),
    ];
    return listed(record, files);
  } finally {
    await kernel.close();
  }
}
