/**
 * The pipeline of `prove`, without I/O:
 *
 *     table of ──> readings by record ──> each reading, tap, coil ──> what saves ──> without what is ──┬──> what the coils ──> job for the
 *     readings     and serial             judged                      those that     not of its coil   │    have in common    next lot
 *     (csv/read)   (prove/read)           (prove/judge)               fail                             │    (prove/systematic) (prove/first-off)
 *                                                                     (prove/rescue)                   └──> control charts (prove/charts)
 *
 * All of it goes into the record of the proof (prove/make); proof sheet and charts read that record and nothing else, a dial sheet its
 * coil's record besides. Records of the coils are found by whoever calls (cli/find-records.ts).
 */
import { DIAL_NOTE } from '../templates/wording/proof.ts';
import { Fault } from './fault.ts';
import { slug } from './job/name.ts';
import type { LotRecord } from './lot/schema.ts';
import { chartsOf } from './prove/charts.ts';
import type { Dial } from './prove/charts-schema.ts';
import { dialOf, USUAL_DIAL } from './prove/dial.ts';
import { firstOffJob } from './prove/first-off.ts';
import { believable, judgeKind, type KindProof, makeProof } from './prove/make.ts';
import { readReadings } from './prove/read.ts';
import type { ProofFirstOff, ProofRecord } from './prove/schema.ts';
import { systematicOf } from './prove/systematic.ts';
import type { Systematic } from './prove/systematic-schema.ts';
import type { FileNote, KindReadings } from './prove/types.ts';
import { listed, type Output, type OutputFile } from './record/listing.ts';
import type { CoilRecord } from './record/schema.ts';

/** A dial as asked for. */
export interface DialWish {
  readonly diameterMm: number;
  readonly spanDeg: number;
}

export interface ProveInput {
  /** Name of the file without its ending. */
  readonly name: string;
  readonly file: string;
  readonly text: string;
  /** Of the bytes of the file. */
  readonly sha256: string;
  readonly records: ReadonlyMap<string, CoilRecord>;
  readonly lots: readonly LotRecord[];
  /** Where records were looked for, in words. */
  readonly searched: string;
  /** Null: not asked for; dials that were read are then drawn at the usual size where they can be. */
  readonly dial: DialWish | null;
  /** Of how the bytes were read. */
  readonly notes: readonly FileNote[];
}

export interface Proof {
  readonly record: ProofRecord;
  /** Of the dials, the record of their coil. */
  readonly dials: readonly { readonly of: CoilRecord; readonly dial: Dial }[];
  readonly firstOffs: readonly OutputFile[];
}

/** Dials that can be drawn; why one cannot is a note, unless it was asked for: then the Fault is thrown. */
function dialsOf(kinds: readonly KindReadings[], wish: DialWish | null) {
  const notes: FileNote[] = [];
  const dials: { of: CoilRecord; dial: Dial }[] = [];
  for (const { record, coils } of kinds)
    for (const coil of coils) {
      if (coil.dial.length === 0) continue;
      try {
        dials.push({ of: record, dial: dialOf(record, coil, wish ?? USUAL_DIAL) });
      } catch (error) {
        if (!(error instanceof Fault) || wish !== null) throw error;
        for (const { got, expected, todo, place } of error.faults)
          notes.push({
            line: place?.line ?? coil.dial[0]!.line,
            column: null,
            code: 'dial-not-drawn',
            fate: 'kept',
            figures: 0,
            got,
            expected,
            todo,
          });
      }
    }
  if (wish !== null && dials.length === 0)
    throw new Fault(3, { code: 'no-dial', place: { key: '--dial' }, ...DIAL_NOTE.none });
  return { notes, dials };
}

/**
 * The record of a proof and what goes with it.
 * @throws Fault (exit 3 or 4) of the file, of a record that is not there, of a dial that was asked for
 */
export function proofOf(input: ProveInput, version: string): Proof {
  const { text, file, records, lots, searched, name, sha256 } = input;
  const read = readReadings(text, file, records, { lots, searched });
  const { dials, notes } = dialsOf(read.kinds, input.dial);
  const nameOf = names();
  const firstOffs: OutputFile[] = [];
  const kinds = read.kinds.map((kind): KindProof => {
    const coils = judgeKind(kind);
    const sound = believable(kind, coils);
    const systematic = systematicOf(sound);
    const next = systematic === null ? null : nextJob(kind.record, systematic, nameOf);
    if (next?.file) firstOffs.push(next.file);
    return { record: kind.record, coils, systematic, charts: chartsOf(sound), firstOff: next?.told ?? null };
  });
  const record = makeProof(
    {
      name,
      file,
      sha256,
      count: read.count,
      notes: [...input.notes, ...read.notes, ...notes],
      kinds,
      dials: dials.map(({ dial }) => dial),
    },
    version,
  );
  return { record, dials, firstOffs };
}

/** The job for the next lot of a kind, where there is something to put right. */
function nextJob(
  record: CoilRecord,
  systematic: Systematic,
  nameOf: (text: string) => string,
): { readonly told: ProofFirstOff; readonly file: OutputFile | null } {
  const next = firstOffJob(record, systematic);
  const notes = [...next.notes];
  if (!next.ok) return { told: { path: null, why: next.why, changes: [], notes }, file: null };
  const path = `first-off/${nameOf(record.job)}.yaml`;
  const bytes = new TextEncoder().encode(next.yaml);
  return {
    told: { path, why: null, changes: next.changes.map((change) => ({ ...change })), notes },
    file: { path, kind: 'yaml', bytes, note: 'the job for the next lot, centred' },
  };
}

/** Names for what comes once a coil or a kind: their slug, with a number where it was taken. */
function names(): (text: string) => string {
  const taken = new Set<string>();
  return (text) => {
    const base = slug(text);
    let name = base;
    for (let i = 2; taken.has(name); i++) name = `${base}-${i}`;
    taken.add(name);
    return name;
  };
}

/** The record and every file of the output folder. */
export async function prove(input: ProveInput, { version }: { version: string }): Promise<Output<ProofRecord>> {
  const { record, dials, firstOffs } = proofOf(input, version);
  const { proofSheet } = await import('./sheets/proof-sheet.ts');
  const { controlCharts } = await import('./sheets/control-charts.ts');
  const files: OutputFile[] = [
    {
      path: 'proof-sheet.pdf',
      kind: 'pdf',
      bytes: await proofSheet(record),
      note: 'what passed, what did not, and what to do',
    },
  ];
  const { program, date, paper } = record;
  const charted = record.kinds.map(({ job, hash, charts }) => ({
    record: { job, hash, program, date, paper },
    charts,
  }));
  const charts = await controlCharts(charted);
  if (charts !== null)
    files.push({
      path: 'control-charts.pdf',
      kind: 'pdf',
      bytes: charts,
      note: 'individuals and moving ranges, for the wall',
    });
  files.push(...firstOffs);
  if (dials.length > 0) {
    const { dialSheet } = await import('./sheets/dial-sheet.ts');
    const dialName = names();
    const { diameterMm } = input.dial ?? USUAL_DIAL;
    for (const { of, dial } of dials) {
      const path = `dial-${dialName(dial.serial)}.pdf`;
      files.push({
        path,
        kind: 'pdf',
        bytes: await dialSheet(of, dial, { diameterMm }),
        note: 'dial and range plate at true size',
      });
    }
  }
  return listed(record, files, 'proof.json');
}
