/**
 * What instruments will show of the finished coil: the inductance meter at its frequency, resonance with known capacitors,
 * and the line of the two-capacitor method. The start lies on the earthy terminal, the turns beyond a tap hang on open, and
 * no switch is wired yet.
 */
import { formerLossOhm } from '../coil/positions.ts';
import type { Spread } from '../coil/tolerance.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { Shop } from '../job/job.ts';
import { resonanceBracket } from '../physics/coupled/coupled.ts';
import { terminalImpedance } from '../physics/field/field.ts';
import type { Doubt, Measuring } from './meter-schema.ts';
import { decimals, mm, significant } from './rounding.ts';
import type { Tap } from './schema.ts';

/** Of the clip leads of a meter, zeroed shorted: what a few centimetres that lie otherwise leave (common practice). */
const LEAD_UH = 0.02;
/** What clips and a loose coupling put across the coil (common practice). */
const CLIP_PF = 1;
/** Medhurst's table is stated to 5 %. */
const SELF_SPREAD = 0.05;
/** Below this the meter sees more resistance than coil. */
const LEAST_Q = 1;
/** Share of the reactance that the capacitance may take before a reading is one of a resonance rather than of a coil. */
const MOST_RISE = 0.5;

type Bench = Pick<Shop, 'meterKhz' | 'meterAccuracy' | 'capacitorsPf' | 'capacitorTolerance'>;

interface AtKhz {
  readonly inductanceUh: number;
  readonly resistanceOhm: number;
}

/** So low that no current crowds. */
const NO_CROWDING_KHZ = 1e-3;

/**
 * Inductance and resistance of every tap from the start, the rest open; one solution of the field serves all. Where sections end
 * within a turn their sum is a few parts in a thousand off the whole, at every frequency alike: the share by which the current's
 * crowding lowers it is taken from there, and the inductance itself from the ring sum.
 */
function sectionsAt(coil: WorkingCoil, kHz: number): AtKhz[] {
  const [solved, plain] = [coil.sections(kHz, coil.taps), coil.sections(NO_CROWDING_KHZ, coil.taps)];
  return coil.taps.map((turn, i) => {
    const used = { from: 0, to: i + 1 };
    const { inductance, resistance } = terminalImpedance(solved, used, 'open');
    const share = inductance / terminalImpedance(plain, used, 'open').inductance;
    return { inductanceUh: share * coil.coil.inductanceUh(turn), resistanceOhm: resistance };
  });
}

/**
 * First resonance with so much capacitance from the start to a turn: start earthed, no leads. kHz, and half of what is not known.
 * Pieces of turns make the circuit's own inductance a little off, as in `sectionsAt`: that is put right here.
 */
function resonanceAt(coil: WorkingCoil, turn: number, pf: number): { kHz: number; halfKhz: number } {
  const { winding, on } = coil.circuit(turn, pf, 'open');
  const { first } = resonanceBracket(winding, { ...on, earthed: 'from', strays: [] });
  const node = winding.nodes.findIndex((each) => Math.abs(each - turn) < 1e-6);
  const circuitUh = winding.fromStart[node * winding.nodes.length + node]! * 1e6;
  const scale = Math.sqrt(circuitUh / coil.coil.inductanceUh(turn)) / 1e3;
  return { kHz: first.mean * scale, halfKhz: first.uncertainty * scale };
}

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

/** Frequencies at which the crowding of the current is worked out; between them it is taken in between in their logarithm. */
const MOST_SOLVED = 5;

/** Low-frequency inductance over that of the field, of every tap, at any frequency between two. */
function crowdingBetween(coil: WorkingCoil, lowKhz: number, highKhz: number): (index: number, kHz: number) => number {
  const ratio = highKhz / lowKhz;
  const count = Math.min(MOST_SOLVED, 1 + Math.ceil(Math.log2(ratio) + 1e-9));
  const solved = Array.from({ length: count }, (_, i) =>
    sectionsAt(coil, lowKhz * ratio ** (count > 1 ? i / (count - 1) : 0)).map(
      ({ inductanceUh }, tap) => coil.coil.inductanceUh(coil.taps[tap]!) / inductanceUh,
    ),
  );
  return (index, kHz) => {
    if (count === 1) return solved[0]![index]!;
    const place = Math.min(Math.max((Math.log(kHz / lowKhz) / Math.log(ratio)) * (count - 1), 0), count - 1);
    const i = Math.min(Math.floor(place), count - 2);
    return solved[i]![index]! + (place - i) * (solved[i + 1]![index]! - solved[i]![index]!);
  };
}

function resonancesOf(coil: WorkingCoil, taps: readonly Tap[], shop: Bench): Measuring['resonances'] {
  const plain = taps.flatMap((tap, index) =>
    shop.capacitorsPf.map((pf) => ({ tap, index, pf, ...resonanceAt(coil, coil.taps[index]!, pf) })),
  );
  if (plain.length === 0) return [];
  const all = plain.map(({ kHz }) => kHz);
  const crowding = crowdingBetween(coil, Math.min(...all), Math.max(...all));
  return plain.map(({ tap, index, pf, kHz: plainKhz, halfKhz }) => {
    const kHz = plainKhz * Math.sqrt(crowding(index, plainKhz));
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
  const before = coil.shape.gaps.filter(({ turn }) => turn < turns - 1e-9);
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
