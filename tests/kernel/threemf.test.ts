import fc from 'fast-check';
import { strToU8, unzipSync, zipSync } from 'fflate';
import { afterAll, describe, expect, test } from 'vitest';
import { faultyEdges } from '../../src/kernel/check.ts';
import { MeshBuilder, type TriangleMesh } from '../../src/kernel/mesh.ts';
import { MeshError } from '../../src/kernel/mesh-error.ts';
import { type PrintBed, threemfBytes } from '../../src/kernel/threemf.ts';
import { canonical, weld } from '../../src/kernel/weld.ts';
import { readThreemf } from '../helpers/threemf.ts';

/** An upright prism over a convex polygon, its corners counterclockwise. */
function prism(corners: readonly (readonly [x: number, y: number])[], low: number, high: number): TriangleMesh {
  const mesh = new MeshBuilder();
  const n = corners.length;
  const bottom = corners.map(([x, y]) => mesh.vertex(x, y, low));
  const top = corners.map(([x, y]) => mesh.vertex(x, y, high));
  for (let i = 0; i < n; i++) mesh.quad(bottom[i]!, bottom[(i + 1) % n]!, top[(i + 1) % n]!, top[i]!);
  for (let i = 1; i + 1 < n; i++) {
    mesh.triangle(bottom[0]!, bottom[i + 1]!, bottom[i]!);
    mesh.triangle(top[0]!, top[i]!, top[i + 1]!);
  }
  return mesh.build();
}

const brick = (x: number, y: number, z: number, at: readonly [number, number, number] = [0, 0, 0]) =>
  prism(
    [
      [at[0], at[1]],
      [at[0] + x, at[1]],
      [at[0] + x, at[1] + y],
      [at[0], at[1] + y],
    ],
    at[2],
    at[2] + z,
  );

const regular = (n: number, r: number, cx: number, cy: number): [number, number][] =>
  Array.from({ length: n }, (_, i) => {
    const a = (2 * Math.PI * (i + 0.3)) / n;
    return [cx + r * Math.cos(a), cy + r * Math.sin(a)];
  });

const length = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const meshes: fc.Arbitrary<TriangleMesh> = fc
  .record({
    n: fc.integer({ min: 3, max: 60 }),
    r: length(0.5, 150),
    cx: length(-200, 200),
    cy: length(-200, 200),
    low: length(-100, 100),
    height: length(0.1, 250),
  })
  .map(({ n, r, cx, cy, low, height }) => canonical(weld(prism(regular(n, r, cx, cy), low, low + height))));

const anyText = fc.oneof(
  fc.string({ unit: 'binary', maxLength: 30 }),
  fc.constantFrom('<&">\'', 'coil 😀 µH', 'a\u0000b\u001f', '\ud800 lone', ']]>', '\t two\nlines\r\n', '&amp;', ''),
);
const place = length(0, 300);
const beds: fc.Arbitrary<PrintBed> = fc
  .record({
    title: anyText,
    objects: fc.array(fc.record({ name: anyText, mesh: meshes }), { minLength: 1, maxLength: 3 }),
    items: fc.array(fc.record({ object: fc.nat(), name: anyText, xMm: place, yMm: place, turned: fc.boolean() }), {
      minLength: 1,
      maxLength: 6,
    }),
  })
  .map(({ title, objects, items }) => ({
    title,
    objects: objects.map((object, i) => ({ id: `part-${i}`, ...object })),
    items: items.map((item) => ({ ...item, object: `part-${item.object % objects.length}` })),
  }));

/** What a name becomes: what XML 1.0 has no place for is gone, white space is single blanks. */
const kept = (text: string) => {
  let out = '';
  for (const sign of text) {
    const code = sign.codePointAt(0)!;
    const surrogate = code >= 0xd800 && code <= 0xdfff;
    if ((code >= 32 || [9, 10, 13].includes(code)) && !surrogate && code !== 0xfffe && code !== 0xffff) out += sign;
  }
  return out.split(/\s+/).filter(Boolean).join(' ');
};
const orNone = (text: string) => (text === '' ? undefined : text);

/** Half a step of the grid on which coordinates are written, and the noise of reading them. */
const WRITTEN_MM = 0.5e-4 + 1e-9;

let cases = 0;
afterAll(() => {
  console.log(`3MF: ${cases} beds read back`);
  expect(cases).toBeGreaterThan(0);
});

function readBack(bed: PrintBed) {
  cases++;
  return readThreemf(threemfBytes(bed));
}

const single = (mesh: TriangleMesh): PrintBed => ({
  title: 'Bed 1 of 1',
  objects: [{ id: 'part', name: 'Part', mesh }],
  items: [{ object: 'part', name: 'part 1', xMm: 0, yMm: 0, turned: false }],
});

describe('any bed', () => {
  test('is a valid 3MF that holds the same meshes, names and places', () => {
    fc.assert(
      fc.property(beds, (bed) => {
        const read = readBack(bed);
        expect(read.metadata).toEqual({ Title: kept(bed.title), Application: 'coilwright' });
        const used = bed.objects.filter(({ id }) => bed.items.some(({ object }) => object === id));
        expect(read.objects.map(({ name }) => name)).toEqual(used.map(({ name }) => orNone(kept(name))));
        expect(read.objects.map(({ partnumber }) => partnumber)).toEqual(used.map(({ id }) => id));
        for (const [i, { mesh }] of used.entries()) {
          const { vertices, triangles } = read.objects[i]!;
          expect(triangles.flat()).toEqual([...mesh.triangles]);
          expect(vertices.length).toBe(mesh.vertices.length / 3);
          const far = vertices.flat().reduce((most, x, k) => Math.max(most, Math.abs(x - mesh.vertices[k]!)), 0);
          expect(far).toBeLessThanOrEqual(WRITTEN_MM);
        }
        expect(read.items.length).toBe(bed.items.length);
        for (const [i, item] of bed.items.entries()) {
          const lies = read.items[i]!;
          expect(lies.partnumber).toBe(orNone(kept(item.name)));
          expect(read.objects.find(({ id }) => id === lies.objectid)!.partnumber).toBe(item.object);
          expect(Math.abs(lies.min[0]! - item.xMm)).toBeLessThanOrEqual(WRITTEN_MM);
          expect(Math.abs(lies.min[1]! - item.yMm)).toBeLessThanOrEqual(WRITTEN_MM);
          expect(Math.abs(lies.min[2]!)).toBeLessThanOrEqual(1e-9);
          const turn = lies.transform.slice(0, 9);
          expect(turn).toEqual(item.turned ? [0, 1, 0, -1, 0, 0, 0, 0, 1] : [1, 0, 0, 0, 1, 0, 0, 0, 1]);
        }
      }),
      { numRuns: 150, seed: 11 },
    );
  });

  test('gives the same bytes again', () => {
    fc.assert(
      fc.property(beds, (bed) => {
        const bytes = threemfBytes(bed);
        expect(Buffer.compare(bytes, threemfBytes(structuredClone(bed)))).toBe(0);
      }),
      { numRuns: 20, seed: 12 },
    );
  });

  test('stays closed when the vertices lie closer together than the grid', () => {
    // Corners of a small circle far from the origin: some coincide on the grid, and float32 still tells them apart.
    let crowded = 0;
    for (const r of [3e-4, 1e-4, 4e-5, 1e-5, 1e-7])
      for (const at of [0, 0.1, 1]) {
        const mesh = weld(prism(regular(24, r, at, -at), 0, 1));
        if (!(mesh.triangles.length > 0) || faultyEdges(mesh) > 0 || mesh.vertices.length !== 144) continue;
        const read = readBack(single(mesh)).objects[0]!;
        const grid = new Set(read.vertices.map((v) => v.map((x) => Math.round(x * 1e4)).join()));
        if (grid.size < read.vertices.length) crowded++;
        // Where places coincide the numbers are exact, as float32 as well.
        expect(new Set(read.vertices.map((v) => v.map(Math.fround).join())).size).toBe(48);
      }
    console.log(`3MF: ${crowded} crowded meshes`);
    expect(crowded).toBeGreaterThan(3);
  });

  test('keeps a vertex on a place of the grid apart from one beside it, in either order', () => {
    const square = [
      [10, 0],
      [10, 10],
      [0, 10],
    ] as const;
    const beside = [1e-6, 0] as const;
    for (const corners of [
      [beside, ...square, [0, 0] as const],
      [...square, [0, 0] as const, beside],
    ])
      expect(readBack(single(prism(corners, 0, 1))).objects[0]!.vertices.length).toBe(10);
  });

  test('writes short numbers', () => {
    const { texts } = readBack(single(brick(40.1, 20, 0.25, [-20.05, -10, 0]))).objects[0]!;
    expect(texts).toContain('-20.05 -10 0');
    expect(texts).toContain('20.05 10 0.25');
    expect(texts.join(' ')).not.toContain('-0 ');
  });

  test('turns by a quarter, counterclockwise from above', () => {
    const bed = { ...single(brick(40, 10, 5)), items: [{ object: 'part', name: 'a', xMm: 3, yMm: 4, turned: true }] };
    const item = readBack(bed).items[0]!;
    expect(item.min).toEqual([3, 4, 0]);
    expect(item.max).toEqual([13, 44, 5]);
    // The end of the long side along x, seen from the origin, comes to lie along y.
    const m = item.transform;
    expect([40 * m[0]! + m[9]!, 40 * m[1]! + m[10]!]).toEqual([13, 44]);
  });

  test('leaves out objects that are not on this bed', () => {
    const bed = single(brick(1, 1, 1));
    const more = { ...bed, objects: [{ id: 'other', name: 'Other', mesh: brick(2, 2, 2) }, ...bed.objects] };
    expect(readBack(more).objects.map(({ name }) => name)).toEqual(['Part']);
  });
});

describe('what cannot be written', () => {
  const good = brick(1, 1, 1);
  const [first, ...rest] = good.vertices;
  test.each([
    ['no number', { ...good, vertices: Float32Array.from([Number.NaN, ...rest]) }],
    ['no end', { ...good, vertices: Float32Array.from([Number.POSITIVE_INFINITY, ...rest]) }],
    ['inside out', { ...good, triangles: good.triangles.toReversed() }],
    ['a repeated corner', { ...good, triangles: Uint32Array.from([...good.triangles, 1, 1, 2]) }],
    ['a corner that is not there', { ...good, triangles: Uint32Array.from([...good.triangles, 1, 2, 8]) }],
    ['nothing', { vertices: new Float32Array(0), triangles: new Uint32Array(0) }],
  ])('%s is refused', (_, mesh) => {
    expect(first).toBe(0);
    expect(() => threemfBytes(single(mesh))).toThrow(MeshError);
  });

  test('neither is a bed that contradicts itself', () => {
    const bed = single(good);
    const item = bed.items[0]!;
    expect(() => threemfBytes({ ...bed, items: [] })).toThrow('without items');
    expect(() => threemfBytes({ ...bed, items: [{ ...item, object: 'x' }] })).toThrow('no object x');
    expect(() => threemfBytes({ ...bed, objects: [...bed.objects, ...bed.objects] })).toThrow('one id');
    expect(() => threemfBytes({ ...bed, items: [{ ...item, xMm: -1 }] })).toThrow('outside the bed');
    expect(() => threemfBytes({ ...bed, items: [{ ...item, yMm: Number.NaN }] })).toThrow('outside the bed');
  });
});

test('the reader sees what breaks a rule', () => {
  const bytes = threemfBytes(single(brick(2, 3, 4)));
  const path = '3D/3dmodel.model';
  const spoil = (file: string, from: string | RegExp, to: string) => {
    const files = unzipSync(bytes);
    const text = new TextDecoder().decode(files[file]);
    expect(text.replace(from, to)).not.toBe(text);
    files[file] = strToU8(text.replace(from, to));
    return () => readThreemf(zipSync(files, { mtime: new Date(1980, 0, 1) }));
  };
  const spoilt: [string, string | RegExp, string][] = [
    [path, 'millimeter', 'inch'],
    [path, '<triangle v1="0"', '<triangle v1="8"'],
    [path, /<triangle [^>]*>\n/, ''],
    [path, /v1="(\d)" v2="(\d)"/, 'v1="$2" v2="$1"'],
    [path, /v1="(\d)" v2="(\d)"/, 'v1="$1" v2="$1"'],
    [path, 'objectid="1"', 'objectid="2"'],
    [path, 'object id="1"', 'object id="0"'],
    [path, 'transform="1 ', 'transform="-1 '],
    [path, / 0 0 0"/, ' -1 0 0"'],
    [path, 'x="2"', 'x="two"'],
    [path, 'x="2" y="0" z="0"', 'x="0" y="0" z="0"'],
    [path, 'name="Title"', 'name="Date"'],
    [path, 'Part', 'P&art'],
    [path, '</build>', ''],
    ['_rels/.rels', '3dmodel.model', 'model.model'],
    ['_rels/.rels', '2013/01', '2014/01'],
    ['[Content_Types].xml', '3dmodel+xml', 'xml'],
  ];
  for (const [file, from, to] of spoilt) expect(spoil(file, from, to), `${from} -> ${to}`).toThrow();
  expect(() => readThreemf(zipSync(unzipSync(bytes), { mtime: new Date(2001, 1, 1) }))).toThrow('1980');
});
