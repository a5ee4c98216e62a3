// npm run check:faults [-- --seed=1 --kills=100 --meetings=20 --pranks=5 --fresh]: the built program where writing goes wrong: killed
// at random moments, full and read-only disks (where a disk in memory can be mounted), folders taken away under it, runs that meet in
// one folder. Goes on where it was broken off. COILWRIGHT names another build.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { coilwright, demand, jobsIn, journal, must, option, random, told } from './ground.mjs';
import { killOnce, meetOnce } from './kills.mjs';
import { canMount, fillDisk, PRANK_NAMES, prank, readOnly } from './places.mjs';

const seed = Number(option('seed', 1));
const [kills, meetings, pranks] = [option('kills', 100), option('meetings', 20), option('pranks', 5)].map(Number);
const STEPS = 6;
const done = journal('check', seed, process.argv.includes('--fresh'));
const base = mkdtempSync(join(tmpdir(), 'coilwright-faults-'));
let failed = 0;

/** Does a case unless it was done before; its own chance makes it the same wherever the run goes on. */
async function once(name, number, make) {
  const one = `${name} ${number}`;
  if (done.has(one)) return;
  try {
    const answer = await make(random(seed * 1_000_003 + number * 7919 + name.length));
    done.add(one);
    if (answer === false) done.add(`passed over: ${one}`);
  } catch (error) {
    failed++;
    console.log(`${one} failed: ${error.message}`);
  }
}

const prepared = new Map();
/** Words, whole output and time of a verb, worked out when the first case asks for it. */
async function of(verb) {
  if (!prepared.has(verb)) prepared.set(verb, await prepare(verb));
  return prepared.get(verb);
}

async function prepare(verb) {
  const words = (await jobsIn(base, [verb])).get(verb);
  await must(base, [...words, '--out', `expected-${verb}`]);
  const from = performance.now();
  await must(base, [...words, '--out', `again-${verb}`]);
  const wholeMs = performance.now() - from;
  const expected = told(join(base, `expected-${verb}`));
  demand(expected !== '' && told(join(base, `again-${verb}`)) === expected, `${verb}: two undisturbed runs differ`);
  return { words, expected, wholeMs };
}

try {
  // The slow verbs are killed less often; all write by the same means.
  const killed = ['survey', 'prove', 'survey', 'plan', 'prove', 'survey', 'prove', 'plan', 'survey', 'match'];
  for (let n = 0; done.count('kill ') - done.count('passed over: kill ') < kills && n < 3 * kills; n++)
    await once('kill', n, async (next) =>
      killOnce({ base: join(base, 'killed'), next, ...(await of(killed[n % killed.length])) }),
    );

  for (let n = 0; n < meetings; n++) {
    const verbs = n % 4 === 3 ? ['survey', 'prove'] : [['survey', 'prove', 'plan'][n % 3]];
    await once('meeting', n, async (next) => {
      const cases = [];
      for (const verb of verbs) cases.push(await of(verb));
      await meetOnce({
        base: join(base, 'met'),
        words: cases.map(({ words }) => words),
        expected: cases.map(({ expected }) => expected),
        count: 2 + (n % 2),
        next,
        wholeMs: cases[0].wholeMs,
      });
    });
  }

  for (let n = 0; n < pranks * PRANK_NAMES.length; n++)
    await once('prank', n, async (next) =>
      prank({ base, next, name: PRANK_NAMES[n % PRANK_NAMES.length], ...(await of(n % 3 === 2 ? 'prove' : 'survey')) }),
    );

  if (canMount(base)) {
    for (const [n, verb] of ['survey', 'prove', 'plan', 'lot'].entries())
      await once('disk', n, async () => {
        const keeps = verb === 'lot' ? /-work$/ : /^$/;
        const full = await fillDisk({ base, steps: STEPS, keeps, ...(await of(verb)) });
        demand(full > STEPS, `${verb}: found the disk full only ${full} times`);
      });
    for (const [n, verb] of ['survey', 'prove', 'plan', 'lot'].entries())
      await once('sealed', n, async () => readOnly({ base, ...(await of(verb)) }));
  } else console.log('no disk can be mounted here: full and read-only disks are left out');

  await once('unsaid', 0, async () => {
    await of('survey');
    const { code, err } = await coilwright(base, ['survey', 'found-coil.yaml'], {
      by: ['sh', '-c', 'exec "$0" "$1" "$2" "$3" > /dev/full'],
    });
    demand(code === 5 && /standard output got a full disk/.test(err), `ended with ${code}: ${err}`);
  });
} finally {
  rmSync(base, { recursive: true, force: true });
}
const counted = ['kill', 'meeting', 'prank', 'disk', 'sealed', 'unsaid'].map((name) => [
  name,
  done.count(`${name} `) - done.count(`passed over: ${name} `),
]);
console.log(
  `faults while writing, seed ${seed}: ${counted.map(([name, count]) => `${name} ${count}`).join(', ')}; failed ${failed}`,
);
if (failed > 0 || counted.slice(0, 3).some(([, count]) => count === 0)) process.exitCode = 1;
