#!/usr/bin/env node
import { run, showTrouble } from './run.ts';
import { systemTerminal } from './terminal.ts';

const terminal = systemTerminal();

process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  // A reader that has seen enough, such as head, closes the pipe: no mistake of anybody.
  if (error.code === 'EPIPE') process.exit();
  // Once is enough, however many lines could not be written.
  if (process.exitCode !== undefined && process.exitCode !== 0) return;
  process.exitCode = 5;
  void tellUnsaid(error);
});
// Nobody is left to be told; the exit code says it.
process.stderr.on('error', () => undefined);

async function tellUnsaid({ code }: NodeJS.ErrnoException): Promise<void> {
  const { Fault } = await import('../src/fault.ts');
  const fault = new Fault(5, {
    code: 'not-said',
    place: { file: 'standard output' },
    got: code === 'ENOSPC' || code === 'EDQUOT' ? 'a full disk' : `an error of the file system, ${code}`,
    expected: 'room for what is printed',
    todo: 'make room, and run again; if a folder was to be written, it is written whole',
  });
  await showTrouble(fault, process.argv.slice(2), terminal);
}

const code = await run(process.argv.slice(2), terminal, process.env.COILWRIGHT_VERSION ?? 'unbuilt');
if (process.exitCode === undefined || process.exitCode === 0) process.exitCode = code;
