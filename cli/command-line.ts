/** The arguments of the command line. What a verb needs is loaded only when it is called. */
import yargs, { type ArgumentsCamelCase, type Argv } from 'yargs';
import type { Terminal } from './terminal.ts';
import { VERBS } from './verbs.ts';

/** Stands for `-`, which the parser would turn into an empty text. */
const STANDARD_STREAM = '\u0000-';

/** What the parser has against the arguments, in English. */
export class WrongUse extends Error {}

/** Parses, and runs the verb. Throws {@link WrongUse}, and whatever the verb throws. */
export async function obey(given: readonly string[], terminal: Terminal, version: string): Promise<void> {
  const marked = given.map((word) => (word === '-' ? STANDARD_STREAM : word));
  let shown = '';
  try {
    await parser(terminal, version).parseAsync(marked, {}, (_error, _found, output) => {
      shown = output;
    });
  } catch (error) {
    throw error instanceof Error && error.name === 'YError' ? new WrongUse(error.message) : error;
  }
  if (shown !== '') terminal.out(`${shown}\n`);
}

function parser(terminal: Terminal, version: string): Argv {
  return yargs()
    .scriptName('coilwright')
    .locale('en')
    .usage('coilwright VERB ...')
    .updateStrings({ 'Positionals:': 'Words:' })
    .wrap(terminal.columns)
    .version(version)
    .help()
    .exitProcess(false)
    .strict()
    .demandCommand(1)
    .parserConfiguration({ 'duplicate-arguments-array': false, 'dot-notation': false, 'parse-numbers': false })
    .middleware(unmark, true)
    .fail((message: string | null, error: Error | undefined) => {
      throw error ?? new WrongUse(message ?? '');
    })
    .command(
      VERBS.start.written,
      VERBS.start.does,
      async (one) => (await import('./start.ts')).describeStart(one),
      async (found) => (await import('./start.ts')).runStart(found, terminal),
    )
    .command(
      VERBS.plan.written,
      VERBS.plan.does,
      async (one) => (await import('./plan.ts')).describePlan(one),
      async (found) => (await import('./plan.ts')).plan(found, terminal, version),
    )
    .command(
      VERBS.survey.written,
      VERBS.survey.does,
      async (one) => (await import('./survey.ts')).describeSurvey(one),
      async (found) => (await import('./survey.ts')).survey(found, terminal, version),
    )
    .command(
      VERBS.match.written,
      VERBS.match.does,
      async (one) => (await import('./match.ts')).describeMatch(one),
      async (found) => (await import('./match.ts')).match(found, terminal, version),
    )
    .command(
      VERBS.lot.written,
      VERBS.lot.does,
      async (one) => (await import('./lot.ts')).describeLot(one),
      async (found) => (await import('./lot.ts')).lot(found, terminal, version),
    )
    .command(
      VERBS.prove.written,
      VERBS.prove.does,
      async (one) => (await import('./prove.ts')).describeProve(one),
      async (found) => (await import('./prove.ts')).prove(found, terminal, version),
    )
    .command(
      VERBS.stock.written,
      VERBS.stock.does,
      async (one) => (await import('./stock.ts')).describeStock(one),
      async (found) => (await import('./stock.ts')).stock(found),
    );
}

/** Puts `-` back. */
function unmark(found: ArgumentsCamelCase): void {
  for (const [key, value] of Object.entries(found)) {
    if (value === STANDARD_STREAM) found[key] = '-';
  }
}
