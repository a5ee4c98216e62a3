/** Ridges, base, screw circle and posts of formers that the planner lays out, read back from the bytes. */
import { beforeAll, describe, expect, test } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import { makePart } from '../../src/kernel/make.ts';
import { formerParts } from '../../src/parts/former.ts';
import { printedOf } from '../../src/record/make.ts';
import type { PartsRecord } from '../../src/record/schema.ts';
import { candidatesOf } from '../../src/solve/candidates.ts';
import { designOf } from '../../src/solve/design.ts';
import type { Found } from '../../src/solve/search.ts';
import { demandFor } from '../../src/solve/search.ts';
import { jobOf, type Parts, stream } from '../helpers/jobs.ts';
import { type Facet, facetsOf, radialHole, surfaceOf, tangentHole, uprightHole, volumeOf } from '../helpers/stl.ts';

/** A tenth of what a printer can place; float32 and chords stay far below it. */
const PLACE_MM = 0.02;
const CASES = 20;
const RAD = Math.PI / 180;

interface Made {
  readonly record: PartsRecord;
  readonly facets: readonly Facet[];
}

/** The former of the first candidate that the planner can work out; null where it has none. */
function laidOut(parts: Parts): PartsRecord | null {
  const job = jobOf(parts);
  for (const candidate of candidatesOf(job).slice(0, 4)) {
    const outcome = designOf(job, demandFor(job), candidate);
    if (outcome.ok) return printedOf(job, { chosen: outcome.design } as Found).record;
  }
  return null;
}

function randomJob(random: () => number): Parts {
  const one = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const mounting = one(['ears', 'base', 'none'] as const);
  const diameter = Math.round(25 + 50 * random());
  const most = Math.round(3 + 12 * random());
  const nozzle = one([0.4, 0.4, 0.6]);
  return {
    want: { inductance: `${most / 3} uH to ${most} uH`, taps: one([2, 3, 4]) },
    former: {
      kind: 'printed',
      'outside-diameter': `${diameter} mm`,
      mounting,
      flanges: random() < 0.6,
      ...(mounting === 'none' ? {} : { screw: `${one([3.2, 4.4, 5.5])} mm` }),
      ...(mounting === 'none' || random() < 0.5 ? {} : { 'screw-circle': `${diameter + 30} mm` }),
    },
    wire: [one(['0.315 mm enamel', '0.5 mm enamel', '22 AWG double cotton', '0.9 mm enamel', '1.4 mm enamel'])],
    winding: {
      hand: one(['right', 'left']),
      pitch: one(['close', 'close', 'spaced']),
      'tap-method': one(['auto', 'lug', 'lug']),
      'finish-trim': random() < 0.7,
    },
    printer: { nozzle: `${nozzle} mm`, 'hole-compensation': `${one([0, 0.15])} mm` },
  };
}

const made: Made[] = [];
let refused = 0;

beforeAll(async () => {
  const random = stream(20260);
  while (made.length < CASES) {
    const record = laidOut(randomJob(random));
    if (record === null) refused++;
    else {
      // The kernel checks bodies, handles, size and volume of the bytes against the description.
      const part = await makePart(formerParts(record)[0]!);
      made.push({ record, facets: facetsOf(part.bytes) });
    }
  }
  const count = (has: (record: PartsRecord) => boolean) => made.filter(({ record }) => has(record)).length;
  const kinds = {
    ridges: count(({ former }) => former.ridges !== null),
    base: count(({ former }) => former.base !== null),
    ears: count(({ former }) => former.ears.length > 0),
    posts: count(({ former }) => former.posts.length > 0),
    plain: count(({ former }) => former.flange === null),
  };
  console.log(`fittings: ${made.length} formers made, ${refused} jobs without a coil; ${JSON.stringify(kinds)}`);
  for (const each of Object.values(kinds)) expect(each).toBeGreaterThan(2);
}, 60_000);

/** Corners of the mesh at a radius, with their turn as the helix of the winding climbs (0 to 1) and their height. */
function cornersAt({ record, facets }: Made, r: number): { share: number; zMm: number }[] {
  const sense = record.frame.hand === 'right' ? 1 : -1;
  const found = new Map<string, { share: number; zMm: number }>();
  for (const { corners } of facets)
    for (const [x, y, z] of corners)
      if (Math.abs(Math.hypot(x, y) - r) < 0.003) {
        const share = (((sense * Math.atan2(y, x)) / (2 * Math.PI)) % 1) + 1;
        found.set(`${x},${y},${z}`, { share: share % 1, zMm: z });
      }
  return [...found.values()];
}

describe('fittings read back from the bytes', () => {
  test('one closed surface without supports', () => {
    for (const { facets } of made) {
      expect(surfaceOf(facets).faultySides).toBe(0);
      // A little over 45 degrees where helix and slope add up; float32 blurs the normals of slivers beside holes.
      const steep = facets.filter(
        ({ normal, corners, area }) => area > 1e-4 && normal[2] < -0.72 && corners.some((corner) => corner[2] > 0.01),
      );
      expect(steep).toHaveLength(0);
    }
  });

  test('the first turn lies on the start ridge, the last possible one under the finish ridge', () => {
    let places = 0;
    let worst = 0;
    for (const each of made) {
      const { former, windings, holes } = each.record;
      const { ridges } = former;
      if (ridges === null) continue;
      const winding = windings[0]!;
      const wire = winding.wire.overallMm;
      const at = (u: number) => axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, u);
      const corners = cornersAt(each, former.outsideDiameterMm / 2 + ridges.heightMm);
      // The wire's middle lies half a wire over the surface, the ridge's edge its height.
      const overMm = wire / 2 - ridges.heightMm;
      const row = holes.filter((hole) => hole.purpose === 'finish').map((hole) => hole.turn!);
      const ends = [...row].sort((a, b) => a - b).at(-2)!;
      for (const [end, last] of [
        ['start', 1],
        ['finish', ends],
      ] as const) {
        const run = ridges[end];
        if (run === null) continue;
        expect(run.fromTurn).toBeGreaterThan(last - 1);
        expect(run.toTurn).toBeLessThan(last);
        let seen = 0;
        for (const { share, zMm } of corners) {
          const turn = share + Math.ceil(last - 1 - share);
          const up = zMm - at(turn);
          const touches = end === 'start' ? -up : (overMm + up) / Math.SQRT2;
          // The corners of a ridge: its flat top, or the upper end of its slope.
          if (Math.abs(up - run.footMm - (end === 'start' ? ridges.widthMm : ridges.heightMm)) > 0.15) continue;
          if (turn < run.fromTurn || turn > run.toTurn) continue;
          worst = Math.max(worst, Math.abs(touches - wire / 2));
          seen++;
        }
        expect(seen).toBeGreaterThan(20);
        places += seen;
      }
      if (ridges.start !== null) expect(ridges.start.toTurn - ridges.start.fromTurn).toBeGreaterThan(0.7);
    }
    console.log(`ridges: ${places} places half a wire from the wire's middle, worst ${(worst * 1000).toFixed(2)} um`);
    expect(places).toBeGreaterThan(200);
    expect(worst).toBeLessThan(PLACE_MM);
  });

  test('holes of the wall, screws and eyes are where the record says, wider by the compensation', () => {
    const counts = { wall: 0, screws: 0, eyes: 0 };
    let worst = 0;
    for (const { record, facets } of made) {
      const { former, printer } = record;
      const more = printer.holeCompensationMm;
      const take = (fit: ReturnType<typeof radialHole>, diameterMm: number) => {
        expect(fit.walls).toBeGreaterThan(9);
        worst = Math.max(worst, Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - diameterMm));
      };
      for (const { angleDeg, axialMm, diameterMm } of record.holes) {
        take(radialHole(facets, angleDeg, axialMm, diameterMm + more), diameterMm + more);
        counts.wall++;
      }
      const { base, ears, posts } = former;
      const screws = [
        ...ears.map((ear) => [ear.angleDeg, ear.centreRadiusMm, ear.holeDiameterMm] as const),
        ...Array.from(
          { length: base?.holes ?? 0 },
          (_, i) =>
            [base!.firstDeg + (360 * i) / base!.holes, base!.circleDiameterMm / 2, base!.holeDiameterMm] as const,
        ),
      ];
      for (const [angleDeg, radiusMm, diameterMm] of screws) {
        take(uprightHole(facets, angleDeg, radiusMm, diameterMm + more), diameterMm + more);
        counts.screws++;
      }
      for (const post of posts) {
        const radiusMm = former.outsideDiameterMm / 2 + post.eyeReachMm;
        take(tangentHole(facets, post.angleDeg, radiusMm, post.axialMm, post.eyeMm + more), post.eyeMm + more);
        counts.eyes++;
      }
    }
    console.log(`fittings: ${JSON.stringify(counts)} holes, worst ${(worst * 1000).toFixed(2)} um`);
    for (const count of Object.values(counts)) expect(count).toBeGreaterThan(10);
    expect(worst).toBeLessThan(PLACE_MM);
  });

  test('heads pass the former, posts stay under the winding and clear of one another', () => {
    for (const { record } of made) {
      const { former, holes } = record;
      const r = former.outsideDiameterMm / 2;
      const out = Math.max(
        former.flange?.diameterMm ?? 0,
        ...former.posts.map((post) => 2 * (r + post.reachMm)),
        2 * r,
      );
      const circles = [...former.ears.map((ear) => 2 * ear.centreRadiusMm), former.base?.circleDiameterMm ?? Infinity];
      const screw = former.base?.holeDiameterMm ?? former.ears[0]?.holeDiameterMm ?? 0;
      for (const circle of circles) expect(circle - out).toBeGreaterThan(2 * screw);
      const lowest = Math.min(...holes.map((hole) => hole.axialMm - hole.diameterMm / 2));
      for (const [i, post] of former.posts.entries()) {
        expect(lowest - former.footMm - post.heightMm).toBeGreaterThan(0.8);
        for (const other of former.posts.slice(i + 1)) {
          const apart = Math.abs(((post.angleDeg - other.angleDeg + 540) % 360) - 180) * RAD * (r + post.reachMm / 2);
          // Room for pliers, less what the angle is rounded by: a tenth of a degree.
          expect(apart - post.widthMm).toBeGreaterThan(2.5 - 0.1);
        }
      }
    }
  });
});

test('ridges add what they are: the same former with and without, by its volume', async () => {
  const each = made.find(({ record }) => record.former.ridges?.start && record.former.ridges.finish)!;
  const { record, facets } = each;
  const ridges = record.former.ridges!;
  const bare = { ...record, former: { ...record.former, ridges: null } };
  const without = await makePart(formerParts(bare)[0]!);
  const added = volumeOf(facets) - volumeOf(facetsOf(without.bytes));
  const { heightMm: h, widthMm: w } = ridges;
  const turns = [ridges.start!, ridges.finish!].reduce((sum, run) => sum + run.toTurn - run.fromTurn, 0);
  const length = turns * Math.PI * record.former.outsideDiameterMm;
  // Section times length; the ramps of 2.5 mm at four ends take half of that length off, chords and crests a percent.
  expect(added / (h * (w - h / 2) * (length - 5))).toBeGreaterThan(0.95);
  expect(added / (h * (w - h / 2) * (length - 5))).toBeLessThan(1.05);
});
