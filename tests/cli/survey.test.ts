import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { inAscii } from '../../cli/page.ts';
import { rangeChart } from '../../cli/show-ranges.ts';
import { isAscii } from '../../cli/terminal.ts';
import { surveyRecordSchema } from '../../src/record/survey-schema.ts';
import { COILS } from '../../templates/coils/coils.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { command, testTerminal } from './terminal.ts';

const COIL = `name: Short coil
coil: { former-diameter: 50 mm, wire: 0.5 mm enamel, turns: 30, pitch: 0.6 mm, taps: [10, 20] }
set: { capacitor: 15 pF to 380 pF }
band: 1 MHz to 6 MHz
`;

describe('survey', () => {
  it('shows the figures of every position and writes nothing', async () => {
    const { exit, out, err, folder } = await command(['survey', '-'], testTerminal(COIL));
    expect([exit, err]).toEqual([0, '']);
    expect(readdirSync(folder)).toEqual([]);
    for (const wanted of [
      'Short coil',
      'The coil',
      'Positions',
      'Ranges',
      'What they tune',
      'Switch kinds',
      '95 % limits',
    ])
      expect(out).toContain(wanted);
    const record = JSON.parse((await command(['survey', '-', '--json'], testTerminal(COIL))).out);
    const rows = out.split('\n').map((line) => line.trim().split(/\s+/));
    let compared = 0;
    for (const tap of record.windings[0].taps) {
      const row = rows.find((cells) => cells[0] === `${tap.tap}` && cells[1] === `${tap.turn}`)!;
      expect(Math.abs(Number(row[2]) / tap.inductanceUh - 1)).toBeLessThan(1e-3);
      const range = rows.find(
        (cells) => cells[0] === `${tap.tap}` && Math.abs(Number(cells[1]) / tap.range.lowKhz - 1) < 1e-3,
      )!;
      expect(Math.abs(Number(range[3]) / tap.range.highKhz - 1)).toBeLessThan(1e-3);
      compared++;
    }
    expect(compared).toBe(3);
  });

  it('prints the record alone with --json', async () => {
    const { exit, out, err } = await command(['survey', '-', '--json'], testTerminal(COIL));
    expect([exit, err]).toEqual([0, '']);
    expect(surveyRecordSchema.parse(JSON.parse(out))).toMatchObject({
      verb: 'survey',
      job: 'Short coil',
      program: 'coilwright 9.9.9',
    });
  });

  it('writes the folder that is named, and one of its own anew', async () => {
    const terminal = testTerminal(COIL);
    const { exit, out } = await command(['survey', '-', '--out', 'found'], terminal);
    expect(exit).toBe(0);
    expect(out).toContain('Written to found\n');
    expect(readdirSync(join(terminal.folder, 'found')).sort()).toEqual([
      'coil.cir',
      'plan.json',
      'reference-sheet.pdf',
    ]);
    const record = surveyRecordSchema.parse(
      JSON.parse(readFileSync(join(terminal.folder, 'found', 'plan.json'), 'utf8')),
    );
    expect(record.files.map(({ path }) => path)).toEqual(['reference-sheet.pdf', 'coil.cir']);
    writeFileSync(join(terminal.folder, 'found', 'notes.txt'), 'mine');
    expect(await command(['survey', '-', '--out', 'found'], terminal)).toMatchObject({ exit: 0 });
    expect(readdirSync(join(terminal.folder, 'found')).sort()).toEqual([
      'coil.cir',
      'notes.txt',
      'plan.json',
      'reference-sheet.pdf',
    ]);
    mkdirSync(join(terminal.folder, 'mine'));
    writeFileSync(join(terminal.folder, 'mine', 'thesis.txt'), 'mine');
    expect(await command(['survey', '-', '--out', 'mine'], terminal)).toMatchObject({ exit: 5, out: '' });
  });

  it('takes every starter coil', async () => {
    let taken = 0;
    for (const { name } of COILS) {
      const terminal = testTerminal();
      expect(await command(['start', name], terminal)).toMatchObject({
        exit: 0,
        out: `${name}.yaml written; edit it, then: coilwright survey ${name}.yaml
coil.schema.json written, by which an editor completes and checks it
`,
      });
      const { exit, out, err } = await command(['survey', `${name}.yaml`], terminal);
      expect([exit, err]).toEqual([0, '']);
      expect(out.toLowerCase().startsWith(name.replaceAll('-', ' '))).toBe(true);
      taken++;
    }
    expect(taken).toBe(2);
  });

  it('fits the page, in ASCII where the terminal has no more', async () => {
    for (const columns of [40, 60, 80, 110])
      for (const ascii of [false, true]) {
        const { out } = await command(['survey', '-'], { ...testTerminal(COIL, columns), ascii });
        expect(Math.max(...out.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(columns);
        expect(/^[\n -~]*$/.test(out)).toBe(ascii);
      }
  });

  it('writes its schema', async () => {
    const { exit, folder } = await command(['start', 'found-coil', '--schema']);
    expect(exit).toBe(0);
    const shipped = new URL('../../templates/schemas/coil.schema.json', import.meta.url);
    expect(readFileSync(join(folder, 'coil.schema.json'), 'utf8')).toBe(readFileSync(shipped, 'utf8'));
  });
});

/** Text of a coil file, and all that is said about it. */
const REFUSED: readonly (readonly [name: string, text: string, err: string])[] = [
  [
    'more turns than the length holds',
    'coil:\n  former-diameter: 50 mm\n  wire: { bare: 0.5 mm, overall: 0.56 mm }\n  turns: 100\n  winding-length: 40 mm\n',
    `coilwright: coil.yaml, line 5, coil.winding-length
  got       100 turns of 0.56 mm wire in a winding of 40 mm
  expected  no more than 71 turns, or a winding of 56.56 mm or more
  to do     count the turns again, or measure length and wire again
`,
  ],
  [
    'a tap beyond the coil',
    'coil: { former-diameter: 50 mm, wire: 0.5 mm enamel, turns: 30, pitch: 0.6 mm, taps: [10, 40] }',
    `coilwright: coil.yaml, line 1, coil.taps[2]
  got       a tap at turn 40 of a coil of 30 turns
  expected  taps within the coil
  to do     check the tap, or the turns of the coil
`,
  ],
  [
    'a capacitor written backwards',
    'coil: { former-diameter: 50 mm, wire: 0.5 mm enamel, turns: 30, pitch: 0.6 mm }\nset: { capacitor: 380 pF to 15 pF }',
    `coilwright: coil.yaml, line 2, set.capacitor
  got       "380 pF to 15 pF", whose first end lies above its second
  expected  a range of capacitance, such as 15 pF to 380 pF
  to do     write the lower end first
`,
  ],
];

describe('survey refuses', () => {
  it.each(REFUSED)('%s', async (_name, text, err) => {
    const terminal = testTerminal();
    writeFileSync(join(terminal.folder, 'coil.yaml'), text);
    expect(await command(['survey', 'coil.yaml', '--out', 'x'], terminal)).toMatchObject({ exit: 3, out: '', err });
    expect(existsSync(join(terminal.folder, 'x'))).toBe(false);
  });

  it('a file that is not there, and no file at all', async () => {
    expect((await command(['survey', 'gone.yaml'])).err).toBe(`coilwright: gone.yaml
  got       no file of this name
  expected  a file of a measured coil in YAML or JSON
  to do     check the path; "coilwright start found-coil" writes a measured coil
            to begin with
`);
    expect(await command(['survey'])).toMatchObject({
      exit: 2,
      err: `coilwright: not a command
  got       survey without a measured coil
  expected  coilwright survey COIL, a file in YAML or JSON, or - for standard
            input
  to do     name the coil file; "coilwright start found-coil" writes one to
            begin with
`,
    });
  });
});

describe('the chart in the terminal', () => {
  const record = sampleRecord({ turns: [10, 20] });
  const winding = record.windings[0]!;
  const range = winding.taps[0]!.range!;
  const taps = [
    { ...winding.taps[0]!, range: { ...range, lowKhz: 1000, highKhz: 2000, secondLowKhz: null, secondHighKhz: null } },
    { ...winding.taps[1]!, range: { ...range, lowKhz: 500, highKhz: 1250, secondLowKhz: null, secondHighKhz: null } },
  ];
  const of = (columns: number, ascii: boolean) =>
    rangeChart(
      { ...record, windings: [{ ...winding, taps }], demand: { ...record.demand, bandLowKhz: null } },
      columns,
      ascii,
    );

  it('draws a bar a position, shared stretches darker', () => {
    const [, first, second] = of(80, true) as [string, string, string];
    const bar = (line: string) => line.slice(line.indexOf('|') + 1, line.lastIndexOf('|'));
    expect(bar(first).trim()).toMatch(/^=+-+$/);
    expect(bar(second).trim()).toMatch(/^-+=+$/);
    // From 500 to 2000 kHz are two octaves, shared from 1000 to 1250 kHz: 0.32 of one. A cell either way.
    const octave = (bar(first).trim().length - 1) as number;
    const shared = (line: string) => [...bar(line)].filter((sign) => sign === '=').length;
    expect(Math.abs(shared(first) - octave * Math.log2(1.25))).toBeLessThanOrEqual(1.5);
    expect(shared(second)).toBe(shared(first));
    expect(bar(first).indexOf('=')).toBe(bar(second).indexOf('='));
    expect(first.endsWith('25 %')).toBe(true);
  });

  it('is empty without ranges', () => {
    const none = taps.map((tap) => ({ ...tap, range: null }));
    expect(rangeChart({ ...record, windings: [{ ...winding, taps: none }] }, 80, false)).toEqual([]);
  });

  it('knows terminals that show ASCII alone', () => {
    const cases: readonly (readonly [Record<string, string>, boolean])[] = [
      [{ TERM: 'dumb', LANG: 'en_GB.UTF-8' }, true],
      [{ LANG: 'en_GB.UTF-8' }, false],
      [{ LANG: 'C.utf8' }, false],
      [{ LANG: 'en_GB.UTF-8', LC_ALL: 'C' }, true],
      [{ LC_ALL: '', LANG: 'de_DE.UTF-8' }, false],
      [{}, true],
    ];
    for (const [env, ascii] of cases) expect([env, isAscii(env, 'linux')]).toEqual([env, ascii]);
    expect(isAscii({}, 'win32')).toBe(false);
    expect(inAscii('52.5 µH ± 1, 20 °C, 2 Ω – ’x’ ☃')).toBe("52.5 uH +- 1, 20 deg C, 2 ohm - 'x' ?");
  });
});
