import fc from 'fast-check';
import type { ManifoldToplevel } from 'manifold-3d';
import { beforeAll, describe, expect, test } from 'vitest';
import { buildSolid } from '../../src/kernel/build.ts';
import { checkBytes } from '../../src/kernel/check.ts';
import { loadKernel } from '../../src/kernel/load.ts';
import { loftMesh } from '../../src/kernel/loft.ts';
import { makeParts } from '../../src/kernel/make.ts';
import { readStl, stlBytes } from '../../src/kernel/stl.ts';
import { formerParts } from '../../src/parts/former.ts';
import type { Expected, Loft, Solid } from '../../src/parts/solid.ts';
import { sampleRecord } from '../helpers/sample.ts';

let kernel: ManifoldToplevel;
let bytes: Uint8Array<ArrayBuffer>;
let solid: Solid;
let count: number;

beforeAll(async () => {
  kernel = await loadKernel();
  const record = sampleRecord({ surface: 'smooth', turns: [6.25, 11.5] });
  solid = formerParts(record)[0]!;
  bytes = (await makeParts(record))[0]!.bytes;
  count = (bytes.length - 84) / 50;
});

const check = (b: Uint8Array, expected: Partial<Expected> = {}) =>
  checkBytes(kernel, 'former', b, { ...solid.expected, ...expected });

function without(i: number): Uint8Array {
  const cut = new Uint8Array(bytes.length - 50);
  cut.set(bytes.subarray(0, 84 + 50 * i));
  cut.set(bytes.subarray(84 + 50 * (i + 1)), 84 + 50 * i);
  new DataView(cut.buffer).setUint32(80, count - 1, true);
  return cut;
}

function turnedOver(i: number): Uint8Array {
  const copy = bytes.slice();
  const second = 84 + 50 * i + 24;
  copy.set(bytes.subarray(second + 12, second + 24), second);
  copy.set(bytes.subarray(second, second + 12), second + 12);
  return copy;
}

describe('checks on the bytes', () => {
  test('pass a good part', () => {
    expect(check(bytes).triangles).toBe(count);
  });

  test('refuse any missing or any turned triangle', () => {
    let runs = 0;
    fc.assert(
      fc.property(fc.nat(count - 1), (i) => {
        runs++;
        expect(() => check(without(i))).toThrow(/part former, checking edges: 3 of/);
        expect(() => check(turnedOver(i))).toThrow(/part former, checking edges: \d+ of/);
      }),
      { seed: 1, numRuns: 20 },
    );
    console.log(`${runs} triangles removed and turned over`);
    expect(runs).toBe(20);
  });

  test('refuse a second body, and a body inside the wall', () => {
    const cube = (at: number, size: number): Loft => {
      const ring = (z: number) =>
        [
          [at, -size],
          [at + size, -size],
          [at + size, size],
          [at, size],
        ].map(([x, y]) => [x!, y!, z] as const);
      return { kind: 'loft', name: 'cube', rings: [ring(10), ring(10 + size)], hubs: null };
    };
    for (const at of [60, 28]) {
      const own = readStl(bytes);
      const extra = loftMesh(cube(at, 0.5));
      const shift = own.vertices.length / 3;
      const both = {
        vertices: Float32Array.from([...own.vertices, ...extra.vertices]),
        triangles: Uint32Array.from([...own.triangles, ...extra.triangles.map((v) => v + shift)]),
      };
      expect(() => check(stlBytes(both))).toThrow('part former, checking bodies: 2, expected 1');
    }
  });

  test('refuse a part that is not the one described', () => {
    const { genus, maxMm, volumeMm3 } = solid.expected;
    expect(() => check(bytes, { genus: genus + 1 })).toThrow(`checking genus: ${genus}, expected ${genus + 1} (1 bore`);
    expect(() => check(bytes, { maxMm: [maxMm[0], maxMm[1], maxMm[2] + 0.02] })).toThrow(/checking outer size: z 0 to/);
    expect(() => check(bytes, { volumeMm3: volumeMm3 * 1.006 })).toThrow(/checking volume: .* within 0.5 %/);
    expect(() => check(bytes, { volumeMm3: Number.NaN })).toThrow(/checking volume/);
  });

  test('refuse an empty file', () => {
    expect(() => check(new Uint8Array(84))).toThrow(/checking edges/);
  });
});

test('a shape that is no solid is refused by name', () => {
  const flat: Loft = {
    kind: 'loft',
    name: 'hole X',
    rings: [
      [
        [0, 0, 0],
        [1, 0, 0],
        [Number.NaN, 1, 0],
      ],
      [
        [0, 0, 1],
        [1, 0, 1],
        [0, 1, 1],
      ],
    ],
    hubs: null,
  };
  expect(() => buildSolid(kernel, { ...solid, cutters: [flat] })).toThrow(
    /part former, hole X: .*, expected a closed solid/,
  );
});

test('a hole that misses the wall is noticed', () => {
  const [first, ...rest] = solid.cutters;
  const lost: Loft = {
    ...(first as Loft),
    rings: (first as Loft).rings.map((ring) => ring.map(([x, y, z]) => [x, y, z + 500])),
  };
  const mesh = buildSolid(kernel, { ...solid, cutters: [lost, ...rest] });
  expect(() => check(stlBytes(mesh))).toThrow(/checking genus/);
});
