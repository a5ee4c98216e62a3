/**
 * Complete elliptic integrals K and E (dimensionless) of the modulus k, from the complementary modulus k' = sqrt(1 - k^2).
 *
 * Domain: 0 < k' <= 1; at k' = 1 both are pi/2; as k' -> 0, K grows like ln(4/k') and E -> 1; outside, RangeError.
 * Fed with k' and never with 1 - k: for short coils and neighbouring turns k is so near 1 that the difference has no digits.
 * Source: Gauss's arithmetic-geometric mean, as in Abramowitz & Stegun 1964, 17.6.
 * Accuracy: 4e-15 relative over 400 values of k' from 0.1 to 1 against an independent library, and in Legendre's relation
 * over 300 values down to 1e-5.
 *
 * Example: ellipticKE(0.8).K = 1.75075380
 * Example: ellipticKE(0.8).E = 1.41808339
 */
export function ellipticKE(kPrime: number): { K: number; E: number } {
  if (!(kPrime > 0 && kPrime <= 1)) throw new RangeError(`k' must lie in (0, 1], got ${kPrime}`);
  let a = 1;
  let b = kPrime;
  let c = Math.sqrt((1 - kPrime) * (1 + kPrime));
  let weight = 0.5;
  let sum = weight * c * c;
  while (c > SETTLED * a) {
    c = (a - b) / 2;
    const mean = (a + b) / 2;
    b = Math.sqrt(a * b);
    a = mean;
    weight *= 2;
    sum += weight * c * c;
  }
  const K = Math.PI / (2 * a);
  return { K, E: K * (1 - sum) };
}

/**
 * The dimensionless part of Maxwell's mutual inductance, (2/k) [(1 - k^2/2) K - E], from k^2 and k' (both computed directly).
 *
 * The bracket is a small difference of large numbers for distant circles. In the arithmetic-geometric mean it is
 * K (sum over n >= 1 of 2^(n-1) c_n^2): the term n = 0 is what cancels, so it is left out instead of subtracted.
 * The innermost loop of every ring sum: returns a bare number and checks nothing.
 */
export function maxwellFactor(kSquared: number, kPrime: number): number {
  // The same circle twice: the mean would creep towards 0 for ever.
  if (kPrime === 0) return Number.POSITIVE_INFINITY;
  let a = (1 + kPrime) / 2;
  let b = Math.sqrt(kPrime);
  let c = kSquared / (2 * (1 + kPrime));
  let weight = 1;
  let sum = c * c;
  while (c > SETTLED * a) {
    c = (a - b) / 2;
    const mean = (a + b) / 2;
    b = Math.sqrt(a * b);
    a = mean;
    weight *= 2;
    sum += weight * c * c;
  }
  return (Math.PI * sum) / (a * Math.sqrt(kSquared));
}

/** The next mean differs by c^2/4: below this ratio it no longer changes a double. */
const SETTLED = 1e-8;
