import { copyFile, mkdir, rm } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { startKernel } from '../../src/kernel/client.ts';
import { makeBed, makePart } from '../../src/kernel/make.ts';
import { partsOf } from '../../src/parts/parts.ts';
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

test('threads make the same bytes as the process itself, and whichever is free takes the next', async () => {
  const records = [sampleRecord({ surface: 'smooth' }), sampleRecord({ hand: 'left', turns: [3.25, 6.5] })];
  for (const threads of [1, 2, 3]) {
    const kernel = startKernel(script, threads);
    try {
      const solids = records.flatMap(partsOf);
      const made = await Promise.all(solids.map((solid) => kernel.part(solid, [1, 1, 1])));
      expect(made.length).toBe(2);
      for (const [i, solid] of solids.entries()) {
        const own = await makePart(solid);
        expect(made[i]!.report).toEqual(own.report);
        expect(Buffer.compare(made[i]!.bytes, own.bytes)).toBe(0);
      }
      const order = {
        path: 'bed-1.3mf',
        title: 'Sample',
        objects: made.map(({ part, mesh }, i) => ({ id: `${part}-${i}`, name: part, mesh })),
        items: [{ object: 'former-0', name: 'Former', xMm: 5, yMm: 5, turned: false }],
      };
      const copy = structuredClone(order);
      const bed = await kernel.bed(order);
      expect(Buffer.compare(bed.bytes, makeBed(copy).bytes)).toBe(0);
      expect(made[0]!.mesh.vertices.length).toBe(0);
    } finally {
      await kernel.close();
    }
  }
});

test('a part that does not come out as described answers in one line, and the thread goes on', async () => {
  const [solid] = partsOf(sampleRecord({ surface: 'smooth' }));
  const kernel = startKernel(script, 1);
  try {
    const wrong = { ...solid!, expected: { ...solid!.expected, genus: 1 } };
    await expect(kernel.part(wrong, [1, 1, 1])).rejects.toThrow(/^part former, checking genus: \d+, expected 1/);
    expect((await kernel.part(solid!, [1, 1, 1])).part).toBe('former');
  } finally {
    await kernel.close();
  }
});

test('a scale enlarges the file and nothing else', async () => {
  const [solid] = partsOf(sampleRecord({ surface: 'smooth' }));
  const [plain, large] = [await makePart(solid!), await makePart(solid!, [1.004, 1.002, 1.003])];
  // float32 of 100 mm has steps of 8e-6 mm.
  for (const [i, s] of [1.004, 1.002, 1.003].entries())
    expect(large.report.maxMm[i]! - plain.report.maxMm[i]! * s).toBeCloseTo(0, 4);
});

test('a thread that cannot start or has ended answers in one line', async () => {
  const [solid] = partsOf(sampleRecord());
  const nowhere = startKernel(pathToFileURL(join(folder, 'nowhere.js')));
  await expect(nowhere.part(solid!, [1, 1, 1])).rejects.toThrow(/^the part kernel stopped: .*nowhere\.js/);
  const ended = startKernel(script);
  await ended.close();
  await expect(ended.part(solid!, [1, 1, 1])).rejects.toThrow(/^the part kernel ended/);
});
