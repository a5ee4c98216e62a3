/** The charts of a kind: which readings of its coils are worth one, each with limits, signs, outliers and capability. */
import { questionsOf } from '../bench/questions.ts';
import { decimals, significant } from '../record/rounding.ts';
import type { CoilRecord } from '../record/schema.ts';
import { capabilityOf } from './capability.ts';
import type { Chart } from './charts-schema.ts';
import { chancePercent, controlOf, SETTLED_FROM } from './control.ts';
import { outliersIn, suspectedAmong } from './outliers.ts';
import type { CoilReadings, KindReadings, Reading } from './types.ts';

/** With fewer coils there is nothing to see on a chart. */
export const CHART_FROM = 8;
/** A meter set to the same frequency says it to this share. */
const SAME_FREQUENCY = 0.01;

/** What a chart is about, before any reading. */
type Subject = Pick<
  Chart,
  'key' | 'quantity' | 'tap' | 'whole' | 'capacitancePf' | 'frequencyKhz' | 'unit' | 'nominal' | 'nominalOf' | 'limits'
> & {
  /** Decimals that are kept. */
  readonly digits: number;
  /** The reading of this subject: 'other' for the same thing taken with another frequency. */
  readonly fits: (reading: Reading) => boolean | 'other';
  readonly figure: (reading: Reading) => number;
};

const share = (value: number, of: number) => 100 * (value / of - 1);

function lengthSubjects(record: CoilRecord): Subject[] {
  return questionsOf(record).flatMap((question): Subject[] => {
    const { key, low, nominal, high } = question;
    if ((key !== 'former' && key !== 'turns-20') || low === null || nominal === null || high === null) return [];
    return [
      {
        key,
        quantity: key === 'former' ? 'diameter' : 'length',
        tap: null,
        whole: false,
        capacitancePf: null,
        frequencyKhz: null,
        unit: 'mm',
        nominal,
        nominalOf: nominal,
        limits: { low, high },
        digits: 4,
        fits: (reading) => reading.key === key,
        figure: ({ value }) => value,
      },
    ];
  });
}

/** Deviations in percent of a figure of the record. */
function percentSubject(
  of: Pick<Subject, 'key' | 'quantity' | 'tap' | 'whole' | 'capacitancePf' | 'frequencyKhz' | 'fits'>,
  { low, nominal, high }: { low: number; nominal: number; high: number },
): Subject {
  return {
    ...of,
    unit: '%',
    nominal: 0,
    nominalOf: nominal,
    limits: { low: decimals(share(low, nominal), 4), high: decimals(share(high, nominal), 4) },
    digits: 4,
    figure: ({ value }) => share(value, nominal),
  };
}

/** Inductance of a tap at the meter; null where the meter shows none. */
function inductanceSubject(record: CoilRecord, tap: number, whole: boolean): Subject | null {
  const meter = record.measuring.meter.find((one) => one.tap === tap);
  if (!meter || meter.readingUh === null || meter.lowUh === null || meter.highUh === null) return null;
  const { meterKhz } = record.shop;
  const fits = ({ quantity, tap: of, frequencyKhz }: Reading) => {
    if (quantity !== 'inductance' || of !== tap) return false;
    return frequencyKhz === null || Math.abs(frequencyKhz / meterKhz - 1) <= SAME_FREQUENCY || 'other';
  };
  return percentSubject(
    { key: `uh-${tap}`, quantity: 'inductance', tap, whole, capacitancePf: null, frequencyKhz: meterKhz, fits },
    { low: meter.lowUh, nominal: meter.readingUh, high: meter.highUh },
  );
}

/** Resonances of a tap, one for each known capacitor. */
function resonanceSubjects(record: CoilRecord, tap: number, whole: boolean): Subject[] {
  return record.measuring.resonances
    .filter((one) => one.tap === tap)
    .map(({ capacitancePf, lowKhz, frequencyKhz, highKhz }) =>
      percentSubject(
        {
          key: `khz-${tap}-${capacitancePf}`,
          quantity: 'resonance',
          tap,
          whole,
          capacitancePf,
          frequencyKhz: null,
          fits: (reading) =>
            reading.quantity === 'resonance' && reading.tap === tap && reading.capacitancePf === capacitancePf,
        },
        { low: lowKhz, nominal: frequencyKhz, high: highKhz },
      ),
    );
}

interface Taken {
  readonly subject: Subject;
  readonly points: readonly { readonly serial: string; readonly value: number }[];
  readonly leftOut: readonly string[];
}

/** Of each coil its last reading: what was read again counts anew. */
function taken(subject: Subject, coils: readonly CoilReadings[]): Taken {
  const points: { serial: string; value: number }[] = [];
  const leftOut: string[] = [];
  for (const { serial, readings } of coils) {
    const reading = readings.findLast((one) => subject.fits(one) === true);
    if (reading !== undefined) points.push({ serial, value: decimals(subject.figure(reading), subject.digits) });
    else if (readings.some((one) => subject.fits(one) === 'other')) leftOut.push(serial);
  }
  return { subject, points, leftOut };
}

function chartOf({ subject, points, leftOut }: Taken): Chart {
  const { digits, fits: _fits, figure: _figure, ...about } = subject;
  const values = points.map(({ value }) => value);
  const suspected = suspectedAmong(values.length);
  const outliers = new Set(suspected === 0 ? [] : outliersIn(values, suspected).outliers);
  // A coil that does not belong to the rest, or one reading in a wrong unit, would hide all else behind its wide limits.
  const control = controlOf(values, outliers);
  const capability = capabilityOf(values, subject.limits, control.inControl);
  const none = typeof capability === 'string';
  return {
    ...about,
    points: points.map(({ serial, value }, i) => {
      const range = control.ranges[i]!;
      return {
        serial,
        value,
        range: range === null ? null : decimals(range, digits),
        beyond: control.beyond[i]!,
        rangeBeyond: control.rangeBeyond[i]!,
        run: control.run[i]!,
        outlier: outliers.has(i),
      };
    }),
    leftOut: [...leftOut],
    centre: significant(control.centre),
    lower: significant(control.lower),
    upper: significant(control.upper),
    rangeCentre: significant(control.rangeCentre),
    rangeUpper: significant(control.rangeUpper),
    few: values.length < SETTLED_FROM,
    inControl: control.inControl,
    chancePercent: significant(chancePercent(values.length), 2),
    suspected,
    capability: none ? null : capability,
    noCapability: none ? capability : null,
  };
}

/** The best of what was read of a tap: a meter that can be trusted, else the resonance most coils have, else the meter as it is. */
function ofTap(record: CoilRecord, coils: readonly CoilReadings[], tap: number, whole: boolean): Taken | null {
  const enough = (one: Taken) => one.points.length >= CHART_FROM;
  const subject = inductanceSubject(record, tap, whole);
  const shown = subject === null ? null : taken(subject, coils);
  const trusted = record.measuring.meter.find((one) => one.tap === tap)?.doubt === null;
  if (shown !== null && trusted && enough(shown)) return shown;
  const resonances = resonanceSubjects(record, tap, whole).map((one) => taken(one, coils));
  const [most] = resonances.filter(enough).sort((a, b) => b.points.length - a.points.length);
  return most ?? (shown !== null && enough(shown) ? shown : null);
}

/**
 * A chart for each thing that at least {@link CHART_FROM} coils have a reading of: the whole coil and the taps from the last to the
 * first as deviations from the record in percent, wound length at 20 turns, diameter of the former. Coils in the order of the file.
 */
export function chartsOf({ record, coils }: KindReadings): Chart[] {
  const taps = record.windings[0]!.taps.map(({ tap }) => tap).reverse();
  const electrical = taps.flatMap((tap, i) => ofTap(record, coils, tap, i === 0) ?? []);
  const lengths = lengthSubjects(record)
    .reverse()
    .map((subject) => taken(subject, coils))
    .filter(({ points }) => points.length >= CHART_FROM);
  return [...electrical, ...lengths].map(chartOf);
}
