/** What the readings of a kind have in common, in `proof.json`. Keys end in their unit; limits are 95 %. */
import * as z from 'zod';

const text = z.string();
const num = z.number();

/** What may be off for all coils of a kind alike. */
export const UNKNOWNS = ['diameter', 'pitch', 'gaps', 'meter', 'leads', 'capacitor', 'strays'] as const;
/** Kinds of readings that are fitted. */
export const FITTED = ['inductance', 'resonance', 'length', 'twenty', 'former'] as const;
/** Why a coil, or a reading, is left out of the fit: turns counted or read a whole turn off, or far from all others. */
export const LEFT_OUT = ['turns', 'far'] as const;

export const unknownSchema = z.strictObject({
  name: z.enum(UNKNOWNS),
  capacitancePf: num.nullable().describe('of a known capacitor; else null'),
  unit: z.enum(['mm', '%', 'µH', 'pF']),
  estimate: num.describe('in its unit: more than planned, or than the instrument should show'),
  half: num.describe('half width of the 95 % limits'),
  low: num,
  high: num,
  priorHalf: num.describe('what it may be before anything is read; limits cannot be wider'),
  percent: num.nullable().describe('of the nominal mean diameter; null for all but the diameter'),
  significant: z.boolean().describe('the limits leave out 0'),
  known: num.describe('how far the readings narrowed it, 0: not at all, 1: wholly'),
  sharePercent: num.describe('of the common deviation of all readings, what this explains'),
  wholePercent: num.nullable().describe('what it does to the inductance read of the whole coil'),
  text: text.describe('what is off, in words'),
});

export const systematicSchema = z.strictObject({
  coils: num.int().describe('that are fitted'),
  readings: num.int().describe('that are fitted'),
  unknowns: z.array(unknownSchema),
  /** Also those that are not significant are listed in `unknowns`; here is what to say. */
  diagnosis: z.array(text).min(1).describe('what is off, the greatest first; or that nothing is'),
  apart: z
    .array(
      z.strictObject({
        a: z.enum(UNKNOWNS),
        b: z.enum(UNKNOWNS),
        correlation: num,
        text,
        measure: text.describe('which reading would tell them apart'),
      }),
    )
    .describe('pairs that these readings cannot tell from one another'),
  scatter: z
    .strictObject({
      diameterMm: num.describe('of coils, standard deviation'),
      pitchPercent: num,
      readings: z.array(z.strictObject({ of: z.enum(FITTED), sd: num, unit: z.enum(['mm', '%']) })),
    })
    .describe('from coil to coil, and of one reading'),
  slots: z
    .array(
      z.strictObject({
        of: z.enum(FITTED),
        tap: num.int().nullable(),
        capacitancePf: num.nullable(),
        count: num.int(),
        unit: z.enum(['mm', '%']),
        mean: num.describe('mean deviation of all coils from what was expected'),
        rest: num.describe('what of it the fit leaves'),
      }),
    )
    .describe('the common deviation, one a thing that is read'),
  misfit: z.strictObject({
    chiSquare: num,
    degrees: num.int(),
    probability: num.describe('of a misfit as great by chance'),
    tap: num.int().nullable().describe('where most of it lies'),
    text,
  }),
  leftOut: z.array(
    z.strictObject({
      serial: text,
      line: num.int().nullable().describe('null: the whole coil'),
      why: z.enum(LEFT_OUT),
      text,
    }),
  ),
});

export type Unknown = z.infer<typeof unknownSchema>;
export type Systematic = z.infer<typeof systematicSchema>;
export type Fitted = (typeof FITTED)[number];
export type UnknownName = (typeof UNKNOWNS)[number];
