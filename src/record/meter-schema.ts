/** What instruments on the bench will show of the finished coil, in the record. Keys end in their unit. */
import * as z from 'zod';
import { instrumentsSchema } from './instruments-schema.ts';

const num = z.number();

/** Why a meter is not to be trusted at a tap: its leads, resistance beside reactance, or capacitance of coil and clips. */
export const DOUBTS = ['leads', 'resistance', 'capacitance'] as const;

const meterTapSchema = z.strictObject({
  tap: num.int(),
  inductanceUh: num.describe('at the frequency of the meter, from the start, the rest open, without any capacitance'),
  readingUh: num.nullable().describe('what the meter shows; null above the resonance of the coil with itself'),
  lowUh: num.nullable().describe('95 % limits of the reading: of the tap and of the meter, taken together'),
  highUh: num.nullable(),
  q: num.describe('at the frequency of the meter'),
  doubt: z.enum(DOUBTS).nullable().describe('what the meter is not to be trusted for; null: it can be'),
});

const lengthSchema = z.strictObject({
  tap: num.int(),
  lowMm: num.describe('95 % limits of the wound length'),
  highMm: num,
});

const resonanceSchema = z.strictObject({
  tap: num.int(),
  capacitancePf: num.describe('of the known capacitor from the start to the tap'),
  frequencyKhz: num.describe('of the turns up to the tap, the rest open, nothing else connected'),
  lowKhz: num.describe('95 % limits: of the tap, the capacitor, self-capacitance and clips'),
  highKhz: num,
});

const lineSchema = z.strictObject({
  slopePerPf: num.describe('of 1/f² in 1/MHz² against added capacitance, whole coil'),
  selfPf: num.describe('what the coil adds: the line crosses 0 this far left of no capacitor'),
  inductanceUh: num.describe('that the slope stands for'),
  inductancePercent: num.nullable().describe('half width of it by the capacitors alone; null with one capacitor'),
  selfHalfPf: num.nullable().describe('the same of selfPf'),
});

export const measuringSchema = z.strictObject({
  leadUh: num.describe('of the leads of the meter, what is left of them after zeroing'),
  clipPf: num.describe('of clips and coupling across the coil, not known'),
  meter: z.array(meterTapSchema),
  fromTap: num.int().nullable().describe('the meter can be trusted from this tap on, up to toTap; null: nowhere'),
  toTap: num.int().nullable(),
  lengths: z.array(lengthSchema),
  resonances: z.array(resonanceSchema).describe('every tap with every known capacitor, taps first'),
  line: lineSchema.describe('for the method of two capacitors'),
  instruments: instrumentsSchema.optional().describe('with generator and probe on it; absent of older records'),
});

export type Measuring = z.infer<typeof measuringSchema>;
export type Doubt = (typeof DOUBTS)[number];
