/** The built program as a person runs it: every starter, from `start` to the output folder, and what it refuses. */
import { execFile } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { promisify } from 'node:util';
import { beforeAll, describe, expect, it } from 'vitest';
import { recordSchema } from '../../src/record/schema.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { testTerminal } from './terminal.ts';

const PROGRAM = resolve('dist/coilwright.js');

interface Ended {
  readonly code: number;
  readonly stdout: string;
  readonly stderr: string;
}

async function coilwright(folder: string, ...given: string[]): Promise<Ended> {
  try {
    const { stdout, stderr } = await promisify(execFile)(process.execPath, [PROGRAM, ...given], {
      cwd: folder,
      env: { ...process.env, COLUMNS: '80' },
      maxBuffer: 1e8,
    });
    return { code: 0, stdout, stderr };
  } catch (error) {
    return error as Ended;
  }
}

beforeAll(() => {
  if (!existsSync(PROGRAM)) throw new Error('dist is missing: npm run build');
});

describe('the built program', () => {
  // The others are made by `npm run check:outside`, and one by every lot of the tests.
  it.each(STARTERS.map(({ name }) => name).filter((name) => /coupled/.test(name)))(
    'takes %s from start to finish',
    async (name) => {
      const { folder } = testTerminal();
      expect(await coilwright(folder, 'start', name)).toMatchObject({ code: 0, stderr: '' });
      const planned = await coilwright(folder, 'plan', `${name}.yaml`);
      expect(planned).toMatchObject({ code: 0, stderr: '' });
      const widest = Math.max(...planned.stdout.split('\n').map((line) => [...line].length));
      expect(widest).toBeLessThanOrEqual(80);
      const out = join(folder, 'out', name);
      const record = recordSchema.parse(JSON.parse(readFileSync(join(out, 'plan.json'), 'utf8')));
      expect(readdirSync(out).sort()).toEqual(['plan.json', ...record.files.map(({ path }) => path)].sort());
      expect(record.alternatives.length).toBeGreaterThanOrEqual(4);
      expect(readdirSync(join(folder, 'out'))).toEqual([name]);
    },
  );

  it('says what is wrong with the place to write to, and changes nothing', async () => {
    const { folder } = testTerminal();
    await coilwright(folder, 'start');
    mkdirSync(join(folder, 'mine'));
    writeFileSync(join(folder, 'mine', 'thesis.txt'), 'mine');
    expect(await coilwright(folder, 'plan', 'low-bench-receiver.yaml', '--out', 'mine')).toMatchObject({
      code: 5,
      stdout: '',
      stderr: `coilwright: ${join(folder, 'mine')}
  got       a folder that coilwright did not make
  expected  a folder to write to
  to do     choose a new or empty folder with --out, or move what is in it
            elsewhere; nothing was changed
`,
    });
    expect(await coilwright(folder, 'plan', 'low-bench-receiver.yaml', '--out', 'mine/thesis.txt/x')).toMatchObject({
      code: 5,
      stdout: '',
      stderr: `coilwright: ${join(folder, 'mine/thesis.txt/x')}
  got       a path that leads through a file
  expected  a folder that can be written
  to do     choose another folder with --out; nothing was changed
`,
    });
    expect(readdirSync(folder).sort()).toEqual(['job.schema.json', 'low-bench-receiver.yaml', 'mine']);
    expect(readFileSync(join(folder, 'mine', 'thesis.txt'), 'utf8')).toBe('mine');
  });

  it('prints its version, and ends quietly when nobody reads on', async () => {
    const { folder } = testTerminal();
    const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };
    expect(await coilwright(folder, '--version')).toMatchObject({ code: 0, stdout: `${version}\n`, stderr: '' });
    const { stdout, stderr } = await promisify(execFile)('sh', [
      '-c',
      `"$0" "$1" stock --json | head -c 10`,
      process.execPath,
      PROGRAM,
    ]);
    expect([stdout.length, stderr]).toEqual([10, '']);
  });
});
