import { spawn, spawnSync } from 'node:child_process';
import {
  existsSync,
  lstatSync,
  mkdirSync,
  readFileSync,
  renameSync,
  rmSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { carryLate } from '../../src/output/carry.ts';
import { outputFault } from '../../src/output/faults.ts';
import { lock } from '../../src/output/lock.ts';
import { birthOf } from '../../src/output/process.ts';
import { checkFolder, holding, namesBeside, writeFolder } from '../../src/output/transaction.ts';
import { below, faultOf, output, scratch } from './folder.ts';

const FIRST = output({ 'sheet.pdf': 'first', 'parts/former.stl': 'first' });
const SECOND = output({ 'sheet.pdf': 'second', 'parts/former.stl': 'second' });
const SECOND_BELOW = { 'plan.json': 'record', 'sheet.pdf': 'second', 'parts/former.stl': 'second' };

/** The number of a process that has ended. */
function deadPid(): number {
  return spawnSync(process.execPath, ['-e', '0']).pid;
}

describe('a folder that is written', () => {
  it('holds the files and leaves nothing beside it', async () => {
    const base = scratch();
    const path = await writeFolder(join(base, 'deep', 'er', 'coil'), FIRST);
    expect(below(base)).toEqual({
      'deep/er/coil/plan.json': 'record',
      'deep/er/coil/sheet.pdf': 'first',
      'deep/er/coil/parts/former.stl': 'first',
    });
    expect(path).toBe(join(base, 'deep', 'er', 'coil'));
  });

  it('replaces a folder of ours; files that are not written again go', async () => {
    const base = scratch();
    await writeFolder(join(base, 'coil'), output({ 'old.pdf': 'first', 'gone/former.stl': 'first' }));
    await writeFolder(join(base, 'coil'), SECOND);
    expect(below(join(base, 'coil'))).toEqual(SECOND_BELOW);
    expect(Object.keys(below(base)).every((path) => path.startsWith('coil/'))).toBe(true);
  });

  it('is ours by the record of a lot or of readings too', async () => {
    for (const name of ['lot.json', 'proof.json']) {
      const coil = join(scratch(), 'coil');
      const record = { record: 1, program: 'coilwright 0.0.0', files: [{ path: 'kinds/a/plan.json' }] };
      await writeFolder(coil, [
        { path: name, bytes: Buffer.from(JSON.stringify(record)) },
        { path: 'kinds/a/plan.json', bytes: Buffer.from('{}') },
      ]);
      writeFileSync(join(coil, 'kinds', 'mine.txt'), 'mine');
      await writeFolder(coil, SECOND);
      expect(below(coil)).toEqual({ ...SECOND_BELOW, 'kinds/mine.txt': 'mine' });
    }
  });

  it('takes files from the disk, which live on under their new name', async () => {
    const base = scratch();
    const source = join(base, 'finished.pdf');
    writeFileSync(source, 'finished');
    await holding(join(base, 'coil'), ({ write }) => write([...FIRST, { path: 'kinds/a/sheet.pdf', source }]));
    rmSync(source);
    expect(below(join(base, 'coil'))).toMatchObject({ 'kinds/a/sheet.pdf': 'finished', 'sheet.pdf': 'first' });
    await expect(
      holding(join(base, 'other'), ({ write }) => write([{ path: 'a.pdf', source }])),
    ).rejects.toBeInstanceOf(Fault);
    expect(Object.keys(below(base)).filter((path) => !path.startsWith('coil/'))).toEqual([]);
  });

  it('is held from the start of a long run, whose own errors come through as they are', async () => {
    const base = scratch();
    const coil = join(base, 'coil');
    const mistake = Object.assign(new Error('a thread out of memory'), { code: 'ERR_WORKER_OUT_OF_MEMORY' });
    await expect(
      holding(coil, async () => {
        expect((await faultOf(lock(namesBeside(coil).lock, coil, 60))).code).toBe('locked');
        throw mistake;
      }),
    ).rejects.toBe(mistake);
    expect(below(base)).toEqual({});
  });

  it('takes an empty folder that is there', async () => {
    const base = scratch();
    mkdirSync(join(base, 'coil'));
    await writeFolder(join(base, 'coil'), SECOND);
    expect(below(join(base, 'coil'))).toEqual(SECOND_BELOW);
  });

  it('keeps what is not ours: files, folders, links', async () => {
    const base = scratch();
    const coil = join(base, 'coil');
    await writeFolder(coil, FIRST);
    writeFileSync(join(coil, 'notes.txt'), 'mine');
    utimesSync(join(coil, 'notes.txt'), 1000, 2000);
    writeFileSync(join(coil, 'parts', 'photo.jpg'), 'mine');
    mkdirSync(join(coil, 'readings', 'empty'), { recursive: true });
    writeFileSync(join(coil, 'readings', 'a.csv'), 'mine');
    writeFileSync(join(base, 'outside'), 'outside');
    symlinkSync('../outside', join(coil, 'link'));
    symlinkSync(base, join(coil, 'readings', 'loop'));
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual({
      ...SECOND_BELOW,
      'notes.txt': 'mine',
      'parts/photo.jpg': 'mine',
      'readings/a.csv': 'mine',
      'readings/empty': 'folder',
      'readings/loop': `-> ${base}`,
      link: '-> ../outside',
    });
    expect(lstatSync(join(coil, 'notes.txt')).mtimeMs).toBe(2_000_000);
    expect(readFileSync(join(base, 'outside'), 'utf8')).toBe('outside');
  });
});

describe('what comes into the folder while it is written', () => {
  it('goes over into the new one: put in, or saved anew, after the rest was carried', async () => {
    const base = scratch();
    const coil = join(base, 'coil');
    const { backup } = namesBeside(coil);
    await writeFolder(coil, SECOND);
    for (const folder of [backup, coil]) mkdirSync(join(folder, 'photos'), { recursive: true });
    writeFileSync(join(backup, 'notes.txt'), 'late');
    writeFileSync(join(coil, 'notes.txt'), 'early');
    utimesSync(join(coil, 'notes.txt'), 1000, 2000);
    writeFileSync(join(backup, 'photos', 'a.jpg'), 'late');
    writeFileSync(join(backup, 'sheet.pdf'), 'first');
    writeFileSync(join(coil, 'photos', 'b.jpg'), 'mine');
    symlinkSync('nowhere', join(backup, 'link'));
    await carryLate(backup, coil, new Set(['sheet.pdf']), new Set());
    expect(below(coil)).toEqual({
      ...SECOND_BELOW,
      'notes.txt': 'late',
      'photos/a.jpg': 'late',
      'photos/b.jpg': 'mine',
      link: '-> nowhere',
    });
  });

  it('also when the run was killed while it cleared away', async () => {
    const coil = join(scratch(), 'coil');
    const { backup } = namesBeside(coil);
    await writeFolder(coil, SECOND);
    await writeFolder(backup, FIRST);
    writeFileSync(join(backup, 'notes.txt'), 'late');
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual({ ...SECOND_BELOW, 'notes.txt': 'late' });
    expect(existsSync(backup)).toBe(false);
  });
});

describe('a place that is refused', () => {
  it('a folder that is not ours, with or without a foreign plan.json', async () => {
    for (const record of [
      null,
      '{}',
      '{"record":1}',
      '{"record":1,"program":"other 1"}',
      '{"record":2,"program":"coilwright 1"}',
      'x',
    ]) {
      const coil = join(scratch(), 'coil');
      mkdirSync(coil);
      writeFileSync(join(coil, 'thesis.txt'), 'mine');
      if (record !== null) writeFileSync(join(coil, 'plan.json'), record);
      const before = below(coil);
      for (const attempt of [writeFolder, checkFolder]) {
        const fault = await faultOf(attempt(coil, FIRST));
        expect([fault.exit, fault.got]).toEqual([5, 'a folder that coilwright did not make']);
      }
      expect(below(coil)).toEqual(before);
    }
  });

  it('a file of the user where one of ours would go', async () => {
    const coil = join(scratch(), 'coil');
    await writeFolder(coil, FIRST);
    for (const [path, written] of [
      ['template.pdf', 'template.pdf'],
      ['jigs', 'jigs/saddle.stl'],
      ['saddle.stl/notes', 'saddle.stl'],
    ] as const) {
      mkdirSync(join(coil, path, '..'), { recursive: true });
      writeFileSync(join(coil, path), 'mine');
      const before = below(coil);
      const fault = await faultOf(writeFolder(coil, output({ [written]: 'ours' })));
      expect([fault.exit, fault.got]).toEqual([
        5,
        'something that coilwright did not make, where it would write a file of its own',
      ]);
      expect(below(coil)).toEqual(before);
    }
  });

  it('a file, a link, a path through a file, the root, a name too long', async () => {
    const base = scratch();
    writeFileSync(join(base, 'file'), 'mine');
    mkdirSync(join(base, 'real'));
    symlinkSync('real', join(base, 'link'));
    const got = async (path: string) => {
      const fault = await faultOf(writeFolder(path, FIRST));
      expect(fault.exit).toBe(5);
      if (path !== '/' && !path.includes('deep')) expect((await faultOf(checkFolder(path))).got).toBe(fault.got);
      return fault.got;
    };
    expect(await got(join(base, 'file'))).toBe('a file');
    expect(await got(join(base, 'link'))).toBe('a symbolic link');
    expect(await got(join(base, 'file', 'coil'))).toBe('a path that leads through a file');
    expect(await got(join(base, 'file', 'deep', 'coil'))).toBe('a path that leads through a file');
    expect(await got('/')).toBe('the root of the file system');
    expect(await got(join(base, 'x'.repeat(300)))).toBe('a path that is too long for the file system');
    expect(below(base)).toEqual({ file: 'mine', link: '-> real', real: 'folder' });
  });

  it('and no place that can be written', async () => {
    const base = scratch();
    await writeFolder(join(base, 'coil'), FIRST);
    mkdirSync(join(base, 'empty'));
    for (const path of ['coil', 'empty', 'new', 'deep/er/new']) await checkFolder(join(base, path));
    expect(Object.keys(below(base)).length).toBe(4);
  });

  it('every answer of the file system has a message, and a mistake of ours stays one', () => {
    for (const code of ['EACCES', 'EPERM', 'EROFS', 'ENOSPC', 'EDQUOT', 'EIO', 'EMFILE']) {
      const fault = outputFault(Object.assign(new Error(code), { code }), '/x');
      expect(fault).toBeInstanceOf(Fault);
      if (fault instanceof Fault) expect(fault.faults[0]?.todo).toMatch(/; nothing was changed$/);
    }
    const mistake = new TypeError('mistake');
    expect(outputFault(mistake, '/x')).toBe(mistake);
  });

  it('a path of our own that leads out is a mistake of the program', async () => {
    const base = scratch();
    for (const path of ['../x', '/x', 'a/../../x', '.x', '', 'a//b', 'a\\b', 'a\u0000b']) {
      await expect(writeFolder(join(base, 'coil'), [{ path, bytes: new Uint8Array() }])).rejects.toThrow(
        'not a plain relative path',
      );
    }
    expect(below(base)).toEqual({});
  });
});

describe('what a killed run leaves', () => {
  it('half a new folder: cleared away', async () => {
    const base = scratch();
    const coil = join(base, 'coil');
    await writeFolder(coil, FIRST);
    const { temporary } = namesBeside(coil);
    mkdirSync(temporary);
    writeFileSync(join(temporary, 'sheet.pdf'), 'hal');
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual(SECOND_BELOW);
    expect(existsSync(temporary)).toBe(false);
  });

  it('only a backup: put back, and what is not ours lives on', async () => {
    const coil = join(scratch(), 'coil');
    await writeFolder(coil, FIRST);
    writeFileSync(join(coil, 'notes.txt'), 'mine');
    const { backup } = namesBeside(coil);
    renameSync(coil, backup);
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual({ ...SECOND_BELOW, 'notes.txt': 'mine' });
    expect(existsSync(backup)).toBe(false);
  });

  it('only a backup, and an empty folder made since', async () => {
    const coil = join(scratch(), 'coil');
    await writeFolder(coil, FIRST);
    writeFileSync(join(coil, 'notes.txt'), 'mine');
    renameSync(coil, namesBeside(coil).backup);
    mkdirSync(coil);
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual({ ...SECOND_BELOW, 'notes.txt': 'mine' });
  });

  it('a backup beside the new folder: cleared away', async () => {
    const coil = join(scratch(), 'coil');
    const { backup } = namesBeside(coil);
    await writeFolder(backup, FIRST);
    await writeFolder(coil, FIRST);
    await writeFolder(coil, SECOND);
    expect(below(coil)).toEqual(SECOND_BELOW);
    expect(existsSync(backup)).toBe(false);
  });

  it('a backup beside something of the user: both kept, refused', async () => {
    const coil = join(scratch(), 'coil');
    const { backup } = namesBeside(coil);
    await writeFolder(backup, FIRST);
    mkdirSync(coil);
    writeFileSync(join(coil, 'thesis.txt'), 'mine');
    const fault = await faultOf(writeFolder(coil, SECOND));
    expect([fault.exit, fault.got.includes(backup)]).toEqual([5, true]);
    expect(below(coil)).toEqual({ 'thesis.txt': 'mine' });
    expect(below(backup)['sheet.pdf']).toBe('first');
  });
});

describe('the lock', () => {
  it('of a process that is gone is taken over', async () => {
    const coil = join(scratch(), 'coil');
    const path = namesBeside(coil).lock;
    writeFileSync(path, JSON.stringify({ pid: deadPid(), host: hostname(), token: 'x' }));
    await writeFolder(coil, FIRST);
    expect(existsSync(path)).toBe(false);
  });

  it('for taking over, left by a run that was killed then, is cleared away and stops nobody', async () => {
    const text = (pid: number) => JSON.stringify({ pid, host: hostname(), token: 'x' });
    for (const left of [false, true]) {
      const base = scratch();
      const coil = join(base, 'coil');
      const path = namesBeside(coil).lock;
      writeFileSync(`${path}-breaking`, text(deadPid()));
      if (left) writeFileSync(path, text(deadPid()));
      await writeFolder(coil, FIRST);
      expect(Object.keys(below(base)).filter((name) => name.startsWith('.'))).toEqual([]);
    }
  });

  it('of a number that another process has since is taken over; a process is known by its birth', async () => {
    const born = await birthOf(process.pid);
    const coil = join(scratch(), 'coil');
    const path = namesBeside(coil).lock;
    const text = (when: string | null) =>
      JSON.stringify({ pid: process.pid, host: hostname(), token: 'x', born: when });
    for (const when of [born, null]) {
      writeFileSync(path, text(when));
      expect((await faultOf(lock(path, coil, 60))).code).toBe('locked');
    }
    // Only where the system tells births apart.
    if (born === null) return;
    writeFileSync(path, text('another boot 17'));
    await writeFolder(coil, FIRST);
    expect(existsSync(path)).toBe(false);
  });

  it.runIf(process.platform === 'linux')(
    'of a process that has ended and is asked by nobody how is taken over',
    async () => {
      const coil = join(scratch(), 'coil');
      // The shell becomes a program that waits for no child, so that the child stays known as ended.
      const parent = spawn('sh', ['-c', 'sleep 0 & echo $!; exec sleep 20'], { stdio: ['ignore', 'pipe', 'ignore'] });
      try {
        const pid = Number(await new Promise((done) => parent.stdout.once('data', (data) => done(String(data)))));
        const ended = () => readFileSync(`/proc/${pid}/stat`, 'utf8').includes(') Z ');
        while (!ended()) await wait(10);
        process.kill(pid, 0);
        writeFileSync(namesBeside(coil).lock, JSON.stringify({ pid, host: hostname(), token: 'x' }));
        await writeFolder(coil, FIRST);
        expect(below(coil)).toMatchObject({ 'sheet.pdf': 'first' });
      } finally {
        parent.kill('SIGKILL');
      }
    },
  );

  it('half made is taken over when it is old', async () => {
    const coil = join(scratch(), 'coil');
    const path = namesBeside(coil).lock;
    writeFileSync(path, '');
    utimesSync(path, 1000, 1000);
    await writeFolder(coil, FIRST);
    expect(existsSync(path)).toBe(false);
  });

  it('of a living process, or of another host, is waited for and then refused', async () => {
    const path = join(scratch(), 'lock');
    for (const holder of [
      { pid: process.pid, host: hostname(), token: 'x' },
      { pid: deadPid(), host: 'elsewhere', token: 'x' },
    ]) {
      writeFileSync(path, JSON.stringify(holder));
      const fault = await faultOf(lock(path, '/out/coil', 60));
      expect([fault.exit, fault.code, fault.got.includes(String(holder.pid))]).toEqual([5, 'locked', true]);
      expect(existsSync(path)).toBe(true);
    }
  });

  it('lets twelve runs at one folder through one after the other, each whole', async () => {
    const coil = join(scratch(), 'coil');
    const runs = Array.from({ length: 12 }, (_, n) => output({ 'a.txt': `${n}`, 'b.txt': `${n}` }));
    const ended = await Promise.all(runs.map((files) => writeFolder(coil, files)));
    expect(ended.length).toBe(12);
    const found = below(coil);
    expect(Object.keys(found).sort()).toEqual(['a.txt', 'b.txt', 'plan.json']);
    expect(found['a.txt']).toBe(found['b.txt']);
  });
});
