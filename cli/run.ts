/** The command line as a whole: arguments to a verb, faults to text, outcome to an exit code. */
import { EXIT, Fault } from '../src/fault.ts';
import { helpText, verbHelp } from './help.ts';
import { errPage, outPage } from './page.ts';
import type { Terminal } from './terminal.ts';
import { isVerb } from './verbs.ts';

/** Runs one command and answers with its exit code. */
export async function run(given: readonly string[], own: Terminal, version: string): Promise<number> {
  const end = given.indexOf('--');
  const before = end < 0 ? given : given.slice(0, end);
  const terminal = asked(own, before);
  // Asked most often, and answered without loading the parser.
  if (before.includes('--help')) {
    const verb = before.find(isVerb);
    const page = outPage(terminal);
    terminal.out(verb === undefined ? helpText(page) : verbHelp(verb, page));
    return EXIT.done;
  }
  if (before.includes('--version')) {
    terminal.out(`${version}\n`);
    return EXIT.done;
  }
  try {
    const { obey } = await import('./command-line.ts');
    await obey(given, terminal, version);
    return EXIT.done;
  } catch (error) {
    return await showTrouble(error, before, terminal);
  }
}

/** The terminal as the options of every verb want it. Looked for here, for what the parser refuses is told that way too. */
function asked(own: Terminal, given: readonly string[]): Terminal {
  const plain = (own.plain ?? false) || given.includes('--plain');
  const quiet = given.includes('--quiet') || given.includes('-q');
  // Whoever reads the record watches no line; a data stream and a quiet run have none.
  const watched = !quiet && !given.includes('--json');
  return {
    ...own,
    plain,
    quiet,
    status: watched ? own.status : undefined,
    ticking: watched ? own.ticking : undefined,
  };
}

/** What went wrong, on standard error; answers with the exit code. */
export async function showTrouble(error: unknown, given: readonly string[], terminal: Terminal): Promise<number> {
  const { asUsageFault } = await import('./usage.ts');
  const { showFault, showMistake } = await import('./show-fault.ts');
  const fault = asUsageFault(error, given);
  const page = errPage(terminal);
  if (!(fault instanceof Fault)) {
    terminal.err(showMistake(fault, page));
    return EXIT.program;
  }
  const { exit, faults } = fault;
  const json = given.includes('--json');
  terminal.err(json ? `${JSON.stringify({ exit, faults }, null, 2)}\n` : showFault(fault, page));
  return exit;
}
