/** The line of a thread of its own, which goes on while this one is busy. */
import { closeSync, fstatSync, mkdtempSync, openSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { startTicking, type Ticking } from '../../cli/ticking.ts';

/** Much longer than a thread takes to begin on a machine with much to do. */
const PATIENCE_MS = 20_000;

/** What is written to a file while this thread is busy until that is `least` bytes. */
async function written(plain: boolean, least: number, quietMs: number): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'coilwright-test-'));
  const path = join(folder, 'line');
  const fd = openSync(path, 'w');
  try {
    const line: Ticking = startTicking('Drum', { fd, columns: 20, plain, quietMs, everyMs: 50 });
    line.tell('Drum: the sheets and more than fits');
    await new Promise((resolve) => setTimeout(resolve, 200));
    const end = Date.now() + PATIENCE_MS;
    while (fstatSync(fd).size < least && Date.now() < end);
    line.end();
    line.end();
    return readFileSync(path, 'utf8');
  } finally {
    closeSync(fd);
    rmSync(folder, { recursive: true });
  }
}

it('is written over, cut to the page, and gone when it ends', async () => {
  const text = await written(false, 60, 30);
  // The page is 20 wide, a line one sign less.
  expect(text.startsWith(`\r${'Drum: the sheets and more'.slice(0, 19)}`)).toBe(true);
  expect(text.endsWith(`\r${' '.repeat(19)}\r`)).toBe(true);
  expect(text.split('\r').length).toBeGreaterThan(4);
  expect(text).not.toContain('\n');
}, 30_000);

it('stands in lines where nothing may be written over', async () => {
  const text = await written(true, 60, 30);
  expect(text).toMatch(/^(?:Drum: the sheets an\n)+$/);
}, 30_000);

it('is not there for work that is done at once', async () => {
  expect(await written(false, 0, 60_000)).toBe('');
});
