/** Part of the bench: candidates a second in the search, and the search against designing every candidate. */
import { readJob } from '../../src/job/read.ts';
import { candidatesOf } from '../../src/solve/candidates.ts';
import { designOf } from '../../src/solve/design.ts';
import { aspectOf } from '../../src/solve/prefer.ts';
import { demandFor, search } from '../../src/solve/search.ts';

const job = (text: string) => readJob(text, 'bench.yaml');

const large = job(`
job: bench
want: { band: 530 kHz to 1700 kHz, overlap: 5 % }
set: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF }
former: { outside-diameter: 60 mm to 90 mm, longest: 140 mm, kind: printed }
`);
search(large);
const from = performance.now();
const found = search(large);
const seconds = (performance.now() - from) / 1e3;
console.log(
  `search over all stock wire: ${found.tried} candidates in ${(seconds * 1e3).toFixed(0)} ms, ${Math.round(found.tried / seconds)} a second, designs by the ring sum included`,
);

const small = ['least loss', 'compact', 'least wire', 'closest taps'].map((prefer) =>
  job(`
job: bench
want: { inductance: 20 uH to 200 uH, taps: 6 }
former: { outside-diameter: 50 mm to 56 mm, longest: 120 mm, kind: printed }
wire: [ 0.4 mm enamel, 0.5 mm enamel, 26 AWG double cotton ]
prefer: ${prefer}
`),
);
let alike = 0;
let everyMs = 0;
let searchMs = 0;
for (const one of small) {
  const aspect = aspectOf(one.prefer);
  const start = performance.now();
  const result = search(one);
  const middle = performance.now();
  const demand = demandFor(one);
  let best = Number.POSITIVE_INFINITY;
  for (const candidate of candidatesOf(one)) {
    const outcome = designOf(one, demand, candidate);
    if (outcome.ok) best = Math.min(best, aspect.of(outcome.design.metrics));
  }
  searchMs += middle - start;
  everyMs += performance.now() - middle;
  if ('chosen' in result && aspect.of(result.chosen.metrics) <= best * (1 + 1e-9)) alike++;
}
console.log(
  `search against designing every candidate: ${alike} of ${small.length} small jobs agree; ratio of time ${(searchMs / everyMs).toFixed(2)}`,
);
if (alike !== small.length) process.exitCode = 1;
