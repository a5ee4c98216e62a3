import ellipe from '@stdlib/math-base-special-ellipe';
import ellipk from '@stdlib/math-base-special-ellipk';
import { test } from 'vitest';
import { ellipticKE } from '../../src/physics/elliptic.ts';
import { accuracy, off, spread } from './accuracy.ts';

test('elliptic integrals against a general library', () => {
  // The library takes m = k^2. To give both the same argument, m is chosen and k' = sqrt(1 - m) follows from it; below k' = 0.1
  // the rounding of m itself would show, so there the library is asked nothing.
  const parameters = spread(0.01, 1, 400).map((mComplement) => 1 - mComplement);
  const pairs = parameters.map((m) => ({ m, ...ellipticKE(Math.sqrt(1 - m)) }));
  // A few units of the last place on both sides.
  accuracy(
    'elliptic K, @stdlib (relative)',
    pairs.map(({ m, K }) => off(K, ellipk(m))),
    1e-14,
  );
  accuracy(
    'elliptic E, @stdlib (relative)',
    pairs.map(({ m, E }) => off(E, ellipe(m))),
    1e-14,
  );
});

test("elliptic integrals by Legendre's relation down to k' = 1e-5", () => {
  // E K' + E' K - K K' = pi/2 (Legendre 1825), an exact identity that needs no library.
  const errors = spread(1e-5, 0.7, 300).map((kPrime) => {
    const k = Math.sqrt((1 - kPrime) * (1 + kPrime));
    const a = ellipticKE(kPrime);
    const b = ellipticKE(k);
    return off(a.E * b.K + b.E * a.K - a.K * b.K, Math.PI / 2);
  });
  // Terms up to 13 pi/2 cancel to pi/2.
  accuracy("Legendre's relation (relative)", errors, 2e-14);
});
