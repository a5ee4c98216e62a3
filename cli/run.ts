/** The command line as a whole: arguments to a verb, faults to text, outcome to an exit code. */
import { EXIT, Fault } from '../src/fault.ts';
import { helpText } from './help.ts';
import type { Terminal } from './terminal.ts';
import { isVerb } from './verbs.ts';

/** Runs one command and answers with its exit code. */
export async function run(given: readonly string[], terminal: Terminal, version: string): Promise<number> {
  // Asked most often, and answered without loading the parser.
  if (given.includes('--help') && !given.some(isVerb)) {
    terminal.out(helpText(terminal.columns));
    return EXIT.done;
  }
  try {
    const { obey } = await import('./command-line.ts');
    await obey(given, terminal, version);
    return EXIT.done;
  } catch (error) {
    return await showTrouble(error, given, terminal);
  }
}

async function showTrouble(error: unknown, given: readonly string[], terminal: Terminal): Promise<number> {
  const { asUsageFault } = await import('./usage.ts');
  const { showFault, showMistake } = await import('./show-fault.ts');
  const fault = asUsageFault(error, given);
  if (!(fault instanceof Fault)) {
    terminal.err(showMistake(fault));
    return EXIT.program;
  }
  const { exit, faults } = fault;
  const json = given.includes('--json');
  terminal.err(json ? `${JSON.stringify({ exit, faults }, null, 2)}\n` : showFault(fault, terminal.columns));
  return exit;
}
