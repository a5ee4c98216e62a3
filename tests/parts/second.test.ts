import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { secondViews } from '../../src/drawing/parts/second-views.ts';
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { secondParts } from '../../src/parts/second.ts';
import { secondDimensions } from '../../src/parts/second-dimensions.ts';
import { printedOf } from '../../src/record/make.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { search } from '../../src/solve/search.ts';
import { withSecond } from '../../src/solve/second.ts';
import { extentOf, jigsOf, keepsJigRules } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { type SecondOptions, withSecondWinding } from '../helpers/second.ts';
import { type Facet, radialHole } from '../helpers/stl.ts';

const KINDS = ['sleeve', 'inner', 'beside'] as const;

const radii = (facets: readonly Facet[]) => {
  // The circle lies on the chords of a bore and on the corners of an outside.
  const upright = facets.filter(({ normal, area }) => Math.abs(normal[2]) < 1e-3 && area > 0.02);
  const toAxis = ({ normal: n, corners: [c] }: Facet) => n[0] * c[0] + n[1] * c[1];
  const inside = upright.map(toAxis).filter((r) => r < -1);
  const outside = upright
    .filter((facet) => toAxis(facet) > 1)
    .flatMap(({ corners }) => corners.map(([x, y]) => Math.hypot(x, y)));
  return { boreR: -Math.max(...inside), mostR: Math.max(...outside), leastR: Math.min(...outside) };
};

function faultOf(record: CoilRecord) {
  try {
    secondParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!;
    throw error;
  }
  return null;
}

describe('what a second winding is wound on', () => {
  test('is what is described, with its holes at the places of the record, at random', async () => {
    let holes = 0;
    let rims = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.record({
          kind: fc.constantFrom(...KINDS),
          turns: fc.integer({ min: 1, max: 40 }),
          overallMm: fc.integer({ min: 15, max: 100 }).map((x) => x / 100),
          travelMm: fc.constantFrom(0, 12, 35, -20),
          angleDeg: fc.integer({ min: 0, max: 359 }),
        }),
        fc.constantFrom('right', 'left'),
        fc.integer({ min: 20, max: 110 }),
        fc.constantFrom(-0.1, 0, 0.3),
        async (options, hand, diameterMm, more) => {
          const base = sampleRecord({ hand, diameterMm, surface: 'smooth' });
          const record = withSecondWinding(
            { ...base, printer: { ...base.printer, holeCompensationMm: more } },
            options as SecondOptions,
          );
          const [jig] = await jigsOf(secondParts(record));
          keepsJigRules(jig!);
          const { body, holes: wanted, kind, wire } = record.around!.second!;
          for (const { angleDeg, axialMm, diameterMm: wide } of wanted) {
            const got = radialHole(jig!.facets, angleDeg, axialMm - body!.lowMm, wide + more);
            expect(got.walls).toBeGreaterThan(8);
            // Binary STL holds six figures and a half; two hundredths are what a part may be off.
            expect(Math.hypot(got.acrossMm, got.alongMm)).toBeLessThan(0.02);
            expect(Math.abs(got.diameterMm - wide - more)).toBeLessThan(0.02);
            holes++;
          }
          const { boreR, mostR } = radii(jig!.facets);
          expect(Math.abs(2 * boreR - body!.insideDiameterMm)).toBeLessThan(0.02);
          const d = secondDimensions(record);
          expect(Math.abs(mostR - body!.outsideDiameterMm / 2 - d.rimMm)).toBeLessThan(0.02);
          // In a bore no rim stands out farther than the wire, which room was left for.
          if (kind === 'inner') expect(mostR).toBeLessThan(body!.outsideDiameterMm / 2 + wire.overallMm + 0.01);
          if (d.rimMm > 0) {
            rims++;
            const tops = d.holes.map(({ zMm, diameterMm: x }) => zMm + x * Math.SQRT1_2);
            expect(d.lowerRim!.toMm).toBeLessThan(Math.min(...d.holes.map(({ zMm, diameterMm: x }) => zMm - x / 2)));
            expect(d.upperRim!.slopeFromMm).toBeGreaterThan(Math.max(...tops));
            expect(d.upperRim!.toMm).toBeLessThanOrEqual(d.lengthMm);
          }
        },
      ),
      { numRuns: 20, seed: 31 },
    );
    console.log(`second winding: ${holes} holes read back, ${rims} with rims`);
    expect(holes).toBeGreaterThan(60);
    expect(rims).toBeGreaterThan(10);
  });

  test('a sleeve clears winding, rim and taps by the clearance, an inner former the bore, as planned', async () => {
    const SET = 'set: { capacitor: 15 pF to 380 pF }';
    const mains = [
      `job: a\nwant: { inductance: 20 uH to 240 uH, taps: 4 }\n${SET}\nformer: { outside-diameter: 60 mm }\nwire: 0.4 mm enamel\nwinding: { pitch: 1.2 mm }`,
      `job: b\nwant: { inductance: 20 uH to 150 uH, taps: 3 }\n${SET}\nformer: { kind: tube, outside-diameter: 70 mm }\nwire: 0.5 mm enamel\nwinding: { pitch: close, tap-method: twisted loop }`,
    ];
    const seconds = [
      'kind: sleeve, turns: 5, end: finish',
      'kind: inner, turns: 6',
      'kind: sleeve, coupling: 0.2 to 0.3, end: finish',
    ];
    let made = 0;
    for (const main of mains)
      for (const second of seconds) {
        const job = readJob(`${main}\nsecond: { ${second} }`, 'clear.yaml');
        const found = search(job);
        if (!('chosen' in found)) throw new Error('no coil');
        const placed = withSecond(job, found);
        const { record } = printedOf(job, placed);
        const { kind, body, wire } = record.around!.second!;
        const [jig] = await jigsOf(secondParts(record));
        keepsJigRules(jig!);
        const { boreR, mostR } = radii(jig!.facets);
        const winding = record.windings[0]!;
        const play = record.printer.clearanceMm / 2;
        const thick = winding.wire.overallMm;
        const wound = winding.meanDiameterMm / 2 + thick / 2;
        if (kind === 'sleeve') {
          // An end of either winding lies between.
          expect(boreR).toBeGreaterThan(wound + Math.max(thick, wire.overallMm) + play - 1e-3);
          expect(boreR).toBeGreaterThan((record.former.flange?.diameterMm ?? 0) / 2 + play - 1e-3);
          const { taps, coil, method } = placed.chosen;
          for (const { turn } of method.name === 'twisted loop' ? taps.slice(0, -1) : []) {
            const z = coil.positionMm(turn);
            expect(z < body!.lowMm || z > body!.lowMm + body!.lengthMm).toBe(true);
          }
        } else expect(mostR).toBeLessThan(record.former.boreDiameterMm / 2 - thick - play + 1e-3);
        made++;
      }
    console.log(`second winding: ${made} planned ones clear the main coil`);
    expect(made).toBe(6);
  });

  test('its views have the size of the part', () => {
    for (const kind of KINDS) {
      const record = withSecondWinding(sampleRecord(), { kind, travelMm: 20 });
      const [{ part, expected }] = secondParts(record) as [ReturnType<typeof secondParts>[number]];
      const d = secondDimensions(record);
      const [side, end, rolled] = secondViews(record)[part]!;
      const wide = d.outsideMm + 2 * d.rimMm;
      expect(extentOf(side!)[0]).toBeCloseTo(wide, 6);
      expect(extentOf(end!)[1]).toBeCloseTo(wide, 6);
      expect(extentOf(rolled!)).toEqual([
        expect.closeTo(Math.PI * d.outsideMm, 6),
        expect.closeTo(expected.maxMm[2], 6),
      ]);
    }
  });

  test('without one, on the main former, or too tall it is refused with what works', () => {
    expect(faultOf(sampleRecord())?.code).toBe('no-second-former');
    expect(faultOf(withSecondWinding(sampleRecord(), { kind: 'same former' }))?.got).toContain(
      'former of the main one',
    );
    const record = withSecondWinding(sampleRecord(), { kind: 'beside', turns: 60, overallMm: 1 });
    const low = { ...record, printer: { ...record.printer, heightMm: 50 } };
    const fault = faultOf(low)!;
    expect(fault.code).toBe('second-former-tall');
    const least = Number(/builds (\d+) mm/.exec(fault.todo)![1]);
    expect(faultOf({ ...low, printer: { ...low.printer, heightMm: least } })).toBeNull();
    expect(faultOf({ ...low, printer: { ...low.printer, heightMm: least - 1 } })?.code).toBe('second-former-tall');
    const small = { ...record, printer: { ...record.printer, bedXMm: 50 } };
    expect(faultOf(small)?.code).toBe('part-larger-than-bed');
  });
});
