/** How pages are laid out: colours by stream, width, the plain and the quiet way, and what goes to which stream. */
import { describe, expect, it } from 'vitest';
import { atWork } from '../../cli/at-work.ts';
import { errPage, outPage } from '../../cli/page.ts';
import { elevation, showElevation } from '../../cli/show-elevation.ts';
import { showPlan } from '../../cli/show-plan.ts';
import { hasColours, spokenStatus, widthOf } from '../../cli/terminal.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { command, testTerminal } from './terminal.ts';

const COIL = `name: Short coil
coil: { former-diameter: 50 mm, wire: 0.5 mm enamel, turns: 30, pitch: 0.6 mm, taps: [10, 20] }
set: { capacitor: 15 pF to 380 pF }
band: 1 MHz to 6 MHz
`;
const ESCAPE = '\u001b';
const withoutColours = (text: string) =>
  ['[1m', '[1;35m', '[0m'].reduce((bare, sign) => bare.replaceAll(ESCAPE + sign, ''), text);

describe('colours', () => {
  it('are for terminals alone, and for those that want them', () => {
    const cases: readonly (readonly [boolean, Record<string, string>, boolean])[] = [
      [true, {}, true],
      [false, {}, false],
      [true, { NO_COLOR: '1' }, false],
      [true, { NO_COLOR: '0' }, false],
      // The convention: only one that holds something.
      [true, { NO_COLOR: '' }, true],
      [true, { TERM: 'dumb' }, false],
      [true, { TERM: 'xterm' }, true],
    ];
    for (const [isTTY, env, expected] of cases)
      expect([isTTY, env, hasColours({ isTTY }, env)]).toEqual([isTTY, env, expected]);
  });

  it('are judged for each stream by itself', async () => {
    for (const out of [false, true])
      for (const err of [false, true]) {
        const colours = { out, err };
        const shown = await command(['survey', '-'], { ...testTerminal(COIL), colours });
        expect([shown.exit, shown.out.includes(ESCAPE), shown.err]).toEqual([0, out, '']);
        const refused = await command(['survey', '-', '--jsn'], { ...testTerminal(COIL), colours });
        expect([refused.exit, refused.out, refused.err.includes(ESCAPE)]).toEqual([2, '', err]);
      }
  });

  it('carry nothing that the text does not say', async () => {
    const bare = await command(['survey', '-'], testTerminal(COIL));
    const shown = await command(['survey', '-'], { ...testTerminal(COIL), colours: { out: true, err: true } });
    expect(shown.out).not.toBe(bare.out);
    expect(withoutColours(shown.out)).toBe(bare.out);
    // Nothing is left switched on at the end of a line.
    for (const line of shown.out.split('\n'))
      expect(line.includes(ESCAPE)).toBe(line.endsWith(`${ESCAPE}[0m`) && line.startsWith(`${ESCAPE}[1`));
    const plain = { ...testTerminal(COIL), plain: true, colours: { out: true, err: true } };
    expect((await command(['survey', '-'], plain)).out).not.toContain(ESCAPE);
  });

  it('are not in data', async () => {
    const colours = { out: true, err: true };
    expect((await command(['survey', '-', '--json'], { ...testTerminal(COIL), colours })).out).not.toContain(ESCAPE);
    expect((await command(['survey', '-', '--json', '-z'], { ...testTerminal(COIL), colours })).err).not.toContain(
      ESCAPE,
    );
  });
});

describe('the width', () => {
  it('is what the person asked for, else that of the stream, else of the other one', () => {
    const [none, wide, narrow] = [{}, { columns: 100 }, { columns: 50 }];
    expect(widthOf([wide, narrow], {})).toBe(100);
    expect(widthOf([none, narrow], {})).toBe(50);
    expect(widthOf([none, none], {})).toBe(80);
    expect(widthOf([wide], { COLUMNS: '60' })).toBe(60);
    expect(widthOf([wide], { COLUMNS: 'many' })).toBe(100);
    expect(widthOf([{ columns: 0 }], {})).toBe(80);
    expect([widthOf([{ columns: 20 }], {}), widthOf([{ columns: 300 }], {})]).toEqual([40, 110]);
  });

  it('may be another one for faults', async () => {
    const terminal = { ...testTerminal('', 110), errColumns: 40 };
    expect([outPage(terminal).columns, errPage(terminal).columns]).toEqual([110, 40]);
    const { err } = await command(['plan'], terminal);
    expect(Math.max(...err.split('\n').map(({ length }) => length))).toBeLessThanOrEqual(40);
  });
});

describe('--plain', () => {
  it('gives a fact a line, every column, no drawing', async () => {
    const { exit, out, err } = await command(['survey', '-', '--plain'], testTerminal(COIL, 40));
    expect([exit, err]).toEqual([0, '']);
    expect(out).not.toMatch(/[│┊░▓┌─└┴]|---|\\\\|\|/);
    for (const line of out.split('\n')) expect(line).toMatch(/^(?:\S.*)?$/);
    const record = JSON.parse((await command(['survey', '-', '--json'], testTerminal(COIL))).out);
    let compared = 0;
    for (const tap of record.windings[0].taps) {
      const at = out.indexOf(`\ntap ${tap.tap}\nturn: ${tap.turn}\n`);
      expect(at).toBeGreaterThan(0);
      for (const wanted of [`\nQ: ${tap.working.q.toFixed(0)}\n`, `\nwidest by: ${tap.dominant}\n`])
        expect(out.indexOf(wanted, at)).toBeGreaterThan(at);
      expect(out).toMatch(
        new RegExp(`^tap ${tap.tap}: ${tap.range.lowKhz.toFixed(0)} to ${tap.range.highKhz.toFixed(0)} kHz`, 'm'),
      );
      compared++;
    }
    expect(compared).toBe(3);
    expect(out).toMatch(/^± of from kHz: /m);
  });

  it('is how every verb that shows a coil can speak', () => {
    const said = showPlan(sampleRecord(), 'out/x', [], outPage({ columns: 40, plain: true }));
    expect(said).not.toMatch(/[│┌─└┴]|---/);
    for (const wanted of ['\nTaps', '\nthe one chosen\n', '\nwound: ']) expect(said).toContain(wanted);
  });

  it('tells of faults a fact a line', async () => {
    expect((await command(['plan', '--plain'], testTerminal('', 40))).err).toBe(`coilwright: not a command
got: plan without a job
expected: coilwright plan JOB, a file in YAML or JSON, or - for standard input
to do: name the job file; "coilwright start" writes one to begin with
`);
  });

  it('lists stock and explains taps', async () => {
    const { out } = await command(['stock', 'tubes', '--plain'], testTerminal('', 40));
    expect(out).toContain('tube 3/4 in\noutside mm: 19.05\nfrom: ');
    const explained = await command(['survey', '-', '--plain', '--explain', '2'], testTerminal(COIL, 40));
    expect(explained.out).toMatch(/^formula: /m);
    expect(explained.out).toMatch(/^by way of: .+ = /m);
  });

  it('has now and then a line of its own for a long run', () => {
    let [said, now] = ['', 0];
    const status = spokenStatus(
      (text) => {
        said += text;
      },
      () => now,
    );
    for (now = 0; now <= 21_000; now += 1000) status(`${now / 1000} s`);
    status('');
    expect(said).toBe('0 s\n10 s\n20 s\n');
  });
});

describe('--quiet', () => {
  it('says nothing where nothing is wrong', async () => {
    for (const quiet of ['--quiet', '-q']) {
      expect(await command(['survey', '-', quiet], testTerminal(COIL))).toMatchObject({ exit: 0, out: '', err: '' });
      expect(await command(['start', quiet])).toMatchObject({ exit: 0, out: '', err: '' });
      expect(await command(['stock', 'tubes', quiet])).toMatchObject({ exit: 0, out: '', err: '' });
    }
  });

  it('prints data that was asked for, and every fault', async () => {
    expect(JSON.parse((await command(['survey', '-', '--json', '-q'], testTerminal(COIL))).out).job).toBe('Short coil');
    expect((await command(['start', '-q', '--out', '-'])).out).toContain('job: ');
    const { exit, out, err } = await command(['plan', '-', '-q'], testTerminal('job: x\n'));
    expect([exit, out, err.split('\n')[0]]).toEqual([3, '', 'coilwright: standard input, want']);
  });
});

describe('progress', () => {
  const ticked = async (...given: string[]) => {
    const told: string[] = [];
    const ticking = (work: string) => {
      told.push(work);
      return { tell: (stage: string) => void told.push(stage), end: () => void told.push('end') };
    };
    const outcome = await command(['survey', '-', ...given], { ...testTerminal(COIL), ticking });
    return { told, ...outcome };
  };

  it('is told to who watches, and ended before anything is said', async () => {
    expect((await ticked()).told).toEqual(['Short coil', 'end']);
  });

  it('is not there with --quiet and with --json', async () => {
    for (const option of ['--quiet', '-q', '--json']) expect((await ticked(option)).told).toEqual([]);
  });

  it('ends when the work fails', async () => {
    const told: string[] = [];
    const ticking = () => ({ tell: () => undefined, end: () => void told.push('end') });
    const failing = atWork({ ...testTerminal(), ticking }, 'x', async () => {
      throw new Error('lights');
    });
    await expect(failing).rejects.toThrow('lights');
    expect(told).toEqual(['end']);
  });
});

describe('the coil on its side', () => {
  const record = sampleRecord({ turns: [10, 20, 40] });
  const { taps, startMm, turnPositionsMm } = record.windings[0]!;

  it.each([40, 80, 110])('has start and taps where they lie, on %d columns', (columns) => {
    for (const ascii of [false, true]) {
      const rows = elevation(record, [0, record.former.lengthMm], columns, ascii);
      expect(Math.max(...rows.map((row) => [...row].length))).toBeLessThanOrEqual(columns);
      expect(rows.every((row) => /^[ -~]*$/.test(row))).toBe(ascii);
      const top = [...rows.find((row) => row.includes(ascii ? '+-' : '┌'))!];
      const cell = (mm: number) => (mm / record.former.lengthMm) * (columns - 1);
      const marks = [startMm, ...taps.map(({ positionMm }) => positionMm)];
      // Half a cell is how near a sign can stand.
      for (const mm of marks) expect(top[Math.round(cell(mm))]).toBe(ascii ? '+' : '┴');
      const body = rows.find((row) => row.includes('\\'))!;
      expect(Math.abs(body.indexOf('\\') - cell(turnPositionsMm[0]!))).toBeLessThanOrEqual(1);
      expect(Math.abs(body.lastIndexOf('\\') - cell(turnPositionsMm.at(-1)!))).toBeLessThanOrEqual(1);
      const labels = rows
        .slice(
          0,
          rows.findIndex((row) => row.includes(ascii ? '+-' : '┌')),
        )
        .join(' ');
      for (const label of ['S', '1', '2', '3']) expect(labels).toContain(label);
    }
  });

  it('leans as the wire climbs, and shows gaps', () => {
    const left = { ...record, frame: { ...record.frame, hand: 'left' as const } };
    const of = (one: typeof record) => elevation(one, [0, one.former.lengthMm], 80, true).join('\n');
    expect([of(record).includes('/'), of(left).includes('/'), of(left).includes('\\')]).toEqual([false, true, false]);
    const winding = record.windings[0]!;
    const parted = turnPositionsMm.map((mm, i) => (i < turnPositionsMm.length / 2 ? mm : mm + 20));
    const gap = elevation(
      { ...record, windings: [{ ...winding, turnPositionsMm: parted }] },
      [0, record.former.lengthMm + 20],
      110,
      true,
    );
    expect(gap.some((row) => /\\ {6,}\\/.test(row))).toBe(true);
  });

  it('is no part of a plain page', () => {
    expect(showElevation(record, outPage({ columns: 80, plain: true }))).toEqual([]);
  });
});
