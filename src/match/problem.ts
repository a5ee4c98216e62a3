/**
 * An old coil as equations: each reading a row that compares what was measured with what the unknowns would show, in standard
 * deviations. What is known without having been measured (how close turns lie, how thick a covering is, how well a meter is
 * made) is a row too, marked as taken for granted.
 */

import { DENSITY } from '../physics/copper.ts';
import type { Wire } from '../stock/wire.ts';
import { coveringOf, thicknessOf } from './covering.ts';
import { resonantKhz, shownUh } from './readings.ts';
import { type AtWork, type AtWorkNear, placesIn, type SectionEnd, type Shape, type State, UNKNOWN } from './state.ts';
import type { OldCoil, OldTap, Reading } from './types.ts';

/** Standard deviation of a normal error whose half width at 95 % this is. */
export const SIGMA = 1 / 1.959964;

export interface Row {
  /** Dotted key in the file. */
  readonly key: string;
  readonly unit: string;
  readonly value: number;
  readonly sigma: number;
  /** Needs the ring sum, and so the coil. */
  readonly electrical: boolean;
  /** Not measured. */
  readonly granted: boolean;
  /** Only there so that nothing is without bounds; hardly weighs. */
  readonly bound: boolean;
  /** Number, among the known taps, of the tap whose turns it tells of; null: of none alone. */
  readonly tap: number | null;
  readonly predict: (state: State) => number;
}

export interface KnownTap {
  /** Number among all taps, from 0. */
  readonly index: number;
  readonly tap: OldTap;
  /** Counted, and sure. */
  readonly exact: number | null;
  /** Of a turn: what its angle, or the count, adds to whole turns. */
  readonly fraction: number;
  /** Of the angle, turns. */
  readonly angleSigma: number;
}

export interface Problem {
  readonly old: OldCoil;
  readonly shape: Shape;
  readonly ends: readonly SectionEnd[];
  readonly wire: Wire;
  /** Taps of which something is known, the whole coil last. */
  readonly known: readonly KnownTap[];
  readonly rows: readonly Row[];
  /** Crowding and own capacitance at each known tap, by the row's key. */
  readonly atWork: Map<string, AtWorkNear>;
  /** What an electrical reading may be off besides its own uncertainty, one standard deviation, by the row's key. */
  readonly doubt: Map<string, number>;
  /** What was taken without a measurement, in words. */
  readonly assumed: Record<string, string>;
}

/** Density of what covers the copper, g/cm3: enamel about 1.3, a textile with its air about 0.7 (from memory). */
const COVERING_G_CM3 = { enamel: 1.3, textile: 0.7 };
/** Wire of a coil wound by hand, against its helix; drawing, stretch and purity of old copper (common practice). */
const LENGTH_SPREAD = 0.01;

export const isTextile = (covering: string): boolean => /cotton|silk/.test(covering);

/** How many turns the file's `taps[3]` is, for keys. The whole coil has its own key. */
export const tapKey = (old: OldCoil, index: number): string =>
  index === old.taps.length - 1 ? 'whole' : `taps[${index + 1}]`;

const isLost = (tap: OldTap): boolean =>
  [tap.turns, tap.positionMm, tap.inductance, tap.resonance, tap.resistanceOhm].every((one) => one === null);

/** Numbers of the taps that the fit finds; one at which a section ends is among them, whatever was read of it. */
const foundTaps = (old: OldCoil): number[] =>
  old.taps.flatMap((tap, index) =>
    index === old.taps.length - 1 || !isLost(tap) || old.sections.some(({ endsAtTap }) => endsAtTap === index + 1)
      ? [index]
      : [],
  );

/** Share of a turn at this angle, the way the winding climbs. */
export function fractionAt(angleDeg: number, hand: 'right' | 'left'): number {
  const turned = (hand === 'right' ? angleDeg : 360 - angleDeg) / 360;
  const fraction = turned - Math.floor(turned);
  return fraction > 1 - 1e-9 ? 0 : fraction;
}

/** A count of whole turns at an angle nearly a turn on has most likely counted that turn. */
const NEARLY = 0.97;

export function knownTap(old: OldCoil, index: number): KnownTap {
  const tap = old.taps[index]!;
  const counted = tap.turns;
  const angled = tap.angleDeg === null ? null : fractionAt(tap.angleDeg.value, old.hand);
  const written = counted === null ? 0 : counted.value - Math.floor(counted.value);
  const fraction = written > 1e-9 ? written : (angled ?? 0);
  const whole = counted === null ? 0 : Math.floor(counted.value + 1e-9);
  const sure = counted !== null && counted.uncertainty === 0;
  const less = written <= 1e-9 && fraction > NEARLY ? 1 : 0;
  const byAngle = written <= 1e-9 && tap.angleDeg !== null;
  return {
    index,
    tap,
    exact: sure ? whole - less + fraction : null,
    fraction,
    angleSigma: byAngle ? (tap.angleDeg!.uncertainty * SIGMA) / 360 : 0,
  };
}

/** What the wire is known as before anything is worked out. */
export function wireBefore(old: OldCoil): { wire: Wire; assumed: Record<string, string> } {
  return coveringOf(old.wire, typeof old.pitchMm === 'string' ? null : (old.pitchMm?.value ?? null));
}

export function problemOf(old: OldCoil): Problem {
  const known = foundTaps(old);
  const taps = known.map((index) => knownTap(old, index));
  const { wire, assumed } = wireBefore(old);
  const capacitors = [
    ...new Set(old.taps.flatMap(({ resonance }) => (resonance === null ? [] : [resonance.capacitorPf.value]))),
  ];
  const lostBefore = known.map((index, t) => index - (t === 0 ? -1 : known[t - 1]!) - 1);
  const shape: Shape = { sections: Math.max(1, old.sections.length), capacitors, lostBefore };
  const ends: SectionEnd[] =
    old.sections.length === 0
      ? [{ tap: taps.length - 1 }]
      : old.sections.map(({ endsAtTap, turns }) =>
          endsAtTap === null ? { turns: turns ?? 0 } : { tap: known.indexOf(endsAtTap - 1) },
        );
  const problem: Problem = {
    old,
    shape,
    ends,
    wire,
    known: taps,
    rows: [],
    atWork: new Map(),
    doubt: new Map(),
    assumed: { ...assumed },
  };
  return { ...problem, rows: rowsOf(problem) };
}

type Predict = Row['predict'];

function rowsOf(problem: Problem): Row[] {
  const { old, shape, known, wire, assumed } = problem;
  const at = placesIn(shape);
  const rows: Row[] = [];
  const add = (key: string, unit: string, reading: Reading, predict: Predict, more: Partial<Row> = {}) => {
    const stated = Math.max(reading.uncertainty * SIGMA, 1e-9 * Math.abs(reading.value) + 1e-12);
    rows.push({
      key,
      unit,
      value: reading.value,
      electrical: false,
      granted: false,
      bound: false,
      tap: null,
      ...more,
      // What is in doubt besides is known once the coil at work is.
      get sigma() {
        return Math.hypot(stated, problem.doubt.get(key) ?? 0);
      },
      predict,
    });
  };
  const granted = { granted: true };

  old.diameters.forEach(({ of, how, mm }, i) => {
    const wires = { former: -1, mean: 0, 'over wire': 1 }[of];
    const name = `${of.replace(' ', '-')}-${how === 'circumference' ? how : 'diameter'}`;
    const several = old.diameters.filter((one) => one.of === of && one.how === how).length > 1;
    const index = old.diameters.slice(0, i + 1).filter((one) => one.of === of && one.how === how).length;
    add(
      `${name}${several ? `[${index}]` : ''}`,
      'mm',
      mm,
      ({ measures }) => measures.meanMm + wires * measures.overallMm,
    );
  });
  if (old.wire.bareMm !== null) add('wire.bare', 'mm', old.wire.bareMm, ({ measures }) => measures.bareMm);
  if (old.wire.overallMm !== null) add('wire.overall', 'mm', old.wire.overallMm, ({ measures }) => measures.overallMm);
  const { named } = old.wire;
  if (named !== null && old.wire.bareMm === null) {
    const half = Math.max(named.bareHighMm - named.bareMm, named.bareMm - named.bareLowMm, 1e-4);
    add('wire', 'mm', { value: named.bareMm, uncertainty: half }, ({ measures }) => measures.bareMm, granted);
  }
  if (old.wire.overallMm === null || old.wire.bareMm === null) {
    const { mm, spread } = thicknessOf(wire, named !== null || old.wire.covering !== null);
    add(
      'wire.covering',
      'mm',
      { value: mm, uncertainty: spread },
      ({ measures }) => measures.overallMm - measures.bareMm,
      granted,
    );
  }
  const grams = (state: State) => {
    const { bareMm, overallMm } = state.measures;
    const copper = (wire.strands * Math.PI * ((bareMm * wire.strandMm) / wire.bareMm) ** 2) / 4;
    const around = Math.max(0, (Math.PI / 4) * overallMm ** 2 - copper);
    const density = isTextile(wire.covering) ? COVERING_G_CM3.textile : COVERING_G_CM3.enamel;
    return state.wireM(state.whole) * (1 + state.x[at.length]!) * (copper * (DENSITY / 1e3) + around * density);
  };
  const last = known.length - 1;
  if (old.wire.massG !== null) add('wire.weight', 'g', old.wire.massG, grams, { tap: last });
  if (old.wire.lengthM !== null)
    add('wire.length', 'm', old.wire.lengthM, (state) => state.wireM(state.whole) * (1 + state.x[at.length]!), {
      tap: last,
    });

  const pitchRow = (s: number, key: string, pitch: Reading) =>
    add(key, 'mm', pitch, ({ measures }) => measures.pitchMm[s]!);
  if (old.pitchMm === 'close') {
    const loose = isTextile(wire.covering) ? { value: 1, uncertainty: 0.03 } : { value: 1.02, uncertainty: 0.01 };
    for (let s = 0; s < shape.sections; s++)
      if ((old.sections[s]?.pitchMm ?? null) === null)
        add('pitch', 'wires', loose, ({ measures }) => measures.pitchMm[s]! / measures.overallMm, granted);
    assumed['old.pitch'] = `close: ${loose.value} ± ${loose.uncertainty} of the wire over its covering`;
  } else if (old.pitchMm !== null) pitchRow(0, 'pitch', old.pitchMm);
  if (old.windingLengthMm !== null)
    add('winding-length', 'mm', old.windingLengthMm, (state) => state.placeMm(state.whole) + state.measures.overallMm, {
      tap: last,
    });
  old.sections.forEach((section, s) => {
    const key = `sections[${s + 1}]`;
    if (section.pitchMm !== null) pitchRow(s, `${key}.pitch`, section.pitchMm);
    if (section.lengthMm !== null)
      add(`${key}.length`, 'mm', section.lengthMm, ({ measures, ends, pushed }) => {
        const from = s === 0 ? 0 : ends[s - 1]!;
        const within = pushed.filter((turn) => turn > from && turn < ends[s]!).length;
        return (ends[s]! - from - 1) * measures.pitchMm[s]! + measures.overallMm + within * measures.tapGapMm;
      });
    if (section.gapAfterMm !== null)
      add(`${key}.gap-after`, 'mm', section.gapAfterMm, ({ measures }) => measures.sectionGapMm[s]!);
  });
  add('tap-gap', 'mm', old.tapGapMm, ({ measures }) => measures.tapGapMm, granted);

  add(
    'meter.accuracy',
    '',
    { value: 0, uncertainty: Math.max(old.meterSystematic, 1e-6) },
    ({ x }) => x[at.meter]!,
    granted,
  );
  add(
    'self-capacitance',
    '',
    { value: 0, uncertainty: Math.max(old.selfCapacitance, 1e-6) },
    ({ x }) => x[at.self]!,
    granted,
  );
  add('wire-length', '', { value: 0, uncertainty: LENGTH_SPREAD }, ({ x }) => x[at.length]!, granted);
  shape.capacitors.forEach((_, c) => {
    add('capacitor', '', { value: 0, uncertainty: 1 }, ({ x }) => x[at.capacitor + c]!, granted);
  });

  known.forEach(({ tap, index, exact }, i) => {
    const key = tapKey(old, index);
    const of = { tap: i };
    if (tap.turns !== null && exact === null) add(`${key}.turns`, 'turns', tap.turns, ({ turns }) => turns[i]!, of);
    if (tap.positionMm !== null)
      add(`${key}.position`, 'mm', tap.positionMm, (state) => state.placeMm(state.turns[i]!), of);
    const copper = 1 + 0.00393 * (old.celsius - 20);
    if (tap.resistanceOhm !== null)
      add(
        `${key}.resistance`,
        'ohm',
        tap.resistanceOhm,
        (state) => state.resistanceOhm(state.turns[i]!) * copper * (1 + state.x[at.length]!),
        of,
      );
    const scaled = (key: string, { x, turns }: State): AtWork => {
      const work = problem.atWork.get(key);
      if (work === undefined) return { crowded: 1, ownPf: 0 };
      const nearer = work.power === 0 ? 1 : (work.turn / turns[i]!) ** work.power;
      return { crowded: work.crowded, ownPf: work.ownPf * nearer * (1 + x[at.self]!) };
    };
    const { inductance, resonance } = tap;
    if (inductance !== null) {
      const name = `${key}.inductance`;
      const shown: Predict = (state) =>
        shownUh(state.inductanceUh(state.turns[i]!), inductance.kHz, scaled(name, state)) * (1 + state.x[at.meter]!);
      add(name, 'uH', inductance.uh, shown, { ...of, electrical: true });
    }
    if (resonance !== null) {
      const name = `${key}.resonance`;
      const { value, uncertainty } = resonance.capacitorPf;
      const c = at.capacitor + shape.capacitors.indexOf(value);
      const shown: Predict = (state) =>
        resonantKhz(state.inductanceUh(state.turns[i]!), value + uncertainty * state.x[c]!, scaled(name, state));
      add(name, 'kHz', resonance.kHz, shown, { ...of, electrical: true });
    }
  });
  return rows;
}

/** Rows that only keep a step within reason: each unknown within about so much of where it starts. */
export function boundsOf(problem: Problem, x: Float64Array, turns: readonly number[]): Row[] {
  const { shape, known } = problem;
  const row = (value: number, sigma: number, predict: Predict, tap: number | null = null): Row => ({
    key: 'bound',
    unit: '',
    value,
    sigma,
    electrical: false,
    granted: true,
    bound: true,
    tap,
    predict,
  });
  const wide = (k: number) => row(x[k]!, BOUND * Math.abs(x[k]!) + 0.01, (state) => state.x[k]!);
  const { gap } = placesIn(shape);
  const ofX = [UNKNOWN.mean, UNKNOWN.bare, UNKNOWN.overall, ...range(UNKNOWN.pitch, gap + shape.sections - 1)].map(
    wide,
  );
  const ofTurns = known.flatMap(({ exact }, i) =>
    exact === null ? [row(turns[i]!, BOUND * turns[i]! + 2, (state) => state.turns[i]!, i)] : [],
  );
  return [...ofX, ...ofTurns];
}

/** Standard deviation of a bound over the value. */
export const BOUND = 0.4;

const range = (from: number, to: number) => Array.from({ length: Math.max(0, to - from) }, (_, k) => from + k);
