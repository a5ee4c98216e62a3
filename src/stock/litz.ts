/**
 * Litz: a bundle of strands, each enamelled to grade 1 or single build, under a serving of silk.
 *
 * Bundle diameter = factor * sqrt(strands) * strand overall; the factor is 1.25 up to 12 strands, 1.26 at 16, 1.27 at 20
 * and 1.28 from 25 on, straight between. Serving adds 0.025 to 0.040 mm (single) or 0.050 to 0.080 mm (double) to the diameter.
 * Domain: 3 to 1000 strands, strands of 0.04 to 0.4 mm, bundle up to 3 mm. Status: common practice, FROM MEMORY.
 */
import { IEC_STANDARD } from './iec60317.ts';
import { allSizes, type Size, sizeName } from './size.ts';
import type { Covering, Wire } from './wire.ts';
import { wireNamed } from './wires.ts';

export type LitzCovering = Extract<Covering, 'litz single silk' | 'litz double silk'>;

export const LITZ_STRANDS = { least: 3, most: 1000 } as const;
export const LITZ_STRAND_MOST_MM = 0.4;
export const LITZ_BUNDLE_MOST_MM = 3;

const SERVING_MM: Readonly<Record<LitzCovering, { readonly low: number; readonly high: number }>> = {
  'litz single silk': { low: 0.025, high: 0.04 },
  'litz double silk': { low: 0.05, high: 0.08 },
};

const FACTOR: readonly (readonly [strands: number, factor: number])[] = [
  [12, 1.25],
  [16, 1.26],
  [20, 1.27],
  [25, 1.28],
];

/** A strand with its enamel, mm; `name` is its size as in `0.1 mm`. */
export interface Strand {
  readonly name: string;
  readonly size: Pick<Size, 'series' | 'number'>;
  readonly bareMm: number;
  readonly overallMm: number;
  readonly overallLowMm: number;
  readonly overallHighMm: number;
  readonly standard: string;
  readonly status: string;
}

/** Strands thinner than the solid wire in stock. IEC 60317-0-1 grade 1: bare, least increase, greatest overall; FROM MEMORY. */
const FINE_STRANDS: readonly (readonly [bare: number, increase: number, most: number])[] = [
  [0.04, 0.004, 0.049],
  [0.05, 0.005, 0.06],
  [0.063, 0.006, 0.076],
];

const fineStrand = ([bareMm, increase, most]: (typeof FINE_STRANDS)[number]): Strand => ({
  name: sizeName('mm', bareMm),
  size: { series: 'mm', number: bareMm },
  bareMm,
  overallMm: (bareMm + increase + most) / 2,
  overallLowMm: bareMm + increase,
  overallHighMm: most,
  standard: `${IEC_STANDARD} grade 1`,
  status: 'from memory',
});

/** Every strand of which litz can be made: fine ones, and the enamelled solid wire up to {@link LITZ_STRAND_MOST_MM}. */
export function allStrands(): readonly Strand[] {
  const solid = allSizes().flatMap((size) => {
    const wire = wireNamed(`${size.name} enamel`);
    return wire === undefined || wire.bareMm > LITZ_STRAND_MOST_MM ? [] : [{ ...wire, name: size.name, size }];
  });
  return [...FINE_STRANDS.map(fineStrand), ...solid];
}

/** Bundle diameter over `sqrt(strands)` times that of a strand. */
export function bundleFactor(strands: number): number {
  const [first, ...rest] = FACTOR;
  let [below, factor] = first!;
  if (strands <= below) return factor;
  for (const [above, next] of rest) {
    if (strands <= above) return factor + ((strands - below) / (above - below)) * (next - factor);
    [below, factor] = [above, next];
  }
  return factor;
}

/** Strands enamelled thinly enough to tin through; the silk is pushed back first. */
export function litzWire(strands: number, strand: Strand, covering: LitzCovering): Wire {
  const scale = bundleFactor(strands) * Math.sqrt(strands);
  const serving = SERVING_MM[covering];
  return {
    name: `${strands} x ${strand.name} ${covering}`,
    covering,
    bareMm: scale * strand.overallMm,
    bareLowMm: scale * strand.overallLowMm,
    bareHighMm: scale * strand.overallHighMm,
    overallMm: scale * strand.overallMm + (serving.low + serving.high) / 2,
    overallLowMm: scale * strand.overallLowMm + serving.low,
    overallHighMm: scale * strand.overallHighMm + serving.high,
    strands,
    strandMm: strand.bareMm,
    solderable: true,
    standard: `strand: ${strand.standard}; bundle rule`,
    status: `strand: ${strand.status}; bundle from memory`,
  };
}
