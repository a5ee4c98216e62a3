import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { carriageViews } from '../../src/drawing/parts/carriage-views.ts';
import { Fault } from '../../src/fault.ts';
import { carriageParts } from '../../src/parts/carriage.ts';
import { carriageDimensions } from '../../src/parts/carriage-dimensions.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, jigsOf, keepsJigRules, planeDistances } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { withSecondWinding } from '../helpers/second.ts';
import type { Facet } from '../helpers/stl.ts';

function faultOf(record: CoilRecord) {
  try {
    carriageParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!;
    throw error;
  }
  return null;
}

/** Middles of the ticks along the rail, counted from its left end: their walls look along it, at the edge with the ticks. */
function ticksOf(facets: readonly Facet[], out: 1 | -1): number[] {
  const corners = facets.flatMap((facet) => facet.corners);
  const left = Math.min(...corners.map(([x]) => x));
  const edge = Math.max(...corners.map(([, y]) => y));
  const walls = facets.filter(
    ({ normal, corners: three }) =>
      Math.abs(normal[0]) > 0.999 &&
      three.some(([x]) => Math.abs(x) < -left - 0.01) &&
      three.some(([, y]) => Math.abs(out * y - edge) < 1e-3),
  );
  const at = [...new Set(walls.map(({ corners: [c] }) => Number((c[0] - left).toFixed(2))))].sort((a, b) => a - b);
  return at.flatMap((x, i) => (i % 2 === 1 ? [(x + at[i - 1]!) / 2] : []));
}

const changed = (record: CoilRecord, printer: Partial<CoilRecord['printer']>): CoilRecord => ({
  ...record,
  printer: { ...record.printer, ...printer },
});

describe('carriage', () => {
  test('passes every check, fits by the clearance, and has its marks where the record has them, at random', async () => {
    let [marks, made, narrow] = [0, 0, 0];
    await fc.assert(
      fc.asyncProperty(
        fc.constantFrom('sleeve', 'inner', 'beside'),
        fc.integer({ min: 1, max: 30 }),
        fc.integer({ min: 12, max: 60 }),
        fc.integer({ min: 18, max: 110 }),
        fc.integer({ min: 10, max: 60 }),
        fc.integer({ min: 2, max: 9 }),
        async (kind, turns, travelMm, diameterMm, playHundredths, count) => {
          const couplings = Array.from({ length: count }, (_, i) => Number((0.3 - 0.03 * i).toFixed(2)));
          const sample = changed(sampleRecord({ diameterMm }), {
            clearanceMm: playHundredths / 100,
            bedXMm: 400,
          });
          const record = withSecondWinding(sample, { kind, turns, travelMm, couplings });
          const fault = faultOf(record);
          if (fault !== null) {
            expect(fault.code).toBe('carriage-narrow');
            narrow++;
            return;
          }
          const d = carriageDimensions(record);
          const [rail, plug, hub] = await jigsOf(carriageParts(record));
          for (const jig of [rail, plug, hub]) keepsJigRules(jig!);
          const { slide, body } = record.around!.second!;
          // By another way: heights in the frame of the main coil, from the face that the rail's end is flush with.
          const zero = kind === 'inner' ? 0 : record.former.lengthMm - 12;
          const edge = body!.lowMm + body!.lengthMm;
          const wanted = slide!.scale.map((mark) => edge + mark.mm - zero);
          const got = ticksOf(rail!.facets, 1);
          expect(got.length).toBe(wanted.length);
          // Ticks are 0.6 mm wide; binary STL and rounding to hundredths leave one of these.
          got.forEach((x, i) => {
            expect(Math.abs(x - wanted[i]!)).toBeLessThan(0.02);
          });
          marks += got.length;
          const numbered = d.marks.filter(({ text }) => text !== null);
          expect(Number(numbered[0]!.text)).toBe(couplings[0]);
          expect(Number(numbered.at(-1)!.text)).toBe(couplings.at(-1));
          // The rail passes through plug and hub with the clearance in width and height.
          for (const disc of [plug!, hub!]) {
            const inwards = (axis: 0 | 1) =>
              planeDistances(
                disc.facets,
                [0, 0, 0],
                ({ normal, corners }) =>
                  Math.abs(normal[axis]) > 0.999 && corners.every(([x, y]) => Math.hypot(x, y) < d.hub.coreR - 0.5),
              );
            const play = record.printer.clearanceMm;
            expect(Math.abs(2 * Math.min(...inwards(0)) - d.rail.widthMm - play)).toBeLessThan(0.02);
            expect(Math.abs(2 * Math.min(...inwards(1)) - d.rail.heightMm - play)).toBeLessThan(0.02);
          }
          const reach = (facets: readonly Facet[]) =>
            Math.max(...facets.flatMap(({ corners }) => corners.map(([x, y]) => Math.hypot(x, y))));
          expect(2 * reach(plug!.facets)).toBeCloseTo(record.former.boreDiameterMm - record.printer.clearanceMm, 2);
          expect(2 * reach(hub!.facets)).toBeCloseTo(body!.insideDiameterMm - record.printer.clearanceMm, 2);
          // Clear of the plug at the tightest place, on the rail at the loosest.
          const inner = kind === 'sleeve' ? d.tightMm - d.hub.depthMm : d.tightMm - body!.lengthMm;
          expect(inner).toBeGreaterThanOrEqual(d.plug.depthMm - 1e-6);
          expect(d.rail.lengthMm).toBeGreaterThan(d.tightMm + travelMm);
          made++;
        },
      ),
      { numRuns: 9, seed: 12 },
    );
    console.log(`carriage: ${made} made with ${marks} marks read back, ${narrow} too narrow`);
    expect(made).toBeGreaterThan(5);
    expect(marks).toBeGreaterThan(20);
  });

  test('downwards its marks run from the plug in the foot, read the other way up', async () => {
    const record = withSecondWinding(sampleRecord(), { kind: 'beside', travelMm: -30 });
    const { second } = record.around!;
    const body = { ...second!.body!, lowMm: -5 - second!.body!.lengthMm };
    const below = { ...record, around: { ...record.around!, second: { ...second!, body } } };
    const d = carriageDimensions(below);
    expect([d.out, d.railZeroMm]).toEqual([-1, 12]);
    const [rail] = await jigsOf(carriageParts(below));
    keepsJigRules(rail!);
    const got = ticksOf(rail!.facets, -1);
    expect(got.length).toBe(5);
    got.forEach((x, i) => {
      expect(Math.abs(x - (12 + 5 + body.lengthMm + 7.5 * i))).toBeLessThan(0.02);
    });
  });

  test('what stays in its place is put there by the length of the rail', () => {
    for (const kind of ['inner', 'beside'] as const) {
      const record = withSecondWinding(sampleRecord(), { kind });
      const d = carriageDimensions(record);
      const { lowMm, lengthMm } = record.around!.second!.body!;
      expect(d.marks).toEqual([]);
      expect(d.railZeroMm + d.out * d.rail.lengthMm).toBeCloseTo(d.out > 0 ? lowMm + lengthMm : lowMm, 6);
    }
    expect(faultOf(withSecondWinding(sampleRecord(), { kind: 'sleeve' }))?.code).toBe('carriage-not-needed');
  });

  test('its views have the sizes of the parts', () => {
    const record = withSecondWinding(sampleRecord(), { kind: 'inner', travelMm: 25 });
    const views = carriageViews(record);
    for (const { part, expected } of carriageParts(record)) {
      const [plan, side] = views[part]!;
      const wide = expected.maxMm.map((most, i) => most - expected.minMm[i]!);
      expect(extentOf(plan!)).toEqual([expect.closeTo(wide[0]!, 4), expect.closeTo(wide[1]!, 4)]);
      expect(extentOf(side!)[1]).toBeCloseTo(wide[2]!, 6);
    }
  });

  test('refused without a second winding, in a narrow bore, on a small bed, with what works', () => {
    expect(faultOf(sampleRecord())?.code).toBe('no-second-former');
    const narrow = (insideMm: number) =>
      withSecondWinding(sampleRecord(), { kind: 'inner', travelMm: 20, insideMm, outsideMm: insideMm + 2.7 });
    const fault = faultOf(narrow(8))!;
    expect(fault.code).toBe('carriage-narrow');
    const least = Number(/^([\d.]+) mm or more/.exec(fault.expected)![1]);
    expect(faultOf(narrow(least))).toBeNull();
    expect(faultOf(narrow(least - 0.2))?.code).toBe('carriage-narrow');

    const far = changed(withSecondWinding(sampleRecord(), { kind: 'sleeve', travelMm: 100 }), {
      bedXMm: 110,
      bedYMm: 100,
    });
    const long = faultOf(far)!;
    expect(long.code).toBe('carriage-long');
    const loosest = Number(/coupling at ([\d.]+)/.exec(long.todo)![1]);
    const { slide } = far.around!.second!;
    const scale = slide!.scale.filter(({ coupling }) => coupling >= loosest);
    expect(scale.length).toBeLessThan(slide!.scale.length);
    const shorter = { travelMm: scale.at(-1)!.mm, scale };
    expect(
      faultOf({ ...far, around: { ...far.around!, second: { ...far.around!.second!, slide: shorter } } }),
    ).toBeNull();
  });
});
