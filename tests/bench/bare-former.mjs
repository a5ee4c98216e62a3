// The yardstick of the benchmark: the former of a plan, built and serialized with the bare libraries and none of the
// project's code, as somebody would write it directly. Grooved mesh made by hand, ears, holes and numbers by booleans,
// bytes from the serializer. Prints the number of triangles and of bytes; writes the file when a second path is given.
//
//     node tests/bench/bare-former.mjs plan.json [former.stl]
import { readFileSync, writeFileSync } from 'node:fs';
import jscad from '@jscad/modeling';
import serializer from '@jscad/stl-serializer';
import Module from 'manifold-3d';

const plan = JSON.parse(readFileSync(process.argv[2], 'utf8'));
const { former, holes } = plan;
const [winding] = plan.windings;
const kernel = await Module();
kernel.setup();
const { Manifold, CrossSection, Mesh } = kernel;

const n = former.segments;
const hand = plan.frame.hand === 'left' ? -1 : 1;
const outside = former.outsideDiameterMm / 2;
const bore = former.boreDiameterMm / 2;
const rim = former.flange ? former.flange.diameterMm / 2 : outside;
const length = former.lengthMm;
const chamfer = former.chamferMm;

/** Straight lines between the middles of the turns, plain pitch beyond. */
function axial(u) {
  const z = winding.turnPositionsMm;
  const whole = Math.floor(winding.turns + 1e-9);
  const middle = (i) => (i < whole ? i + 0.5 : (whole + winding.turns) / 2);
  const last = z.length - 1;
  if (u <= middle(0)) return z[0] + (u - middle(0)) * winding.pitchMm;
  if (u >= middle(last)) return z[last] + (u - middle(last)) * winding.pitchMm;
  const i = Math.min(Math.max(Math.floor(u - 0.5), 0), last - 1);
  return z[i] + ((u - middle(i)) / (middle(i + 1) - middle(i))) * (z[i + 1] - z[i]);
}

function tube() {
  const xyz = [];
  const tri = [];
  const cos = [];
  const sin = [];
  for (let j = 0; j < n; j++) {
    cos.push(Math.cos((2 * Math.PI * (j + 0.5)) / n));
    sin.push(hand * Math.sin((2 * Math.PI * (j + 0.5)) / n));
  }
  const vertex = (j, r, z) => xyz.push(r * cos[j % n], r * sin[j % n], z) / 3 - 1;
  const triangle = (a, b, c) => {
    if (a !== b && b !== c && c !== a) tri.push(a, hand > 0 ? b : c, hand > 0 ? c : b);
  };
  const quad = (a, b, c, d) => {
    triangle(a, b, c);
    triangle(a, c, d);
  };
  const wide = bore / Math.cos(Math.PI / n);
  const profile = [
    [rim - chamfer, 0],
    [rim, chamfer],
  ];
  if (former.flange) profile.push([rim, former.flange.lowerMm], [outside, former.flange.lowerMm]);
  const below = profile.length - 1;
  if (former.flange)
    profile.push([outside, length - former.flange.upperMm - rim + outside], [rim, length - former.flange.upperMm]);
  profile.push([rim, length], [wide, length], [wide, chamfer], [wide + chamfer, 0]);
  const rows = profile.map(([r, z]) => cos.map((_, j) => vertex(j, r, z)));
  for (let i = 0; i < rows.length; i++) {
    const [low, high] = [rows[i], rows[(i + 1) % rows.length]];
    if (i === below && former.groove) groove(low, high, vertex, triangle, quad);
    else for (let j = 0; j < n; j++) quad(low[j], low[(j + 1) % n], high[(j + 1) % n], high[j]);
  }
  return new Manifold(
    new Mesh({ numProp: 3, vertProperties: Float32Array.from(xyz), triVerts: Uint32Array.from(tri) }),
  );
}

function groove(low, high, vertex, triangle, quad) {
  const { depthMm, floorMm, runInTurns } = former.groove;
  const from = -runInTurns;
  const to = Math.max(winding.turns, ...holes.map((h) => (h.purpose === 'finish' ? h.turn : 0))) + runInTurns;
  const first = Math.floor(from * n - 0.5);
  const last = Math.ceil(to * n - 0.5) - first;
  const start = ((first % n) + n) % n;
  const cross = [];
  for (let i = 0; i <= last; i++) {
    const u = (first + i + 0.5) / n;
    const z = axial(u);
    let d = depthMm * Math.min(1, (u - from) / runInTurns, (to - u) / runInTurns);
    if (i === 0 || i === last || d < 0.01) d = 0;
    const a = vertex(start + i, outside - d, z - floorMm / 2);
    const b = vertex(start + i, outside - d, z + floorMm / 2);
    cross.push(
      d === 0
        ? [a, a, b, b]
        : [vertex(start + i, outside, z - floorMm / 2 - d), a, b, vertex(start + i, outside, z + floorMm / 2 + d)],
    );
  }
  const under = (i) => low[(start + i) % n];
  const over = (i) => high[(start + i) % n];
  for (let i = 0; i < last; i++) {
    for (let m = 0; m < 3; m++) quad(cross[i][m], cross[i + 1][m], cross[i + 1][m + 1], cross[i][m + 1]);
    if (i + 1 + n <= last) quad(cross[i][3], cross[i + 1][3], cross[i + 1 + n][0], cross[i + n][0]);
  }
  for (let i = 0; i < n - 1; i++) quad(under(i), under(i + 1), cross[i + 1][0], cross[i][0]);
  for (let i = last - n + 1; i < last; i++) quad(cross[i][3], cross[i + 1][3], over(i + 1), over(i));
  const [left, right] = [cross[n - 1][0], cross[last - n + 1][3]];
  triangle(left, under(n - 1), under(n));
  triangle(left, under(n), cross[0][0]);
  triangle(left, cross[0][0], cross[0][3]);
  triangle(left, cross[0][3], cross[n][0]);
  triangle(right, over(last + 1), over(last));
  triangle(right, over(last), cross[last][3]);
  triangle(right, cross[last][3], cross[last][0]);
  triangle(right, cross[last][0], cross[last - n][3]);
}

const turned = (solid, angleDeg) => {
  const placed = solid.rotate(0, 0, angleDeg);
  solid.delete();
  return placed;
};

function ear({ angleDeg, centreRadiusMm, widthMm, thicknessMm }) {
  const root = rim - 2;
  const half = 0.7 * widthMm;
  const points = [
    [root, half],
    [root, -half],
  ];
  for (let i = 0; i <= 24; i++) {
    const a = (Math.PI * i) / 24 - Math.PI / 2;
    points.push([centreRadiusMm + (widthMm / 2) * Math.cos(a), (widthMm / 2) * Math.sin(a)]);
  }
  const flat = CrossSection.hull([new CrossSection([points])]);
  return turned(flat.extrude(thicknessMm), angleDeg);
}

/** A teardrop along x, then turned about the axis. */
function hole({ angleDeg, axialMm, diameterMm }) {
  const r = diameterMm / 2;
  const points = [[0, r * Math.SQRT2]];
  for (let i = 0; i < 13; i++) {
    const a = Math.PI * (0.75 + (1.5 * (i + 0.5)) / 13);
    points.push([
      (r / Math.cos((0.75 * Math.PI) / 13)) * Math.cos(a),
      (r / Math.cos((0.75 * Math.PI) / 13)) * Math.sin(a),
    ]);
  }
  const prism = new CrossSection([points]).extrude(rim + 1 - bore / 2);
  return turned(prism.rotate(90, 0, 90).translate(bore / 2, 0, axialMm), angleDeg);
}

function earHole({ angleDeg, centreRadiusMm, holeDiameterMm, thicknessMm }) {
  const cylinder = Manifold.cylinder(thicknessMm + 2, holeDiameterMm / 2 / Math.cos(Math.PI / 32), -1, 32);
  return turned(cylinder.translate(centreRadiusMm, 0, -1), angleDeg);
}

function notch({ angleDeg, widthMm, depthMm }) {
  const top = former.flange ? former.flange.lowerMm + 1 : former.footMm;
  const flat = new CrossSection([
    [
      [rim - depthMm, 0],
      [rim + 1, -widthMm],
      [rim + 1, widthMm],
    ],
  ]);
  return turned(flat.extrude(top + 1).translate(0, 0, -1), angleDeg);
}

function numbers() {
  const outlines = [];
  const stroke = 0.3;
  const line = ([ax, ay], [bx, by]) => {
    const along = Math.atan2(by - ay, bx - ax);
    const end = (x, y, from) =>
      [0, 1, 2, 3].map((k) => [
        x + stroke * Math.cos(along + from + (Math.PI * k) / 3),
        y + stroke * Math.sin(along + from + (Math.PI * k) / 3),
      ]);
    outlines.push([...end(bx, by, -Math.PI / 2), ...end(ax, ay, Math.PI / 2)]);
  };
  for (const { text, angleDeg } of former.numbers) {
    const height = former.numberHeightMm / 1.5;
    const strokes = jscad.text.vectorText({ height }, text);
    const xs = strokes.flat().map((p) => p[0]);
    const middle = (Math.min(...xs) + Math.max(...xs)) / 2;
    const a = (angleDeg * Math.PI) / 180;
    const place = ([x, y]) => {
      const r = rim - 2.3 - y;
      return [r * Math.cos(a) - (x - middle) * Math.sin(a), r * Math.sin(a) + (x - middle) * Math.cos(a)];
    };
    line([(rim + 1) * Math.cos(a), (rim + 1) * Math.sin(a)], [(rim - 1.2) * Math.cos(a), (rim - 1.2) * Math.sin(a)]);
    for (const points of strokes) for (let i = 1; i < points.length; i++) line(place(points[i - 1]), place(points[i]));
  }
  return new CrossSection(outlines, 'NonZero')
    .simplify(0.01)
    .extrude(2)
    .translate(0, 0, length - 0.6);
}

const body = former.ears.length > 0 ? Manifold.union([tube(), ...former.ears.map(ear)]) : tube();
const cutters = [...holes.filter((h) => h.purpose !== 'mount').map(hole), ...former.ears.map(earHole)];
if (former.datumMark) cutters.push(notch(former.datumMark));
if (former.flange && former.numbers.length > 0) cutters.push(numbers());
const solid = Manifold.difference([body, ...cutters]);
if (solid.status() !== 'NoError') throw new Error(`status ${solid.status()}`);

const { vertProperties: v, triVerts: t } = solid.getMesh();
const points = Array.from({ length: v.length / 3 }, (_, i) => [v[3 * i], v[3 * i + 1], v[3 * i + 2]]);
const polygons = Array.from({ length: t.length / 3 }, (_, i) =>
  jscad.geometries.poly3.create([points[t[3 * i]], points[t[3 * i + 1]], points[t[3 * i + 2]]]),
);
const pieces = serializer.serialize({ binary: true }, jscad.geometries.geom3.create(polygons));
const bytes = Buffer.concat(pieces.map((piece) => Buffer.from(piece)));
if (process.argv[3]) writeFileSync(process.argv[3], bytes);
console.log(JSON.stringify({ triangles: bytes.readUInt32LE(80), bytes: bytes.length }));
