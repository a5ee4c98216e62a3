/**
 * The readings sheet of a lot: a row for every question of every coil, to be filled in by hand or in a spreadsheet. Columns are
 * those of the bench page's readings, so that both files are read the same way.
 */
import { questionsOf } from '../bench/questions.ts';
import { COLUMNS, rowOf } from '../bench/readings-csv.ts';
import { csvText } from '../csv/write.ts';
import type { CoilRecord } from '../record/schema.ts';
import { recordOfKind } from './kind-record.ts';
import type { LotRecord } from './schema.ts';

/** The lines of one coil, serial by serial in the order of the lot; the header comes first. */
export function* readingsLines(
  lot: Pick<LotRecord, 'coils'>,
  kinds: ReadonlyMap<string, CoilRecord>,
): Generator<string> {
  yield csvText([COLUMNS]);
  const questions = new Map([...kinds].map(([kind, record]) => [kind, questionsOf(record)]));
  for (const { serial, kind } of lot.coils) {
    const record = recordOfKind(kinds, kind);
    const rows = questions.get(kind)!.map((question) => {
      const { low, nominal, high } = question;
      const judgement = { verdict: 'not judged', low, nominal, high, deviationPercent: null, advice: [] } as const;
      const row = { ...rowOf(record, question, null, judgement, { serial }), verdict: '' };
      return COLUMNS.map((column) => row[column]);
    });
    yield csvText(rows);
  }
}

/**
 * The whole file: record, serial, tap, quantity, condition, unit, low and high filled in; value, verdict and remark empty.
 * @param kinds the record of each kind by its letter
 * @throws Error where a coil's kind has no record
 */
export function readingsSheet(lot: Pick<LotRecord, 'coils'>, kinds: ReadonlyMap<string, CoilRecord>): string {
  let text = '';
  for (const lines of readingsLines(lot, kinds)) text += lines;
  return text;
}
