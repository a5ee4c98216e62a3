/** What to measure at the bench, with limits, from the record. */
import { VERDICT } from '../../templates/wording/bench-verdict.ts';
import { short } from '../quantity/decimals.ts';
import type { CoilRecord, Tap } from '../record/schema.ts';
import type { Question } from './api.ts';

export type JudgedRecord = Pick<
  CoilRecord,
  'windings' | 'checks' | 'corrections' | 'advice' | 'measuring' | 'shop' | 'tapMethod' | 'former'
>;

const PLAIN = { tap: null, capacitancePf: null, frequencyKhz: null, doubt: null } as const;

/** Decimals that show a thousandth of a figure, three at most. */
const decimalsOf = (value: number) => (value < 10 ? 3 : value < 100 ? 2 : value < 1000 ? 1 : 0);

/** Of a record's list of checks what is not asked tap by tap. */
function checkQuestions({ checks, measuring }: JudgedRecord): Question[] {
  return checks.flatMap((check, i): Question[] => {
    // Every tap has its own question for these, from the figures that the check was made of.
    if (check.unit === 'kHz' && measuring.resonances.length > 0) return [];
    const { what, low, nominal, high, unit, digits } = check;
    const limits = { ...PLAIN, unit, low, nominal, high, digits };
    if (unit === 'mm' && /^former\b/i.test(what))
      return [{ ...limits, key: 'former', quantity: 'diameter', what: VERDICT.what.former }];
    if (unit === 'mm' && /^(over )?20 turns\b/i.test(what))
      return [{ ...limits, key: 'turns-20', quantity: 'length', what: VERDICT.what.twenty }];
    return [{ ...limits, key: `check-${i + 1}`, quantity: 'other', what }];
  });
}

function tapQuestions(record: JudgedRecord, one: Tap): Question[] {
  const { measuring, shop } = record;
  const { tap } = one;
  const whole = tap === record.windings[0]!.taps.length;
  const where = whole ? VERDICT.what.whole : VERDICT.what.tap(tap);
  const questions: Question[] = [];
  const length = measuring.lengths.find((entry) => entry.tap === tap);
  if (length !== undefined)
    questions.push({
      ...PLAIN,
      key: `length-${tap}`,
      quantity: 'length',
      tap,
      what: VERDICT.what.length(where),
      unit: 'mm',
      low: length.lowMm,
      nominal: one.woundLengthMm,
      high: length.highMm,
      digits: 2,
    });
  questions.push({
    ...PLAIN,
    key: `ohm-${tap}`,
    quantity: 'resistance',
    tap,
    what: VERDICT.what.resistance(where),
    unit: 'Ω',
    low: one.resistanceLowOhm,
    nominal: one.resistanceDcOhm,
    high: one.resistanceHighOhm,
    digits: decimalsOf(one.resistanceDcOhm),
  });
  const meter = measuring.meter.find((entry) => entry.tap === tap);
  if (meter !== undefined)
    questions.push({
      ...PLAIN,
      key: `uh-${tap}`,
      quantity: 'inductance',
      tap,
      what: VERDICT.what.inductance(where, short(shop.meterKhz, 3)),
      unit: 'µH',
      low: meter.lowUh,
      nominal: meter.readingUh,
      high: meter.highUh,
      digits: decimalsOf(meter.readingUh ?? one.inductanceUh),
      frequencyKhz: shop.meterKhz,
      doubt: meter.doubt,
    });
  // The largest capacitor at each tap, beside which strays count least; all of them at the whole coil.
  const most = shop.capacitorsPf.at(-1);
  for (const entry of measuring.resonances)
    if (entry.tap === tap && (whole || entry.capacitancePf === most))
      questions.push({
        ...PLAIN,
        key: `khz-${tap}-${short(entry.capacitancePf, 3)}`,
        quantity: 'resonance',
        tap,
        what: VERDICT.what.resonance(where, short(entry.capacitancePf, 3)),
        unit: 'kHz',
        low: entry.lowKhz,
        nominal: entry.frequencyKhz,
        high: entry.highKhz,
        digits: decimalsOf(entry.frequencyKhz),
        capacitancePf: entry.capacitancePf,
      });
  return [...questions, ...probedQuestions(record, tap, where)];
}

/** Resonance and width with generator and probe on the coil; where the job states such instruments, nobody else has them. */
function probedQuestions({ measuring, shop }: JudgedRecord, tap: number, where: string): Question[] {
  if (!shop.instruments?.stated) return [];
  const rows = measuring.instruments?.rows ?? [];
  return rows
    .filter((row) => row.tap === tap)
    .flatMap((row): Question[] => {
      const { capacitancePf, frequencyKhz, widthKhz } = row;
      const pf = short(capacitancePf, 3);
      const base = { ...PLAIN, tap, unit: 'kHz', capacitancePf };
      return [
        {
          ...base,
          key: `probed-${tap}-${pf}`,
          quantity: 'probed resonance',
          what: VERDICT.what.probed(where, pf),
          low: row.lowKhz,
          nominal: frequencyKhz,
          high: row.highKhz,
          digits: decimalsOf(frequencyKhz ?? row.aloneKhz),
        },
        {
          ...base,
          key: `width-${tap}-${pf}`,
          quantity: 'width',
          what: VERDICT.what.width(where, pf),
          low: row.widthLowKhz,
          nominal: widthKhz,
          high: row.widthHighKhz,
          digits: decimalsOf(widthKhz ?? 1),
        },
      ];
    });
}

/** All questions: former and winding first, then tap by tap. Their keys are stable and differ. */
export function questionsOf(record: JudgedRecord): Question[] {
  return [...checkQuestions(record), ...record.windings[0]!.taps.flatMap((tap) => tapQuestions(record, tap))];
}
