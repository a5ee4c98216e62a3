import { describe, expect, test } from 'vitest';
import { placeOn, written } from '../../src/drawing/log-axis.ts';
import { axisOf, drawRangeChart, type RangeChart } from '../../src/drawing/range-chart.ts';
import { curveAxes, drawTuningCurves } from '../../src/drawing/tuning-curves.ts';
import { explainTap } from '../../src/explain/explain.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { tidy } from '../../src/quantity/format.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { PAPER_MM, Paper } from '../../src/sheets/page.ts';
import { exampleTap } from '../../src/sheets/reference-explained.ts';
import { layOutReferenceSheet, referenceFrame, referenceSheet } from '../../src/sheets/reference-sheet.ts';
import { wafersOf } from '../../src/sheets/reference-wiring.ts';
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
    [
      `${count} positions${paper === 'Letter' ? ' with gaps' : ''}, ${paper}`,
      paper === 'Letter' ? ranged(count, paper, 1.12, 1.05) : ranged(count, paper, count > 24 ? 1.08 : 1.3),
    ] as const,
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
    const axis = axisOf(chart, 180 - 9 - 25);
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

const PLAN_KINDS = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;

describe('switch wiring', () => {
  test.each(PLAN_KINDS)(
    '%s: every tap on the contact of its number, common and start as the earthed end says',
    (rest) => {
      let wired = 0;
      for (const unitTurns of [[], [1, 2, 3, 4, 5, 6, 7, 8, 9]])
        for (const earthedEnd of ['start', 'finish'] as const) {
          const plain = sampleRecord({ turns: [10, 20, 30, 40], unitTurns });
          const record = {
            ...plain,
            frame: { ...plain.frame, earthedEnd },
            surroundings: { ...plain.surroundings, rest },
          };
          const wafers = wafersOf(record);
          const two = unitTurns.length > 0;
          expect(wafers.length).toBe((two ? 2 : 1) * (rest === 'disconnected' ? 2 : 1));
          const tens = wafers[0]!;
          expect(tens.contacts.map(({ number, name }) => `${number} ${name}`)).toEqual([
            '1 tap 1',
            '2 tap 2',
            '3 tap 3',
            '4 F',
          ]);
          // Hot where the start, or the units' common, is earthed.
          expect(tens.common === 'earth').toBe(earthedEnd === 'finish');
          expect(tens.link).toBe(rest === 'shorted' ? 'last' : null);
          expect(tens.bridge).toBe(rest === 'shorted in sections' ? 'behind' : null);
          if (two) {
            const units = wafers[rest === 'disconnected' ? 2 : 1]!;
            expect(units.contacts[0]).toEqual({ number: '0', name: 'S' });
            expect(units.contacts[9]).toEqual({ number: '9', name: 'u9' });
            expect(units.common === 'earth').toBe(earthedEnd === 'start');
            expect([units.link, units.bridge]).toEqual([
              rest === 'shorted' ? 'first' : null,
              rest === 'shorted in sections' ? 'before' : null,
            ]);
          }
          const pages = layOutReferenceSheet(record, measure);
          expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
          wired += wafers.length;
        }
      console.log(`switch wiring, ${rest}: ${wired} wafers`);
      expect(wired).toBe(rest === 'disconnected' ? 12 : 6);
    },
  );

  test('from behind every contact is mirrored about the middle of its view', () => {
    const record = sampleRecord({ turns: [10, 20, 30, 40, 50] });
    const [wafer] = wafersOf(record);
    const circles = layOutReferenceSheet(record, measure)
      .flatMap((page) => page.shapes)
      .flatMap((shape) => (shape.shape === 'circle' && shape.name?.startsWith('contact') ? [shape] : []));
    expect(circles.length).toBe(2 * wafer!.contacts.length);
    const half = PAPER_MM.A4[0] / 2;
    for (const { number } of wafer!.contacts) {
      const [front, behind] = circles.filter(({ name }) => name === `contact ${number}`);
      // The front is drawn left, the back right, each in the middle of its half of the page's width.
      expect(front!.y).toBeCloseTo(behind!.y, 9);
      expect(front!.x + behind!.x).toBeCloseTo(2 * half, 9);
    }
    // Clockwise from the front: the first three rise and go right.
    const fronts = circles.slice(0, 5);
    for (const [i, { x }] of fronts.entries()) if (i > 0) expect(x).toBeGreaterThan(fronts[i - 1]!.x);
  });
});

describe('the rest of the sheet', () => {
  const textsOf = (record: Parameters<typeof layOutReferenceSheet>[0]) =>
    layOutReferenceSheet(record, measure).flatMap((page) =>
      page.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : [])),
    );

  test('draws every curve through its points', () => {
    const record = sampleRecord();
    const { taps } = record.windings[0]!;
    const curves = taps.map(({ tap, curve }) => ({ tap, points: curve }));
    const drawn = { curves, fixedPf: 72, band: null };
    const [pf, kHz] = curveAxes(drawn, 186, 150);
    const lines = drawTuningCurves(drawn, 186, 150, measure).shapes.filter(
      (shape) => shape.shape === 'polyline' && !shape.closed,
    );
    expect(lines.length).toBe(taps.length);
    lines.forEach((line, i) => {
      if (line.shape !== 'polyline') return;
      line.points.forEach(([x, y], k) => {
        const point = taps[i]!.curve[k]!;
        expect(x - 13).toBeCloseTo(placeOn(pf, point.capacitancePf), 9);
        expect(y - 11).toBeCloseTo(placeOn(kHz, point.frequencyKhz), 9);
      });
    });
  });

  test('tells why this coil and lists the others; with no set it says what it leaves out', () => {
    const record = sampleRecord();
    const texts = textsOf(record);
    const all = texts.join(' ');
    expect(all).toContain(record.chosen.why.slice(1, 20));
    for (const other of record.alternatives) {
      expect(all).toContain(other.wire);
      for (const cell of [`${other.formerMm}`, other.wireM.toFixed(2), other.lossFactor.toFixed(5)])
        expect(texts).toContain(cell);
    }
    const winding = record.windings[0]!;
    const taps = winding.taps.map((tap) => ({ ...tap, range: null, ends: [], curve: [] }));
    const alone = { ...record, demand: { ...record.demand, set: null }, windings: [{ ...winding, taps }] };
    const told = textsOf(alone);
    expect(told.join(' ')).toContain('Tuning curves are left out');
    expect(told).not.toContain('at');
    expect(layoutFaults(layOutReferenceSheet(alone, measure), referenceFrame, measure)).toEqual([]);
  });

  test('works the figures of one tap out again, and prints inches where they are wanted', () => {
    const record = sampleRecord();
    const explained = explainTap(record, exampleTap(record));
    const all = textsOf(record).join(' ');
    let told = 0;
    for (const { figure, value, unit } of explained.figures.slice(3)) {
      const name = figure.charAt(0).toUpperCase() + figure.slice(1);
      expect(all).toContain(`${name}: ${tidy(value, 5)}${unit === '' ? '' : ` ${unit}`}`);
      told++;
    }
    expect(told).toBeGreaterThan(8);
    console.log(`reference sheet: ${told} figures explained`);
    for (const units of ['inch', 'both'] as const) {
      const pages = layOutReferenceSheet({ ...record, units }, measure);
      expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
      const inches = pages.flatMap((page) =>
        page.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : [])),
      );
      const cell = (record.alternatives[0]!.lengthMm / 25.4).toFixed(3);
      expect(inches).toContain(units === 'inch' ? cell : `(${cell})`);
    }
  });
});
