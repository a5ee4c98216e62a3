/**
 * What the record of `match` holds besides that of `plan`: the old coil as it was inferred, and old against new. The record
 * itself is that of the replacement. Places of the old coil are counted from the middle of its wire at the start.
 */
import * as z from 'zod';

const text = z.string();
const num = z.number();

export const estimateSchema = z
  .strictObject({ value: num, low: num, high: num })
  .describe('an inferred figure and its 95 % limits, in the unit of its key');

const oldRangeSchema = z.strictObject({
  lowKhz: estimateSchema,
  highKhz: estimateSchema,
});

const oldTapSchema = z.strictObject({
  tap: num.int().describe('switch position, counted from 1; the last is the whole coil'),
  name: text.describe('as it is called on the old set'),
  by: z.enum(['counted', 'inferred', 'proposed']).describe('how its turns are known'),
  turn: num.describe('the likeliest'),
  determined: z.boolean().describe('more than 95 % of the weight lies on that turn'),
  candidates: z.array(z.strictObject({ turn: num, weight: num })).describe('what else fits, the likeliest first'),
  positionMm: estimateSchema,
  angleDeg: num,
  inductanceUh: estimateSchema.describe('low frequency'),
  working: z
    .strictObject({ frequencyKhz: num, inductanceUh: num, resistanceOhm: num, q: num })
    .describe('at the middle of its range, the rest as the switch leaves it'),
  range: oldRangeSchema.nullable().describe('what it tuned in the set; null without a set'),
});

const comparisonSchema = z.strictObject({
  tap: num.int(),
  oldTurn: num,
  newTurn: num,
  oldPositionMm: num,
  newPositionMm: num.describe('from the middle of the wire at the start, as the old one'),
  oldUh: num.describe('low frequency'),
  newUh: num,
  deviationPercent: num.describe('low frequency, new over old'),
  frequencyKhz: num.describe('at which both are compared at work'),
  oldWorkingUh: num,
  newWorkingUh: num,
  workingPercent: num.describe('new over old at that frequency'),
  oldQ: num,
  newQ: num,
  withinLimits: z
    .boolean()
    .describe('at work the new inductance lies within the 95 % limits of the old one, in proportion'),
});

const waySchema = z.strictObject({
  way: z.enum(['as it worked', 'as it was']),
  possible: z.boolean(),
  text: text.describe('what it comes to, or why it cannot be'),
  wire: text.nullable(),
  formerMm: num.nullable(),
  turns: num.nullable(),
  worstPercent: num.nullable().describe('greatest deviation of a tap at work'),
  worstTap: num.int().nullable(),
  farthestMm: num.nullable().describe('greatest distance of a tap from where it was'),
  taps: z.array(z.strictObject({ tap: num.int(), turn: num, positionMm: num, workingPercent: num })),
});

export const matchedSchema = z.strictObject({
  replacement: z.enum(['as it worked', 'as it was']).describe('which of the two ways the record is of'),
  old: z.strictObject({
    name: text,
    hand: z.enum(['right', 'left']),
    earthedEnd: z.enum(['start', 'finish']),
    wire: text.describe('the likeliest'),
    turns: num,
    meanDiameterMm: estimateSchema,
    formerDiameterMm: estimateSchema,
    bareMm: estimateSchema,
    overallMm: estimateSchema,
    pitchMm: z.array(estimateSchema).describe('one a section'),
    sectionTurns: z.array(num),
    sectionGapMm: z.array(estimateSchema).describe('clear distances between sections'),
    tapGapMm: estimateSchema,
    windingLengthMm: estimateSchema,
    wireLengthM: estimateSchema,
    selfCapacitancePf: num,
    turnPositionsMm: z.array(num),
    taps: z.array(oldTapSchema),
    bandLowKhz: num.nullable().describe('that the set was marked with'),
    bandHighKhz: num.nullable(),
  }),
  comparison: z.array(comparisonSchema).describe('one a tap, old against new'),
  worst: z.strictObject({ tap: num.int(), workingPercent: num }),
  ways: z.array(waySchema).describe('as it worked and as it was'),
  residuals: z
    .array(z.strictObject({ key: text, measured: num, fitted: num, unit: text, sigmas: num }))
    .describe('every measurement against what the inferred coil would have shown'),
  contradictions: z.array(z.strictObject({ key: text, text, sigmas: num, got: num, expected: num, unit: text })),
  proposals: z.array(
    z.strictObject({
      tap: text,
      pattern: z.enum(['equal steps', 'growing steps', 'equal ratio']),
      turn: num,
      confidence: num,
      text,
    }),
  ),
  next: z
    .array(z.strictObject({ key: text, text, nowPercent: num, thenPercent: num }))
    .describe('measurements that would narrow the limits, the best first'),
  fit: z.strictObject({ chiSquare: num, freedom: num.int() }).nullable(),
  assumed: z.record(text, text),
});

export type Matched = z.infer<typeof matchedSchema>;
