import { MU0 } from '../constants.ts';
import { type Section, weightsOf } from './sections.ts';
import { solveMultipoles } from './solve.ts';
import type { FieldTables } from './tables.ts';
import { wireResponse } from './wire-response.ts';

/**
 * What each turn, dead ones included, adds to the resistance (ohm) of one section of a winding of solid wire.
 *
 * Units and domain as `solveField`. Reckoned from the power that goes into each wire through its surface,
 * 2 pi R (2 pi/mu0) omega sum m |x_m|^2 (-Im C_m), and not from the voltage at the terminals; that the two agree is
 * the conservation of energy. Source: Poynting 1884. Accuracy: the sum is the resistance by `solveField` to 1e-7.
 *
 * Example: turnLosses(fieldTables([0, 4e-3, 8e-3], 0.03, 7.5e-4), 1e6, 1.7241e-8, { from: 0, to: 2 })[2] = 0.001631
 */
export function turnLosses(
  tables: FieldTables,
  frequency: number,
  resistivity: number,
  section: Section,
): Float64Array {
  const wire = wireResponse(tables.wireRadius, frequency, resistivity, tables.order);
  const { solved } = solveMultipoles(tables, wire, [section]);
  const circumference = tables.shape.length;
  const losses = weightsOf(tables, section).map((weight) => weight * circumference * wire.resistance);
  const perWeber = (4 * Math.PI ** 2 * frequency * circumference) / MU0;
  if (frequency === 0) return losses;
  const count = losses.length;
  for (const { x } of solved[0]!) {
    for (let m = 1; m <= tables.order; m++) {
      const re = wire.re[m - 1]!;
      const im = wire.im[m - 1]!;
      // x is scaled by the root of C, and so |x|^2 by |C|.
      const part = (-perWeber * im) / Math.hypot(re, im);
      for (let i = 0; i < count; i++) {
        const at = (m - 1) * count + i;
        losses[i]! += part * (x.re[at]! ** 2 + x.im[at]! ** 2);
      }
    }
  }
  return losses;
}
