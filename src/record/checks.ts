/** What to measure besides the taps, with limits: the former, the winding under way, and resonance of the whole coil. */

import type { Spread } from '../coil/tolerance.ts';
import type { AsMade, Shop } from '../job/job.ts';
import type { Design } from '../solve/design.ts';
import { lengthHalfMm } from './meter.ts';
import type { Measuring } from './meter-schema.ts';
import { decimals } from './rounding.ts';
import type { Check } from './schema.ts';
import { overTwenty } from './steps.ts';

interface CheckedJob {
  readonly shop: Pick<Shop, 'capacitorTolerance'>;
  readonly asMade: AsMade;
}

export function checksOf(design: Design, spread: Spread, measuring: Measuring, { shop, asMade }: CheckedJob): Check[] {
  const { former, coil, taps } = design;
  const checks: Check[] = [];
  const add = (what: string, nominal: number, low: number, high: number, unit: string, digits: number) =>
    checks.push({
      what,
      low: decimals(low, digits),
      nominal: decimals(nominal, digits),
      high: decimals(high, digits),
      unit,
      digits,
    });
  const diameter = former.outsideDiameterMm;
  const half = spread.diameterMm;
  // What the bench makes of the diameter can lie in the former or in how the wire beds on it: both will do.
  const made = diameter + asMade.diameterMm;
  add('former, outside diameter', made, Math.min(diameter, made) - half, Math.max(diameter, made) + half, 'mm', 2);
  if (coil.places.length >= 21) {
    const mm = overTwenty(design);
    const width = lengthHalfMm(coil, spread, 19);
    add('20 turns, edge to edge', mm, mm - width, mm + width, 'mm', 2);
  }
  const percent = `${decimals(100 * shop.capacitorTolerance, 3)} %`;
  for (const { tap, capacitancePf, frequencyKhz, lowKhz, highKhz } of measuring.resonances)
    if (tap === taps.length)
      add(`resonance S to F with ${capacitancePf} pF ± ${percent}, S earthed`, frequencyKhz, lowKhz, highKhz, 'kHz', 0);
  return checks;
}
