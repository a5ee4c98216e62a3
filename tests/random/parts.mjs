// npm run check:parts: the printed parts of random jobs, seeded and resumable. Every one passes the checks on its bytes or is
// refused with a reason; anything else is a failure.
//
//     npm run check:parts -- [--made 1000] [--seed 1] [--fresh]
//
// Seeds are taken from --seed on until so many jobs are made; every ninth has the chords of the planner, the others fewer.
//
// Outcomes are kept in node_modules/.cache and a run that was broken off goes on where it was; --fresh starts anew.
import { spawn } from 'node:child_process';
import { appendFileSync, copyFileSync, existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { availableParallelism } from 'node:os';
import { dirname, join } from 'node:path';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { build } from 'esbuild';

const { values } = parseArgs({
  options: {
    made: { type: 'string', default: '1000' },
    seed: { type: 'string', default: '1' },
    fresh: { type: 'boolean', default: false },
  },
});
const [made, first] = [values.made, values.seed].map(Number);
/** Every so many jobs at full resolution. */
const FULL = 9;
const here = dirname(fileURLToPath(import.meta.url));
const root = join(here, '..', '..');
const cache = join(root, 'node_modules', '.cache', 'random-parts');
const log = join(cache, `${first}.jsonl`);
mkdirSync(cache, { recursive: true });
if (values.fresh) rmSync(log, { force: true });

await build({
  entryPoints: [join(here, 'batch.ts')],
  outfile: join(cache, 'batch.mjs'),
  bundle: true,
  platform: 'node',
  format: 'esm',
  logLevel: 'error',
  external: ['@jscad/stl-serializer'],
  banner: { js: "import { createRequire as __c } from 'node:module'; const require = __c(import.meta.url);" },
});
copyFileSync(createRequire(import.meta.url).resolve('manifold-3d/manifold.wasm'), join(cache, 'manifold.wasm'));

const outcomes = new Map();
if (existsSync(log))
  for (const line of readFileSync(log, 'utf8').split('\n')) {
    // A line that was cut off when the run was broken off is done again.
    try {
      const outcome = JSON.parse(line);
      outcomes.set(outcome.seed, outcome);
    } catch {}
  }
const kept = outcomes.size;
let next = first;
/** Seeds that are still to do, in order, as many as a batch takes; none when enough is made. */
function batchOf(size) {
  const batch = [];
  while (batch.length < size && of('made').length < made) {
    if (!outcomes.has(next)) batch.push(`${next}:${next % FULL === 0 ? 'full' : 'coarse'}`);
    next++;
    if (next - first > 20 * made) break;
  }
  return batch;
}
const of = (result) =>
  [...outcomes.values()].filter((one) => one.seed >= first && one.seed < next && one.result === result);
const BATCH = 20;
const started = Date.now();
let done = 0;

/** A fresh process every so many jobs, so that what one leaves behind cannot help or harm the rest. */
async function work() {
  for (;;) {
    const batch = batchOf(BATCH);
    if (batch.length === 0) return;
    const child = spawn(process.execPath, [join(cache, 'batch.mjs'), ...batch], {
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    const ended = new Promise((resolve) => child.on('close', resolve));
    for await (const line of createInterface({ input: child.stdout })) {
      const outcome = JSON.parse(line);
      outcomes.set(outcome.seed, outcome);
      appendFileSync(log, `${line}\n`);
      done++;
      if (outcome.result === 'failed') console.log(`seed ${outcome.seed} failed: ${outcome.said.join('; ')}`);
    }
    const code = await ended;
    if (code !== 0) throw new Error(`a batch ended with code ${code}: ${batch.join(' ')}`);
  }
}
await Promise.all(Array.from({ length: Math.min(2, availableParallelism()) }, work));

const tally = (lists) => {
  const counts = new Map();
  for (const one of lists.flat()) counts.set(one, (counts.get(one) ?? 0) + 1);
  return [...counts]
    .sort((a, b) => b[1] - a[1])
    .map(([what, n]) => `${what} ${n}`)
    .join(', ');
};
console.log(`made: ${tally(of('made').map(({ features }) => features))}`);
console.log(`refused: ${tally(of('refused').map(({ said }) => [...new Set(said)]))}`);
const fine = of('made').filter(({ seed }) => seed % FULL === 0).length;
const files = of('made').reduce((sum, { said }) => sum + said.length, 0);
const triangles = of('made').reduce((sum, one) => sum + one.triangles, 0);
console.log(
  `random jobs: ${next - first} (${kept} from before, ${done} in ${((Date.now() - started) / 1000).toFixed(0)} s); ` +
    `${of('made').length} made (${files} files, ${triangles} triangles, ${fine} jobs at full resolution), ${of('refused').length} refused, ${of('failed').length} failed`,
);
for (const { seed, said } of of('failed')) console.log(`  seed ${seed}: ${said[0]?.split('\n')[0]}`);
if (of('failed').length > 0 || of('made').length === 0) process.exit(1);
