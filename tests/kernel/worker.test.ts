import { copyFile, mkdir, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { startKernel } from '../../src/kernel/client.ts';
import { makeParts } from '../../src/kernel/make.ts';
import { sampleRecord } from '../helpers/sample.ts';

// Threads cannot run TypeScript: the worker is bundled as for release, into a folder that finds node_modules.
const root = new URL('../..', import.meta.url).pathname;
const folder = join(root, 'node_modules', '.cache', 'worker-test');
const script = pathToFileURL(join(folder, 'worker.js'));

beforeAll(async () => {
  await rm(folder, { recursive: true, force: true });
  await mkdir(folder, { recursive: true });
  await build({
    absWorkingDir: root,
    entryPoints: { worker: 'src/kernel/worker.ts' },
    outdir: folder,
    bundle: true,
    format: 'esm',
    platform: 'node',
    external: ['@jscad/stl-serializer'],
    banner: {
      js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);",
    },
  });
  await copyFile(createRequire(import.meta.url).resolve('manifold-3d/manifold.wasm'), join(folder, 'manifold.wasm'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

test('the thread makes the same bytes as the process itself, and answers in turn', async () => {
  const kernel = startKernel(script);
  try {
    const records = [sampleRecord({ surface: 'smooth' }), sampleRecord({ hand: 'left', turns: [3.25, 6.5] })];
    const both = await Promise.all(records.map((record) => kernel.make(record)));
    for (const [i, record] of records.entries()) {
      const [own] = await makeParts(record);
      expect(both[i]![0]!.report).toEqual(own!.report);
      expect(Buffer.compare(both[i]![0]!.bytes, own!.bytes)).toBe(0);
    }
    expect(await kernel.make(sampleRecord({ kind: 'tube' }))).toEqual([]);
  } finally {
    await kernel.close();
  }
});

test('a fault in the thread comes back as the same fault', async () => {
  const record = sampleRecord({ surface: 'smooth' });
  const thin = { ...record, former: { ...record.former, boreDiameterMm: record.former.outsideDiameterMm - 1 } };
  const kernel = startKernel(script);
  try {
    const error = await kernel.make(thin).catch((e: unknown) => e);
    expect(error).toBeInstanceOf(Fault);
    expect((error as Fault).exit).toBe(4);
    expect((error as Fault).faults.map((fault) => fault.code)).toContain('former-wall-thin');
    expect((await kernel.make(record)).length).toBe(1);
  } finally {
    await kernel.close();
  }
});

test('a thread that cannot start or has ended answers in one line', async () => {
  const nowhere = startKernel(pathToFileURL(join(folder, 'nowhere.js')));
  await expect(nowhere.make(sampleRecord())).rejects.toThrow(/^the part kernel stopped: .*nowhere\.js/);
  const ended = startKernel(script);
  await ended.close();
  await expect(ended.make(sampleRecord())).rejects.toThrow(/^the part kernel ended/);
});
