/** `match`: reads an old coil, infers it, finds its replacement, writes the output folder, says what came of it. */
import { OLD_COIL_FILE } from '../src/job/file-kind.ts';
import { readOldCoil } from '../src/job/old-coil-file.ts';
import type { matchCoil } from '../src/match.ts';
import { checkOut } from './check-out.ts';
import { type ProduceOptions, produceFolder } from './produce.ts';
import { readJobText } from './read-job.ts';
import { showMatch } from './show-match.ts';
import type { Terminal } from './terminal.ts';

export interface MatchOptions extends ProduceOptions {
  readonly coil: string;
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
  const make = async (tell: (stage: string) => void) => (await load())(file, { version, tell });
  await produceFolder(options, terminal, file.job.name, make, showMatch);
}

/** With the real matcher. */
export async function match(options: MatchOptions, terminal: Terminal, version: string): Promise<void> {
  await runMatch(options, terminal, version, async () => (await import('../src/match.ts')).matchCoil);
}
