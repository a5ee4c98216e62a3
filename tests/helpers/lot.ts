/** Lots put together by plain arithmetic from records of coils, not by the program's own planning: both can be wrong apart. */
import { readFileSync } from 'node:fs';
import { readJob } from '../../src/job/read.ts';
import type { LotBed, LotCoil, LotKind, LotRecord } from '../../src/lot/schema.ts';
import { lotSchema } from '../../src/lot/schema.ts';
import { layOutBeds } from '../../src/parts/bed-layout.ts';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

export interface LotEntryOf {
  readonly record: CoilRecord;
  readonly quantity: number;
  /** Serials are this and a number of three figures. */
  readonly prefix: string;
}

export interface LotOptions {
  readonly name?: string;
  readonly date?: string | null;
  readonly paper?: 'A4' | 'Letter';
  readonly checkedBy?: string | null;
  /** Of each wire: the coils that all its reels together hold; the rest is to buy. */
  readonly share?: number;
  readonly reelNames?: (n: number) => string;
  readonly serials?: (prefix: string, n: number) => string;
}

export interface LotSample {
  readonly lot: LotRecord;
  readonly kinds: ReadonlyMap<string, CoilRecord>;
}

const round = (value: number, digits = 3) => Number(value.toFixed(digits));
const letter = (i: number): string =>
  (i < 26 ? '' : letter(Math.floor(i / 26) - 1)) + String.fromCharCode(65 + (i % 26));

export const serialOf = (prefix: string, n: number) => `${prefix}-${`${n}`.padStart(3, '0')}`;

function kindOf({ record, quantity }: LotEntryOf, i: number): LotKind {
  const winding = record.windings[0]!;
  const cutM = round(winding.wireLengthM + winding.leadsM);
  return {
    kind: letter(i),
    job: record.job,
    folder: `kinds/kind-${letter(i).toLowerCase()}`,
    hash: record.hash,
    quantity,
    turns: winding.turns,
    taps: winding.taps.length,
    wire: winding.wire.name,
    cutM,
    cutG: round((winding.wireMassG / winding.wireLengthM) * cutM, 2),
    plasticG: round(
      record.parts.filter(({ kind }) => kind === 'former').reduce((sum, part) => sum + part.massG * part.quantity, 0),
      1,
    ),
  };
}

/** Reels of three coils and half of one, filled in order, until the share of coils is served. */
function cutWire(kinds: readonly LotKind[], coils: readonly LotCoil[], options: LotOptions) {
  const share = options.share ?? 0.75;
  const named = options.reelNames ?? ((n: number) => `reel ${n}`);
  const [spools, wires, toBuy]: [LotRecord['spools'], LotRecord['wires'], LotRecord['toBuy']] = [[], [], []];
  const spoolOf = new Map<string, string>();
  for (const wire of new Set(kinds.map((kind) => kind.wire))) {
    const of = new Map(kinds.filter((kind) => kind.wire === wire).map((kind) => [kind.kind, kind]));
    const mine = coils.filter(({ kind }) => of.has(kind));
    const served = mine.slice(0, Math.floor(share * mine.length));
    const least = Math.min(...[...of.values()].map(({ cutM }) => cutM));
    for (let from = 0; from < served.length; from += 3) {
      const cut = served.slice(from, from + 3);
      const usedM = round(cut.reduce((sum, { kind }) => sum + of.get(kind)!.cutM, 0));
      const spool = named(spools.length + 1);
      for (const { serial } of cut) spoolOf.set(serial, spool);
      const leftM = round(usedM + least / 2);
      spools.push({
        spool,
        wire,
        leftM,
        usedM,
        restM: round(leftM - usedM),
        serials: cut.map(({ serial }) => serial),
      });
    }
    const rest = mine.slice(served.length);
    const sum = (some: readonly LotCoil[], key: 'cutM' | 'cutG') =>
      round(some.reduce((all, { kind }) => all + of.get(kind)![key], 0));
    const reels = spools.filter((each) => each.wire === wire);
    const scrapM = round(reels.reduce((all, { restM }) => all + restM, 0));
    wires.push({
      wire,
      coils: mine.length,
      neededM: sum(mine, 'cutM'),
      neededG: sum(mine, 'cutG'),
      shelfM: round(reels.reduce((all, { leftM }) => all + leftM, 0)),
      unserved: rest.length,
      unservedBound: rest.length,
      buyM: sum(rest, 'cutM'),
      buyBoundM: sum(rest, 'cutM'),
      scrapM,
      scrapBoundM: round(0.8 * scrapM),
      exact: wires.length % 2 === 0,
    });
    if (rest.length > 0)
      toBuy.push({
        wire,
        totalM: sum(rest, 'cutM'),
        totalG: sum(rest, 'cutG'),
        coils: rest.map(({ serial, kind }) => ({ serial, cutM: of.get(kind)!.cutM })),
      });
  }
  return { spools, wires, toBuy, spoolOf };
}

/** A bed of formers for each kind, as many as it holds, printed as often as needed, and one of jigs. */
function bedsOf(entries: readonly LotEntryOf[]) {
  const beds: LotBed[] = [];
  const runs: LotRecord['runs'] = ['bench 1', 'bench 2'].map((printer) => ({ printer, runs: [] }));
  let turn = 0;
  entries.forEach(({ record, quantity, prefix }, i) => {
    const { printer } = record;
    const bed = (parts: CoilRecord['parts'], count: number, copies: number) => {
      const wanted = parts.map(({ part, quantity: each, sizeMm: [widthMm, depthMm, heightMm] }) => ({
        id: part,
        quantity: each * copies,
        widthMm: widthMm!,
        depthMm: depthMm!,
        heightMm: heightMm!,
      }));
      const laid = layOutBeds(wanted as never, printer)[0]!;
      const entry: LotBed = {
        bed: beds.length + 1,
        path: `beds/bed-${beds.length + 1}.3mf`,
        material: parts[0]!.material,
        layerMm: printer.layerMm,
        nozzleMm: printer.nozzleMm,
        printer: 'bench',
        bedXMm: printer.bedXMm,
        bedYMm: printer.bedYMm,
        count,
        massG: round(
          laid.items.reduce((sum, { part }) => sum + parts.find((each) => each.part === part)!.massG, 0),
          1,
        ),
        items: laid.items.map(({ part, xMm, yMm, turned }) => ({
          kind: letter(i),
          part,
          name: `${letter(i)} ${parts.find((each) => each.part === part)!.name}`,
          xMm,
          yMm,
          turned,
        })),
      };
      beds.push(entry);
      return entry;
    };
    const add = (entry: LotBed, serials: string[]) => {
      const on = runs[turn++ % runs.length]!;
      on.runs.push({ run: on.runs.length + 1, bed: entry.bed, serials, massG: entry.massG });
    };
    const formers = record.parts.filter(({ kind }) => kind === 'former');
    const jigs = record.parts.filter(({ kind }) => kind !== 'former');
    const serials = Array.from({ length: quantity }, (_, n) => serialOf(prefix, n + 1));
    if (formers.length > 0) {
      const each = Math.min(4, quantity);
      const entry = bed(formers, Math.ceil(quantity / each), each);
      for (let from = 0; from < quantity; from += each) add(entry, serials.slice(from, from + each));
    }
    if (jigs.length > 0) add(bed(jigs, 1, 1), []);
  });
  return { beds, runs: beds.length === 0 ? [] : runs };
}

export function lotOf(entries: readonly LotEntryOf[], options: LotOptions = {}): LotSample {
  const kinds = entries.map(kindOf);
  const serial = options.serials ?? serialOf;
  const bare = entries.flatMap(({ quantity, prefix }, i) =>
    Array.from({ length: quantity }, (_, n) => ({ serial: serial(prefix, n + 1), kind: letter(i), spool: null })),
  );
  const { spoolOf, ...wire } = cutWire(kinds, bare, options);
  const { beds, runs } = bedsOf(entries);
  const grams = new Map<string, number>();
  for (const { material, massG, count } of beds) grams.set(material, (grams.get(material) ?? 0) + massG * count);
  const lot = lotSchema.parse({
    record: 1,
    program: 'coilwright 0.1.0',
    verb: 'lot',
    lot: options.name ?? 'Harbour sets, spring',
    date: options.date === undefined ? '2031-04-02' : options.date,
    hash: 'b7d1'.repeat(16),
    paper: options.paper ?? 'A4',
    checkedBy: options.checkedBy === undefined ? 'Ilse Varn' : options.checkedBy,
    kinds,
    coils: bare.map((coil) => ({ ...coil, spool: spoolOf.get(coil.serial) ?? null })),
    ...wire,
    beds,
    runs,
    materials: [...grams].map(([material, solidG]) => ({ material, solidG: round(solidG, 1) })),
    warnings: [],
    files: [],
  });
  return { lot, kinds: new Map(entries.map(({ record }, i) => [letter(i), record])) };
}

/** What `plan` makes of a job that comes with the program: takes a second or two. */
export function starterRecord(name: string): CoilRecord {
  const path = new URL(`../../templates/jobs/${name}.yaml`, import.meta.url);
  return { ...recordOf(readJob(readFileSync(path, 'utf8'), `${name}.yaml`), '0.1.0'), beds: [] };
}
