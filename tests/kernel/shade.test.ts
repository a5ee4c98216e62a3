import { inflateSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { MeshBuilder, type TriangleMesh } from '../../src/kernel/mesh.ts';
import { PICTURE_PX, PICTURE_VIEWS, type ShadedPicture, shadedPicture } from '../../src/kernel/shade.ts';
import { skinMesh } from '../../src/kernel/skin.ts';
import { canonical, weld } from '../../src/kernel/weld.ts';

interface Grey {
  readonly width: number;
  readonly height: number;
  readonly at: (x: number, y: number) => number;
}

/** Reads the PNG back: own code, for 8 bit grey with the filters 0 to 2. */
function greyOf({ png }: ShadedPicture): Grey {
  const view = new DataView(png.buffer, png.byteOffset);
  expect(Array.from(png.subarray(0, 8))).toEqual([137, 80, 78, 71, 13, 10, 26, 10]);
  const chunks: { type: string; data: Uint8Array }[] = [];
  for (let at = 8; at < png.length; ) {
    const length = view.getUint32(at);
    const type = String.fromCharCode(...png.subarray(at + 4, at + 8));
    chunks.push({ type, data: png.subarray(at + 8, at + 8 + length) });
    at += 12 + length;
  }
  expect(chunks.map((chunk) => chunk.type)).toEqual(['IHDR', 'IDAT', 'IEND']);
  const head = chunks[0]!.data;
  const size = new DataView(head.buffer, head.byteOffset);
  const [width, height] = [size.getUint32(0), size.getUint32(4)];
  expect(Array.from(head.subarray(8))).toEqual([8, 0, 0, 0, 0]);
  const raw = inflateSync(chunks[1]!.data);
  expect(raw.length).toBe((width + 1) * height);
  const grey = new Uint8Array(width * height);
  for (let y = 0; y < height; y++) {
    const filter = raw[y * (width + 1)]!;
    for (let x = 0; x < width; x++) {
      const i = y * width + x;
      const before = filter === 1 ? (x > 0 ? grey[i - 1]! : 0) : filter === 2 && y > 0 ? grey[i - width]! : 0;
      grey[i] = raw[y * (width + 1) + 1 + x]! + before;
    }
  }
  return { width, height, at: (x, y) => grey[y * width + x]! };
}

type Place = readonly [number, number, number];

/** A box from its lowest corner. */
function addBox(mesh: MeshBuilder, [x, y, z]: Place, [a, b, c]: Place): void {
  const at = (i: number, j: number, k: number) => mesh.vertex(x + a * i, y + b * j, z + c * k);
  const v = [0, 1].map((k) => [at(0, 0, k), at(1, 0, k), at(1, 1, k), at(0, 1, k)] as const);
  const [low, high] = v as [(typeof v)[0], (typeof v)[0]];
  mesh.quad(low[3], low[2], low[1], low[0]);
  mesh.quad(high[0], high[1], high[2], high[3]);
  for (let i = 0; i < 4; i++) mesh.quad(low[i]!, low[(i + 1) % 4]!, high[(i + 1) % 4]!, high[i]!);
}

function box(size: Place, at: Place = [0, 0, 0]): TriangleMesh {
  const mesh = new MeshBuilder();
  addBox(mesh, at, size);
  return mesh.build();
}

const tube = (segments: number, turns: number) =>
  canonical(
    weld(
      skinMesh({
        kind: 'skin',
        segments,
        hand: 'right',
        outer: [
          { rMm: 30, zMm: 0 },
          { rMm: 30, zMm: 100 },
        ],
        inner: [
          { rMm: 27, zMm: 100 },
          { rMm: 27, zMm: 0 },
        ],
        groove: {
          afterRow: 0,
          floorMm: 0.3,
          firstColumn: 0,
          samples: Array.from({ length: Math.round(turns * segments) }, (_, i) => ({
            zMm: 5 + (1.2 * i) / segments,
            depthMm: 0.27 * Math.min(1, i / 20, (turns * segments - 1 - i) / 20),
          })),
        },
      }),
    ),
  );

describe('shaded picture', () => {
  const views = fc.record({
    yawDeg: fc.double({ min: -180, max: 180, noNaN: true }),
    pitchDeg: fc.double({ min: -90, max: 90, noNaN: true }),
  });
  const sizes = fc.tuple(
    ...([1, 2, 3].map(() => fc.double({ min: 5, max: 50, noNaN: true })) as [
      fc.Arbitrary<number>,
      fc.Arbitrary<number>,
      fc.Arbitrary<number>,
    ]),
  );

  test('a box covers what its faces cover, without a gap, and keeps clear of the edge', () => {
    let runs = 0;
    fc.assert(
      fc.property(sizes, views, (size, view) => {
        const picture = shadedPicture(box(size), view, 160, 120);
        const grey = greyOf(picture);
        expect([grey.width, grey.height]).toEqual([picture.widthPx, picture.heightPx]);
        expect(grey.width <= 160 && grey.height <= 120 && (grey.width === 160 || grey.height === 120)).toBe(true);
        // Faces of a box as the viewer sees them: area by the cosine of the angle, by hand.
        const [a, e] = [(view.yawDeg * Math.PI) / 180, (view.pitchDeg * Math.PI) / 180];
        const out = [Math.cos(a) * Math.cos(e), Math.sin(a) * Math.cos(e), Math.sin(e)].map(Math.abs);
        const area = out[0]! * size[1] * size[2] + out[1]! * size[0] * size[2] + out[2]! * size[0] * size[1];
        const across = Math.abs(Math.sin(a)) * size[0] + Math.abs(Math.cos(a)) * size[1];
        const up =
          (Math.abs(Math.cos(a)) * size[0] + Math.abs(Math.sin(a)) * size[1]) * Math.abs(Math.sin(e)) +
          size[2] * Math.cos(e);
        const scale = Math.min(156 / across, 116 / up);
        let dark = 0;
        for (let y = 0; y < grey.height; y++) for (let x = 0; x < grey.width; x++) if (grey.at(x, y) < 255) dark++;
        // The outline adds up to a pixel all round, and pixels that it only touches count whole: 2 pixels of its length.
        const round = 2 * (grey.width + grey.height);
        expect(dark).toBeGreaterThan(area * scale ** 2 - 0.5 * round);
        expect(dark).toBeLessThan(area * scale ** 2 + 2 * round);
        // White only outside: along every row one run of white on the left and one on the right.
        for (let y = 0; y < grey.height; y++) {
          let changes = 0;
          for (let x = 1; x < grey.width; x++) if ((grey.at(x, y) === 255) !== (grey.at(x - 1, y) === 255)) changes++;
          expect(changes).toBeLessThanOrEqual(2);
        }
        runs++;
      }),
      { seed: 3, numRuns: 80 },
    );
    console.log(`shaded picture: ${runs} boxes cover what they should`);
    expect(runs).toBe(80);
  });

  test('what is nearer hides what is farther, whichever comes first', () => {
    // Seen from +x, a small box before a large one; from -x it is hidden.
    const make = (first: 'near' | 'far') => {
      const mesh = new MeshBuilder();
      const add = {
        near: () => addBox(mesh, [60, 15, 15], [5, 10, 10]),
        far: () => addBox(mesh, [0, 0, 0], [5, 40, 40]),
      };
      add[first]();
      add[first === 'near' ? 'far' : 'near']();
      return mesh.build();
    };
    const front = (['near', 'far'] as const).map((first) =>
      greyOf(shadedPicture(make(first), { yawDeg: 0, pitchDeg: 0 }, 124, 124)),
    );
    const back = greyOf(shadedPicture(make('near'), { yawDeg: 180, pitchDeg: 0 }, 124, 124));
    const black = ({ at }: Grey) =>
      Array.from({ length: 40 }, (_, i) => at(62, 30 + i)).filter((grey) => grey < 60).length;
    for (const one of front) {
      expect(black(one)).toBeGreaterThan(0);
      // Inside the outline of the small box stands its face.
      expect(one.at(62, 62)).toBeGreaterThan(130);
    }
    expect(black(back)).toBe(0);
    for (let y = 0; y < 124; y++) for (let x = 0; x < 124; x++) expect(front[0]!.at(x, y)).toBe(front[1]!.at(x, y));
  });

  test('greys are light, lines dark: three faces of a cube differ and share dark edges', () => {
    const grey = greyOf(shadedPicture(box([20, 20, 20]), { yawDeg: 45, pitchDeg: 35 }, 200, 200));
    const [middleX, middleY] = [grey.width >> 1, grey.height >> 1];
    const faces = [
      [middleX, middleY >> 1],
      [middleX >> 1, middleY + 30],
      [middleX + (middleX >> 1), middleY + 30],
    ].map(([x, y]) => grey.at(x!, y!));
    expect(new Set(faces).size).toBe(3);
    for (const face of faces) expect(face).toBeGreaterThan(135);
    // Straight down from the corner that is nearest runs an edge.
    expect(grey.at(middleX, middleY + 40)).toBeLessThan(120);
    expect(Math.min(...Array.from({ length: grey.width }, (_, x) => grey.at(x, middleY)))).toBe(0);
  });

  test('chords of a circle are shaded as one surface', () => {
    const grey = greyOf(shadedPicture(tube(48, 2), { yawDeg: 10, pitchDeg: 0 }, 300, 300));
    const row = Math.round(grey.height * 0.4);
    const greys = Array.from({ length: grey.width }, (_, x) => grey.at(x, row)).slice(10, -10);
    const steps = greys.slice(1).map((value, i) => Math.abs(value - greys[i]!));
    // 48 flats over 180 pixels would step by several greys at each of 24 edges.
    expect(Math.max(...steps)).toBeLessThanOrEqual(4);
    expect(Math.max(...greys) - Math.min(...greys)).toBeGreaterThan(40);
  });

  test('same mesh, same bytes; a grooved former of many triangles', () => {
    const mesh = tube(144, 70);
    const triangles = mesh.triangles.length / 3;
    expect(triangles).toBeGreaterThan(60_000);
    const started = performance.now();
    const pictures = PICTURE_VIEWS.map((view) => shadedPicture(mesh, view, PICTURE_PX, PICTURE_PX));
    const ms = (performance.now() - started) / pictures.length;
    console.log(`shaded picture: ${triangles} triangles in ${ms.toFixed(0)} ms, ${pictures[0]!.png.length} bytes`);
    PICTURE_VIEWS.forEach((view, i) => {
      expect(Buffer.compare(shadedPicture(mesh, view, PICTURE_PX, PICTURE_PX).png, pictures[i]!.png)).toBe(0);
      expect(pictures[i]!.png.length).toBeLessThan(100_000);
    });
    expect(pictures.length).toBe(2);
  });

  test('nothing to draw, and no room to draw it in, are refused', () => {
    const view = PICTURE_VIEWS[0]!;
    expect(() => shadedPicture(new MeshBuilder().build(), view, 100, 100)).toThrow(RangeError);
    expect(() => shadedPicture(box([1, 1, 1]), view, 4, 100)).toThrow(RangeError);
  });
});
