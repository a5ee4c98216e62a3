/** Claims of a record on what instruments show, on what is checked, and on what to do about it. */
import type { CoilRecord, Tap } from '../../src/record/schema.ts';
import type { PlainCircuit } from './circuit.ts';
import { type Claims, digit } from './claims.ts';
import { PlainCoil } from './coil.ts';
import { ofUh } from './winding.ts';
import { crowdingOf } from './working.ts';

const SELF_SPREAD = 0.05;
/** 1/f² in 1/MHz² is so much times uH times pF. */
const SQUARE = 4e-6 * Math.PI ** 2;

/** Medhurst's formula, pF. */
function selfPf(record: CoilRecord, coil: PlainCoil, turn: number): number {
  const w = record.windings[0]!;
  const equal = 2e3 * coil.turn.radius;
  const ratio = Math.min(Math.max((coil.at(turn) - coil.at(0) + w.wire.overallMm) / equal, 0.1), 50);
  return (0.1126 * ratio + 0.08 + 0.27 / Math.sqrt(ratio)) * (equal / 10);
}

/** On the bench: start earthed, the rest open, no leads. */
function onBench(record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit, turn: number, pf: number) {
  const found = circuit.resonance({
    from: 0,
    to: turn,
    earthed: 'from',
    rest: 'open',
    taps: [],
    selfF: record.windings[0]!.selfCapacitancePf * 1e-12,
    tuningF: pf * 1e-12,
    strays: [],
  });
  const scale = Math.sqrt(circuit.uh(turn) / coil.uh(turn));
  return { hz: found.hz * scale, halfHz: found.halfHz * scale };
}

const tapHalf = (tap: Tap) => (tap.inductanceHighUh - tap.inductanceLowUh) / (2 * tap.inductanceUh);

export function measuringClaims(claims: Claims, record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit): void {
  const { measuring, shop } = record;
  const w = record.windings[0]!;
  meterClaims(claims, record, coil, circuit);
  const gaps = [...(w.unitTaps ?? []), ...w.taps].filter(({ gapMm }) => gapMm > 0);
  const { spread } = record;
  const lengthHalf = (turn: number) => {
    const pushed = gaps.filter((gap) => gap.turn < turn - 1e-6).map(({ gapMm }) => spread.gap * gapMm);
    return Math.hypot(spread.pitch * w.pitchMm * turn, ...pushed, 0.05 * w.wire.overallMm);
  };
  measuring.lengths.forEach(({ tap, lowMm, highMm }, i) => {
    const at = w.taps[i]!;
    claims.near('measuring.lengths[].tap', tap, at.tap, 0);
    claims.near('measuring.lengths[].lowMm', lowMm, at.woundLengthMm - lengthHalf(at.turn), 4e-4);
    claims.near('measuring.lengths[].highMm', highMm, at.woundLengthMm + lengthHalf(at.turn), 4e-4);
  });
  const p = 'measuring.resonances[].';
  claims.holds(
    `${p}tap`,
    measuring.resonances.length === w.taps.length * shop.capacitorsPf.length,
    'every tap with every capacitor',
  );
  measuring.resonances.forEach((one, i) => {
    const tap = w.taps[Math.floor(i / shop.capacitorsPf.length)]!;
    const pf = shop.capacitorsPf[i % shop.capacitorsPf.length]!;
    const about = ` of tap ${tap.tap} with ${pf} pF`;
    claims.near(`${p}tap`, one.tap, tap.tap, 0);
    claims.near(`${p}capacitancePf`, one.capacitancePf, pf, 0);
    const found = onBench(record, coil, circuit, tap.turn, pf);
    const { root, off } = crowdingOf(record, tap);
    const kHz = (found.hz * root) / 1e3;
    // Far above where the crowding of the current was taken there is more of it, most with few turns, whose wire has more of the field in it.
    const farOff = kHz > 1.5 * tap.working.frequencyKhz ? 0.008 + 0.08 / tap.turn : 0;
    const within = (6e-4 + 2 * off + farOff + ofUh(w.corners)) * kHz;
    claims.near(`${p}frequencyKhz`, one.frequencyKhz, kHz, within, about);
    const own = selfPf(record, coil, tap.turn);
    const capacitance =
      Math.hypot(shop.capacitorTolerance * pf, SELF_SPREAD * own, measuring.clipPf) / (2 * (pf + own));
    const half = one.frequencyKhz * Math.hypot(capacitance, tapHalf(tap) / 2, found.halfHz / found.hz);
    const halfOff = 0.03 * half + 2 * digit(kHz, 6);
    claims.near(`${p}lowKhz`, one.lowKhz, one.frequencyKhz - half, halfOff, about);
    claims.near(`${p}highKhz`, one.highKhz, one.frequencyKhz + half, halfOff, about);
    claims.holds(`${p}lowKhz`, one.lowKhz < one.frequencyKhz && one.frequencyKhz < one.highKhz, 'low, nominal, high');
  });
  lineClaims(claims, record);
  instrumentClaims(claims, record, coil, circuit);
  checkClaims(claims, record, lengthHalf);
}

function meterClaims(claims: Claims, record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit): void {
  const { measuring, shop } = record;
  const w = record.windings[0]!;
  const p = 'measuring.meter[].';
  const { meterKhz: kHz, meterAccuracy: accuracy } = shop;
  const omega = 2e3 * Math.PI * kHz;
  claims.holds('measuring.leadUh', measuring.leadUh === 0.02, `${measuring.leadUh}`);
  claims.holds('measuring.clipPf', measuring.clipPf === 1, `${measuring.clipPf}`);
  measuring.meter.forEach((one, i) => {
    const tap = w.taps[i]!;
    const about = ` of tap ${tap.tap}`;
    claims.near(`${p}tap`, one.tap, tap.tap, 0);
    claims.holds(
      `${p}inductanceUh`,
      one.inductanceUh <= tap.inductanceUh * (1 + 1e-5) && one.inductanceUh > 0.7 * tap.inductanceUh,
      `${one.inductanceUh}, low frequency ${tap.inductanceUh}${about}`,
    );
    // Of the turns alone: what taps have in loops is not in it.
    const { strandMm, strands } = w.wire;
    const ohm = (0.017241 * coil.wireM(tap.turn)) / ((Math.PI / 4) * strandMm ** 2 * strands);
    const most = (omega * 1e-6 * one.inductanceUh) / (ohm * (1 + 0.00393 * (record.surroundings.celsius - 20)));
    claims.holds(`${p}q`, one.q > 0 && one.q <= most * 1.03, `${one.q}, at most ${most}${about}`);
    if (one.readingUh === null) {
      claims.both(`${p}lowUh`, one.lowUh, null, 0);
      claims.both(`${p}highUh`, one.highUh, null, 0);
      // Above the resonance of the coil with itself.
      const alone = onBench(record, coil, circuit, tap.turn, 1e-3);
      claims.holds(
        `${p}readingUh`,
        alone.hz / 1e3 < 1.1 * kHz,
        `none, resonance alone at ${alone.hz / 1e3} kHz${about}`,
      );
      return;
    }
    // The capacitor that would resonate with the turns at the frequency of the meter, less what the coil adds.
    let pf = 1e18 / (omega ** 2 * one.inductanceUh);
    const root = Math.sqrt(tap.inductanceUh / one.inductanceUh);
    const own = selfPf(record, coil, tap.turn);
    let half = 0;
    pf -= own;
    for (let step = 0; step < 4 && pf > 0; step++) {
      const found = onBench(record, coil, circuit, tap.turn, pf);
      half = ((2 * found.halfHz) / found.hz) * ((pf + own) / pf);
      pf = (pf + own) * ((found.hz * root) / (1e3 * kHz)) ** 2 - own;
    }
    const shown = 1e18 / (omega ** 2 * pf);
    const rise = 1 - one.inductanceUh / one.readingUh;
    // What the circuits differ by comes out the larger the nearer the resonance.
    claims.near(
      `${p}readingUh`,
      one.readingUh,
      shown,
      (2e-4 + 2 * ofUh(w.corners) + 0.03 * Math.abs(rise) + (0.05 * rise ** 2) / (1 - rise)) * one.readingUh,
      about,
    );
    const unknown = Math.hypot(rise * Math.hypot(SELF_SPREAD, measuring.clipPf / own), half);
    const all = Math.hypot(
      tapHalf(tap),
      accuracy * Math.hypot(1, 1 / one.q),
      measuring.leadUh / one.readingUh,
      unknown,
    );
    // Medhurst's formula and points differ by up to 6 %.
    const off = (0.01 * all + 0.1 * unknown) * one.readingUh + 2 * digit(one.readingUh, 6);
    claims.near(`${p}lowUh`, one.lowUh!, Math.max(0, one.readingUh * (1 - all)), off, about);
    claims.near(`${p}highUh`, one.highUh!, one.readingUh * (1 + all), off, about);
    claims.holds(`${p}lowUh`, one.lowUh! < one.readingUh && one.readingUh < one.highUh!, 'low, nominal, high');
  });
  const trusted = measuring.meter.filter(({ doubt }) => doubt === null).map(({ tap }) => tap);
  claims.both('measuring.fromTap', measuring.fromTap, trusted[0] ?? null, 0);
  claims.both('measuring.toTap', measuring.toTap, trusted.at(-1) ?? null, 0);
}

function lineClaims(claims: Claims, record: CoilRecord): void {
  const { measuring, shop } = record;
  const w = record.windings[0]!;
  const { line } = measuring;
  const p = 'measuring.line.';
  const whole = measuring.resonances.filter(({ tap }) => tap === w.taps.length);
  const [a, b] = [whole[0], whole.at(-1)];
  claims.near(`${p}slopePerPf`, line.slopePerPf, SQUARE * line.inductanceUh, 1.1e-5 * line.slopePerPf);
  if (a === undefined || b === undefined || a === b) {
    claims.near(`${p}inductanceUh`, line.inductanceUh, w.inductanceUh, 1e-5 * w.inductanceUh);
    claims.near(`${p}selfPf`, line.selfPf, w.selfCapacitancePf, 1e-3 * w.selfCapacitancePf);
    claims.both(`${p}inductancePercent`, line.inductancePercent, null, 0);
    claims.both(`${p}selfHalfPf`, line.selfHalfPf, null, 0);
    return;
  }
  const [x1, x2] = [a.capacitancePf, b.capacitancePf];
  const [y1, y2] = [(1e3 / a.frequencyKhz) ** 2, (1e3 / b.frequencyKhz) ** 2];
  const slope = (y2 - y1) / (x2 - x1);
  claims.near(`${p}slopePerPf`, line.slopePerPf, slope, 1.1e-5 * slope);
  claims.near(`${p}selfPf`, line.selfPf, y1 / slope - x1, 0.0051);
  const tolerance = shop.capacitorTolerance;
  claims.both(
    `${p}inductancePercent`,
    line.inductancePercent,
    (100 * tolerance * Math.hypot(x1, x2)) / (x2 - x1),
    0.0051,
  );
  // Where the line crosses 0, by either capacitor moved by its tolerance.
  const crossing = (c1: number, c2: number) => (y1 * (c2 - c1)) / (y2 - y1) - c1;
  const e = 1e-4;
  const by1 = (crossing(x1 * (1 + e), x2) - crossing(x1, x2)) / e;
  const by2 = (crossing(x1, x2 * (1 + e)) - crossing(x1, x2)) / e;
  const half = tolerance * Math.hypot(by1, by2);
  claims.both(`${p}selfHalfPf`, line.selfHalfPf, half, 0.0051 + 1e-4 * half);
  claims.holds(
    `${p}inductanceUh`,
    Math.abs(line.inductanceUh / w.inductanceUh - 1) < 0.12,
    `${line.inductanceUh}, coil ${w.inductanceUh}`,
  );
}

function instrumentClaims(claims: Claims, record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit): void {
  const { instruments } = record.measuring;
  if (instruments === undefined) return;
  const w = record.windings[0]!;
  const { shop } = record;
  const stated = shop.instruments;
  const [probePf, couplingPf] = stated === undefined ? [10, 1] : [stated.probePf, stated.couplingPf ?? 0];
  const p = 'measuring.instruments.';
  const q = `${p}rows[].`;
  for (const [key, value] of [
    ['tolerancePercent', 20],
    ['copperPercent', 10],
    ['formerPercent', 50],
    ['readingPercent', 5],
    ['capacitorLoss', 1e-3],
    ['probeLoss', 1e-2],
  ] as const)
    claims.near(`${p}${key}`, instruments[key], value, 0);
  const most = shop.capacitorsPf.at(-1) ?? 0;
  const wanted = w.taps.flatMap(({ tap }) =>
    (tap === w.taps.length ? [...new Set([0, ...shop.capacitorsPf])] : [most]).map((pf) => ({ tap, pf })),
  );
  claims.holds(
    `${q}tap`,
    wanted.length === instruments.rows.length,
    `${instruments.rows.length} rows of ${wanted.length}`,
  );
  instruments.rows.forEach((row, i) => {
    const tap = w.taps[row.tap - 1]!;
    const about = ` of tap ${row.tap} with ${row.capacitancePf} pF`;
    claims.near(`${q}tap`, row.tap, wanted[i]!.tap, 0);
    claims.near(`${q}capacitancePf`, row.capacitancePf, wanted[i]!.pf, 0);
    const same = record.measuring.resonances.find(
      (one) => one.tap === row.tap && one.capacitancePf === row.capacitancePf,
    );
    const found = onBench(record, coil, circuit, tap.turn, Math.max(row.capacitancePf, 1e-6));
    const { root, off } = crowdingOf(record, tap);
    // The field is solved at other frequencies than for the plain resonances, and taken in between.
    if (same) claims.near(`${q}aloneKhz`, row.aloneKhz, same.frequencyKhz, (2e-4 + 0.3 * off) * row.aloneKhz, about);
    claims.near(
      `${q}aloneKhz`,
      row.aloneKhz,
      (found.hz * root) / 1e3,
      (1e-3 +
        2 * off +
        (row.aloneKhz > 1.5 * tap.working.frequencyKhz ? 0.008 + 0.08 / tap.turn : 0) +
        ofUh(w.corners)) *
        row.aloneKhz,
      about,
    );
    if (row.aloneQ !== null && row.aloneWidthKhz !== null) {
      claims.near(`${q}aloneQ`, row.aloneQ, row.aloneKhz / row.aloneWidthKhz, 0.0065 * row.aloneQ, about);
      claims.holds(`${q}aloneWidthKhz`, row.aloneWidthKhz > 0, `${row.aloneWidthKhz}`);
    }
    if (row.frequencyKhz === null || row.q === null || row.widthKhz === null) {
      for (const key of ['frequencyKhz', 'lowKhz', 'highKhz', 'widthKhz', 'widthLowKhz', 'widthHighKhz', 'q'] as const)
        claims.both(`${q}${key}`, row[key], null, 0, about);
      return;
    }
    claims.near(`${q}q`, row.q, row.frequencyKhz / row.widthKhz, 0.0055 * row.q, about);
    // Of a coil all but alone more capacitance takes the loss of the former away: then Q may rise.
    const much = row.capacitancePf > 10 * (probePf + couplingPf);
    claims.holds(
      `${q}widthKhz`,
      !much || row.aloneWidthKhz === null || row.q <= row.aloneQ! * 1.06,
      `Q ${row.q} with instruments, ${row.aloneQ} without${about}`,
    );
    claims.holds(`${q}lowKhz`, row.lowKhz! < row.frequencyKhz, about);
    claims.holds(`${q}highKhz`, row.frequencyKhz < row.highKhz!, about);
    claims.near(
      `${q}highKhz`,
      row.highKhz! - row.frequencyKhz,
      row.frequencyKhz - row.lowKhz!,
      3 * digit(row.highKhz!, 6),
      about,
    );
    claims.holds(`${q}widthLowKhz`, row.widthLowKhz! < row.widthKhz, about);
    claims.holds(
      `${q}widthHighKhz`,
      row.widthKhz - row.widthLowKhz! <= row.widthHighKhz! - row.widthKhz + 1e-3 * row.widthKhz,
      about,
    );
    if (row.q < 12) return;
    const loaded = onBench(record, coil, circuit, tap.turn, row.capacitancePf + probePf + couplingPf);
    const kHz = row.aloneKhz * (loaded.hz / found.hz);
    // Damping moves a peak by 1/(4 Q²), and the network with losses has coarser nodes.
    claims.near(`${q}frequencyKhz`, row.frequencyKhz, kHz, (0.004 + 0.5 / row.q ** 2 + off) * kHz, about);
  });
}

function checkClaims(claims: Claims, record: CoilRecord, lengthHalf: (turn: number) => number): void {
  const w = record.windings[0]!;
  const p = 'checks[].';
  let resonances = 0;
  for (const check of record.checks) {
    const unit = 10 ** -check.digits;
    const within = 0.51 * unit;
    claims.holds(`${p}digits`, Number.isInteger(check.digits) && check.digits >= 0, `${check.digits}`);
    claims.holds(
      `${p}nominal`,
      check.low <= check.nominal && check.nominal <= check.high,
      `${check.low}, ${check.nominal}, ${check.high}`,
    );
    if (check.what === 'former, outside diameter') {
      const [plain, more] = [record.former.outsideDiameterMm, record.asMade?.diameterMm ?? 0];
      claims.near(`${p}nominal`, check.nominal, plain + more, within);
      claims.near(`${p}low`, check.low, Math.min(plain, plain + more) - record.spread.diameterMm, within);
      claims.near(`${p}high`, check.high, Math.max(plain, plain + more) + record.spread.diameterMm, within);
    } else if (check.what.startsWith('20 turns')) {
      const mm = w.turnPositionsMm[19]! - w.turnPositionsMm[0]! + w.wire.overallMm;
      claims.near(`${p}nominal`, check.nominal, mm, within + 2e-4);
      claims.near(`${p}low`, check.low, mm - lengthHalf(19), within + 4e-4);
      claims.near(`${p}high`, check.high, mm + lengthHalf(19), within + 4e-4);
    } else if (check.what.startsWith('resonance S to F')) {
      const one = record.measuring.resonances.filter(({ tap }) => tap === w.taps.length)[resonances++]!;
      claims.near(`${p}nominal`, check.nominal, one.frequencyKhz, within);
      claims.near(`${p}low`, check.low, one.lowKhz, within);
      claims.near(`${p}high`, check.high, one.highKhz, within);
    } else claims.holds(`${p}nominal`, false, `nobody recomputes the check of ${check.what}`);
  }
}

/** A coil of the record's shape, laid out anew with more turns or other measures. */
function laid(
  record: CoilRecord,
  turns: number,
  moved: (u: number) => number = () => 0,
  change: { pitchMm?: number; meanDiameterMm?: number } = {},
): PlainCoil {
  const w = record.windings[0]!;
  const gaps = [...(w.unitTaps ?? []), ...w.taps];
  const pitchMm = change.pitchMm ?? w.pitchMm;
  const full = Math.floor(turns + 1e-9);
  const count = full + (turns - full > 1e-9 ? 1 : 0);
  const turnPositionsMm = Array.from({ length: count }, (_, i) => {
    const u = i < full ? i + 0.5 : (full + turns) / 2;
    const pushed = gaps.reduce((sum, gap) => sum + gap.gapMm * Math.min(1, Math.max(0, u - gap.turn + 0.5)), 0);
    return w.startMm + pitchMm * u + pushed + moved(u);
  });
  return new PlainCoil({ ...w, ...change, turns, turnPositionsMm });
}

export function adviceClaims(claims: Claims, record: CoilRecord, coil: PlainCoil): void {
  const w = record.windings[0]!;
  const { measuring } = record;
  const more = laid(record, w.turns + 1);
  // Two decimals of a percent; between polygons the ratios of inductances are off by little of the excess.
  const within = (percent: number) => 0.0052 + (w.corners === undefined ? 2e-4 : 0.01) * Math.abs(percent) + 0.002;
  record.advice.forEach((one, i) => {
    const { turn } = w.taps[i]!;
    const uh = coil.uh(turn);
    const by = (other: number) => 100 * (other / uh - 1);
    const about = ` of tap ${one.tap}`;
    claims.near('advice[].tap', one.tap, i + 1, 0);
    const few = turn > 1 ? by(coil.uh(turn - 1)) : -100;
    const many = by((turn + 1 > w.turns ? more : coil).uh(turn + 1));
    claims.near('advice[].fewPercent', one.fewPercent, few, within(few), about);
    claims.near('advice[].manyPercent', one.manyPercent, many, within(many), about);
    const { readingUh, doubt } = measuring.meter[i]!;
    const reading = doubt === null ? readingUh : null;
    claims.both(
      'advice[].fewUh',
      one.fewUh,
      reading === null ? null : reading * (1 + few / 200),
      (reading ?? 0) * (1e-5 + within(few) / 200),
    );
    claims.both(
      'advice[].manyUh',
      one.manyUh,
      reading === null ? null : reading * (1 + many / 200),
      (reading ?? 0) * (1e-5 + within(many) / 200),
    );
    const from = w.taps[i - 1]?.turn ?? 0;
    const longer = by(coil.changed({}, (u) => Math.min(1, Math.max(0, (u - from) / (turn - from)))).uh(turn));
    claims.near('advice[].millimetrePercent', one.millimetrePercent, longer, within(longer), about);
    const back = Math.min(0.25, turn / 2);
    const on = Math.min(0.25, w.turns - turn);
    const degrees = (3.6 * uh * (on + back)) / (coil.uh(turn + on) - coil.uh(turn - back));
    claims.near(
      'advice[].degreesPerPercent',
      one.degreesPerPercent,
      degrees,
      0.051 + (w.corners === undefined ? 2e-3 : 0.01) * degrees,
      about,
    );
  });
  correctionClaims(claims, record, coil, within);
  const wider = coil.changed({ meanDiameterMm: w.meanDiameterMm + 0.1 });
  const tenth = 100 * (wider.uh(w.turns) / coil.uh(w.turns) - 1);
  claims.near('former.tenthMmPercent', record.former.tenthMmPercent, tenth, 0.0052 + 0.01 * tenth);
}

function correctionClaims(
  claims: Claims,
  record: CoilRecord,
  coil: PlainCoil,
  within: (percent: number) => number,
): void {
  const w = record.windings[0]!;
  const p = 'corrections[].';
  const ramp = (first: number, mm: number) => (u: number) =>
    [0, 1, 2, 3, 4].reduce((sum, k) => sum + mm * Math.min(1, Math.max(0, u - (first + k) + 0.5)), 0);
  const last = Math.floor(w.turns + 1e-9) - 5;
  const wire = w.wire.overallMm;
  for (const correction of record.corrections) {
    const { doing, tapsPercent } = correction;
    let other: PlainCoil | null = null;
    let end = w.turns;
    const trim = /^(\d) turns? (off|on)(?:.* into (\S+))?/.exec(doing);
    if (trim) {
      const by = Number(trim[1]) * (trim[2] === 'off' ? -1 : 1);
      end = trim[3] === undefined ? w.turns + by : record.holes.find(({ label }) => label === trim[3])!.turn!;
      other = by < 0 ? coil : laid(record, Math.ceil(w.turns) + 3);
    } else if (/^last 5 spread/.test(doing)) other = coil.changed({}, ramp(last, wire));
    else if (/^last 5 pressed/.test(doing)) other = coil.changed({}, ramp(last, -w.spacerMm / 2));
    else if (/^first 5 spread/.test(doing)) other = coil.changed({}, ramp(1, wire));
    else if (/pitch \+1 %/.test(doing))
      other = coil.changed({ pitchMm: w.pitchMm * 1.01 }, (u) => 0.01 * w.pitchMm * u);
    else if (/former \+/.test(doing)) other = coil.changed({ meanDiameterMm: w.meanDiameterMm + 0.1 });
    claims.holds(
      `${p}tapsPercent[]`,
      other !== null && tapsPercent.length === w.taps.length,
      `nobody recomputes: ${doing}`,
    );
    if (other === null) continue;
    w.taps.forEach(({ turn }, i) => {
      const at = i === w.taps.length - 1 ? end : turn;
      const percent = 100 * (other.uh(at) / coil.uh(turn) - 1);
      claims.near(`${p}tapsPercent[]`, tapsPercent[i]!, percent, within(percent), ` of tap ${i + 1}, ${doing}`);
    });
  }
  const whole = record.measuring.meter.at(-1)!;
  const trims = record.corrections.filter(({ kind }) => kind === 'trim');
  const effects = trims.map(({ tapsPercent }) => tapsPercent.at(-1)! / 100);
  for (const { kind, fromUh, toUh } of record.corrections)
    if (kind !== 'trim') {
      claims.both(`${p}fromUh`, fromUh, null, 0);
      claims.both(`${p}toUh`, toUh, null, 0);
    }
  if (whole.doubt !== null || whole.readingUh === null) return;
  // A reading between the borders comes nearest to nominal by this trim: tried at the middle against every other.
  trims.forEach(({ fromUh, toUh, doing }, i) => {
    if (fromUh === null && toUh === null) return;
    const [low, high] = [fromUh ?? toUh! * 0.98, toUh ?? fromUh! * 1.02];
    claims.holds(`${p}fromUh`, low < high, `${low} to ${high}: ${doing}`);
    const middle = Math.sqrt(low * high);
    const left = (effect: number) => Math.abs((middle / whole.readingUh!) * (1 + effect) - 1);
    const best = Math.min(...effects.map(left), left(0));
    claims.holds(
      `${p}toUh`,
      left(effects[i]!) <= best + 1.5e-4,
      `${doing} leaves ${left(effects[i]!)} at ${middle}, another ${best}`,
    );
  });
}
