import { describe, expect, test } from 'vitest';
import { chartScales, drawControlChart, figureText, sharedStart } from '../../src/drawing/control-chart.ts';
import { heightOf } from '../../src/drawing/value-axis.ts';
import { chartsOf } from '../../src/prove/charts.ts';
import type { Chart } from '../../src/prove/charts-schema.ts';
import { chartSchema } from '../../src/prove/charts-schema.ts';
import type { KindReadings } from '../../src/prove/types.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { chartFrame, controlCharts, layOutControlCharts } from '../../src/sheets/control-charts.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { measured } from '../prove/measured.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** The sample with the check of the former, as a plan has it. */
function withFormer(record: CoilRecord): CoilRecord {
  const of = record.former.outsideDiameterMm;
  const check = {
    what: 'Former, outside diameter',
    low: of - 0.15,
    nominal: of,
    high: of + 0.15,
    unit: 'mm',
    digits: 2,
  };
  return { ...record, checks: [check, ...record.checks] };
}

const record = withFormer(sampleRecord());
const long = (i: number) => `A-RATHER-LONG-SERIAL-OF-LAKESIDE/${`${i + 1}`.padStart(5, '0')}`;

const KINDS: readonly KindReadings[] = [
  measured({ record, count: 8 }),
  measured({ record, count: 30, seed: 4 }),
  measured({ record, count: 31, seed: 5, off: { 12: 2.1, 13: -1.9, 25: 60 } }),
  measured({
    record,
    count: 200,
    seed: 8,
    off: { 40: 2, 41: -2.2, 150: 3 },
    shift: { from: 170, percent: 0.4 },
    serial: long,
  }),
  measured({
    record: withFormer(
      sampleRecord({ paper: 'Letter', job: 'A coil with a name that is longer than its use is wide' }),
    ),
    count: 300,
    seed: 9,
    off: Object.fromEntries(Array.from({ length: 9 }, (_, i) => [5 + i, i % 2 === 0 ? 9 : -8])),
  }),
  measured({ record, count: 12, percent: 0 }),
];

const MARK_AT = (chart: Chart, index: number, value: number, width: number, height: number) => {
  const scales = chartScales(chart, width, height, measure);
  return [scales.x(index), heightOf(scales.values, value)] as const;
};

describe('charts of a kind', () => {
  test('one for each tap and for the former, as the schema has them, points in the order of the file', () => {
    for (const kind of KINDS) {
      const charts = chartsOf(kind);
      expect(charts.map(({ key }) => key)).toEqual(['uh-5', 'uh-4', 'uh-3', 'uh-2', 'uh-1', 'former']);
      for (const chart of charts) {
        expect(chartSchema.parse(chart)).toEqual(chart);
        expect(chart.points.map(({ serial }) => serial)).toEqual(kind.coils.map(({ serial }) => serial));
      }
    }
  });

  test('outliers are those planted, and do not widen the limits', () => {
    const [whole] = chartsOf(KINDS[2]!);
    expect(whole!.points.flatMap(({ outlier }, i) => (outlier ? [i] : []))).toEqual([12, 13, 25]);
    expect(whole!.points.flatMap(({ beyond }, i) => (beyond ? [i] : []))).toEqual([12, 13, 25]);
    // Planted: 0.3 % and 0.1 % together, three of them either way 0.95; limits of 28 values know it to a third.
    expect(whole!.upper - whole!.lower).toBeGreaterThan(1.3);
    expect(whole!.upper - whole!.lower).toBeLessThan(2.5);
    expect([whole!.inControl, whole!.capability, whole!.noCapability]).toEqual([false, null, 'not in control']);
  });

  test('capability only from 25 coils on and in control', () => {
    expect(chartsOf(KINDS[0]!)[0]!.noCapability).toBe('few coils');
    const [whole] = chartsOf(KINDS[1]!);
    expect(whole!.noCapability).toBeNull();
    // 2.3 % over three standard deviations of 0.316 %, and three standard errors of 30 coils.
    expect(Math.abs(whole!.capability!.cp - 2.3 / 0.949)).toBeLessThan(1);
    expect(chartsOf(KINDS[5]!)[5]!.noCapability).toBe('few coils');
  });

  test('fewer than eight readings have no chart; a meter at another frequency is told and left out; the last reading counts', () => {
    const kind = KINDS[0]!;
    const changed = (change: (readings: KindReadings['coils'][number]['readings'], i: number) => typeof readings) => ({
      ...kind,
      coils: kind.coils.map((coil, i) => ({ ...coil, readings: change(coil.readings, i) })),
    });
    const fewer = changed((readings, i) => (i === 3 ? readings.filter(({ tap }) => tap !== 2) : readings));
    expect(chartsOf(fewer).map(({ key }) => key)).not.toContain('uh-2');
    const nine = measured({ record, count: 9 });
    const other = {
      ...nine,
      coils: nine.coils.map((coil, i) =>
        i === 4 ? { ...coil, readings: coil.readings.map((one) => ({ ...one, frequencyKhz: 1 })) } : coil,
      ),
    };
    expect(chartsOf(other)[0]!.leftOut).toEqual([nine.coils[4]!.serial]);
    expect(chartsOf(other)[0]!.points.length).toBe(8);
    const twice = changed((readings) => [...readings, { ...readings.find(({ tap }) => tap === 5)!, value: 131 }]);
    expect(new Set(chartsOf(twice)[0]!.points.map(({ value }) => value)).size).toBe(1);
  });

  test('where most coils were read by resonance and none by the meter, the chart is of the resonance', () => {
    const byResonance = (coil: KindReadings['coils'][number]) => ({
      ...coil,
      readings: coil.readings.map((one) =>
        one.tap === 5
          ? {
              ...one,
              quantity: 'resonance' as const,
              capacitancePf: 330,
              frequencyKhz: null,
              value: 760 + coil.serial.length,
            }
          : one,
      ),
    });
    const charts = chartsOf({ record, coils: KINDS[1]!.coils.map(byResonance) });
    const { frequencyKhz } = record.measuring.resonances.find(
      ({ tap, capacitancePf }) => tap === 5 && capacitancePf === 330,
    )!;
    expect([charts[0]!.key, charts[0]!.nominalOf]).toEqual(['khz-5-330', frequencyKhz]);
    expect(charts[0]!.points[0]!.value).toBeCloseTo(100 * (765 / frequencyKhz - 1), 3);
    expect(charts[0]!.noCapability).toBe('no spread');
  });
});

describe('control charts, laid out', () => {
  test('8 to 300 coils: no text over another or outside its frame', () => {
    let pages = 0;
    for (const kind of KINDS) {
      const laid = layOutControlCharts([{ record: kind.record, charts: chartsOf(kind) }], measure);
      expect(layoutFaults(laid, chartFrame, measure)).toEqual([]);
      pages += laid.length;
    }
    console.log(`pages of control charts laid out: ${pages}`);
    expect(pages).toBe(6 * KINDS.length);
  });

  test('every value that is in the picture stands at its place and its mark has its shape', () => {
    let marks = 0;
    for (const kind of KINDS)
      for (const chart of chartsOf(kind)) {
        const { shapes } = drawControlChart(chart, 260, 120, measure);
        chart.points.forEach(({ value, beyond, run }, index) => {
          if (beyond) return;
          const [x, y] = MARK_AT(chart, index, value, 260, 120);
          const own = shapes.filter((shape) => shape.shape === 'circle' && shape.name === `value ${index}`);
          expect(own).toEqual([expect.objectContaining({ x, y, fill: run ? 1 : 0 })]);
          marks++;
        });
        const squares = shapes.filter(
          (shape) => shape.shape === 'polyline' && shape.fill === 0 && shape.points.length === 4,
        );
        expect(squares.length).toBeLessThanOrEqual(
          chart.points.filter(({ beyond }) => beyond).length +
            chart.points.filter(({ rangeBeyond }) => rangeBeyond).length,
        );
      }
    console.log(`marks of values found in their places: ${marks}`);
    expect(marks).toBeGreaterThan(3000);
  });

  test('serials lose what all of them begin with', () => {
    expect(sharedStart(['LAKE-1-01', 'LAKE-1-02'])).toBe('LAKE-1'.length);
    expect(sharedStart(['A1', 'A2'])).toBe(0);
    expect(sharedStart(['A-1'])).toBe(0);
  });
});

describe('control charts, read back', () => {
  test('limits, outliers with their serials and the verdict stand on the page; same charts, same bytes', async () => {
    const charts = chartsOf(KINDS[2]!);
    const bytes = (await controlCharts([{ record, charts }]))!;
    const pdf = await readPdf(bytes);
    expect(pdf.pages.length).toBe(charts.length);
    const texts = pdf.pages[0]!.texts.map(({ text }) => text);
    const [whole] = charts;
    for (const value of [whole!.upper, whole!.lower]) expect(texts).toContain(`limit ${figureText(whole!, value, 2)}`);
    for (const serial of ['V-013', 'V-014', 'V-026'])
      expect(texts.some((text) => text.startsWith(`${serial}: `))).toBe(true);
    expect(texts.some((text) => text.startsWith('Not in control'))).toBe(true);
    expect([pdf.pages[0]!.widthMm > pdf.pages[0]!.heightMm, pdf.printScaling]).toEqual([true, 'None']);
    expect(Buffer.compare(Buffer.from(bytes), Buffer.from((await controlCharts([{ record, charts }]))!))).toBe(0);
    expect(await controlCharts([{ record, charts: [] }])).toBeNull();
  });
});
