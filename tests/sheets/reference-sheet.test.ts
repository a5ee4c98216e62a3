import { describe, expect, test } from 'vitest';
import { placeOn, written } from '../../src/drawing/log-axis.ts';
import { axisOf, drawRangeChart, type RangeChart } from '../../src/drawing/range-chart.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutReferenceSheet, referenceFrame, referenceSheet } from '../../src/sheets/reference-sheet.ts';
import { surveyRecordOf } from '../../src/survey.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** A record of a plan with so many positions, each reaching `step` below the one before and as wide as `width`. */
function ranged(count: number, paper: 'A4' | 'Letter', step = 1.3, width = 1.5): CoilRecord {
  const record = sampleRecord({ paper, turns: Array.from({ length: count }, (_, i) => 10 + 7.5 * i) });
  const winding = record.windings[0]!;
  const taps = winding.taps.map((tap, i) => {
    const highKhz = 12_345.6 / step ** i;
    const lowKhz = highKhz / width;
    const range = { lowKhz, highKhz, lowUncertaintyKhz: lowKhz * 0.003, highUncertaintyKhz: highKhz * 0.02 };
    const seconds = { secondLowKhz: highKhz * 1.8, secondHighKhz: highKhz * 2.2 };
    return { ...tap, range: { ...range, ...seconds, capacitanceLowPf: 87, capacitanceHighPf: 452 } };
  });
  const warnings = Array.from({ length: 8 }, (_, i) => ({
    code: `w${i}`,
    text: 'A remark of some length. '.repeat(9),
  }));
  return { ...record, windings: [{ ...winding, taps }], warnings };
}

const LAYOUTS: readonly (readonly [name: string, record: CoilRecord])[] = [3, 24, 60].flatMap((count) =>
  (['A4', 'Letter'] as const).flatMap((paper) => [
    [`${count} positions, ${paper}`, ranged(count, paper, count > 24 ? 1.08 : 1.3)] as const,
    [`${count} positions with gaps, ${paper}`, ranged(count, paper, 1.12, 1.05)] as const,
  ]),
);

describe('reference sheet, laid out', () => {
  test.each(LAYOUTS)('%s: no text over another, none outside, none below 8 pt', (_name, record) => {
    const pages = layOutReferenceSheet(record, measure);
    expect(pages.length).toBeGreaterThan(0);
    expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
    const texts = pages.flatMap((page) => page.shapes.filter((shape) => shape.shape === 'text'));
    expect(texts.length).toBeGreaterThan(record.windings[0]!.taps.length * 20);
  });

  test('names that take several lines, and a band narrower than its words', () => {
    const record = { ...ranged(3, 'A4'), job: 'A name of some length for a coil '.repeat(2).trim() };
    const narrow = { ...record, demand: { ...record.demand, bandLowKhz: 9000, bandHighKhz: 9100 } };
    expect(layoutFaults(layOutReferenceSheet(narrow, measure), referenceFrame, measure)).toEqual([]);
  });
});

describe('the chart', () => {
  const chart: RangeChart = {
    positions: [
      {
        tap: 1,
        lowKhz: 1000,
        lowUncertaintyKhz: 5,
        highKhz: 2000,
        highUncertaintyKhz: 60,
        secondLowKhz: 3000,
        secondHighKhz: 9000,
      },
      {
        tap: 2,
        lowKhz: 600,
        lowUncertaintyKhz: 1,
        highKhz: 900,
        highUncertaintyKhz: 1,
        secondLowKhz: null,
        secondHighKhz: null,
      },
    ],
    band: { lowKhz: 530, highKhz: 1700 },
  };

  test('draws every bar where its frequencies lie on the axis', () => {
    const axis = axisOf(chart, 180 - 9 - 20);
    expect(axis.low).toBeCloseTo(530 / 1.08, 9);
    expect(axis.high).toBeCloseTo(2 * 2060 * 1.08, 9);
    const { shapes } = drawRangeChart(chart, 180, 8, measure);
    const outlines = shapes.flatMap((shape) =>
      shape.shape === 'polyline' && shape.weight === 'thin' && shape.dash !== 'dashed' ? [shape.points] : [],
    );
    const bars = outlines.map((points) => [Math.min(...points.map(([x]) => x)), Math.max(...points.map(([x]) => x))]);
    const wanted = chart.positions.map(({ lowKhz, highKhz }) => [lowKhz, highKhz].map((kHz) => 9 + placeOn(axis, kHz)));
    expect(bars).toEqual(wanted);
    // Logarithmic: equal ratios take equal lengths.
    expect(placeOn(axis, 2000) - placeOn(axis, 1000)).toBeCloseTo(placeOn(axis, 1200) - placeOn(axis, 600), 9);
    const texts = shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : []));
    // The second reaches up to 900 kHz, 10 % short of the first's 1000 kHz.
    expect(texts).toEqual(expect.arrayContaining(['gap 10.0 %', 'band 530 – 1700 kHz', '1000', 'kHz', 'm']));
    const wave = shapes.find((shape) => shape.shape === 'text' && shape.text === '300');
    expect(wave?.shape === 'text' && wave.x).toBeCloseTo(9 + placeOn(axis, 299_792.458 / 300), 9);
  });

  test('writes as many round values as do not touch', () => {
    const axis = { low: 95, high: 2100, lengthMm: 150 };
    const at = (kHz: number) => placeOn(axis, kHz);
    expect(written(axis, at, () => 8, 1)).toEqual(expect.arrayContaining([100, 200, 500, 1000, 2000]));
    for (const lengthMm of [12, 40, 150, 400]) {
      const places = written(
        axis,
        (kHz) => placeOn({ ...axis, lengthMm }, kHz),
        () => 8,
        1,
      ).map((kHz) => placeOn({ ...axis, lengthMm }, kHz));
      expect(places.length).toBeGreaterThan(0);
      for (const [i, place] of places.entries()) if (i > 0) expect(place - places[i - 1]!).toBeGreaterThanOrEqual(9);
    }
  });
});

describe('reference sheet, read back', () => {
  test('prints the figures of a survey', async () => {
    const text = `name: Read back
coil: { former-diameter: 76.2 mm, wire: 24 AWG enamel, turns: 60, pitch: 0.6 mm, taps: [20, 40] }
set: { capacitor: 15 pF to 380 pF }
band: 530 kHz to 1700 kHz`;
    const record = surveyRecordOf(readCoilFile(text, 'x'), '9.9.9');
    const pdf = await readPdf(await referenceSheet(record));
    const cells = pdf.pages.flatMap((page) => page.texts.map((one) => one.text));
    const all = cells.join(' ').replace(/\s+/g, ' ');
    let checked = 0;
    const has = (wanted: string) => {
      expect(cells).toContain(wanted);
      checked++;
    };
    for (const tap of record.windings[0]!.taps) {
      has(tap.inductanceUh.toPrecision(4));
      has(tap.working.q.toFixed(0));
      for (const end of tap.ends) {
        has(end.frequencyKhz >= 1000 ? end.frequencyKhz.toFixed(0) : end.frequencyKhz.toFixed(1));
        has(end.q.toFixed(0));
      }
    }
    for (const { kind, note } of record.switchKinds) {
      expect(all).toContain(note);
      expect(all).toContain(`${kind.charAt(0).toUpperCase()}${kind.slice(1)}`);
    }
    for (const wanted of [record.job, record.hash.slice(0, 12), 'set.stray: 12 pF', 'band 530 – 1700 kHz'])
      expect(all).toContain(wanted);
    console.log(`reference sheet: ${checked} printed figures agree with the record`);
    expect(checked).toBe(3 * 8);
    expect([pdf.title, pdf.printScaling, pdf.language]).toEqual(['Reference sheet: Read back', 'None', 'en']);
  });

  test('is the same for the same record, and made of records of a plan and of ones without a set', async () => {
    const record = sampleRecord();
    expect(Buffer.compare(Buffer.from(await referenceSheet(record)), Buffer.from(await referenceSheet(record)))).toBe(
      0,
    );
    const bare = 'coil: { mean-diameter: 76 mm, wire: 24 AWG enamel, turns: 6, pitch: 1 mm }';
    const alone = surveyRecordOf(readCoilFile(bare, 'x'), '9.9.9');
    const pages = layOutReferenceSheet(alone, measure);
    expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
    expect(alone.windings[0]!.taps[0]!.range).toBeNull();
  });
});
