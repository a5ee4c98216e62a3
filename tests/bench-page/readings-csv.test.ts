/** Readings as CSV: what is written is read again, whatever stands in it; nothing in it is a formula. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { ReadingRow } from '../../src/bench/api.ts';
import { judge, questionsOf } from '../../src/bench/judge.ts';
import { COLUMNS, rowOf, toCsv } from '../../src/bench/readings-csv.ts';
import { Fault } from '../../src/fault.ts';
import { fromCsv } from '../helpers/readings.ts';
import { sampleRecord } from '../helpers/sample.ts';

/** Names as people, and people who mean harm, write them. */
const hostile = fc.oneof(
  fc.string({ unit: 'binary' }),
  fc.string({
    unit: fc.constantFrom('=', '+', '-', '@', '\t', '\r', '\n', '"', "'", ',', ';', '|', '＝', ' ', 'a', 'µ'),
  }),
  fc.constantFrom('=1+1', "=cmd|' /C calc'!A0", '@SUM(A1)', "'=1", "''-2", '-2', '"', '","', '\r\n=1', '\ufeff', ''),
);
const number = fc
  .oneof(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.integer(), fc.constantFrom(-0.5, 1e-9, 1e21))
  .map((value) => (value === 0 ? 0 : value));
const row: fc.Arbitrary<ReadingRow> = fc.record({
  record: hostile,
  serial: hostile,
  tap: fc.option(fc.integer({ min: 1, max: 60 })),
  quantity: hostile,
  condition: hostile,
  value: fc.option(number),
  unit: hostile,
  low: fc.option(number),
  high: fc.option(number),
  verdict: hostile,
  remark: hostile,
});

test('read again equals what was written', () => {
  let cells = 0;
  fc.assert(
    fc.property(fc.array(row, { maxLength: 6 }), (rows) => {
      expect(fromCsv(toCsv(rows))).toEqual(rows);
      expect(toCsv(fromCsv(toCsv(rows)))).toBe(toCsv(rows));
      cells += rows.length * COLUMNS.length;
    }),
    { seed: 41_802, numRuns: 300 },
  );
  expect(cells).toBeGreaterThan(2500);
  console.log(`cells written and read: ${cells}`);
});

test('no cell of text begins as a formula does, quoted or not', () => {
  let cells = 0;
  fc.assert(
    fc.property(row, hostile, (one, text) => {
      const csv = toCsv([{ ...one, value: null, low: null, high: null, tap: null, remark: text, serial: text }]);
      const body = csv.slice(csv.indexOf('\r\n') + 2);
      // Cells as a plain reader of CSV has them, by a way of its own.
      for (const [, quoted, plain] of body.matchAll(/(?:^|,|(?<=\r\n))(?:"((?:[^"]|"")*)"|([^,"\r\n]*))(?=,|\r\n)/g)) {
        expect(quoted ?? plain ?? '').not.toMatch(/^[=+\-@\t\r\n＝＋－＠]/u);
        cells++;
      }
    }),
    { seed: 7_331, numRuns: 300 },
  );
  expect(cells).toBeGreaterThan(2500);
  console.log(`cells held against formulas: ${cells}`);
});

test('negative numbers stay numbers; header, order of columns and line ends as stated', () => {
  const one: ReadingRow = {
    record: 'abc',
    serial: '-7',
    tap: 3,
    quantity: 'inductance',
    condition: '100 kHz',
    value: -1.25,
    unit: 'uH',
    low: 1e-7,
    high: null,
    verdict: 'implausible',
    remark: 'says "loose", twice',
  };
  expect(toCsv([one])).toBe(
    'record,serial,tap,quantity,condition,value,unit,low,high,verdict,remark\r\n' +
      `abc,'-7,3,inductance,100 kHz,-1.25,uH,1e-7,,implausible,"says ""loose"", twice"\r\n`,
  );
});

test('files that came through other hands: a mark, LF, other columns, another order', () => {
  const csv = `\ufeff${[...COLUMNS].reverse().join(',')},extra\n,pass,2,1,mm,1.5,,length,4,7,abc,x\n\n`;
  expect(fromCsv(csv)).toEqual([
    {
      record: 'abc',
      serial: '7',
      tap: 4,
      quantity: 'length',
      condition: '',
      value: 1.5,
      unit: 'mm',
      low: 1,
      high: 2,
      verdict: 'pass',
      remark: '',
    },
  ]);
});

test('what is no such file is refused with its line', () => {
  const head = COLUMNS.join(',');
  const refused = (text: string) => {
    try {
      fromCsv(text);
    } catch (error) {
      if (error instanceof Fault) return `${error.exit} line ${error.faults[0]!.place?.line}: ${error.faults[0]!.got}`;
      throw error;
    }
    return 'read';
  };
  expect(refused('')).toMatch(/^3 line 1: a header without record/);
  expect(refused(head.replaceAll(',', ';'))).toMatch(/^3 line 1: a header without/);
  expect(refused(`${head}\r\na,b,c\r\n`)).toBe('3 line 2: 3 cells');
  expect(refused(`${head}\r\nr,s,1,length,,"12,5",mm,1,2,pass,\r\n`)).toBe('3 line 2: value "12,5"');
  expect(refused(`${head}\r\nr,s,1,length,,12.5,mm,1,2,pass,"open\r\n`)).toBe('3 line 2: a quote that is never closed');
  expect(refused(`${head}\r\nr,s,1,"length"x,,12.5,mm,1,2,pass,\r\n`)).toMatch(/^3 line 2: "x" after a cell/);
  expect(() => toCsv([{ ...emptyRow(), value: Number.NaN }])).toThrow(RangeError);
});

function emptyRow(): ReadingRow {
  const record = sampleRecord();
  const question = questionsOf(record).find(({ key }) => key === 'ohm-2')!;
  return rowOf(record, question, 1, judge(record, question, 1, { celsius: 23.5 }), { serial: '1', celsius: 23.5 });
}

test('a row of a judged reading says with what and at which temperature, units in ASCII', () => {
  expect(emptyRow()).toMatchObject({ tap: 2, quantity: 'resistance', condition: '23.5 degC', unit: 'ohm' });
  const record = sampleRecord();
  const rows = questionsOf(record).map((question) =>
    rowOf(record, question, question.nominal, judge(record, question, question.nominal ?? 1), { serial: 'A 12' }),
  );
  expect(rows.length).toBeGreaterThan(10);
  for (const { unit, record: hash } of rows) {
    expect(unit).toMatch(/^(mm|ohm|uH|kHz)$/);
    expect(hash).toBe(record.hash);
  }
  // No two rows of one coil are the same measurement.
  const names = rows.map(({ tap, quantity, condition }) => `${tap} ${quantity} ${condition}`);
  expect(new Set(names).size).toBe(names.length);
});
