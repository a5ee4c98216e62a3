/** A file through its reader as the command line takes it, from bytes on, with every check of what comes of it. */
import { decodeReadings } from '../../cli/read-readings.ts';
import { Fault } from '../../src/fault.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { COIL_FILE, JOB_FILE, LOT_FILE, OLD_COIL_FILE, ORDERS_FILE } from '../../src/job/file-kind.ts';
import { readLot } from '../../src/job/lot-file.ts';
import { slug } from '../../src/job/name.ts';
import { readOldCoil } from '../../src/job/old-coil-file.ts';
import { readJob } from '../../src/job/read.ts';
import { decode } from '../../src/job/tree.ts';
import { matchRecordOf } from '../../src/match.ts';
import { recordOf } from '../../src/plan.ts';
import { proofSchema } from '../../src/prove/schema.ts';
import { proofOf } from '../../src/prove.ts';
import { recordSchema } from '../../src/record/schema.ts';
import { surveyRecordSchema } from '../../src/record/survey-schema.ts';
import { surveyRecordOf } from '../../src/survey.ts';
import { dataFlaws, faultFlaws, nameFlaws, shownFlaws } from './check.ts';
import { JOBS, type Kind, LOT, RECORDS, SOURCES } from './sources.ts';

/** What a file was, once read: its name where it has one, and what goes on from it. */
interface Accepted {
  readonly data: unknown;
  readonly name: string | null;
  /** The record that comes of it, checked; throws a Fault when nothing fits. */
  readonly onwards: () => unknown;
}

const nobody = (path: string) =>
  new Fault(3, {
    code: 'no-such-file',
    place: { file: path },
    got: 'no file of this name',
    expected: 'a job file in YAML or JSON',
    todo: 'check the path',
  });

/** Files that a lot names: the starters, whatever folder they are looked for in. */
function named(path: string): string {
  const base = path.split(/[\\/]/).at(-1) ?? '';
  const text = JOBS.get(base) ?? (base === 'orders.csv' ? SOURCES.orders[0] : undefined);
  if (text === undefined) throw nobody(path);
  return text;
}

const READERS: Readonly<Record<Kind, (bytes: Uint8Array, file: string) => Accepted | Promise<Accepted>>> = {
  job: (bytes, file) => {
    const job = readJob(decode(bytes, file, JOB_FILE), file);
    return { data: job, name: job.name, onwards: () => recordSchema.parse(recordOf(job, '0.1.0')) };
  },
  coil: (bytes, file) => {
    const coil = readCoilFile(decode(bytes, file, COIL_FILE), file);
    return { data: coil, name: coil.name, onwards: () => surveyRecordSchema.parse(surveyRecordOf(coil, '0.1.0')) };
  },
  old: (bytes, file) => {
    const old = readOldCoil(decode(bytes, file, OLD_COIL_FILE), file);
    return { data: old, name: old.job.name, onwards: () => recordSchema.parse(matchRecordOf(old, '0.1.0')) };
  },
  lot: readWholeLot,
  orders: readWholeLot,
  readings: (bytes, file) => {
    const { text, notes } = decodeReadings(bytes, file);
    const input = { name: 'readings', file, text, sha256: '0'.repeat(64), searched: 'out', dial: null, notes };
    const { record } = proofOf({ ...input, records: RECORDS, lots: [LOT] }, '0.1.0');
    return { data: proofSchema.parse(record), name: null, onwards: () => undefined };
  },
};

async function readWholeLot(bytes: Uint8Array, file: string): Promise<Accepted> {
  const lot = await readLot(decode(bytes, file, LOT_FILE), file, (path, kind) =>
    decode(Buffer.from(named(path)), path, kind === ORDERS_FILE ? ORDERS_FILE : JOB_FILE),
  );
  return { data: lot, name: lot.name, onwards: () => undefined };
}

export interface Read {
  readonly result: 'accepted' | 'refused' | 'made' | 'nothing fits' | 'failed';
  /** Codes of the refusal, or what is wrong. */
  readonly said: readonly string[];
  /** Of the processor. */
  readonly readMs: number;
  readonly madeMs: number;
}

/** Processor time: a loaded machine must not count as a slow reader. */
const clock = () => process.cpuUsage().user / 1e3;

/** Longest for a file to be read, ms; what no file may take. */
export const LONGEST_MS = 5000;
/** Longest for a record to come of one, ms: the heaviest starter takes a tenth. */
export const LONGEST_MADE_MS = 60_000;

/** Reads it, and carries on to its record where `onwards`. Never throws. */
export async function readOne(kind: Kind, bytes: Uint8Array, file: string, onwards: boolean): Promise<Read> {
  const text = Buffer.from(bytes).toString('latin1');
  const utf16 = bytes[0] === 0xff && bytes[1] === 0xfe ? Buffer.from(bytes).toString('utf16le') : '';
  const lines = Math.max(text.split(/\r\n|\r|\n/).length, utf16.split(/\r\n|\r|\n/).length);
  const started = clock();
  let readMs = 0;
  const done = (result: Read['result'], said: readonly string[]): Read => {
    const all = clock() - started;
    const late = [
      ...(readMs > LONGEST_MS ? [`read in ${Math.round(readMs)} ms`] : []),
      ...(all - readMs > LONGEST_MADE_MS ? [`made in ${Math.round(all - readMs)} ms`] : []),
    ];
    const at = { readMs: Math.round(readMs), madeMs: Math.round(all - readMs) };
    return late.length > 0 ? { result: 'failed', said: late, ...at } : { result, said, ...at };
  };
  const judged = (error: unknown, result: 'refused' | 'nothing fits'): Read => {
    if (!(error instanceof Fault))
      return done('failed', [error instanceof Error ? (error.stack ?? error.message) : String(error)]);
    // Faults of files that a lot names have lines of those.
    const longest = kind === 'lot' || kind === 'orders' ? Math.max(lines, 400) : lines;
    const flaws = [...faultFlaws(error, longest, text), ...shownFlaws(error)];
    return flaws.length > 0
      ? done('failed', flaws)
      : done(
          result,
          error.faults.map(({ code }) => code),
        );
  };
  let accepted: Accepted;
  try {
    accepted = await READERS[kind](bytes, file);
    readMs = clock() - started;
  } catch (error) {
    readMs = clock() - started;
    return judged(error, 'refused');
  }
  const { data, name } = accepted;
  const flaws = [...dataFlaws(data), ...(name === null ? [] : nameFlaws(name, slug(name)))];
  if (({} as Record<string, unknown>).a !== undefined || Object.keys(Object.prototype).length > 0)
    flaws.push('the prototype of all objects was changed');
  if (flaws.length > 0) return done('failed', flaws);
  if (!onwards) return done('accepted', []);
  try {
    const made = dataFlaws(accepted.onwards());
    return made.length > 0 ? done('failed', made) : done('made', []);
  } catch (error) {
    return judged(error, 'nothing fits');
  }
}
