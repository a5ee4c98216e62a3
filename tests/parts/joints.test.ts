import * as fc from 'fast-check';
import type { Manifold } from 'manifold-3d';
import { describe, expect, test } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { fromMesh } from '../../src/kernel/build.ts';
import { loadKernel } from '../../src/kernel/load.ts';
import { makePart } from '../../src/kernel/make.ts';
import { readStl } from '../../src/kernel/stl.ts';
import { weld } from '../../src/kernel/weld.ts';
import { formerParts } from '../../src/parts/former.ts';
import type { CoilRecord, Hole } from '../../src/record/schema.ts';
import { axialOf, longCoils, longRecord, splitFor, splitRecord } from '../helpers/joints.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { boxOf, type Facet, facetsOf, radialHole, type Vec } from '../helpers/stl.ts';

interface Section {
  readonly part: string;
  readonly bytes: Uint8Array;
  /** At its place in the former: lifted by where its joint says its foot is. */
  readonly facets: readonly Facet[];
  readonly liftMm: number;
}

const RAD = Math.PI / 180;
const radius = (v: Vec) => Math.hypot(v[0], v[1]);
const angle = (v: Vec) => (Math.atan2(v[1], v[0]) / RAD + 360) % 360;

async function sectionsOf(record: CoilRecord): Promise<Section[]> {
  const { joints, outsideDiameterMm, boreDiameterMm } = record.former;
  const sections: Section[] = [];
  for (const [i, solid] of formerParts(record).entries()) {
    const { part, bytes } = await makePart(solid);
    const below = joints[i - 1];
    const liftMm = below ? below.seamMm - (outsideDiameterMm - boreDiameterMm) / 2 - below.spigotMm : 0;
    const facets = facetsOf(bytes).map((facet) => ({
      ...facet,
      corners: facet.corners.map(([x, y, z]): Vec => [x, y, z + liftMm]) as unknown as Facet['corners'],
    }));
    sections.push({ part, bytes, facets, liftMm });
  }
  return sections;
}

/** Corners of the face of a section's lower seam: it looks down and outwards at 45 degrees and reaches the bore. */
function seamCorners({ facets }: Section, record: CoilRecord): Vec[] {
  const bore = record.former.boreDiameterMm / 2;
  const face = facets.filter(({ corners, normal, area }) => {
    const r = radius(corners[0]);
    const out = (normal[0] * corners[0][0] + normal[1] * corners[0][1]) / r;
    return (
      area > 1e-6 && Math.abs(out - Math.SQRT1_2) < 0.02 && normal[2] < -0.69 && corners.some((c) => radius(c) < bore)
    );
  });
  return face.flatMap(({ corners }) => [...corners]);
}

/** Arc from the key, mm on the outside. */
function fromKeyMm(record: CoilRecord, keyDeg: number, v: Vec): number {
  const apart = Math.abs(angle(v) - keyDeg) % 360;
  return Math.min(apart, 360 - apart) * RAD * (record.former.outsideDiameterMm / 2);
}

/** How much less than half a pitch the outer edge of a seam keeps from the nearest turn, at worst; the count of places looked at. */
function seamAgainstTurns(section: Section, record: CoilRecord, joint: number): { short: number; places: number } {
  const { outsideDiameterMm } = record.former;
  const axial = axialOf(record);
  const turns = record.windings[0]!.turns;
  let short = Number.NEGATIVE_INFINITY;
  let places = 0;
  for (const v of seamCorners(section, record)) {
    // The wire crosses the step itself.
    if (radius(v) < outsideDiameterMm / 2 - 0.03) continue;
    if (fromKeyMm(record, record.former.joints[joint]!.keyDeg, v) < 0.1) continue;
    const part = record.frame.hand === 'right' ? angle(v) / 360 : 1 - angle(v) / 360;
    const near = Array.from({ length: Math.floor(turns) }, (_, k) => k + (part % 1)).filter((u) => u <= turns);
    const below = Math.max(...near.map((u) => (axial(u) < v[2] ? axial(u) : Number.NEGATIVE_INFINITY)));
    const above = Math.min(...near.map((u) => (axial(u) > v[2] ? axial(u) : Number.POSITIVE_INFINITY)));
    short = Math.max(short, (above - below) / 2 - Math.min(above - v[2], v[2] - below));
    places++;
  }
  return { short, places };
}

/** Least distance from a section's lower seam to any hole's edge. */
function seamAgainstHoles(section: Section, record: CoilRecord): number {
  let least = Number.POSITIVE_INFINITY;
  const bore = record.former.boreDiameterMm / 2;
  for (const v of seamCorners(section, record)) {
    if (radius(v) < bore - 0.01) continue;
    for (const hole of record.holes) {
      const turned = (angle(v) - hole.angleDeg) * RAD;
      if (Math.cos(turned) < 0) continue;
      const off = Math.hypot(radius(v) * Math.sin(turned), v[2] - hole.axialMm) - hole.diameterMm / 2;
      least = Math.min(least, off);
    }
  }
  return least;
}

/** Volumes round the lowest joint: what placed sections share, what the whole has that they have not, and what they have more. */
async function together(record: CoilRecord, sections: readonly Section[]) {
  const kernel = await loadKernel();
  const solid = ({ bytes, liftMm }: Pick<Section, 'bytes' | 'liftMm'>): Manifold =>
    fromMesh(kernel, weld(readStl(bytes))).translate(0, 0, liftMm);
  const placed = sections.slice(0, 2).map(solid);
  const [whole] = formerParts({ ...record, former: { ...record.former, joints: [] } });
  const one = solid({ bytes: (await makePart(whole!)).bytes, liftMm: 0 });
  const [joint] = record.former.joints;
  const [low, high] = [sections[1]!.liftMm - 1, joint!.seamMm + joint!.climbMm + 6];
  const slab = (it: Manifold) => it.trimByPlane([0, 0, 1], low).trimByPlane([0, 0, -1], -high);
  const [lower, upper, former] = [placed[0]!, placed[1]!, one].map(slab) as [Manifold, Manifold, Manifold];
  const both = lower.add(upper);
  return {
    shared: lower.intersect(upper).volume(),
    missing: former.subtract(both).volume(),
    more: both.subtract(former).volume(),
  };
}

/** Greatest and least radius of the spigot's outer face above its chamfer, and of the bore that it goes into. */
function gapAt(upper: Section, lower: Section, record: CoilRecord, joint: number) {
  const { seamMm, spigotMm, keyDeg } = record.former.joints[joint]!;
  const wall = (record.former.outsideDiameterMm - record.former.boreDiameterMm) / 2;
  const low = seamMm - wall - spigotMm + 0.4;
  const high = seamMm - wall - 0.3;
  const upright = ({ facets }: Section, way: number) =>
    facets.filter(({ normal, corners, area }) => {
      const [c] = corners;
      const out = (way * (normal[0] * c[0] + normal[1] * c[1])) / radius(c);
      const near = record.former.boreDiameterMm / 2;
      return (
        area > 1e-3 &&
        out > 0.99 &&
        corners.every((v) => (way < 0 || v[2] > low) && Math.abs(radius(v) - near) < 0.3) &&
        corners.some((v) => v[2] > low) &&
        corners.some((v) => v[2] < high) &&
        corners.every((v) => fromKeyMm(record, keyDeg, v) > 3)
      );
    });
  const spigot = upright(upper, 1).flatMap(({ corners }) => corners.map(radius));
  const bore = upright(lower, -1).map(({ normal: n, corners: [c] }) => Math.abs(n[0] * c[0] + n[1] * c[1]));
  return { spigot: Math.max(...spigot), bore: Math.min(...bore), places: Math.min(spigot.length, bore.length) };
}

/** Welding and chords of small holes. */
const PLACE_MM = 0.02;

/** How far a hole is off in place or width; only facets about as high are looked at. */
function holeOff(facets: readonly Facet[], { angleDeg, axialMm, diameterMm }: Hole): number {
  const near = facets.filter(({ corners: [c] }) => Math.abs(c[2] - axialMm) < diameterMm);
  const hit = radialHole(near, angleDeg, axialMm, diameterMm);
  const off = Math.hypot(hit.acrossMm, hit.alongMm, hit.diameterMm - diameterMm);
  return Number.isNaN(off) ? Number.POSITIVE_INFINITY : off;
}

const steep = ({ bytes }: Section) =>
  facetsOf(bytes).filter(
    ({ normal, corners, area }) => area > 1e-5 && normal[2] < -0.72 && corners.some((corner) => corner[2] > 0.01),
  );

interface Tally {
  coils: number;
  sections: number;
  helical: number;
  short: number;
  hole: number;
  gapOff: number;
  shared: number;
}

/** Sections put together make the former, spigots and tongues besides; costly, so only where asked for. */
async function proveTogether(record: CoilRecord, sections: readonly Section[], tally: Tally): Promise<void> {
  const { shared, missing, more } = await together(record, sections);
  // The two sides of a seam are triangulated apart, half a micrometre between them.
  const seamArea = Math.PI * record.former.outsideDiameterMm * record.former.wallMm * Math.SQRT2;
  expect(shared).toBeLessThan(1e-3 * seamArea);
  expect(missing).toBeLessThan(1e-3 * seamArea);
  // Spigot and collar: three lines over 8 mm and more, in a bore that is no wider than the outside.
  const ring = Math.PI * record.former.boreDiameterMm * 3 * record.printer.lineMm * 8;
  expect(more).toBeGreaterThan(0.8 * ring);
  tally.shared = Math.max(tally.shared, shared / seamArea);
}

async function prove(record: CoilRecord, heightMm: number, tally: Tally): Promise<Section[]> {
  const sections = await sectionsOf(record);
  const { joints } = record.former;
  expect(sections).toHaveLength(joints.length + 1);
  for (const [i, section] of sections.entries()) {
    const { min, max } = boxOf(facetsOf(section.bytes));
    expect(min[2]).toBe(0);
    // 0.04 mm: the seam's edge lies on chords.
    expect(max[2]).toBeLessThanOrEqual(heightMm + 0.04);
    expect(steep(section)).toHaveLength(0);
    if (i === 0) continue;
    const joint = joints[i - 1]!;
    if (joint.turn !== null) {
      const { short, places } = seamAgainstTurns(section, record, i - 1);
      expect(places).toBeGreaterThan(record.former.segments);
      // Chords of the outside, 0.033 mm at 72 of them, and straight runs between columns.
      expect(short).toBeLessThan(0.05);
      tally.short = Math.max(tally.short, short);
      tally.helical++;
    }
    const clear = seamAgainstHoles(section, record);
    expect(clear).toBeGreaterThan(2 * record.printer.lineMm - 0.03);
    tally.hole = Math.min(tally.hole, clear);
    const { spigot, bore, places } = gapAt(section, sections[i - 1]!, record, i - 1);
    expect(places).toBeGreaterThan(record.former.segments / 2);
    const off = Math.abs(bore - spigot - joint.glueGapMm);
    // Welding and cutting move a vertex by a few micrometres.
    expect(off).toBeLessThan(0.006);
    tally.gapOff = Math.max(tally.gapOff, off);
  }
  for (const hole of record.holes) {
    const off = sections.map(({ facets }) => holeOff(facets, hole));
    // In one section at least; the hole through a spigot is wider.
    expect(Math.min(...off)).toBeLessThan(PLACE_MM);
  }
  tally.coils++;
  tally.sections += sections.length;
  return sections;
}

const none = (): Tally => ({ coils: 0, sections: 0, helical: 0, short: 0, hole: 1e9, gapOff: 0, shared: 0 });

function told(name: string, tally: Tally) {
  const um = (mm: number) => `${(1000 * mm).toFixed(1)} um`;
  console.log(
    `${name}: ${tally.coils} coils in ${tally.sections} sections; ${tally.helical} climbing seams short of half a pitch by ${um(tally.short)} at worst, ${tally.hole.toFixed(2)} mm from the nearest hole, glue gap off by ${um(tally.gapOff)}, sections overlap by ${um(tally.shared)}`,
  );
}

const RUNS = 2;

describe('former in sections, read back from its bytes', () => {
  test('random coils', async () => {
    const tally = none();
    for (const coil of fc.sample(longCoils, { seed: 5, numRuns: RUNS })) {
      const record = longRecord(coil);
      const height = Math.max(45, coil.share * record.former.lengthMm);
      const found = splitFor(record, height);
      if ('none' in found) continue;
      const split = splitRecord(record, height);
      await proveTogether(split, await prove(split, height, tally), tally);
    }
    told('random', tally);
    expect(Math.min(tally.coils, tally.helical)).toBeGreaterThanOrEqual(RUNS);
  });

  test('holes of the section below go on through the spigot, wider by the clearance', async () => {
    const turns = Array.from({ length: 8 }, (_, i) => 7 * (i + 1));
    const record = splitRecord(longRecord({ options: { turns, hand: 'left', diameterMm: 40 }, share: 1 }), 60);
    const [joint] = record.former.joints;
    const tally = none();
    const [lower, upper] = await prove(record, 60, tally);
    told('bored spigot', tally);
    const wall = record.former.wallMm;
    const foot = joint!.seamMm - wall - joint!.spigotMm;
    const through = record.holes.filter(({ axialMm }) => axialMm > foot && axialMm < joint!.seamMm - wall);
    expect(through.length).toBeGreaterThan(0);
    for (const hole of through) {
      expect(holeOff(lower!.facets, hole)).toBeLessThan(PLACE_MM);
      expect(holeOff(upper!.facets, { ...hole, diameterMm: hole.diameterMm + 0.3 })).toBeLessThan(PLACE_MM);
    }
  });

  test('a flat seam outside the winding is kept from turning by its tongue', async () => {
    const sample = longRecord({ options: { turns: [20.5], ears: false }, share: 1 });
    const record = splitRecord({ ...sample, former: { ...sample.former, lengthMm: 100 } }, 80);
    expect(record.former.joints).toMatchObject([{ turn: null, climbMm: 0 }]);
    const tally = none();
    const [lower, upper] = await prove(record, 80, tally);
    told('flat', tally);
    const { keyDeg } = record.former.joints[0]!;
    const across = ({ facets }: Section) => {
      const sides = facets.filter(({ normal, corners, area }) => {
        const turned = (angle(corners[0]) - keyDeg) * RAD;
        const side = Math.abs(-normal[0] * Math.sin(keyDeg * RAD) + normal[1] * Math.cos(keyDeg * RAD));
        const inBore = corners.every((v) => radius(v) < record.former.boreDiameterMm / 2 + 0.05);
        return area > 1e-3 && side > 0.999 && Math.cos(turned) > 0.9 && inBore;
      });
      return sides.map(({ corners: [c] }) => c[1] * Math.cos(keyDeg * RAD) - c[0] * Math.sin(keyDeg * RAD));
    };
    const [tongue, notch] = [across(lower!), across(upper!)];
    expect(Math.min(tongue.length, notch.length)).toBeGreaterThan(1);
    const width = (sides: number[]) => Math.max(...sides) - Math.min(...sides);
    expect(width(notch) - width(tongue)).toBeCloseTo(record.printer.clearanceMm, 3);
    expect(Math.max(...tongue) + Math.min(...tongue)).toBeCloseTo(0, 3);
  });
});

describe('what is refused or would be seen', () => {
  const record = splitRecord(longRecord({ options: { turns: [20.25, 41] }, share: 1 }), 50);
  const sections = sectionsOf(record);
  const moved = (by: number): CoilRecord => {
    const [joint] = record.former.joints;
    const turn = joint!.turn! + by;
    const seamMm = joint!.seamMm + by * record.windings[0]!.pitchMm;
    return { ...record, former: { ...record.former, joints: [{ ...joint!, turn, seamMm }] } };
  };
  const codeOf = (changed: CoilRecord) => {
    try {
      return formerParts(changed).length;
    } catch (error) {
      if (!(error instanceof Fault)) throw error;
      return error.faults[0]!.code;
    }
  };

  test('a seam moved on to a hole, or out of the former', () => {
    expect(codeOf(record)).toBe(2);
    const tap = record.holes.find(({ purpose }) => purpose === 'tap')!;
    const on = tap.turn! - record.former.joints[0]!.turn!;
    expect(codeOf(moved(Math.floor(on)))).toBe('former-joint-meets-hole');
    expect(codeOf(moved(-100))).toBe('former-joint-no-room');
    expect(codeOf(moved(60))).toBe('former-joint-no-room');
  });

  test('a seam a third of a pitch beside the middle of the turns', async () => {
    const upper = (await sections)[1]!;
    expect(seamAgainstTurns(upper, record, 0).short).toBeLessThan(0.05);
    const { pitchMm } = record.windings[0]!;
    const beside = {
      ...record,
      windings: [
        { ...record.windings[0]!, turnPositionsMm: record.windings[0]!.turnPositionsMm.map((z) => z + pitchMm / 3) },
      ],
    };
    expect(seamAgainstTurns(upper, beside, 0).short).toBeGreaterThan(0.2);
  });

  test('the same record gives the same bytes', async () => {
    const again = await sectionsOf(structuredClone(record));
    for (const [i, { bytes }] of (await sections).entries()) expect(Buffer.compare(bytes, again[i]!.bytes)).toBe(0);
  });

  test('a sample that the printer takes whole stays one part', () => {
    expect(formerParts(sampleRecord()).map(({ part }) => part)).toEqual(['former']);
  });
});
