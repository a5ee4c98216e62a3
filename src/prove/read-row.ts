/** What one cell of a row says: a reading, a place of the dial, or what is wrong with it. */
import { csvNumber } from '../csv/read.ts';
import { quote } from '../quantity/parse.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Columns, FigureColumn, Role } from './read-columns.ts';
import { figureOf } from './read-figure.ts';
import type { Read } from './read-repeated.ts';
import { swappedWith } from './read-swapped.ts';
import {
  type Conditions,
  conditionsIn,
  tapOf,
  type Unit,
  unitOf,
  type What,
  type Words,
  whatOf,
} from './read-words.ts';
import type { DialReading, FileNote, Reading } from './types.ts';

/** Of a note, without its place. */
export type Told = Pick<FileNote, 'code' | 'got' | 'expected' | 'todo'> & {
  /** The column at fault, where it is not that of the figure. */
  readonly role?: Role | undefined;
};

export interface Row {
  readonly line: number;
  readonly record: CoilRecord;
  readonly tap: string;
  readonly words: Words;
  readonly quantity: string;
  readonly unit: string;
  readonly conditions: { readonly conditions: Conditions; readonly rest: string };
  readonly remark: string;
  readonly low: number | null;
  readonly high: number | null;
}

/** Conditions of a row: of the column `condition`, and of columns such as `capacitor (pF)`. */
export function conditionsOf(columns: Columns, cell: (index: number | undefined) => string): Row['conditions'] {
  const words = cell(columns.roles.condition);
  const more = columns.conditions.flatMap(({ index, unit }) => {
    const text = cell(index);
    return text === '' ? [] : [/[a-z]$/i.test(text) ? text : `${text} ${unit}`];
  });
  return conditionsIn([words, ...more].join('; '));
}

const told = (code: string, got: string, expected: string, todo: string, role?: Role): Told => ({
  code,
  got,
  expected,
  todo,
  role,
});

/** What the row and its column say together, or what is wrong with it. */
export function readingOf(row: Row, column: FigureColumn, cell: string, alone: boolean): Read | Told {
  const { record, line } = row;
  const count = record.windings[0]!.taps.length;
  const cellUnit = unitOf(cell.replace(/^[+\-\d.,\s/e]+/i, ''));
  const unit = unitFor(row, column);
  if (unit === undefined)
    return told(
      'unit-unknown',
      quote(row.unit),
      'a unit such as uH, kHz, ohm or mm',
      'write it out, or leave the cell empty and put the unit beside the figure',
      'unit',
    );
  const named: What | null = column.what ?? row.words.what;
  if (named === null && column.what === null && row.quantity !== '')
    return told(
      'quantity-unknown',
      quote(row.quantity),
      'inductance, resonance, width, resistance, length, diameter, turns or dial',
      'use one of these words',
      'quantity',
    );
  const by = cellUnit ?? unit;
  const what = named ?? (by === null ? null : whatOf(by));
  if (what === null)
    return told(
      'quantity-unknown',
      `${quote(cell)}, of which nobody says what it measures`,
      'a quantity, or a unit that tells it',
      'fill in the column quantity',
      'quantity',
    );
  const place = tapIn(row, column, what, count);
  if (typeof place === 'object' && place !== null) {
    const swapped = /^\d+$/.test(cell) && Number(cell) <= count && csvNumber(row.tap) != null;
    return swapped
      ? {
          ...place,
          code: 'swapped',
          todo: `${quote(cell)} in ${quote(column.title)} looks like a tap: are the two columns swapped?`,
        }
      : place;
  }
  const figure = figureOf(cell, what, unit);
  if (!figure.ok) return told(figure.code, figure.got, figure.expected, figure.todo);
  const conditions = joined(column.conditions, joined(row.words.conditions, row.conditions.conditions));
  const left =
    row.conditions.rest === ''
      ? null
      : told(
          'condition-unknown',
          quote(row.conditions.rest),
          'a condition such as 100 pF, probe, 100 kHz or 23 degC',
          'it was passed over; write it with its unit if it counts',
          'condition',
        );
  const { value } = figure;
  const { taps } = record.windings[0]!;
  if (what === 'dial') {
    const { degrees } = conditions;
    if (degrees === null)
      return told(
        'no-degrees',
        `${quote(cell)} without where the dial stood`,
        'a condition such as 30 deg',
        'write it into the column condition',
      );
    const dial: DialReading = { line, tap: place!, degrees, frequencyKhz: value };
    return { line, column: column.title, note: left, reading: null, dial };
  }
  const quantity = what === 'resonance' && conditions.probed ? 'probed resonance' : what;
  if (lacksCapacitor(quantity, conditions.capacitancePf))
    return told(
      'no-capacitor',
      `${quote(cell)} without the capacitor it was taken with`,
      'a condition such as 100 pF',
      'write it into the column condition, or over the column',
      'condition',
    );
  const swapped = swappedWith(record, { what: quantity, tap: place, conditions, value }, row);
  if (swapped !== null) return swapped;
  const reading: Reading = {
    line,
    quantity,
    tap: place,
    value,
    written: cell,
    capacitancePf: TAKEN_WITH.includes(quantity) ? conditions.capacitancePf : null,
    frequencyKhz: what === 'inductance' ? (conditions.frequencyKhz ?? record.shop.meterKhz) : null,
    celsius: what === 'resistance' ? conditions.celsius : null,
    key: keyOf(record, quantity, column.key ?? row.words.key, place === null ? null : taps[place - 1]!.tap, conditions),
    remark: alone ? row.remark : '',
  };
  return { line, column: column.title, note: left, reading, dial: null };
}

/** What a known capacitor belongs to. With a probe it may be none: 0 pF. */
const TAKEN_WITH: readonly What[] = ['resonance', 'probed resonance', 'width'];
const lacksCapacitor = (what: What, pf: number | null): boolean =>
  TAKEN_WITH.includes(what) && (pf === null || pf < 0 || (pf === 0 && what === 'resonance'));

/** Of the column `unit`, else of the title; null: none stated; undefined: one that is not known. */
function unitFor(row: Row, column: FigureColumn): Unit | null | undefined {
  if (row.unit !== '' && column.what === null) return unitOf(row.unit) ?? undefined;
  return column.unit ?? row.words.unit;
}

function joined(first: Conditions, second: Conditions): Conditions {
  return {
    capacitancePf: first.capacitancePf ?? second.capacitancePf,
    frequencyKhz: first.frequencyKhz ?? second.frequencyKhz,
    celsius: first.celsius ?? second.celsius,
    degrees: first.degrees ?? second.degrees,
    probed: first.probed || second.probed,
  };
}

/** The tap of a reading; null of one that has none. */
function tapIn(row: Row, column: FigureColumn, what: What, count: number): number | null | Told {
  const free = what === 'diameter' || what === 'other' || (column.key ?? row.words.key) === 'turns-20';
  const written = column.tap ?? row.words.tap ?? (row.tap === '' ? null : tapOf(row.tap));
  const taps = count === 1 ? 'tap 1, the whole coil' : `a tap from 1 to ${count}, or whole`;
  if (free) return null;
  if (written === null) {
    if (count === 1) return 1;
    return told('no-tap', 'no tap', taps, 'write it into the column tap, or over the column', 'tap');
  }
  const tap = written === 'whole' ? count : written;
  if (tap === undefined || tap < 1 || tap > count)
    return told(
      'tap-unknown',
      tap === undefined ? quote(row.tap) : `tap ${tap}`,
      taps,
      'write the number of the tap',
      'tap',
    );
  return tap;
}

/** The key of the bench's question where it asks the same. */
function keyOf(
  record: CoilRecord,
  what: What,
  key: string | null,
  tap: number | null,
  conditions: Conditions,
): string | null {
  const { capacitancePf, frequencyKhz } = conditions;
  switch (what) {
    case 'diameter':
      return 'former';
    case 'length':
      return tap === null ? key : `length-${tap}`;
    case 'resistance':
      return `ohm-${tap}`;
    case 'inductance':
      return frequencyKhz === null || frequencyKhz === record.shop.meterKhz ? `uh-${tap}` : null;
    case 'resonance':
      return `khz-${tap}-${Number(capacitancePf!.toFixed(3))}`;
    case 'probed resonance':
      return `probed-${tap}-${Number(capacitancePf!.toFixed(3))}`;
    case 'width':
      return `width-${tap}-${Number(capacitancePf!.toFixed(3))}`;
    case 'other':
      return key;
    default:
      return null;
  }
}
