// What the seeded, resumable runs share: cases are worked out in children, a fresh one every so many, and every outcome is kept in
// node_modules/.cache at once, so that a run that was broken off goes on where it was.
import { spawn } from 'node:child_process';
import { appendFileSync, existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { dirname, join } from 'node:path';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const here = dirname(fileURLToPath(import.meta.url));
/** Seeds to a child where nothing else is said, so that what one case leaves behind cannot help or harm the rest. */
const BATCH = 20;

/**
 * Outcomes of the seeds from `first` on until `enough` of them says so, or `most` seeds were taken. `entry` is a file beside this
 * one that prints the outcome (one line of JSON with its `seed`) of each of its arguments; `order` makes an argument of a seed.
 * `prepare` puts beside the bundle what it reads. `external`: packages that are not bundled. A child that is silent for `patienceMs` is ended. Throws when one ends badly.
 */
export async function outcomesOf({
  name,
  entry,
  first,
  most,
  fresh,
  enough,
  order = String,
  prepare = () => {},
  size = BATCH,
  patienceMs = null,
  external = [],
}) {
  const cache = join(here, '..', '..', 'node_modules', '.cache', `random-${name}`);
  const log = join(cache, `${first}.jsonl`);
  mkdirSync(cache, { recursive: true });
  if (fresh) rmSync(log, { force: true });
  const bundle = join(cache, 'batch.mjs');
  await build({
    entryPoints: [join(here, entry)],
    outfile: bundle,
    bundle: true,
    platform: 'node',
    format: 'esm',
    logLevel: 'error',
    external: ['@jscad/stl-serializer', ...external],
    loader: { '.yaml': 'text' },
    banner: { js: "import { createRequire as __c } from 'node:module'; const require = __c(import.meta.url);" },
  });
  prepare(cache);

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
  const started = Date.now();
  let next = first;
  let done = 0;
  const taken = () => [...outcomes.values()].filter(({ seed }) => seed >= first && seed < next);

  /** Seeds that are still to do, in order, as many as a batch takes; none when there is enough. */
  function batchOf() {
    const batch = [];
    while (batch.length < size && !enough(taken()) && next - first <= most) {
      if (!outcomes.has(next)) batch.push(order(next));
      next++;
    }
    return batch;
  }

  async function work() {
    for (;;) {
      const batch = batchOf();
      if (batch.length === 0) return;
      const child = spawn(process.execPath, [bundle, ...batch], { stdio: ['ignore', 'pipe', 'inherit'] });
      const ended = new Promise((resolve) => child.on('close', resolve));
      let silent = null;
      const wait = () => {
        clearTimeout(silent);
        if (patienceMs !== null) silent = setTimeout(() => child.kill('SIGKILL'), patienceMs);
      };
      wait();
      let answered = 0;
      for await (const line of createInterface({ input: child.stdout })) {
        wait();
        answered++;
        const outcome = JSON.parse(line);
        outcomes.set(outcome.seed, outcome);
        appendFileSync(log, `${line}\n`);
        done++;
        if (outcome.result === 'failed') console.log(`seed ${outcome.seed} failed: ${outcome.said.join('; ')}`);
      }
      const code = await ended;
      clearTimeout(silent);
      if (code !== 0) throw new Error(`a batch ended with code ${code} at ${batch[answered]}: ${batch.join(' ')}`);
    }
  }
  await Promise.all(Array.from({ length: Math.min(2, availableParallelism()) }, work));
  return { outcomes: taken(), seeds: next - first, kept, done, seconds: (Date.now() - started) / 1000 };
}

/** How often each thing stands in lists, the most frequent first: `tube 12, grooved 3`. */
export function tally(lists) {
  const counts = new Map();
  for (const one of lists.flat()) counts.set(one, (counts.get(one) ?? 0) + 1);
  return [...counts]
    .sort((a, b) => b[1] - a[1])
    .map(([what, n]) => `${what} ${n}`)
    .join(', ');
}
