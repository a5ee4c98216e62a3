/** Makes the record of a lot out of its planned kinds: wire from reels, parts on beds, beds on machines. */

import { COIL_PARTS } from '../job/schema.ts';
import { tidy } from '../quantity/format.ts';
import { hashOf } from '../record/hash.ts';
import { decimals, significant } from '../record/rounding.ts';
import { linearMassGM } from '../stock/linear-mass.ts';
import { wireNamed } from '../stock/wires.ts';
import { layOutLot } from './beds.ts';
import { piecesOf, printersOf } from './pieces.ts';
import type { PlannedKind } from './planned.ts';
import { listRuns } from './runs.ts';
import { type LotBed, type LotKind, type LotRecord, type LotWire, lotSchema } from './schema.ts';
import { planSpools } from './spools.ts';
import type { Lot } from './types.ts';

/**
 * The record of the lot, its files still to come.
 * @throws Fault (exit 4) for parts that no printer of the lot takes
 */
export function lotRecord(lot: Lot, kinds: readonly PlannedKind[], version: string): LotRecord {
  const lines = kinds.map(lineOf);
  const coils = coilsOf(lot, kinds);
  const lineOfKind = new Map(lines.map((line) => [line.kind, line]));
  const cuts = coils.map(({ serial, kind }) => {
    const { wire, cutM, cutG } = lineOfKind.get(kind)!;
    return { serial, wire, cutM, cutG };
  });
  const reels = lot.spools.map(({ name, wire, leftM }) => ({ spool: name, wire: wire.name, leftM }));
  const wires = planSpools(cuts, reels);
  const printers = printersOf(lot, kinds);
  const pieces = piecesOf(kinds);
  const beds = pieces.length === 0 ? [] : layOutLot(pieces, printers);
  const runs = beds.length === 0 ? [] : listRuns(beds, printers, pieces, coils);
  const body = {
    record: 1 as const,
    verb: 'lot' as const,
    lot: lot.name,
    date: lot.date,
    paper: lot.paper,
    checkedBy: lot.checkedBy,
    kinds: lines,
    coils: coils.map((coil, index) => ({ ...coil, spool: wires.coils[index]!.spool })),
    spools: [...wires.spools],
    wires: [...wires.wires],
    toBuy: [...wires.toBuy],
    beds: [...beds],
    runs: [...runs],
    materials: materialsOf(beds),
    warnings: [...wires.wires.flatMap(wireWarnings), ...kindWarnings(kinds)],
  };
  return lotSchema.parse({ ...body, program: `coilwright ${version}`, hash: hashOf(body), files: [] });
}

function lineOf({ kind, folder, job, serials, record }: PlannedKind): LotKind {
  const winding = record.windings[0];
  if (winding === undefined) throw new Error(`no winding in the record of ${job.name}`);
  const cutM = decimals(winding.wireLengthM + winding.leadsM, 3);
  const chosen = job.wires === 'stock' ? undefined : job.wires.find(({ name }) => name === winding.wire.name);
  const wire = chosen ?? wireNamed(winding.wire.name);
  if (wire === undefined) throw new Error(`${winding.wire.name} is neither in the job nor in stock`);
  const formers = record.parts.filter((part) => COIL_PARTS.includes(part.kind));
  return {
    kind,
    job: record.job,
    folder: `kinds/${folder}`,
    hash: record.hash,
    quantity: serials.length,
    turns: winding.turns,
    taps: winding.taps.length,
    wire: winding.wire.name,
    cutM,
    cutG: significant(cutM * linearMassGM(wire), 4),
    plasticG: significant(
      formers.reduce((sum, { massG, quantity }) => sum + massG * quantity, 0),
      4,
    ),
  };
}

/** Every coil with its kind, in the order in which the lot gives them. */
function coilsOf(lot: Lot, kinds: readonly PlannedKind[]): { serial: string; kind: string }[] {
  const kindOf = new Map(kinds.flatMap(({ kind, serials }) => serials.map((serial) => [serial, kind] as const)));
  return lot.entries.flatMap(({ serials }) => serials.map((serial) => ({ serial, kind: kindOf.get(serial)! })));
}

function materialsOf(beds: readonly LotBed[]): LotRecord['materials'] {
  const grams = new Map<string, number>();
  for (const { material, massG, count } of beds) grams.set(material, (grams.get(material) ?? 0) + massG * count);
  return [...grams].map(([material, solidG]) => ({ material, solidG: decimals(solidG, 1) }));
}

function wireWarnings({ wire, coils, unserved, buyM }: LotWire): LotRecord['warnings'] {
  if (unserved === 0) return [];
  const which =
    unserved === coils ? (coils === 1 ? 'the coil' : `all ${coils} coils`) : `${unserved} of ${coils} coils`;
  const text = `${wire}: no reel has enough left for ${which}; buy ${tidy(decimals(buyM, 2))} m, each coil in one piece.`;
  return [{ code: 'wire-to-buy', text }];
}

/** One for all kinds, which may be many: what each warns of stands on its own sheets. */
function kindWarnings(kinds: readonly PlannedKind[]): LotRecord['warnings'] {
  const some = kinds.filter(({ record }) => record.warnings.length > 0);
  if (some.length === 0) return [];
  const counts = some.map(({ kind, record }) => `${kind} (${record.warnings.length})`).join(', ');
  const text = `Warnings of kinds, on their winding sheets and in their plan.json: ${counts}.`;
  return [{ code: 'kind-warnings', text }];
}
