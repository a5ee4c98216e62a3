/**
 * Enamelled round copper wire in metric sizes: conductor, tolerance and the limits of enamel grades 1 and 2, all in mm.
 *
 * Source: IEC 60317-0-1:2013, Table 1. Status: rows to 0.125 mm agree with a manufacturer's table that was READ; thicker
 * rows are FROM MEMORY. The least overall diameter is the nominal conductor plus the least increase.
 */
export const IEC_STANDARD = 'IEC 60317-0-1';

/** One size; `status` says whether the row was read in print or is from memory. */
export interface IecRow {
  readonly bareMm: number;
  readonly toleranceMm: number;
  readonly grade1MinIncreaseMm: number;
  readonly grade1MaxOverallMm: number;
  readonly grade2MinIncreaseMm: number;
  readonly grade2MaxOverallMm: number;
  readonly status: 'read' | 'from memory';
}

type Columns = readonly [
  bare: number,
  tolerance: number,
  grade1Increase: number,
  grade1Max: number,
  grade2Increase: number,
  grade2Max: number,
];

const READ: readonly Columns[] = [
  [0.071, 0.003, 0.007, 0.084, 0.012, 0.091],
  [0.08, 0.003, 0.007, 0.094, 0.014, 0.101],
  [0.09, 0.003, 0.008, 0.105, 0.015, 0.113],
  [0.1, 0.003, 0.008, 0.117, 0.016, 0.125],
  [0.112, 0.003, 0.009, 0.13, 0.017, 0.139],
  [0.125, 0.003, 0.01, 0.144, 0.019, 0.154],
];

const FROM_MEMORY: readonly Columns[] = [
  [0.14, 0.003, 0.011, 0.16, 0.021, 0.171],
  [0.16, 0.003, 0.012, 0.182, 0.023, 0.194],
  [0.18, 0.003, 0.013, 0.204, 0.025, 0.217],
  [0.2, 0.003, 0.014, 0.226, 0.027, 0.239],
  [0.224, 0.003, 0.015, 0.252, 0.029, 0.266],
  [0.25, 0.004, 0.017, 0.281, 0.032, 0.297],
  [0.28, 0.004, 0.018, 0.312, 0.033, 0.329],
  [0.315, 0.004, 0.019, 0.349, 0.035, 0.367],
  [0.355, 0.004, 0.02, 0.392, 0.038, 0.411],
  [0.4, 0.005, 0.021, 0.439, 0.04, 0.459],
  [0.45, 0.005, 0.022, 0.491, 0.042, 0.513],
  [0.5, 0.005, 0.024, 0.544, 0.045, 0.566],
  [0.56, 0.006, 0.025, 0.606, 0.047, 0.63],
  [0.63, 0.006, 0.027, 0.679, 0.05, 0.704],
  [0.71, 0.007, 0.028, 0.762, 0.053, 0.789],
  [0.75, 0.008, 0.03, 0.805, 0.056, 0.834],
  [0.8, 0.008, 0.03, 0.855, 0.056, 0.884],
  [0.85, 0.009, 0.032, 0.909, 0.06, 0.939],
  [0.9, 0.009, 0.032, 0.959, 0.06, 0.989],
  [0.95, 0.01, 0.034, 1.012, 0.063, 1.044],
  [1, 0.01, 0.034, 1.062, 0.063, 1.094],
  [1.06, 0.011, 0.034, 1.124, 0.065, 1.157],
  [1.12, 0.011, 0.034, 1.184, 0.065, 1.217],
  [1.18, 0.012, 0.035, 1.246, 0.067, 1.279],
  [1.25, 0.013, 0.035, 1.316, 0.067, 1.349],
  [1.32, 0.013, 0.036, 1.388, 0.069, 1.422],
  [1.4, 0.014, 0.036, 1.468, 0.069, 1.502],
  [1.5, 0.015, 0.038, 1.57, 0.071, 1.606],
  [1.6, 0.016, 0.038, 1.67, 0.071, 1.706],
  [1.7, 0.017, 0.039, 1.772, 0.073, 1.809],
  [1.8, 0.018, 0.039, 1.872, 0.073, 1.909],
  [1.9, 0.019, 0.04, 1.974, 0.075, 2.012],
  [2, 0.02, 0.04, 2.074, 0.075, 2.112],
];

function named(columns: Columns, status: IecRow['status']): IecRow {
  const [bareMm, toleranceMm, grade1MinIncreaseMm, grade1MaxOverallMm, grade2MinIncreaseMm, grade2MaxOverallMm] =
    columns;
  return {
    bareMm,
    toleranceMm,
    grade1MinIncreaseMm,
    grade1MaxOverallMm,
    grade2MinIncreaseMm,
    grade2MaxOverallMm,
    status,
  };
}

/** Every size, thinnest first. */
export const IEC_ROWS: readonly IecRow[] = [
  ...READ.map((columns) => named(columns, 'read')),
  ...FROM_MEMORY.map((columns) => named(columns, 'from memory')),
];

/** The size whose conductor is nearest in ratio to `bareMm`. */
export function nearestIecRow(bareMm: number): IecRow {
  const distance = (row: IecRow) => Math.abs(Math.log(row.bareMm / bareMm));
  return IEC_ROWS.reduce((best, row) => (distance(row) < distance(best) ? row : best));
}
