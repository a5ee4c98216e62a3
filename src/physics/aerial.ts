/** Wire aerials that are short against the wave: capacitance to earth, inductance in series. */
import { SPEED_OF_LIGHT } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';

/** Electric constant, F/m. */
const EPSILON0 = 8.8541878188e-12;

/** Potential that a straight line with a unit of charge a metre has on average at a distance from itself, times 4 pi epsilon0 / 2. */
const average = (length: number, distance: number): number => {
  const over = distance / length;
  return Math.asinh(1 / over) - Math.hypot(1, over) + over;
};

/**
 * Capacitance C (F) to earth of a horizontal wire: length, height of the wire above ground, diameter (m).
 * C = 2 pi epsilon0 l / (F(a) - F(2h)), F(d) = arsinh(l/d) - sqrt(1 + (d/l)^2) + d/l, a the radius.
 *
 * Domain: all positive, thinner than a tenth of its height and of its length (RangeError beyond); earth a flat conductor, nothing else near.
 * Source: Howe 1914 (average potential of an even charge, with its image), in the closed form of Grover 1928, Methods, formulas and tables for
 * the calculation of antenna capacity; FROM MEMORY, derived again. The lead to the set is not in it.
 * Accuracy: 0 to 1 % low for lengths of 3 to 100 m, heights of 1 to 30 m and 0.4 to 6 mm of wire, against charges solved in pieces.
 *
 * Example: horizontalWireCapacitance(20, 8, 0.002) = 1.2322e-10
 */
export function horizontalWireCapacitance(length: number, height: number, diameter: number): number {
  if (!allPositive(length, height, diameter)) needPositive({ length, height, diameter });
  thin(diameter, Math.min(length, height));
  return (2 * Math.PI * EPSILON0 * length) / (average(length, diameter / 2) - average(length, 2 * height));
}

/**
 * Capacitance C (F) to earth of a vertical wire: length, height of its lower end above ground (0 or more), diameter (m).
 * C = 2 pi epsilon0 l / (F(a) - G), G = ((2l + s) ln(2l + s) - 2 (l + s) ln(l + s) + s ln s)/(2l), s = 2 x height; F as for a horizontal wire.
 *
 * Domain: length and diameter positive, height 0 or more, thinner than a tenth of its length (RangeError beyond); earth a flat conductor.
 * Source: Howe 1914 and Grover 1928 as for a horizontal wire, FROM MEMORY, derived again.
 * Accuracy: 0 to 1.5 % low for lengths of 2 to 50 m, heights of 0.2 to 10 m and 0.4 to 6 mm of wire, against charges solved in pieces.
 *
 * Example: verticalWireCapacitance(10, 1, 0.002) = 6.6103e-11
 */
export function verticalWireCapacitance(length: number, height: number, diameter: number): number {
  if (!allPositive(length, diameter)) needPositive({ length, diameter });
  if (!(height >= 0 && height < Number.POSITIVE_INFINITY))
    throw new RangeError(`height must be 0 or more and finite, got ${height}`);
  thin(diameter, length);
  const s = (2 * height) / length;
  const image = ((2 + s) * Math.log(2 + s) - 2 * (1 + s) * Math.log(1 + s) + (s > 0 ? s * Math.log(s) : 0)) / 2;
  return (2 * Math.PI * EPSILON0 * length) / (average(length, diameter / 2) - image);
}

function thin(diameter: number, over: number): void {
  if (diameter > over / 10) throw new RangeError(`a wire of ${diameter} m is no thin wire at ${over} m`);
}

/**
 * Inductance L (H) in series with the capacitance (F) of a wire aerial of this length (m): a third of that of the whole wire, which is a
 * line on which waves run at the speed of light: L = l^2 / (3 c^2 C).
 *
 * Domain: both positive; below about 0.6 of the quarter-wave frequency c/(4 l).
 * Source: Zenneck 1905; Terman 1943: first two terms of the reactance of an open line, -Z0 cot(omega l/c). FROM MEMORY.
 * Accuracy: reactance within 1.2 % of that line up to 0.4 of the quarter-wave frequency, 5 % up to 0.6; its own resonance with C comes out
 * 2 sqrt(3)/pi = 1.10 of the quarter-wave frequency.
 *
 * Example: wireAerialInductance(20, 125e-12) = 1.1868e-5
 */
export function wireAerialInductance(length: number, capacitance: number): number {
  if (!allPositive(length, capacitance)) needPositive({ length, capacitance });
  return length ** 2 / (3 * SPEED_OF_LIGHT ** 2 * capacitance);
}

/**
 * Frequency (Hz) at which a wire of this length (m) is a quarter of a wave: c/(4 l). Domain: positive. Exact for the length as such; a real
 * wire reaches it a few per cent lower.
 *
 * Example: quarterWave(20) = 3.7474e6
 */
export function quarterWave(length: number): number {
  if (!allPositive(length)) needPositive({ length });
  return SPEED_OF_LIGHT / (4 * length);
}
