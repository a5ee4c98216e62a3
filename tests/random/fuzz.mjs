// npm run check:fuzz: damaged and made-up files of every kind through their readers, seeded and resumable, a fresh process every 200.
// Every one is read whole or refused with faults that say something, in less than 5 s of the processor and 600 MB; some of those that are
// read go on to their record.
//
//     npm run check:fuzz -- [--made 10000] [--seed 1] [--fresh]
//
// Outcomes are kept in node_modules/.cache and a run that was broken off goes on where it was; --fresh starts anew.
import { parseArgs } from 'node:util';
import { outcomesOf, tally } from './runner.mjs';

const { values } = parseArgs({
  options: {
    made: { type: 'string', default: '10000' },
    seed: { type: 'string', default: '1' },
    fresh: { type: 'boolean', default: false },
  },
});
const [made, first] = [values.made, values.seed].map(Number);

const all = await outcomesOf({
  name: 'fuzz',
  entry: 'fuzz-batch.ts',
  first,
  most: made,
  fresh: values.fresh,
  size: 200,
  // Much longer than any file may take of the processor: whatever else the machine does, it has hung.
  patienceMs: 180_000,
  enough: (outcomes) => outcomes.length >= made,
});
const of = (result) => all.outcomes.filter((one) => one.result === result);
const most = (key) => all.outcomes.reduce((found, one) => Math.max(found, one[key]), 0);
const read = all.outcomes.filter(({ result }) => result !== 'refused' && result !== 'failed');
console.log(`kinds: ${tally(all.outcomes.map(({ kind }) => kind))}`);
console.log(`damage: ${tally(all.outcomes.map(({ by }) => by))}`);
console.log(`refused: ${tally(of('refused').map(({ said }) => [...new Set(said)]))}`);
console.log(
  `files: ${all.outcomes.length} (${all.kept} from before, ${all.done} in ${all.seconds.toFixed(0)} s); ${of('refused').length} refused, ` +
    `${read.length} read (${tally(read.map(({ kind }) => kind))}), of these ${of('made').length} made into a record and ${of('nothing fits').length} that nothing fits, ` +
    `${of('failed').length} failed; at most ${most('readMs')} ms to read, ${most('madeMs')} ms to the record, ${most('mb')} MB`,
);
for (const { seed, kind, by, said } of of('failed'))
  console.log(`  seed ${seed} (${kind}; ${by}): ${said[0]?.split('\n')[0]}`);
if (of('failed').length > 0 || of('refused').length === 0 || of('made').length === 0) process.exit(1);
