import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { runPlan } from '../../cli/plan.ts';
import { showPlan } from '../../cli/show-plan.ts';
import { Fault } from '../../src/fault.ts';
import { LARGEST_BYTES } from '../../src/job/tree.ts';
import type { Output } from '../../src/record/listing.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { command, testTerminal } from './terminal.ts';

const JOB = 'job: Bench coil 5\nwant: { inductance: 20 uH to 240 uH, taps: 5 }\n';

/** A planner that plans nothing: what is tested here is what comes before and after it. */
async function planned(): Promise<Output<CoilRecord>> {
  const record = { ...sampleRecord(), files: [{ path: 'winding-sheet.pdf', kind: 'pdf', sha256: '0' }] };
  return {
    record,
    files: [
      { path: 'plan.json', kind: 'json', bytes: Buffer.from(JSON.stringify(record)), note: 'the record' },
      { path: 'winding-sheet.pdf', kind: 'pdf', bytes: Buffer.alloc(123_456), note: 'to wind from and to check by' },
    ],
  };
}

async function plan(input: string, options: { out?: string; json?: boolean } = {}, terminal = testTerminal(input)) {
  await runPlan({ job: '-', json: options.json ?? false, out: options.out }, terminal, '9.9.9', async () => planned);
  return terminal;
}

describe('plan', () => {
  it('writes the folder named after the job and says so', async () => {
    const terminal = await plan(JOB);
    expect(readdirSync(join(terminal.folder, 'out', 'bench-coil-5')).sort()).toEqual([
      'plan.json',
      'winding-sheet.pdf',
    ]);
    expect(terminal.said.out).toContain('Written to out/bench-coil-5\n');
    expect(terminal.said.err).toBe('');
  });

  it('prints the record alone with --json, and writes all the same', async () => {
    const terminal = await plan(JOB, { json: true, out: 'coil' });
    expect(JSON.parse(terminal.said.out)).toMatchObject({ record: 1, files: [{ path: 'winding-sheet.pdf' }] });
    expect(existsSync(join(terminal.folder, 'coil', 'plan.json'))).toBe(true);
  });

  it('replaces its own folder and keeps what is not its own', async () => {
    const terminal = await plan(JOB);
    const notes = join(terminal.folder, 'out', 'bench-coil-5', 'notes.txt');
    writeFileSync(notes, 'mine');
    await plan(JOB, {}, terminal);
    expect(readFileSync(notes, 'utf8')).toBe('mine');
  });

  it('stays in the output folder whatever the name of the job', async () => {
    for (const name of ['../../up', '/etc', '..', 'C:\\up', '.', 'CON']) {
      const terminal = await plan(JOB.replace('Bench coil 5', JSON.stringify(name)));
      expect(readdirSync(terminal.folder)).toEqual(['out']);
      expect(readdirSync(join(terminal.folder, 'out'))).toHaveLength(1);
    }
  });

  it('refuses a folder that is not its own, and leaves it alone', async () => {
    const terminal = testTerminal(JOB);
    mkdirSync(join(terminal.folder, 'mine'));
    writeFileSync(join(terminal.folder, 'mine', 'thesis.txt'), 'mine');
    await expect(plan(JOB, { out: 'mine' }, terminal)).rejects.toThrow(Fault);
    expect(readdirSync(join(terminal.folder, 'mine'))).toEqual(['thesis.txt']);
  });
});

/** Text of a job, and all that is said about it. */
const REFUSED: readonly (readonly [name: string, text: string | Uint8Array, err: string])[] = [
  [
    'empty',
    '',
    `coilwright: job.yaml
  got       an empty job
  expected  at least the keys job and want
  to do     begin with: coilwright start
`,
  ],
  [
    'broken',
    'job: "x\nwant: 1\n',
    `coilwright: job.yaml, line 3
  got       Missing closing "quote
  expected  YAML or JSON
  to do     check indents, colons, quotes and brackets on this line and the one
            before
`,
  ],
  [
    'not text',
    Uint8Array.from([0x50, 0x4b, 0xff, 0xfe]),
    `coilwright: job.yaml
  got       bytes that are not UTF-8 text
  expected  a job in YAML or JSON, in UTF-8
  to do     save the file as UTF-8 text; PDF, ZIP and word processor files
            cannot be read
`,
  ],
  [
    'enormous',
    'x'.repeat(LARGEST_BYTES + 1),
    `coilwright: job.yaml
  got       1000001 bytes
  expected  a job of at most 1000000 bytes
  to do     check that this is the job file
`,
  ],
  [
    'a wrong unit',
    'job: x\nwant:\n  inductance: 20 mm to 240 mm\n  taps: 3\n',
    `coilwright: job.yaml, line 3, want.inductance
  got       "20 mm", whose unit measures a length (lower end of "20 mm to 240
            mm")
  expected  an inductance, such as 240 uH
  to do     give an inductance in uH or mH
`,
  ],
  [
    'no unit',
    `${JOB}former:\n  longest: 140\n`,
    `coilwright: job.yaml, line 4, former.longest
  got       "140", a number without a unit
  expected  a length, such as 76 mm or 3 1/2 in
  to do     write the unit: 140 mm or 140 in
`,
  ],
  [
    'negative and zero',
    `${JOB}former: { longest: -140 mm, wall: 0 mm }\n`,
    `coilwright: job.yaml, line 3, former.longest
  got       "-140 mm", which is negative
  expected  a length, such as 76 mm or 3 1/2 in
  to do     write a value above zero

coilwright: job.yaml, line 3, former.wall
  got       "0 mm", which is zero
  expected  a length, such as 76 mm or 3 1/2 in
  to do     write a value above zero
`,
  ],
  [
    'no number',
    `${JOB}at: .nan\n`,
    `coilwright: job.yaml, line 3, at
  got       NaN, which is no number
  expected  a frequency, such as 530 kHz
  to do     write one number and its unit
`,
  ],
  [
    'beyond all measure',
    `${JOB}former: { longest: 1e400 mm, outside-diameter: 76 Mm }\n`,
    `coilwright: job.yaml, line 3, former.outside-diameter
  got       "76 Mm", which is above the 10000 mm that make sense here
  expected  a length, such as 76 mm or 3 1/2 in
  to do     check the unit (mm or in?) and the number

coilwright: job.yaml, line 3, former.longest
  got       "1e400 mm", more than a number can hold
  expected  a length, such as 76 mm or 3 1/2 in
  to do     check the exponent
`,
  ],
  [
    'a decimal comma',
    `${JOB}former:\n  outside-diameter: 76,2 mm\n`,
    `coilwright: job.yaml, line 4, former.outside-diameter
  got       "76,2 mm", with a comma
  expected  a length, such as 76 mm or 3 1/2 in
  to do     write the decimal point as a point, and no mark between thousands:
            76.2 mm
`,
  ],
  [
    'an unknown key',
    `${JOB}former:\n  longst: 140 mm\n`,
    `coilwright: job.yaml, line 4, former.longst
  got       a key that is not known
  expected  one of: kind, outside-diameter, longest, wall, material, body, ribs,
            mounting, screw, screw-circle, flanges
  to do     did you mean longest?
`,
  ],
  [
    'too many taps',
    'job: x\nwant: { inductance: 20 uH to 240 uH, taps: 400 }\n',
    `coilwright: job.yaml, line 2, want.taps
  got       400
  expected  a whole number from 1 to 60
  to do     write a whole number within these limits
`,
  ],
  [
    'a band without a set',
    'job: x\nwant: { band: 530 kHz to 1700 kHz }\n',
    `coilwright: job.yaml, set
  got       the band 530 kHz to 1700 kHz without the set that tunes it
  expected  the key set with a capacitor
  to do     add set: { capacitor: 15 pF to 380 pF }
`,
  ],
];

describe('a job that plan refuses', () => {
  it.each(REFUSED)('%s', async (_name, text, err) => {
    const terminal = testTerminal();
    writeFileSync(join(terminal.folder, 'job.yaml'), text);
    const outcome = await command(['plan', 'job.yaml'], terminal);
    expect(outcome.err).toBe(err);
    expect([outcome.exit, outcome.out, readdirSync(terminal.folder)]).toEqual([3, '', ['job.yaml']]);
  });

  it('an unknown wire', async () => {
    const { exit, err } = await command(['plan', '-'], testTerminal(`${JOB}wire: [24 AWG enamel, 24 AWG rubber]\n`));
    expect(exit).toBe(3);
    expect(err).toMatch(
      /^coilwright: standard input, line 3, wire\[2\]\n {2}got {7}"24 AWG rubber"\n {2}expected {2}bare, enamel/,
    );
  });

  it('not there, a folder, nearly another', async () => {
    const terminal = testTerminal();
    writeFileSync(join(terminal.folder, 'bench.yaml'), JOB);
    mkdirSync(join(terminal.folder, 'jobs'));
    expect(await command(['plan', 'bnch.yaml'], terminal)).toMatchObject({
      exit: 3,
      err: `coilwright: bnch.yaml
  got       no file of this name
  expected  a job file in YAML or JSON
  to do     did you mean bench.yaml?
`,
    });
    expect(await command(['plan', 'none.yaml'], terminal)).toMatchObject({
      exit: 3,
      err: `coilwright: none.yaml
  got       no file of this name
  expected  a job file in YAML or JSON
  to do     check the path; "coilwright start" writes a job to begin with
`,
    });
    expect(await command(['plan', 'jobs'], terminal)).toMatchObject({
      exit: 3,
      err: `coilwright: jobs
  got       a folder
  expected  a job file in YAML or JSON
  to do     name the job file in it
`,
    });
    expect((await command(['plan', 'bench.yaml/x'], terminal)).exit).toBe(3);
  });

  it('on standard input', async () => {
    const { exit, err } = await command(['plan', '-'], testTerminal('job: x\n'));
    expect([exit, err.split('\n')[0]]).toEqual([3, 'coilwright: standard input, want']);
  });

  it('on a page of any width', async () => {
    for (const columns of [40, 60, 110]) {
      const { err } = await command(['plan', '-'], testTerminal('job: x\nwant: { inductance: 20 mm }\n', columns));
      expect(Math.max(...err.split('\n').map((line) => line.length))).toBeLessThanOrEqual(columns);
    }
  });

  it('for many things: the first twenty are shown', async () => {
    const keys = Array.from({ length: 50 }, (_, n) => `k${n}: 1`).join('\n');
    const { err } = await command(['plan', '-'], testTerminal(`${JOB}${keys}\n`));
    expect(err.match(/^ {2}got /gm)).toHaveLength(20);
    expect(err).toMatch(/\ncoilwright: 30 more of this kind; mend these first\n$/);
  });
});

describe('what plan says', () => {
  const shown = async (columns: number) => {
    const { record, files } = await planned();
    return showPlan(record, 'out/x', files, { columns });
  };

  it.each([40, 60, 80, 110])('fits %d columns', async (columns) => {
    // Tables of figures are laid out for 80; narrower pages keep the columns that matter most.
    const widest = Math.max(...(await shown(columns)).split('\n').map((line) => [...line].length));
    expect(widest).toBeLessThanOrEqual(Math.max(columns, 72));
  });

  it('gives every tap, every other coil, every warning, every file', async () => {
    const { record, files } = await planned();
    const text = await shown(80);
    for (const tap of record.windings[0]?.taps ?? []) {
      expect(text).toMatch(new RegExp(`^ +${tap.tap} +${tap.turn.toFixed(3)} +${tap.angleDeg.toFixed(1)}° `, 'm'));
    }
    for (const [index, one] of record.alternatives.entries()) {
      expect(text).toContain(
        `\n  ${'abcdefgh'[index]}  ${one.wire}, ${one.pitchKind}, ${one.tapMethod}: better in ${one.betterIn.join(', ')}\n`,
      );
    }
    for (const { text: warning } of record.warnings) expect(text).toContain(`- ${warning}`);
    for (const { path, note } of files)
      expect(text).toMatch(new RegExp(`^ {2}${path} +[\\d.]+ [kM]B {2}${note}$`, 'm'));
    expect(text).toContain(`why this one: ${record.chosen.why}`);
  });

  it('has no colours', async () => {
    expect([...(await shown(80))].filter((c) => c < ' ' && c !== '\n')).toEqual([]);
  });
});
