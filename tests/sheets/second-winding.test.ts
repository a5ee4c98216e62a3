/** A second winding on paper: its block and steps fit in, and the strip of its body has its holes at true scale. */
import { expect, test } from 'vitest';
import { readJob } from '../../src/job/read.ts';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, sheetFrame } from '../../src/sheets/winding-sheet.ts';
import { layOutWrapTemplate, templateFrame, wrapTemplate } from '../../src/sheets/wrap-template.ts';
import { layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const PAPER_MM = 0.1;
/** The reader's 32 bit floats carry 4e-5 mm. */
const PLACE_MM = 0.02;

const recordWith = (second: string, taps: number, more = ''): CoilRecord =>
  recordOf(
    readJob(
      `job: p\nwant: { inductance: 20 uH to 240 uH, taps: ${taps} }\nset: { capacitor: 15 pF to 380 pF }\nformer: { outside-diameter: 60 mm }\nwire: 0.4 mm enamel\nwinding: { pitch: 1.2 mm }\n${more}second: ${second}`,
      'p.yaml',
    ),
    '1.2.3',
  );

const RECORDS: readonly (readonly [string, CoilRecord])[] = [
  ['sleeve, 4 taps', recordWith('{ kind: sleeve, coupling: 0.3 }', 4)],
  ['sliding, 12 taps, inches', recordWith('{ kind: inner, coupling: 0.05 to 0.35 }', 12, 'units: inch\n')],
  ['beside, 20 taps', recordWith('{ kind: beside, coupling: 0.08 }', 20)],
  ['same former, 12 taps, Letter', recordWith('{ kind: same former, coupling: 0.12 }', 12, 'paper: Letter\n')],
];

test('winding sheets keep to two pages and say turns, coupling, every step and the scale', () => {
  let sheets = 0;
  for (const [name, record] of RECORDS) {
    const pages = layOutWindingSheet(record, measure);
    expect(pages, name).toHaveLength(2);
    expect(layoutFaults(pages, sheetFrame, measure), name).toEqual([]);
    const words = pages.map((page) => layoutBoxes([page], measure).map(({ text }) => text));
    const all = words.flat().join(' ');
    const second = record.around!.second!;
    expect(all, name).toContain('Second winding');
    for (const { text } of record.steps.slice(-3)) expect(all, name).toContain(text);
    expect(words[1], name).toContain(second.coupling.toFixed(3));
    expect(words[1], name).toContain(`${second.turns}`);
    for (const { coupling } of second.slide?.scale ?? []) expect(words[1], name).toContain(`${coupling}`);
    for (const { tap, coupling } of second.working)
      expect(all, name).toContain(`${tap}: ${Number(coupling.toFixed(3))}`);
    sheets++;
  }
  console.log(`winding sheets with a second winding: ${sheets}`);
  expect(sheets).toBe(4);
});

test('the template has a strip for what it is wound on, its holes at true scale', async () => {
  let holes = 0;
  for (const [name, record] of RECORDS) {
    const pages = layOutWrapTemplate(record, measure);
    expect(layoutFaults(pages, templateFrame, measure), name).toEqual([]);
    const { body, kind, holes: wanted } = record.around!.second!;
    const { pages: read } = await readPdf(await wrapTemplate(record));
    const strips = read.filter((page) => page.texts.some(({ text }) => text.startsWith('for the ')));
    if (kind === 'same former' || body === null) {
      expect(strips, name).toHaveLength(0);
      expect(read[0]!.texts.map(({ text }) => text)).toEqual(expect.arrayContaining(['P1', 'P2', 'P1a', 'P2a']));
      continue;
    }
    expect(strips, name).toHaveLength(1);
    const { circles } = strips[0]!;
    expect(circles, name).toHaveLength(4);
    // Every pair of circles stands as its two holes on the developed body; the lowest circle is the lowest hole.
    const low = [...circles].sort((a, b) => a.y - b.y);
    const sorted = [...wanted].sort((a, b) => a.axialMm - b.axialMm);
    const round = Math.PI * (body.outsideDiameterMm + PAPER_MM);
    low.forEach((circle, i) => {
      const across = ((sorted[i]!.angleDeg - sorted[0]!.angleDeg) / 360) * round;
      const off = circle.x - low[0]!.x - across;
      expect(Math.abs(off - Math.round(off / round) * round), name).toBeLessThan(PLACE_MM);
      expect(Math.abs(circle.y - low[0]!.y - (sorted[i]!.axialMm - sorted[0]!.axialMm)), name).toBeLessThan(PLACE_MM);
      expect(Math.abs(2 * circle.r - sorted[i]!.diameterMm), name).toBeLessThan(PLACE_MM);
      holes++;
    });
  }
  console.log(`holes of second windings on strips: ${holes}`);
  expect(holes).toBe(12);
});
