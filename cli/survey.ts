/** `survey`: reads a measured coil, works out its figures, shows them; writes a folder only when one is named. */
import { resolve } from 'node:path';
import { readCoilFile } from '../src/job/coil-file.ts';
import { COIL_FILE } from '../src/job/file-kind.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import { atWork } from './at-work.ts';
import { checkOut } from './check-out.ts';
import { explainedTap } from './explained-tap.ts';
import { outPage } from './page.ts';
import { readJobText } from './read-job.ts';
import { showExplain } from './show-explain.ts';
import { showSurvey } from './show-survey.ts';
import { shownFolder } from './shown-folder.ts';
import { say, type Terminal } from './terminal.ts';

export interface SurveyOptions {
  readonly coil: string;
  readonly out?: string | undefined;
  readonly json: boolean;
  readonly explain?: string | undefined;
}

/** Throws a Fault with exit code 2, 3 or 5. */
export async function survey(options: SurveyOptions, terminal: Terminal, version: string): Promise<void> {
  checkOut(options.out);
  const file = readCoilFile(await readJobText(options.coil, terminal, COIL_FILE), options.coil);
  const target = options.out === undefined ? null : resolve(terminal.folder, options.out);
  if (target !== null) await checkFolder(target);
  const { surveyFiles, surveyRecordOf } = await import('../src/survey.ts');
  const { record, files } = await atWork(terminal, file.name, async () =>
    target === null ? { record: surveyRecordOf(file, version), files: [] } : surveyFiles(file, { version }),
  );
  const explained = await explainedTap(record, options.explain);
  const folder = target === null ? null : await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const page = outPage(terminal);
  const sized = files.map(({ path, bytes, note }) => ({ path, size: bytes.length, note }));
  const written = folder === null ? null : { folder: shownFolder(terminal.folder, folder), files: sized };
  say(terminal, showSurvey(record, page, written));
  if (explained !== null) say(terminal, `\n${showExplain(explained, page)}`);
}
