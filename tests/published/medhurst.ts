/**
 * Medhurst 1947 (Wireless Engineer 24, 35-43 and 80-92): self-capacitance of a single-layer coil with one end earthed, in pF per cm
 * of diameter, against length/diameter. READ as quoted in a public mailing-list archive of November 1997.
 */
export const SELF_CAPACITANCE: readonly (readonly [ratio: number, picofaradPerCm: number])[] = [
  [50, 5.8],
  [40, 4.6],
  [30, 3.4],
  [25, 2.9],
  [20, 2.36],
  [15, 1.86],
  [10, 1.32],
  [9, 1.22],
  [8, 1.12],
  [7, 1.01],
  [6, 0.92],
  [5, 0.81],
  [4.5, 0.77],
  [4, 0.72],
  [3.5, 0.67],
  [3, 0.61],
  [2.5, 0.56],
  [2, 0.5],
  [1.5, 0.47],
  [1, 0.46],
  [0.9, 0.46],
  [0.8, 0.46],
  [0.7, 0.47],
  [0.6, 0.48],
  [0.5, 0.5],
  [0.45, 0.52],
  [0.4, 0.54],
  [0.35, 0.57],
  [0.3, 0.6],
  [0.25, 0.64],
  [0.2, 0.7],
  [0.15, 0.79],
  [0.1, 0.96],
];

/** Pitch over bare diameter at the head of each column of {@link RESISTANCE}. */
export const PITCH_OVER_WIRE = [
  10 / 10,
  10 / 9,
  10 / 8,
  10 / 7,
  10 / 6,
  10 / 5,
  10 / 4,
  10 / 3,
  10 / 2,
  10 / 1,
] as const;

/**
 * Medhurst 1947: high-frequency resistance of the coil over that of its wire straight, FROM MEMORY; coils of 30 turns and more, wire
 * much thicker than the skin depth. Length/diameter, then a value for each pitch.
 */
export const RESISTANCE: readonly (readonly [lengthOverDiameter: number, ratios: readonly number[]])[] = [
  [0, [5.31, 3.73, 2.74, 2.12, 1.74, 1.44, 1.2, 1.16, 1.07, 1.02]],
  [0.2, [5.45, 3.84, 2.83, 2.2, 1.77, 1.48, 1.29, 1.19, 1.08, 1.02]],
  [0.4, [5.65, 3.99, 2.97, 2.28, 1.83, 1.54, 1.33, 1.21, 1.08, 1.03]],
  [0.6, [5.8, 4.11, 3.1, 2.38, 1.89, 1.6, 1.38, 1.22, 1.1, 1.03]],
  [0.8, [5.8, 4.17, 3.2, 2.44, 1.92, 1.64, 1.42, 1.23, 1.1, 1.03]],
  [1, [5.55, 4.1, 3.17, 2.47, 1.94, 1.67, 1.45, 1.24, 1.1, 1.03]],
  [2, [4.1, 3.36, 2.74, 2.32, 1.98, 1.74, 1.5, 1.28, 1.13, 1.04]],
  [4, [3.54, 3.05, 2.6, 2.27, 2.01, 1.78, 1.54, 1.32, 1.15, 1.04]],
  [6, [3.31, 2.92, 2.6, 2.29, 2.03, 1.8, 1.56, 1.34, 1.16, 1.04]],
  [8, [3.2, 2.9, 2.62, 2.34, 2.08, 1.81, 1.57, 1.34, 1.165, 1.04]],
  [10, [3.23, 2.93, 2.65, 2.37, 2.1, 1.83, 1.58, 1.35, 1.17, 1.04]],
  [Number.POSITIVE_INFINITY, [3.41, 3.11, 2.815, 2.51, 2.22, 1.93, 1.65, 1.395, 1.19, 1.05]],
];

/** The remembered 1.20 at length 0, pitch 2.5 d is doubtful: it breaks its row and column, where 1.26 would not. */
export const DOUBTFUL = { lengthOverDiameter: 0, pitchOverWire: 2.5, remembered: 1.2, likely: 1.26 } as const;
