import { MU0 } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';
import { sheetInductance } from './nagaoka.ts';

/**
 * Rosa's correction A (dimensionless) for the own inductance of round wire against a strip one pitch wide: 5/4 - ln 2 + ln(d/p).
 *
 * Domain: d/p > 0 (bare diameter over pitch; wires touch at 1); 0.5569 at d/p = 1, falls without limit as d/p -> 0.
 * Source: Rosa 1907; Rosa & Grover 1912, Table VII. Accuracy: 5e-7, the rounding of the table, over 19 ratios from 0.1 to 1.
 *
 * Example: rosaA(0.5) = -0.136294
 */
export function rosaA(wireOverPitch: number): number {
  if (!allPositive(wireOverPitch)) needPositive({ wireOverPitch });
  return 1.25 - Math.LN2 + Math.log(wireOverPitch);
}

/**
 * Rosa's correction B (dimensionless) for the mutual inductance of `turns` round wires against strips.
 *
 * Domain: turns >= 1; 0 at one turn, ln(2 pi) - 3/2 = 0.33788 in the limit.
 * Source: Rosa 1907; Rosa & Grover 1912, Table VIII: (2/N) sum (N - m)(ln m - ln R_m). The sum telescopes: the double sum of
 * ln R_m is N^2/2 ln N - 3 N (N - 1)/4 and that of ln m is ln G(N + 1), Barnes's G (1900). So B costs the same for any N, and
 * between whole turns G itself is the smooth curve through the exact values.
 * Accuracy: 1e-13 against the sum for every whole number of turns up to 1000, 5e-9 (rounding) against 33 printed values.
 *
 * Example: rosaB(2) = 0.11370564
 * Example: rosaB(100) = 0.32689335
 */
export function rosaB(turns: number): number {
  if (!(turns >= 1 && turns < Number.POSITIVE_INFINITY)) throw new RangeError(`turns must be 1 or more, got ${turns}`);
  if (turns >= SERIES_FROM) return bySeries(turns);
  let logG = logBarnes(turns + RAISE);
  for (let i = 0; i < RAISE; i++) logG -= logGamma(turns + 1 + i);
  return (2 * logG) / turns - turns * Math.log(turns) + 1.5 * (turns - 1);
}

/** From here on the series below is exact to the last digits. */
const SERIES_FROM = 12;
/** Steps of G(z + 1) = Gamma(z) G(z) that bring one turn up to the series. */
const RAISE = 12;
const ZETA_PRIME_MINUS_ONE = -0.1654211437004509;

/** Terms B_{2k+2}/(4 k (k + 1)) N^{-2k} of ln G(N + 1), with Bernoulli's numbers. */
function barnesTail(n: number): number {
  const q = 1 / (n * n);
  return q * (-1 / 240 + q * (1 / 1008 + q * (-1 / 1440 + q * (1 / 1056 + q * (-691 / 327600 + q / 144)))));
}

function bySeries(n: number): number {
  return Math.log(2 * Math.PI) - 1.5 - Math.log(n) / (6 * n) + (2 * ZETA_PRIME_MINUS_ONE) / n + (2 / n) * barnesTail(n);
}

/** ln G(n + 1) for n >= SERIES_FROM. */
function logBarnes(n: number): number {
  const main = (n * n * Math.log(n)) / 2 - (3 * n * n) / 4 + (n / 2) * Math.log(2 * Math.PI);
  return main - Math.log(n) / 12 + ZETA_PRIME_MINUS_ONE + barnesTail(n);
}

/** ln Gamma(z) for z >= 1: Stirling's series, raised to z >= 12. */
function logGamma(z: number): number {
  let product = 1;
  let x = z;
  while (x < 12) product *= x++;
  const q = 1 / (x * x);
  const tail = (1 / 12 - q * (1 / 360 - q * (1 / 1260 - q * (1 / 1680 - q * (1 / 1188 - (691 * q) / 360360))))) / x;
  return (x - 0.5) * Math.log(x) - x + Math.log(2 * Math.PI) / 2 + tail - Math.log(product);
}

/**
 * Low-frequency inductance L (H) of a close or evenly spaced single layer of round wire: the current sheet of length
 * turns x pitch less Rosa's corrections, Lsheet - mu0 R N (A + B).
 *
 * Units: m; `wire` is the bare diameter. Domain: turns >= 1, all positive, wire <= pitch is up to the caller.
 * Source: Rosa & Grover 1912. Accuracy against the ring sum, 2 to 300 turns of wire from half the pitch to all of it: 1.3e-5 at
 * p = D/100, 5e-5 at D/50, 3e-4 at D/20, 1.2e-3 at D/10, 4e-2 at D/2.
 *
 * Example: roundWireInductance(100, 0.0762, 0.0006, 0.0005) = 0.000602572852
 */
export function roundWireInductance(turns: number, diameter: number, pitch: number, wire: number): number {
  const correction = MU0 * (diameter / 2) * turns * (rosaA(wire / pitch) + rosaB(turns));
  return sheetInductance(turns, diameter, turns * pitch) - correction;
}
