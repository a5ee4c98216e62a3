/** The built program as a restorer runs it: the starter, from `start` to the output folder. */
import { execFile } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { promisify } from 'node:util';
import { beforeAll, describe, expect, it } from 'vitest';
import { recordSchema } from '../../src/record/schema.ts';
import { MATCHES } from '../../templates/matches/matches.ts';
import { testTerminal } from '../cli/terminal.ts';

const PROGRAM = resolve(process.env.COILWRIGHT_BUILT ?? 'dist', 'coilwright.js');
const coilwright = (folder: string, ...given: string[]) =>
  promisify(execFile)(process.execPath, [PROGRAM, ...given], { cwd: folder, maxBuffer: 1e8 });

beforeAll(() => {
  if (!existsSync(PROGRAM)) throw new Error('dist is missing: npm run build');
});

describe('the built program', () => {
  it.each(MATCHES.map(({ name }) => name))('takes %s from start to finish', async (name) => {
    const { folder } = testTerminal();
    await coilwright(folder, 'start', name);
    const { stdout, stderr } = await coilwright(folder, 'match', `${name}.yaml`);
    expect(stderr).toBe('');
    expect(Math.max(...stdout.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(80);
    const out = join(folder, 'out', name);
    const record = recordSchema.parse(JSON.parse(readFileSync(join(out, 'plan.json'), 'utf8')));
    const files = readdirSync(out);
    expect(files.sort()).toEqual(['plan.json', ...record.files.map(({ path }) => path)].sort());
    for (const wanted of ['comparison-sheet.pdf', 'winding-sheet.pdf', 'reference-sheet.pdf', 'former.stl'])
      expect(files).toContain(wanted);
    expect(record.matched!.old.taps).toHaveLength(8);
  });
});
