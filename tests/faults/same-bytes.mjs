// npm run check:same [-- --fresh]: the same job gives the same bytes, wherever and whenever it is worked out: every starter, an old
// coil, readings and a lot, each in surroundings that a program might depend on. Goes on where it was broken off.
import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, utimesSync } from 'node:fs';
import { availableParallelism, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { demand, jobsIn, journal, must, told } from './ground.mjs';

const has = (command) => spawnSync('sh', ['-c', `command -v ${command}`], { stdio: 'ignore' }).status === 0;

/** Jobs that are quick enough for slow surroundings. */
const QUICK = ['plan', 'survey', 'prove'];

/** Each with what it changes. Locales that are not installed are known to the program's own library all the same. */
export function surroundings() {
  const all = {
    'bare locale': { env: { LC_ALL: 'C', LANG: 'C', TZ: 'UTC' } },
    'German, day ahead': { env: { LC_ALL: 'de_DE.UTF-8', LANG: 'de_DE.UTF-8', TZ: 'Pacific/Kiritimati' } },
    'Turkish, half hours': { env: { LC_ALL: 'tr_TR.UTF-8', LANG: 'tr_TR.UTF-8', TZ: 'America/St_Johns' } },
    'Japanese, day behind': { env: { LC_ALL: 'ja_JP.eucJP', LANG: 'ja_JP.eucJP', TZ: 'Pacific/Pago_Pago' } },
    'Arabic, zone of its own making': { env: { LC_ALL: 'ar_EG.UTF-8', LANG: 'ar_EG', TZ: 'XYZ-13:37' } },
    'another folder, tight mask, old files': { moved: true, umask: '077', old: true },
    'narrow, plain and dumb': { env: { COLUMNS: '40', TERM: 'dumb', NO_COLOR: '1' } },
    'another home, name and host of nobody': {
      env: { HOME: '/nonexistent', USER: 'nobody', LOGNAME: 'nobody', TMPDIR: '/nonexistent' },
    },
    'little memory': { env: { NODE_OPTIONS: '--max-old-space-size=700 --max-semi-space-size=1' } },
    'all interpreted': { flags: ['--no-opt', '--no-sparkplug'], slow: true },
  };
  if (has('taskset')) {
    all['one core'] = { by: ['taskset', '-c', '0'] };
    if (availableParallelism() > 1)
      all['another core, days ahead'] = { by: ['taskset', '-c', '1'], env: { TZ: 'Asia/Tokyo' } };
  }
  return all;
}

/**
 * Runs `words` in a copy of `base` changed as `how` says. Returns what came out: files, and what was printed unless the width of
 * the page or its signs were changed.
 */
export async function outcomeIn(base, words, how = {}, out = 'made') {
  const folder = how.moved ? join(base, 'far', 'from here ä', 'there') : base;
  if (how.moved) {
    mkdirSync(folder, { recursive: true });
    for (const name of how.inputs ?? []) cpSync(join(base, name), join(folder, name), { recursive: true });
  }
  if (how.old) for (const word of words) if (/\.(?:yaml|csv)$/.test(word)) utimesSync(join(folder, word), 1, 1);
  const by = [...(how.umask ? ['sh', '-c', `umask ${how.umask}; exec "$0" "$@"`] : []), ...(how.by ?? [])];
  rmSync(join(folder, out), { recursive: true, force: true });
  await must(folder, [...words, '--out', out], { env: how.env, by, flags: how.flags });
  return told(join(folder, out));
}

/** The `program` of every record below `files`, as `told` gives them. */
export function programsIn(folder, files) {
  return files
    .split('\n')
    .map((line) => line.split(' ')[0])
    .filter((path) => /(?:^|\/)(?:plan|lot|proof)\.json$/.test(path))
    .map((path) => JSON.parse(readFileSync(join(folder, path), 'utf8')).program);
}

/** What differs between two texts of `told`. */
export function differences(one, other) {
  const [a, b] = [one, other].map((text) => new Set(text.split('\n')));
  return [
    ...new Set(
      [...[...a].filter((line) => !b.has(line)), ...[...b].filter((line) => !a.has(line))].map(
        (line) => line.split(' ')[0],
      ),
    ),
  ];
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const { version } = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8'));
  const done = journal('same', 0, process.argv.includes('--fresh'));
  const base = mkdtempSync(join(tmpdir(), 'coilwright-same-'));
  let failed = 0;
  try {
    const jobs = await jobsIn(base, ['plan', 'survey', 'match', 'prove', 'lot']);
    for (const name of [
      'low-bench-receiver',
      'cracked-form-replacement',
      'forty-coil-lot',
      'coupled-aerial-receiver',
    ]) {
      await must(base, ['start', name]);
      jobs.set(name, ['plan', `${name}.yaml`]);
    }
    await must(base, ['start', 'found-sections']);
    jobs.set('found-sections', ['survey', 'found-sections.yaml']);
    const inputs = [...[...jobs.values()].map(([, file]) => file), 'small.yaml', 'records'];
    for (const [job, words] of jobs) {
      let expected = null;
      for (const [where, how] of Object.entries(surroundings())) {
        const one = `${job} in: ${where}`;
        if (done.has(one) || (how.slow && !QUICK.includes(job))) continue;
        expected ??= await outcomeIn(base, words, {}, 'first');
        const programs = programsIn(join(base, 'first'), expected);
        demand(
          programs.length > 0 && programs.every((program) => program === `coilwright ${version}`),
          `${job}: made by ${programs}`,
        );
        const found = await outcomeIn(base, words, { ...how, inputs });
        if (found === expected) done.add(one);
        else {
          failed++;
          console.log(`${one}: other bytes in ${differences(found, expected).join(', ')}`);
        }
      }
    }
  } finally {
    rmSync(base, { recursive: true, force: true });
  }
  console.log(`outputs made again in other surroundings: ${done.count('')} compared byte for byte, ${failed} differ`);
  if (failed > 0 || done.count('') === 0) process.exitCode = 1;
}
