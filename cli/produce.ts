/** What the verbs that make a coil share: options, and the folder written and told of once there is something to make. */
import { join, resolve } from 'node:path';
import { slug } from '../src/job/name.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import type { Output } from '../src/record/listing.ts';
import type { CoilRecord } from '../src/record/schema.ts';
import { atWork } from './at-work.ts';
import { explainedTap } from './explained-tap.ts';
import { outPage, type Page } from './page.ts';
import { showExplain } from './show-explain.ts';
import { showPlan } from './show-plan.ts';
import { shownFolder } from './shown-folder.ts';
import { say, type Terminal } from './terminal.ts';

export interface ProduceOptions {
  readonly out?: string | undefined;
  readonly json: boolean;
  readonly explain?: string | undefined;
}

/**
 * Makes, writes and shows. `above` is told before the coil. Throws a Fault with exit code 2, 4 or 5; nothing is written unless
 * all of it is.
 */
export async function produceFolder(
  options: ProduceOptions,
  terminal: Terminal,
  name: string,
  make: (tell: (stage: string) => void) => Promise<Output<CoilRecord>>,
  above?: (record: CoilRecord, page: Page) => string,
): Promise<void> {
  const target = resolve(terminal.folder, options.out ?? join('out', slug(name)));
  await checkFolder(target);
  const { record, files } = await atWork(terminal, name, make);
  const explained = await explainedTap(record, options.explain);
  const folder = await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const page = outPage(terminal);
  if (above !== undefined) say(terminal, `${above(record, page)}\n`);
  say(terminal, showPlan(record, shownFolder(terminal.folder, folder), files, page));
  if (explained !== null) say(terminal, `\n${showExplain(explained, page)}`);
}
