/**
 * Pass, fail or missing, reading by reading, tap by tap, coil by coil. A reading is judged as the bench page judges it.
 *
 * A tap **passes** with one inductance or resonance within its limits at least, and nothing outside. It **fails** with a
 * reading outside its limits; a meter that the record does not trust at that tap fails nothing, and a width only from twice its
 * upper limit on, for it measures capacitor, probe and coupling as well as the coil. Else it is **missing**: no
 * electrical reading that can be judged, or one so far off that it is not of this coil and has to be taken again. A coil fails
 * with a tap or a reading of no tap (former, 20 turns) that fails; it passes when every tap passes and no reading has to be taken again.
 */
import { JUDGED } from '../../templates/wording/proof.ts';
import { judge, SHORTED_FROM } from '../bench/judge.ts';
import { SQUARE } from '../record/meter.ts';
import { decimals, significant } from '../record/rounding.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Asking } from './judge-at.ts';
import type { Judged, ProofCoil, ProofTap, State, TwoCapacitors } from './schema.ts';
import type { CoilReadings, Reading } from './types.ts';

/** A count this far off is a turn off: counts are in whole turns or in what a spoke of the former shows. */
const MISCOUNT = 0.5;

const ELECTRICAL: readonly Reading['quantity'][] = ['inductance', 'resonance', 'probed resonance'];
export const isElectrical = ({ quantity }: Pick<Reading, 'quantity'>): boolean => ELECTRICAL.includes(quantity);
export const isOut = ({ verdict, trusted }: Pick<Judged, 'verdict' | 'trusted'>): boolean =>
  trusted && (verdict === 'low' || verdict === 'high');

const UNITS = {
  diameter: 'mm',
  length: 'mm',
  resistance: 'Ω',
  inductance: 'µH',
  resonance: 'kHz',
  'probed resonance': 'kHz',
  width: 'kHz',
  turns: '',
  other: '',
};

const rounded = (value: number | null) => (value === null ? null : significant(value));
const percent = (value: number | null) => (value === null ? null : decimals(value, 3));

/** Turns wound up to a tap against those of the record. */
function judgedTurns(
  record: CoilRecord,
  reading: Reading,
): Pick<Judged, 'what' | 'low' | 'nominal' | 'high' | 'deviationPercent' | 'verdict' | 'advice'> {
  const { turn } = record.windings[0]!.taps[reading.tap! - 1]!;
  const off = reading.value - turn;
  const verdict = Math.abs(off) < MISCOUNT ? 'pass' : off < 0 ? 'low' : 'high';
  return {
    what: JUDGED.turns(reading.tap!),
    low: significant(turn - MISCOUNT),
    nominal: significant(turn),
    high: significant(turn + MISCOUNT),
    deviationPercent: percent(100 * (reading.value / turn - 1)),
    verdict,
    advice: verdict === 'pass' ? [] : [JUDGED.miscount(reading.tap!, off)],
  };
}

/** A reading with its limits and verdict. */
export function judgeReading(record: CoilRecord, asking: Asking, reading: Reading): Judged {
  const { line, quantity, written, value, capacitancePf, frequencyKhz, celsius, remark, tap } = reading;
  const base = {
    line,
    quantity,
    key: reading.key,
    written,
    value: significant(value),
    unit: UNITS[quantity],
    capacitancePf,
    frequencyKhz,
    celsius,
    trusted: true,
    remark,
  };
  if (quantity === 'turns') return { ...base, ...judgedTurns(record, reading) };
  const { record: at, questions } = asking.for(reading);
  const key = quantity === 'inductance' ? `uh-${tap}` : reading.key;
  const question = key === null ? undefined : questions.get(key);
  if (question === undefined)
    return {
      ...base,
      what: JUDGED.unasked(quantity),
      low: null,
      nominal: null,
      high: null,
      deviationPercent: null,
      verdict: 'not judged',
      advice: [],
    };
  const { verdict, low, nominal, high, deviationPercent, advice } = judge(at, question, value, { celsius });
  return {
    ...base,
    what: question.what,
    unit: question.unit,
    low: rounded(low),
    nominal: rounded(nominal),
    high: rounded(high),
    deviationPercent: percent(deviationPercent),
    verdict,
    trusted: question.doubt === null && (quantity !== 'width' || (high !== null && value > SHORTED_FROM * high)),
    advice: [...advice],
  };
}

/** The method of two capacitors, with the least and the greatest that were used. */
function twoCapacitors(record: CoilRecord, readings: readonly Judged[]): TwoCapacitors | null {
  const used = readings
    .filter(({ quantity, verdict }) => quantity === 'resonance' && verdict !== 'implausible')
    .sort((a, b) => a.capacitancePf! - b.capacitancePf!);
  const [first, last] = [used[0], used.at(-1)];
  if (first === undefined || last === undefined || first.capacitancePf === last.capacitancePf) return null;
  const [c1, c2] = [first.capacitancePf!, last.capacitancePf!];
  const line = (f1: number, f2: number) => {
    const [y1, y2] = [(1e3 / f1) ** 2, (1e3 / f2) ** 2];
    const slope = (y2 - y1) / (c2 - c1);
    return { uh: slope / SQUARE, pf: y1 / slope - c1 };
  };
  const found = line(first.value, last.value);
  // The greater capacitor resonates higher: the two were mixed up, which their limits tell.
  if (!(found.uh > 0)) return null;
  const planned = first.nominal === null || last.nominal === null ? null : line(first.nominal, last.nominal);
  const tolerance = record.shop.capacitorTolerance;
  return {
    capacitancesPf: [c1, c2],
    inductanceUh: significant(found.uh, 5),
    selfPf: decimals(found.pf, 2),
    deviationPercent: planned === null ? null : percent(100 * (found.uh / planned.uh - 1)),
    halfPercent: decimals((100 * tolerance * Math.hypot(c1, c2)) / (c2 - c1), 2),
  };
}

/** Deviation of the inductance that a reading stands for, percent: of a resonance by its square. */
export function inductanceOff({
  quantity,
  value,
  nominal,
}: Pick<Judged, 'quantity' | 'value' | 'nominal'>): number | null {
  if (nominal === null) return null;
  return quantity === 'inductance' ? 100 * (value / nominal - 1) : 100 * ((nominal / value) ** 2 - 1);
}

/** Electrical readings that can be judged, those with the narrowest limits first, in terms of the inductance. */
export function electricalOf(readings: readonly Judged[]): Judged[] {
  const width = ({ quantity, low, nominal, high }: Judged) =>
    ((high! - low!) / nominal!) * (quantity === 'inductance' ? 1 : 2);
  return readings
    .filter((one) => isElectrical(one) && one.low !== null && one.nominal !== null && one.verdict !== 'implausible')
    .sort((a, b) => Number(b.trusted) - Number(a.trusted) || width(a) - width(b));
}

function judgeTap(record: CoilRecord, tap: number, readings: readonly Judged[]): ProofTap {
  const electrical = electricalOf(readings);
  const again = readings.some(({ verdict }) => verdict === 'implausible');
  const passes = electrical.some(({ verdict }) => verdict === 'pass');
  const state: State = readings.some(isOut) ? 'fail' : passes && !again ? 'pass' : 'missing';
  const [best] = electrical;
  return {
    tap,
    state,
    again,
    deviationPercent: best === undefined ? null : percent(inductanceOff(best)),
    readings: [...readings],
    line: twoCapacitors(record, readings),
  };
}

/** A coil judged, without what could save it. */
export function judgeCoil(record: CoilRecord, asking: Asking, coil: CoilReadings): Omit<ProofCoil, 'rescue'> {
  const judged = coil.readings.map((reading) => ({ tap: reading.tap, one: judgeReading(record, asking, reading) }));
  const of = (tap: number | null) => judged.flatMap((each) => (each.tap === tap ? [each.one] : []));
  const readings = of(null);
  const taps = record.windings[0]!.taps.map(({ tap }) => judgeTap(record, tap, of(tap)));
  const fails = readings.some(isOut) || taps.some(({ state }) => state === 'fail');
  const lacks =
    readings.some(({ verdict }) => verdict === 'implausible') || taps.some(({ state }) => state === 'missing');
  return {
    serial: coil.serial,
    state: fails ? 'fail' : lacks ? 'missing' : 'pass',
    readings,
    taps,
    remarks: [...coil.remarks],
  };
}
