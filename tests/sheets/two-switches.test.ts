/** The sheets of coils with a units and a tens switch, and of coils with very many taps. */
import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { showPlan } from '../../cli/show-plan.ts';
import { makeParts } from '../../src/kernel/make.ts';
import { recordOf } from '../../src/plan.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, sheetFrame, windingSheet } from '../../src/sheets/winding-sheet.ts';
import { layOutWrapTemplate, templateFrame, wrapTemplate } from '../../src/sheets/wrap-template.ts';
import { jobOf } from '../helpers/jobs.ts';
import { evenTurns, fullRecord, layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { facetsOf, radialHole } from '../helpers/stl.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** Units in lines beside the start, tens every so many turns. */
function unitTurns(units: number, degrees: number): number[] {
  const lines = [degrees / 360, -degrees / 360, 0];
  return Array.from({ length: units - 1 }, (_, i) => i + 1 + lines[i % 3]!);
}
const tensTurns = (units: number, tens: number) => Array.from({ length: tens }, (_, i) => units * (i + 1));

describe('sheets of two-switch coils', () => {
  test('nothing overlaps, leaves the margins or is too small, over random records', () => {
    let runs = 0;
    const options = fc.record({
      hand: fc.constantFrom('right' as const, 'left' as const),
      kind: fc.constantFrom('printed' as const, 'tube' as const),
      paper: fc.constantFrom('A4' as const, 'Letter' as const),
      method: fc.constantFrom('twisted loop' as const, 'lug' as const, 'drawn in' as const),
      units: fc.integer({ min: 2, max: 20 }),
      tens: fc.integer({ min: 2, max: 24 }),
      degrees: fc.constantFrom(15, 20, 30),
      diameterMm: fc.double({ min: 25, max: 120, noNaN: true }),
      pitchMm: fc.double({ min: 0.6, max: 2, noNaN: true }),
    });
    fc.assert(
      fc.property(options, ({ units, tens, degrees, ...rest }) => {
        const record = fullRecord({ ...rest, unitTurns: unitTurns(units, degrees), turns: tensTurns(units, tens) });
        expect(layoutFaults(layOutWindingSheet(record, measure), sheetFrame, measure)).toEqual([]);
        expect(layoutFaults(layOutWrapTemplate(record, measure), templateFrame, measure)).toEqual([]);
        runs++;
      }),
      { seed: 33, numRuns: 20 },
    );
    console.log(`two switches: ${runs} sheets and templates laid out`);
    expect(runs).toBe(20);
  });

  test.each([
    [30, 'one switch'],
    [45, 'one switch'],
    [60, 'one switch'],
    [79, 'two switches'],
  ] as const)('%d taps run on over pages (%s)', (count, kind) => {
    const tens = Math.min(count, 60);
    const record = sampleRecord({
      turns: evenTurns(tens, 20 * tens, false),
      ...(kind === 'two switches' ? { unitTurns: unitTurns(20, 15) } : {}),
    });
    const pages = layOutWindingSheet(record, measure);
    expect(layoutFaults(pages, sheetFrame, measure)).toEqual([]);
    // Every tap has its row, whatever the page.
    const texts = new Set(layoutBoxes(pages, measure).map(({ text }) => text));
    for (const tap of record.windings[0]!.taps) expect(texts.has(tap.wireFromStartM.toFixed(2))).toBe(true);
    for (const tap of record.windings[0]!.unitTaps ?? []) expect(texts.has(`u${tap.unit}`)).toBe(true);
  });
});

describe('a two-switch coil, whole', () => {
  const record = recordOf(
    jobOf({
      want: { inductance: '2 uH to 60 uH', taps: 6 },
      set: { capacitor: '15 pF to 380 pF' },
      former: { 'outside-diameter': '40 mm to 90 mm' },
      wire: ['24 AWG enamel'],
      winding: { units: 5, pitch: 'spaced' },
    }),
    '1.2.3',
  );
  const { unitTaps = [] } = record.windings[0]!;
  const settings = record.settings ?? [];

  it('prints its unit taps, its settings and its holes', async () => {
    expect(record.tapMethod.name).toBe('drawn in');
    const text = async (bytes: Promise<Uint8Array>) =>
      (await readPdf(await bytes)).pages.map((page) => page.texts.map((one) => one.text).join(' ')).join(' ');
    const [sheet, template] = await Promise.all([text(windingSheet(record)), text(wrapTemplate(record))]);
    expect([unitTaps.length, settings.length]).toEqual([4, 6]);
    for (const tap of unitTaps) {
      expect(sheet).toContain(`u${tap.unit}`);
      expect(sheet).toContain(tap.positionMm.toFixed(2));
      expect(template).toContain(`u${tap.unit}`);
      expect(record.holes.filter(({ label }) => label === `u${tap.unit}`)).toHaveLength(1);
    }
    for (const row of settings) {
      expect(sheet).toContain(`${row.turnsLeast} – ${row.turnsMost}`);
      expect(sheet).toContain(row.inductancesUh[4]!.toPrecision(4));
    }
  });

  it('has a former with every hole of its unit taps', async () => {
    // The file is refused when its volume is not that of the wall less all holes.
    const [part] = await makeParts(record);
    const facets = facetsOf(part!.bytes);
    let checked = 0;
    for (const { label, angleDeg, axialMm, diameterMm } of record.holes) {
      if (!label.startsWith('u')) continue;
      const fit = radialHole(facets, angleDeg, axialMm, diameterMm);
      // A fiftieth of a millimetre, below what a printer can place.
      expect(Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - diameterMm)).toBeLessThan(0.02);
      expect(fit.walls).toBeGreaterThan(9);
      checked++;
    }
    expect(checked).toBe(4);
  });

  it.each([40, 60, 80, 110])('is said in %d columns', (columns) => {
    const said = showPlan(record, 'out/x', [{ path: 'plan.json', bytes: Buffer.alloc(9), note: 'the record' }], {
      columns,
    });
    const lines = said.split('\n');
    expect(Math.max(...lines.map((line) => [...line].length))).toBeLessThanOrEqual(Math.max(columns, 72));
    const start = lines.findIndex((line) => line.startsWith('Both switches'));
    for (const row of settings)
      expect(lines.slice(start).some((line) => line.includes(`${row.turnsLeast}..${row.turnsMost}`))).toBe(true);
    expect(said).toContain('u4 ');
  });
});
