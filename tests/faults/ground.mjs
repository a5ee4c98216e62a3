// What the runs of this folder share: jobs, the built program as a process, and what lies in a folder as text.
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  appendFileSync,
  existsSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  readlinkSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** COILWRIGHT names another build to be tried. */
export const PROGRAM = process.env.COILWRIGHT ?? fileURLToPath(new URL('../../dist/coilwright.js', import.meta.url));

const SMALL =
  'job: Small drum\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n' +
  'former: { kind: tube, outside-diameter: 50 mm, longest: 120 mm, material: card }\nparts: comb\n';

/** Runs the program in `folder`. `env` is added to ours; `by` goes before Node, `flags` to it; `onStart` is given the process. */
export function coilwright(
  folder,
  given,
  { env = {}, onStart = () => {}, by = [], flags = [], program = PROGRAM } = {},
) {
  return new Promise((done) => {
    const [command, ...words] = [...by, process.execPath, ...flags, program, ...given];
    const child = spawn(command, words, {
      cwd: folder,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    const said = { out: '', err: '' };
    child.stdout.on('data', (data) => {
      said.out += data;
    });
    child.stderr.on('data', (data) => {
      said.err += data;
    });
    onStart(child);
    // Told in one line, so that no word is looked for across a break.
    child.on('close', (code, signal) => done({ code, signal, out: said.out, err: said.err.replace(/\s+/g, ' ') }));
  });
}

/** As {@link coilwright}, for what must succeed. */
export async function must(folder, given, how) {
  const ended = await coilwright(folder, given, how);
  if (ended.code !== 0) throw new Error(`${given.join(' ')} ended with ${ended.code ?? ended.signal}: ${ended.err}`);
  return ended;
}

/**
 * Jobs in `base`, one a verb that writes a folder, and the words that run it; `prove` has the record of the small drum to go by.
 * `verbs` names the ones that are wanted.
 */
export async function jobsIn(base, verbs) {
  const words = new Map();
  writeFileSync(join(base, 'small.yaml'), SMALL);
  if (verbs.includes('plan')) words.set('plan', ['plan', 'small.yaml']);
  if (verbs.includes('survey')) {
    await must(base, ['start', 'found-coil']);
    words.set('survey', ['survey', 'found-coil.yaml']);
  }
  if (verbs.includes('match')) {
    await must(base, ['start', 'broken-form']);
    words.set('match', ['match', 'broken-form.yaml']);
  }
  if (verbs.includes('prove')) {
    await must(base, ['plan', 'small.yaml', '--out', 'records']);
    const { hash, windings } = JSON.parse(readFileSync(join(base, 'records', 'plan.json'), 'utf8'));
    const rows = [1, 2, 3].flatMap((coil) =>
      windings[0].taps.map(
        ({ inductanceUh }, i) =>
          `${hash},K-${coil},${i + 1},inductance,,${(inductanceUh * (1 + 0.002 * coil)).toFixed(3)},uH,`,
      ),
    );
    writeFileSync(
      join(base, 'readings.csv'),
      ['record,serial,tap,quantity,condition,value,unit,remark', ...rows, ''].join('\n'),
    );
    words.set('prove', ['prove', 'readings.csv', '--from', 'records']);
  }
  if (verbs.includes('lot')) {
    writeFileSync(
      join(base, 'lot.yaml'),
      JSON.stringify({
        lot: 'One drum',
        coils: [{ job: 'small.yaml', quantity: 2 }],
        spools: [{ name: 'Reel 1', wire: '0.5 mm enamel', left: '30 m' }],
        jigs: 'none',
      }),
    );
    words.set('lot', ['lot', 'lot.yaml']);
  }
  return words;
}

/** Everything below a folder as one text, a line a file with its hash; empty when there is no such folder. */
export function told(folder, prefix = '') {
  if (!existsSync(folder) || !lstatSync(folder).isDirectory()) return '';
  return readdirSync(folder)
    .sort()
    .map((name) => {
      const path = join(folder, name);
      const kind = lstatSync(path);
      if (kind.isDirectory()) return told(path, `${prefix}${name}/`);
      if (kind.isSymbolicLink()) return `${prefix}${name} -> ${readlinkSync(path)}\n`;
      return `${prefix}${name} ${createHash('sha256').update(readFileSync(path)).digest('hex')}\n`;
    })
    .join('');
}

const MINE = { 'notes.txt': 'mine', 'photos/deep/a.txt': 'mine too' };

/** Puts files into a folder that no verb writes. */
export function putMine(folder) {
  for (const [path, text] of Object.entries(MINE)) {
    mkdirSync(dirname(join(folder, path)), { recursive: true });
    writeFileSync(join(folder, path), text);
  }
}

/** What {@link told} says with the lines of {@link putMine} taken out, and whether all of them were there. */
export function withoutMine(text) {
  const lines = text.split('\n');
  const isMine = (line) => Object.keys(MINE).some((path) => line.startsWith(`${path} `));
  return {
    rest: lines.filter((line) => !isMine(line)).join('\n'),
    all: lines.filter(isMine).length === Object.keys(MINE).length,
  };
}

/** Folders beside that of one run: what a transaction must clear away. */
export const leftIn = (base) => readdirSync(base).filter((name) => /^\..*\.coilwright-/.test(name));

/** Throws with what is wrong where something is. */
export function demand(isSo, what) {
  if (!isSo) throw new Error(what);
}

/** Numbers between 0 and 1 that are the same for the same seed (mulberry32, from memory). */
export function random(seed) {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Names of the cases that went well, kept in node_modules/.cache for one build and seed, so that a run goes on where it was. */
export function journal(name, seed, fresh) {
  const build = createHash('sha256');
  for (const file of readdirSync(dirname(PROGRAM)).sort()) build.update(readFileSync(join(dirname(PROGRAM), file)));
  const folder = fileURLToPath(new URL('../../node_modules/.cache/faults/', import.meta.url));
  const path = join(folder, `${name}-${seed}-${build.digest('hex').slice(0, 12)}.txt`);
  mkdirSync(folder, { recursive: true });
  if (fresh) rmSync(path, { force: true });
  const done = new Set(existsSync(path) ? readFileSync(path, 'utf8').split('\n').slice(0, -1) : []);
  return {
    has: (one) => done.has(one),
    add(one) {
      done.add(one);
      appendFileSync(path, `${one}\n`);
    },
    count: (start) => [...done].filter((one) => one.startsWith(start)).length,
  };
}

/** The value of `--name=value`, or what is taken without it. */
export const option = (name, otherwise) =>
  process.argv.find((word) => word.startsWith(`--${name}=`))?.split('=')[1] ?? otherwise;
