/**
 * The record: the one thing that sheets, parts and pages read. Keys end in their unit. Numbers are rounded once,
 * when the record is made (`make.ts`), so that no two outputs can round differently.
 *
 * Frame: Z runs along the axis, up, as the former is printed; Z = 0 is the foot's lower face; the winding starts at the
 * lower end. Angle 0 is the start hole, positive counterclockwise seen from above; a right-hand helix climbs that way,
 * so a hole at turn t lies at angle +360 frac(t) for a right-hand and at -360 frac(t) (mod 360) for a left-hand coil.
 */
import * as z from 'zod';
import { PARTS } from '../job/schema.ts';
import { adviceTapSchema, correctionSchema } from './advice-schema.ts';
import { aroundSchema } from './around-schema.ts';
import type { SecondPlaces } from './around-second.ts';
import { formerSchema } from './former-schema.ts';
import { matchedSchema } from './match-schema.ts';
import { measuringSchema } from './meter-schema.ts';
import { bedSchema, partSchema, printerSchema, shopSchema } from './printing-schema.ts';
import { type Winding, windingSchema } from './winding-schema.ts';

export type { Former } from './former-schema.ts';
export type { BedEntry, PartEntry, PrinterFigures } from './printing-schema.ts';

export type { Tap, UnitTap, Winding } from './winding-schema.ts';

const text = z.string();
const num = z.number();

export const frameSchema = z.strictObject({
  axis: text.describe('direction of Z'),
  datum: text.describe('where Z = 0 lies'),
  angleZero: text,
  anglePositive: text,
  hand: z.enum(['right', 'left']).describe('hand of the helix'),
  earthedEnd: z.enum(['start', 'finish']),
  templateSeenFrom: text,
  switchSeenFrom: text,
});

export const settingSchema = z.strictObject({
  tens: num.int().describe('contact of the tens switch, counted from 1: where the turns in use end'),
  turnsLeast: num.int().describe('turns in use with the last unit'),
  turnsMost: num.int().describe('turns in use with unit 0'),
  inductancesUh: z.array(num).min(2).describe('low frequency, of every unit from 0 on, tapped where the taps lie'),
  stepPercent: num.describe('greatest step of inductance from a setting to that of a turn less'),
  frequencyKhz: num.describe('at which Q is judged'),
  q: num.describe('with unit 0'),
  lowKhz: num.nullable().describe('lower edge of what unit 0 tunes; null without a set'),
  highKhz: num.nullable().describe('upper edge of what the last unit tunes, dead turns at both ends counted'),
});

export const holeSchema = z.strictObject({
  purpose: z.enum(['start', 'finish', 'tap', 'anchor', 'mount']),
  tap: num.int().nullable(),
  turn: num.nullable().describe('turns from the start at which the wire passes this hole'),
  label: text,
  angleDeg: num,
  axialMm: num,
  diameterMm: num.describe('as it should come out'),
});

export const stepSchema = z.strictObject({
  step: num.int(),
  kind: z.enum(['prepare', 'start', 'wind', 'tap', 'finish', 'after']),
  tap: num.int().nullable(),
  unit: num.int().optional().describe('the unit tap that is made'),
  turn: num.nullable(),
  wireM: num.nullable(),
  text,
});

export const checkSchema = z.strictObject({
  what: text,
  low: num,
  nominal: num,
  high: num,
  unit: text,
  digits: num.int().describe('decimals to print'),
});

export const alternativeSchema = z.strictObject({
  wire: text,
  formerMm: num,
  pitchMm: num,
  pitchKind: text,
  turns: num,
  lengthMm: num,
  wireM: num,
  massG: num,
  worstTapPercent: num,
  lossFactor: num.describe('mean of 1/Q over the taps where they work, estimate'),
  tapMethod: text.describe('how the taps are brought out, and their layout'),
  betterIn: z.array(text),
});

export const recordSchema = z.strictObject({
  record: z.literal(1),
  program: text,
  verb: z.enum(['plan', 'survey', 'match']),
  job: text,
  date: text.nullable(),
  hash: text,
  paper: z.enum(['A4', 'Letter']),
  units: z.enum(['metric', 'inch', 'both']).optional().describe('of lengths on the sheets; metric when left out'),
  frame: frameSchema,
  demand: z.strictObject({
    kind: z.enum(['range', 'list', 'band']),
    text: text.describe('the wish in words'),
    spacing: text,
    taps: num.int(),
    bandLowKhz: num.nullable(),
    bandHighKhz: num.nullable(),
    overlapPercent: num.nullable(),
    set: z
      .strictObject({ capacitorLowPf: num, capacitorHighPf: num, strayPf: num, aerialPf: num, switch: text })
      .nullable(),
  }),
  surroundings: z
    .strictObject({
      leadPf: num.describe('lead and switch contact of each tap to earth'),
      celsius: num.describe('copper'),
      rest: z.enum(['open', 'shorted', 'shorted in sections', 'disconnected']),
      formerLossTangent: num,
      formerLoss: text.describe('how the loss of the former is estimated'),
    })
    .describe('what the figures at working frequency were taken with'),
  spread: z
    .strictObject({
      diameterMm: num.describe('mean diameter'),
      pitch: num.describe('a fraction of the pitch'),
      bareMm: num,
      gap: num.describe('a fraction of the gap at each tap'),
      turn: num.describe('place of a tap along the wire, turns'),
      leadUh: num.describe('lead of a tap'),
    })
    .describe('half widths at 95 % of what the limits of every tap come from'),
  asMade: z
    .strictObject({
      diameterMm: num.describe('what the mean diameter comes out larger than former and wire'),
      pitch: num.describe('what the pitch of turns that are laid by hand comes out larger, a fraction'),
    })
    .optional()
    .describe('what the bench makes of a plan, counted in every figure; left out: nothing else than planned'),
  coverage: z
    .strictObject({
      neighbours: z.array(
        z.strictObject({ from: num.int(), to: num.int(), overlapPercent: num.describe('below 0: a gap') }),
      ),
      gaps: z.array(
        z.strictObject({ from: num.int(), to: num.int(), lowKhz: num, highKhz: num, tapsToClose: num.int() }),
      ),
      deadEnds: z
        .array(z.strictObject({ tap: num.int(), secondKhz: num }))
        .describe('positions whose second resonance falls into what the switch tunes, up to a third above it'),
    })
    .nullable(),
  switchKinds: z.array(
    z.strictObject({
      kind: z.enum(['open', 'shorted', 'shorted in sections', 'disconnected']),
      inUse: z.boolean(),
      note: text,
      positions: z.array(
        z.strictObject({
          tap: num.int(),
          frequencyKhz: num,
          inductanceUh: num,
          q: num,
          lowKhz: num.nullable(),
          highKhz: num.nullable(),
        }),
      ),
    }),
  ),
  settings: z
    .array(settingSchema)
    .optional()
    .describe(
      'what the two switches of a two-switch coil set, one row a tens contact; empty or left out for one switch',
    ),
  windings: z.array(windingSchema).min(1),
  around: aroundSchema.optional().describe('second winding, aerial, detector; absent where the job has none'),
  former: formerSchema,
  tapMethod: z.strictObject({
    name: z.enum(['twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in']),
    layout: z.enum(['in line', 'staggered']),
    gapMm: num,
    loopM: num.describe('extra wire at each tap'),
    why: text,
    how: z.array(text).describe('how to make it, in order'),
  }),
  holes: z.array(holeSchema),
  printer: printerSchema,
  shop: shopSchema,
  wanted: z.array(z.enum(PARTS)).describe('what is printed'),
  parts: z.array(partSchema),
  beds: z.array(bedSchema),
  steps: z.array(stepSchema),
  checks: z.array(checkSchema),
  corrections: z.array(correctionSchema).describe('what can be done when the coil reads high or low'),
  advice: z.array(adviceTapSchema).describe('section by section, one a tap'),
  measuring: measuringSchema.describe('what the instruments of the shop will show of the finished coil'),
  cautions: z.array(text),
  chosen: z.strictObject({
    prefer: text,
    why: text,
    lossFactor: num,
    massG: num,
    worstTapPercent: num,
    tried: num.int(),
    feasible: num.int(),
  }),
  warnings: z.array(z.strictObject({ code: text, text })),
  given: z.record(text, z.unknown()),
  assumed: z.record(text, z.unknown()),
  alternatives: z.array(alternativeSchema),
  matched: matchedSchema.optional().describe('of match: the old coil as inferred, and old against new'),
  files: z.array(z.strictObject({ path: text, kind: text, sha256: text })),
});

export type CoilRecord = z.infer<typeof recordSchema>;
export type Setting = z.infer<typeof settingSchema>;
export type Hole = z.infer<typeof holeSchema>;
export type Step = z.infer<typeof stepSchema>;
export type Check = z.infer<typeof checkSchema>;
export type Alternative = z.infer<typeof alternativeSchema>;
export type Coverage = CoilRecord['coverage'];

/** What the printed parts read of a record: known before the figures at work are. */
export type PartsRecord = Pick<
  CoilRecord,
  'job' | 'frame' | 'former' | 'holes' | 'printer' | 'shop' | 'wanted' | 'tapMethod'
> & {
  readonly windings: readonly Pick<
    Winding,
    | 'turns'
    | 'pitchMm'
    | 'pitchKind'
    | 'spacerMm'
    | 'turnPositionsMm'
    | 'meanDiameterMm'
    | 'startMm'
    | 'finishMm'
    | 'wire'
    | 'tensionHighN'
  >[];
  /** The second winding, for what it is wound on. */
  readonly around?: { readonly second: SecondPlaces | null } | undefined;
};
