/** Serials: whatever the patterns and quantities, each coil has its own, in order; what cannot be is told. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberLot, readNumbering, readPattern } from '../../src/job/lot/serials.ts';

const letters = fc.string({ unit: fc.constantFrom('A', 'b', 'Z', '-', '.', '_', '4'), maxLength: 5 });
const pattern = fc
  .tuple(letters, fc.integer({ min: 2, max: 6 }), letters)
  .map(([before, width, after]) => `K${before}${'#'.repeat(width)}${after}x`);
const entry = fc.record({
  quantity: fc.integer({ min: 1, max: 30 }),
  numbering: fc.option(pattern.map((one) => ({ pattern: one }))),
  first: fc.option(fc.integer({ min: 0, max: 400 }), { freq: 1 }),
});

describe('numbers', () => {
  test('run on through the lot: distinct, in order, as many as asked, or it is refused', () => {
    let [lots, coils, refused] = [0, 0, 0];
    fc.assert(
      fc.property(
        fc.array(entry, { minLength: 1, maxLength: 6 }),
        fc.option(pattern),
        fc.nat(90),
        (asked, common, first) => {
          lots++;
          const { serials, faults } = numberLot(asked, common, first, 'Harbour stock');
          if (faults.length > 0) {
            refused++;
            // Numbers that only run on can want for digits and for nothing else.
            if (asked.every((one) => one.first === null && one.numbering === null))
              expect(new Set(faults.map(({ code }) => code))).toEqual(new Set(['serial-digits']));
            return;
          }
          const all = serials.flat();
          expect(serials.map(({ length }) => length)).toEqual(asked.map(({ quantity }) => quantity));
          expect(new Set(all.map((one) => one.toLowerCase())).size).toBe(all.length);
          serials.forEach((list, at) => {
            const { numbering, first: own } = asked[at]!;
            const of = numbering?.pattern ?? common ?? `HS-${'#'.repeat(3)}`;
            const cut = of.indexOf('#');
            const width = of.lastIndexOf('#') - cut + 1;
            const numbers = list.map((one) => Number(one.slice(cut, one.length - (of.length - cut - width))));
            numbers.forEach((number, i) => {
              expect(number).toBe(numbers[0]! + i);
            });
            if (own !== null) expect(numbers[0]).toBe(own);
          });
          coils += all.length;
        },
      ),
      { seed: 4021, numRuns: 300 },
    );
    console.log(`lots numbered: ${lots}, coils ${coils}, refused ${refused}`);
    expect(coils).toBeGreaterThan(8000);
    expect(refused).toBeGreaterThan(10);
  });

  test('of entries that share a pattern follow one another, whatever is between', () => {
    const of = (pattern: string | null, quantity: number, first: number | null = null) => ({
      quantity,
      numbering: pattern === null ? null : { pattern },
      first,
    });
    const { serials, faults } = numberLot(
      [of(null, 2), of('X-#', 1), of('HS-##', 1), of('x-#', 1), of(null, 1, 40), of(null, 1)],
      'HS-##',
      5,
      'n',
    );
    expect(faults).toEqual([]);
    expect(serials).toEqual([['HS-05', 'HS-06'], ['X-5'], ['HS-07'], ['x-6'], ['HS-40'], ['HS-41']]);
  });

  test('without a pattern: initials of the lot and # enough, three at least', () => {
    const of = (quantity: number, name: string, first = 1) =>
      numberLot([{ quantity, numbering: null, first: null }], null, first, name).serials[0]!;
    expect(of(12, 'Harbour stock').at(-1)).toBe('HS-012');
    expect(of(1000, 'Émile’s old spare coil set')[0]).toBe('ESOS-0001');
    expect(of(999, 'orders').at(-1)).toBe('O-999');
    expect(of(1, '40 of 7')[0]).toBe('4O7-001');
    expect(of(1, '7 40')[0]).toBe('C74-001');
    expect(of(2, '線輪')[0]).toMatch(/^J[0-9A-F]-001$/i);
  });
});

describe('what is refused', () => {
  const asked = (quantity: number, numbering: unknown = null, first: number | null = null) => {
    const read = numbering === null ? null : readNumbering(numbering);
    if (read !== null && !read.ok) throw new Error(read.got);
    return { quantity, numbering: read?.value ?? null, first };
  };
  const faults = (...list: ReturnType<typeof asked>[]) =>
    numberLot(list, 'HS-##', 1, 'n').faults.map(
      ({ code, at, key, got, todo }) => `${at} ${key} ${code}: ${got}; ${todo}`,
    );

  test('too few digits, with the pattern that would do', () => {
    expect(faults(asked(60), asked(60))).toEqual([
      '1 quantity serial-digits: numbers up to 120 for the pattern HS-##; write serials: HS-###',
    ]);
    expect(faults(asked(3, 'X#', 8))).toEqual([
      '0 serials serial-digits: numbers up to 10 for the pattern X#; write serials: X##',
    ]);
  });

  test('a serial twice, in one list, in two, or by a number that goes back', () => {
    expect(faults(asked(2, ['A-1', 'a-1']), asked(1, ['A-1']), asked(4), asked(2, null, 3))).toEqual([
      '0 serials serial-twice: the serial "a-1" a second time; change one of the two',
      '1 serials serial-twice: the serial "A-1" a second time; change one of the two',
      '3 first-serial serial-twice: the serial "HS-03" a second time; leave first-serial out: numbers run on by themselves',
    ]);
  });

  test('a list of another length than the quantity, or with a first number', () => {
    expect(faults(asked(3, 'A-1 A-2'), asked(1, ['B-1'], 4)).map((line) => line.replace(/;.*/, ''))).toEqual([
      '0 serials serial-count: 2 serials for 3 coils',
      '1 first-serial not-used: a first serial for coils whose serials are listed',
    ]);
  });

  test('text that is no serial: signs, length, what a spreadsheet takes for a number', () => {
    const bad = [
      'a b c/',
      'Ä-1',
      '-A',
      'A-',
      'A/B',
      '12',
      '1e5',
      '0x1f',
      '=A1',
      '',
      'A\n',
      'A'.repeat(41),
      '＝A',
      '../x',
    ];
    for (const one of bad) expect([one, readNumbering([one]).ok]).toEqual([one, false]);
    for (const one of ['A', 'HS-001', '24-001', 'a.b_c-9', '1E5A', 'A'.repeat(40)])
      expect([one, readNumbering([one])]).toEqual([one, { ok: true, value: { list: [one] } }]);
    for (const one of [
      '###',
      'A#B#',
      'A ##',
      'A-##/',
      `A${'#'.repeat(10)}`,
      'HS-',
      '',
      7,
      null,
      `${'A'.repeat(38)}###`,
    ])
      expect([one, readPattern(one).ok]).toEqual([one, false]);
    expect(readPattern('HS')).toMatchObject({ got: '"HS", without #', todo: expect.stringContaining('write HS-###;') });
    expect(readPattern('###')).toMatchObject({ got: 'the serial "###", which a spreadsheet takes for a number' });
    let ran = 0;
    fc.assert(
      fc.property(fc.anything(), (raw) => {
        ran++;
        const read = readNumbering(raw);
        if (!read.ok) expect([read.got, read.expected, read.todo].every((part) => part.length > 0)).toBe(true);
      }),
      { seed: 5, numRuns: 300 },
    );
    expect(ran).toBe(300);
  });
});
