/** What the verbs that make a coil share: options, and the folder written and told of once there is something to make. */
import { join, resolve } from 'node:path';
import type { Argv } from 'yargs';
import { slug } from '../src/job/name.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import type { Output } from '../src/record/listing.ts';
import type { CoilRecord } from '../src/record/schema.ts';
import { explainedTap } from './explained-tap.ts';
import { showExplain } from './show-explain.ts';
import { showPlan } from './show-plan.ts';
import { shownFolder } from './shown-folder.ts';
import type { Terminal } from './terminal.ts';

export interface ProduceOptions {
  readonly out?: string | undefined;
  readonly json: boolean;
  readonly explain?: string | undefined;
}

export function describeProduce<T>(yargs: Argv<T>) {
  return yargs
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
    });
}

/**
 * Makes, writes and shows. `above` is told before the coil. Throws a Fault with exit code 2, 4 or 5; nothing is written unless
 * all of it is.
 */
export async function produceFolder(
  options: ProduceOptions,
  terminal: Terminal,
  name: string,
  make: () => Promise<Output<CoilRecord>>,
  above?: (record: CoilRecord, columns: number, plain: boolean) => string,
): Promise<void> {
  const target = resolve(terminal.folder, options.out ?? join('out', slug(name)));
  await checkFolder(target);
  const { record, files } = await make();
  const explained = await explainedTap(record, options.explain);
  const folder = await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const plain = terminal.plain ?? false;
  if (above !== undefined) terminal.out(`${above(record, terminal.columns, plain)}\n`);
  terminal.out(showPlan(record, shownFolder(terminal.folder, folder), files, terminal.columns, plain));
  if (explained !== null) terminal.out(`\n${showExplain(explained, terminal.columns)}`);
}
