/** The bench page's model runs in a browser as it is: no library, nothing of Node, and small. */
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { expect, test } from 'vitest';
import { BUNDLE } from '../../src/bench/page.ts';

const MODEL = ['counter', 'spool', 'correction', 'judge', 'readings-csv'];

test('bundles for a browser out of our own files only', async () => {
  const bench = fileURLToPath(new URL('../../src/bench/', import.meta.url));
  const lines = MODEL.map((name, i) => `import * as m${i} from './${name}.ts'; globalThis.m${i} = m${i};`);
  const { metafile, outputFiles } = await build({
    ...BUNDLE,
    stdin: { contents: lines.join('\n'), resolveDir: bench, loader: 'ts' },
    metafile: true,
    write: false,
    logLevel: 'silent',
  });
  const inputs = Object.keys(metafile.inputs);
  // What is asked of Node cannot be resolved for a browser and fails the build; libraries would show here.
  expect(inputs.filter((path) => path.includes('node_modules'))).toEqual([]);
  expect(inputs.length).toBeGreaterThan(MODEL.length);
  const bytes = outputFiles[0]!.contents.length;
  console.log(`model of the bench page: ${inputs.length} files, ${(bytes / 1024).toFixed(1)} kB`);
  // Half as much again as it was when this was written: one of the heavy halves of the program coming in is several times that.
  expect(bytes).toBeLessThan(56 * 1024);
});
