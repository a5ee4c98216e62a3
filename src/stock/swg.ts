/**
 * Standard Wire Gauge: bare diameters in inches, sizes 10 to 50.
 *
 * Source: BS 3737. Status: inch values FROM MEMORY; they agree with two-decimal millimetre values READ in a dealer's table
 * for sizes 10 to 32, and the steps obey the published rule (0.8 thousandths from 30 to 39, 0.4 from 39 to 49).
 */
export const SWG_STANDARD = 'BS 3737';

/** Inches, by gauge number. */
export const SWG_INCHES: ReadonlyMap<number, number> = new Map([
  [10, 0.128],
  [11, 0.116],
  [12, 0.104],
  [13, 0.092],
  [14, 0.08],
  [15, 0.072],
  [16, 0.064],
  [17, 0.056],
  [18, 0.048],
  [19, 0.04],
  [20, 0.036],
  [21, 0.032],
  [22, 0.028],
  [23, 0.024],
  [24, 0.022],
  [25, 0.02],
  [26, 0.018],
  [27, 0.0164],
  [28, 0.0148],
  [29, 0.0136],
  [30, 0.0124],
  [31, 0.0116],
  [32, 0.0108],
  [33, 0.01],
  [34, 0.0092],
  [35, 0.0084],
  [36, 0.0076],
  [37, 0.0068],
  [38, 0.006],
  [39, 0.0052],
  [40, 0.0048],
  [41, 0.0044],
  [42, 0.004],
  [43, 0.0036],
  [44, 0.0032],
  [45, 0.0028],
  [46, 0.0024],
  [47, 0.002],
  [48, 0.0016],
  [49, 0.0012],
  [50, 0.001],
]);
