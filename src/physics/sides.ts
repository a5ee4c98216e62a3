import { MU0 } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';
import { gaussLegendre } from './gauss.ts';

/**
 * Mutual inductance M (H) of two equal, coaxial, regular polygons of sharp corners that stand alike, `distance` apart along the axis.
 *
 * Units: m; `radius` is that of the corners. Domain: radius > 0, 3 corners and more, distance not 0 (either sign).
 * Source: Neumann 1845; one of the two integrals along a pair of sides is elementary. The other runs over Gauss-Legendre points, with
 * w = z sinh t from the common corner of two neighbours, where the integrand turns within the distance z.
 * Accuracy: 2e-12 relative against the same with three times the points, 3 to 40 corners, distances from 1e-5 to 20 radii; 4e-11
 * against elements of wire (middles, extrapolated), 3 to 24 corners.
 * For turns nearer and nearer it is mu0 n s/(2 pi) (ln(s/z) + C) with s the side: C = -1.40546, -0.77401, -0.40922, -0.15152, 0.21198
 * for 3, 4, 5, 6 and 8 corners; Grover 1946, ch. 8, has the same as FROM MEMORY, but -0.40914 for 5.
 * Cost: some 200 logarithms; see `polygonTurn` for sums.
 *
 * Example: polygonMutual(0.05, 6, 0.05) = 1.93977e-8
 */
export function polygonMutual(radius: number, corners: number, distance: number): number {
  if (!allPositive(radius)) needPositive({ radius });
  if (!(Number.isInteger(corners) && corners >= 3))
    throw new RangeError(`a polygon has 3 corners or more, got ${corners}`);
  const x = Math.abs(distance) / radius;
  if (!(x > 0)) return Number.POSITIVE_INFINITY;
  const step = (2 * Math.PI) / corners;
  const side = 2 * Math.sin(step / 2);
  // Above itself, both integrals are elementary.
  let sum = 2 * (side * Math.asinh(side / x) - (side * side) / (Math.hypot(side, x) + x));
  for (let k = 1; 2 * k <= corners; k++) {
    const pair = besides(k * step, step, x);
    const integral = k === 1 ? fromCorner(pair, side, x) : evenly(pair, side, k === 2 ? NEXT : FAR);
    sum += (2 * k === corners ? 1 : 2) * Math.cos(k * step) * integral;
  }
  return (MU0 * radius * corners * sum) / (4 * Math.PI);
}

/** Integral of 1/r along a side turned by `angle`, from the point `w` before the end of the first side that is nearer to it. */
function besides(angle: number, step: number, x: number): (w: number) => number {
  const half = Math.sin(step / 2);
  const apothem = Math.cos(step / 2);
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  return (w) => {
    const foot = (half - w) * cos - apothem * sin;
    const off = (half - w) * sin + apothem * (cos - 1);
    const reach = Math.sqrt(x * x + off * off);
    return Math.asinh((half - foot) / reach) + Math.asinh((half + foot) / reach);
  };
}

function evenly(law: (w: number) => number, length: number, { nodes, weights }: typeof NEXT): number {
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) sum += weights[i]! * law((length / 2) * (1 + nodes[i]!));
  return (sum * length) / 2;
}

function fromCorner(law: (w: number) => number, length: number, x: number): number {
  const half = Math.asinh(length / x) / 2;
  let sum = 0;
  for (let i = 0; i < CORNER.nodes.length; i++) {
    const sinh = Math.sinh(half * (1 + CORNER.nodes[i]!));
    sum += CORNER.weights[i]! * law(x * sinh) * Math.sqrt(1 + sinh * sinh);
  }
  return sum * half * x;
}

const CORNER = gaussLegendre(32);
const NEXT = gaussLegendre(12);
const FAR = gaussLegendre(8);
