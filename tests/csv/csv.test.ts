/** Tables in CSV: what is written is read again, files of other programs are read, nothing that is written is a formula. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type CsvTable, csvNumber, isBlank, readCsv, unguarded } from '../../src/csv/read.ts';
import { csvText } from '../../src/csv/write.ts';
import { Fault } from '../../src/fault.ts';

const what = { code: 'table-not-read', todo: 'save it anew' };
const read = (text: string): CsvTable => readCsv(text, what);
const cellsOf = (text: string) => {
  const { header, rows } = read(text);
  return [header, ...rows].map(({ cells }) => cells);
};

const hostile = fc.oneof(
  fc.string({ unit: 'binary' }),
  fc.string({
    unit: fc.constantFrom('=', '+', '-', '@', '\t', '\r', '\n', '"', "'", ',', ';', '＝', '＋', '－', '＠', ' ', 'a'),
  }),
  fc.constantFrom('', ' ', '=1+1', "'=1", "''-2", '-2', '"', '","', '\r\n=1', '\ufeff', '\ufeffx', 'a;b;c', 'a\tb'),
);

describe('what is written', () => {
  test('is read again, cell by cell, and the same bytes come of it', () => {
    let cells = 0;
    fc.assert(
      fc.property(
        fc.array(fc.array(hostile, { minLength: 1, maxLength: 5 }), { minLength: 1, maxLength: 6 }),
        (rows) => {
          const text = csvText(rows);
          const again = cellsOf(text).map((row) => row.map(unguarded));
          expect(again).toEqual(rows);
          expect(csvText(again)).toBe(text);
          cells += rows.flat().length;
        },
      ),
      { seed: 611, numRuns: 500 },
    );
    console.log(`cells written and read: ${cells}`);
    expect(cells).toBeGreaterThan(3000);
  });

  test('never begins a cell of text as a formula does', () => {
    let cells = 0;
    fc.assert(
      fc.property(fc.array(hostile, { minLength: 1, maxLength: 5 }), (row) => {
        // Cells as a plain reader has them, by a way of its own, which wants something in the first.
        for (const [, quoted, plain] of csvText([['x', ...row]]).matchAll(
          /(?:^|,|(?<=\r\n))(?:"((?:[^"]|"")*)"|([^,"\r\n]*))(?=,|\r\n)/g,
        )) {
          expect(quoted ?? plain ?? '').not.toMatch(/^[=+\-@\t\r\n＝＋－＠]/u);
          cells++;
        }
      }),
      { seed: 612, numRuns: 500 },
    );
    console.log(`cells held against formulas: ${cells}`);
    expect(cells).toBeGreaterThan(800);
  });

  test('keeps numbers numbers, negative ones too, and null empty', () => {
    expect(
      csvText([
        ['a', 'b'],
        [-1.5, null],
        [-0, '-1.5'],
      ]),
    ).toBe("a,b\r\n-1.5,\r\n0,'-1.5\r\n");
    expect(() => csvText([[Number.NaN]])).toThrow(RangeError);
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(csvNumber(cellsOf(csvText([['x'], [value]]))[1]![0]!)).toBe(value === 0 ? 0 : value);
      }),
      { seed: 613, numRuns: 300 },
    );
  });
});

describe('files of other hands', () => {
  test('any separator and any line end, with or without the mark: the same rows on their own lines', () => {
    const plain = fc.string({ unit: fc.constantFrom('a', '7', ' b', '.', 'µ', "'") });
    let files = 0;
    fc.assert(
      fc.property(
        fc.array(fc.tuple(plain, plain, plain), { minLength: 1, maxLength: 6 }),
        fc.constantFrom(',', ';', '\t'),
        fc.constantFrom('\n', '\r\n', '\r'),
        fc.constantFrom('', '\ufeff'),
        fc.boolean(),
        (rows, separator, end, mark, ended) => {
          const text = `${mark}${rows.map((row) => row.join(separator)).join(end)}${ended ? end : ''}`;
          const table = read(text);
          const all = [table.header, ...table.rows];
          expect(table.separator).toBe(separator);
          expect(all.map(({ cells }) => cells)).toEqual(rows);
          expect(all.map(({ line }) => line)).toEqual(rows.map((_, index) => index + 1));
          files++;
        },
      ),
      { seed: 614, numRuns: 300 },
    );
    console.log(`files of other hands read: ${files}`);
    expect(files).toBe(300);
  });

  test('a row counts from the line on which it begins', () => {
    const { rows } = read('\n\na,b\n"x\r\ny\rz\nw",1\n\n   \n2,3\n,\n');
    expect(rows.map(({ line, cells }) => [line, ...cells])).toEqual([
      [4, 'x\r\ny\rz\nw', '1'],
      [10, '2', '3'],
      [11, '', ''],
    ]);
    expect(rows.map(isBlank)).toEqual([false, false, true]);
  });

  test('rows keep their own number of cells; quotes inside a plain cell are text', () => {
    expect(cellsOf('a;b\n1\n1;2;3;\nsays "x";5')).toEqual([['a', 'b'], ['1'], ['1', '2', '3', ''], ['says "x"', '5']]);
    expect(read('"a;b;c",d\n').separator).toBe(',');
    expect(read('')).toEqual({ separator: ',', header: { line: 1, cells: [] }, rows: [] });
  });

  test('is refused with its line where a quote is never closed or text follows one', () => {
    const refused = (text: string): string => {
      try {
        readCsv(text, { ...what, file: 'x.csv' });
      } catch (error) {
        if (!(error instanceof Fault)) throw error;
        const { code, place, got, todo } = error.faults[0]!;
        return `${error.exit} ${code} ${place?.file} ${place?.line}: ${got}; ${todo}`;
      }
      return 'read';
    };
    expect(refused('a,b\n1,"2\n3\n')).toBe('3 table-not-read x.csv 2: a quote that is never closed; save it anew');
    expect(refused('a,b\n"1\n1","2')).toBe('3 table-not-read x.csv 3: a quote that is never closed; save it anew');
    expect(refused('a;b\r1;"2"3')).toBe('3 table-not-read x.csv 2: "3" after a cell; quote the cell');
  });

  test('numbers with a point or a comma, groups by spaces, a true minus', () => {
    const cases: readonly (readonly [string, number | null | undefined])[] = [
      ...([
        ['12.5', 12.5],
        ['12,5', 12.5],
        ['-0,25', -0.25],
        ['−3', -3],
        ["'-3", -3],
        ['+4', 4],
        [' 5 ', 5],
      ] as const),
      ...([
        ['.5', 0.5],
        [',5', 0.5],
        ['5.', 5],
        ['1e3', 1000],
        ['1,5E-2', 0.015],
        ['-0', 0],
      ] as const),
      ...([
        ['1 234,5', 1234.5],
        ['1\u202f234\u00a0567', 1234567],
        ['12\u2009345.5', 12345.5],
      ] as const),
      ...([
        ['', null],
        ['  ', null],
      ] as const),
      ...(
        ['x', '1.2.3', '1,234.5', '1 23', '.', '-', '1e999', '12 uH', '--1', "''-1", '0x10', 'Infinity'] as const
      ).map((text) => [text, undefined] as const),
    ];
    for (const [text, value] of cases) expect([text, csvNumber(text)]).toEqual([text, value]);
  });
});
