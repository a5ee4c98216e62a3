/** What to do about a finished coil that reads high or low, in the record. Keys end in their unit. */
import * as z from 'zod';

const num = z.number();

export const correctionSchema = z.strictObject({
  doing: z.string(),
  kind: z
    .enum(['trim', 'start', 'next coil'])
    .describe('trims the whole coil; acts from the start on; or the next one'),
  tapsPercent: z.array(num).min(1).describe('what it does to the inductance of every tap, the whole coil last'),
  fromUh: num.nullable().describe('of trim: it brings the coil nearest when the meter shows from this ...'),
  toUh: num
    .nullable()
    .describe(
      '... to this; null beyond the outermost, and both null where another does better or the meter is not to be trusted',
    ),
});

export const adviceTapSchema = z.strictObject({
  tap: num.int(),
  fewPercent: num.describe('with a turn too few in the section that ends at this tap'),
  manyPercent: num.describe('with one too many'),
  fewUh: num
    .nullable()
    .describe('below this reading a turn is more likely missing than not; null without a reading to trust'),
  manyUh: num.nullable().describe('above this one there is one too many'),
  millimetrePercent: num.describe('when the section that ends here is wound a millimetre longer, all else as it is'),
  degreesPerPercent: num.describe('along the wire, by which the tap moves to read a percent more'),
});

export type Correction = z.infer<typeof correctionSchema>;
export type AdviceTap = z.infer<typeof adviceTapSchema>;
