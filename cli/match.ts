/** `match`: reads an old coil, infers it, finds its replacement, writes the output folder, says what came of it. */
import { join, relative, resolve } from 'node:path';
import type { Argv } from 'yargs';
import { OLD_COIL_FILE } from '../src/job/file-kind.ts';
import { slug } from '../src/job/name.ts';
import { readOldCoil } from '../src/job/old-coil-file.ts';
import type { matchCoil } from '../src/match.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import { checkOut } from './check-out.ts';
import { explainedTap } from './explained-tap.ts';
import { readJobText } from './read-job.ts';
import { showExplain } from './show-explain.ts';
import { showMatch } from './show-match.ts';
import { showPlan } from './show-plan.ts';
import type { Terminal } from './terminal.ts';

export function describeMatch(yargs: Argv) {
  return yargs
    .positional('coil', {
      type: 'string',
      demandOption: true,
      describe: 'file of an old coil, YAML or JSON; - for standard input',
    })
    .option('out', {
      type: 'string',
      requiresArg: true,
      describe: 'folder to write; out/<name of the job> when left out',
    })
    .option('json', { type: 'boolean', default: false, describe: 'print the record, and nothing else' })
    .option('explain', {
      type: 'string',
      requiresArg: true,
      describe: 'number of a tap: how each of its figures comes about; with --json that instead of the record',
    })
    .example('$0 match broken-form.yaml', 'writes out/broken-form')
    .example(
      '$0 match - --out coil --json < old.yaml',
      'reads standard input, writes the folder coil, prints the record',
    );
}

export interface MatchOptions {
  readonly coil: string;
  readonly out?: string | undefined;
  readonly json: boolean;
  readonly explain?: string | undefined;
}

/** What infers and plans, loaded only once there is an old coil. */
export type LoadMatcher = () => Promise<typeof matchCoil>;

/** Throws a Fault with exit code 2, 3, 4 or 5. Nothing is written unless all of it is. */
export async function runMatch(
  options: MatchOptions,
  terminal: Terminal,
  version: string,
  load: LoadMatcher,
): Promise<void> {
  checkOut(options.out);
  const file = readOldCoil(await readJobText(options.coil, terminal, OLD_COIL_FILE), options.coil);
  const target = resolve(terminal.folder, options.out ?? join('out', slug(file.job.name)));
  await checkFolder(target);
  const matcher = await load();
  const { record, files } = await matcher(file, { version });
  const explained = await explainedTap(record, options.explain);
  const folder = await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const below = relative(terminal.folder, folder);
  const shown = below === '' ? '.' : below.startsWith('..') ? folder : below;
  const plain = terminal.plain ?? false;
  terminal.out(showMatch(record, terminal.columns, plain));
  terminal.out(`\n${showPlan(record, shown, files, terminal.columns, plain)}`);
  if (explained !== null) terminal.out(`\n${showExplain(explained, terminal.columns)}`);
}

/** With the real matcher. */
export async function match(options: MatchOptions, terminal: Terminal, version: string): Promise<void> {
  await runMatch(options, terminal, version, async () => (await import('../src/match.ts')).matchCoil);
}
