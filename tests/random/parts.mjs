// npm run check:parts: the printed parts of random jobs, seeded and resumable. Every one passes the checks on its bytes or is
// refused with a reason; anything else is a failure.
//
//     npm run check:parts -- [--made 1000] [--seed 1] [--fresh]
//
// Seeds are taken from --seed on until so many jobs are made; every ninth has the chords of the planner, the others fewer.
//
// Outcomes are kept in node_modules/.cache and a run that was broken off goes on where it was; --fresh starts anew.
import { copyFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { outcomesOf, tally } from './runner.mjs';

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

const all = await outcomesOf({
  name: 'parts',
  entry: 'batch.ts',
  first,
  most: 20 * made,
  fresh: values.fresh,
  enough: (outcomes) => outcomes.filter(({ result }) => result === 'made').length >= made,
  order: (seed) => `${seed}:${seed % FULL === 0 ? 'full' : 'coarse'}`,
  prepare: (folder) =>
    copyFileSync(createRequire(import.meta.url).resolve('manifold-3d/manifold.wasm'), join(folder, 'manifold.wasm')),
});
const of = (result) => all.outcomes.filter((one) => one.result === result);
console.log(`made: ${tally(of('made').map(({ features }) => features))}`);
console.log(`refused: ${tally(of('refused').map(({ said }) => [...new Set(said)]))}`);
const fine = of('made').filter(({ seed }) => seed % FULL === 0).length;
const files = of('made').reduce((sum, { said }) => sum + said.length, 0);
const triangles = of('made').reduce((sum, one) => sum + one.triangles, 0);
console.log(
  `random jobs: ${all.seeds} (${all.kept} from before, ${all.done} in ${all.seconds.toFixed(0)} s); ` +
    `${of('made').length} made (${files} files, ${triangles} triangles, ${fine} jobs at full resolution), ${of('refused').length} refused, ${of('failed').length} failed`,
);
for (const { seed, said } of of('failed')) console.log(`  seed ${seed}: ${said[0]?.split('\n')[0]}`);
if (of('failed').length > 0 || of('made').length === 0) process.exit(1);
