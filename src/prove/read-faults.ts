/** Faults of a file of readings from which nothing, or not all, can be told. */
import { Fault } from '../fault.ts';
import { quote } from '../quantity/parse.ts';
import type { Columns } from './read-columns.ts';
import type { FileNote } from './types.ts';

/** Faults that are told at once. */
const MOST_FAULTS = 20;

export function noColumns(file: string, line: number, { titles }: Columns): Fault {
  return new Fault(3, {
    code: 'no-readings-column',
    place: { file, line },
    got:
      titles.length === 0 ? 'an empty file' : `a first line without a column of readings: ${quote(titles.join(', '))}`,
    expected:
      'titles over the columns: serial, tap, quantity, condition, value, unit; or one column a reading, such as "tap 1 (uH)"',
    todo: 'save the readings from the bench page, fill in readings.csv of the lot, or write titles into the first line',
  });
}

export function noRecords(
  file: string,
  lost: ReadonlyMap<string, { line: number; serials: Set<string> }>,
  searched = 'the records given',
): Fault {
  const faults = [...lost].slice(0, MOST_FAULTS).map(([hash, { line, serials }]) => {
    const names = [...serials].filter((serial) => serial !== '');
    const some = names.slice(0, 5).map(quote).join(', ');
    const coils = names.length === 0 ? '' : `, for ${some}${names.length > 5 ? ` and ${names.length - 5} more` : ''}`;
    return {
      code: 'record-not-found',
      place: { file, line, key: 'record' },
      got: `record ${hash.slice(0, 12)}${coils}, which is not in ${searched}`,
      expected: 'the folder that plan, match or lot wrote, with its plan.json',
      todo: 'name the folder with --from, or make it again from the same job',
    };
  });
  return new Fault(3, faults);
}

export function nothingRead(file: string, notes: readonly FileNote[], missing: number): Fault {
  const out = notes.filter(({ fate }) => fate === 'left out');
  if (out.length === 0)
    return new Fault(3, {
      code: 'no-readings',
      place: { file },
      got: missing === 0 ? 'titles and no row' : `${missing} cells for readings, all of them blank`,
      expected: 'one reading at least',
      todo: 'fill in what was measured',
    });
  return new Fault(
    3,
    out.slice(0, MOST_FAULTS).map(({ line, column, code, got, expected, todo }) => ({
      code,
      place: { file, line, key: column ?? undefined },
      got,
      expected,
      todo,
    })),
  );
}
