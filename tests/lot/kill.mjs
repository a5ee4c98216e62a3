// npm run check:kill [-- --kills=50 --seed=1]: kills the built program at random moments of a lot, starts it again, and compares
// every byte with an undisturbed run. Moments are spread over the whole of a run; every third folder is there before, with a
// file in it that is not ours, and every second run is killed more than once. COILWRIGHT names another build to be killed.
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, lstatSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const PROGRAM = process.env.COILWRIGHT ?? fileURLToPath(new URL('../../dist/coilwright.js', import.meta.url));

const job = (name, diameter) =>
  `job: ${name}\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n` +
  `former: { kind: tube, outside-diameter: ${diameter} mm, longest: 120 mm, material: card }\n`;
const LOT = JSON.stringify({
  lot: 'Two drums',
  coils: [
    { job: 'drum.yaml', quantity: 3 },
    { job: 'second.yaml', quantity: 2 },
  ],
  spools: [{ name: 'Reel 1', wire: '0.5 mm enamel', left: '30 m' }],
  jigs: 'none',
});

/** Numbers between 0 and 1 that are the same for the same seed (mulberry32, from memory). */
function random(seed) {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Runs the program, or kills it after so many milliseconds; true when it was killed. */
function run(base, out, afterMs) {
  return new Promise((done, fail) => {
    const child = spawn(process.execPath, [PROGRAM, 'lot', 'lot.yaml', '--out', out], {
      cwd: base,
      stdio: ['ignore', 'ignore', 'pipe'],
    });
    let said = '';
    child.stderr.on('data', (data) => {
      said += data;
    });
    const timer = afterMs === undefined ? null : setTimeout(() => child.kill('SIGKILL'), afterMs);
    child.on('exit', (code, signal) => {
      if (timer) clearTimeout(timer);
      if (signal === 'SIGKILL') done(true);
      else if (code === 0) done(false);
      else fail(new Error(`the program ended with ${code}: ${said}`));
    });
  });
}

/** Everything below a folder as one text: paths, and the hash of each file. */
function told(folder, prefix = '') {
  return readdirSync(folder)
    .sort()
    .map((name) => {
      const path = join(folder, name);
      if (lstatSync(path).isDirectory()) return told(path, `${prefix}${name}/`);
      return `${prefix}${name} ${createHash('sha256').update(readFileSync(path)).digest('hex')}\n`;
    })
    .join('');
}

/** How far a killed run had come. */
function stageOf(base, out) {
  const work = join(base, `.${out}.coilwright-work`);
  if (!existsSync(work)) return existsSync(join(base, out, 'lot.json')) ? 'written or not begun' : 'not begun';
  const units = readdirSync(work).filter((name) => !name.endsWith('.new')).length;
  return `${units} units finished`;
}

/**
 * Kills at least `kills` runs. Throws when anything but the whole and undisturbed outcome is there after the last run of a folder.
 * @returns how many were killed, how many times an outcome was compared, and at what stages the kills fell
 */
export async function killLots({ kills, seed, say = () => undefined }) {
  const base = mkdtempSync(join(tmpdir(), 'coilwright-kill-'));
  try {
    writeFileSync(join(base, 'drum.yaml'), job('Small drum', 50));
    writeFileSync(join(base, 'second.yaml'), job('Second drum', 40));
    writeFileSync(join(base, 'lot.yaml'), LOT);
    await run(base, 'undisturbed');
    const from = performance.now();
    await run(base, 'again');
    const wholeMs = performance.now() - from;
    const expected = told(join(base, 'undisturbed'));
    if (expected === '' || told(join(base, 'again')) !== expected) throw new Error('two undisturbed runs differ');
    rmSync(join(base, 'again'), { recursive: true });
    const next = random(seed);
    const stages = new Map();
    let killed = 0;
    let compared = 0;
    for (let n = 0; killed < kills; n++) {
      const out = `lot-${n}`;
      const mine = n % 3 === 2;
      if (mine) {
        await run(base, out);
        writeFileSync(join(base, out, 'notes.txt'), 'mine');
      }
      // Later moments weigh as much as earlier ones though what was finished makes the next run shorter.
      for (let times = n % 2 === 0 ? 1 : 3; times > 0; times--) {
        if (!(await run(base, out, (0.15 + next()) * wholeMs))) break;
        killed++;
        const stage = stageOf(base, out);
        stages.set(stage, (stages.get(stage) ?? 0) + 1);
        if (mine && !holdsMine(base, out)) throw new Error(`run ${n}: a file that is not ours is lost`);
      }
      await run(base, out);
      const found = told(join(base, out));
      const theirs = found.match(/^notes\.txt .*\n/m)?.[0] ?? '';
      if (mine !== (theirs !== '') || found.replace(theirs, '') !== expected)
        throw new Error(`run ${n}: the outcome differs from an undisturbed run`);
      const beside = readdirSync(base).filter((name) => name.startsWith('.'));
      if (beside.length > 0) throw new Error(`run ${n} left ${beside.join(', ')}`);
      rmSync(join(base, out), { recursive: true });
      compared++;
      say(`${killed} killed, ${compared} outcomes compared`);
    }
    return { killed, compared, files: expected.split('\n').length - 1, stages };
  } finally {
    rmSync(base, { recursive: true, force: true });
  }
}

/** In the folder, or in the one that waits beside it. */
function holdsMine(base, out) {
  return [out, `.${out}.coilwright-old`].some((folder) => existsSync(join(base, folder, 'notes.txt')));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const option = (name, otherwise) =>
    Number(process.argv.find((word) => word.startsWith(`--${name}=`))?.split('=')[1] ?? otherwise);
  const seed = option('seed', 1);
  const { killed, compared, files, stages } = await killLots({
    kills: option('kills', 50),
    seed,
    say: (text) => process.stderr.isTTY && process.stderr.write(`\r${text} `),
  });
  if (process.stderr.isTTY) process.stderr.write('\n');
  console.log(
    `lots killed at random moments, seed ${seed}: ${killed} kills; ${compared} outcomes of ${files} files compared byte for byte, all as undisturbed`,
  );
  for (const [stage, count] of [...stages].sort()) console.log(`  ${stage}: ${count}`);
  if (killed === 0 || compared === 0) process.exitCode = 1;
}
