/** A terminal for tests: what was said, and a folder of its own. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { run } from '../../cli/run.ts';
import type { Terminal } from '../../cli/terminal.ts';

const made: string[] = [];
afterAll(() => {
  for (const path of made.splice(0)) rmSync(path, { recursive: true, force: true });
});

export interface TestTerminal extends Terminal {
  readonly said: { out: string; err: string };
}

export function testTerminal(input: string | Uint8Array = '', columns = 80): TestTerminal {
  const folder = mkdtempSync(join(tmpdir(), 'coilwright-test-'));
  made.push(folder);
  const said = { out: '', err: '' };
  return {
    said,
    folder,
    columns,
    out: (text) => {
      said.out += text;
    },
    err: (text) => {
      said.err += text;
    },
    input: async () => Buffer.from(input),
  };
}

export interface Outcome {
  readonly exit: number;
  readonly out: string;
  readonly err: string;
  readonly folder: string;
}

/** One command in the terminal, in a folder of its own unless one is given. */
export async function command(given: readonly string[], terminal = testTerminal()): Promise<Outcome> {
  terminal.said.out = '';
  terminal.said.err = '';
  const exit = await run(given, terminal, '9.9.9');
  return { exit, ...terminal.said, folder: terminal.folder };
}
