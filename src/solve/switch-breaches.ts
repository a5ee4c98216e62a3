/** What a two-switch coil must hold besides the limits of every coil. */
import { Coil } from '../coil/coil.ts';
import { fixedTurnsOf } from './demand.ts';
import type { Breach } from './design.ts';
import { hasDiameterRange, type Setting } from './settle.ts';

/** A whole coil whose diameter may be chosen and that is farther off than this is not taken. */
const WHOLE_OFF = 1e-3;
/** The same where the diameter is given: it is told. */
const FIXED_WHOLE_OFF = 0.03;

/** What two switches ask besides: the fixed turns come to the upper end of the range, and one turn to no more than the lower. */
export function switchBreaches(setting: Setting, coil: Coil, unitTaps: readonly number[], firstTen: number): Breach[] {
  const { job, demand } = setting;
  if (job.want.kind !== 'range') return [];
  const { lowUh, highUh } = job.want;
  const breaches: Breach[] = [];
  const off = coil.inductanceUh(coil.turns) / highUh - 1;
  const allowed = job.former.kind === 'printed' && hasDiameterRange(job) ? WHOLE_OFF : FIXED_WHOLE_OFF;
  if (Math.abs(off) > allowed) {
    const text = `the ${fixedTurnsOf(demand)} turns of ${demand.units} units and ${demand.taps} tens come to ${coil.inductanceUh(coil.turns).toPrecision(4)} µH, ${(off * 100).toFixed(2)} % off the upper end ${highUh} µH, ${allowed * 100} % at most`;
    breaches.push({ limit: 'winding.units', got: Math.abs(off), allowed, text, anyMethod: true });
  }
  // By themselves: the turns between are a coil like any other.
  const alone = firstTen - unitTaps[unitTaps.length - 1]!;
  const least = new Coil({ ...coil.shape, turns: alone, gaps: [] }).inductanceUh(alone);
  if (least > lowUh) {
    const text = `the least that the switches set, one turn from unit ${demand.units! - 1} to the first tens contact, is ${least.toPrecision(3)} µH, more than the lower end ${lowUh} µH`;
    breaches.push({ limit: 'want.inductance', got: least, allowed: lowUh, text, anyMethod: true });
  }
  return breaches;
}
