import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, sheetFrame } from '../../src/sheets/winding-sheet.ts';
import { evenTurns, fullRecord, layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

interface Bench {
  readonly units: 'metric' | 'inch' | 'both';
  readonly meterName: string | null;
  readonly meterKhz: number;
  readonly capacitors: number;
  readonly untrusted: number;
  readonly strands: number;
  readonly covering: 'enamel' | 'double cotton' | 'bare';
}

/** The same coil on another bench: its meter, capacitors and units, and its meter not trusted on the first taps. */
function onBench(record: CoilRecord, at: Bench): CoilRecord {
  const { measuring, shop, windings } = record;
  const whole = windings[0]!.taps.length;
  const capacitorsPf = [47, 100, 330, 1000].slice(0, at.capacitors);
  const doubts = ['leads', 'resistance', 'capacitance'] as const;
  const first = at.untrusted < whole ? at.untrusted + 1 : null;
  return {
    ...record,
    units: at.units,
    shop: { ...shop, meterName: at.meterName, meterKhz: at.meterKhz, capacitorsPf },
    windings: windings.map((winding) => ({
      ...winding,
      wire: { ...winding.wire, strands: at.strands, covering: at.covering },
    })),
    measuring: {
      ...measuring,
      meter: measuring.meter.map((one) => {
        if (one.tap > at.untrusted) return one;
        const doubt = doubts[one.tap % 3]!;
        return doubt === 'capacitance'
          ? { ...one, doubt, readingUh: null, lowUh: null, highUh: null }
          : { ...one, doubt };
      }),
      fromTap: first,
      toTap: first === null ? null : whole,
      resonances: windings[0]!.taps.flatMap(({ tap }) =>
        capacitorsPf.map((capacitancePf) => {
          const one = measuring.resonances.find((each) => each.tap === tap)!;
          return { ...one, capacitancePf };
        }),
      ),
    },
  };
}

describe('winding sheet, laid out', () => {
  const names = ['Set', `Long ${'name of a job for the upper workshop '.repeat(5)}`, 'Unbroken'.repeat(20)];
  const units = ['metric', 'inch', 'both'] as const;
  const cases = [3, 24].flatMap((taps) =>
    (['A4', 'Letter'] as const).flatMap((paper) =>
      [false, true].flatMap((staggered) =>
        names.map((job, i) => ({ taps, paper, staggered, job, units: units[(i + taps) % 3]! })),
      ),
    ),
  );

  test('nothing overlaps, leaves the margins or is too small', () => {
    let boxes = 0;
    for (const { taps, paper, staggered, job, units } of cases) {
      const turns = evenTurns(taps, 96, staggered);
      const record = { ...fullRecord({ turns, paper, job, diameterMm: 76 }), units };
      const pages = layOutWindingSheet(record, measure);
      expect(layoutFaults(pages, sheetFrame, measure), `${taps} taps, ${paper}, ${units}, ${job.slice(0, 12)}`).toEqual(
        [],
      );
      boxes += layoutBoxes(pages, measure).length;
    }
    console.log(`winding sheet: ${cases.length} layouts, ${boxes} texts`);
    expect(boxes).toBeGreaterThan(1000);
  });

  test('the same over random records', () => {
    let runs = 0;
    const options = fc.record({
      hand: fc.constantFrom('right' as const, 'left' as const),
      kind: fc.constantFrom('printed' as const, 'tube' as const),
      surface: fc.constantFrom('smooth' as const, 'grooved' as const),
      paper: fc.constantFrom('A4' as const, 'Letter' as const),
      method: fc.constantFrom('twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in'),
      taps: fc.integer({ min: 1, max: 24 }),
      whole: fc.integer({ min: 25, max: 150 }),
      staggered: fc.boolean(),
      diameterMm: fc.double({ min: 12, max: 160, noNaN: true }),
      stepWords: fc.integer({ min: 1, max: 60 }),
      job: fc.string({ minLength: 1, maxLength: 160 }),
    });
    const bench = fc.record({
      units: fc.constantFrom(...units),
      meterName: fc.option(fc.string({ minLength: 1, maxLength: 120 })),
      meterKhz: fc.constantFrom(0.12, 1, 100, 1234.567),
      capacitors: fc.integer({ min: 0, max: 4 }),
      untrusted: fc.integer({ min: 0, max: 24 }),
      strands: fc.constantFrom(1, 20),
      covering: fc.constantFrom('enamel' as const, 'double cotton' as const, 'bare' as const),
    });
    fc.assert(
      fc.property(options, bench, ({ taps, whole, staggered, method, ...rest }, at) => {
        const record = fullRecord({ ...rest, method: method as 'lug', turns: evenTurns(taps, whole, staggered) });
        const changed = onBench(record, at);
        expect(layoutFaults(layOutWindingSheet(changed, measure), sheetFrame, measure)).toEqual([]);
        runs++;
      }),
      { seed: 20, numRuns: 40 },
    );
    console.log(`winding sheet: ${runs} random records laid out`);
    expect(runs).toBe(40);
  });

  test.each(['metric', 'inch', 'both'] as const)('two pages for 3 to 15 taps, in %s', (units) => {
    let sheets = 0;
    for (let taps = 3; taps <= 15; taps += 3)
      for (const paper of ['A4', 'Letter'] as const) {
        const record = { ...sampleRecord({ turns: evenTurns(taps, 96, false), paper, diameterMm: 76 }), units };
        const pages = layOutWindingSheet(record, measure);
        expect(layoutFaults(pages, sheetFrame, measure)).toEqual([]);
        expect(pages.length, `${taps} taps, ${paper}`).toBe(2);
        sheets++;
      }
    console.log(`winding sheet, ${units}: ${sheets} sheets of two pages`);
    expect(sheets).toBe(10);
  });

  test('text set over text is noticed', () => {
    const [page] = layOutWindingSheet(fullRecord(), measure);
    const text = page!.shapes.find((shape) => shape.shape === 'text')!;
    const spoilt = { ...page!, shapes: [...page!.shapes, text] };
    expect(layoutFaults([spoilt], sheetFrame, measure).length).toBe(1);
  });
});
