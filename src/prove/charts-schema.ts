/** Charts and the dial of `proof.json`. Numbers are rounded once, when they are made. Keys end in their unit. */
import * as z from 'zod';

const text = z.string();
const num = z.number();

const limitsSchema = z.strictObject({ low: num, high: num });

export const chartPointSchema = z.strictObject({
  serial: text,
  value: num,
  range: num.nullable().describe('distance to the coil before; null for the first'),
  beyond: z.boolean().describe('outside the control limits'),
  rangeBeyond: z.boolean().describe('its range is above the limit of ranges'),
  run: z.boolean().describe('part of a run on one side of the centre line'),
  outlier: z.boolean().describe('does not belong to the rest, by the test for outliers'),
});

export const capabilitySchema = z.strictObject({
  coils: num.int(),
  standardDeviation: num.describe('of all coils, n - 1'),
  cp: num,
  cpLow: num.describe('95 % limits'),
  cpHigh: num,
  cpk: num,
  cpkLow: num,
  cpkHigh: num,
});

export const chartSchema = z.strictObject({
  key: text.describe('`former`, `turns-20`, `uh-3`, `khz-3-100`: that of the question at the bench'),
  quantity: z.enum(['diameter', 'length', 'inductance', 'resonance']),
  tap: num.int().nullable().describe('null: not of a tap'),
  whole: z.boolean().describe('of the whole coil'),
  capacitancePf: num.nullable().describe('of the known capacitor of a resonance'),
  frequencyKhz: num.nullable().describe('of the meter of an inductance'),
  unit: z.enum(['mm', '%']).describe('%: deviation from the figure of the record'),
  nominal: num.describe('of the record: mm, or 0 %'),
  nominalOf: num.describe('what 0 % stands for, µH or kHz; mm again for a length'),
  limits: limitsSchema.nullable().describe('of the record, in the unit of the chart'),
  points: z.array(chartPointSchema).describe('in the order of the file'),
  leftOut: z.array(text).describe('serials whose readings were taken with another meter frequency'),
  centre: num.describe('mean, as all limits without the outliers'),
  lower: num.describe('control limits of individuals'),
  upper: num,
  rangeCentre: num.describe('mean of the moving ranges'),
  rangeUpper: num.describe('control limit of the moving ranges'),
  few: z.boolean().describe('limits from fewer coils than settle them'),
  inControl: z.boolean().describe('no individual beyond the limits and no run'),
  chancePercent: num.describe('charts out of 100 of so many coils that show such a sign though nothing has changed'),
  suspected: num.int().describe('most outliers that were looked for'),
  capability: capabilitySchema.nullable(),
  noCapability: z
    .enum(['few coils', 'not in control', 'no limits', 'no spread'])
    .nullable()
    .describe('why there are no figures of capability; null: there are'),
});

const dialReadingSchema = z.strictObject({ degrees: num, frequencyKhz: num });

export const dialPositionSchema = z.strictObject({
  tap: num.int(),
  readings: z.array(dialReadingSchema).min(4).describe('by rising angle and frequency'),
  smoothIn: z.enum(['1/f²', '1/f', 'log f', 'f']).describe('what is taken in between by cubics against the angle'),
  missPercent: num.describe('greatest miss when each inner reading is worked out from the others'),
  lowKhz: num.describe('at the first reading'),
  highKhz: num.describe('at the last'),
});

export const dialSchema = z.strictObject({
  serial: text,
  spanDeg: num.describe('of the capacitor, from its stop fully in to that fully out'),
  positions: z.array(dialPositionSchema).min(1).describe('by rising tap'),
});

export type Chart = z.infer<typeof chartSchema>;
export type ChartPoint = z.infer<typeof chartPointSchema>;
export type Capability = z.infer<typeof capabilitySchema>;
export type Dial = z.infer<typeof dialSchema>;
export type DialPosition = z.infer<typeof dialPositionSchema>;
