/** Complex numbers as pairs, for references that need not be fast. */
export type Complex = readonly [re: number, im: number];
export const add = (a: Complex, b: Complex): Complex => [a[0] + b[0], a[1] + b[1]];
export const sub = (a: Complex, b: Complex): Complex => [a[0] - b[0], a[1] - b[1]];
export const mul = (a: Complex, b: Complex): Complex => [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
export const div = (a: Complex, b: Complex): Complex => {
  const size = b[0] ** 2 + b[1] ** 2;
  return [(a[0] * b[0] + a[1] * b[1]) / size, (a[1] * b[0] - a[0] * b[1]) / size];
};
export const times = (k: number, a: Complex): Complex => [k * a[0], k * a[1]];
export function power(a: Complex, n: number): Complex {
  if (n < 0) return div([1, 0], power(a, -n));
  let value: Complex = [1, 0];
  for (let i = 0; i < n; i++) value = mul(value, a);
  return value;
}

/**
 * J_n(z) exp(-|Im z|) by what the program does not use: the power series up to |z| = 12, Bessel's integral
 * (1/2 pi) of exp(j (n t - z sin t)) by the trapezoidal rule beyond, which is exact for a periodic function but for rounding.
 */
export function scaledJ(n: number, z: Complex): Complex {
  const damp = Math.abs(z[1]);
  if (Math.hypot(...z) <= 12) {
    const quarter = times(-0.25, mul(z, z));
    let term: Complex = [Math.exp(-damp), 0];
    for (let k = 1; k <= n; k++) term = mul(term, times(0.5 / k, z));
    let sum = term;
    for (let k = 1; k < 80; k++) {
      term = times(1 / (k * (n + k)), mul(term, quarter));
      sum = add(sum, term);
    }
    return sum;
  }
  const points = 200 + 8 * Math.ceil(Math.hypot(...z));
  let re = 0;
  let im = 0;
  for (let i = 0; i < points; i++) {
    const t = (2 * Math.PI * i) / points;
    const phase = n * t - z[0] * Math.sin(t);
    const size = Math.exp(z[1] * Math.sin(t) - damp);
    re += size * Math.cos(phase);
    im += size * Math.sin(phase);
  }
  return [re / points, im / points];
}

const MU0 = 4e-7 * Math.PI;

/** C_m of a wire and the impedance of its own current, ohm per metre, straight from Bessel functions. */
export function exactWire(radius: number, frequency: number, resistivity: number) {
  const delta = Math.sqrt(resistivity / (Math.PI * frequency * MU0));
  const z: Complex = [radius / delta, -radius / delta];
  const scale = resistivity / (2 * Math.PI * radius * radius);
  return {
    answer: (m: number) => div(scaledJ(m + 1, z), scaledJ(m - 1, z)),
    own: times(scale, mul(z, div(scaledJ(0, z), scaledJ(1, z)))),
  };
}
