import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arborViews } from '../../src/drawing/parts/arbor-views.ts';
import { Fault } from '../../src/fault.ts';
import { arborDimensions, arborParts } from '../../src/parts/arbor.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, type Jig, jigsOf, keepsJigRules, planeDistances } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { boxOf, uprightHole } from '../helpers/stl.ts';

/** A tenth of what a printer can place; chords and float32 stay below it. */
const PLACE_MM = 0.02;

const base = sampleRecord();

interface Options {
  readonly boreMm?: number;
  readonly shaftMm?: number;
  readonly shaftForm?: 'round' | 'hexagon';
  readonly clearanceMm?: number;
  readonly compensationMm?: number;
}

function recordOf({ boreMm = 54.6, clearanceMm = 0.3, compensationMm = 0, ...shop }: Options): CoilRecord {
  return {
    ...base,
    former: { ...base.former, boreDiameterMm: boreMm, outsideDiameterMm: boreMm + 5.4 },
    printer: { ...base.printer, clearanceMm, holeCompensationMm: compensationMm },
    shop: { ...base.shop, ...shop },
  };
}

/** Greatest bore or least shaft apart, every bench: shafts from 3 to 12 mm in bores that take them. */
const benches: fc.Arbitrary<Options> = fc
  .record({
    shaftMm: fc.integer({ min: 6, max: 24 }).map((half) => half / 2),
    wider: fc.double({ min: 14, max: 90, noNaN: true }),
    shaftForm: fc.constantFrom('round' as const, 'hexagon' as const),
    clearanceMm: fc.integer({ min: 10, max: 50 }).map((hundredths) => hundredths / 100),
    compensationMm: fc.integer({ min: -5, max: 30 }).map((hundredths) => hundredths / 100),
  })
  .map(({ wider, ...rest }) => ({ ...rest, boreMm: Math.round(10 * (1.2 * rest.shaftMm + wider)) / 10 }));

async function made(options: Options): Promise<{ record: CoilRecord; cone: Jig; collar: Jig }> {
  const record = recordOf(options);
  const [cone, collar] = await jigsOf(arborParts(record));
  return { record, cone: cone!, collar: collar! };
}

const faultOf = (record: CoilRecord) => {
  try {
    arborParts(record);
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  return null;
};

describe('arbor', () => {
  test('keeps the rules of jigs, and its fits, at random', async () => {
    let cases = 0;
    await fc.assert(
      fc.asyncProperty(benches, async (options) => {
        const { record, cone, collar } = await made(options);
        for (const jig of [cone, collar]) keepsJigRules(jig);
        const d = arborDimensions(record);
        const { clearanceMm: c, holeCompensationMm: more } = record.printer;
        const { shaftMm, shaftForm } = record.shop;
        // The bore, by the planes of its walls: within them the shaft turns or lies with the clearance.
        const cut = shaftMm + c + more;
        if (shaftForm === 'round') {
          const bore = uprightHole(cone.facets, 0, 0, cut);
          expect(Math.abs(bore.diameterMm - cut)).toBeLessThan(PLACE_MM);
          expect(Math.hypot(bore.acrossMm, bore.alongMm)).toBeLessThan(PLACE_MM);
        } else {
          // Small walls between keyway and bore blur in float32.
          const walls = planeDistances(
            cone.facets,
            [0, 0, 0],
            ({ normal, corners, area }) =>
              area > 0.01 &&
              Math.abs(normal[2]) < 1e-3 &&
              corners.every(([x, y, z]) => Math.hypot(x, y) < cut * 0.6 && z > d.cone.keyway.depthMm - 0.1),
          );
          expect(walls.length).toBeGreaterThanOrEqual(6);
          for (const distance of walls) expect(Math.abs(distance - cut / 2)).toBeLessThan(PLACE_MM);
        }
        // Keys and keyway, by their walls across x.
        const key = planeDistances(
          collar.facets,
          [shiftOf(collar), 0, 0],
          ({ normal, corners }) =>
            Math.abs(normal[0]) > 0.999 && corners.every(([, , z]) => z > d.clamp.heightMm - 1e-3),
        );
        const way = planeDistances(
          cone.facets,
          [0, 0, 0],
          ({ normal, corners }) =>
            Math.abs(normal[0]) > 0.999 &&
            corners.every(([x, , z]) => z < d.cone.keyway.depthMm + 1e-3 && Math.abs(x) < d.cone.keyway.widthMm),
        );
        expect(Math.min(key.length, way.length)).toBeGreaterThan(3);
        expect(2 * Math.min(...way) - 2 * Math.max(...key)).toBeCloseTo(c, 3);
        expect(d.cone.keyway.depthMm).toBeGreaterThan(d.clamp.key.heightMm);
        cases++;
      }),
      { seed: 20, numRuns: 24 },
    );
    console.log(`${cases} arbors made`);
    expect(cases).toBe(24);
  });

  test('centres bores of 2 % to both sides and half a millimetre, by a cone of 20 degrees', async () => {
    let cases = 0;
    for (const boreMm of [22, 54.6, 108]) {
      const { record, cone } = await made({ boreMm });
      const d = arborDimensions(record).cone;
      expect(d.mostBoreMm).toBeGreaterThanOrEqual(Math.max(1.02 * boreMm, boreMm + 0.5) - 1e-9);
      expect(d.leastBoreMm).toBeLessThanOrEqual(Math.min(0.98 * boreMm, boreMm - 0.5) + 1e-9);
      const { max } = boxOf(cone.facets);
      const rim = Math.max(
        ...cone.facets
          .flatMap(({ corners }) => corners.filter(([, , z]) => z > max[2] - 0.01))
          .map(([x, y]) => Math.hypot(x, y)),
      );
      expect(2 * rim).toBeCloseTo(d.smallMm, 2);
      expect(2 * rim).toBeLessThan(d.leastBoreMm - 1);
      // The true side, from the facets that look up and out.
      const sides = cone.facets.filter(
        ({ normal, corners, area }) =>
          area > 0.05 && normal[2] > 0.1 && normal[2] < 0.9 && corners.every(([, , z]) => z > d.discMm - 0.01),
      );
      expect(sides.length).toBeGreaterThan(40);
      for (const { normal } of sides) expect((Math.asin(normal[2]) * 180) / Math.PI).toBeCloseTo(20, 1);
      cases++;
    }
    console.log(`${cases} cones measured`);
    expect(cases).toBe(3);
  });

  test('a stated press holds twice the wire by friction of 0.2', () => {
    const record = recordOf({});
    const d = arborDimensions(record);
    const wireNmm = record.windings[0]!.tensionHighN * (record.former.outsideDiameterMm / 2);
    const normalN = d.pressN / Math.sin((20 * Math.PI) / 180);
    expect(2 * 0.2 * normalN * (record.former.boreDiameterMm / 2)).toBeCloseTo(2 * wireNmm, 6);
  });

  test('a shaft too thick for the bore is refused with the greatest that fits', () => {
    let cases = 0;
    for (const shaftForm of ['round', 'hexagon'] as const)
      for (const boreMm of [12, 16, 19]) {
        const fault = faultOf(recordOf({ boreMm, shaftMm: 14, shaftForm }));
        expect(fault?.exit).toBe(4);
        expect(fault!.faults[0]!.code).toBe('arbor-shaft-thick');
        expect(fault!.faults[0]!.got).toContain('14 mm');
        const most = Number(/a shaft of ([\d.]+) mm/.exec(fault!.faults[0]!.todo)![1]);
        expect(faultOf(recordOf({ boreMm, shaftMm: most, shaftForm }))).toBeNull();
        expect(faultOf(recordOf({ boreMm, shaftMm: most + 0.1, shaftForm }))).not.toBeNull();
        cases++;
      }
    console.log(`${cases} shafts refused`);
    expect(cases).toBe(6);
  });

  test('its views show what is printed', () => {
    for (const shaftForm of ['round', 'hexagon'] as const) {
      const record = recordOf({ shaftForm });
      const views = arborViews(record);
      for (const { part, expected } of arborParts(record)) {
        const size = expected.maxMm.map((most, i) => most - expected.minMm[i]!);
        for (const view of views[part]!) {
          const [wide, high] = extentOf(view);
          expect(Math.abs(wide - size[0]!)).toBeLessThan(PLACE_MM);
          expect(Math.abs(high - size[view.title === 'plan' ? 1 : 2]!)).toBeLessThan(PLACE_MM);
        }
      }
    }
  });
});

/** Where the axis of the bore lies: the box is centred, the bore is not. */
function shiftOf({ facets }: Jig): number {
  const keys = facets.flatMap(({ corners }) => corners).filter(([, , z]) => z > boxOf(facets).max[2] - 0.01);
  const xs = keys.map(([x]) => x);
  return (Math.min(...xs) + Math.max(...xs)) / 2;
}
