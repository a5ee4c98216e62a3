/**
 * Readings of finished coils from a table: the file of the bench page, the readings sheet of a lot, or what people type in a
 * spreadsheet, a reading a row or a coil a row.
 *
 *     CSV cells (csv/read) -> what each column holds (read-columns, read-words) -> record and serial of each row (read-place)
 *          -> figures in the unit of their quantity (read-figure) -> repeated ones parted (read-repeated) -> coils by record
 *
 * Nothing is dropped silently: every figure ends among the readings, is blank, or is left out by a note that says why. What
 * was measured twice counts as it stands last in the file: a coil is read again after it was mended.
 */
import { csvNumber, isBlank, readCsv, unguarded } from '../csv/read.ts';
import type { LotRecord } from '../lot/schema.ts';
import { cut, quote } from '../quantity/parse.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Columns, columnsOf } from './read-columns.ts';
import { noColumns, noRecords, nothingRead } from './read-faults.ts';
import { isMissing } from './read-figure.ts';
import { Places } from './read-place.ts';
import { type Read, unrepeated } from './read-repeated.ts';
import { conditionsOf, type Row, readingOf, type Told } from './read-row.ts';
import { wordsOf } from './read-words.ts';
import type { CoilReadings, FileNote, KindReadings, ReadingsFile } from './types.ts';

export interface ReadOptions {
  /** Lots whose serials are known. */
  readonly lots?: readonly LotRecord[];
  /** Where records were looked for, in words, for the fault of a record that is not there. */
  readonly searched?: string;
}

const NO_NOTE: Told = { code: '', got: '', expected: '', todo: '' };

/** Longest title, figure or remark that is looked at. */
const LONGEST_CELL = 500;
/** Ends of lines, marks of direction and halves of characters: they would steer a terminal, and no font has them. */
const STEERS = /[\p{Cc}\p{Zl}\p{Zp}\p{Cs}\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069\ufeff\ufffe\uffff]/gu;

/** What a cell says, on one line. */
const textOf = (cell: string): string => cut(unguarded(cell), LONGEST_CELL).replace(STEERS, ' ').trim();

/** A coil as it is gathered. */
interface Gathered {
  readonly hash: string;
  readonly serial: string;
  readonly read: Read[];
  readonly remarks: Set<string>;
}

/**
 * The readings of a file by the records they belong to.
 * @throws Fault (exit 3): no table, no column of readings, a record that is not there, not one reading
 */
export function readReadings(
  text: string,
  file: string,
  records: ReadonlyMap<string, CoilRecord>,
  options: ReadOptions = {},
): ReadingsFile {
  const table = readCsv(text, {
    code: 'readings-not-read',
    todo: 'close it, or save the table anew as CSV',
    file,
  });
  const rows = table.rows.filter((row) => !isBlank(row));
  const filled = (index: number) => rows.filter(({ cells }) => (cells[index] ?? '').trim() !== '').length;
  const columns = columnsOf(table.header.cells.map(textOf), table.header.line, filled);
  if (columns.figures.length === 0) throw noColumns(file, table.header.line, columns);

  const notes: FileNote[] = [...columns.notes];
  const places = new Places(records, options.lots ?? []);
  const coils = new Map<string, Gathered>();
  const lost = new Map<string, { line: number; serials: Set<string> }>();
  const told = new Set<string>();
  let figures = 0;
  let missing = 0;
  let leftOut = 0;

  for (const { line, cells: raw } of rows) {
    const cells = raw.map(textOf);
    const cell = (index: number | undefined) => (index === undefined ? '' : (cells[index] ?? ''));
    const { roles } = columns;
    const filledIn = columns.figures.filter(({ index }) => !isMissing(cell(index)));
    const blank = columns.figures.length - filledIn.length;
    const remark = cell(roles.remark);
    figures += columns.figures.length;
    missing += blank;
    const out = (column: string | null, note: Told, count: number) => {
      leftOut += count;
      notes.push({ line, column, fate: 'left out', figures: count, ...note });
    };
    const titleOf = (role: keyof Columns['roles']) => columns.titles[roles[role] ?? -1] ?? null;
    const extra = cells.slice(columns.titles.length).filter((one) => one !== '');
    if (extra.length > 0) {
      const todo =
        table.separator === ','
          ? 'quote cells that hold a comma; with decimal commas part the cells by semicolons'
          : 'remove what is behind the last column, or give it a title';
      out(
        null,
        {
          code: 'too-many-cells',
          got: `${cells.length} cells: ${quote(cells.join(table.separator))}`,
          expected: `${columns.titles.length}, as in the header`,
          todo,
        },
        filledIn.length,
      );
      continue;
    }
    const placed = places.of(cell(roles.record), cell(roles.serial));
    if (placed.ok === 'no record') {
      const known = lost.get(placed.hash) ?? { line, serials: new Set() };
      known.serials.add(placed.serial);
      lost.set(placed.hash, known);
      continue;
    }
    if (!placed.ok) {
      // A row of nothing but blanks and words says nothing of a coil that is not known.
      if (filledIn.length > 0 || remark !== '') {
        const said = remark === '' ? '' : `, with the remark ${quote(remark)}`;
        out(
          titleOf(placed.note.column) ?? placed.note.column,
          { ...placed.note, got: placed.note.got + said },
          filledIn.length,
        );
      }
      continue;
    }
    if (placed.note !== null && !told.has(`${placed.note.code} ${placed.serial}`)) {
      told.add(`${placed.note.code} ${placed.serial}`);
      notes.push({ line, fate: 'kept', figures: 0, ...placed.note, column: titleOf('serial') });
    }
    const key = `${placed.hash} ${placed.serial}`;
    const coil = coils.get(key) ?? { hash: placed.hash, serial: placed.serial, read: [], remarks: new Set<string>() };
    coils.set(key, coil);
    const record = records.get(placed.hash)!;
    const row: Row = {
      line,
      record,
      tap: cell(roles.tap),
      words: wordsOf(cell(roles.quantity)),
      quantity: cell(roles.quantity),
      unit: cell(roles.unit),
      conditions: conditionsOf(columns, cell),
      remark,
      low: csvNumber(cell(roles.low)) ?? null,
      high: csvNumber(cell(roles.high)) ?? null,
    };
    for (const column of filledIn) {
      const read = readingOf(row, column, cell(column.index), filledIn.length === 1);
      const { role, ...note } = 'code' in read ? read : (read.note ?? NO_NOTE);
      const at = (role === undefined ? null : titleOf(role)) ?? column.title;
      if ('code' in read) out(at, note, 1);
      else {
        coil.read.push(read);
        if (read.note !== null) notes.push({ line, column: at, fate: 'kept', figures: 0, ...note });
      }
    }
    if (remark !== '' && filledIn.length !== 1) coil.remarks.add(remark);
  }
  if (lost.size > 0) throw noRecords(file, lost, options.searched);

  let readings = 0;
  let dial = 0;
  const finished = [...coils.values()].map((coil) => {
    const { kept, repeated } = unrepeated(coil.read);
    for (const { line, column, note } of repeated) {
      leftOut++;
      notes.push({ line, column, fate: 'left out', figures: 1, ...note });
    }
    const made: CoilReadings = {
      serial: coil.serial,
      readings: kept.flatMap(({ reading }) => (reading === null ? [] : [reading])),
      dial: kept.flatMap((one) => (one.dial === null ? [] : [one.dial])),
      remarks: [...coil.remarks],
    };
    readings += made.readings.length;
    dial += made.dial.length;
    return { hash: coil.hash, made };
  });
  notes.sort((a, b) => a.line - b.line);
  const count = { figures, readings, dial, missing, leftOut };
  if (figures !== readings + dial + missing + leftOut)
    throw new Error(`figures of the file that went astray: ${JSON.stringify(count)}`);
  if (readings + dial === 0) throw nothingRead(file, notes, missing);
  const kinds = [...new Set(finished.map(({ hash }) => hash))].map(
    (hash): KindReadings => ({
      record: records.get(hash)!,
      coils: finished.filter((one) => one.hash === hash).map(({ made }) => made),
    }),
  );
  return { kinds, notes, count };
}
