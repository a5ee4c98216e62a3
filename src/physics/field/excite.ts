import { MU0 } from '../constants.ts';
import { type Section, weightsOf } from './sections.ts';
import type { FieldTables } from './tables.ts';

/** Incident multipoles at every wire for one ampere in a section: entry (m - 1) N + i, times a^m sqrt(m), in Wb/m. */
export interface Excitation {
  /** Cosine terms, angle counted from the axis: the field across the row of turns and its gradients. */
  readonly across: Float64Array;
  /** Sine terms: the field along the axis, order 1 only. */
  readonly along: Float64Array;
}

/**
 * Field of one section's net currents at every wire, its own and the dead ones: exact rings in order 1, the ring's own curvature
 * with them, straight lines mu0/(2 pi m) sum h^-m in the orders above. An arc of a turn counts by its fraction, as is exact
 * for the mean around the circle.
 */
export function excitation(tables: FieldTables, section: Section): Excitation {
  const { wireRadius: a, order, axial, radial, powers, ownAxial } = tables;
  const weights = weightsOf(tables, section);
  const count = weights.length;
  const across = new Float64Array(order * count);
  const along = new Float64Array(order * count);
  const first = weights.findIndex((weight) => weight > 0);
  const last = weights.findLastIndex((weight) => weight > 0);
  for (let i = 0; i < count; i++) {
    const row = i * (axial.stride - 1) + axial.half;
    let z = ownAxial * weights[i]!;
    let r = 0;
    for (let j = first; j <= last; j++) {
      z += weights[j]! * axial.values[row + j]!;
      r += weights[j]! * radial.values[row + j]!;
    }
    along[i] = a * z;
    across[i] = -a * r;
    for (let m = 2; m <= order; m++) {
      const { values, half, stride } = powers[m]!;
      const at = i * (stride - 1) + half;
      let sum = 0;
      for (let j = Math.max(first, i - half); j <= Math.min(last, i + half); j++) sum += weights[j]! * values[at + j]!;
      across[(m - 1) * count + i] = (MU0 / (2 * Math.PI * Math.sqrt(m))) * sum;
    }
  }
  return { across, along };
}
