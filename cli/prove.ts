/** `prove`: reads what was measured of finished coils, judges it by their records, writes the proof, says what came of it. */
import { dirname, join, resolve } from 'node:path';
import { Fault } from '../src/fault.ts';
import { READINGS_FILE } from '../src/job/file-kind.ts';
import { nameOfFile, slug } from '../src/job/name.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import type { DialWish } from '../src/prove.ts';
import { atWork } from './at-work.ts';
import { checkOut } from './check-out.ts';
import { findRecords } from './find-records.ts';
import { errPage, outPage } from './page.ts';
import { readBytes } from './read-job.ts';
import { decodeReadings, LARGEST_READINGS } from './read-readings.ts';
import { showNotes, showProof } from './show-proof.ts';
import { shownFolder } from './shown-folder.ts';
import { say, type Terminal } from './terminal.ts';

export interface ProveOptions {
  readonly readings: string;
  readonly from?: string | undefined;
  readonly out?: string | undefined;
  readonly dial?: string | undefined;
  readonly json: boolean;
}

async function dialFrom(text: string): Promise<DialWish> {
  const { parseQuantity } = await import('../src/quantity/parse.ts');
  const { USUAL_DIAL } = await import('../src/prove/dial.ts');
  const [size = '', turn] = text.split(/[,;]/).map((part) => part.trim());
  const diameter = parseQuantity(size, 'length');
  const span = turn === undefined ? { ok: true as const, value: USUAL_DIAL.spanDeg } : parseQuantity(turn, 'angle');
  for (const read of [diameter, span])
    if (!read.ok) {
      const { got, expected, todo } = read;
      throw new Fault(2, { code: 'dial-option', place: { key: '--dial' }, got, expected, todo });
    }
  return diameter.ok && span.ok ? { diameterMm: diameter.value, spanDeg: span.value } : { diameterMm: 0, spanDeg: 0 };
}

/** Throws a Fault with exit code 2, 3, 4 or 5. Nothing is written unless all of it is. */
export async function prove(options: ProveOptions, terminal: Terminal, version: string): Promise<void> {
  checkOut(options.out);
  const { readings: file } = options;
  const dial = options.dial === undefined ? null : await dialFrom(options.dial);
  const input = file === '-' ? null : resolve(terminal.folder, file);
  const bytes =
    input === null
      ? await terminal.input(LARGEST_READINGS)
      : await readBytes(input, file, READINGS_FILE, LARGEST_READINGS);
  const { text, notes } = decodeReadings(bytes, file);
  const name = nameOfFile(file, 'readings');
  const target = resolve(terminal.folder, options.out ?? join('out', `${slug(name)}-proof`));
  await checkFolder(target);
  const beside = input === null ? [] : [dirname(input)];
  const roots =
    options.from === undefined
      ? [resolve(terminal.folder, 'out'), ...beside]
      : [resolve(terminal.folder, options.from)];
  const found = await findRecords(roots, (folder) => shownFolder(terminal.folder, folder));
  if (found.records.size === 0)
    throw new Fault(3, {
      code: 'no-records',
      place: options.from === undefined ? { file } : { key: '--from' },
      got: `no record of a coil in ${found.searched}`,
      expected: 'a folder that plan, match or lot wrote, with its plan.json',
      todo: 'name the folder with --from',
    });
  const { prove: proveReadings } = await import('../src/prove.ts');
  const { sha256 } = await import('../src/record/hash.ts');
  const made = await atWork(terminal, name, () =>
    proveReadings({ name, file, text, sha256: sha256(bytes), ...found, dial, notes }, { version }),
  );
  const folder = await writeFolder(target, made.files);
  terminal.err(showNotes(made.record, errPage(terminal), terminal.quiet ?? false));
  if (options.json) terminal.out(`${JSON.stringify(made.record, null, 2)}\n`);
  else say(terminal, showProof(made, shownFolder(terminal.folder, folder), outPage(terminal)));
}
