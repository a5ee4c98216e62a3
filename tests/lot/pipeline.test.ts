import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { beforeAll, describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { startCrew } from '../../src/lot/crew.ts';
import { designText, kindsOf, letterOf } from '../../src/lot/kinds.ts';
import type { LotOrder } from '../../src/lot/orders.ts';
import { lotSchema } from '../../src/lot/schema.ts';
import { type LotProgress, type MadeLot, makeLot } from '../../src/lot.ts';
import { hashOf } from '../../src/record/hash.ts';
import { scratch } from '../output/folder.ts';
import { counted, digest, smallLot } from './lots.ts';

const version = '9.9.9';
const kindsIn = (orders: readonly LotOrder[]) => orders.filter(({ kind }) => kind === 'plan').length;

/** Path and hash of every file as it would be written. */
function bytesOf({ files }: MadeLot): Record<string, string> {
  return Object.fromEntries(
    files.map((file) => [file.path, digest('bytes' in file ? file.bytes : readFileSync(file.source))]),
  );
}

/** Three entries, of which two are the same coil. */
const theLot = () => smallLot(['drum.yaml', 2], ['again.yaml', 1], ['second.yaml', 2]);

let planned: number;
let undisturbed: Record<string, string>;
let first: MadeLot;
/** Holds the units of the undisturbed run. */
let work: string;

beforeAll(async () => {
  work = join(scratch(), 'work');
  const { crew, orders } = counted();
  first = await makeLot(await theLot(), { version, work, crew });
  planned = kindsIn(orders);
  undisturbed = bytesOf(first);
}, 60_000);

describe('the kinds of a lot', () => {
  it('are what jobs come to, however they are written', async () => {
    const lot = await smallLot(['drum.yaml', 2], ['second.yaml', 1], ['again.yaml', 2]);
    const kinds = kindsOf(lot);
    expect(kinds.map(({ kind, folder, serials }) => [kind, folder, serials.length])).toEqual([
      ['A', 'small-drum', 4],
      ['B', 'second-drum', 1],
    ]);
    // The plant: a job that differs by a single figure is another kind.
    const [entry] = lot.entries;
    const other = { ...entry!.job, celsius: entry!.job.celsius + 1 };
    expect(designText(other)).not.toBe(designText(entry!.job));
    const folders = kindsOf({ ...lot, entries: [...lot.entries, { ...entry!, job: other }] }).map((one) => one.folder);
    expect(folders).toEqual(['small-drum', 'second-drum', 'small-drum-2']);
  });

  it('have letters', () => {
    expect([0, 25, 26, 51, 52, 701, 702].map(letterOf)).toEqual(['A', 'Z', 'AA', 'AZ', 'BA', 'ZZ', 'AAA']);
  });
});

describe('a lot', () => {
  it('is written with a record that lists every file by its hash', () => {
    const { record, files } = first;
    expect(lotSchema.parse(JSON.parse(JSON.stringify(record)))).toEqual(record);
    expect(hashOf(record)).toBe(record.hash);
    expect(files.map(({ path }) => path)).toEqual(['lot.json', ...record.files.map(({ path }) => path)]);
    for (const { path, sha256 } of record.files) expect(undisturbed[path], path).toBe(sha256);
    for (const { path, size } of files) expect(size, path).toBeGreaterThan(0);
    expect(Object.keys(undisturbed)).toEqual(
      expect.arrayContaining([
        'travellers.pdf',
        'lot-sheet.pdf',
        'labels.pdf',
        'readings.csv',
        'kinds/small-drum/plan.json',
        'kinds/second-drum/winding-sheet.pdf',
      ]),
    );
    console.log(`files of a lot whose hash is that of their bytes: ${record.files.length}`);
  });

  it('is of coils in their order, and says what to buy', () => {
    const { coils, kinds, toBuy, warnings, spools } = first.record;
    expect(coils.map(({ serial, kind }) => `${serial} ${kind}`)).toEqual([
      'TD-001 A',
      'TD-002 A',
      'TD-003 A',
      'TD-004 B',
      'TD-005 B',
    ]);
    expect(kinds.map(({ quantity }) => quantity)).toEqual([3, 2]);
    const short = coils.filter(({ spool }) => spool === null).map(({ serial }) => serial);
    expect(short.length).toBeGreaterThan(0);
    expect(toBuy.flatMap((one) => one.coils.map(({ serial }) => serial)).sort()).toEqual(short);
    expect(spools[0]!.serials.length).toBe(coils.length - short.length);
    expect(warnings.map(({ code }) => code)).toContain('wire-to-buy');
    // The record of each kind has no beds of its own.
    const plan = first.files.find(({ path }) => path === 'kinds/small-drum/plan.json')!;
    expect('source' in plan && JSON.parse(readFileSync(plan.source, 'utf8')).beds).toEqual([]);
  });

  it('plans the same job once', () => {
    expect(planned).toBe(2);
  });

  it('comes out the same by one thread and by three', async () => {
    const script = pathToFileURL(join('dist', 'planner.js'));
    if (!existsSync(script)) throw new Error('dist is missing: npm run build');
    const lot = await theLot();
    const outcomes = await Promise.all(
      [1, 3].map(async (threads) => {
        const work = join(scratch(), 'work');
        return bytesOf(await makeLot(lot, { version, work, crew: () => startCrew(threads, script) }));
      }),
    );
    expect(outcomes[1]).toEqual(outcomes[0]);
    expect(Object.keys(outcomes[0]!)).toEqual(Object.keys(undisturbed));
  });

  it('that cannot be tells the faults of all its kinds, in their order', async () => {
    const lot = await smallLot(['nor-this.yaml', 1], ['never.yaml', 1]);
    const error = await makeLot(lot, { version, work: join(scratch(), 'work'), crew: counted().crew }).catch(
      (reason: unknown) => reason,
    );
    expect(error).toBeInstanceOf(Fault);
    if (!(error instanceof Fault)) return;
    expect(error.exit).toBe(4);
    expect([...new Set(error.faults.map(({ place }) => place?.file))]).toEqual(['nor-this.yaml', 'never.yaml']);
  });
});

describe('a lot that was interrupted', () => {
  it('is carried on: what was finished is not made again, and every byte is as it would have been', async () => {
    const lot = await theLot();
    const mine = join(scratch(), 'work');
    await expect(makeLot(lot, { version, work: mine, crew: counted(1).crew })).rejects.toThrow('the lights went out');
    const rest = counted();
    expect(bytesOf(await makeLot(lot, { version, work: mine, crew: rest.crew }))).toEqual(undisturbed);
    expect(kindsIn(rest.orders)).toBe(1);
    // All of it is there now: nothing is left to do, and it is told so.
    const seen: LotProgress[] = [];
    const idle = counted();
    const options = { version, work: mine, crew: idle.crew, progress: (one: LotProgress) => seen.push(one) };
    expect(bytesOf(await makeLot(lot, options))).toEqual(undisturbed);
    expect(idle.orders).toEqual([]);
    expect(seen[0]).toEqual({ stage: 'kinds', done: 2, of: 2, found: 2 });
  });

  it('does not trust what is damaged', async () => {
    const lot = await theLot();
    const plan = first.files.find(({ path }) => path === 'kinds/small-drum/plan.json')!;
    if (!('source' in plan)) throw new Error('a file of a kind is on the disk');
    writeFileSync(plan.source, readFileSync(plan.source, 'latin1').replace('"job"', '"jab"'), 'latin1');
    const mending = counted();
    expect(bytesOf(await makeLot(lot, { version, work, crew: mending.crew }))).toEqual(undisturbed);
    expect(kindsIn(mending.orders)).toBe(1);
  });
});
