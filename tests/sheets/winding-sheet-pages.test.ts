/** How many pages the winding sheet of a coil with many taps takes, and that all of it is there. */
import { expect, test } from 'vitest';
import { readJob } from '../../src/job/read.ts';
import { recordOf } from '../../src/plan.ts';
import { tapChecks } from '../../src/sheets/check-blocks.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, sheetFrame } from '../../src/sheets/winding-sheet.ts';
import { jobText, type Parts, RANGE, TUBE } from '../helpers/jobs.ts';
import { layoutBoxes, layoutFaults } from '../helpers/layout.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** The job with most to say: a spaced winding on a tube of card, in staggered holes. */
const CARD = {
  ...TUBE,
  former: { ...TUBE.former, material: 'card' },
  wire: ['26 AWG double cotton'],
};
const tubeOf = (taps: number, units: string) =>
  recordOf(
    readJob(jobText({ ...CARD, want: { inductance: '14 uH to 205 uH', taps }, units } as Parts), 'test'),
    '1.2.3',
  );
const printedOf = (taps: number, units: string) =>
  recordOf(readJob(jobText({ ...RANGE, want: { ...RANGE.want, taps }, units } as Parts), 'test'), '1.2.3');

test('two pages for many taps on both papers; three only where both units tell of more than fit', () => {
  let sheets = 0;
  for (const [name, record, most] of [
    ['12 taps on a tube', tubeOf(12, 'metric'), 2],
    ['15 taps on a tube, inches', tubeOf(15, 'inch'), 2],
    ['15 taps on a tube, both', tubeOf(15, 'both'), 2],
    ['24 taps on a tube', tubeOf(24, 'metric'), 2],
    ['24 taps on a printed former, inches', printedOf(24, 'inch'), 2],
    ['24 taps on a tube, both', tubeOf(24, 'both'), 3],
  ] as const)
    for (const paper of ['A4', 'Letter'] as const) {
      const pages = layOutWindingSheet({ ...record, paper }, measure);
      expect(layoutFaults(pages, sheetFrame, measure), `${name}, ${paper}`).toEqual([]);
      expect(pages.length, `${name}, ${paper}`).toBe(most);
      const words = pages.map((page) => layoutBoxes([page], measure).map(({ text }) => text));
      if (most === 3) expect(words[2]).toContain('to check by, continued');
      // Every step that is no row of the table, every row, and every caution, each once.
      const all = words.flat().join(' ');
      for (const { kind, text } of record.steps) if (kind !== 'tap') expect(all, name).toContain(text);
      for (const text of record.cautions) expect(all, name).toContain(text);
      for (const { turn } of record.windings[0]!.taps)
        expect(words[0], name).toContain(`${Number(turn.toFixed(record.units === 'both' ? 2 : 3))}`);
      sheets++;
    }
  console.log(`winding sheet: ${sheets} sheets of many taps`);
  expect(sheets).toBe(12);
});

test('what generator and probe show stands in the table of taps where they are stated and two columns more fit', () => {
  let probed = 0;
  let sheets = 0;
  for (const [taps, units] of [
    [5, 'metric'],
    [12, 'metric'],
    [12, 'both'],
  ] as const) {
    const parts = {
      ...RANGE,
      want: { ...RANGE.want, taps },
      units,
      shop: { generator: '600 ohm' },
    } as unknown as Parts;
    const record = recordOf(readJob(jobText(parts), 'test'), '1.2.3');
    const pages = layOutWindingSheet(record, measure);
    expect(layoutFaults(pages, sheetFrame, measure), `${taps} ${units}`).toEqual([]);
    expect(pages.length, `${taps} ${units}`).toBe(2);
    const all = pages.flatMap((page) => layoutBoxes([page], measure).map(({ text }) => text)).join(' ');
    const row = record.measuring.instruments!.rows[0]!;
    const limits = `${Math.round(row.lowKhz!)}–${Math.round(row.highKhz!)}`;
    const there = all.includes(limits);
    if (there) probed++;
    expect(all.includes('(600 Ω) through 1 pF'), `${taps} ${units}`).toBe(there);
    expect(all.includes('in the reference sheet'), `${taps} ${units}`).toBe(!there);
    sheets++;
  }
  console.log(`winding sheets with instruments: ${sheets}, ${probed} with their columns`);
  expect(probed).toBeGreaterThan(1);
  const record = recordOf(
    readJob(jobText({ ...RANGE, shop: { generator: '600 ohm' } } as unknown as Parts), 'test'),
    '1',
  );
  const narrow = (mm: number) =>
    tapChecks(record, mm, 5, measure)
      .flatMap(({ shapes }) => shapes)
      .flatMap((shape) => ('text' in shape ? [shape.text] : []))
      .join(' ');
  expect([narrow(180), narrow(110)].map((all) => all.includes('in the reference sheet'))).toEqual([false, true]);
});
