// npm run check:sheets: the sheets of random jobs as drawings, seeded and resumable. No text may stand over another, outside
// its frame, or be too small to read.
//
//     npm run check:sheets -- [--made 200] [--seed 1] [--fresh]
import { copyFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { parseArgs } from 'node:util';
import { outcomesOf, tally } from './runner.mjs';

const { values } = parseArgs({
  options: {
    made: { type: 'string', default: '200' },
    seed: { type: 'string', default: '1' },
    fresh: { type: 'boolean', default: false },
  },
});
const [made, first] = [values.made, values.seed].map(Number);
const fonts = dirname(createRequire(import.meta.url).resolve('dejavu-fonts-ttf/package.json'));

const all = await outcomesOf({
  name: 'sheets',
  entry: 'sheets-batch.ts',
  first,
  most: 20 * made,
  fresh: values.fresh,
  enough: (outcomes) => outcomes.filter(({ result }) => result === 'made').length >= made,
  prepare: (folder) => {
    for (const font of ['DejaVuSans', 'DejaVuSans-Bold'])
      copyFileSync(join(fonts, 'ttf', `${font}.ttf`), join(folder, `${font}.ttf`));
  },
});
const of = (result) => all.outcomes.filter((one) => one.result === result);
const sum = (key) => of('made').reduce((total, one) => total + one[key], 0);
console.log(`refused: ${tally(of('refused').map(({ said }) => [...new Set(said)]))}`);
console.log(
  `random jobs: ${all.seeds} (${all.kept} from before, ${all.done} in ${all.seconds.toFixed(0)} s); ${of('made').length} with sheets ` +
    `(${sum('pages')} pages, ${sum('texts')} texts), ${of('refused').length} refused, ${of('failed').length} failed`,
);
for (const { seed, said } of of('failed')) console.log(`  seed ${seed}: ${said[0]?.split('\n')[0]}`);
if (of('failed').length > 0 || of('made').length === 0) process.exit(1);
