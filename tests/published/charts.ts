/** Worked examples of control charts and of outliers. All from memory: none of them could be read in print. */

/**
 * NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.2: flow rates of ten batches, mean 50.81, mean moving range 1.8778, limits
 * 55.8041 and 45.8159. From memory.
 */
export const FLOW_RATES = {
  values: [49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1],
  centre: 50.81,
  rangeCentre: 1.8778,
  lower: 45.8159,
  upper: 55.8041,
} as const;

/**
 * Rosner 1983, as in the NIST/SEMATECH e-Handbook, 1.3.5.17.3: 54 values, ten outliers suspected, three found. From memory; the values
 * agree with the deviates that are given for them.
 */
export const ROSNER = {
  values: [
    -0.25, 0.68, 0.94, 1.15, 1.2, 1.26, 1.26, 1.34, 1.38, 1.43, 1.49, 1.49, 1.55, 1.56, 1.58, 1.65, 1.69, 1.7, 1.76,
    1.77, 1.81, 1.91, 1.94, 1.96, 1.99, 2.06, 2.09, 2.1, 2.14, 2.15, 2.23, 2.24, 2.26, 2.35, 2.37, 2.4, 2.47, 2.54,
    2.62, 2.64, 2.9, 2.92, 2.92, 2.93, 3.21, 3.26, 3.3, 3.59, 3.68, 4.3, 4.64, 5.34, 5.42, 6.01,
  ],
  suspected: 10,
  steps: [
    { deviate: 3.118, critical: 3.158 },
    { deviate: 2.942, critical: 3.151 },
    { deviate: 3.179, critical: 3.143 },
  ],
  outliers: [6.01, 5.42, 5.34],
} as const;
