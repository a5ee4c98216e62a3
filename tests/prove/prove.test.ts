/** The verb from file to folder: records found, notes told, sheets written, faults with their exit codes. */
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { csvText } from '../../src/csv/write.ts';
import { recordOf } from '../../src/plan.ts';
import { type ProofCoil, type ProofRecord, proofSchema } from '../../src/prove/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutProofSheet, proofFrame } from '../../src/sheets/proof-sheet.ts';
import { command, testTerminal } from '../cli/terminal.ts';
import { jobOf } from '../helpers/jobs.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { asPlanned, readingsOf } from '../helpers/proved.ts';

const RECORD = recordOf(
  jobOf({
    want: { inductance: '10 uH to 80 uH', taps: 3 },
    former: { kind: 'tube', 'outside-diameter': '40 mm' },
    wire: ['0.5 mm enamel'],
  }),
  '9.9.9',
);

const HEAD = ['record', 'serial', 'tap', 'quantity', 'condition', 'value', 'unit', 'remark'];
const GOOD = readingsOf(RECORD, asPlanned(RECORD)).readings;

/** Ten coils, the third two turns too long, the fourth with a hole, the fifth a thousand times too much. */
function rows(): (string | number | null)[][] {
  const long = asPlanned(RECORD);
  const turns = long.turns + 2;
  const spoilt = readingsOf(RECORD, { ...long, turns, taps: long.taps.with(-1, turns) }).readings;
  const all: (string | number | null)[][] = [];
  for (let i = 1; i <= 10; i++)
    for (const { tap, value } of i === 3 ? spoilt : GOOD) {
      const off = value * (1 + 0.0005 * ((i * 7 + tap! * 3) % 5));
      const written = i === 4 && tap === 2 ? null : i === 5 && tap === 1 ? 1000 * off : Number(off.toPrecision(5));
      all.push([RECORD.hash, `K-${i}`, tap, 'inductance', '', written, 'uH', tap === 1 ? '=1+2' : '']);
    }
  return all;
}

function shop(text: string) {
  const terminal = testTerminal();
  const folder = join(terminal.folder, 'out', 'test-coil');
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, 'plan.json'), JSON.stringify(RECORD));
  writeFileSync(join(terminal.folder, 'Week 9.csv'), text);
  return terminal;
}

describe('prove', () => {
  it('judges a file and writes proof, sheet and charts, the same bytes again', async () => {
    const all = [...rows(), [RECORD.hash, 'K-1', 9, 'inductance', '', 5, 'uH', '']];
    const terminal = shop(csvText([HEAD, ...all]));
    const first = await command(['prove', 'Week 9.csv'], terminal);
    expect(first).toMatchObject({ exit: 0 });
    expect(first.err).toContain('line 32, tap');
    expect(first.out).toContain('K-3: can be saved: yes. Reads like 2 turns too many');
    const folder = join(terminal.folder, 'out', 'week-9-proof');
    const bytes = () =>
      readdirSync(folder)
        .sort()
        .map((name) => [name, existsSync(join(folder, name)) ? readFileSync(join(folder, name), 'latin1') : '']);
    const proof = proofSchema.parse(JSON.parse(readFileSync(join(folder, 'proof.json'), 'utf8')));
    expect(proof.tally).toEqual({ coils: 10, pass: 7, fail: 1, missing: 2 });
    expect(proof.count).toEqual({ figures: 31, readings: 29, dial: 0, missing: 1, leftOut: 1 });
    expect(proof.kinds[0]!.charts.length).toBeGreaterThan(0);
    // The reading that is not of its coil stands on no chart.
    const tapOne = proof.kinds[0]!.charts.find(({ key }) => key === 'uh-1')!;
    expect(tapOne.points.map(({ serial }) => serial)).not.toContain('K-5');
    const before = bytes();
    expect((await command(['prove', 'Week 9.csv'], terminal)).exit).toBe(0);
    expect(bytes()).toEqual(before);
    const pdf = await readPdf(readFileSync(join(folder, 'proof-sheet.pdf')));
    expect(pdf.pages.length).toBeGreaterThan(0);
  });

  it('prints the record and nothing else with --json, reads standard input, takes --from', async () => {
    const text = csvText([
      HEAD.slice(1),
      ...rows()
        .slice(0, 3)
        .map((row) => row.slice(1)),
    ]);
    const terminal = { ...shop(''), input: async () => Buffer.from(text) };
    const made = await command(['prove', '-', '--json', '--from', 'out/test-coil', '--out', 'p'], terminal);
    expect(made.exit).toBe(0);
    expect(proofSchema.parse(JSON.parse(made.out)).tally.coils).toBe(1);
    expect(existsSync(join(terminal.folder, 'p', 'proof-sheet.pdf'))).toBe(true);
  });

  it.each<[string, string, readonly string[], number, string]>([
    ['no file', '', ['prove', 'none.csv'], 3, 'no file of this name'],
    ['no argument', '', ['prove'], 2, 'coilwright'],
    [
      'no records',
      'serial;tap;uH\n1;1;5',
      ['prove', 'Week 9.csv', '--from', 'nowhere'],
      3,
      'no record of a coil in nowhere',
    ],
    ['a record that is not there', 'record;tap;uH\n0011223344;1;5', ['prove', 'Week 9.csv'], 3, 'record 0011223344'],
    ['nothing read', 'serial;tap;uH\n1;1;', ['prove', 'Week 9.csv'], 3, 'all of them blank'],
    ['no dial', 'serial;tap;uH\n1;1;10', ['prove', 'Week 9.csv', '--dial', '120 mm'], 3, 'no reading of a dial'],
    ['a dial that is none', 'serial;tap;uH\n1;1;10', ['prove', 'Week 9.csv', '--dial', 'big'], 2, '"big"'],
    ['a workbook', 'PK\u0003\u0004\u0000\u0000', ['prove', 'Week 9.csv'], 3, 'bytes that are no text'],
  ])('refuses %s, and writes nothing', async (_what, text, given, exit, said) => {
    const terminal = shop(text);
    const made = await command(given, terminal);
    expect(made.exit).toBe(exit);
    expect(made.out).toBe('');
    expect(made.err.replace(/\s+/g, ' ')).toContain(said);
    expect(readdirSync(join(terminal.folder, 'out'))).toEqual(['test-coil']);
  });

  it('reads what spreadsheets write besides UTF-8', async () => {
    const text = 'serial;tap;value;unit\nK-1;1;10,5;µH\n';
    const terminal = shop('');
    for (const [bytes, told] of [
      [Buffer.from(`\ufeff${text}`, 'utf16le'), ''],
      [Buffer.from(text, 'latin1'), 'windows-1252'],
    ] as const) {
      writeFileSync(join(terminal.folder, 'Week 9.csv'), bytes);
      const made = await command(['prove', 'Week 9.csv', '--json'], terminal);
      expect(made.exit).toBe(0);
      expect(JSON.parse(made.out).count.readings).toBe(1);
      if (told !== '') expect(made.err).toContain(told);
    }
  });
});

/** A proof of any size, from one that was made. */
function proofOf(record: ProofRecord, { taps, coils, kinds, paper, notes }: Size): ProofRecord {
  const [kind] = record.kinds;
  const failing = kind!.coils.find(({ rescue }) => rescue !== null)!;
  const states = ['pass', 'fail', 'missing'] as const;
  const coil = (i: number): ProofCoil => ({
    ...failing,
    serial: i % 9 === 0 ? 'Saltmarsh set 12, spare for the long wave '.repeat(2) : `K-${i}`,
    state: states[i % 3]!,
    rescue: i % 3 === 1 ? failing.rescue : null,
    remarks: i % 7 === 0 ? ['wound on the old stand; '.repeat(8)] : [],
    taps: Array.from({ length: taps }, (_, t) => ({ ...failing.taps[t % 3]!, tap: t + 1, again: (i + t) % 5 === 0 })),
  });
  const note = {
    line: 7,
    column: 'value',
    code: 'x',
    fate: 'left out' as const,
    figures: 1,
    got: '"a b c"',
    expected: 'a figure',
    todo: 'write one',
  };
  return {
    ...record,
    paper,
    kinds: Array.from({ length: kinds }, (_, k) => ({
      ...kind!,
      job: `Kind ${k}`,
      taps,
      coils: Array.from({ length: coils }, (_each, i) => coil(i)),
    })),
    notes: Array.from({ length: notes }, () => note),
  };
}

interface Size {
  readonly taps: number;
  readonly coils: number;
  readonly kinds: number;
  readonly paper: 'A4' | 'Letter';
  readonly notes: number;
}

describe('proof sheet, laid out', () => {
  const measure = new Paper({ title: 'measure', subject: 'measure' });
  const made = (async () => {
    const terminal = shop(csvText([HEAD, ...rows()]));
    const { out } = await command(['prove', 'Week 9.csv', '--json'], terminal);
    return proofSchema.parse(JSON.parse(out));
  })();

  it('no text over another, none outside, none below 8 pt, whatever the proof', async () => {
    const record = await made;
    let cases = 0;
    fc.assert(
      fc.property(
        fc.record({
          taps: fc.integer({ min: 1, max: 60 }),
          coils: fc.integer({ min: 1, max: 50 }),
          kinds: fc.integer({ min: 1, max: 3 }),
          paper: fc.constantFrom('A4' as const, 'Letter' as const),
          notes: fc.nat(130),
        }),
        (size) => {
          const pages = layOutProofSheet(proofOf(record, size), measure);
          expect(layoutFaults(pages, proofFrame, measure)).toEqual([]);
          const marked = pages.flatMap(({ shapes }) =>
            shapes.filter((one) => one.shape === 'text' && /^[PFR–]$/.test(one.text)),
          );
          // Every coil and every tap has its mark, in bold where the taps are parted over tables.
          expect(marked.length).toBeGreaterThanOrEqual(size.kinds * size.coils * (size.taps + 1));
          cases++;
        },
      ),
      { seed: 11, numRuns: 6 },
    );
    console.log(`proof sheet: ${cases} layouts`);
    expect(cases).toBe(6);
  });

  it('takes time in proportion to the coils', async () => {
    const record = await made;
    const time = (coils: number) => {
      const big = proofOf(record, { taps: 12, coils, kinds: 1, paper: 'A4', notes: 0 });
      const begun = performance.now();
      layOutProofSheet(big, measure);
      return performance.now() - begun;
    };
    time(100);
    const ratio = time(800) / time(200);
    console.log(`proof sheet: 800 coils take ${ratio.toFixed(1)} times as long as 200`);
    // Four by proportion, sixteen by the square; other programs run beside.
    expect(ratio).toBeLessThan(10);
  });
});
