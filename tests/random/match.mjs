// npm run check:match: random old coils, measured with errors and not wholly, through the inference; seeded and resumable.
//
//     npm run check:match -- [--coils 600] [--seed 1] [--fresh]
//
// Seeds are taken from --seed on until so many coils are inferred; refusals for too little are counted beside them. The truth must lie
// within the stated 95 % limits in 93 to 97 % of all figures, and turns that are said to be determined must be right in 95 % and more.
//
// Outcomes are kept in node_modules/.cache and a run that was broken off goes on where it was; --fresh starts anew.
import { mkdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { parseArgs } from 'node:util';
import { build } from 'esbuild';
import { outcomesOf, tally } from './runner.mjs';

const { values } = parseArgs({
  options: {
    coils: { type: 'string', default: '600' },
    seed: { type: 'string', default: '1' },
    fresh: { type: 'boolean', default: false },
  },
});
const [coils, first] = [values.coils, values.seed].map(Number);

const all = await outcomesOf({
  name: 'match',
  entry: 'match-batch.ts',
  first,
  most: 3 * coils,
  fresh: values.fresh,
  enough: (outcomes) => outcomes.filter(({ result }) => result === 'inferred').length >= coils,
});

const here = dirname(fileURLToPath(import.meta.url));
const folder = join(here, '..', '..', 'node_modules', '.cache', 'random-match');
mkdirSync(folder, { recursive: true });
const outfile = join(folder, 'coverage.mjs');
await build({ entryPoints: [join(here, 'coverage.ts')], outfile, bundle: true, format: 'esm', logLevel: 'error' });
const { coverageOf, kindsOf, turnsOf } = await import(pathToFileURL(outfile).href);

const of = (result) => all.outcomes.filter((one) => one.result === result);
const inferred = of('inferred');
if (inferred.length === 0) throw new Error('no coil was inferred');
const line = ({ kind, figures, percent, halfPercent, alone, byCoils }) =>
  `${kind.padEnd(28)} ${String(figures).padStart(6)} figures, ${percent.toFixed(1)} % within; error of that ±${alone.toFixed(1)} (binomial), ±${byCoils.toFixed(1)} (coils); ${halfPercent.toFixed(0)} % within half`;
for (const kind of kindsOf(inferred)) console.log(line(coverageOf(inferred, kind)));
const whole = coverageOf(inferred, null);
console.log(line(whole));
const turns = turnsOf(inferred);
for (const { kind, determined, count, right, stated } of turns)
  console.log(
    `turns ${kind}, ${determined ? 'determined' : 'left open'}: ${count}, ${right} right (${stated.toFixed(1)} by the weights stated)`,
  );
const ms = inferred.map((one) => one.ms).sort((a, b) => a - b);
const contradictions = inferred.filter((one) => one.contradictions > 0).length;
console.log(
  `random coils: ${all.seeds} (${all.kept} from before, ${all.done} in ${all.seconds.toFixed(0)} s); ${inferred.length} inferred ` +
    `(${ms[ms.length >> 1]} ms in the middle, ${ms.at(-1)} at most), ${of('refused').length} refused (${tally(of('refused').map(({ said }) => [...new Set(said)]))}), ` +
    `${of('failed').length} failed; ${contradictions} with a contradiction that is none`,
);
const determined = turns.filter((one) => one.determined).reduce((sum, one) => sum + one.count, 0);
const right = turns.filter((one) => one.determined).reduce((sum, one) => sum + one.right, 0);
const good = whole.percent >= 93 && whole.percent <= 97 && determined > 0 && right >= 0.95 * determined;
if (!good || of('failed').length > 0) {
  console.log('not as stated');
  process.exit(1);
}
