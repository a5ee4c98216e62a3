/**
 * Readings as CSV (see csv/write.ts, also for what is done about formulas), UTF-8 without a mark, units in ASCII. Columns of
 * numbers (tap, value, low, high) hold nothing but a number or nothing.
 */
import { csvText } from '../csv/write.ts';
import type { Judgement, Question, ReadingRow } from './api.ts';

type Column = keyof ReadingRow;

/** In the order of the file; its header is these names. The unit of each figure has a column of its own. */
export const COLUMNS = [
  'record',
  'serial',
  'tap',
  'quantity',
  'condition',
  'value',
  'unit',
  'low',
  'high',
  'verdict',
  'remark',
] as const satisfies readonly Column[];

/**
 * The file, header and a line a row, each ended. Same rows, same bytes.
 * @throws RangeError for what is no number in a column of them
 */
export function toCsv(rows: readonly ReadingRow[]): string {
  return csvText([COLUMNS, ...rows.map((row) => COLUMNS.map((column) => row[column]))]);
}

const ASCII_UNITS: Readonly<Record<string, string>> = { µH: 'uH', Ω: 'ohm' };

export interface About {
  readonly serial: string;
  /** Of the coil, for a resistance. */
  readonly celsius?: number | null;
  readonly remark?: string;
}

/** What the two that are taken with a probe have in the column `condition`. */
const PROBED = 'probe';

function conditionOf({ quantity, capacitancePf, frequencyKhz }: Question, celsius: number | null): string {
  if (quantity === 'probed resonance' || quantity === 'width') return `${capacitancePf} pF, ${PROBED}`;
  if (capacitancePf !== null) return `${capacitancePf} pF`;
  if (frequencyKhz !== null) return `${frequencyKhz} kHz`;
  return quantity === 'resistance' && celsius !== null ? `${celsius} degC` : '';
}

/** The row of a judged reading. `key` of the question tells 20 turns and former, which have no tap, apart. */
export function rowOf(
  record: { readonly hash: string },
  question: Question,
  value: number | null,
  { verdict, low, high }: Judgement,
  { serial, celsius = null, remark = '' }: About,
): ReadingRow {
  const { key, tap, quantity, unit } = question;
  return {
    record: record.hash,
    serial,
    tap,
    quantity: tap === null ? `${quantity} ${key}` : quantity === 'probed resonance' ? 'resonance' : quantity,
    condition: conditionOf(question, celsius),
    value,
    unit: ASCII_UNITS[unit] ?? unit,
    low,
    high,
    verdict,
    remark,
  };
}
