/**
 * The figures of a coil worked out a second time, from nothing but where its turns lie: Maxwell's two circles by a general
 * library's elliptic integrals, the arc by midpoints of Neumann's integral, the wire by adding up short pieces.
 */
import ellipe from '@stdlib/math-base-special-ellipe';
import ellipk from '@stdlib/math-base-special-ellipk';

const MU0 = 4e-7 * Math.PI;

export interface Winding {
  /** Z of the middle of each turn, the last perhaps a part turn, mm. */
  readonly places: ArrayLike<number>;
  readonly turns: number;
  readonly pitchMm: number;
  readonly meanDiameterMm: number;
  readonly bareMm: number;
}

/** Mutual inductance of two coaxial circles of radius R at a distance z, H (Maxwell 1873, art. 701). */
export function twoCircles(R: number, z: number): number {
  const m = (4 * R * R) / (4 * R * R + z * z);
  const k = Math.sqrt(m);
  return MU0 * R * ((2 / k - k) * ellipk(m) - (2 / k) * ellipe(m));
}

/** A ring of round wire with the current spread evenly, H (Rayleigh and Niven; Grover 1946). */
export function oneRing(R: number, a: number): number {
  const log = Math.log((8 * R) / a);
  return MU0 * R * (log - 1.75 + ((a / R) ** 2 / 8) * (log + 1 / 3));
}

const MIDPOINTS = 3000;

/** Own inductance of an arc over that of its ring: Neumann's double integral at the geometric mean distance of the wire. */
export function arcShare(fraction: number, R: number, a: number): number {
  const g = a * Math.exp(-0.25);
  const integral = (whole: number) => {
    // t = whole * u^3 crowds the midpoints where the integrand is steep.
    let sum = 0;
    for (let i = 0; i < MIDPOINTS; i++) {
      const u = (i + 0.5) / MIDPOINTS;
      const t = whole * u ** 3;
      const distance = Math.hypot(2 * R * Math.sin(t / 2), g);
      sum += ((whole - t) * Math.cos(t) * 3 * whole * u * u) / distance;
    }
    return sum / MIDPOINTS;
  };
  // Whole circle: half of it counted twice, as the far half mirrors the near one.
  const half = (whole: number) => {
    let sum = 0;
    for (let i = 0; i < MIDPOINTS; i++) {
      const u = (i + 0.5) / MIDPOINTS;
      const t = whole * u ** 3;
      sum += (Math.cos(t) * 3 * whole * u * u) / Math.hypot(2 * R * Math.sin(t / 2), g);
    }
    return sum / MIDPOINTS;
  };
  return integral(2 * Math.PI * fraction) / (2 * Math.PI * half(Math.PI));
}

/** Where the wire is at `turn`: straight on the developed surface between the middles of the turns. */
export function placeAt(winding: Winding, turn: number): number {
  const { places, turns, pitchMm } = winding;
  const whole = Math.floor(turns + 1e-9);
  const stand = Array.from({ length: places.length }, (_, i) => (i < whole ? i + 0.5 : (whole + turns) / 2));
  const after = stand.findIndex((u) => u > turn);
  if (after === 0) return places[0]! - (stand[0]! - turn) * pitchMm;
  const last = stand.length - 1;
  if (after < 0) return places[last]! + (turn - stand[last]!) * pitchMm;
  const share = (turn - stand[after - 1]!) / (stand[after]! - stand[after - 1]!);
  return places[after - 1]! * (1 - share) + places[after]! * share;
}

/** Inductance of turns 0..turn, uH, every pair of rings taken by itself. */
export function inductanceUh(winding: Winding, turn: number): number {
  const R = winding.meanDiameterMm / 2e3;
  const a = winding.bareMm / 2e3;
  const whole = Math.floor(turn + 1e-9);
  const part = turn - whole > 1e-9 ? turn - whole : 0;
  const z = Array.from({ length: whole }, (_, i) => winding.places[i]! / 1e3);
  let sum = whole * oneRing(R, a);
  for (let i = 0; i < whole; i++) for (let j = 0; j < i; j++) sum += 2 * twoCircles(R, z[i]! - z[j]!);
  if (part > 0) {
    const at = placeAt(winding, whole + part / 2) / 1e3;
    for (const other of z) sum += 2 * part * twoCircles(R, at - other);
    sum += arcShare(part, R, a) * oneRing(R, a);
  }
  return sum * 1e6;
}

/** Wire from the start hole to `turn`, m, added up in pieces of a hundredth of a turn. */
export function wireM(winding: Winding, turn: number): number {
  const pieces = Math.ceil(turn * 100);
  const step = turn / pieces;
  let sum = 0;
  let before = placeAt(winding, 0);
  for (let i = 1; i <= pieces; i++) {
    const here = placeAt(winding, i * step);
    sum += Math.hypot(Math.PI * winding.meanDiameterMm * step, here - before);
    before = here;
  }
  return sum / 1e3;
}

/** 100 % IACS copper at 20 C, ohm mm2/m (NBS Circular 31). */
export const COPPER = 0.017241;
