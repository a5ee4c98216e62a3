// npm run check:designs: random jobs of every kind to their record, some with all outputs, seeded and resumable. Every claim of a record
// is recomputed by the plain second implementation in tests/plain, files are read back, meshes and texts checked.
//
//     npm run check:designs -- [--made 2000] [--whole 500] [--seed 1] [--fresh]
//
// Seeds are taken from --seed on until so many jobs are made; every fourth, until there are enough, goes on to all outputs.
// Outcomes are kept in node_modules/.cache and a run that was broken off goes on where it was; --fresh starts anew.
import { copyFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { build } from 'esbuild';
import { outcomesOf, tally } from './runner.mjs';

const { values } = parseArgs({
  options: {
    made: { type: 'string', default: '2000' },
    whole: { type: 'string', default: '500' },
    seed: { type: 'string', default: '1' },
    fresh: { type: 'boolean', default: false },
  },
});
const [made, whole, first] = [values.made, values.whole, values.seed].map(Number);
const require = createRequire(import.meta.url);
const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
/** Of so many jobs one goes on to all outputs; about half of all are refused, whichever. */
const EVERY = Math.max(1, Math.round(made / Math.max(1, whole)));

/** What the program has beside it once it is built. */
function beside(folder) {
  const fonts = dirname(require.resolve('dejavu-fonts-ttf/package.json'));
  for (const font of ['DejaVuSans', 'DejaVuSans-Bold', 'DejaVuSansMono'])
    copyFileSync(join(fonts, 'ttf', `${font}.ttf`), join(folder, `${font}.ttf`));
  copyFileSync(require.resolve('manifold-3d/manifold.wasm'), join(folder, 'manifold.wasm'));
  copyFileSync(join(root, 'templates/bench/page.html'), join(folder, 'bench-page.html'));
}
const folder = join(root, 'node_modules', '.cache', 'random-designs');
const page = { outdir: folder, bundle: true, minify: true, legalComments: 'none' };
await build({
  ...page,
  entryPoints: { 'bench-page': join(root, 'src/bench/page-main.ts') },
  format: 'iife',
  target: 'es2020',
});
await build({ ...page, entryPoints: { 'bench-page': join(root, 'templates/bench/page.css') } });

const all = await outcomesOf({
  name: 'designs',
  entry: 'designs-batch.ts',
  first,
  most: 20 * made,
  fresh: values.fresh,
  enough: (outcomes) => outcomes.filter(({ result }) => result !== 'refused').length >= made,
  order: (seed) => `${seed}:${whole > 0 && seed % EVERY === 0 ? 'whole' : 'record'}`,
  prepare: beside,
  external: ['pdfjs-dist'],
});
const of = (...results) => all.outcomes.filter(({ result }) => results.includes(result));
const good = of('made', 'whole');
const figures = good.reduce((sum, one) => sum + one.figures, 0);
const fields = new Set(all.outcomes.flatMap((one) => one.fields));
console.log(`made: ${tally(good.map(({ features }) => features))}`);
console.log(`refused: ${tally(of('refused').map(({ said }) => [...new Set(said)]))}`);
console.log(
  `random designs: ${all.seeds} (${all.kept} from before, ${all.done} in ${all.seconds.toFixed(0)} s); ${good.length} made, ` +
    `${of('whole').length} of them with all outputs (${figures} figures of ${fields.size} fields recomputed), ` +
    `${of('refused').length} refused, ${of('failed').length} failed`,
);
for (const { seed, said } of of('failed')) console.log(`  seed ${seed}: ${said[0]?.split('\n')[0]}`);
if (of('failed').length > 0 || good.length === 0 || (whole > 0 && of('whole').length === 0)) process.exit(1);
