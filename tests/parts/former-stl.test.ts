import { beforeAll, describe, expect, test } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import { makeParts, type PartFile } from '../../src/kernel/make.ts';
import { formerParts } from '../../src/parts/former.ts';
import { entriesOf } from '../../src/record/printed.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type SampleOptions, sampleRecord } from '../helpers/sample.ts';
import {
  boxOf,
  type Facet,
  facetsOf,
  floorVertices,
  radialHole,
  surfaceOf,
  uprightHole,
  volumeOf,
} from '../helpers/stl.ts';

/** A tenth of what a printer can place; float32 and chords stay far below it. */
const PLACE_MM = 0.02;

/** Taps on every angle, none of them symmetric. */
const staggered = (taps: number, turns: number) =>
  Array.from({ length: taps }, (_, i) => Math.round(((i + 1) * turns) / taps) + ((7 * i + 3) % 24) / 24);

const short = [3.25, 6.5, 9.125, 13.75];

const cases: Record<string, SampleOptions> = {
  'right hand': { hand: 'right' },
  'left hand': { hand: 'left', turns: short },
  'left hand, pushed aside by taps': { hand: 'left', gapMm: 0.8, turns: short },
  'right hand, pushed aside by taps, no ears': { hand: 'right', gapMm: 0.5, ears: false, turns: short },
  'smooth, right': { surface: 'smooth' },
  'smooth, left, plain': { surface: 'smooth', hand: 'left', flanges: false, ears: false },
  'grooved, plain foot': { flanges: false, ears: false, turns: [5.3, 11.2] },
  'grooved, ears on a plain foot': { flanges: false, ears: true, turns: [5.3, 11.2], hand: 'left' },
  'small, three taps': { diameterMm: 25, turns: [6.3, 11.55, 17.8] },
  'small, 24 taps, left': { diameterMm: 25, turns: staggered(24, 40), hand: 'left' },
  'large, 24 taps': { diameterMm: 110, turns: staggered(24, 30) },
};

interface Made {
  readonly record: CoilRecord;
  readonly part: PartFile;
  readonly facets: Facet[];
}

async function made(options: SampleOptions): Promise<Made> {
  const record = sampleRecord(options);
  const [part] = await makeParts(record);
  return { record, part: part!, facets: facetsOf(part!.bytes) };
}

/** Greatest distance between a hole in the bytes and its entry in the record; NaN walls count as infinitely far. */
function worstHole({ facets }: Made, record: CoilRecord): number {
  const off = record.holes.map((hole) => {
    const fit = radialHole(facets, hole.angleDeg, hole.axialMm, hole.diameterMm);
    const distance = Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - hole.diameterMm);
    return Number.isNaN(distance) || fit.walls < 10 ? Number.POSITIVE_INFINITY : distance;
  });
  return Math.max(...off);
}

/** Greatest axial distance of a vertex of the groove's floor from the two edges that the record asks for at its angle. */
function worstFloor({ facets }: Made, record: CoilRecord): { worst: number; count: number; radii: number[] } {
  const { former, windings } = record;
  const winding = windings[0]!;
  const groove = former.groove!;
  const outside = former.outsideDiameterMm / 2;
  const wayUp = record.frame.hand === 'right' ? 1 : -1;
  const full = floorVertices(
    facets,
    former.boreDiameterMm / 2 + 0.2,
    outside - 0.98 * groove.depthMm,
    former.lengthMm - 4,
  );
  let worst = 0;
  for (const { angleDeg, zMm } of full) {
    const part = (((wayUp * angleDeg) / 360) % 1) + (wayUp < 0 ? 1 : 0);
    let near = Number.POSITIVE_INFINITY;
    for (let k = -1; k <= winding.turns + 3; k++) {
      const z = axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, part + k);
      for (const edge of [-0.5, 0.5]) near = Math.min(near, Math.abs(zMm - z - edge * groove.floorMm));
    }
    // Where a hole breaks the floor there are vertices inside its edges.
    const atHole = record.holes.some(
      (hole) =>
        Math.hypot(((((angleDeg - hole.angleDeg + 540) % 360) - 180) * Math.PI * outside) / 180, zMm - hole.axialMm) <
        hole.diameterMm * 0.75 + 0.05,
    );
    if (!atHole) worst = Math.max(worst, near);
  }
  return { worst, count: full.length, radii: full.map((v) => v.rMm) };
}

describe.each(Object.entries(cases))('former read back from its bytes: %s', (name, options) => {
  let it: Made;
  beforeAll(async () => {
    it = await made(options);
  });

  test('is one closed surface that faces outwards, with a handle for every hole', () => {
    const { faultySides, bodies, genus } = surfaceOf(it.facets);
    expect({ faultySides, bodies, genus }).toEqual({
      faultySides: 0,
      bodies: 1,
      genus: 1 + it.record.holes.length + it.record.former.ears.length,
    });
    expect(it.facets.filter((facet) => facet.area === 0)).toHaveLength(0);
  });

  test('has its holes where the record says', () => {
    expect(it.record.holes.length).toBeGreaterThan(7);
    const worst = worstHole(it, it.record);
    console.log(`${name}: ${it.record.holes.length} holes, worst ${(worst * 1000).toFixed(2)} um`);
    expect(worst).toBeLessThan(PLACE_MM);
  });

  test('has its groove where the record says', () => {
    const { groove, outsideDiameterMm, lengthMm } = it.record.former;
    const below = lengthMm - 4;
    if (!groove) {
      expect(floorVertices(it.facets, outsideDiameterMm / 2 - 2, outsideDiameterMm / 2 - 0.02, below)).toHaveLength(0);
      return;
    }
    const { worst, count, radii } = worstFloor(it, it.record);
    expect(count).toBeGreaterThan(2 * 144 * (it.record.windings[0]!.turns - 1));
    console.log(`${name}: ${count} places on the groove's floor, worst ${(worst * 1000).toFixed(2)} um`);
    expect(worst).toBeLessThan(PLACE_MM);
    expect(Math.abs(Math.min(...radii) - (outsideDiameterMm / 2 - groove.depthMm))).toBeLessThan(PLACE_MM);
  });

  test('has the outer size of the record and stands on Z = 0', () => {
    const { former } = it.record;
    const { min, max } = boxOf(it.facets);
    const round = (former.flange?.diameterMm ?? former.outsideDiameterMm) / 2;
    const ends = former.ears.map((ear) => {
      const c = Math.cos((ear.angleDeg * Math.PI) / 180);
      const s = Math.sin((ear.angleDeg * Math.PI) / 180);
      return [ear.centreRadiusMm * c, ear.centreRadiusMm * s, ear.widthMm / 2] as const;
    });
    const expected = {
      x: [Math.min(-round, ...ends.map(([x, , r]) => x - r)), Math.max(round, ...ends.map(([x, , r]) => x + r))],
      y: [Math.min(-round, ...ends.map(([, y, r]) => y - r)), Math.max(round, ...ends.map(([, y, r]) => y + r))],
    };
    expect(min[2]).toBe(0);
    expect(Math.abs(max[2] - former.lengthMm)).toBeLessThan(1e-4);
    // 144 chords of a circle of 110 mm lie 0.013 mm inside it.
    for (const [got, want] of [
      [min[0], expected.x[0]!],
      [max[0], expected.x[1]!],
      [min[1], expected.y[0]!],
      [max[1], expected.y[1]!],
    ] as const)
      expect(Math.abs(got - want)).toBeLessThan(PLACE_MM);
    expect(it.part.report.maxMm[2]).toBeCloseTo(former.lengthMm, 3);
    expect(it.part.report.maxMm[0]).toBeCloseTo(max[0], 3);
  });

  test('has a bore and ear holes that are not small', () => {
    const { former } = it.record;
    const bore = former.boreDiameterMm / 2;
    const walls = it.facets.filter(({ normal: n, corners: [c], area }) => {
      // Float32 blurs the normals of slivers beside holes.
      if (area < 0.01) return false;
      const r = Math.hypot(c[0], c[1]);
      return r < bore + 0.3 && (n[0] * c[0] + n[1] * c[1]) / r < -0.99;
    });
    expect(walls.length).toBeGreaterThan(100);
    // Distance of each wall's plane from the axis; the kernel may move a vertex by a micron or two.
    for (const {
      normal: n,
      corners: [c],
    } of walls)
      expect(Math.abs(n[0] * c[0] + n[1] * c[1])).toBeGreaterThan(bore - 0.005);
    for (const ear of former.ears) {
      const fit = uprightHole(it.facets, ear.angleDeg, ear.centreRadiusMm, ear.holeDiameterMm);
      expect(fit.walls).toBeGreaterThan(15);
      expect(Math.hypot(fit.acrossMm, fit.alongMm)).toBeLessThan(PLACE_MM);
      expect(Math.abs(fit.diameterMm - ear.holeDiameterMm)).toBeLessThan(PLACE_MM);
    }
  });

  test('needs no supports', () => {
    // 45 degrees look down by 0.7071; a flank of a groove that a tap pushes aside leans a little more.
    const steep = it.facets.filter(
      ({ normal, corners, area }) => area > 1e-5 && normal[2] < -0.72 && corners.some((corner) => corner[2] > 0.01),
    );
    expect(steep).toHaveLength(0);
  });

  test('weighs what its volume says', () => {
    const volume = volumeOf(it.facets);
    expect(Math.abs(it.part.report.volumeMm3 - volume)).toBeLessThan(0.001 * volume);
    const [entry] = entriesOf(formerParts(it.record));
    // The list goes by the formula, which the bytes must keep to within 0.5 %.
    expect(Math.abs(entry!.massG / ((volume * it.record.former.densityGCm3) / 1000) - 1)).toBeLessThan(0.01);
    expect(it.part.report.triangles).toBe(it.facets.length);
  });
});

test('a plain smooth tube has the volume of its formula', async () => {
  const record = sampleRecord({ surface: 'smooth', flanges: false, ears: false });
  const bare = { ...record, holes: [], former: { ...record.former, chamferMm: 0, datumMark: null } };
  const [part] = await makeParts(bare);
  const { outsideDiameterMm: d, boreDiameterMm: b, lengthMm: l } = record.former;
  // Chords: the outside is 0.03 % small in area, the bore as much large.
  const ratio = volumeOf(facetsOf(part!.bytes)) / ((Math.PI / 4) * (d * d - b * b) * l);
  expect(Math.abs(ratio - 1)).toBeLessThan(0.005);
});

describe('what the reading would not let pass', () => {
  test('a mirrored former: holes and groove of one hand against the record of the other', async () => {
    const left = await made({ hand: 'left', ears: false, turns: short });
    const right = sampleRecord({ hand: 'right', ears: false, turns: short });
    expect(worstHole(left, right)).toBe(Number.POSITIVE_INFINITY);
    expect(worstFloor(left, right).worst).toBeGreaterThan(0.2);
  });

  test('a groove that ignores the gaps at taps', async () => {
    const even = await made({ gapMm: 0, turns: short, ears: false, flanges: false });
    expect(
      worstFloor(even, sampleRecord({ gapMm: 0.8, turns: short, ears: false, flanges: false })).worst,
    ).toBeGreaterThan(0.2);
  });
});

test('the same record gives the same bytes', async () => {
  const record = sampleRecord({ turns: [4.25, 9.5] });
  const [first] = await makeParts(record);
  await makeParts(sampleRecord({ surface: 'smooth', hand: 'left' }));
  const [second] = await makeParts(structuredClone(record));
  expect(Buffer.compare(first!.bytes, second!.bytes)).toBe(0);
});

test('a bought tube has no printed part', async () => {
  expect(await makeParts(sampleRecord({ kind: 'tube' }))).toEqual([]);
});
