/** Inductance of whole single-layer coils at low frequency, COMPUTED three independent ways in double precision or better. */
export interface ComputedCoil {
  readonly turns: number;
  readonly meanDiameterMm: number;
  readonly pitchMm: number;
  readonly bareMm: number;
  /** Current sheet, Nagaoka 1909. */
  readonly sheetUh: number;
  /** The same with Rosa's corrections (Rosa & Grover 1912). */
  readonly rosaUh: number;
  /** Sum over coaxial circles (Maxwell 1873), own term of round wire. */
  readonly ringsUh: number;
  /** Neumann's integral (1845) along the true helix, the wire a filament at its mean distance. */
  readonly helixUh: number;
}

const ROWS = [
  [400, 200.0, 1.0, 0.5, 12919.481949, 12909.516357, 12909.488825, 12909.591149],
  [75, 89.363296, 0.47037, 0.404876, 589.075529, 585.998088, 585.996062, 585.995807],
  [60, 100.0, 1.0, 0.8, 337.357423, 334.889265, 334.88528, 334.888477],
  [10, 50.0, 5.0, 2.0, 3.397229, 3.426456, 3.422845, 3.42963],
  [5, 100.0, 1.0, 0.5, 6.100146, 6.074479, 6.074406, 6.073626],
  [2, 100.0, 2.0, 1.0, 1.031986, 1.034824, 1.034779, 1.034172],
  [1, 100.0, 1.0, 1.0, 0.345044, 0.310056, 0.310056, 0.309941],
  [45, 110.0, 1.25, 1.0, 228.268812, 226.246776, 226.243259, 226.244902],
  [100, 76.2, 0.6, 0.5, 605.931123, 602.572852, 602.568575, 602.574378],
  [200, 25.0, 0.3, 0.25, 347.251908, 345.032879, 345.029202, 345.04641],
  [20, 30.0, 1.5, 1.0, 8.153351, 7.98455, 7.982526, 7.986591],
] as const;

export const COMPUTED_COILS: readonly ComputedCoil[] = ROWS.map(
  ([turns, meanDiameterMm, pitchMm, bareMm, sheetUh, rosaUh, ringsUh, helixUh]) => ({
    turns,
    meanDiameterMm,
    pitchMm,
    bareMm,
    sheetUh,
    rosaUh,
    ringsUh,
    helixUh,
  }),
);
