/** Printed tables that the stock is held against, retyped. */

/**
 * AWG: bare diameter in mil by the four-figure rounding of ASTM B258, and ohms per km at 20 degrees with 0.017241 ohm mm2/m
 * (COMPUTED from the formula's diameters in another program).
 */
export const AWG_PRINTED: readonly (readonly [awg: number, mil: number, ohmsPerKm: number])[] = [
  [10, 101.9, 3.277],
  [11, 90.74, 4.1323],
  [12, 80.81, 5.2107],
  [13, 71.96, 6.5706],
  [14, 64.08, 8.2853],
  [15, 57.07, 10.4476],
  [16, 50.82, 13.1742],
  [17, 45.26, 16.6123],
  [18, 40.3, 20.9478],
  [19, 35.89, 26.4147],
  [20, 31.96, 33.3083],
  [21, 28.46, 42.0009],
  [22, 25.35, 52.9622],
  [23, 22.57, 66.7841],
  [24, 20.1, 84.2132],
  [25, 17.9, 106.1909],
  [26, 15.94, 133.9043],
  [27, 14.2, 168.8502],
  [28, 12.64, 212.9161],
  [29, 11.26, 268.4823],
  [30, 10.03, 338.5499],
  [31, 8.928, 426.9036],
  [32, 7.95, 538.3155],
  [33, 7.08, 678.8033],
  [34, 6.305, 855.9551],
  [35, 5.615, 1079.3395],
  [36, 5, 1361.0219],
  [37, 4.453, 1716.217],
  [38, 3.965, 2164.1097],
  [39, 3.531, 2728.8919],
  [40, 3.145, 3441.0692],
  [41, 2.8, 4339.1081],
  [42, 2.494, 5471.5143],
  [43, 2.221, 6899.4521],
  [44, 1.978, 8700.0485],
];

/**
 * Covered wire, mil: bare, single cotton, double cotton, single silk, double silk, and turns of enamelled wire to the inch
 * where given. READ: Cyclopedia of Telephony and Telegraphy, vol. 1 (American School of Correspondence, 1919), Table IV;
 * turns: Collins, The Radio Amateur's Hand Book (1922).
 */
export const COVERED_PRINTED: readonly (readonly [
  awg: number,
  bare: number,
  singleCotton: number,
  doubleCotton: number,
  singleSilk: number,
  doubleSilk: number,
  enamelTurnsPerInch?: number,
])[] = [
  [20, 31.961, 37.861, 42.161, 34.261, 36.161, 30],
  [21, 28.462, 34.362, 38.662, 30.762, 32.662],
  [22, 25.347, 31.247, 35.547, 27.647, 29.547, 37],
  [23, 22.571, 28.471, 32.771, 24.871, 26.771],
  [24, 20.1, 26.0, 30.3, 22.401, 24.3, 46],
  [25, 17.9, 23.8, 28.1, 20.2, 22.1],
  [26, 15.94, 21.84, 26.14, 18.24, 20.14, 58],
  [27, 14.195, 20.095, 24.395, 16.495, 18.395],
  [28, 12.641, 18.541, 22.841, 14.941, 16.841, 73],
  [29, 11.257, 17.157, 21.457, 13.557, 15.457],
  [30, 10.025, 15.925, 20.225, 12.325, 14.225, 91],
  [31, 8.928, 14.828, 19.128, 11.228, 13.128],
  [32, 7.95, 13.85, 18.15, 10.25, 12.15, 116],
  [33, 7.08, 12.98, 17.28, 9.38, 11.28],
  [34, 6.304, 12.204, 16.504, 8.504, 10.504, 145],
  [35, 5.614, 11.514, 15.814, 7.914, 9.814],
  [36, 5.0, 10.9, 15.2, 7.3, 9.2, 178],
  [37, 4.453, 10.353, 14.653, 6.753, 8.653],
  [38, 3.965, 9.865, 14.165, 6.265, 8.165, 232],
  [39, 3.531, 9.431, 13.731, 5.831, 7.731],
  [40, 3.144, 9.044, 13.344, 5.344, 7.344, 294],
];

/** Single-silk entries of that table that are misprints against its own rule, bare + 2.3 mil. */
export const SINGLE_SILK_MISPRINTS: readonly number[] = [24, 34, 40];
