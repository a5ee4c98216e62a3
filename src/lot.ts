/**
 * The pipeline of `lot`. What is finished is kept in a work folder, unit by unit, and found there by the next run:
 *
 *     lot ──> kinds ──────────> plans ────────> record ─────────┬──> beds (3MF) ──────────────────┬──> lot.json
 *             (lot/kinds:       (plan.ts, in    (lot/record:    └──> travellers, lot sheet,       │    and the list
 *              same job,         threads,        wire/spools,        labels, readings.csv         │    of all files
 *              same kind)        a kind each)    beds, runs)         (in threads)                 │
 *                  └── the files of each kind: kinds/<folder>/, as plan writes them, without beds ─┘
 *
 * Memory does not grow with the number of coils but by their rows: files stay on the disk, and threads hold one kind, one bed
 * or one paper at a time. What comes out depends on the lot and the version alone, not on threads, nor on what was found.
 */
import { readFile } from 'node:fs/promises';
import { Fault, type FaultExit, type FaultParts } from './fault.ts';
import { type Crew, startCrew } from './lot/crew.ts';
import { designText, type KindToPlan, kindsOf } from './lot/kinds.ts';
import type { LotBedOrder, LotOrder } from './lot/orders.ts';
import { LOT_PAPERS } from './lot/papers.ts';
import type { PlannedKind } from './lot/planned.ts';
import { lotRecord } from './lot/record.ts';
import type { LotBed, LotRecord } from './lot/schema.ts';
import type { Lot } from './lot/types.ts';
import { findUnit, keyOf, openWork, type Unit, unitPath } from './lot/work.ts';
import type { OutputFile as FolderFile } from './output/transaction.ts';
import type { CoilRecord } from './record/schema.ts';

/** How far a run is: units of work of the stage that is on. */
export interface LotProgress {
  readonly stage: 'kinds' | 'beds and papers';
  readonly done: number;
  readonly of: number;
  /** Of those done: found finished by an earlier run. */
  readonly found: number;
}

export interface LotOptions {
  readonly version: string;
  /** Folder for what is finished; made when it is not there, and left to the caller to take away. */
  readonly work: string;
  readonly crew?: () => Crew;
  readonly progress?: (progress: LotProgress) => void;
}

/** A file of the lot on the disk, or of a few bytes. */
export type LotFile = FolderFile & { readonly note: string; readonly size: number };

export interface MadeLot {
  readonly record: LotRecord;
  /** lot.json first. */
  readonly files: readonly LotFile[];
}

/**
 * Makes every file of the lot in the work folder.
 * @throws Fault (exit 4) with the faults of all kinds that cannot be, in the order of the lot
 */
export async function makeLot(lot: Lot, options: LotOptions): Promise<MadeLot> {
  const { version, work } = options;
  await openWork(work);
  const makers = new Makers(options);
  try {
    const toPlan = kindsOf(lot);
    const units = await makers.all(
      'kinds',
      toPlan.map((kind) => planOrder(kind, work, version)),
    );
    const kinds: PlannedKind[] = [];
    for (const [index, kind] of toPlan.entries()) {
      const unit = units[index]!;
      const record: CoilRecord = JSON.parse(await readFile(unitPath(work, unit.key, 'plan.json'), 'utf8'));
      kinds.push({ ...kind, record, unit });
    }
    const record = lotRecord(lot, kinds, version);
    const records = kinds.map(({ kind, unit }) => [kind, unitPath(work, unit.key, 'plan.json')] as const);
    // The longest first, so that no thread ends long after the others.
    const made = await makers.all('beds and papers', [
      ...LOT_PAPERS.map((paper): LotOrder => {
        const key = keyOf({ paper, lot: record.hash }, version);
        return { kind: 'paper', work, key, paper, record, records };
      }),
      ...record.beds.map((bed) => bedOrder(bed, record, kinds, work, version)),
    ]);
    return listedLot(record, [
      ...made.slice(0, LOT_PAPERS.length).flatMap((unit) => filesOf(unit, work, (path) => path)),
      ...record.beds.flatMap(({ path }, index) => filesOf(made[LOT_PAPERS.length + index]!, work, () => path)),
      ...kinds.flatMap(({ folder, unit }) => filesOf(unit, work, (path) => `kinds/${folder}/${path}`)),
    ]);
  } finally {
    await makers.close();
  }
}

/** Units found, or made by a crew that is started when there is something to make. */
class Makers {
  readonly #options: LotOptions;
  #crew: Crew | null = null;
  constructor(options: LotOptions) {
    this.#options = options;
  }

  /** The unit of each order. All are tried before the faults of any are thrown, so that these do not depend on who was first. */
  async all(stage: LotProgress['stage'], orders: readonly LotOrder[]): Promise<Unit[]> {
    const { work, progress } = this.#options;
    const found = new Map<string, Unit>();
    for (const { key } of orders) {
      const unit = await findUnit(work, key);
      if (unit !== null) found.set(key, unit);
    }
    let done = found.size;
    const tell = () => progress?.({ stage, done, of: orders.length, found: found.size });
    tell();
    const outcomes = await Promise.allSettled(
      orders.map(async (order) => {
        const there = found.get(order.key);
        if (there !== undefined) return there;
        this.#crew ??= (this.#options.crew ?? startCrew)();
        const unit = await this.#crew.unit(order);
        done += 1;
        tell();
        return unit;
      }),
    );
    const errors = outcomes.flatMap((outcome) => (outcome.status === 'rejected' ? [outcome.reason as unknown] : []));
    if (errors.length > 0) throw together(errors);
    return outcomes.flatMap((outcome) => (outcome.status === 'fulfilled' ? [outcome.value] : []));
  }

  async close(): Promise<void> {
    await this.#crew?.close();
  }
}

/** Faults as one; a mistake of the program before any fault. */
function together(errors: readonly unknown[]): unknown {
  const faults: FaultParts[] = [];
  let exit: FaultExit = 4;
  for (const error of errors) {
    if (!(error instanceof Fault)) return error;
    faults.push(...error.faults);
    exit = error.exit;
  }
  return new Fault(exit, faults);
}

function planOrder({ job }: KindToPlan, work: string, version: string): LotOrder {
  // What was written and what was assumed is told in the record: another run may have had it from another file.
  const key = keyOf({ design: designText(job), given: job.given, assumed: job.assumed }, version);
  return { kind: 'plan', work, key, job, version };
}

function bedOrder(
  bed: LotBed,
  { lot, beds }: LotRecord,
  kinds: readonly PlannedKind[],
  work: string,
  version: string,
): LotOrder {
  const parts = new Map(bed.items.map((item) => [`${item.kind} ${item.part}`, item]));
  const objects = [...parts.values()].map(({ kind, part, name }) => {
    const from = kinds.find((one) => one.kind === kind);
    const entry = from?.record.parts.find((one) => one.part === part);
    const file = from?.unit.files.find(({ path }) => path === entry?.path);
    if (from === undefined || file === undefined) throw new Error(`no file of ${part} of kind ${kind} for ${bed.path}`);
    return {
      id: objectId(kind, part),
      name,
      stl: unitPath(work, from.unit.key, file.path),
      sha256: file.sha256,
    };
  });
  const content = {
    title: `${lot}, bed ${bed.bed} of ${beds.length}`,
    items: bed.items.map(({ kind, part, name, xMm, yMm, turned }) => ({
      object: objectId(kind, part),
      name,
      xMm,
      yMm,
      turned,
    })),
    note: `bed ${bed.bed}, ${bed.items.length} in ${bed.material}, to print ${bed.count === 1 ? 'once' : `${bed.count} times`}`,
  };
  const named = objects.map(({ id, name, sha256 }) => ({ id, name, sha256 }));
  const key = keyOf({ bed: content, objects: named }, version);
  return { kind: 'bed', work, key, ...content, objects } satisfies LotBedOrder;
}

const objectId = (kind: string, part: string): string => `${kind.toLowerCase()}-${part}`;

/** A file of a unit with its place in the lot. */
interface Listed {
  readonly path: string;
  readonly kind: string;
  readonly sha256: string;
  readonly source: string;
  readonly size: number;
  readonly note: string;
}

function filesOf({ key, files }: Unit, work: string, place: (path: string) => string): Listed[] {
  return files.map(({ path, kind, sha256, size, note }) => ({
    path: place(path),
    kind,
    sha256,
    source: unitPath(work, key, path),
    size,
    note,
  }));
}

function listedLot(record: LotRecord, files: readonly Listed[]): MadeLot {
  const whole = { ...record, files: files.map(({ path, kind, sha256 }) => ({ path, kind, sha256 })) };
  const bytes = new TextEncoder().encode(`${JSON.stringify(whole, null, 2)}\n`);
  return {
    record: whole,
    files: [{ path: 'lot.json', bytes, size: bytes.length, note: 'the record of the lot' }, ...files],
  };
}
