/**
 * Enamelled wire: limits of the overall diameter by the standard of each series. The nominal overall diameter is the middle
 * between them; where a standard prints a nominal, it is this middle.
 */
import { IEC_STANDARD, type IecRow, nearestIecRow } from './iec60317.ts';
import { heavyMaxOverallMil, MM_PER_MIL, NEMA_ROWS } from './nemaMw1000.ts';
import type { Size } from './size.ts';

export type Enamel = 'enamel' | 'enamel heavy';

/** Limits over the enamel, mm, and where they come from. */
export interface EnamelLimits {
  readonly lowMm: number;
  readonly highMm: number;
  readonly standard: string;
  readonly status: string;
}

/**
 * Thickest bare wire whose enamel is taken to tin through (polyurethane), mm. Common practice: thicker wire is mostly
 * sold with polyester or polyamide-imide enamel, which must be scraped.
 */
export const SOLDERABLE_TO_MM = 0.5;

/** How far, in ratio, a gauge size may lie from the metric size whose enamel it borrows. */
const BORROW_WITHIN = 1.1;

const grade = (enamel: Enamel): string => (enamel === 'enamel' ? 'grade 1' : 'grade 2');

function iecIncrease(row: IecRow, enamel: Enamel): { readonly leastMm: number; readonly mostMm: number } {
  return enamel === 'enamel'
    ? { leastMm: row.grade1MinIncreaseMm, mostMm: row.grade1MaxOverallMm - row.bareMm }
    : { leastMm: row.grade2MinIncreaseMm, mostMm: row.grade2MaxOverallMm - row.bareMm };
}

function metricEnamel(size: Size, enamel: Enamel): EnamelLimits {
  const row = nearestIecRow(size.bareMm);
  return {
    lowMm: row.bareMm + iecIncrease(row, enamel).leastMm,
    highMm: enamel === 'enamel' ? row.grade1MaxOverallMm : row.grade2MaxOverallMm,
    standard: `${IEC_STANDARD} ${grade(enamel)}`,
    status: row.status,
  };
}

/** NEMA counts the increase from the thinnest bare wire; IEC from the nominal. */
function awgEnamel(size: Size, enamel: Enamel): EnamelLimits | undefined {
  const row = NEMA_ROWS.get(size.number);
  if (row === undefined) return undefined;
  if (enamel === 'enamel') {
    if (row.singleMinIncreaseMil === undefined || row.singleMaxOverallMil === undefined) return undefined;
    return {
      lowMm: (row.bareMinMil + row.singleMinIncreaseMil) * MM_PER_MIL,
      highMm: row.singleMaxOverallMil * MM_PER_MIL,
      standard: `${size.standard} single build`,
      status: 'computed; limits read',
    };
  }
  const most = heavyMaxOverallMil(row);
  return {
    lowMm: (row.bareMinMil + row.heavyMinIncreaseMil) * MM_PER_MIL,
    highMm: most.mil * MM_PER_MIL,
    standard: `${size.standard} heavy build`,
    status: most.estimated
      ? 'computed; greatest overall estimated from neighbouring sizes'
      : 'computed; greatest overall from memory',
  };
}

function swgEnamel(size: Size, enamel: Enamel): EnamelLimits | undefined {
  const row = nearestIecRow(size.bareMm);
  const ratio = size.bareMm / row.bareMm;
  if (ratio > BORROW_WITHIN || ratio < 1 / BORROW_WITHIN) return undefined;
  const { leastMm, mostMm } = iecIncrease(row, enamel);
  return {
    lowMm: size.bareMm + leastMm,
    highMm: size.bareMm + mostMm,
    standard: `${size.standard}, ${IEC_STANDARD} ${grade(enamel)}`,
    status: 'from memory; enamel and limits estimated from the nearest metric size',
  };
}

/** Enamel of a size, or undefined when no table has it: NEMA has no single build thicker than 14 AWG. */
export function enamelLimits(size: Size, enamel: Enamel): EnamelLimits | undefined {
  if (size.series === 'AWG') return awgEnamel(size, enamel);
  if (size.series === 'SWG') return swgEnamel(size, enamel);
  return metricEnamel(size, enamel);
}
