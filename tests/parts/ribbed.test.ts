import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import { Fault } from '../../src/fault.ts';
import { makePart } from '../../src/kernel/make.ts';
import { formerParts } from '../../src/parts/former.ts';
import { ribbedDimensions } from '../../src/parts/ribbed-dimensions.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type RibbedOptions, ribbedRecord } from '../helpers/ribbed.ts';
import { boxOf, type Facet, facetsOf, radialHole, surfaceOf, volumeOf } from '../helpers/stl.ts';

/** A tenth of what a printer can place; float32 stays far below it. */
const PLACE_MM = 0.02;
/** 45 degrees look down by 0.7071; corners of inner rings and float32 blur it a little. */
const STEEP = -0.715;
const RAD = Math.PI / 180;

async function made(record: CoilRecord): Promise<{ facets: Facet[]; volumeMm3: number }> {
  const [solid] = formerParts(record);
  return { facets: facetsOf((await makePart(solid!)).bytes), volumeMm3: solid!.expected.volumeMm3 };
}

/** Few turns and chords, so that many fit into a test. */
const anyOptions: fc.Arbitrary<RibbedOptions> = fc
  .record({
    count: fc.integer({ min: 6, max: 24 }),
    hand: fc.constantFrom('right' as const, 'left' as const),
    room: fc.double({ min: 1.15, max: 1.8, noNaN: true }),
    deep: fc.double({ min: 0, max: 1, noNaN: true }),
    turns: fc.integer({ min: 8, max: 9 }),
    part: fc.nat(),
    tap: fc.integer({ min: 34, max: 42 }),
    gapMm: fc.constantFrom(0, 0.4),
    rings: fc.integer({ min: 0, max: 2 }),
    rimMm: fc.constantFrom(1, 4),
    ears: fc.boolean(),
    overallMm: fc.constantFrom(0.3, 0.544, 0.9),
  })
  .map(({ room, deep, turns, part, tap, overallMm, ...rest }) => {
    const { count } = rest;
    const half = Math.PI / count;
    const widthMm = 3.6;
    // Ribs leave as much air as plastic, and a gable at the inner side of the inner rings.
    const diameterMm = Math.ceil(Math.max(30, room * Math.max((2 * count * widthMm) / Math.PI, 6.4 / Math.sin(half))));
    const r = diameterMm / 2;
    const least =
      r - (r - overallMm / 2 - 0.6) * Math.cos(half) + 0.25 + (widthMm / 2) * Math.tan(half) + 0.3 + 4 * 0.45;
    const most = Math.max(least, Math.min(0.45 * r, r - (widthMm / 2 + 1) / Math.sin(half)));
    return {
      ...rest,
      overallMm,
      bareMm: 0.9 * overallMm,
      pitchMm: Math.max(1.2, 2.2 * overallMm),
      diameterMm,
      widthMm,
      depthMm: least + deep * (most - least),
      steps: [Math.round((tap / 100) * turns * count), turns * count + (part % count)],
      segments: 48,
    };
  });

/** Heights of the notches' floors on a rib, from facets that lie as far out as a floor. */
function floorsOf(facets: readonly Facet[], angleDeg: number, floorR: number, halfWidth: number): number[] {
  const [c, s] = [Math.cos(angleDeg * RAD), Math.sin(angleDeg * RAD)];
  const edges = new Set<string>();
  for (const { corners, normal } of facets) {
    if (normal[0] * c + normal[1] * s < 0.9999) continue;
    if (!corners.every(([x, y]) => Math.abs(x * c + y * s - floorR) < 2e-3)) continue;
    for (const [x, y, z] of corners) if (Math.abs(Math.abs(y * c - x * s) - halfWidth) < 2e-3) edges.add(z.toFixed(3));
  }
  return [...edges].map(Number).sort((a, b) => a - b);
}

describe('ribbed former read back from its bytes', () => {
  test('is one cage with its windows and holes, stands without supports, and weighs what the formula says', async () => {
    let cases = 0;
    let holes = 0;
    let worstHole = 0;
    let worstVolume = 0;
    let floors = 0;
    let worstFloor = 0;
    await fc.assert(
      fc.asyncProperty(anyOptions, async (options) => {
        const record = ribbedRecord(options);
        const { former, windings, frame } = record;
        const [winding] = windings;
        const { facets, volumeMm3 } = await made(record);
        const upright = facets.filter(({ normal }) => Math.abs(normal[2]) < 1e-3);
        const { faultySides, bodies, genus } = surfaceOf(facets);
        const windows = options.count! * (options.rings! + 1);
        expect({ faultySides, bodies, genus }).toEqual({
          faultySides: 0,
          bodies: 1,
          genus: 1 + windows + record.holes.length + former.ears.length,
        });
        const steep = facets.filter(
          ({ normal, corners, area }) => area > 1e-4 && normal[2] < STEEP && corners.some((corner) => corner[2] > 0.01),
        );
        expect(steep).toHaveLength(0);
        const { min, max } = boxOf(facets);
        expect(min[2]).toBe(0);
        expect(Math.abs(max[2] - former.lengthMm)).toBeLessThan(1e-4);
        const off = Math.abs(volumeOf(facets) / volumeMm3 - 1);
        worstVolume = Math.max(worstVolume, off);
        // Half of what the gate allows; a lost inner ring or rib is several percent.
        expect(off).toBeLessThan(0.0025);
        for (const hole of record.holes) {
          const fit = radialHole(facets, hole.angleDeg, hole.axialMm, hole.diameterMm);
          const far = Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - hole.diameterMm);
          expect(fit.walls).toBeGreaterThan(9);
          worstHole = Math.max(worstHole, far);
          holes++;
        }
        expect(worstHole).toBeLessThan(PLACE_MM);
        for (let rib = 0; rib < former.ribs!.count; rib++) {
          const part = rib / former.ribs!.count;
          const angle = (frame.hand === 'right' ? 360 : -360) * part;
          const got = floorsOf(
            upright,
            angle,
            former.outsideDiameterMm / 2 - former.groove!.depthMm,
            former.ribs!.widthMm / 2,
          );
          const wanted: number[] = [];
          for (let u = part; u <= winding!.turns + 1e-9; u++) {
            const z = axialAt(winding!.turnPositionsMm, winding!.turns, winding!.pitchMm, u);
            wanted.push(z - former.groove!.floorMm / 2, z + former.groove!.floorMm / 2);
          }
          for (const z of wanted) {
            worstFloor = Math.max(worstFloor, Math.min(...got.map((one) => Math.abs(one - z))));
            floors++;
          }
        }
        expect(worstFloor).toBeLessThan(PLACE_MM);
        cases++;
      }),
      { numRuns: 10, seed: 7 },
    );
    console.log(
      `ribbed: ${cases} cages, ${holes} holes (worst ${(1000 * worstHole).toFixed(1)} um), ${floors} edges of notches (worst ${(1000 * worstFloor).toFixed(1)} um), volume off ${(100 * worstVolume).toFixed(3)} % at most`,
    );
    expect(Math.min(2 * cases, holes, floors)).toBeGreaterThan(10);
  }, 30_000);

  test('takes the wire to its radius: half a wire lies in a notch', () => {
    const record = ribbedRecord();
    const d = ribbedDimensions(record);
    const wire = record.windings[0]!.wire.overallMm;
    // On the floor, between flanks of 45 degrees: all three are touched at half the wire's depth.
    expect(d.outsideR - d.notch.depthMm + wire / 2).toBeCloseTo(d.outsideR, 3);
    const flank = (d.notch.floorMm / 2 + wire / 2) / Math.SQRT2;
    expect(flank).toBeCloseTo(wire / 2, 3);
  });

  test('numbers its ribs on the upper ring, each at its angle, and seventy turns on twelve ribs are quick', async () => {
    const record = ribbedRecord({ diameterMm: 80, steps: [200, 840], depthMm: 6, rings: 3 });
    const begun = performance.now();
    const [solid] = formerParts(record);
    const { report } = await makePart(solid!);
    const took = performance.now() - begun;
    console.log(`twelve ribs, seventy turns: ${report.triangles} triangles in ${took.toFixed(0)} ms`);
    expect(solid!.cutters.some((cutter) => cutter.name === 'numbers')).toBe(true);
    expect(record.former.numbers).toHaveLength(12);
    // A second where nothing else runs; tests share two cores.
    expect(took).toBeLessThan(5000);
  });
});

type Ribs = NonNullable<CoilRecord['former']['ribs']>;
const withRibs = (record: CoilRecord, change: Partial<Ribs>): CoilRecord => ({
  ...record,
  former: { ...record.former, ribs: { ...record.former.ribs!, ...change } },
});

function faultsOf(record: CoilRecord) {
  try {
    formerParts(record);
    return [];
  } catch (error) {
    if (error instanceof Fault) return error.faults;
    throw error;
  }
}

describe('ribbed former that cannot be', () => {
  const record = ribbedRecord({ diameterMm: 60, depthMm: 8 });
  const number = (text: string, pattern: RegExp) => Number(pattern.exec(text)?.[1]);

  test('stands as the helper makes it', () => {
    expect(faultsOf(record)).toEqual([]);
  });

  test.each<[string, CoilRecord, (todo: string) => CoilRecord]>([
    [
      'ribs-no-air',
      withRibs(record, { widthMm: 9 }),
      (todo) => withRibs(record, { widthMm: number(todo, /ribs ([\d.]+) mm wide/) }),
    ],
    [
      'ribs-narrow',
      withRibs(record, { widthMm: 2 }),
      (todo) => withRibs(record, { widthMm: number(todo, /ribs ([\d.]+) mm wide/) }),
    ],
    [
      'ribs-shallow',
      withRibs(record, { depthMm: 1.5 }),
      (todo) => ribbedRecord({ diameterMm: 60, depthMm: Math.max(6, number(todo, /ribs ([\d.]+) mm deep/)) }),
    ],
    [
      'ribs-no-land',
      ribbedRecord({ diameterMm: 60, depthMm: 8, pitchMm: 0.8 }),
      (todo) =>
        ribbedRecord({ diameterMm: 60, depthMm: 8, pitchMm: number(todo, /pitch of ([\d.]+) mm/), steps: [150, 300] }),
    ],
    [
      'ribs-hole-in-air',
      {
        ...record,
        holes: record.holes.map((hole) => (hole.label === '1' ? { ...hole, angleDeg: hole.angleDeg + 9 } : hole)),
      },
      (todo) => ({
        ...record,
        holes: record.holes.map((hole) =>
          hole.label === '1' ? { ...hole, angleDeg: number(todo, /move 1 to ([\d.]+) degrees/) } : hole,
        ),
      }),
    ],
    [
      'ribs-ring-no-room',
      withRibs(record, { innerRings: { ...record.former.ribs!.innerRings, acrossMm: 60 } }),
      (todo) => {
        const acrossMm = number(todo, /make them ([\d.]+) mm across/);
        return withRibs(record, { innerRings: { ...record.former.ribs!.innerRings, acrossMm } });
      },
    ],
    [
      'ribs-ring-no-room',
      { ...record, former: { ...record.former, lengthMm: record.former.lengthMm + 1 } },
      (todo) => ({ ...record, former: { ...record.former, lengthMm: number(todo, /former ([\d.]+) mm long/) } }),
    ],
  ])('is refused by %s with the nearest value that is then taken', (code, bad, mended) => {
    const fault = faultsOf(bad).find((one) => one.code === code);
    expect(fault).toBeDefined();
    expect(fault!.got).toMatch(/\d/);
    const codes = faultsOf(mended(fault!.todo)).map((one) => one.code);
    expect(codes).not.toContain(code);
    if (code !== 'ribs-no-air' && code !== 'ribs-narrow') expect(codes).toEqual([]);
  });
});
