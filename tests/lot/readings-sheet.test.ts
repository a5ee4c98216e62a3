/** The readings sheet: every question of every coil once, read back as the bench page's file is, and nothing a spreadsheet works out. */
import { expect, test } from 'vitest';
import { questionsOf } from '../../src/bench/questions.ts';
import { COLUMNS } from '../../src/bench/readings-csv.ts';
import { readingsLines, readingsSheet } from '../../src/lot/readings-sheet.ts';
import { lotOf } from '../helpers/lot.ts';
import { fromCsv } from '../helpers/readings.ts';
import { sampleRecord } from '../helpers/sample.ts';

const HASH = 'a0'.repeat(32);
const one = sampleRecord();
const other = { ...sampleRecord({ turns: [10, 22, 41], surface: 'smooth', unitTurns: [1, 2] }), hash: HASH };

test('a row for each question of each coil, in the order of the lot, values left empty', () => {
  const { lot, kinds } = lotOf([
    { record: one, quantity: 7, prefix: 'LB' },
    { record: other, quantity: 4, prefix: 'HS' },
  ]);
  const rows = fromCsv(readingsSheet(lot, kinds));
  let at = 0;
  for (const { serial, kind } of lot.coils) {
    const record = kinds.get(kind)!;
    for (const question of questionsOf(record)) {
      const row = rows[at++]!;
      expect([row.serial, row.record, row.tap]).toEqual([serial, record.hash, question.tap]);
      expect([row.low, row.high]).toEqual([question.low, question.high]);
      expect([row.value, row.verdict, row.remark]).toEqual([null, '', '']);
      expect(row.quantity).toBe(question.tap === null ? `${question.quantity} ${question.key}` : question.quantity);
      const condition = { resonance: `${question.capacitancePf} pF`, inductance: `${question.frequencyKhz} kHz` };
      expect(row.condition).toBe(condition[question.quantity as keyof typeof condition] ?? '');
      expect(row.unit).toMatch(/^(mm|ohm|uH|kHz)$/);
    }
  }
  console.log(`readings sheet: ${at} rows of ${lot.coils.length} coils`);
  expect(at).toBe(rows.length);
  expect(at).toBeGreaterThan(150);
});

test('no cell begins as a formula does, and what begins so is read back whole', () => {
  const names = ['=1+2', '+7', '-A1', '@SUM(A1)', "'=x", '"a,b"', '＝1', '\tx'];
  const { lot, kinds } = lotOf([{ record: one, quantity: names.length, prefix: 'x' }], {
    serials: (_, n) => names[n - 1]!,
  });
  const text = readingsSheet(lot, kinds);
  const cells = text.split(/[,\r\n]/).map((cell) => cell.replace(/^"/, ''));
  expect(cells.filter((cell) => /^[=+@\t＝＋－＠]|^-(?![\d.]+$)/.test(cell))).toEqual([]);
  const rows = fromCsv(text);
  expect([...new Set(rows.map(({ serial }) => serial))]).toEqual(names);
  // The guard bites: without its apostrophe the first serial would stand as it is.
  expect(text).toContain("'=1+2");
});

test('coil by coil it is the same file, and a kind without a record is our mistake', () => {
  const { lot, kinds } = lotOf([{ record: one, quantity: 3, prefix: 'LB' }]);
  const lines = [...readingsLines(lot, kinds)];
  expect(lines.length).toBe(4);
  expect(lines[0]).toBe(`${COLUMNS.join(',')}\r\n`);
  expect(lines.join('')).toBe(readingsSheet(lot, kinds));
  expect(() => readingsSheet(lot, new Map())).toThrow(/kind A/);
});
