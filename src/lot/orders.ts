/** What a lot has its threads do: plan a kind, make a bed, write papers. Each leaves a finished unit in the work folder. */
import { readFile } from 'node:fs/promises';
import { Fault, type FaultExit, type FaultParts } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { inlineKernel } from '../kernel/inline.ts';
import { makeBed } from '../kernel/make.ts';
import { readStl } from '../kernel/stl.ts';
import type { BedItem } from '../kernel/threemf.ts';
import { canonical, weld } from '../kernel/weld.ts';
import { planKind } from '../plan.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type LotPaper, paperFile } from './papers.ts';
import type { LotRecord } from './schema.ts';
import { type Unit, writeUnit } from './work.ts';

interface ForUnit {
  /** The work folder. */
  readonly work: string;
  readonly key: string;
}

export interface PlanOrder extends ForUnit {
  readonly kind: 'plan';
  readonly job: Job;
  readonly version: string;
}

export interface LotBedOrder extends ForUnit {
  readonly kind: 'bed';
  readonly title: string;
  /** Each part once, with its STL on the disk. */
  readonly objects: readonly { readonly id: string; readonly name: string; readonly stl: string }[];
  readonly items: readonly BedItem[];
  readonly note: string;
}

export interface PaperOrder extends ForUnit {
  readonly kind: 'paper';
  readonly paper: LotPaper;
  readonly record: LotRecord;
  /** Letter of each kind, and its plan.json on the disk. */
  readonly records: readonly (readonly [kind: string, path: string])[];
}

export type LotOrder = PlanOrder | LotBedOrder | PaperOrder;

export type LotReply =
  | { readonly kind: 'done'; readonly unit: Unit }
  | { readonly kind: 'fault'; readonly exit: FaultExit; readonly faults: readonly FaultParts[] }
  | { readonly kind: 'error'; readonly text: string };

/** The only file of a bed's unit. */
export const BED_FILE = 'bed.3mf';

export async function carryOut(order: LotOrder): Promise<LotReply> {
  try {
    return { kind: 'done', unit: await unitOfOrder(order) };
  } catch (error) {
    if (error instanceof Fault) return { kind: 'fault', exit: error.exit, faults: error.faults };
    return { kind: 'error', text: error instanceof Error ? error.message : String(error) };
  }
}

function unitOfOrder(order: LotOrder): Promise<Unit> {
  switch (order.kind) {
    case 'plan':
      return planned(order);
    case 'bed':
      return laidOut(order);
    case 'paper':
      return written(order);
  }
}

async function planned({ work, key, job, version }: PlanOrder): Promise<Unit> {
  const { files } = await planKind(job, { version, kernel: inlineKernel });
  return writeUnit(work, key, files);
}

/** The mesh of a part is read from its file: its triangles are the same and in the same order, as both are canonical. */
async function laidOut({ work, key, title, objects, items, note }: LotBedOrder): Promise<Unit> {
  const meshes = [];
  for (const { id, name, stl } of objects)
    meshes.push({ id, name, mesh: canonical(weld(readStl(await readFile(stl)))) });
  const bed = makeBed({ path: BED_FILE, title, objects: meshes, items });
  return writeUnit(work, key, [{ ...bed, note }]);
}

async function written({ work, key, paper, record, records }: PaperOrder): Promise<Unit> {
  const kinds = new Map<string, CoilRecord>();
  for (const [kind, path] of records) kinds.set(kind, JSON.parse(await readFile(path, 'utf8')));
  return writeUnit(work, key, [await paperFile(paper, record, kinds)]);
}
