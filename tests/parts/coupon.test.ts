import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { couponViews } from '../../src/drawing/parts/coupon-views.ts';
import { couponParts } from '../../src/parts/coupon.ts';
import { couponDimensions } from '../../src/parts/coupon-dimensions.ts';
import { textWidthMm } from '../../src/parts/lettering.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, type Jig, jigsOf, keepsJigRules, planeDistances } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { uprightHole } from '../helpers/stl.ts';

/** A tenth of what a printer can place; chords and float32 stay below it. */
const PLACE_MM = 0.02;

function withPrinter(record: CoilRecord, printer: Partial<CoilRecord['printer']>): CoilRecord {
  return { ...record, printer: { ...record.printer, ...printer } };
}

const shallow = ([, y]: readonly number[]) => y! < -5.45;

async function made(record: CoilRecord): Promise<{ plate: Jig; plug: Jig }> {
  const [plate, plug] = await jigsOf(couponParts(record));
  return { plate: plate!, plug: plug! };
}

function plugDiameter({ facets }: Jig): number {
  return (
    2 * Math.max(...facets.flatMap(({ corners }) => corners.filter((c) => c[2] > 8).map((c) => Math.hypot(c[0], c[1]))))
  );
}

/** Of every upright hole of the plate, as the greatest rod that passes. */
function bores(
  { facets }: Jig,
  record: CoilRecord,
  row: 'socket' | 'upright',
): { step: number; diameter: number; off: number }[] {
  const d = couponDimensions(record);
  return d.holes
    .filter((hole) => hole.row === row)
    .map(({ x, y, diameterMm, stepMm }) => {
      const [px, py] = [x - d.widthMm / 2, y - d.depthMm / 2];
      const fit = uprightHole(facets, (Math.atan2(py, px) * 180) / Math.PI, Math.hypot(px, py), diameterMm);
      expect(fit.walls).toBeGreaterThan(10);
      return { step: stepMm, diameter: fit.diameterMm, off: Math.hypot(fit.acrossMm, fit.alongMm) };
    });
}

describe('fit coupon', () => {
  test('keeps the rules of jigs, at random', async () => {
    let cases = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.record({
          ears: fc.boolean(),
          lineMm: fc.double({ min: 0.25, max: 1, noNaN: true }),
          wireHole: fc.integer({ min: 8, max: 40 }),
          screw: fc.integer({ min: 22, max: 100 }),
        }),
        async ({ ears, lineMm, wireHole, screw }) => {
          const sample = withPrinter(sampleRecord({ ears, turns: [4.5] }), { lineMm });
          const record = {
            ...sample,
            holes: sample.holes.map((hole) => ({ ...hole, diameterMm: wireHole / 10 })),
            former: {
              ...sample.former,
              ears: sample.former.ears.map((ear) => ({ ...ear, holeDiameterMm: screw / 10 })),
            },
          };
          const d = couponDimensions(record);
          const { plate, plug } = await made(record);
          keepsJigRules(plate);
          keepsJigRules(plug, shallow);
          for (const { text, x, heightMm, y } of d.words) {
            const half = textWidthMm(text, heightMm) / 2 + 0.3;
            expect(x - half).toBeGreaterThan(0);
            expect(x + half).toBeLessThan(d.widthMm);
            expect(y + heightMm).toBeLessThan(d.fenceFromMm);
          }
          for (const a of d.holes)
            for (const b of d.holes)
              if (a !== b && a.row === b.row)
                expect(Math.abs(a.x - b.x) - (a.diameterMm + b.diameterMm) / 2).toBeGreaterThan(2 * lineMm);
          cases++;
        },
      ),
      { numRuns: 5, seed: 20 },
    );
    console.log(`coupon: ${cases} random records`);
    expect(cases).toBe(5);
  });

  test('its plug and sockets clear by exactly the number beside them, whatever the job has', async () => {
    let compared = 0;
    for (const printer of [{}, { clearanceMm: 0.55, holeCompensationMm: 0.35 }]) {
      const record = withPrinter(sampleRecord({ turns: [4.5] }), printer);
      const { plate, plug } = await made(record);
      for (const { step, diameter, off } of bores(plate, record, 'socket')) {
        expect(Math.abs(diameter - plugDiameter(plug) - step)).toBeLessThan(PLACE_MM);
        expect(off).toBeLessThan(PLACE_MM);
        compared++;
      }
      for (const { step, diameter } of bores(plate, record, 'upright')) {
        expect(Math.abs(diameter - record.former.ears[0]!.holeDiameterMm - step)).toBeLessThan(PLACE_MM);
        compared++;
      }
    }
    console.log(`coupon: ${compared} fits`);
    expect(compared).toBe(24);
  });

  test('its lying holes are those of the wire, wider by their number', async () => {
    const record = withPrinter(sampleRecord({ turns: [4.5] }), { holeCompensationMm: 0.2 });
    const d = couponDimensions(record);
    const { plate } = await made(record);
    const lying = d.holes.filter(({ row }) => row === 'lying');
    expect(lying.map(({ stepMm }) => stepMm)).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5]);
    for (const { x, z, diameterMm, stepMm } of lying) {
      expect(diameterMm).toBeCloseTo(1.2 + stepMm, 9);
      const px = x - d.widthMm / 2;
      const near = planeDistances(
        plate.facets,
        [px, 0, z],
        ({ normal, corners, area }) =>
          area > 1e-4 &&
          Math.abs(normal[1]) < 1e-3 &&
          corners.every((c) => Math.hypot(c[0] - px, c[2] - z) < 0.8 * diameterMm),
      );
      expect(near.length).toBeGreaterThan(15);
      for (const r of near) expect(Math.abs(2 * r - diameterMm)).toBeLessThan(PLACE_MM);
    }
  });

  test('its stated width and depth are those of the plate, and the scale alone enlarges it', async () => {
    const record = sampleRecord({ turns: [4.5] });
    const d = couponDimensions(record);
    const { plate } = await made(record);
    expect(plate.solid.expected.maxMm[0]).toBe(d.widthMm / 2);
    expect(d.words[0]!.text).toContain(`X ${d.widthMm}  Y ${d.depthMm}`);
    expect(plate.triangles).toBeLessThan(16000);
  });

  test('its views have the size of the parts', () => {
    const record = sampleRecord();
    const views = couponViews(record);
    const parts = couponParts(record);
    expect(Object.keys(views)).toEqual(parts.map(({ part }) => part));
    for (const { part, expected } of parts)
      for (const view of views[part]!) {
        const [w, h] = extentOf(view);
        expect(w).toBeCloseTo(expected.maxMm[0] - expected.minMm[0], 6);
        const axis = view.title === 'plan' ? 1 : 2;
        expect(h).toBeCloseTo(expected.maxMm[axis] - expected.minMm[axis], 6);
      }
  });
});
