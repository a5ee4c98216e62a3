/** What generator and oscilloscope probe will show of the finished coil, in the record. Keys end in their unit. */
import * as z from 'zod';

const num = z.number();

const rowSchema = z.strictObject({
  tap: num.int(),
  capacitancePf: num.describe('of the known capacitor from the start to the tap; 0: none'),
  aloneKhz: num.describe('resonance without generator and probe, as in `resonances`'),
  aloneWidthKhz: num.nullable().describe('between 0.707 of the voltage, without them; null: no peak with two sides'),
  aloneQ: num.nullable(),
  frequencyKhz: num.nullable().describe('where the probe shows most; null: it is damped so that no peak has two sides'),
  lowKhz: num
    .nullable()
    .describe('95 % limits: of the tap, the capacitor, self-capacitance, clips, probe and coupling'),
  highKhz: num.nullable(),
  widthKhz: num.nullable().describe('between the frequencies where the probe shows 0.707 of the most'),
  widthLowKhz: num.nullable().describe('limits of the width: see `instruments`'),
  widthHighKhz: num.nullable(),
  q: num.nullable().describe('by the width: of coil, capacitor and instruments together'),
});

export const instrumentsSchema = z.strictObject({
  tolerancePercent: num.describe('how well the capacitances of probe and coupling are known, and the loss by them'),
  copperPercent: num.describe('of the limits of a width: how well the loss of the wire is known'),
  formerPercent: num.describe('the same of the loss of the former'),
  readingPercent: num.describe('how well a width is read'),
  capacitorLoss: num.describe('loss tangent that the known capacitor may have; upper limits count it'),
  probeLoss: num.describe('the same of the probe'),
  rows: z
    .array(rowSchema)
    .describe('every tap with the largest known capacitor; the whole coil with none and with all of them'),
});

export type InstrumentsMeasuring = z.infer<typeof instrumentsSchema>;
export type InstrumentsRow = z.infer<typeof rowSchema>;
