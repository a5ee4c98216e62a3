/**
 * READ: J. Mills, Letters of a Radio-Engineer to His Son (Harcourt Brace, 1922), Letter 21, Table II. Single layer on a 3.5 in or
 * 5.0 in tube, No. 26 single-silk wire, about 54 turns to the inch. The printed inductances are rounded and were calculated, not
 * measured. Length and wire are left out where none was noted.
 * ASSUMED: mean diameter = tube + one covered wire of 0.01824 in, bare 0.01594 in.
 */
export const BARE_INCH = 0.01594;
export const COVERED_INCH = 0.01824;
export const TURNS_PER_INCH = 54;

export const COILS_1922: readonly (readonly [
  tubeInch: number,
  turns: number,
  millihenries: number,
  lengthInch?: number,
  wireFeet?: number,
])[] = [
  [3.5, 25, 0.1, 0.46, 25],
  [3.5, 34, 0.16, 0.63, 36],
  [3.5, 39, 0.2, 0.72, 42],
  [3.5, 44, 0.25, 0.81, 49],
  [3.5, 58, 0.4, 1.07, 63],
  [3.5, 75, 0.6, 1.38, 80],
  [3.5, 92, 0.8, 1.7, 100],
  [3.5, 96, 0.85, 1.78, 104],
  [3.5, 108, 1.0, 2.0, 118],
  [3.5, 123, 1.2, 2.28, 133],
  [3.5, 164, 1.8, 3.03, 176],
  [3.5, 180, 2.0, 3.33, 190],
  [3.5, 242, 3.0, 4.48, 250],
  [3.5, 304, 4.0, 5.62, 310],
  [3.5, 366, 5.0, 6.77, 370],
  [3.5, 550, 8.0, 10.2, 550],
  [5.0, 120, 2.0, 2.22, 160],
  [5.0, 158, 3.0, 2.93, 215],
  [5.0, 194, 4.0, 3.58, 265],
  [5.0, 228, 5.0, 4.22, 310],
  [5.0, 324, 8.0, 6.0, 450],
  [5.0, 384, 10.0, 7.1, 530],
  [5.0, 450, 12.0, 8.3, 625],
  [3.5, 14, 0.04],
  [3.5, 20, 0.07],
  [3.5, 28, 0.12],
  [3.5, 36, 0.18],
  [3.5, 44, 0.25],
  [3.5, 56, 0.38],
  [3.5, 75, 0.6],
];
