/**
 * Tubes that can be bought for formers, by nominal outside diameter, mm. Status: common practice; no standard covers the
 * card, phenolic and plastic tube of all trades, and the real diameter is to be measured before a plan is wound.
 */
export interface Tube {
  readonly name: string;
  readonly outsideDiameterMm: number;
  readonly status: string;
}

const METRIC: readonly number[] = [16, 19, 20, 22, 25, 30, 32, 35, 40, 45, 50, 60, 63, 70, 75, 80, 90, 100, 110, 125];

const INCH: readonly (readonly [written: string, inches: number])[] = [
  ['3/4 in', 0.75],
  ['1 in', 1],
  ['1 1/4 in', 1.25],
  ['1 1/2 in', 1.5],
  ['1 3/4 in', 1.75],
  ['2 in', 2],
  ['2 1/4 in', 2.25],
  ['2 1/2 in', 2.5],
  ['2 3/4 in', 2.75],
  ['3 in', 3],
  ['3 1/2 in', 3.5],
  ['4 in', 4],
];

const STATUS = 'common practice';

/** Rounded to the hundredth of a millimetre, far below what a tube keeps to. */
const inchesToMm = (inches: number): number => Math.round(inches * 2540) / 100;

const TUBES: readonly Tube[] = [
  ...METRIC.map((mm) => ({ name: `${mm} mm`, outsideDiameterMm: mm, status: STATUS })),
  ...INCH.map(([name, inches]) => ({ name, outsideDiameterMm: inchesToMm(inches), status: STATUS })),
].sort((a, b) => a.outsideDiameterMm - b.outsideDiameterMm);

/** Thinnest first. */
export function tubes(): readonly Tube[] {
  return TUBES;
}
