/**
 * What instruments will show of the finished coil: the inductance meter at its frequency, resonance with known capacitors,
 * and the line of the two-capacitor method. The start lies on the earthy terminal, the turns beyond a tap hang on open, and
 * no switch is wired yet.
 */
import { formerLossOhm } from '../coil/positions.ts';
import type { Spread } from '../coil/tolerance.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import {
  type AtKhz,
  type Bench,
  CLIP_PF,
  resonanceAt,
  SELF_SPREAD,
  sectionsAt,
  workedBetween,
} from './bench-figures.ts';
import type { Doubt, Measuring } from './meter-schema.ts';
import { decimals, mm, significant } from './rounding.ts';
import type { Tap } from './schema.ts';

/** Of the clip leads of a meter, zeroed shorted: what a few centimetres that lie otherwise leave (common practice). */
const LEAD_UH = 0.02;
/** Below this the meter sees more resistance than coil. */
const LEAST_Q = 1;
/** Share of the reactance that the capacitance may take before a reading is one of a resonance rather than of a coil. */
const MOST_RISE = 0.5;

/**
 * The inductance that a meter shows at its frequency: of the capacitor that would resonate with the turns there, so that the
 * coil's own capacitance and that of the open rest are in it as the coupled circuit has them. For one capacitance C across
 * the coil that is L/(1 - omega^2 L C). `inductanceUh` is that of the field at this frequency; null where the coil is above its resonance.
 */
function shownUh(
  coil: WorkingCoil,
  turn: number,
  inductanceUh: number,
  kHz: number,
): { uh: number; half: number } | null {
  const omega = 2e3 * Math.PI * kHz;
  const own = coil.coil.selfPf(turn);
  const scale = Math.sqrt(coil.coil.inductanceUh(turn) / inductanceUh);
  let pf = 1e18 / (omega ** 2 * inductanceUh) - own;
  let half = 0;
  // f^2 (C + own) hardly changes with C: what is left falls to a few parts in a million at each step.
  for (let step = 0; step < 4; step++) {
    if (pf <= 0) return null;
    const found = resonanceAt(coil, turn, pf);
    half = (2 * found.halfKhz * (pf + own)) / (found.kHz * pf);
    pf = (pf + own) * ((found.kHz * scale) / kHz) ** 2 - own;
  }
  return pf > 0 ? { uh: 1e18 / (omega ** 2 * pf), half } : null;
}

/**
 * What a meter that measures coils says of a tap, with its limits, and whether it can be trusted.
 *
 * The limits join those of the tap and of the meter as squares: its accuracy, a share of the impedance, comes out as
 * sqrt(1 + 1/Q^2) of that share on the inductance; of the leads `LEAD_UH` is left after zeroing; and of the rise by the
 * capacitance what is not known of that. It is not trusted where that stands above what its maker promises:
 * - leads: what they leave is more than the accuracy of the reading,
 * - resistance: Q below 1, where most of what it senses is not the coil's reactance, so that a small error of phase is a
 *   large one of inductance,
 * - capacitance: what is not known of the rise is more than the accuracy, or the rise is half of the reading.
 */
function meterTap(
  coil: WorkingCoil,
  turn: number,
  tap: Tap,
  at: AtKhz,
  shop: Bench,
  lossTangent: number,
): Measuring['meter'][number] {
  const { meterKhz: kHz, meterAccuracy: accuracy } = shop;
  const { inductanceUh } = at;
  const own = coil.coil.selfPf(turn);
  const q =
    (2e-3 * Math.PI * kHz * inductanceUh) / (at.resistanceOhm + formerLossOhm(inductanceUh, own, lossTangent, kHz));
  const shown = shownUh(coil, turn, inductanceUh, kHz);
  const base = { tap: tap.tap, inductanceUh: significant(inductanceUh), q: significant(q, 3) };
  if (shown === null) return { ...base, readingUh: null, lowUh: null, highUh: null, doubt: 'capacitance' };
  const rise = 1 - inductanceUh / shown.uh;
  const unknown = Math.hypot(rise * Math.hypot(SELF_SPREAD, CLIP_PF / own), shown.half);
  const leads = LEAD_UH / shown.uh;
  const tapHalf = (tap.inductanceHighUh - tap.inductanceLowUh) / (2 * tap.inductanceUh);
  const half = Math.hypot(tapHalf, accuracy * Math.hypot(1, 1 / q), leads, unknown);
  const doubt: Doubt | null =
    rise > MOST_RISE || unknown > accuracy
      ? 'capacitance'
      : leads > accuracy
        ? 'leads'
        : q < LEAST_Q
          ? 'resistance'
          : null;
  return {
    ...base,
    readingUh: significant(shown.uh),
    lowUh: significant(Math.max(0, shown.uh * (1 - half))),
    highUh: significant(shown.uh * (1 + half)),
    doubt,
  };
}

function resonancesOf(coil: WorkingCoil, taps: readonly Tap[], shop: Bench): Measuring['resonances'] {
  const plain = taps.flatMap((tap, index) =>
    shop.capacitorsPf.map((pf) => ({ tap, index, pf, ...resonanceAt(coil, coil.taps[index]!, pf) })),
  );
  if (plain.length === 0) return [];
  const all = plain.map(({ kHz }) => kHz);
  const worked = workedBetween(coil, Math.min(...all), Math.max(...all));
  return plain.map(({ tap, index, pf, kHz: plainKhz, halfKhz }) => {
    const kHz = plainKhz * Math.sqrt(worked(index, plainKhz).crowding);
    const own = coil.coil.selfPf(coil.taps[index]!);
    const capacitance = Math.hypot(shop.capacitorTolerance * pf, SELF_SPREAD * own, CLIP_PF) / (2 * (pf + own));
    const inductance = (tap.inductanceHighUh - tap.inductanceLowUh) / (4 * tap.inductanceUh);
    const half = kHz * Math.hypot(capacitance, inductance, halfKhz / plainKhz);
    return {
      tap: tap.tap,
      capacitancePf: pf,
      frequencyKhz: significant(kHz),
      lowKhz: significant(kHz - half),
      highKhz: significant(kHz + half),
    };
  });
}

/** 1/f² in 1/MHz² is this times uH times pF. */
export const SQUARE = 4e-6 * Math.PI ** 2;

/**
 * The line 1/f² = 4 pi^2 L (C + C0) that readings with known capacitors lie on (common practice): through the first and the
 * last of them. Errors of the two capacitors are independent and of the same share; those of the frequencies are far below.
 * With one capacitor, the slope is that of the coil's inductance and C0 its self-capacitance, and both halves are null.
 */
function lineOf(coil: WorkingCoil, resonances: Measuring['resonances'], tolerance: number): Measuring['line'] {
  const whole = resonances.filter(({ tap }) => tap === coil.taps.length);
  const [first, last] = [whole[0], whole[whole.length - 1]];
  if (first === undefined || last === undefined || first === last) {
    const uh = coil.coil.inductanceUh(coil.coil.turns);
    return {
      slopePerPf: significant(SQUARE * uh),
      selfPf: significant(coil.coil.selfPf(coil.coil.turns), 4),
      inductanceUh: significant(uh),
      inductancePercent: null,
      selfHalfPf: null,
    };
  }
  const [c1, c2] = [first.capacitancePf, last.capacitancePf];
  const [y1, y2] = [(1e3 / first.frequencyKhz) ** 2, (1e3 / last.frequencyKhz) ** 2];
  const slope = (y2 - y1) / (c2 - c1);
  const share = y1 / (y2 - y1);
  return {
    slopePerPf: significant(slope),
    selfPf: decimals(y1 / slope - c1, 2),
    inductanceUh: significant(slope / SQUARE),
    inductancePercent: decimals((100 * tolerance * Math.hypot(c1, c2)) / (c2 - c1), 2),
    selfHalfPf: decimals(tolerance * Math.hypot(share * c2, (1 + share) * c1), 2),
  };
}

/**
 * Limits of the wound length up to each tap: of the pitch, of the gaps of the taps before it, and a twentieth of a wire for the
 * reading of the rule.
 */
export function lengthHalfMm(coil: WorkingCoil['coil'], spread: Spread, turns: number): number {
  // The gap of a tap is no part of the length up to it; `turns` may be rounded to six decimals.
  const before = coil.shape.gaps.filter(({ turn }) => turn < turns - 1e-5);
  const gaps = Math.hypot(...before.map(({ gapMm }) => spread.gap * gapMm));
  return Math.hypot(spread.pitch * coil.shape.pitchMm * turns, gaps, 0.05 * coil.shape.wire.overallMm);
}

/** All of it, for the taps of a winding as the record has them. */
export function measuringOf(
  coil: WorkingCoil,
  taps: readonly Tap[],
  shop: Bench,
  spread: Spread,
  lossTangent: number,
): Measuring {
  const at = sectionsAt(coil, shop.meterKhz);
  const meter = taps.map((tap, i) => meterTap(coil, coil.taps[i]!, tap, at[i]!, shop, lossTangent));
  const trusted = meter.filter(({ doubt }) => doubt === null).map(({ tap }) => tap);
  const resonances = resonancesOf(coil, taps, shop);
  return {
    leadUh: LEAD_UH,
    clipPf: CLIP_PF,
    meter,
    fromTap: trusted[0] ?? null,
    toTap: trusted.at(-1) ?? null,
    lengths: taps.map((tap) => {
      const half = lengthHalfMm(coil.coil, spread, tap.turn);
      return { tap: tap.tap, lowMm: mm(tap.woundLengthMm - half), highMm: mm(tap.woundLengthMm + half) };
    }),
    resonances,
    line: lineOf(coil, resonances, shop.capacitorTolerance),
  };
}
