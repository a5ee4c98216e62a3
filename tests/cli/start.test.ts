import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readLotFile } from '../../src/job/lot-file.ts';
import { readJob } from '../../src/job/read.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { LOTS } from '../../templates/lots/lots.ts';
import { command, testTerminal } from './terminal.ts';

describe('start', () => {
  it('writes the job of the builder when none is named', async () => {
    const { exit, out, err, folder } = await command(['start']);
    expect([exit, err]).toEqual([0, '']);
    expect(out).toBe(`low-bench-receiver.yaml written; edit it, then: coilwright plan low-bench-receiver.yaml
job.schema.json written, by which an editor completes and checks it
`);
    expect(readdirSync(folder).sort()).toEqual(['job.schema.json', 'low-bench-receiver.yaml']);
  });

  it('lists the starters, each of which it writes and which can be read', async () => {
    const list = (await command(['start', '--list'], testTerminal('', 110))).out;
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
    expect([exit, out.split('\n')[0]]).toEqual([0, 'mine.yaml written; edit it, then: coilwright plan mine.yaml']);
    expect(readdirSync(folder).sort()).toEqual(['job.schema.json', 'mine.yaml']);
    const printed = await command(['start', 'forty-coil-lot', '--out', '-']);
    expect(printed.out).toBe(readFileSync(join(folder, 'mine.yaml'), 'utf8'));
  });

  it('writes the schema', async () => {
    const { exit, out, folder } = await command(['start', '--schema']);
    expect([exit, out]).toEqual([
      0,
      'job.schema.json written; name it in the file of a job: $schema: ./job.schema.json\n',
    ]);
    const shipped = readFileSync(new URL('../../templates/schemas/job.schema.json', import.meta.url), 'utf8');
    expect(readFileSync(join(folder, 'job.schema.json'), 'utf8')).toBe(shipped);
  });

  it('writes a lot with the jobs that it names, and keeps those that are there', async () => {
    const terminal = testTerminal();
    writeFileSync(join(terminal.folder, 'forty-coil-lot.yaml'), 'mine');
    const { exit, out, err, folder } = await command(['start', 'saltmarsh-lot'], terminal);
    expect([exit, err]).toEqual([0, '']);
    expect(out).toBe(`saltmarsh-lot.yaml written; edit it, then: coilwright lot saltmarsh-lot.yaml
low-bench-receiver.yaml written, which it names
cracked-form-replacement.yaml written, which it names
forty-coil-lot.yaml was there already and is kept; it names that
lot.schema.json written, by which an editor completes and checks it
job.schema.json written, by which an editor completes and checks it
`);
    expect(readFileSync(join(folder, 'forty-coil-lot.yaml'), 'utf8')).toBe('mine');
    const text = readFileSync(join(folder, 'saltmarsh-lot.yaml'), 'utf8');
    expect(readdirSync(folder).sort()).toEqual(
      [
        ...new Set(readLotFile(text, 'x').entries.map(({ path }) => path)),
        ...['saltmarsh-lot.yaml', 'lot.schema.json', 'job.schema.json'],
      ].sort(),
    );
    const again = await command(['start', 'saltmarsh-lot'], testTerminal());
    const there = testTerminal();
    mkdirSync(join(there.folder, 'shop'));
    await command(['start', 'saltmarsh-lot', '--out', 'shop/mine.yaml'], there);
    expect(readdirSync(join(there.folder, 'shop')).length).toBe(readdirSync(again.folder).length);
    expect((await command(['start', 'saltmarsh-lot', '--out', '-'])).out).toBe(text);
  });

  it('writes no job when the lot is there already', async () => {
    const terminal = testTerminal();
    writeFileSync(join(terminal.folder, 'saltmarsh-lot.yaml'), 'mine');
    expect(await command(['start', 'saltmarsh-lot'], terminal)).toMatchObject({ exit: 5, out: '' });
    expect(readdirSync(terminal.folder)).toEqual(['saltmarsh-lot.yaml']);
  });

  it('writes the schema of a lot, and lists the lots', async () => {
    const shipped = readFileSync(new URL('../../templates/schemas/lot.schema.json', import.meta.url), 'utf8');
    const { exit, out } = await command(['start', 'saltmarsh-lot', '--schema', '--out', '-']);
    expect([exit, out]).toEqual([0, shipped]);
    const list = (await command(['start', '--list'], testTerminal('', 110))).out;
    for (const { name, use } of LOTS) expect(list).toMatch(new RegExp(`^${name} +${use}$`, 'm'));
    for (const columns of [40, 80, 110]) {
      const { out: narrow } = await command(['start', '--list'], testTerminal('', columns));
      expect(Math.max(...narrow.split('\n').map(({ length }) => length))).toBeLessThanOrEqual(columns);
    }
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
