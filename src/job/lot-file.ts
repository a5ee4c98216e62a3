/**
 * A lot file to a {@link Lot}, in steps without I/O: {@link readLotFile} tells which other files are to be read, {@link withTable}
 * takes the table of jobs when there is one, {@link lotOf} takes the jobs. {@link readLot} goes through them all.
 * Every fault of the file is reported in one go, in the order of its lines.
 */
import { Fault, type FaultParts, type Place } from '../fault.ts';
import type { Lot } from '../lot/types.ts';
import { visible } from '../quantity/parse.ts';
import { type FileKind, JOB_FILE, LOT_FILE, ORDERS_FILE } from './file-kind.ts';
import type { Job } from './job.ts';
import { numberedEntries } from './lot/entries.ts';
import type { LotFile } from './lot/file.ts';
import { bedFault, inLot } from './lot/in-lot.ts';
import { looksLikeOrders, readOrders } from './lot/orders.ts';
import { lotFileOf } from './lot/read.ts';
import { LOT_DEFAULTS } from './lot/schema.ts';
import { nameOfFile } from './name.ts';
import { readJob } from './read.ts';
import { readTree } from './tree.ts';

export type { LotFile, LotFileEntry } from './lot/file.ts';

/**
 * Reads a lot, YAML, JSON or CSV, without the files that it names. A CSV file is a lot by itself, named after the file, with
 * neither reels nor printers. Throws a {@link Fault} with exit code 3. `file` is for messages, for a name, and for where the
 * files that it names lie.
 */
export function readLotFile(text: string, file: string): LotFile {
  const isTable = /\.(?:csv|tsv)$/i.test(file) || (file === '-' && looksLikeOrders(text));
  if (!isTable) return lotFileOf(readTree(text, file, LOT_FILE), file);
  const lot: LotFile = {
    file,
    name: nameOfFile(file, 'Lot'),
    date: null,
    paper: null,
    checkedBy: null,
    entries: [],
    table: null,
    pattern: null,
    firstSerial: LOT_DEFAULTS['first-serial'],
    spools: [],
    printers: [],
    jigs: LOT_DEFAULTS.jigs,
  };
  return tabled(lot, text, file);
}

/** The lot with the coils of the table that it names. Throws a {@link Fault} with exit code 3. */
export function withTable(lot: LotFile, text: string): LotFile {
  if (lot.table === null) throw new Error('a lot without a table of jobs');
  return tabled(lot, text, lot.table.readFrom, lot.table.path);
}

function tabled(lot: LotFile, text: string, file: string, table?: string): LotFile {
  const ordered = readOrders(text, file).map(({ entry, line }) => ({
    entry,
    place: (key: string): Place => ({ file, line, key }),
  }));
  const about = { file, pattern: lot.pattern, first: lot.firstSerial, name: lot.name };
  const { entries, faults } = numberedEntries(ordered, table === undefined ? about : { ...about, table });
  if (faults.length > 0) throw new Fault(3, faults);
  return { ...lot, entries, table: null };
}

/** The job files to be read, each once, in the order of the lot: where from, and where the lot names it first. */
export function jobPaths(lot: LotFile): readonly { readonly readFrom: string; readonly place: Place }[] {
  const found = new Map<string, Place>();
  for (const { readFrom, place } of lot.entries) if (!found.has(readFrom)) found.set(readFrom, place);
  return [...found].map(([readFrom, place]) => ({ readFrom, place }));
}

/**
 * The lot, with its jobs by where they are read from. Paper and date of the lot replace those of the jobs; bed and height of the
 * largest printer replace theirs; a job without wire chooses among the wires on the shelf. Throws a {@link Fault} with exit code
 * 3 for a job that the printers of the lot cannot make.
 */
export function lotOf(lot: LotFile, jobs: ReadonlyMap<string, Job>): Lot {
  if (lot.table !== null) throw new Error('the table of the lot was not read');
  const faults: FaultParts[] = [];
  const changed = new Map<string, Job>();
  for (const { readFrom } of jobPaths(lot)) {
    const job = jobs.get(readFrom);
    if (job === undefined) throw new Error(`the job ${readFrom} was not read`);
    const entry = lot.entries.find((one) => one.readFrom === readFrom)!;
    const fault = bedFault(job, lot, entry);
    if (fault !== null) faults.push(fault);
    changed.set(readFrom, inLot(job, lot));
  }
  if (faults.length > 0) throw new Fault(3, faults);
  const entries = lot.entries.map(({ path, readFrom, quantity, serials }) => ({
    job: changed.get(readFrom)!,
    path,
    quantity,
    serials,
  }));
  const { name, date, checkedBy, spools, printers, jigs } = lot;
  return { name, date, paper: entries[0]!.job.paper, checkedBy, entries, spools, printers, jigs };
}

/** Text of a file that a lot names; throws a {@link Fault} with exit code 3 when it cannot be read. */
export type ReadText = (path: string, kind: FileKind) => string | Promise<string>;

/** Reads a lot and all that it names. Faults of the jobs are told together, each with where the lot names the job. */
export async function readLot(text: string, file: string, read: ReadText): Promise<Lot> {
  const listed = readLotFile(text, file);
  const { table } = listed;
  const lot =
    table === null
      ? listed
      : await named(table.place, async () => withTable(listed, await read(table.readFrom, ORDERS_FILE)));
  const jobs = new Map<string, Job>();
  const faults: FaultParts[] = [];
  for (const { readFrom, place } of jobPaths(lot)) {
    try {
      jobs.set(readFrom, await named(place, async () => readJob(await read(readFrom, JOB_FILE), readFrom)));
    } catch (error) {
      if (!(error instanceof Fault) || error.exit !== 3) throw error;
      faults.push(...error.faults);
    }
  }
  if (faults.length > 0) throw new Fault(3, faults);
  return lotOf(lot, jobs);
}

/** What is done for a file that a lot names at the place: its faults say so. */
async function named<T>(place: Place, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const where = `named in ${place.file === '-' ? 'the lot' : visible(place.file ?? '')}, line ${place.line}`;
    throw new Fault(
      error.exit,
      error.faults.map((parts) => ({ ...parts, got: `${parts.got}; ${where}` })),
    );
  }
}
