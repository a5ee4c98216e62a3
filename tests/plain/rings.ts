/**
 * Inductances of turns worked out anew for the checks: Maxwell's two circles by the arithmetic-geometric mean, the own inductance of a
 * ring, an arc by midpoints of Neumann's integral, turns with corners by straight filaments. Metres and henry.
 */
const MU0 = 4e-7 * Math.PI;

/** Complete elliptic integrals K and E of the complementary modulus k', by the arithmetic-geometric mean. */
function elliptic(complementary: number): { K: number; E: number } {
  let a = 1;
  let b = complementary;
  let c2 = 1 - complementary * complementary;
  let sum = c2 / 2;
  for (let power = 1; c2 > 1e-32 && power < 2 ** 12; power *= 2) {
    const c = (a - b) / 2;
    [a, b] = [(a + b) / 2, Math.sqrt(a * b)];
    c2 = c * c;
    sum += power * c2;
  }
  const K = Math.PI / (2 * a);
  return { K, E: K * (1 - sum) };
}

/** Mutual inductance of two coaxial circles at a distance along the axis (Maxwell 1873, art. 701). */
export function twoCircles(r1: number, r2: number, distance: number): number {
  const far = (r1 + r2) ** 2 + distance * distance;
  const near = (r1 - r2) ** 2 + distance * distance;
  const k = Math.sqrt((4 * r1 * r2) / far);
  const { K, E } = elliptic(Math.sqrt(near / far));
  return MU0 * Math.sqrt(r1 * r2) * ((2 / k - k) * K - (2 / k) * E);
}

/** A ring of round wire, current evenly over its section (Rayleigh and Niven; Grover 1946). */
function ring(R: number, a: number): number {
  const log = Math.log((8 * R) / a);
  return MU0 * R * (log - 1.75 + ((a / R) ** 2 / 8) * (log + 1 / 3));
}

/** Own inductance of an arc over that of its ring: Neumann's double integral over a filament at its own mean distance. */
export function arcShare(fraction: number, R: number, a: number): number {
  const g = a * Math.exp(-0.25);
  const points = 3000;
  const integral = (whole: number, weight: (t: number) => number) => {
    let sum = 0;
    for (let i = 0; i < points; i++) {
      // t = whole u^3 crowds the midpoints where it is steep.
      const u = (i + 0.5) / points;
      const t = whole * u ** 3;
      sum += (weight(t) * Math.cos(t) * 3 * whole * u * u) / Math.hypot(2 * R * Math.sin(t / 2), g);
    }
    return sum / points;
  };
  const angle = 2 * Math.PI * fraction;
  return integral(angle, (t) => angle - t) / (2 * Math.PI * integral(Math.PI, () => 1));
}

/** One turn as the sums need it. */
export interface Turn {
  /** Of the circle that stands for it. */
  readonly radius: number;
  /** Along the wire, flat. */
  readonly length: number;
  readonly mutual: (distance: number) => number;
  readonly own: (wireRadius: number) => number;
}

export function roundTurn(radius: number): Turn {
  return {
    radius,
    length: 2 * Math.PI * radius,
    mutual: (distance) => twoCircles(radius, radius, distance),
    own: (wireRadius) => ring(radius, wireRadius),
  };
}

type Point = readonly [x: number, y: number];

/** Points along a turn that runs straight between `corners` ribs and bends round them: ends of short chords, one corner's share of it. */
export function outline(radius: number, corners: number, bend: number, pieces: number): Point[] {
  const half = Math.PI / corners;
  const points: Point[] = [];
  // From the middle of one side over a corner to the middle of the next: half a side, an arc, half a side.
  const centre = radius - bend;
  const at = (angle: number, along: number, across: number): Point => [
    along * Math.cos(angle) - across * Math.sin(angle),
    along * Math.sin(angle) + across * Math.cos(angle),
  ];
  const apothem = centre * Math.cos(half) + bend;
  const halfSide = centre * Math.sin(half);
  for (let corner = 0; corner < corners; corner++) {
    const angle = 2 * half * corner;
    for (let i = 0; i < pieces; i++) points.push(at(angle - half, apothem, (halfSide * i) / pieces));
    const arcs = bend > 0 ? pieces : 0;
    for (let i = 0; i < arcs; i++) {
      const turn = angle - half + (2 * half * i) / arcs;
      points.push([centre * Math.cos(angle) + bend * Math.cos(turn), centre * Math.sin(angle) + bend * Math.sin(turn)]);
    }
    for (let i = 0; i < pieces; i++) points.push(at(angle + half, apothem, -halfSide + (halfSide * i) / pieces));
  }
  return points;
}

/**
 * Neumann's double integral over two equal turns at a distance: exact along the chords of the one, by midpoints along `share` of the
 * chords of the other, which stands for all of it by symmetry.
 */
function filaments(points: readonly Point[], shares: number, distance: number): number {
  const n = points.length;
  const chords = points.map((point, i) => {
    const next = points[(i + 1) % n]!;
    const length = Math.hypot(next[0] - point[0], next[1] - point[1]);
    return { x: point[0], y: point[1], tx: (next[0] - point[0]) / length, ty: (next[1] - point[1]) / length, length };
  });
  let sum = 0;
  for (let i = 0; i < n / shares; i++) {
    const one = chords[i]!;
    const [x, y] = [one.x + (one.tx * one.length) / 2, one.y + (one.ty * one.length) / 2];
    for (const { x: u, y: v, tx, ty, length } of chords) {
      const along = (x - u) * tx + (y - v) * ty;
      const away = Math.hypot((x - u) * ty - (y - v) * tx, distance);
      const potential = Math.asinh((length - along) / away) + Math.asinh(along / away);
      sum += (one.tx * tx + one.ty * ty) * one.length * potential;
    }
  }
  return 1e-7 * shares * sum;
}

const NEAREST = 2e-3;
const STEPS = 40;
const known = new Map<string, Turn>();

/**
 * A turn with corners, by straight filaments. What it has more or less than a circle of its own length is smooth down to touching wires,
 * where both go as length times the logarithm of the distance: that difference is taken straight between distances.
 */
export function corneredTurn(radius: number, corners: number, bend: number): Turn {
  const key = `${radius} ${corners} ${bend}`;
  const before = known.get(key);
  if (before !== undefined) return before;
  const half = Math.PI / corners;
  const side = 2 * (radius - bend) * Math.sin(half);
  const length = corners * side + 2 * Math.PI * bend;
  const area = corners * side * (((radius - bend) * Math.cos(half)) / 2 + bend) + Math.PI * bend * bend;
  const circle = length / (2 * Math.PI);
  const pieces = Math.ceil(150 / corners / (bend > 0 ? 3 : 2));
  const points = outline(radius, corners, bend, pieces);
  const step = Math.log(30 / NEAREST) / STEPS;
  const differences = Array.from({ length: STEPS + 1 }, (_, i) => {
    const z = NEAREST * Math.exp(i * step) * radius;
    return filaments(points, corners, z) - twoCircles(circle, circle, z);
  });
  const mutual = (distance: number) => {
    const place = Math.min(Math.max(Math.log(Math.max(distance / radius, 1e-9) / NEAREST) / step, 0), STEPS - 1e-9);
    const i = Math.floor(place);
    const difference = differences[i]! + (place - i) * (differences[i + 1]! - differences[i]!);
    return twoCircles(circle, circle, distance) + difference;
  };
  const turn: Turn = {
    radius: Math.sqrt(area / Math.PI),
    length,
    mutual,
    own: (wireRadius) => ring(circle, wireRadius) + differences[0]!,
  };
  known.set(key, turn);
  return turn;
}
