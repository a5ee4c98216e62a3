/** The built program on files that are far too large, too deep, or of far too many pieces: time and memory of its own process. */
import { spawn } from 'node:child_process';
import { closeSync, existsSync, ftruncateSync, openSync, writeFileSync, writeSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { expect, it } from 'vitest';
import { testTerminal } from '../cli/terminal.ts';

const PROGRAM = resolve('dist/coilwright.js');
/** Prints the processor's milliseconds and the greatest megabytes of the process behind everything else. */
const METER = `data:text/javascript,${encodeURIComponent(
  "process.on('exit', () => { const u = process.resourceUsage(); require('fs').writeSync(2, '\\n@' + Math.round(u.userCPUTime / 1e3) + ' ' + Math.round(u.maxRSS / 1024)); });"
    .replace("require('fs')", 'fs')
    .replace(/^/, "import fs from 'node:fs';"),
)}`;

interface Ended {
  readonly code: number | null;
  readonly err: string;
  readonly ms: number;
  readonly mb: number;
}

function run(folder: string, given: readonly string[]): Promise<Ended> {
  return new Promise((ended) => {
    const child = spawn(process.execPath, ['--import', METER, PROGRAM, ...given], {
      cwd: folder,
      stdio: ['ignore', 'ignore', 'pipe'],
    });
    let text = '';
    child.stderr.on('data', (piece: Buffer) => {
      text += piece.toString();
    });
    child.on('close', (code) => {
      const [, err = text, ms = 'NaN', mb = 'NaN'] = /^([\s\S]*)\n@(\d+) (\d+)$/.exec(text) ?? [];
      ended({ code, err, ms: Number(ms), mb: Number(mb) });
    });
  });
}

const BOMB = Array.from(
  { length: 12 },
  (_, i) => `a${i}: &a${i} [${i === 0 ? 'x' : Array(9).fill(`*a${i - 1}`)}]\n`,
).join('');
const filled = (piece: string, bytes: number): string => piece.repeat(Math.floor(bytes / piece.length));

/** Verb, file, its text; null: 100 MB of nothing. */
const CASES: readonly (readonly [verb: string, file: string, text: string | null, code: string])[] = [
  ['plan', 'huge.yaml', null, 'bytes'],
  ['prove', 'huge.csv', null, 'more than 32 MB'],
  ['plan', 'deep.json', filled('[', 999_000), 'more than 32 levels'],
  ['lot', 'bomb.yaml', BOMB, 'an anchor'],
  ['plan', 'errors.yaml', filled(']\n', 999_000), 'not'],
  ['survey', 'keys.yaml', Array.from({ length: 90_000 }, (_, i) => `k${i}:\n`).join(''), '90000 keys'],
  ['prove', 'commas.csv', `serial,tap 1 (uH)\n${filled(',\n', 31_900_000)}`, 'more than 4000000 cells'],
];

it('refuses them in seconds and within 600 MB', async () => {
  if (!existsSync(PROGRAM)) throw new Error('dist is missing: npm run build');
  const { folder } = testTerminal();
  const told: string[] = [];
  for (const [verb, file, text, said] of CASES) {
    const path = join(folder, file);
    if (text !== null) writeFileSync(path, text);
    else {
      const handle = openSync(path, 'w');
      writeSync(handle, 'job: x\n');
      ftruncateSync(handle, 100_000_000);
      closeSync(handle);
    }
    const { code, err, ms, mb } = await run(folder, [verb, file]);
    told.push(`${file} ${ms} ms ${mb} MB`);
    // A table is read only when there are records to hold it against.
    expect(code, `${file}: ${err}`).toBe(3);
    if (file !== 'commas.csv') expect(err).toContain(said);
    expect(err).toContain(`coilwright: ${file}`);
    expect(err).not.toMatch(/^\s+at /m);
    expect(ms, file).toBeLessThan(5000);
    expect(mb, file).toBeLessThan(600);
  }
  console.log(`files too large: ${told.length} (${told.join(', ')})`);
});
