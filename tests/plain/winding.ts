/** Claims of a record on its winding at low frequency: turns, taps, wire, resistance, limits, holes, steps. */
import type { CoilRecord } from '../../src/record/schema.ts';
import { type Claims, digit } from './claims.ts';
import { PlainCoil } from './coil.ts';

/** Resistivity of annealed copper at 20 °C, ohm mm²/m (100 % IACS), and its density, g/cm³. */
const COPPER = 0.017241;
const COPPER_G_CM3 = 8.89;
/** Copper of a stranded bundle against the bundle. */
const TAKE_UP = 1.015;
/** What a hand-wound length of wire is off by. */
const WIRE_SPREAD = 0.01;
/** Half of the last decimal of a place, and of what is made of two of them. */
const PLACE = 1.01e-4;

/**
 * Share of an inductance that two ways of reckoning may differ by: round turns by what places are rounded to, turns from rib to rib by the
 * stated accuracy of their mutual inductance (0.25 % of 6 ribs, falling with the square of their number).
 */
export const ofUh = (corners: number | undefined): number => (corners === undefined ? 3e-5 : 3e-5 + 0.1 / corners ** 2);

export function plainCoilOf(record: CoilRecord): PlainCoil {
  return new PlainCoil(record.windings[0]!);
}

/** In the frame, 0 up to 360. */
function angleOf(turn: number, hand: string): number {
  const part = turn - Math.floor(turn);
  return ((hand === 'right' ? 360 * part : -360 * part) + 720) % 360;
}

const apart = (a: number, b: number) => Math.abs(((((a - b) % 360) + 540) % 360) - 180);

export function windingClaims(claims: Claims, record: CoilRecord, coil: PlainCoil): void {
  const w = record.windings[0]!;
  const { taps, unitTaps = [], wire, corners } = w;
  const { loopM, gapMm, name: method } = record.tapMethod;
  const p = 'windings[].';
  const gaps = [...unitTaps, ...taps];
  const whole = taps.at(-1)!;
  claims.near(`${p}turns`, w.turns, whole.turn, 1e-6);
  claims.near(`${p}startMm`, w.startMm, coil.at(0), PLACE);
  claims.near(`${p}finishMm`, w.finishMm, coil.at(w.turns), PLACE);
  claims.near(`${p}windingLengthMm`, w.windingLengthMm, coil.at(w.turns) - coil.at(0) + wire.overallMm, 2 * PLACE);
  const full = Math.floor(w.turns + 1e-9);
  w.turnPositionsMm.forEach((z, i) => {
    const u = i < full ? i + 0.5 : (full + w.turns) / 2;
    const pushed = gaps.reduce((sum, gap) => sum + gap.gapMm * Math.min(1, Math.max(0, u - gap.turn + 0.5)), 0);
    claims.near(
      `${p}turnPositionsMm[]`,
      z,
      w.startMm + w.pitchMm * u + pushed,
      2 * PLACE + 5e-5 * u,
      ` of turn ${i + 1}`,
    );
  });
  claims.holds(`${p}turnPositionsMm[]`, w.turnPositionsMm.length === Math.ceil(w.turns - 1e-9), 'as many as turns');
  const laid = 1 + (record.asMade?.pitch ?? 0);
  if (w.pitchKind === 'spacer')
    claims.near(`${p}spacerMm`, w.spacerMm, w.pitchMm / laid - wire.overallMm, 0.02 * w.pitchMm);
  else claims.near(`${p}spacerMm`, w.spacerMm, 0, 0);
  claims.holds(
    `${p}pitchMm`,
    w.pitchMm >= wire.overallMm * Math.min(1, laid) - PLACE,
    `${w.pitchMm} under a wire of ${wire.overallMm}`,
  );
  const groove = record.former.groove?.depthMm ?? 0;
  const on = record.former.outsideDiameterMm + (record.asMade?.diameterMm ?? 0);
  claims.holds(
    `${p}meanDiameterMm`,
    w.meanDiameterMm <= on + wire.overallMm + 2 * PLACE && w.meanDiameterMm >= on - 2 * groove,
    `${w.meanDiameterMm} on ${on} with a wire of ${wire.overallMm}`,
  );
  if (record.former.surface === 'smooth' && corners === undefined)
    claims.near(`${p}meanDiameterMm`, w.meanDiameterMm, on + wire.overallMm, 2 * PLACE);
  if (corners !== undefined) claims.near(`${p}corners`, corners, record.former.ribs!.count, 0);
  if (w.bendMm !== undefined)
    claims.near(
      `${p}bendMm`,
      w.bendMm,
      record.former.ribs!.widthMm / 2 / Math.tan(Math.PI / (2 * corners!)),
      wire.overallMm + 0.01,
    );
  // Copper of all strands, twisted or straight.
  const section = (Math.PI / 4) * wire.strandMm ** 2 * wire.strands;
  const along = wire.strands > 1 ? TAKE_UP : 1;
  // A chord of a fine polygon is below its arc by 2e-5; where the wire bends over ribs, an angle is not a length (0.02 R).
  const lengthOff = (turn: number) =>
    5e-5 +
    2e-5 * coil.wireM(turn) +
    (corners === undefined ? 0 : (0.025 * w.meanDiameterMm) / 2e3 + 3e-4 * coil.wireM(turn));
  const loopsOf = (before: number) => loopM * before;
  const metres = loopsOf(taps.length - 1 + unitTaps.length) + coil.wireM(w.turns);
  claims.near(`${p}wireLengthM`, w.wireLengthM, metres, lengthOff(w.turns));
  claims.near(`${p}wireMassG`, w.wireMassG, w.wireLengthM * section * along * COPPER_G_CM3, 0.003 * w.wireMassG);
  claims.holds(`${p}leadsM`, w.leadsM > 0 && record.steps.some(({ kind }) => kind === 'finish'), 'ends are left');
  claims.near(`${p}inductanceUh`, w.inductanceUh, whole.inductanceUh, 0);
  claims.near(`${p}resistanceDcOhm`, w.resistanceDcOhm, whole.resistanceDcOhm, 0);
  const equal = 2e3 * coil.turn.radius;
  const ratio = Math.min(Math.max(w.windingLengthMm / equal, 0.1), 50);
  // Medhurst's own formula; his points, which the record goes by, lie within 8 % of it.
  const medhurst = (0.1126 * ratio + 0.08 + 0.27 / Math.sqrt(ratio)) * (equal / 10);
  claims.near(`${p}selfCapacitancePf`, w.selfCapacitancePf, medhurst, 0.09 * medhurst);
  claims.holds(`${p}tensionLowN`, 0 < w.tensionLowN && w.tensionLowN < w.tensionHighN, 'low under high');
  claims.holds(`${p}tensionHighN`, w.tensionHighN < 250 * section, `${w.tensionHighN} N on ${section} mm² of copper`);
  wireClaims(claims, record);

  const { spread } = record;
  const moves = limitCoils(record, coil);
  taps.forEach((tap, i) => {
    const q = `${p}taps[].`;
    const about = ` of tap ${tap.tap}`;
    const before = i + unitTaps.length;
    claims.near(`${q}tap`, tap.tap, i + 1, 0);
    claims.holds(
      `${q}turn`,
      tap.turn > (gaps[before - 1]?.turn ?? 0) && tap.turn <= w.turns,
      `${tap.turn} after ${gaps[before - 1]?.turn}`,
    );
    if (record.tapMethod.layout === 'in line' && i < taps.length - 1)
      claims.near(`${q}turn`, tap.turn, Math.round(tap.turn), 1e-6, `${about}, in line`);
    claims.near(`${q}positionMm`, tap.positionMm, coil.at(tap.turn), 2 * PLACE, about);
    claims.near(`${q}angleDeg`, apart(tap.angleDeg, angleOf(tap.turn, record.frame.hand)), 0, 4e-4, about);
    claims.near(`${q}gapMm`, tap.gapMm, i < taps.length - 1 ? gapMm : 0, 1e-4, about);
    const uh = coil.uh(tap.turn);
    claims.near(`${q}inductanceUh`, tap.inductanceUh, uh, ofUh(corners) * uh + digit(uh, 6), about);
    claims.near(`${q}deviationPercent`, tap.deviationPercent, 100 * (tap.inductanceUh / tap.targetUh - 1), 6e-4, about);
    claims.holds(`${q}targetUh`, tap.targetUh > (taps[i - 1]?.targetUh ?? 0), `${tap.targetUh} rises`);
    const half = Math.hypot(...moves.map((by) => by(tap.turn, uh)));
    // Squares of changes of the second order: a twentieth of a percent of the half width or a rounding.
    const off = 0.004 * half + 2 * digit(uh, 6) + (corners === undefined ? 0 : 0.02 * half) + ofUh(corners) * uh;
    claims.holds(`${q}inductanceLowUh`, tap.inductanceLowUh < tap.inductanceUh, `low ${tap.inductanceLowUh}`);
    claims.holds(`${q}inductanceHighUh`, tap.inductanceUh < tap.inductanceHighUh, `high ${tap.inductanceHighUh}`);
    claims.near(`${q}inductanceLowUh`, tap.inductanceLowUh, uh - half, off, about);
    claims.near(`${q}inductanceHighUh`, tap.inductanceHighUh, uh + half, off, about);
    claims.near(
      `${q}wireFromStartM`,
      tap.wireFromStartM,
      coil.wireM(tap.turn) + loopsOf(before),
      lengthOff(tap.turn),
      about,
    );
    // A tap is measured at the end of its own loop, half of which leads there; a loop soldered at its root is out of circuit.
    const loops = method === 'twisted loop' ? 0 : i < taps.length - 1 ? before + 0.5 : before;
    const ohm = (scale: number) => (COPPER * along * (coil.wireM(tap.turn) + loopM * loops)) / (section * scale ** 2);
    const ohmOff = digit(tap.resistanceDcOhm, 6) + ohm(1) * (2e-4 + lengthOff(tap.turn) / coil.wireM(tap.turn));
    claims.near(`${q}resistanceDcOhm`, tap.resistanceDcOhm, ohm(1), ohmOff, about);
    claims.near(
      `${q}resistanceLowOhm`,
      tap.resistanceLowOhm,
      (1 - WIRE_SPREAD) * ohm(wire.bareHighMm / wire.bareMm),
      1.2 * ohmOff,
      about,
    );
    claims.near(
      `${q}resistanceHighOhm`,
      tap.resistanceHighOhm,
      (1 + WIRE_SPREAD) * ohm(wire.bareLowMm / wire.bareMm),
      1.2 * ohmOff,
      about,
    );
    claims.near(
      `${q}woundLengthMm`,
      tap.woundLengthMm,
      coil.at(tap.turn) - coil.at(0) + wire.overallMm,
      3 * PLACE,
      about,
    );
  });
  unitTaps.forEach((tap, i) => {
    const q = `${p}unitTaps[].`;
    claims.near(`${q}unit`, tap.unit, i + 1, 0);
    // A turn apart, but never one above the other.
    claims.near(`${q}turn`, tap.turn, i + 1, 0.13);
    claims.near(`${q}positionMm`, tap.positionMm, coil.at(tap.turn), 2 * PLACE);
    claims.near(`${q}angleDeg`, apart(tap.angleDeg, angleOf(tap.turn, record.frame.hand)), 0, 4e-4);
    claims.near(`${q}gapMm`, tap.gapMm, gapMm, 1e-4);
    const uh = coil.uh(tap.turn);
    claims.near(`${q}inductanceUh`, tap.inductanceUh, uh, ofUh(corners) * uh + digit(uh, 6));
    claims.near(`${q}wireFromStartM`, tap.wireFromStartM, coil.wireM(tap.turn) + loopsOf(i), lengthOff(tap.turn));
  });
  claims.holds('spread.gap', spread.gap === (gapMm > 0 ? 0.5 : 0), `${spread.gap} with gaps of ${gapMm}`);
  holeClaims(claims, record, coil);
  stepClaims(claims, record);
}

function wireClaims(claims: Claims, { windings: [w] }: CoilRecord): void {
  const { wire } = w!;
  const p = 'windings[].wire.';
  for (const [low, at, high] of [
    ['bareLowMm', 'bareMm', 'bareHighMm'],
    ['overallLowMm', 'overallMm', 'overallHighMm'],
  ] as const) {
    claims.holds(`${p}${low}`, wire[low] <= wire[at], `${wire[low]} over ${wire[at]}`);
    claims.holds(`${p}${high}`, wire[at] <= wire[high], `${wire[at]} over ${wire[high]}`);
  }
  claims.holds(`${p}overallMm`, wire.overallMm >= wire.bareMm, `${wire.overallMm} over ${wire.bareMm}`);
  const awg = /^(\d+) AWG/.exec(wire.name);
  const metric = /^([\d.]+) mm/.exec(wire.name);
  const litz = /^(\d+) x ([\d.]+) mm/.exec(wire.name);
  if (awg) claims.near(`${p}bareMm`, wire.bareMm, 0.127 * 92 ** ((36 - Number(awg[1])) / 39), 0.004 * wire.bareMm);
  else if (litz) {
    claims.near(`${p}strands`, wire.strands, Number(litz[1]), 0);
    claims.near(`${p}strandMm`, wire.strandMm, Number(litz[2]), 0);
  } else if (metric) claims.near(`${p}bareMm`, wire.bareMm, Number(metric[1]), 0);
  if (!litz) {
    claims.near(`${p}strands`, wire.strands, 1, 0);
    claims.near(`${p}strandMm`, wire.strandMm, wire.bareMm, 0);
  }
}

/** What each input moved by its half width does to a tap. */
function limitCoils(record: CoilRecord, coil: PlainCoil): ((turn: number, nominal: number) => number)[] {
  const { spread } = record;
  const w = record.windings[0]!;
  const gaps = [...(w.unitTaps ?? []), ...w.taps];
  const by = (other: PlainCoil) => (turn: number, nominal: number) => other.uh(turn) - nominal;
  return [
    by(coil.changed({ meanDiameterMm: w.meanDiameterMm + spread.diameterMm })),
    by(coil.changed({ pitchMm: w.pitchMm * (1 + spread.pitch) }, (u) => spread.pitch * w.pitchMm * u)),
    by(coil.changed({ wire: { bareMm: w.wire.bareMm + spread.bareMm } })),
    by(
      coil.changed({}, (u) =>
        gaps.reduce((sum, { turn, gapMm }) => sum + spread.gap * gapMm * Math.min(1, Math.max(0, u - turn + 0.5)), 0),
      ),
    ),
    (turn, nominal) => {
      const back = Math.min(spread.turn, turn / 2);
      return ((nominal - coil.uh(turn - back)) / back) * spread.turn;
    },
    () => spread.leadUh,
  ];
}

/**
 * One tap's limits by drawing coils at random: the half width is 1.96 standard deviations of what comes out. `random` gives numbers from
 * 0 to 1. Of 240 coils the deviation is known to 4.6 %, three times which is allowed.
 */
export function drawnLimits(claims: Claims, record: CoilRecord, coil: PlainCoil, random: () => number): void {
  const { spread } = record;
  const w = record.windings[0]!;
  const tap = w.taps[Math.floor(random() * w.taps.length)]!;
  const gaps = [...(w.unitTaps ?? []), ...w.taps].filter(({ gapMm }) => gapMm > 0);
  const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
  const drawn = Array.from({ length: 240 }, () => {
    const [d, p, b, g, t, l] = Array.from({ length: 6 }, () => normal() / 1.96) as [
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    const other = coil.changed(
      {
        meanDiameterMm: w.meanDiameterMm + d * spread.diameterMm,
        pitchMm: w.pitchMm * (1 + p * spread.pitch),
        wire: { bareMm: w.wire.bareMm + b * spread.bareMm },
      },
      (u) =>
        p * spread.pitch * w.pitchMm * u +
        gaps.reduce((sum, gap) => sum + g * spread.gap * gap.gapMm * Math.min(1, Math.max(0, u - gap.turn + 0.5)), 0),
    );
    const back = Math.min(spread.turn, tap.turn / 2);
    const slope = (other.uh(tap.turn) - other.uh(tap.turn - back)) / back;
    return other.uh(tap.turn) + slope * t * spread.turn + l * spread.leadUh;
  });
  const mean = drawn.reduce((sum, uh) => sum + uh, 0) / drawn.length;
  const deviation = Math.sqrt(drawn.reduce((sum, uh) => sum + (uh - mean) ** 2, 0) / (drawn.length - 1));
  const half = (tap.inductanceHighUh - tap.inductanceLowUh) / 2;
  claims.near('windings[].taps[].inductanceHighUh', half, 1.96 * deviation, 0.14 * half, ` of tap ${tap.tap}, drawn`);
}

function holeClaims(claims: Claims, record: CoilRecord, coil: PlainCoil): void {
  const { holes, frame, former } = record;
  const w = record.windings[0]!;
  const inAxis = [...holes];
  for (const hole of inAxis) {
    const about = ` of hole ${hole.label}`;
    claims.holds(
      'holes[].axialMm',
      hole.axialMm > 0 && hole.axialMm < former.lengthMm,
      `${hole.axialMm}${about} on ${former.lengthMm}`,
    );
    // Those of a second winding on the same former are called P.
    const through = hole.label.startsWith('P') ? record.around!.second!.wire.overallMm : w.wire.overallMm;
    claims.holds('holes[].diameterMm', hole.diameterMm > through, `${hole.diameterMm}${about}, wire ${through}`);
    claims.holds('holes[].angleDeg', hole.angleDeg >= 0 && hole.angleDeg < 360, `${hole.angleDeg}${about}`);
    if (hole.turn === null) continue;
    claims.holds('holes[].turn', hole.turn >= 0 && hole.turn <= w.turns + 4, `${hole.turn}${about}`);
    if (hole.purpose === 'anchor') continue;
    claims.near(
      'holes[].angleDeg',
      apart(hole.angleDeg, angleOf(hole.turn, frame.hand)),
      0,
      hole.purpose === 'tap' ? 30 : 4e-4,
      about,
    );
    claims.near(
      'holes[].axialMm',
      hole.axialMm,
      coil.at(hole.turn),
      hole.purpose === 'tap' ? 2 * w.pitchMm : 3 * PLACE,
      about,
    );
    if (hole.label === 'S') claims.near('holes[].turn', hole.turn, 0, 0);
    if (hole.label === 'F') claims.near('holes[].turn', hole.turn, w.turns, 1e-6);
  }
  for (const { label } of [{ label: 'S' }, { label: 'F' }])
    claims.holds(
      'holes[].turn',
      holes.some((hole) => hole.label === label),
      `no hole ${label}`,
    );
  for (const hole of holes) {
    if (hole.tap === null) continue;
    const tap = hole.purpose === 'tap' ? w.taps[hole.tap - 1] : w.taps.at(-1);
    claims.holds('holes[].tap', tap !== undefined, `${hole.tap} of ${w.taps.length}`);
    if (hole.purpose === 'tap' && tap) claims.near('holes[].tap', hole.turn!, tap.turn, 0.26, ` of tap ${hole.tap}`);
  }
  for (const number of former.numbers) {
    if (number.tap === null) continue;
    const tap = w.taps[number.tap - 1]!;
    claims.near('former.numbers[].tap', Number(number.text), number.tap, 0);
    claims.near('former.numbers[].angleDeg', apart(number.angleDeg, tap.angleDeg), 0, 4e-4);
  }
}

function stepClaims(claims: Claims, record: CoilRecord): void {
  const w = record.windings[0]!;
  let turn = 0;
  record.steps.forEach((step, i) => {
    claims.near('steps[].step', step.step, i + 1, 0);
    const second = record.around?.second && i >= record.steps.length - 4 && step.turn !== null && step.turn < turn;
    if (second || step.turn === null || step.wireM === null) return;
    const told = /Wind ([\d.]+) turns/.exec(step.text);
    const at = step.unit !== undefined ? w.unitTaps?.[step.unit - 1] : step.tap !== null ? w.taps[step.tap - 1] : null;
    if (step.unit !== undefined) claims.holds('steps[].unit', at !== undefined, `${step.unit}`);
    if (step.tap !== null) claims.holds('steps[].tap', at !== undefined, `${step.tap}`);
    if (!at) return;
    claims.near('steps[].turn', step.turn, at.turn, 0);
    claims.near('steps[].wireM', step.wireM, at.wireFromStartM, 0.00501);
    // Two decimals of each.
    if (told) claims.near('steps[].turn', Number(told[1]), at.turn - turn, 0.0051, ' in words');
    turn = at.turn;
  });
}
