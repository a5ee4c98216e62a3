import { MU0 } from '../constants.ts';
import { ellipticKE } from '../elliptic.ts';
import type { Excitation } from './excite.ts';
import type { FieldTables } from './tables.ts';

/** A coaxial ring, or an arc of one, that carries an ampere a whole turn and belongs to another winding. */
export interface OuterRing {
  /** To the wire's centre, m. */
  readonly radius: number;
  /** On the axis, m, counted as the positions of the winding that its field falls on. */
  readonly place: number;
  /** How much of a circle it is. */
  readonly fraction: number;
}

/**
 * Axial and radial field B (T/A) of a ring of radius `radius` at the distance `from` from its axis and `above` its plane:
 * B_z = mu0/(2 pi s) [K + (R^2 - r^2 - h^2)/q E], B_r = mu0 h/(2 pi r s) [(R^2 + r^2 + h^2)/q E - K], with s^2 = (R + r)^2 + h^2 and
 * q = (R - r)^2 + h^2.
 *
 * Units: m. Domain: radius and from > 0, not on the ring itself (RangeError). Source: Smythe 1950, 7.10.
 * Accuracy: 1e-7 against the slopes of Maxwell's mutual inductance, of which it is the derivative, by differences.
 *
 * Example: ringField(0.05, 0.03, 0.04).axial = 4.82212e-6
 */
export function ringField(radius: number, from: number, above: number): { axial: number; radial: number } {
  const span = Math.hypot(radius + from, above);
  const near = (radius - from) ** 2 + above ** 2;
  const { K, E } = ellipticKE(Math.sqrt(near) / span);
  const common = MU0 / (2 * Math.PI * span);
  const axial = common * (K + ((radius - from) * (radius + from) - above * above) * (E / near));
  const radial = ((common * above) / from) * ((radius * radius + from * from + above * above) * (E / near) - K);
  return { axial, radial };
}

/**
 * What an ampere in rings of another winding, coaxial and of any radius, does at every wire of this one: exact rings in order 1, straight
 * lines in the orders above, as `excitation` has it for the winding's own.
 *
 * Domain: every ring further from every wire than the two are thick (not checked).
 */
export function outerExcitation(tables: FieldTables, rings: readonly OuterRing[]): Excitation {
  const { wireRadius: a, order, radius, positions } = tables;
  const count = positions.length;
  const across = new Float64Array(order * count);
  const along = new Float64Array(order * count);
  for (let i = 0; i < count; i++) {
    for (const ring of rings) {
      const up = ring.place - positions[i]!;
      const { axial, radial } = ringField(ring.radius, radius, -up);
      along[i]! += a * axial * ring.fraction;
      across[i]! -= a * radial * ring.fraction;
      // Towards the source: along the axis by the cosine, outwards by the sine.
      const out = ring.radius - radius;
      const ratio = a / Math.hypot(up, out);
      const angle = Math.atan2(out, up);
      for (let m = 2; m <= order; m++) {
        const strength = ((MU0 * ring.fraction) / (2 * Math.PI * Math.sqrt(m))) * ratio ** m;
        across[(m - 1) * count + i]! += strength * Math.cos(m * angle);
        along[(m - 1) * count + i]! += strength * Math.sin(m * angle);
      }
    }
  }
  return { across, along };
}
