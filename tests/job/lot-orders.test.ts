/** The table of jobs in CSV. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { csvText } from '../../src/csv/write.ts';
import { Fault } from '../../src/fault.ts';
import { looksLikeOrders } from '../../src/job/lot/orders.ts';
import { readLotFile } from '../../src/job/lot-file.ts';

const read = (text: string) => readLotFile(text, 'shop/spring orders.csv');
function refused(text: string): string[] {
  try {
    read(text);
  } catch (error) {
    if (error instanceof Fault && error.exit === 3)
      return error.faults.map(({ place, got, todo }) => `${place?.line} ${place?.key ?? '-'}: ${got}; ${todo}`);
    throw error;
  }
  return [];
}

describe('a table of jobs', () => {
  test('is a lot by itself, named after its file', () => {
    expect(read('job,quantity\nreceiver.yaml,2\n../old/tube.yaml,1\n')).toEqual({
      file: 'shop/spring orders.csv',
      name: 'spring orders',
      date: null,
      paper: null,
      checkedBy: null,
      entries: [
        {
          path: 'receiver.yaml',
          readFrom: 'shop/receiver.yaml',
          quantity: 2,
          serials: ['SO-001', 'SO-002'],
          place: { file: 'shop/spring orders.csv', line: 2, key: 'job' },
        },
        {
          path: '../old/tube.yaml',
          readFrom: 'old/tube.yaml',
          quantity: 1,
          serials: ['SO-003'],
          place: { file: 'shop/spring orders.csv', line: 3, key: 'job' },
        },
      ],
      table: null,
      pattern: null,
      firstSerial: 1,
      spools: [],
      printers: [],
      jigs: 'once',
    });
  });

  test('reads the same from spreadsheets of all countries, columns in any order', () => {
    const plain = read('job,quantity,serials,first-serial\na.yaml,2,X-##,7\nb.yaml,,Y-1 Y-2,\n').entries;
    expect(plain.map(({ serials }) => serials)).toEqual([
      ['X-07', 'X-08'],
      ['Y-1', 'Y-2'],
    ]);
    const strip = (text: string) => read(text).entries.map(({ place: _, ...rest }) => rest);
    for (const text of [
      '\ufeffFirst serial;Serials;Quantity;Job\r\n7;X-##;2;a.yaml\r\n;"Y-1; Y-2";2;b.yaml\r\n;;;\r\n',
      '\r\nQUANTITY\tJOB\tserials\tfirst_serial\t\r2\ta.yaml\tX-##\t7\r2\tb.yaml\tY-1,Y-2\r',
      csvText([
        ['job', 'quantity', 'serials', 'first-serial'],
        ['a.yaml', 2, 'X-##', 7],
        ['b.yaml', null, 'Y-1 Y-2', null],
      ]),
    ])
      expect(strip(text)).toEqual(plain.map(({ place: _, ...rest }) => rest));
  });

  test('from standard input is known by its header', () => {
    expect(readLotFile('job;quantity\na.yaml;2\n', '-')).toMatchObject({
      name: 'Lot',
      entries: [{ readFrom: 'a.yaml' }],
    });
    expect(looksLikeOrders('quantity,job\n')).toBe(true);
    for (const text of [
      '',
      'job\n',
      'coils: [{ job: a, quantity: 3 }]',
      'job: x\nquantity,job',
      '{ "coils": "job,quantity" }',
    ])
      expect([text, looksLikeOrders(text)]).toEqual([text, false]);
  });

  test('any quantities give as many coils, rows on their lines', () => {
    let coils = 0;
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 40 }), { minLength: 1, maxLength: 20 }), (quantities) => {
        const { entries } = read(
          csvText([['job', 'quantity'], ...quantities.map((one, i) => [`j${i % 3}.yaml`, one])]),
        );
        expect(entries.map(({ quantity }) => quantity)).toEqual(quantities);
        expect(entries.map(({ place }) => place.line)).toEqual(quantities.map((_, i) => i + 2));
        const serials = entries.flatMap((one) => one.serials);
        expect(new Set(serials).size).toBe(quantities.reduce((a, b) => a + b, 0));
        coils += serials.length;
      }),
      { seed: 31, numRuns: 100 },
    );
    console.log(`coils ordered by tables: ${coils}`);
    expect(coils).toBeGreaterThan(5000);
  });
});

const CASES: readonly (readonly [string, readonly string[]])[] = [
  ['', ['1 -: an empty file; write as the first line: job,quantity']],
  ['job,quantity\n', ['1 -: a table without rows; write below the header, for example: low-bench-receiver.yaml,12']],
  ['job,qty\na,1', ['1 qty: a column that is not known; did you mean quantity?']],
  [
    'job,quantty,note\na,1,x',
    [
      '1 quantty: a column that is not known; did you mean quantity?',
      '1 note: a column that is not known; remove the column',
    ],
  ],
  ['job,serials\na,X#', ['1 -: a header without quantity; write as the first line: job,quantity']],
  ['job,job,quantity\na,a,1', ['1 job: a column that was there before; remove one of the two']],
  ['job,quantity\na.yaml,"1,000"', ['2 quantity: "1,000"; write digits alone']],
  [
    'job,quantity\na.yaml,0\nb.yaml,10001\n,3',
    [
      '2 quantity: "0"; write a number within these limits',
      '3 quantity: "10001"; write a number within these limits',
      '4 job: nothing; write the name of the file',
    ],
  ],
  ['job,quantity\n-,2', ['2 job: standard input; put it into a file and name that']],
  [
    'job,quantity\na.yaml,2,\nb.yaml,2,x\n',
    ['3 -: "x" in column 3, of a table of 2; remove it, or put quotes around a cell that holds the sign between cells'],
  ],
  [
    'job;quantity\n"a.yaml;2\n',
    ['2 -: a quote that is never closed; close the quote, or write a quote inside quotes twice'],
  ],
  ['job,quantity,serials\na,2,X-1\n', ['2 serials: 1 serial for 2 coils; write quantity: 1, or mend the list']],
  [
    'job,quantity,serials\na,1,X-1\nb,1,x-1\n',
    ['3 serials: the serial "x-1" a second time, after line 2; change one of the two'],
  ],
  ['job,quantity\na,6000\nb,6000\n', ['2 -: 12000 coils in one lot; take 2000 out, or make two lots']],
];

describe('a table is refused', () => {
  test.each(CASES)('%j', (text, expected) => {
    expect(refused(text)).toEqual(expected);
  });
});
