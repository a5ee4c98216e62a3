/**
 * The record: the one thing that sheets, parts and pages read. Keys end in their unit. Numbers are rounded once,
 * when the record is made (`make.ts`), so that no two outputs can round differently.
 *
 * Frame: Z runs along the axis, up, as the former is printed; Z = 0 is the foot's lower face; the winding starts at the
 * lower end. Angle 0 is the start hole, positive counterclockwise seen from above; a right-hand helix climbs that way,
 * so a hole at turn t lies at angle +360 frac(t) for a right-hand and at -360 frac(t) (mod 360) for a left-hand coil.
 */
import * as z from 'zod';

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

export const wireSchema = z.strictObject({
  name: text.describe('size and covering, as a person would ask for it'),
  covering: z.enum([
    'bare',
    'enamel',
    'enamel heavy',
    'single cotton',
    'double cotton',
    'single silk',
    'double silk',
    'litz single silk',
    'litz double silk',
  ]),
  bareMm: num.describe('bare conductor diameter; for litz that of the copper bundle without serving'),
  bareLowMm: num,
  bareHighMm: num,
  overallMm: num.describe('diameter over the covering'),
  overallLowMm: num,
  overallHighMm: num,
  strands: num.describe('1 for solid wire'),
  strandMm: num.describe('bare diameter of a strand; that of the wire when solid'),
  solderable: z.boolean().describe('the covering tins through without scraping'),
  standard: text.describe('where the diameters come from'),
  status: text.describe('read, computed or from memory'),
});

export const tapSchema = z.strictObject({
  tap: num.int().describe('switch position, counted from 1; the last is the whole coil'),
  turn: num.describe('turns from the start; a fraction is the angle of its place'),
  positionMm: num.describe('Z of the wire centre at the tap'),
  angleDeg: num.describe('in the frame, 0 <= angle < 360'),
  gapMm: num.describe('how far the next turn is pushed aside by this tap'),
  targetUh: num.describe('inductance asked for'),
  inductanceUh: num.describe('low-frequency ring sum of turns 0..turn where they lie'),
  deviationPercent: num.describe('inductance against target'),
  inductanceLowUh: num.describe('lower 95 % limit'),
  inductanceHighUh: num.describe('upper 95 % limit'),
  wireFromStartM: num.describe('wire used from the start hole to here, loops of earlier taps included'),
  resistanceDcOhm: num.describe('of the wire from the start to the tap at 20 C, loops that stay in circuit included'),
  resistanceLowOhm: num,
  resistanceHighOhm: num,
  woundLengthMm: num.describe('edge to edge over the wires of the turns up to the tap'),
  dominant: text.describe('which input makes the limits wide'),
  working: z
    .strictObject({ frequencyKhz: num, inductanceUh: num, resistanceOhm: num, q: num, kind: text })
    .describe('the position at the frequency it is judged at, with what the switch leaves of the rest'),
  range: z
    .strictObject({
      lowKhz: num,
      lowUncertaintyKhz: num.describe('from where the self-capacitance lies; the limits of the inductance come on top'),
      highKhz: num,
      highUncertaintyKhz: num,
      secondLowKhz: num.nullable().describe('second resonance with the capacitor in; the dead-end effect'),
      secondHighKhz: num.nullable().describe('second resonance with the capacitor out'),
      capacitanceLowPf: num.describe('of the set across the position, capacitor out'),
      capacitanceHighPf: num,
    })
    .nullable()
    .describe('frequencies tuned with the capacitor of the set, dead turns counted; null when no set is given'),
  ends: z
    .array(
      z.strictObject({
        at: z.enum(['low', 'middle', 'high']),
        frequencyKhz: num,
        inductanceUh: num,
        resistanceOhm: num,
        q: num,
        bandwidthKhz: num.describe('frequency over Q, unloaded'),
        parallelKohm: num.describe('parallel resistance at resonance, unloaded'),
      }),
    )
    .describe('the position at both ends and the middle of its range; empty without a set'),
});

export const unitTapSchema = z.strictObject({
  unit: num.int().describe('contact of the units switch; 0 is the start itself and has no tap'),
  turn: num.describe('turns from the start'),
  positionMm: num.describe('Z of the wire centre at the tap'),
  angleDeg: num.describe('in the frame, 0 <= angle < 360'),
  gapMm: num.describe('how far the next turn is pushed aside by this tap'),
  inductanceUh: num.describe('low-frequency inductance from the start to here, to measure by'),
  wireFromStartM: num.describe('wire used from the start hole to here, loops of earlier taps included'),
});

export const windingSchema = z.strictObject({
  name: text,
  turns: num.describe('may be fractional: the finish hole then lies at an angle'),
  pitchMm: num.describe('centre to centre where no tap pushes'),
  pitchKind: z.enum(['close', 'spacer', 'groove']),
  spacerMm: num.describe('thickness of what is wound along; 0 when none'),
  spacerName: text,
  turnPositionsMm: z
    .array(num)
    .describe('Z of the wire centre at the middle of each turn; the last may be a part turn'),
  startMm: num.describe('Z of the wire centre at the start hole (turn 0)'),
  finishMm: num.describe('Z of the wire centre at the finish hole'),
  meanDiameterMm: num.describe('twice the radius of the wire centre'),
  windingLengthMm: num.describe('edge to edge over the wires'),
  wire: wireSchema,
  wireLengthM: num.describe('with loops of taps, without the ends that are left long'),
  leadsM: num.describe('both ends that are left long, together'),
  wireMassG: num,
  resistanceDcOhm: num,
  inductanceUh: num,
  selfCapacitancePf: num,
  tensionLowN: num,
  tensionHighN: num,
  taps: z.array(tapSchema).min(1),
  unitTaps: z
    .array(unitTapSchema)
    .optional()
    .describe('taps of the units switch of a two-switch coil, in order; the taps are then those of its tens switch'),
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
  print: z
    .strictObject({ lineMm: num, holeCompensationMm: num.describe('added to every hole as modelled') })
    .nullable()
    .describe('what the printer needs; null for a tube'),
  segments: num.int().describe('chords round the former'),
  stiffness: text.describe('what the winding tension does to this wall'),
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

export const correctionSchema = z.strictObject({ doing: text, wholePercent: num, firstTapPercent: num });

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
  steps: z.array(stepSchema),
  checks: z.array(checkSchema),
  corrections: z.array(correctionSchema),
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
  files: z.array(z.strictObject({ path: text, kind: text, sha256: text })),
});

export type CoilRecord = z.infer<typeof recordSchema>;
export type Winding = z.infer<typeof windingSchema>;
export type Tap = z.infer<typeof tapSchema>;
export type UnitTap = z.infer<typeof unitTapSchema>;
export type Setting = z.infer<typeof settingSchema>;
export type Former = z.infer<typeof formerSchema>;
export type Hole = z.infer<typeof holeSchema>;
export type Step = z.infer<typeof stepSchema>;
export type Check = z.infer<typeof checkSchema>;
export type Alternative = z.infer<typeof alternativeSchema>;
export type Coverage = CoilRecord['coverage'];

/** What the printed parts read of a record: known before the figures at work are. */
export type PartsRecord = Pick<CoilRecord, 'frame' | 'former' | 'holes'> & {
  readonly windings: readonly Pick<Winding, 'turns' | 'pitchMm' | 'turnPositionsMm'>[];
};
