/** Readings of coils as a shop would take them: normal about the record, with what is planted in them. */
import type { CoilReadings, KindReadings, Reading } from '../../src/prove/types.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { normals } from './normal.ts';

export interface Measured {
  readonly record: CoilRecord;
  readonly count: number;
  readonly seed?: number;
  /** Standard deviation of the coils, percent of inductance. */
  readonly percent?: number;
  /** Added to the inductance of a coil, percent, by its place in the file. */
  readonly off?: Readonly<Record<number, number>>;
  /** Coils from this place on are off by so much, percent. */
  readonly shift?: { readonly from: number; readonly percent: number };
  readonly serial?: (index: number) => string;
}

const BLANK = {
  capacitancePf: null,
  frequencyKhz: null,
  celsius: null,
  key: null,
  remark: '',
} as const;

/** Inductance of every tap at the meter, resonance of the whole coil, former and 20 turns, of each coil. */
export function measured(options: Measured): KindReadings {
  const {
    record,
    count,
    seed = 1,
    percent = 0.3,
    off = {},
    shift,
    serial = (i) => `V-${`${i + 1}`.padStart(3, '0')}`,
  } = options;
  const next = normals(seed);
  let line = 1;
  const coils = Array.from({ length: count }, (_, i): CoilReadings => {
    const moved = (off[i] ?? 0) + (shift !== undefined && i >= shift.from ? shift.percent : 0);
    const own = percent * next() + moved;
    const reading = (rest: Pick<Reading, 'quantity' | 'tap' | 'value'> & Partial<Reading>): Reading => ({
      ...BLANK,
      line: ++line,
      written: `${rest.value}`,
      ...rest,
    });
    const readings = record.measuring.meter.flatMap(({ tap, readingUh }) =>
      readingUh === null
        ? []
        : [
            reading({
              quantity: 'inductance',
              tap,
              value: Number((readingUh * (1 + (own + 0.1 * next()) / 100)).toPrecision(5)),
              frequencyKhz: record.shop.meterKhz,
            }),
          ],
    );
    const former = record.former.outsideDiameterMm;
    return {
      serial: serial(i),
      readings: [
        ...readings,
        reading({ quantity: 'diameter', tap: null, key: 'former', value: Number((former + 0.03 * next()).toFixed(2)) }),
      ],
      dial: [],
      remarks: [],
    };
  });
  return { record, coils };
}
