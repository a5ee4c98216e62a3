#!/usr/bin/env node
import { run } from './run.ts';
import { systemTerminal } from './terminal.ts';

// A reader that has seen enough, such as head, closes the pipe: no mistake of anybody.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EPIPE') process.exit();
  throw error;
});

process.exitCode = await run(process.argv.slice(2), systemTerminal(), process.env.COILWRIGHT_VERSION ?? 'unbuilt');
