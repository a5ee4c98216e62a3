/** Files of readings as people hand them in: found, told, and nothing lost. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { judge, questionsOf } from '../../src/bench/judge.ts';
import { rowOf, toCsv } from '../../src/bench/readings-csv.ts';
import { Fault } from '../../src/fault.ts';
import { readingsSheet } from '../../src/lot/readings-sheet.ts';
import type { LotRecord } from '../../src/lot/schema.ts';
import { type ReadOptions, readReadings } from '../../src/prove/read.ts';
import type { ReadingsFile } from '../../src/prove/types.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';

const RECORD: CoilRecord = { ...sampleRecord(), hash: 'a1b2c3d4e5f6'.padEnd(64, '0') };
const OTHER: CoilRecord = { ...sampleRecord({ turns: [10, 20] }), hash: 'ffeeddccbbaa'.padEnd(64, '9') };
const ONE = new Map([[RECORD.hash, RECORD]]);
const TWO = new Map([...ONE, [OTHER.hash, OTHER]]);

const LOT = {
  lot: 'Kettle Ridge 7',
  kinds: [
    { kind: 'A', hash: RECORD.hash },
    { kind: 'B', hash: OTHER.hash },
  ],
  coils: [
    { serial: 'KR-0001', kind: 'A' },
    { serial: 'KR-0002', kind: 'A' },
    { serial: 'KR-0003', kind: 'B' },
  ],
} as unknown as LotRecord;

const read = (text: string, records = ONE, options: ReadOptions = {}) => readReadings(text, 'r.csv', records, options);

function faultOf(act: () => unknown): Fault {
  try {
    act();
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  throw new Error('no fault');
}

/** Serial, tap, quantity, value and condition of every reading. */
const seen = ({ kinds }: ReadingsFile) =>
  kinds.flatMap(({ coils }) =>
    coils.flatMap(({ serial, readings }) =>
      readings.map((one) => {
        const condition = one.capacitancePf ?? one.frequencyKhz ?? one.celsius;
        return `${serial} ${one.tap ?? one.key} ${one.quantity} ${one.value}${condition === null ? '' : ` @${condition}`}`;
      }),
    ),
  );
const codes = ({ notes }: ReadingsFile) => notes.map(({ line, code, fate }) => `${line} ${code} ${fate}`);

const HEAD = 'record,serial,tap,quantity,condition,value,unit,low,high,verdict,remark';

describe('a file of readings', () => {
  it('takes what the bench page writes, question by question', () => {
    const questions = questionsOf(RECORD).filter(({ nominal }) => nominal !== null);
    const rows = questions.map((question) => {
      const value = question.nominal!;
      return rowOf(RECORD, question, value, judge(RECORD, question, value), { serial: '7', remark: '=1+1' });
    });
    const file = read(toCsv(rows));
    expect(file.notes).toEqual([]);
    const { readings } = file.kinds[0]!.coils[0]!;
    expect(readings.map(({ value }) => value)).toEqual(questions.map(({ nominal }) => nominal));
    expect(readings.map(({ key }) => key)).toEqual(questions.map(({ key }) => key));
    expect(readings.map(({ tap }) => tap)).toEqual(questions.map(({ tap }) => tap));
    // The guard of the file is taken off.
    expect(readings.every(({ remark }) => remark === '=1+1')).toBe(true);
    console.log(`bench page: ${questions.length} questions read back`);
    expect(questions.length).toBeGreaterThan(10);
  });

  const same = [
    '1 1 inductance 20.5 @1000',
    '1 2 resonance 1830 @100',
    '1 former diameter 60.1',
    '1 5 resistance 2.5 @23',
  ];
  const rows = (point: string, s: string) =>
    [
      ['serial', 'tap', 'quantity', 'condition', 'value', 'unit'],
      ['1', '1', 'inductance', '1 MHz', `20${point}5`, 'uH'],
      ['1', '2', 'resonance', '100 pF', `1${point}83`, 'MHz'],
      ['1', '', 'diameter former', '', `60${point}1`, 'mm'],
      ['1', 'whole', 'resistance', `23${point}0 °C`, `2${point}5`, 'Ω'],
    ].map((row) => row.join(s));
  it.each([
    ['commas and points', rows('.', ',').join('\n')],
    ['semicolons, decimal commas, CRLF', rows(',', ';').join('\r\n')],
    ['tabs, a mark at the start', `\ufeff${rows(',', '\t').join('\r')}\r`],
    ['empty lines and rows of separators', `\n${rows('.', ';').join('\n\n')}\n;;;;;\n`],
    [
      'other titles, another order, units in the cells',
      'Value;Coil;With;Position;What\n20,5 uH;1;1000 kHz;tap 1;L\n1,83MHz;1;100pF;2;resonant frequency\n60,1 mm;1;;;former\n2,5 Ohm;1;23 degC;5;R',
    ],
    [
      'a row a coil',
      'serial;tap 1 (uH) 1 MHz;tap 2 100 pF (MHz);former mm;R whole (ohm) 23 degC\n1;20,5;1,83;60,1;2,5',
    ],
    [
      'capacitor and temperature in columns',
      'serial;tap;meter (kHz);capacitor (pF);temperature (degC);quantity;reading;unit\n1;1;1000;;;inductance;20,5;uH\n1;2;;100;;resonance;1830;kHz\n1;;;;;former;60.1;mm\n1;5;;;23;resistance;2500;mOhm',
    ],
  ])('reads %s', (_name, text) => {
    const file = read(text);
    expect(file.notes).toEqual([]);
    expect(seen(file)).toEqual(same);
  });

  it('takes turns, lengths, 20 turns and the dial', () => {
    const file = read(
      'serial;tap;quantity;condition;value;unit\n1;2;turns;;20,5;\n1;;turns-20;;24,1;mm\n1;3;length wound;;1 1/2 in;\n1;1;dial;30 deg;1,7;MHz\n1;1;dial;;1,7;MHz',
    );
    expect(seen(file)).toEqual(['1 2 turns 20.5', '1 turns-20 length 24.1', '1 3 length 38.1']);
    expect(file.kinds[0]!.coils[0]!.dial).toEqual([{ line: 5, tap: 1, degrees: 30, frequencyKhz: 1700 }]);
    expect(codes(file)).toEqual(['6 no-degrees left out']);
  });

  it('names the line, the column, what was got and what was expected of what it cannot read', () => {
    const file = read(
      `serial;tap;quantity;condition;value;unit;remark
1;1;inductance;;20,5;uH;
1;2;inductance;;abc;uH;hm
1;9;inductance;;30;uH;
1;3;inductance;;40;furlong;
1;3;inductance;;40;;
1;3;inductance;;-40;uH;
1;3;resonance;;900;kHz;
1;98.2;inductance;;3;uH;
1;3;hue;;4;uH;
1;3;inductance;;;uH;not yet
1;4;resistance;cold;2;ohm;
1;5;inductance;;90;uH;;;90`,
    );
    expect(codes(file)).toEqual([
      '3 no-number left out',
      '4 tap-unknown left out',
      '5 unit-unknown left out',
      '6 figure-refused left out',
      '7 figure-refused left out',
      '8 no-capacitor left out',
      '9 swapped left out',
      '10 quantity-unknown left out',
      '12 condition-unknown kept',
      '13 too-many-cells left out',
    ]);
    expect(file.count).toEqual({ figures: 12, readings: 2, dial: 0, missing: 1, leftOut: 9 });
    expect(file.kinds[0]!.coils[0]!.remarks).toEqual(['not yet']);
    expect(file.notes[0]).toMatchObject({ column: 'value', got: '"abc", which has no number in front' });
  });

  it('lets the last of several lines count and names the others', () => {
    const file = read('serial;tap;uH at 1 MHz\n1;1;20\n1;1;21\n2;1;20\n1;1;20,5');
    expect(seen(file)).toEqual(['2 1 inductance 20 @1000', '1 1 inductance 20.5 @1000'].sort());
    expect(codes(file)).toEqual(['2 measured-again left out', '3 measured-again left out']);
    expect(file.notes[0]!.todo).toContain('line 5 counts');
  });

  it('tells limits in the place of readings', () => {
    const question = questionsOf(RECORD).find(({ key }) => key === 'uh-2')!;
    const { low, high, nominal } = question;
    const row = `${RECORD.hash},1,2,inductance,,${nominal},uH,${low},${high},,`;
    const swapped = read(
      `${HEAD.replace('value', 'x').replace('low', 'value').replace('x', 'low')}\n${row}\n${row.replace('1,2,', '1,1,').replace(`${low}`, '20')}`,
    );
    expect(codes(swapped)).toEqual(['2 swapped left out']);
    expect(seen(read(`${HEAD}\n${row}`))).toHaveLength(1);
  });

  it('finds the record by its hash, a piece of it, or the serial of a lot', () => {
    const lots = { lots: [LOT] };
    const file = read(
      `record;serial;tap;uH
${RECORD.hash};KR-0001;1;20
a1b2c3d4;kr-2;1;20
;KR-0003;1;20
;KR-0099;1;20
;;1;20
a1b2;KR-0001;2;20
${RECORD.hash};KR-0003;2;20
${RECORD.hash};X9;1;20`,
      TWO,
      lots,
    );
    expect(
      file.kinds.map(({ record, coils }) => [record.hash.slice(0, 4), ...coils.map(({ serial }) => serial)]),
    ).toEqual([
      ['a1b2', 'KR-0001', 'KR-0002', 'X9'],
      ['ffee', 'KR-0003'],
    ]);
    expect(codes(file)).toEqual([
      '3 serial-read-as kept',
      '5 foreign-serial left out',
      '6 no-serial left out',
      '7 no-hash left out',
      '8 other-kind left out',
      '9 foreign-serial kept',
    ]);
  });

  it('takes the readings sheet of a lot once it is filled in, and tells when it is not', () => {
    const kinds = new Map([
      ['A', RECORD],
      ['B', OTHER],
    ]);
    const blank = readingsSheet(LOT, kinds);
    expect(faultOf(() => read(blank, TWO, { lots: [LOT] })).faults[0]!.code).toBe('no-readings');
    const [head, ...lines] = blank.trim().split('\r\n');
    const value = head!.split(',').indexOf('value');
    const filled = lines.map((line) => {
      const cells = line.split(',');
      const [low, high] = [cells[value + 2]!, cells[value + 3]!];
      return cells.with(value, low === '' ? '' : `${(Number(low) + Number(high)) / 2}`).join(',');
    });
    const file = read([head, ...filled].join('\r\n'), TWO, { lots: [LOT] });
    const asked = [RECORD, RECORD, OTHER].reduce((sum, record) => sum + questionsOf(record).length, 0);
    expect(file.notes).toEqual([]);
    expect(file.count).toMatchObject({ figures: asked, readings: asked - file.count.missing, leftOut: 0 });
    expect(file.kinds.map(({ coils }) => coils.map(({ serial }) => serial))).toEqual([
      ['KR-0001', 'KR-0002'],
      ['KR-0003'],
    ]);
    console.log(`readings sheet: ${file.count.readings} of ${asked} rows filled in`);
    expect(file.count.readings).toBeGreaterThan(40);
  });

  it('names records that are not there, whose they are, and where it looked', () => {
    const fault = faultOf(() =>
      read('record;serial;tap;uH\n0123456789;7;1;20\n0123456789;8;1;20', ONE, { searched: 'out' }),
    );
    expect(fault.exit).toBe(3);
    expect(fault.faults[0]).toMatchObject({ code: 'record-not-found', place: { line: 2 } });
    expect(fault.faults[0]!.got).toBe('record 0123456789, for "7", "8", which is not in out');
  });

  it('refuses what holds no reading at all', () => {
    expect(faultOf(() => read('')).faults[0]!.code).toBe('no-readings-column');
    expect(faultOf(() => read('a;b\n1;2')).faults[0]!.code).toBe('no-readings-column');
    expect(faultOf(() => read('serial;tap;uH\n')).faults[0]!.code).toBe('no-readings');
    expect(faultOf(() => read('serial;tap;uH\n1;1;')).faults[0]!.code).toBe('no-readings');
    expect(faultOf(() => read('serial;tap;uH\n1;1;x\n1;2;y')).faults.map(({ place }) => place?.line)).toEqual([2, 3]);
  });

  it('tells of columns that it passes over', () => {
    const file = read('serial;tap;uH;colour;tap\n1;1;20;red;2');
    expect(codes(file)).toEqual(['1 column-unknown kept', '1 column-twice kept']);
    expect(file.notes[0]!.got).toBe('"colour", 1 cells filled in');
  });
});

describe('whatever the file', () => {
  const junk = fc.oneof(
    fc.constantFrom('', '-', 'abc', '=1+1', "'", '1,2,3', '1e999', '-5', '98.2'),
    fc.string({ maxLength: 8 }),
  );
  const mostly = (...cells: string[]) =>
    fc.oneof({ weight: 5, arbitrary: fc.constantFrom(...cells) }, { weight: 1, arbitrary: junk });
  const CELLS: Readonly<Record<string, fc.Arbitrary<string>>> = {
    record: mostly('', '', RECORD.hash, 'a1b2c3d4e5', 'ffeeddcc'),
    serial: mostly('KR-0001', 'kr-2', 'KR-0003', '7'),
    tap: mostly('1', '2', 'tap 2', 'whole', '9'),
    quantity: mostly('inductance', 'resonance', 'turns', 'length', 'former', 'dial', 'resistance', ''),
    condition: mostly('', '100 pF', '30 deg', '23 degC', '100 kHz'),
    value: mostly('20,5', '20.5', '', '98.2 uH', '1 000', '1.83 MHz', '60 mm'),
    unit: mostly('uH', 'kHz', 'mm', '', 'ohm'),
    'tap 1 (uH)': mostly('20', '21,5', ''),
    'tap 2 100 pF (kHz)': mostly('1830', ''),
    'dial tap 1 30 deg (kHz)': mostly('900', ''),
    low: mostly('19', ''),
    remark: mostly('', 'loose', '@x'),
  };
  const table = fc.shuffledSubarray(Object.keys(CELLS), { minLength: 3 }).chain((titles) =>
    fc.record({
      titles: fc.constant(titles),
      body: fc.array(fc.tuple(fc.tuple(...titles.map((title) => CELLS[title]!)), fc.array(junk, { maxLength: 1 })), {
        maxLength: 12,
      }),
    }),
  );

  it('every figure ends in one place, and nothing but a Fault is thrown', () => {
    const seenCases = { read: 0, refused: 0 };
    const total = { figures: 0, readings: 0, dial: 0, missing: 0, leftOut: 0 };
    fc.assert(
      fc.property(fc.constantFrom(',', ';', '\t'), table, fc.boolean(), (separator, { titles, body }, withLots) => {
        const rows = body.map(([cells, more]) => [...cells, ...(more[0]?.startsWith('-') ? more : [])]);
        const text = [titles, ...rows].map((row) => row.join(separator)).join('\n');
        try {
          const { count, notes, kinds } = read(text, TWO, withLots ? { lots: [LOT] } : {});
          const all = kinds.flatMap(({ coils }) => coils);
          expect(count.readings).toBe(all.reduce((sum, { readings }) => sum + readings.length, 0));
          expect(count.dial).toBe(all.reduce((sum, { dial }) => sum + dial.length, 0));
          expect(count.leftOut).toBe(notes.reduce((sum, note) => sum + note.figures, 0));
          expect(count.readings + count.dial + count.missing + count.leftOut).toBe(count.figures);
          for (const key of Object.keys(total) as (keyof typeof total)[]) total[key] += count[key];
          seenCases.read++;
        } catch (error) {
          if (!(error instanceof Fault)) throw error;
          expect(error.exit).toBe(3);
          expect(error.faults.length).toBeGreaterThan(0);
          seenCases.refused++;
        }
      }),
      { seed: 7, numRuns: 1500 },
    );
    console.log(`readings files: ${JSON.stringify(seenCases)}, ${JSON.stringify(total)}`);
    expect(seenCases.read).toBeGreaterThan(200);
    for (const some of Object.values(total)) expect(some).toBeGreaterThan(100);
  });

  it('bytes of any kind are read or refused', () => {
    let cases = 0;
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 200 }), (text) => {
        cases++;
        try {
          read(text);
        } catch (error) {
          if (!(error instanceof Fault)) throw error;
        }
      }),
      { seed: 3, numRuns: 400 },
    );
    console.log(`${cases} texts of any kind`);
    expect(cases).toBe(400);
  });
});
