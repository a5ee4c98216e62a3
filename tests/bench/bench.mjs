// npm run bench: speed as ratios, measured side by side in one run. It judges nothing; the goals stand beside the figures.
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { pair } from './measure.mjs';

const here = dirname(fileURLToPath(import.meta.url));
const root = join(here, '..', '..');
const program = join(root, 'dist', 'coilwright.js');
const work = mkdtempSync(join(tmpdir(), 'coilwright-bench-'));

const line = (what, { a, b, ratio, runs }, goal) =>
  console.log(
    `${what}: ratio ${ratio.toFixed(2)} (goal ${goal}); ${a.ms.toFixed(0)} ms and ${a.mb.toFixed(0)} MB against ` +
      `${b.ms.toFixed(0)} ms and ${b.mb.toFixed(0)} MB, medians of ${runs} pairs`,
  );

try {
  const bare = join(work, 'bare.mjs');
  writeFileSync(bare, '');
  line('coilwright --help against a bare Node start', pair([program, '--help'], [bare], 15), '1.9 or less');

  const job = join(root, 'templates', 'jobs', 'low-bench-receiver.yaml');
  const out = join(work, 'out');
  const plan = [program, 'plan', job, '--out', out];
  pair(plan, [bare], 1);
  const former = [join(here, 'bare-former.mjs'), join(out, 'plan.json')];
  line('plan, all files, against the same former by the bare libraries', pair(plan, former, 7), '2.5 or less');

  for (const part of ['search', 'field']) {
    const bundle = join(work, `${part}.mjs`);
    await build({
      entryPoints: [join(here, `${part}.ts`)],
      outfile: bundle,
      bundle: true,
      platform: 'node',
      format: 'esm',
      logLevel: 'error',
      banner: { js: "import { createRequire as __c } from 'node:module'; const require = __c(import.meta.url);" },
    });
    await import(pathToFileURL(bundle));
  }
} finally {
  rmSync(work, { recursive: true, force: true });
}
