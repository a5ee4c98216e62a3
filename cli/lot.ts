/** `lot`: reads a lot and its jobs, makes all of it, or carries on where a run was killed, and says what came of it. */
import { rmdir } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import { LOT_FILE } from '../src/job/file-kind.ts';
import { readLot } from '../src/job/lot-file.ts';
import { slug } from '../src/job/name.ts';
import type { makeLot } from '../src/lot.ts';
import { checkFolder, holding } from '../src/output/transaction.ts';
import { checkOut } from './check-out.ts';
import { lotProgress } from './lot-progress.ts';
import { outPage } from './page.ts';
import { readJobText } from './read-job.ts';
import { showLot } from './show-lot.ts';
import { shownFolder } from './shown-folder.ts';
import { say, type Terminal } from './terminal.ts';

export interface LotOptions {
  readonly file: string;
  readonly out?: string | undefined;
  readonly json: boolean;
}

/** What makes the lot, loaded only once there is one. */
export type LoadMaker = () => Promise<typeof makeLot>;

/** Throws a Fault with exit code 2, 3, 4 or 5. The folder is written whole or not at all. */
export async function runLot(options: LotOptions, terminal: Terminal, version: string, load: LoadMaker): Promise<void> {
  checkOut(options.out);
  const text = await readJobText(options.file, terminal, LOT_FILE);
  const lot = await readLot(text, options.file, (path, kind) => readJobText(path, terminal, kind));
  const target = resolve(terminal.folder, options.out ?? join('out', slug(lot.name)));
  await checkFolder(target);
  const make = await load();
  const progress = lotProgress(terminal.status, () => performance.now());
  const made = await holding(target, async ({ work, write, finished }) => {
    try {
      const made = await make(lot, { version, work, progress: progress.tell });
      await write(made.files);
      await finished();
      return made;
    } finally {
      progress.end();
      // With nothing finished in it there is nothing to carry on.
      await rmdir(work).catch(() => undefined);
    }
  });
  if (options.json) terminal.out(`${JSON.stringify(made.record, null, 2)}\n`);
  else say(terminal, showLot(made, shownFolder(terminal.folder, target), outPage(terminal)));
}

/** With the real pipeline. */
export async function lot(options: LotOptions, terminal: Terminal, version: string): Promise<void> {
  await runLot(options, terminal, version, async () => (await import('../src/lot.ts')).makeLot);
}
