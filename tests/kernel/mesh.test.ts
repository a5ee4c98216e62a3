import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { countBodies, faultyEdges } from '../../src/kernel/check.ts';
import { loftMesh } from '../../src/kernel/loft.ts';
import { signedVolume, type TriangleMesh } from '../../src/kernel/mesh.ts';
import { skinMesh } from '../../src/kernel/skin.ts';
import { readStl, stlBytes } from '../../src/kernel/stl.ts';
import { canonical, weld } from '../../src/kernel/weld.ts';
import type { Skin } from '../../src/parts/solid.ts';

/** A tube of 20 mm with a groove over any span of turns, starting at any column. */
const skins: fc.Arbitrary<Skin> = fc
  .record({
    segments: fc.constantFrom(24, 36, 48),
    hand: fc.constantFrom('right' as const, 'left' as const),
    turns: fc.double({ min: 1.2, max: 5, noNaN: true }),
    firstColumn: fc.integer({ min: -30, max: 30 }),
    depthMm: fc.double({ min: 0.05, max: 0.4, noNaN: true }),
    ramp: fc.integer({ min: 1, max: 20 }),
  })
  .map(({ segments, hand, turns, firstColumn, depthMm, ramp }) => {
    const count = Math.ceil(turns * segments) + 2;
    return {
      kind: 'skin' as const,
      segments,
      hand,
      outer: [
        { rMm: 9.5, zMm: 0 },
        { rMm: 10, zMm: 0.5 },
        { rMm: 10, zMm: 30 },
      ],
      inner: [
        { rMm: 8, zMm: 30 },
        { rMm: 8, zMm: 0 },
      ],
      groove: {
        afterRow: 1,
        floorMm: 0.3,
        firstColumn,
        samples: Array.from({ length: count }, (_, i) => ({
          zMm: 5 + (2 * i) / segments,
          depthMm: depthMm * Math.min(1, i / ramp, (count - 1 - i) / ramp),
        })),
      },
    };
  });

/** Vertices less edges plus triangles. */
const euler = (mesh: TriangleMesh) => mesh.vertices.length / 3 - mesh.triangles.length / 6;

describe('turned skin', () => {
  test('closes, faces outwards and is one tube, whatever the groove', () => {
    let runs = 0;
    fc.assert(
      fc.property(skins, (skin) => {
        runs++;
        const mesh = weld(skinMesh(skin));
        expect(faultyEdges(mesh)).toBe(0);
        expect(countBodies(mesh)).toBe(1);
        expect(euler(mesh)).toBe(0);
        // A groove of at most 0.4 x 0.7 mm over at most six turns of 63 mm.
        const taken = signedVolume(skinMesh({ ...skin, groove: null })) - signedVolume(mesh);
        expect(taken).toBeGreaterThan(0);
        expect(taken).toBeLessThan(0.4 * 0.7 * 63 * 6);
      }),
      { seed: 7, numRuns: 60 },
    );
    console.log(`${runs} skins`);
    expect(runs).toBeGreaterThanOrEqual(60);
  });

  test('the hands are mirror images', () => {
    const [skin] = fc.sample(skins, { seed: 3, numRuns: 1 });
    const right = skinMesh({ ...skin!, hand: 'right' });
    const left = skinMesh({ ...skin!, hand: 'left' });
    expect(Array.from(left.vertices)).toEqual(Array.from(right.vertices, (x, i) => (i % 3 === 1 ? -x : x)));
  });

  test('a groove of less than a turn is refused', () => {
    const [skin] = fc.sample(skins, { seed: 3, numRuns: 1 });
    const groove = { ...skin!.groove!, samples: skin!.groove!.samples.slice(0, skin!.segments) };
    expect(() => skinMesh({ ...skin!, groove })).toThrow(/more than one turn/);
  });
});

test('a loft faces outwards whichever way its rings run', () => {
  const square = (z: number) => [[0, 0, z] as const, [2, 0, z] as const, [2, 3, z] as const, [0, 3, z] as const];
  for (const rings of [
    [square(0), square(4)],
    [square(4), square(0)],
  ]) {
    const mesh = loftMesh({ kind: 'loft', name: 'block', rings, hubs: null });
    expect(signedVolume(mesh)).toBeCloseTo(24, 5);
    expect(faultyEdges(mesh)).toBe(0);
  }
});

test('order, and so bytes, do not depend on how the mesh came', () => {
  let runs = 0;
  const [skin] = fc.sample(skins, { seed: 11, numRuns: 1 });
  const mesh = weld(skinMesh(skin!));
  const wanted = Buffer.from(stlBytes(canonical(mesh)));
  fc.assert(
    fc.property(fc.infiniteStream(fc.nat()), (numbers) => {
      runs++;
      const pick = (n: number) => (numbers.next().value as number) % n;
      const count = mesh.triangles.length / 3;
      const order = Array.from({ length: count }, (_, i) => i);
      for (let i = count - 1; i > 0; i--) {
        const k = pick(i + 1);
        [order[i], order[k]] = [order[k]!, order[i]!];
      }
      // Each triangle apart, turned on by any number of corners.
      const vertices = new Float32Array(order.length * 9);
      for (const [i, t] of order.entries()) {
        const on = pick(3);
        for (let k = 0; k < 3; k++) {
          const v = mesh.triangles[3 * t + ((k + on) % 3)]!;
          vertices.set(mesh.vertices.subarray(3 * v, 3 * v + 3), 9 * i + 3 * k);
        }
      }
      const apart = { vertices, triangles: new Uint32Array(order.length * 3).map((_, i) => i) };
      expect(wanted.equals(stlBytes(canonical(weld(apart))))).toBe(true);
    }),
    { seed: 5, numRuns: 5 },
  );
  expect(runs).toBe(5);
});

test('bytes read back are the mesh that went in', () => {
  const [skin] = fc.sample(skins, { seed: 2, numRuns: 1 });
  const mesh = canonical(weld(skinMesh(skin!)));
  const back = canonical(weld(readStl(stlBytes(mesh))));
  expect(back).toEqual(mesh);
  expect(() => readStl(stlBytes(mesh).subarray(0, 1000))).toThrow(/1000 bytes/);
  expect(() => readStl(new Uint8Array(10))).toThrow(/10 bytes/);
});
