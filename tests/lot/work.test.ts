import { mkdirSync, readdirSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { findUnit, keyOf, openWork, unitPath, writeUnit } from '../../src/lot/work.ts';
import { below, scratch } from '../output/folder.ts';

const FILES = Object.entries({
  'plan.json': '{"job":"one"}',
  'sheet.pdf': 'a sheet',
  'deep/er/part.stl': 'a part',
}).map(([path, text]) => ({ path, kind: 'text', bytes: new TextEncoder().encode(text), note: `what ${path} is for` }));
const key = keyOf({ job: 'one' }, '1.0.0');

async function made(): Promise<{ work: string; unit: string }> {
  const work = join(scratch(), 'work');
  await openWork(work);
  await writeUnit(work, key, FILES);
  return { work, unit: join(work, key) };
}

const edit = (path: string, from: string, to: string) => {
  const text = readFileSync(path, 'utf8');
  expect(text).toContain(from);
  writeFileSync(path, text.replace(from, to));
};

/** What may have happened to a finished unit. */
const DAMAGES: Readonly<Record<string, (unit: string) => void>> = {
  'a byte changed': (unit) => edit(join(unit, 'plan.json'), 'one', 'two'),
  'a file cut short': (unit) => writeFileSync(join(unit, 'sheet.pdf'), 'a she'),
  'a file emptied': (unit) => writeFileSync(join(unit, 'sheet.pdf'), ''),
  'a file missing': (unit) => rmSync(join(unit, 'deep', 'er', 'part.stl')),
  'a file more': (unit) => writeFileSync(join(unit, 'deep', 'thesis.txt'), 'mine'),
  'a file under another name': (unit) => edit(join(unit, '.unit.json'), 'sheet.pdf', 'shelf.pdf'),
  'a note changed': (unit) => edit(join(unit, '.unit.json'), 'is for', 'is not for'),
  'a hash changed': (unit) => edit(join(unit, '.unit.json'), '"sha256":"', '"sha256":"0'),
  'a manifest of nothing': (unit) => writeFileSync(join(unit, '.unit.json'), '{}'),
  'a manifest that is no JSON': (unit) => writeFileSync(join(unit, '.unit.json'), '{'),
  'no manifest': (unit) => rmSync(join(unit, '.unit.json')),
  'another key': (unit) => edit(join(unit, '.unit.json'), key, keyOf({ job: 'two' }, '1.0.0')),
  'a file as a link to the same bytes': (unit) => {
    const sheet = join(unit, 'sheet.pdf');
    writeFileSync(join(unit, '..', 'elsewhere.pdf'), readFileSync(sheet));
    rmSync(sheet);
    symlinkSync('../elsewhere.pdf', sheet);
  },
  'a file in its place': (unit) => {
    rmSync(unit, { recursive: true });
    writeFileSync(unit, 'mine');
  },
  'a link in its place': (unit) => {
    rmSync(unit, { recursive: true });
    symlinkSync('..', unit);
  },
};

describe('a finished unit', () => {
  it('is found with all its files', async () => {
    const { work, unit } = await made();
    const found = await findUnit(work, key);
    expect(found?.files.map(({ path, size, note }) => [path, size, note])).toEqual(
      FILES.map(({ path, bytes, note }) => [path, bytes.length, note]),
    );
    expect(readFileSync(unitPath(work, key, 'deep/er/part.stl'), 'utf8')).toBe('a part');
    expect(Object.keys(below(unit)).sort()).toEqual(['.unit.json', ...FILES.map(({ path }) => path)].sort());
  });

  it('is its own by what it was made from and by the version', () => {
    expect(keyOf({ job: 'one', taps: 3 }, '1.0.0')).toBe(keyOf({ taps: 3, job: 'one' }, '1.0.0'));
    expect(new Set([key, keyOf({ job: 'two' }, '1.0.0'), keyOf({ job: 'one' }, '1.0.1')]).size).toBe(3);
  });

  it.each(Object.keys(DAMAGES))('is thrown away when damaged or foreign: %s', async (what) => {
    const { work, unit } = await made();
    DAMAGES[what]!(unit);
    expect(await findUnit(work, key)).toBeNull();
    expect(readdirSync(work)).not.toContain(key);
    await writeUnit(work, key, FILES);
    expect((await findUnit(work, key))?.files.length).toBe(FILES.length);
  });

  it('replaces what a killed run left half written', async () => {
    const { work, unit } = await made();
    rmSync(unit, { recursive: true });
    mkdirSync(`${unit}.new`);
    writeFileSync(join(`${unit}.new`, 'thesis.txt'), 'half');
    expect(await findUnit(work, key)).toBeNull();
    await writeUnit(work, key, FILES);
    expect((await findUnit(work, key))?.key).toBe(key);
    expect(readdirSync(work)).toEqual([key]);
  });

  it('lies in a folder, whatever was in its place', async () => {
    const base = scratch();
    mkdirSync(join(base, 'real'));
    writeFileSync(join(base, 'real', 'thesis.txt'), 'mine');
    symlinkSync('real', join(base, 'work'));
    await openWork(join(base, 'work'));
    await writeUnit(join(base, 'work'), key, FILES);
    expect(readdirSync(join(base, 'real'))).toEqual(['thesis.txt']);
    console.log(`damages of finished work that are seen: ${Object.keys(DAMAGES).length}`);
  });
});
