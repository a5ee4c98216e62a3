import { MU0 } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';

/**
 * Nagaoka's coefficient K (dimensionless) of a cylindrical current sheet: its inductance over that of a piece of an endless one.
 *
 * Units: diameter and length in the same unit. Domain: both positive; 1 for an endless coil, and as length/diameter -> 0 it
 * goes to 0 like (2 length/(pi diameter)) (ln(4 diameter/length) - 1/2).
 * Source: Lorenz 1879; Nagaoka 1909, J. Coll. Sci. Tokyo 27, art. 6: 4/(3 pi k') [(k'^2/k^2)(K - E) + E - k].
 * Each of the differences K - E, E - 1 and 1 - k is summed directly, so that none loses digits in the limits.
 * Accuracy: 5e-10 relative, the rounding of the table, over 66 values of diameter/length from 0.01 to 100 computed with
 * thirty digits.
 *
 * Example: nagaokaK(1, 1) = 0.6884226
 * Example: nagaokaK(100, 1) = 0.03496024577
 */
export function nagaokaK(diameter: number, length: number): number {
  if (!allPositive(diameter, length)) needPositive({ diameter, length });
  const hypotenuse = Math.hypot(diameter, length);
  const k = diameter / hypotenuse;
  const kPrime = length / hypotenuse;
  const direct = means(kPrime, k);
  const complement = means(k, kPrime);
  // K - E = K S and (K - E)/k^2 without dividing by a rounded k^2.
  const fallOverK2 = direct.integral * direct.sumOverModulusSquared;
  // Legendre's relation E K' + E' K - K K' = pi/2 gives E - 1 from small quantities only.
  const complementFall = complement.integral * complement.sumOverModulusSquared * kPrime * kPrime;
  const quarterLack = -(Math.PI / 2) * (complement.lack / complement.mean);
  const eMinusOne = (quarterLack + direct.integral * complementFall) / complement.integral;
  const oneMinusK = (kPrime * kPrime) / (1 + k);
  return (4 / (3 * Math.PI * kPrime)) * (kPrime * kPrime * fallOverK2 + eMinusOne + oneMinusK);
}

/**
 * Arithmetic-geometric mean of 1 and `start`, with what Nagaoka's bracket needs of it: K, (K - E)/(K m^2) for the modulus m
 * that belongs to `start`, and 1 - mean.
 */
function means(start: number, modulus: number) {
  let a = (1 + start) / 2;
  let b = Math.sqrt(start);
  // c_1 = (1 - start)/2 and c_n^2/m^2, both written with the modulus.
  let c = (modulus * modulus) / (2 * (1 + start));
  let lack = c;
  let weight = 1;
  const firstOverM = modulus / (2 * (1 + start));
  let sum = 0.5 + firstOverM * firstOverM;
  while (c > 1e-17 * a) {
    const mean = (a + b) / 2;
    c = (c * c) / (4 * mean);
    lack += c;
    b = Math.sqrt(a * b);
    a = mean;
    weight *= 2;
    sum += weight * (c / modulus) * (c / modulus);
  }
  return { mean: a, integral: Math.PI / (2 * a), sumOverModulusSquared: sum, lack };
}

/**
 * Low-frequency inductance L (H) of a cylindrical current sheet of `turns` turns: mu0 pi R^2 N^2 K/l.
 *
 * Units: m. Domain: all positive. The wire is not in it: see `roundWireInductance`.
 * Source: Nagaoka 1909. Accuracy: 1e-9 relative over 11 independently computed coils, 1 to 400 turns.
 *
 * Example: sheetInductance(100, 0.0762, 0.06) = 0.000605931123
 */
export function sheetInductance(turns: number, diameter: number, length: number): number {
  const radius = diameter / 2;
  return (MU0 * Math.PI * radius * radius * turns * turns * nagaokaK(diameter, length)) / length;
}
