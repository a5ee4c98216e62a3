import fc from 'fast-check';
import type { Manifold, Mat4 } from 'manifold-3d';
import { describe, expect, test } from 'vitest';
import { standViews } from '../../src/drawing/parts/stand-views.ts';
import { Fault } from '../../src/fault.ts';
import { buildSolid, fromMesh } from '../../src/kernel/build.ts';
import { loadKernel } from '../../src/kernel/load.ts';
import { arborDimensions, arborParts } from '../../src/parts/arbor.ts';
import type { Solid } from '../../src/parts/solid.ts';
import { standParts } from '../../src/parts/stand.ts';
import { basePieces, socketOutline, tongueOutline } from '../../src/parts/stand-base.ts';
import { type StandDimensions, standDimensions } from '../../src/parts/stand-dimensions.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, type Jig, jigsOf, keepsJigRules } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { boxOf, uprightHole } from '../helpers/stl.ts';

/** A tenth of what a printer can place; chords and float32 stay below it. */
const PLACE_MM = 0.02;

const base = sampleRecord();

interface Bench {
  readonly shop?: Partial<CoilRecord['shop']>;
  readonly printer?: Partial<CoilRecord['printer']>;
  readonly former?: Partial<CoilRecord['former']>;
}

const recordOf = ({ shop, printer, former }: Bench): CoilRecord => ({
  ...base,
  shop: { ...base.shop, ...shop },
  printer: { ...base.printer, ...printer },
  former: { ...base.former, ...former },
});

const hundredths = (min: number, max: number) => fc.integer({ min, max }).map((n) => n / 100);

const benches: fc.Arbitrary<Bench> = fc.record({
  shop: fc.record({
    shaftMm: fc.integer({ min: 5, max: 10 }),
    shaftForm: fc.constantFrom('round' as const, 'hexagon' as const),
    spoolDiameterMm: fc.integer({ min: 65, max: 160 }),
    spoolWidthMm: fc.integer({ min: 20, max: 120 }),
    spoolBoreMm: fc.integer({ min: 20, max: 60 }),
  }),
  printer: fc.record({
    clearanceMm: hundredths(10, 50),
    holeCompensationMm: hundredths(-5, 30),
    bedXMm: fc.constantFrom(180, 220, 300),
  }),
  former: fc.record({ lengthMm: fc.integer({ min: 40, max: 400 }) }),
});

const faultOf = (record: CoilRecord): Fault | null => {
  try {
    standParts(record);
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  return null;
};

/** Words are most of a base's triangles and are tried once. */
const bare = (solid: Solid): Solid =>
  solid.part.startsWith('stand-base')
    ? { ...solid, cutters: solid.cutters.filter(({ name }) => name !== 'words') }
    : solid;

describe('winding stand', () => {
  test('keeps the rules of jigs, words and all', async () => {
    let cases = 0;
    for (const bench of [{}, { shop: { shaftForm: 'hexagon' as const }, former: { lengthMm: 330 } }]) {
      for (const jig of await jigsOf(standParts(recordOf(bench)))) {
        keepsJigRules(jig);
        expect(jig.triangles).toBeLessThan(jig.solid.part.startsWith('stand-base') ? 12_000 : 5000);
        cases++;
      }
    }
    console.log(`${cases} parts made`);
    expect(cases).toBe(9 + 11);
  });

  test('keeps the rules of jigs at random, and fits the bed', async () => {
    let cases = 0;
    await fc.assert(
      fc.asyncProperty(benches, async (bench) => {
        const record = recordOf(bench);
        const { bedXMm, bedYMm } = record.printer;
        for (const jig of await jigsOf(standParts(record).map(bare))) {
          keepsJigRules(jig);
          const { min, max } = boxOf(jig.facets);
          const [w, h] = [max[0] - min[0], max[1] - min[1]];
          expect((w <= bedXMm && h <= bedYMm) || (h <= bedXMm && w <= bedYMm), jig.solid.part).toBe(true);
          cases++;
        }
        const { base: b, spoolBase } = standDimensions(record);
        for (const each of [b, spoolBase])
          expect(
            basePieces(each).reduce((sum, { fromMm, toMm, quantity }) => sum + quantity * (toMm - fromMm), 0),
          ).toBeCloseTo(each.lengthMm, 9);
      }),
      { seed: 4, numRuns: 6 },
    );
    console.log(`${cases} parts made at random`);
    expect(cases).toBeGreaterThan(50);
  });

  test('what goes together clears by the clearance, from the bytes', async () => {
    let cases = 0;
    for (const clearanceMm of [0.2, 0.45])
      for (const shaftForm of ['round', 'hexagon'] as const) {
        const record = recordOf({ printer: { clearanceMm }, shop: { shaftForm }, former: { lengthMm: 300 } });
        const d = standDimensions(record);
        const jigs = new Map((await jigsOf(standParts(record).map(bare))).map((jig) => [jig.solid.part, jig]));
        const part = (name: string): Jig => jigs.get(name)!;

        const [handle, crank] = [part('stand-handle'), part('stand-crank')];
        const bore = uprightHole(handle.facets, 0, 0, d.crank.handleBoreMm);
        const top = boxOf(crank.facets).max[2];
        const pin = crank.facets
          .flatMap(({ corners }) => corners)
          .filter(([, , z]) => Math.abs(z - (top - 0.5)) < 0.01);
        const xs = pin.map(([x]) => x);
        const pinMm = Math.max(...xs) - Math.min(...xs);
        expect(Math.abs(bore.diameterMm - pinMm - clearanceMm)).toBeLessThan(PLACE_MM);
        expect(boxOf(handle.facets).max[2]).toBeCloseTo(top - d.clamp.heightMm - 0.5, 3);

        // A tenon between the walls of its mortise, across and along; both from the corners of the bytes.
        const b = d.base;
        const end = part('stand-base-end');
        const dx = boxOf(end.facets).min[0] - basePieces(b)[0]!.fromMm;
        const inside = (of: number, at: number, reach: number) => Math.abs(of - at) < reach;
        const walls = end.facets
          .filter(({ normal }) => Math.abs(normal[2]) < 1e-3)
          .flatMap(({ corners }) => corners)
          .filter(([x, y]) => inside(x, dx - b.uprightXMm, 4.5) && inside(y, b.tenonYMm, 8.5));
        const spread = (axis: 0 | 1, of: typeof walls) =>
          Math.max(...of.map((p) => p[axis])) - Math.min(...of.map((p) => p[axis]));
        expect(spread(0, walls) - d.upright.thicknessMm).toBeCloseTo(clearanceMm, 3);
        const foot = part('stand-upright');
        const down = boxOf(foot.facets).min[1];
        const tenon = foot.facets
          .flatMap(({ corners }) => corners)
          .filter(([x, y, z]) => x > 0 && y < down + 0.01 && z > 1);
        expect(spread(1, walls) - spread(0, tenon)).toBeCloseTo(clearanceMm, 3);
        expect(boxOf(foot.facets).max[2]).toBe(d.upright.thicknessMm);
        expect(d.upright.tenonMm).toBeLessThan(b.thicknessMm);

        // The bearing: a round end about the shaft, or about the bush.
        const axisY = down + d.upright.tenonMm + d.upright.axisMm;
        const seat = foot.facets
          .filter(({ normal }) => Math.abs(normal[2]) < 1e-3)
          .filter(({ corners }) => corners.every(([x, y]) => Math.hypot(x, y - axisY) < d.upright.bearingMm * 0.53))
          .filter(({ normal }) => normal[0] + normal[1] > 0.2);
        expect(seat.length).toBeGreaterThan(6);
        const runs = shaftForm === 'round' ? record.shop.shaftMm : 2 * widest(part('stand-bush'), 6);
        for (const {
          normal: n,
          corners: [c],
        } of seat) {
          const toAxis = -(n[0] * c[0] + n[1] * (c[1] - axisY));
          expect(Math.abs(2 * toAxis - runs - clearanceMm)).toBeLessThan(PLACE_MM);
        }
        cases++;
      }
    console.log(`${cases} stands measured`);
    expect(cases).toBe(4);
  });

  test('tongue and socket are half the clearance apart on every side', () => {
    let cases = 0;
    for (const clearance of [0.1, 0.3, 0.5]) {
      const [tongue, socket] = [tongueOutline(), socketOutline(clearance)];
      // The socket of the neighbour seen from the tongue: turned by half.
      const turned = socket.map(([x, y]) => [-x, -y] as const);
      for (const [i, a] of turned.entries()) {
        const b = turned[(i + 1) % 4]!;
        if (a[0] === 0 && b[0] === 0) continue;
        const [ux, uy] = [b[0] - a[0], b[1] - a[1]];
        const distances = tongue.map(([x, y]) => Math.abs(ux * (y - a[1]) - uy * (x - a[0])) / Math.hypot(ux, uy));
        expect(Math.min(...distances)).toBeCloseTo(clearance / 2, 9);
        cases++;
      }
    }
    console.log(`${cases} faces compared`);
    expect(cases).toBe(9);
  });

  test('put together, no part runs into another; a little aside, they do', async () => {
    for (const shaftForm of ['round', 'hexagon'] as const) {
      const record = recordOf({ shop: { shaftForm } });
      const clashes = await assembly(record, 0);
      expect(clashes.pairs).toBeGreaterThan(15);
      expect(clashes.overlaps).toEqual([]);
      // 0.2 mm is more than the gap of 0.15 mm round a tenon.
      expect((await assembly(record, 0.2)).overlaps).toContain('stand-upright in stand-base');
      console.log(`${clashes.pairs} pairs of parts intersected, ${shaftForm}`);
    }
  });

  test('the crank turned clockwise takes the wire on over the top for both hands, as the parts say', () => {
    let cases = 0;
    for (const hand of ['right', 'left'] as const) {
      const use = standParts({ ...base, frame: { ...base.frame, hand } }).find(
        ({ part }) => part === 'stand-base',
      )!.use;
      const footAway = use.includes(`this ${hand}-hand coil the foot points away from the crank`);
      expect(footAway).toBe(!use.includes('the foot points to the crank'));
      // Seen from the crank, x to the right, y up. The coil's Z comes towards the viewer when its foot is away.
      const seen = footAway ? 1 : -1;
      const climbs = hand === 'right' ? 1 : -1;
      for (let t = 0; t < 5; t += 0.125) {
        // The place at turn t on the former as it lay at the start, start on top; counterclockwise positive.
        const place = Math.PI / 2 + seen * climbs * 2 * Math.PI * t;
        const clockwise = -2 * Math.PI * t;
        expect(Math.sin(place + clockwise)).toBeCloseTo(1, 9);
        cases++;
      }
    }
    console.log(`${cases} places of the wire followed`);
    expect(cases).toBe(80);
  });

  test('the arrow on the crank points clockwise', async () => {
    const record = recordOf({});
    const d = standDimensions(record);
    const [crank] = await jigsOf(standParts(record).filter(({ part }) => part === 'stand-crank'));
    const floor = crank!.facets
      .filter(({ corners }) => corners.every(([, , z]) => Math.abs(z - (d.clamp.heightMm - 0.5)) < 1e-3))
      .flatMap(({ corners }) => corners);
    expect(floor.length).toBeGreaterThan(20);
    const spread = (side: number) => {
      const xs = floor.filter(([, y]) => side * y > 3).map(([x]) => x);
      return Math.max(...xs) - Math.min(...xs);
    };
    // The arm runs to -x from the shaft; clockwise moves its end to +y, where the arrow's head is.
    expect(spread(1)).toBeGreaterThan(spread(-1) + 2);
  });

  test('a band pulls the wire as the formula says, and notches lie lower and lower', () => {
    const record = recordOf({});
    const { spool, spoolUpright } = standDimensions(record);
    const torque = 0.9 * spool.bandN * spool.drumRMm;
    expect(torque / (record.shop.spoolDiameterMm / 2)).toBeCloseTo(record.windings[0]!.tensionHighN, 9);
    expect(spoolUpright.notchesMm.length).toBeGreaterThanOrEqual(3);
    expect(spoolUpright.notchesMm).toEqual(spoolUpright.notchesMm.toSorted((a, b) => b - a));
  });

  test('clears a hand under the former, and knuckles over the bench', () => {
    for (const diameterMm of [70, 120, 180]) {
      const record = recordOf({ former: { flange: { diameterMm, lowerMm: 3, upperMm: 3 }, ears: [] } });
      const d = standDimensions(record);
      expect(d.reachMm).toBe(diameterMm / 2);
      expect(d.upright.axisMm - d.reachMm).toBeGreaterThanOrEqual(40);
      expect(d.upright.axisMm + d.base.thicknessMm - d.crank.armMm - d.crank.handleMm / 2).toBeGreaterThanOrEqual(30);
    }
  });
});

describe('what a stand cannot be', () => {
  const ears = (reach: number) => ({
    ears: [{ angleDeg: 0, holeDiameterMm: 4.3, centreRadiusMm: reach - 7, widthMm: 14, thicknessMm: 3 }],
  });

  test('uprights larger than the bed: with the reach that fits', () => {
    const fault = faultOf(recordOf({ former: ears(190) }))!;
    expect(fault.exit).toBe(4);
    expect(fault.faults.map(({ code }) => code)).toEqual(['stand-upright-large']);
    const most = Number(/reach ([\d.]+) mm or less/.exec(fault.faults[0]!.todo)![1]);
    expect(faultOf(recordOf({ former: ears(most) }))).toBeNull();
    expect(faultOf(recordOf({ former: ears(most + 0.1) }))).not.toBeNull();
    const [, x, y] = /bed of ([\d.]+) x ([\d.]+) mm or larger/.exec(fault.faults[0]!.todo)!;
    expect(faultOf(recordOf({ former: ears(190), printer: { bedXMm: Number(x), bedYMm: Number(y) } }))).toBeNull();
  });

  test('a spool too large, or with too small a hole: with the one that fits', () => {
    const large = faultOf(recordOf({ shop: { spoolDiameterMm: 400 } }))!;
    expect(large.faults.map(({ code }) => code)).toEqual(['stand-spool-large']);
    const most = Number(/spools of ([\d.]+) mm/.exec(large.faults[0]!.todo)![1]);
    expect(faultOf(recordOf({ shop: { spoolDiameterMm: most } }))).toBeNull();
    expect(faultOf(recordOf({ shop: { spoolDiameterMm: most + 0.1 } }))).not.toBeNull();

    const ring = faultOf(recordOf({ shop: { spoolDiameterMm: 60, spoolBoreMm: 60 } }))!;
    expect(ring.faults.map(({ code }) => code)).toEqual(['stand-spool-bore']);

    for (const shaftForm of ['round', 'hexagon'] as const) {
      const small = faultOf(recordOf({ shop: { spoolBoreMm: 10, shaftForm } }))!;
      expect(small.faults.map(({ code }) => code)).toEqual(['stand-spool-bore']);
      const [, hole, shaft] = /a hole of ([\d.]+) mm or more, or a shaft of ([\d.]+) mm/.exec(small.faults[0]!.todo)!;
      expect(faultOf(recordOf({ shop: { spoolBoreMm: Number(hole), shaftForm } }))).toBeNull();
      expect(faultOf(recordOf({ shop: { spoolBoreMm: Number(hole) - 0.1, shaftForm } }))).not.toBeNull();
      expect(faultOf(recordOf({ shop: { spoolBoreMm: 10, shaftMm: Number(shaft), shaftForm } }))).toBeNull();
    }
  });
});

test('the views show what is printed', () => {
  let cases = 0;
  for (const shaftForm of ['round', 'hexagon'] as const) {
    const record = recordOf({ shop: { shaftForm }, former: { lengthMm: 300 } });
    const views = standViews(record);
    const parts = standParts(record);
    expect(Object.keys(views).sort()).toEqual(parts.map(({ part }) => part).sort());
    for (const { part, expected } of parts) {
      const [wide, high] = extentOf(views[part]!.find(({ title }) => title === 'plan')!);
      expect(Math.abs(wide - expected.maxMm[0] + expected.minMm[0]), part).toBeLessThan(PLACE_MM);
      expect(Math.abs(high - expected.maxMm[1] + expected.minMm[1]), part).toBeLessThan(PLACE_MM);
      cases++;
    }
  }
  console.log(`${cases} plans compared`);
  expect(cases).toBe(10 + 11);
});

/** Greatest radius of the corners higher than `above`. */
const widest = ({ facets }: Jig, above: number): number =>
  Math.max(
    ...facets.flatMap(({ corners }) => corners.filter(([, , z]) => z > above)).map(([x, y]) => Math.hypot(x, y)),
  );

interface Placed {
  readonly name: string;
  readonly body: Manifold;
}

/**
 * Winding stand and spool holder as put together; x along the shaft away from the crank, y to the left seen from the crank,
 * z up from the base. The uprights are moved by `asideMm` along y. Pairs that share volume are named.
 */
async function assembly(record: CoilRecord, asideMm: number): Promise<{ pairs: number; overlaps: string[] }> {
  const kernel = await loadKernel();
  const d = standDimensions(record);
  const arbor = arborDimensions(record);
  const solids = new Map([...arborParts(record), ...standParts(record)].map((solid) => [solid.part, bare(solid)]));
  const made: Manifold[] = [];
  /** Columns: where the part's own x, y, z go, and its origin, which is the origin of its description. */
  const put = (part: string, x: number[], y: number[], z: number[], at: number[]): Placed => {
    const solid = solids.get(part)!;
    const mesh = fromMesh(kernel, buildSolid(kernel, solid));
    const first = solid.shapes[0]!;
    const [ox, oy] = first.kind === 'prism' ? first.frame.origin : [0, 0];
    const own = mesh.translate([-ox, -oy, 0]);
    const body = own.transform([...x, 0, ...y, 0, ...z, 0, ...at, 1] as unknown as Mat4);
    made.push(mesh, own, body);
    return { name: part, body };
  };
  const stand = together(d, put, d.upright, d.base, 'stand-upright', 'stand-base', -1, asideMm);
  const axis = d.upright.axisMm;
  const outer = d.base.uprightXMm + 4;
  const flange = d.bush?.flangeThicknessMm ?? 0;
  const tan = Math.tan((20 * Math.PI) / 180);
  const onShaft: Placed[] = [
    put('stand-crank', [0, -1, 0], [0, 0, 1], [-1, 0, 0], [-outer - flange, 0, axis]),
    put('stand-collar', [0, 1, 0], [0, 0, 1], [1, 0, 0], [outer + flange, 0, axis]),
  ];
  const seated = (half: number, cone: typeof arbor.cone, names: [string, string], z: number): Placed[] =>
    [1, -1].flatMap((side) => {
      const face = half + cone.discMm + (cone.bigMm - cone.boreMm) / 2 / tan;
      const frame = [
        [0, 0, 1],
        [0, side, 0],
        [-side, 0, 0],
      ] as const;
      const turn = frame.map((column) => [...column]) as [number[], number[], number[]];
      return [
        put(names[0], ...turn, [side * face, 0, z]),
        put(names[1], ...turn, [side * (face + d.clamp.heightMm), 0, z]),
      ];
    });
  onShaft.push(...seated(record.former.lengthMm / 2, arbor.cone, ['arbor-cone', 'arbor-collar'], axis));
  const holder = together(d, put, d.spoolUpright, d.spoolBase, 'stand-spool-upright', 'stand-spool-base', 1, asideMm);
  const spool = seated(
    record.shop.spoolWidthMm / 2,
    d.spool.cone,
    ['stand-spool-cone', 'stand-collar'],
    d.spoolUpright.axisMm,
  );
  const overlaps: string[] = [];
  let pairs = 0;
  for (const group of [
    [...stand, ...onShaft],
    [...holder, ...spool],
  ])
    for (const [i, a] of group.entries())
      for (const b of group.slice(i + 1)) {
        const common = a.body.intersect(b.body);
        // Faces that touch share no more than float32 leaves: a hundredth of a cubic millimetre.
        if (common.volume() > 0.01) overlaps.push(`${a.name} in ${b.name}`);
        common.delete();
        pairs++;
      }
  for (const body of made) body.delete();
  return { pairs, overlaps: [...new Set(overlaps)] };
}

/** Two uprights on a base, with their latches and bushes; `face` says to which end their lettering looks. */
function together(
  d: StandDimensions,
  put: (part: string, x: number[], y: number[], z: number[], at: number[]) => Placed,
  upright: StandDimensions['upright'],
  b: StandDimensions['base'],
  name: string,
  under: string,
  face: 1 | -1,
  asideMm: number,
): Placed[] {
  const half = upright.thicknessMm / 2;
  const placed = [1, -1].flatMap((side) => {
    const x = side * b.uprightXMm;
    const list = [put(name, [0, face, 0], [0, 0, 1], [face, 0, 0], [x - face * half, asideMm, 0])];
    // Along the latch's hole: inside on the stand, outside on the holder.
    const out = face < 0 ? -side : side;
    const c = Math.SQRT1_2;
    const [along, aside] = [upright.latchAlongMm, upright.latchAsideMm];
    const [px, py] = [c * (along - aside), c * (along + aside)];
    // From its hole the bar reaches across the open side, to the right and down in the upright's own view.
    const bar = [0, face * c, -c];
    list.push(
      put(
        'stand-latch',
        bar,
        cross([out, 0, 0], bar),
        [out, 0, 0],
        [x + out * (half + 0.01), face * px, upright.axisMm + py],
      ),
    );
    if (d.bush) {
      const outward = face < 0 ? side : -side;
      list.push(
        put(
          'stand-bush',
          cross([0, 0, 1], [-outward, 0, 0]),
          [0, 0, 1],
          [-outward, 0, 0],
          [x + outward * (half + d.bush.flangeThicknessMm), 0, upright.axisMm],
        ),
      );
    }
    return list;
  });
  return [...placed, put(under, [1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 0, -b.thicknessMm])];
}

const cross = (a: number[], b: number[]): number[] => [
  a[1]! * b[2]! - a[2]! * b[1]!,
  a[2]! * b[0]! - a[0]! * b[2]!,
  a[0]! * b[1]! - a[1]! * b[0]!,
];
