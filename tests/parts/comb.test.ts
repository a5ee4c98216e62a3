import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { combViews } from '../../src/drawing/parts/comb-views.ts';
import { Fault } from '../../src/fault.ts';
import { combDimensions, combParts } from '../../src/parts/comb.ts';
import { textWidthMm } from '../../src/parts/lettering.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, jigsOf, keepsJigRules } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import type { Facet } from '../helpers/stl.ts';

const PLACE_MM = 0.005;

interface Wound {
  readonly pitchMm: number;
  readonly bareMm?: number;
  readonly overallMm?: number;
  readonly turns?: number;
  readonly lineMm?: number;
}

function spaced({ turns = 40.25, lineMm = 0.45, ...wire }: Wound): CoilRecord {
  const record = sampleRecord({ surface: 'smooth', turns: [turns], ...wire });
  return { ...record, printer: { ...record.printer, lineMm } };
}

/** Where upright faces that look along x stand, between two heights. */
function facesAlongX(facets: readonly Facet[], low: number, high: number): number[] {
  const found = facets
    .filter(
      ({ normal, corners }) =>
        Math.abs(normal[0]) > 0.999 && corners.every(([, y]) => y >= low - 1e-3 && y <= high + 1e-3),
    )
    .map(({ corners: [c] }) => c[0]);
  return [...new Set(found.map((x) => Math.round(x * 1e4) / 1e4))].sort((a, b) => a - b);
}

function faultOf(record: CoilRecord) {
  try {
    combParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!;
    throw error;
  }
  return null;
}

describe('pitch comb', () => {
  test('keeps the rules of jigs, or is refused, at random', async () => {
    let made = 0;
    let refused = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.record({
          overallUm: fc.integer({ min: 100, max: 2000 }),
          gapUm: fc.integer({ min: 20, max: 3000 }),
          lineMm: fc.double({ min: 0.25, max: 0.9, noNaN: true }),
          turns: fc.integer({ min: 8, max: 200 }),
        }),
        async ({ overallUm, gapUm, lineMm, turns }) => {
          const overallMm = overallUm / 1000;
          const record = spaced({
            pitchMm: (overallUm + gapUm) / 1000,
            overallMm,
            bareMm: 0.9 * overallMm,
            turns: turns / 4,
            lineMm,
          });
          const fault = faultOf(record);
          if (fault) {
            expect(fault.code).toMatch(/^comb-(pitch-fine|few-turns)$/);
            refused++;
            return;
          }
          const [comb] = await jigsOf(combParts(record));
          keepsJigRules(comb!);
          const d = combDimensions(record);
          expect(d.toothMm).toBeGreaterThanOrEqual(lineMm - 1e-9);
          if (d.teeth > 2) expect(d.everyTurns * d.pitchMm - d.toothMm).toBeGreaterThanOrEqual(lineMm - 1e-9);
          expect((d.teeth - 1) * d.everyTurns).toBeLessThan(d.gaugedTurns);
          for (const { text, x, heightMm } of d.words)
            expect(Math.abs(x) + textWidthMm(text, heightMm) / 2 + 0.3).toBeLessThan(d.lengthMm / 2);
          made++;
        },
      ),
      { numRuns: 16, seed: 4 },
    );
    console.log(`comb: ${made} made, ${refused} refused`);
    expect(made).toBeGreaterThan(8);
    expect(refused).toBeGreaterThan(0);
  });

  test.each([
    ['between the wires', 1.4, 1, 'between'],
    ['in the valleys', 0.9, 1, 'valley'],
    ['every second turn', 0.85, 2, 'valley'],
  ] as const)('its teeth and notches, read back: %s', async (_, pitchMm, every, seat) => {
    const record = spaced({ pitchMm });
    const d = combDimensions(record);
    expect([d.everyTurns, d.seat]).toEqual([every, seat]);
    const [comb] = await jigsOf(combParts(record));
    const middle = d.heightMm / 2;
    const flanks = facesAlongX(comb!.facets, -middle, -middle + d.toothLengthMm);
    expect(flanks).toHaveLength(2 * d.teeth);
    for (let k = 0; k < d.teeth; k++) {
      expect(Math.abs(flanks[2 * k + 1]! - flanks[2 * k]! - d.toothMm)).toBeLessThan(PLACE_MM);
      if (k > 0) expect(Math.abs(flanks[2 * k]! - flanks[2 * k - 2]! - every * pitchMm)).toBeLessThan(PLACE_MM);
    }
    if (seat === 'between') {
      // The widest wire keeps a tenth of a millimetre of play.
      const space = flanks[2]! - flanks[1]!;
      expect(Math.abs(space - record.windings[0]!.wire.overallHighMm - 0.1)).toBeLessThan(PLACE_MM);
    }
    const jaws = facesAlongX(comb!.facets, middle - d.notchDepthMm, middle);
    expect(jaws).toHaveLength(4);
    const nominal = 19 * pitchMm + record.windings[0]!.wire.overallMm;
    // Positions in the record are rounded to a tenth of a micrometre.
    expect(Math.abs((jaws[1]! - jaws[0]! + jaws[3]! - jaws[2]!) / 2 - nominal)).toBeLessThan(PLACE_MM);
    expect(Math.abs(jaws[1]! - jaws[0]! - nominal - Math.max(0.01 * nominal, 0.15))).toBeLessThan(PLACE_MM);
    expect(d.words.map(({ text }) => text)).toContain(`20 TURNS ${Number(nominal.toFixed(2))}`);
    expect(comb!.triangles).toBeLessThan(8000);
  });

  test('a pitch too fine is refused with the nearest pitch and line that work', () => {
    const record = spaced({ pitchMm: 0.35, overallMm: 0.3, bareMm: 0.27 });
    const fault = faultOf(record)!;
    expect(fault.code).toBe('comb-pitch-fine');
    expect(fault.got).toContain('0.35 mm');
    const pitchMm = Number(/pitch of ([\d.]+) mm or more/.exec(fault.expected)![1]);
    expect(faultOf(spaced({ pitchMm, overallMm: 0.3, bareMm: 0.27 }))).toBeNull();
    expect(faultOf(spaced({ pitchMm: pitchMm - 0.002, overallMm: 0.3, bareMm: 0.27 }))?.code).toBe('comb-pitch-fine');
    const finer = faultOf(spaced({ pitchMm: 0.35, overallMm: 0.3, bareMm: 0.27 }))!;
    const lineMm = Number(/line to ([\d.]+) mm or less/.exec(finer.todo)![1]);
    expect(faultOf(spaced({ pitchMm: 0.35, overallMm: 0.3, bareMm: 0.27, lineMm }))).toBeNull();
  });

  test('a winding of one turn has nothing to comb, one of two has', () => {
    expect(faultOf(spaced({ pitchMm: 1.4, turns: 1.75 }))?.code).toBe('comb-few-turns');
    expect(faultOf(spaced({ pitchMm: 1.4, turns: 2 }))).toBeNull();
  });

  test('its views have the size of the part', () => {
    const record = spaced({ pitchMm: 1.4 });
    const [{ expected }] = combParts(record) as [ReturnType<typeof combParts>[number]];
    const [plan, elevation] = combViews(record).comb!;
    expect(extentOf(plan!)[0]).toBeCloseTo(2 * expected.maxMm[0], 6);
    expect(extentOf(plan!)[1]).toBeCloseTo(2 * expected.maxMm[1], 6);
    expect(extentOf(elevation!)[1]).toBeCloseTo(expected.maxMm[2], 6);
    expect(plan!.dimensions.some((each) => each.text === '19 x 1.4 = 26.6')).toBe(true);
  });
});
