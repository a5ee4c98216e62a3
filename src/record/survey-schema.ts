/**
 * The record of a coil as found: the same keys, figures and units as that of a plan. What concerns the making of a coil is not
 * known of one that is there already: `tapMethod` and `chosen` are null, holes, steps, checks, corrections and alternatives are
 * empty, of the former only its diameter and material stand there, and each tap's target is its own inductance.
 */
import * as z from 'zod';
import { recordSchema } from './schema.ts';

const foundFormerSchema = z.strictObject({
  kind: z.literal('as found'),
  outsideDiameterMm: z.number(),
  material: z.string().nullable(),
});

const surveySectionSchema = z.strictObject({
  fromTurn: z.number(),
  toTurn: z.number(),
  pitchMm: z.number(),
  gapAfterMm: z.number().describe('clear distance to the next section, edge to edge; 0 behind the last'),
});

/** What is made for a coil, which one that was found has no part in. */
const PRINTED = {
  printer: true,
  shop: true,
  wanted: true,
  parts: true,
  beds: true,
  measuring: true,
  advice: true,
} as const;

export const surveyRecordSchema = recordSchema.omit(PRINTED).extend({
  verb: z.literal('survey'),
  former: foundFormerSchema,
  tapMethod: z.null(),
  chosen: z.null(),
  sections: z.array(surveySectionSchema).min(1).describe('how the turns were measured, from the start'),
});

export type SurveyRecord = z.infer<typeof surveyRecordSchema>;
/** What the record of every verb has: all that figures, tables and charts need. */
export type FiguresRecord = Omit<
  z.infer<typeof recordSchema>,
  'former' | 'tapMethod' | 'chosen' | keyof typeof PRINTED
>;
