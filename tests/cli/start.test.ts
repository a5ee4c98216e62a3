import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readJob } from '../../src/job/read.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { command, testTerminal } from './terminal.ts';

describe('start', () => {
  it('writes the job of the builder when none is named', async () => {
    const { exit, out, err, folder } = await command(['start']);
    expect([exit, err]).toEqual([0, '']);
    expect(out).toBe('low-bench-receiver.yaml written; edit it, then: coilwright plan low-bench-receiver.yaml\n');
    expect(readdirSync(folder)).toEqual(['low-bench-receiver.yaml']);
  });

  it('lists the starters, each of which it writes and which can be read', async () => {
    const list = (await command(['start', '--list'])).out;
    for (const { name, use } of STARTERS) {
      expect(list).toContain(`${name} `);
      expect(list).toContain(use);
      const { exit, folder } = await command(['start', name]);
      expect(exit).toBe(0);
      const job = readJob(readFileSync(join(folder, `${name}.yaml`), 'utf8'), name);
      expect(job.name.toLowerCase().replaceAll(' ', '-')).toBe(name);
    }
  });

  it('writes to a file of another name, or to standard output', async () => {
    const { exit, out, folder } = await command(['start', 'forty-coil-lot.yaml', '--out', 'mine.yaml']);
    expect([exit, out]).toEqual([0, 'mine.yaml written; edit it, then: coilwright plan mine.yaml\n']);
    expect(readdirSync(folder)).toEqual(['mine.yaml']);
    const printed = await command(['start', 'forty-coil-lot', '--out', '-']);
    expect(printed.out).toBe(readFileSync(join(folder, 'mine.yaml'), 'utf8'));
  });

  it('writes the schema', async () => {
    const { exit, out, folder } = await command(['start', '--schema']);
    expect([exit, out]).toEqual([0, 'job.schema.json written; name it in a job: $schema: ./job.schema.json\n']);
    const shipped = readFileSync(new URL('../../templates/schemas/job.schema.json', import.meta.url), 'utf8');
    expect(readFileSync(join(folder, 'job.schema.json'), 'utf8')).toBe(shipped);
  });

  it('never overwrites', async () => {
    const terminal = testTerminal();
    const path = join(terminal.folder, 'low-bench-receiver.yaml');
    writeFileSync(path, 'mine');
    expect(await command(['start'], terminal)).toMatchObject({
      exit: 5,
      out: '',
      err: `coilwright: low-bench-receiver.yaml
  got       a file or folder that is there already
  expected  a new file
  to do     choose another name with --out; nothing was changed
`,
    });
    expect(readFileSync(path, 'utf8')).toBe('mine');
  });

  it('says when it cannot write', async () => {
    const terminal = testTerminal();
    mkdirSync(join(terminal.folder, 'there'));
    expect(await command(['start', '--out', 'there'], terminal)).toMatchObject({ exit: 5 });
    expect(await command(['start', '--out', 'no/such/x.yaml'], terminal)).toMatchObject({
      exit: 5,
      err: `coilwright: no/such/x.yaml
  got       a path that cannot be made
  expected  a folder that can be written
  to do     choose another folder with --out; nothing was changed
`,
    });
  });
});
