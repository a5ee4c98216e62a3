// npm run bench: speed as ratios, measured side by side in one run. It judges nothing; the goals stand beside the figures.
import { spawnSync } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { lots, wholeLot } from './lot.mjs';
import { once, pair } from './measure.mjs';

const here = dirname(fileURLToPath(import.meta.url));
const root = join(here, '..', '..');
const program = join(root, 'dist', 'coilwright.js');
const work = mkdtempSync(join(tmpdir(), 'coilwright-bench-'));

const line = (what, { a, b, ratio, runs }, goal) =>
  console.log(
    `${what}: ratio ${ratio.toFixed(2)} (goal ${goal}); ${a.ms.toFixed(0)} ms and ${a.mb.toFixed(0)} MB against ` +
      `${b.ms.toFixed(0)} ms and ${b.mb.toFixed(0)} MB, medians of ${runs} pairs`,
  );

/** A TypeScript part of the bench as one file in the work folder. */
async function bundled(part) {
  const outfile = join(work, `${part}.mjs`);
  await build({
    entryPoints: [join(here, `${part}.ts`)],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    logLevel: 'error',
    external: ['@jscad/stl-serializer'],
    banner: { js: "import { createRequire as __c } from 'node:module'; const require = __c(import.meta.url);" },
  });
  return outfile;
}

// The large lot alone: minutes of work on one machine, and no ratio to anything.
if (process.argv.includes('--lot')) {
  try {
    wholeLot(program, work);
  } finally {
    rmSync(work, { recursive: true, force: true });
  }
  process.exit();
}

try {
  copyFileSync(createRequire(import.meta.url).resolve('manifold-3d/manifold.wasm'), join(work, 'manifold.wasm'));
  symlinkSync(join(root, 'node_modules'), join(work, 'node_modules'));
  for (const font of ['DejaVuSans', 'DejaVuSans-Bold'])
    copyFileSync(join(root, 'dist', `${font}.ttf`), join(work, `${font}.ttf`));
  const bare = join(work, 'bare.mjs');
  writeFileSync(bare, '');
  line('coilwright --help against a bare Node start', pair([program, '--help'], [bare], 15), '1.9 or less');

  const job = join(root, 'templates', 'jobs', 'low-bench-receiver.yaml');
  const out = join(work, 'out');
  const plan = [program, 'plan', job, '--out', out];
  pair(plan, [bare], 1);
  const former = [join(here, 'bare-former.mjs'), join(out, 'plan.json')];
  line('plan, all files, against the same former by the bare libraries', pair(plan, former, 7), '2.5 or less');

  // Seventy turns and thirteen taps at the chords that the planner chooses.
  const seventy = join(work, 'seventy.yaml');
  writeFileSync(
    seventy,
    'job: Seventy turns\nwant: { inductance: 8 uH to 208 uH, taps: 13 }\nwire: 24 AWG enamel\nparts: former\n' +
      'former: { outside-diameter: 80 mm, longest: 140 mm }\nwinding: { pitch: 1.6 mm, tap-method: drawn in }\n',
  );
  pair([program, 'plan', seventy, '--out', join(work, 'seventy')], [bare], 1);
  const record = join(work, 'seventy', 'plan.json');
  const { former: grooved, windings } = JSON.parse(readFileSync(record, 'utf8'));
  const what = `former of ${windings[0].turns.toFixed(1)} turns, ${windings[0].taps.length} taps, ${grooved.segments} chords`;
  const own = await bundled('former');
  line(
    `${what}, checked, against the same by the bare kernel`,
    pair([own, record], [join(here, 'bare-former.mjs'), record], 7),
    '1.5 or less',
  );
  // The other side may take minutes: once is enough, and after a minute it has lost.
  const coarse = once([own, record, '48']);
  const alone = once([join(here, 'jscad-former.mjs'), record], 60_000);
  console.log(
    `the same at 48 chords against booleans of @jscad/modeling alone, without numbers: ${alone.stopped ? 'less than ' : ''}` +
      `${(coarse.ms / alone.ms).toFixed(3)} of the time (goal 0.1 or less); ${coarse.ms.toFixed(0)} ms against ` +
      `${alone.stopped ? 'more than ' : ''}${alone.ms.toFixed(0)} ms`,
  );
  for (const part of ['hundred', 'sheet']) {
    const { status, stdout, stderr } = spawnSync(process.execPath, [await bundled(part), record], { encoding: 'utf8' });
    process.stdout.write(status === 0 ? stdout : stderr);
  }

  lots(program, work);

  for (const part of ['search', 'field']) {
    await import(pathToFileURL(await bundled(part)));
  }
} finally {
  rmSync(work, { recursive: true, force: true });
}
