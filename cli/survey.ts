/** `survey`: reads a measured coil, works out its figures, shows them; writes a folder only when one is named. */
import { resolve } from 'node:path';
import type { Argv } from 'yargs';
import { readCoilFile } from '../src/job/coil-file.ts';
import { COIL_FILE } from '../src/job/file-kind.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import { checkOut } from './check-out.ts';
import { explainedTap } from './explained-tap.ts';
import { readJobText } from './read-job.ts';
import { showExplain } from './show-explain.ts';
import { showSurvey } from './show-survey.ts';
import { shownFolder } from './shown-folder.ts';
import type { Terminal } from './terminal.ts';

export function describeSurvey(yargs: Argv) {
  return yargs
    .positional('coil', {
      type: 'string',
      demandOption: true,
      describe: 'file of a measured coil, YAML or JSON; - for standard input',
    })
    .option('out', {
      type: 'string',
      requiresArg: true,
      describe: 'folder to write the record and the reference sheet to; nothing is written when left out',
    })
    .option('json', { type: 'boolean', default: false, describe: 'print the record, and nothing else' })
    .option('explain', {
      type: 'string',
      requiresArg: true,
      describe: 'number of a tap: how each of its figures comes about; with --json that instead of the record',
    })
    .example('$0 survey found-coil.yaml', 'shows its figures')
    .example('$0 survey found-coil.yaml --out found', 'writes the folder found besides');
}

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
  const page = { columns: terminal.columns, plain: terminal.plain ?? false };
  const { record, files } =
    target === null ? { record: surveyRecordOf(file, version), files: [] } : await surveyFiles(file, { version });
  const explained = await explainedTap(record, options.explain);
  const folder = target === null ? null : await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const written = folder === null ? null : { folder: shownFolder(terminal.folder, folder), files };
  terminal.out(showSurvey(record, page, written));
  if (explained !== null) terminal.out(`\n${showExplain(explained, terminal.columns)}`);
}
