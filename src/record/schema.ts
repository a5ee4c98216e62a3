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
import { matchedSchema } from './match-schema.ts';
import { measuringSchema } from './meter-schema.ts';
import { type Winding, windingSchema } from './winding-schema.ts';

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

/** Turns, counted from the start, that lean on a ridge. */
const runSchema = z
  .strictObject({
    fromTurn: num,
    toTurn: num,
    footMm: num.describe('its lower edge on the winding surface, along the axis from the middle of the wire'),
  })
  .nullable();

export const formerSchema = z.strictObject({
  kind: z.enum(['printed', 'tube']),
  surface: z.enum(['smooth', 'grooved']),
  material: text,
  densityGCm3: num,
  outsideDiameterMm: num,
  boreDiameterMm: num,
  wallMm: num,
  lengthMm: num.describe('whole former, foot to top'),
  footMm: num.describe('thickness of the lower flange or end band; the winding surface begins above it'),
  topMm: num.describe('thickness of the upper flange or end band'),
  flange: z
    .strictObject({ diameterMm: num, lowerMm: num, upperMm: num })
    .nullable()
    .describe('rims at foot and top, their diameter and thicknesses; null when plain'),
  groove: z
    .strictObject({
      depthMm: num.describe('from the outside to the flat floor'),
      floorMm: num.describe('width of the flat floor; flanks rise at 45 degrees'),
      runInTurns: num.describe(
        'the groove deepens from nothing over this many turns before the start and after the finish',
      ),
    })
    .nullable(),
  chamferMm: num.describe('on the lower outer and inner edges, for the first layers'),
  ears: z.array(
    z.strictObject({ angleDeg: num, holeDiameterMm: num, centreRadiusMm: num, widthMm: num, thicknessMm: num }),
  ),
  numbers: z
    .array(z.strictObject({ text, angleDeg: num, tap: num.int().nullable() }))
    .describe('tap numbers and the letter S, cut into the face of the upper flange at the angle of their hole'),
  numberHeightMm: num,
  datumMark: z.strictObject({ angleDeg: num, widthMm: num, depthMm: num }).nullable(),
  body: z.enum(['full', 'ribbed']).describe('of a printed former: a wall all round, or end rings and ribs'),
  ribs: z
    .strictObject({
      count: num.int().describe('a rib at every 360/count degrees from angle 0'),
      widthMm: num.describe('along the circumference'),
      depthMm: num.describe('along the radius, from the outside in'),
      ringMm: num.describe('height of each end ring'),
      innerRings: z
        .strictObject({
          topsMm: z.array(num).describe('Z of their upper faces, from below; the last carries the upper end ring'),
          crownMm: num.describe('height midway between two ribs; underneath they fall to the ribs at 45 degrees'),
          acrossMm: num.describe('outside, across flats that face the middles between ribs'),
          insideMm: num.describe('inside, across flats'),
        })
        .describe('rings with a flat a span, which keep the ribs from giving way'),
      seatMm: num.describe('Z at which the upper end ring begins; it widens at 45 degrees to its rim'),
      seatDiameterMm: num.describe('of the upper end ring there'),
    })
    .nullable()
    .describe('of a ribbed body'),
  ridges: z
    .strictObject({
      heightMm: num.describe('over the winding surface'),
      widthMm: num.describe('along the axis, where it meets the winding surface; its underside rises at 45 degrees'),
      start: runSchema.describe('under the first turn'),
      finish: runSchema.describe('over the last turn that the finish row allows for'),
    })
    .nullable()
    .describe('helical ridges that a close winding on a smooth printed former leans on'),
  base: z
    .strictObject({
      diameterMm: num,
      thicknessMm: num,
      holes: num.int(),
      circleDiameterMm: num,
      holeDiameterMm: num,
      firstDeg: num.describe('angle of the first hole; the others stand evenly round'),
    })
    .nullable()
    .describe('a round foot with a ring of screw holes'),
  posts: z
    .array(
      z.strictObject({
        label: text,
        tap: num.int().nullable(),
        angleDeg: num,
        axialMm: num.describe('of the eye'),
        widthMm: num.describe('along the circumference'),
        reachMm: num.describe('from the winding surface outwards'),
        heightMm: num.describe('over the foot'),
        eyeMm: num.describe('diameter of the eye, as it should come out'),
        eyeReachMm: num.describe('from the winding surface to the middle of the eye'),
      }),
    )
    .describe('posts at the foot through whose eyes the leads of lugs are led'),
  joints: z
    .array(
      z.strictObject({
        turn: num
          .nullable()
          .describe('at the key the seam lies midway between this turn and the next; null for a flat seam'),
        seamMm: num.describe('Z of the seam on the outside at the key, below the step; inwards it falls at 45 degrees'),
        climbMm: num.describe('what the seam rises over one turn, along with the winding, and falls back at its step'),
        keyDeg: num.describe('angle of the step, and of the tongue in the bore that keeps the sections from turning'),
        spigotMm: num.describe('length of the spigot below the seam in the bore'),
        glueGapMm: num.describe('between spigot and bore, on the radius'),
      }),
    )
    .describe('where a former taller than the printer is put together, from below'),
  tenthMmPercent: num.describe('what a tenth of a millimetre more of outside diameter does to the inductance'),
  segments: num.int().describe('chords round the former'),
  stiffness: text.describe('what the winding tension does to this wall'),
});

export const printerSchema = z.strictObject({
  bedXMm: num,
  bedYMm: num,
  heightMm: num,
  nozzleMm: num,
  lineMm: num,
  layerMm: num,
  holeCompensationMm: num.describe('added to the diameter of every hole as modelled'),
  clearanceMm: num.describe('gap on diameter between printed parts that go into one another'),
  scale: z
    .array(num)
    .length(3)
    .describe('what files are enlarged by along x, y and z; every other figure is as it should come out'),
  material: text.describe('of jigs'),
  densityGCm3: num.describe('of that material'),
});

export const shopSchema = z.strictObject({
  shaftMm: num.describe('diameter, or across the flats'),
  shaftForm: z.enum(['round', 'hexagon']),
  spoolDiameterMm: num,
  spoolWidthMm: num,
  spoolBoreMm: num,
  meterKhz: num.describe('at which the inductance meter measures'),
  meterName: text.nullable(),
  meterAccuracy: num.describe('a fraction of the reading'),
  capacitorsPf: z.array(num).describe('known capacitors, ascending'),
  capacitorTolerance: num.describe('a fraction'),
});

export const partSchema = z.strictObject({
  part: text.describe('stands in file names and on beds'),
  name: text,
  kind: z.enum(PARTS),
  path: text,
  quantity: num.int(),
  material: text,
  sizeMm: z.array(num).length(3).describe('outer size as it should come out, in print orientation'),
  volumeMm3: num.describe('of the solid'),
  massG: num.describe('of solid plastic, one piece'),
  use: text,
  printNote: text,
});

export const bedSchema = z.strictObject({
  path: text,
  material: text,
  items: z.array(
    z.strictObject({
      part: text,
      copy: num.int(),
      xMm: num.describe('left edge of its box on the bed'),
      yMm: num.describe('front edge'),
      turned: z.boolean().describe('by a quarter turn'),
    }),
  ),
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
export type Former = z.infer<typeof formerSchema>;
export type PrinterFigures = z.infer<typeof printerSchema>;
export type PartEntry = z.infer<typeof partSchema>;
export type BedEntry = z.infer<typeof bedSchema>;
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
};
