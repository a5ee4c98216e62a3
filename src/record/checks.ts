/** What to measure on the finished coil, with limits: from the record's own winding and former. */

import type { Spread } from '../coil/tolerance.ts';
import { resonance } from '../physics/tuning.ts';
import type { Design } from '../solve/design.ts';
import { decimals, significant } from './rounding.ts';
import type { Check, Winding } from './schema.ts';
import { overTwenty } from './steps.ts';

/** Capacitor that most benches have at hand, and how well its value is known. */
const KNOWN_PF = 100;
const KNOWN_SPREAD = 0.01;
/** Medhurst's table is stated to 5 %. */
const SELF_SPREAD = 0.05;

export function checksOf(design: Design, winding: Winding, spread: Spread): Check[] {
  const { former, coil } = design;
  const whole = winding.taps[winding.taps.length - 1]!;
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
  add(
    'former outside diameter, before winding',
    diameter,
    diameter - spread.diameterMm,
    diameter + spread.diameterMm,
    'mm',
    2,
  );
  const lengthSpread = (turns: number) => {
    const pitchPart = spread.pitch * coil.shape.pitchMm * turns;
    const gapPart =
      spread.gap *
      design.method.gapMm *
      Math.sqrt([...design.unitTaps, ...design.taps.map(({ turn }) => turn)].filter((turn) => turn < turns).length);
    return Math.hypot(pitchPart, gapPart, 0.05 * winding.wire.overallMm);
  };
  if (coil.places.length >= 21) {
    const mm = overTwenty(design);
    const half = lengthSpread(19);
    add('over 20 turns from the start, edge to edge', mm, mm - half, mm + half, 'mm', 2);
  }
  const half = lengthSpread(winding.turns);
  add(
    'whole winding, S to F, edge to edge',
    winding.windingLengthMm,
    winding.windingLengthMm - half,
    winding.windingLengthMm + half,
    'mm',
    2,
  );
  add(
    'DC resistance S to F at 20 °C (four wires below 1 Ω)',
    whole.resistanceDcOhm,
    whole.resistanceLowOhm,
    whole.resistanceHighOhm,
    'Ω',
    whole.resistanceDcOhm < 10 ? 3 : 2,
  );
  add(
    'inductance S to F, low frequency',
    whole.inductanceUh,
    whole.inductanceLowUh,
    whole.inductanceHighUh,
    'µH',
    whole.inductanceUh < 100 ? 2 : 1,
  );
  const kHz = (uh: number, pf: number) => resonance(uh * 1e-6, pf * 1e-12) / 1e3;
  const self = winding.selfCapacitancePf;
  const nominal = kHz(whole.inductanceUh, KNOWN_PF + self);
  const capacitance = Math.hypot(KNOWN_SPREAD * KNOWN_PF, SELF_SPREAD * self) / (KNOWN_PF + self) / 2;
  const inductance = (whole.inductanceHighUh / whole.inductanceLowUh - 1) / 4;
  const width = nominal * Math.hypot(capacitance, inductance);
  add(
    `resonance S to F with ${KNOWN_PF} pF ± 1 %, start earthed`,
    significant(nominal, 6),
    nominal - width,
    nominal + width,
    'kHz',
    0,
  );
  return checks;
}
