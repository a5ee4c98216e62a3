/**
 * Eddy loss of an isolated round copper wire across a uniform field, W/m per (A/m peak)^2: [bare mm, Hz, exact, low-frequency limit].
 * COMPUTED from the exact Bessel solution; the limit is pi omega^2 mu0^2 sigma d^4/128.
 */
export const TRANSVERSE_LOSS: readonly (readonly [bareMm: number, hertz: number, exact: number, limit: number])[] = [
  [0.03, 150000, 1.617415e-12, 1.617426e-12],
  [0.03, 1000000, 7.186375e-11, 7.188561e-11],
  [0.04, 150000, 5.111755e-12, 5.111865e-12],
  [0.04, 1000000, 2.269758e-10, 2.27194e-10],
  [0.05, 150000, 1.247948e-11, 1.248014e-11],
  [0.05, 1000000, 5.533744e-10, 5.546729e-10],
  [0.1, 150000, 1.995137e-10, 1.996822e-10],
  [0.1, 1000000, 8.554081e-9, 8.874766e-9],
  [0.2, 150000, 3.152328e-9, 3.194916e-9],
  [0.2, 1000000, 8.95242e-8, 1.419963e-7],
  [0.5, 150000, 8.228768e-8, 1.248014e-7],
  [0.5, 1000000, 3.53754e-7, 5.546729e-6],
  [1.0, 150000, 2.636581e-7, 1.996822e-6],
  [1.0, 1000000, 7.645734e-7, 8.874766e-5],
];
