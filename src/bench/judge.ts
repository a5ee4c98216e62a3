/** Judges a reading against the limits of the record, and says what to do, worked out for this coil. */
import { VERDICT } from '../../templates/wording/bench-verdict.ts';
import { CHECKS } from '../../templates/wording/winding-sheet.ts';
import { TEMPERATURE_COEFFICIENT } from '../physics/copper.ts';
import { short, signed } from '../quantity/decimals.ts';
import type { Judgement, Quantity, Question, Verdict } from './api.ts';
import { type JudgedRecord, questionsOf } from './questions.ts';

export { questionsOf } from './questions.ts';

export interface Conditions {
  /** Of the copper, for a resistance; null or absent: 20 C is taken. */
  readonly celsius?: number | null;
}

/** Copper resists 1 at 20 C; the law is straight about there. */
const CELSIUS = 20;

/** A reading off by this factor, and outside its limits, is not one of this coil. */
const FAR: Readonly<Record<Quantity, number>> = {
  diameter: 1.1,
  length: 1.2,
  resistance: 1.6,
  inductance: 1.6,
  resonance: 1.3,
  'probed resonance': 1.3,
  // A shorted turn takes most of Q, and is no slip of the pen.
  width: 10,
  other: 2,
};
/** What units are mistaken by. */
const SLIPS: Readonly<Record<Quantity, readonly number[]>> = {
  diameter: [10, 25.4],
  length: [10, 25.4],
  resistance: [1e3],
  inductance: [1e3, 1e6],
  resonance: [1e3, 1e6],
  'probed resonance': [1e3, 1e6],
  width: [1e3, 1e6],
  other: [],
};
/** How near a slip of the unit comes to what was meant. */
const SLIP_WITHIN = 1.3;

const percent = (value: number) => signed(value, Math.abs(value) < 10 ? 1 : 0);
const within = ({ low, high }: Pick<Judgement, 'low' | 'high'>, value: number) =>
  low !== null && high !== null && value >= low && value <= high;

/** Limits at the temperature of the coil. */
function limitsAt({ quantity, low, nominal, high }: Question, { celsius = null }: Conditions) {
  if (quantity !== 'resistance' || celsius === null) return { low, nominal, high };
  const factor = 1 + TEMPERATURE_COEFFICIENT * (celsius - CELSIUS);
  const at = (ohm: number | null) => (ohm === null ? null : ohm * factor);
  return { low: at(low), nominal: at(nominal), high: at(high) };
}

/** What speaks against the reading itself; empty: nothing. */
function misread(
  record: JudgedRecord,
  question: Question,
  value: number,
  nominal: number,
  conditions: Conditions,
): { readonly far: boolean; readonly advice: readonly string[] } {
  const off = Math.abs(Math.log(value / nominal));
  const { quantity, unit, tap, capacitancePf } = question;
  if (SLIPS[quantity].some((slip) => Math.abs(off - Math.log(slip)) < Math.log(SLIP_WITHIN)))
    return { far: true, advice: [VERDICT.unit(unit)] };
  const other = questionsOf(record).find(
    (one) =>
      tap !== null &&
      quantity !== 'width' &&
      one.tap !== null &&
      one.tap !== tap &&
      one.quantity === quantity &&
      one.capacitancePf === capacitancePf &&
      within(limitsAt(one, conditions), value),
  );
  const whole = record.windings[0]!.taps.length;
  const advice =
    other === undefined
      ? []
      : [VERDICT.otherTap(other.tap === whole ? VERDICT.what.whole : VERDICT.what.tap(other.tap!))];
  const far = off > Math.log(FAR[quantity]);
  return { far, advice: far && advice.length === 0 ? [VERDICT.far] : advice };
}

type Side = 'low' | 'high';

/** Of a tap that reads as if the meter showed `uh`. */
function inductanceAdvice(record: JudgedRecord, tap: number, uh: number, deviation: number, side: Side): string[] {
  const words = VERDICT.inductance;
  const { taps, pitchKind } = record.windings[0]!;
  const advice: string[] = [];
  const section = record.advice.find((one) => one.tap === tap);
  if (section && section.fewUh !== null && uh < section.fewUh) advice.push(words.few(percent(section.fewPercent)));
  if (section && section.manyUh !== null && uh > section.manyUh) advice.push(words.many(percent(section.manyPercent)));
  if (tap === taps.length) {
    for (const { doing, kind, tapsPercent, fromUh, toUh } of record.corrections) {
      if (kind !== 'trim' || (fromUh === null && toUh === null)) continue;
      if (uh >= (fromUh ?? 0) && uh <= (toUh ?? Number.POSITIVE_INFINITY))
        advice.push(words.trim(doing, percent(tapsPercent.at(-1)!)));
    }
  } else if (section) {
    advice.push(pitchKind === 'groove' ? words.groove : words[side]);
    // A tap that is off by a turn is not moved by degrees.
    if (advice.length > 1) return [...advice, ...(tap > 1 ? [words.first] : [])];
    const degrees = (section.degreesPerPercent * Math.abs(deviation)).toFixed(0);
    const way = side === 'high' ? 'back' : 'on';
    const fast = record.tapMethod.name === 'cut pair' || record.tapMethod.name === 'drawn in';
    advice.push(fast ? words.next(degrees, way) : words[way](degrees));
  }
  if (tap > 1) advice.push(words.first);
  return advice;
}

/** Over the upper limit of a width by this factor it is no longer a matter of the bench: a shorted turn, or a joint. */
export const SHORTED_FROM = 2;

function widthAdvice(
  record: JudgedRecord,
  { tap, capacitancePf, high }: Question,
  side: Side,
  value: number,
): string[] {
  const words = VERDICT.width;
  const row = record.measuring.instruments?.rows.find((one) => one.tap === tap && one.capacitancePf === capacitancePf);
  const { frequencyKhz = null, q = null } = row ?? {};
  return [
    ...(high !== null && value > SHORTED_FROM * high ? [words.shorted] : []),
    words[side],
    ...(frequencyKhz === null || q === null ? [] : [words.q((frequencyKhz / value).toFixed(0), q.toFixed(0))]),
  ];
}

function doubtAdvice(record: JudgedRecord, { doubt }: Question): string[] {
  if (doubt === null) return [];
  return [VERDICT.doubt(CHECKS.doubts[doubt](short(record.measuring.leadUh, 3)))];
}

function adviceOf(
  record: JudgedRecord,
  question: Question,
  side: Side,
  value: number,
  nominal: number,
  { celsius = null }: Conditions,
): string[] {
  const { quantity, tap } = question;
  const deviation = 100 * (value / nominal - 1);
  switch (quantity) {
    case 'diameter': {
      const effect = ((value - nominal) / 0.1) * record.former.tenthMmPercent;
      return [VERDICT.former.effect(percent(effect)), VERDICT.former[side]];
    }
    case 'length': {
      const words = VERDICT.length;
      if (record.windings[0]!.pitchKind === 'groove') return [words.groove];
      return [words[side], side === 'low' ? words.ease : words.press];
    }
    case 'resistance': {
      const words = VERDICT.resistance;
      const advice: string[] = [words[side]];
      if (nominal < 1 && side === 'high') advice.push(words.fourWires);
      if (celsius === null) advice.push(words.warm);
      if (tap !== null && tap > 1) advice.push(words.earlier);
      return advice;
    }
    case 'inductance':
      return [...doubtAdvice(record, question), ...inductanceAdvice(record, tap!, value, deviation, side)];
    case 'resonance':
    case 'probed resonance': {
      const words = VERDICT.resonance;
      const ratio = (nominal / value) ** 2;
      // As if the meter showed it: its limits and the trims are stated for the meter.
      const shown = record.measuring.meter.find((one) => one.tap === tap)?.readingUh ?? null;
      const byInductance =
        shown === null
          ? []
          : inductanceAdvice(record, tap!, shown * ratio, 100 * (ratio - 1), side === 'low' ? 'high' : 'low');
      const size = Math.abs(100 * (ratio - 1)).toFixed(1);
      const about = quantity === 'resonance' ? words.couple : VERDICT.probed[side];
      return [words[side](size), about, ...byInductance];
    }
    case 'width':
      return widthAdvice(record, question, side, value);
    case 'other':
      return [VERDICT.other[side]];
  }
}

/** The verdict on a reading in the unit of its question. */
export function judge(record: JudgedRecord, question: Question, value: number, conditions: Conditions = {}): Judgement {
  const limits = limitsAt(question, conditions);
  const said = (verdict: Verdict, deviationPercent: number | null, advice: readonly string[]): Judgement => ({
    verdict,
    ...limits,
    deviationPercent,
    advice,
  });
  if (!Number.isFinite(value) || value <= 0) return said('implausible', null, [VERDICT.notAFigure]);
  const { low, nominal, high } = limits;
  if (low === null || nominal === null || high === null)
    return said('not judged', null, question.quantity === 'inductance' ? [VERDICT.tooHigh] : []);
  const deviation = 100 * (value / nominal - 1);
  if (within(limits, value)) return said('pass', deviation, []);
  const { far, advice } = misread(record, question, value, nominal, conditions);
  if (far) return said('implausible', deviation, advice);
  const side = value < low ? 'low' : 'high';
  return said(side, deviation, [...advice, ...adviceOf(record, question, side, value, nominal, conditions)]);
}
