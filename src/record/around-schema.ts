/** The set around the coil, in the record: second winding, aerial, detector, what each pair of taps gives. Keys end in their unit. */
import * as z from 'zod';

const text = z.string();
const num = z.number();

/** Where something is connected: a tap by its number, 0 for the start of a coil whose finish is earthed, or the second winding. */
export const contactSchema = z.union([num.int(), z.literal('second')]);

export const SECOND_KINDS = ['same former', 'sleeve', 'inner', 'beside'] as const;

const secondSchema = z.strictObject({
  kind: z.enum(SECOND_KINDS),
  turns: num,
  wire: z.strictObject({ name: text, bareMm: num, overallMm: num }),
  pitchMm: num,
  spacerMm: num.describe('of what is wound along between its turns; 0 when wound close'),
  meanDiameterMm: num,
  startMm: num.describe(
    'Z of the wire centre at its start hole, in the frame of the main coil; where it slides, at the tightest place',
  ),
  finishMm: num.describe('Z of the wire centre at its finish hole, there'),
  turnPositionsMm: z.array(num).describe('Z of the wire centre at the middle of each turn, there'),
  distanceMm: num.describe('edge to edge of both windings along the axis; below 0 where they lie over one another'),
  wireLengthM: num.describe('without the ends that are left long'),
  leadsM: num,
  wireMassG: num,
  resistanceDcOhm: num,
  inductanceUh: num.describe('low frequency, alone'),
  selfCapacitancePf: num,
  betweenPf: num.describe('estimate, between the two windings where they lie over one another'),
  mutualUh: num.describe('with the whole main coil, low frequency'),
  coupling: num,
  wanted: z
    .strictObject({ lowest: num, highest: num })
    .nullable()
    .describe('coupling with the whole coil that was asked for; equal where it does not slide; null: turns were given'),
  working: z
    .array(z.strictObject({ tap: num.int(), frequencyKhz: num, mutualUh: num, coupling: num, addedOhm: num }))
    .describe('with the turns up to each tap, where it works'),
  slide: z
    .strictObject({
      travelMm: num.describe('upwards (+) or downwards (-) from the tightest place to the loosest'),
      scale: z.array(z.strictObject({ mm: num.describe('from the tightest place'), coupling: num })),
    })
    .nullable(),
  body: z
    .strictObject({
      insideDiameterMm: num,
      outsideDiameterMm: num,
      lengthMm: num,
      lowMm: num.describe('Z of its lower edge, at the tightest place'),
    })
    .nullable()
    .describe('what it is wound on; null on the former of the main coil'),
  holes: z.array(
    z.strictObject({
      purpose: z.enum(['start', 'finish']),
      label: text,
      angleDeg: num,
      axialMm: num.describe('as `startMm`'),
      diameterMm: num,
    }),
  ),
  why: text,
});

const aerialSchema = z.strictObject({
  kind: z.enum(['horizontal wire', 'vertical wire', 'capacitor', 'dummy']),
  capacitancePf: num,
  inductanceUh: num.describe('in series'),
  resistanceOhm: num.describe('in series: earth, wire and radiation together'),
  shunt: z
    .strictObject({ capacitancePf: num, resistanceOhm: num })
    .nullable()
    .describe('one behind the other across the inductance, of the dummy aerial; null: none'),
  seriesPf: num.nullable().describe('of a capacitor between aerial and coil; null: none'),
  to: contactSchema.nullable().describe('where the job connects it; null: wherever is best'),
  source: text.describe('where the capacitance comes from, and its status'),
});

const detectorSchema = z.strictObject({
  kind: text,
  resistanceKohm: num.describe('in parallel, with what follows it'),
  capacitancePf: num,
  with: text.nullable().describe('what the figures are for; null of one that is stated'),
  to: num.int().nullable().describe('where the job connects it; null: wherever is best'),
  source: text,
});

const rowSchema = z.strictObject({
  kHz: num,
  tap: num.int().describe('switch position that tunes there'),
  tuningPf: num.describe('of the tuning capacitor alone'),
  q: num.describe('loaded'),
  bandwidthKhz: num,
  outputDb: num.describe('power into the detector per source voltage, against the best of the table at this frequency'),
  off9Db: num.describe('what is left of a channel 9 kHz off, the stronger side'),
  off10Db: num,
  off18Db: num,
  off20Db: num,
  dead: z.boolean().describe('a contact lies on turns that are not in use there'),
});

/** Null where the job has no aerial: something coupled as loosely as can be to the hot end stands for it. */
const aerialAt = contactSchema.nullable();

const pairSchema = z.strictObject({
  aerial: aerialAt,
  detector: num.int(),
  rows: z
    .array(rowSchema)
    .describe('over the band, lowest frequency first; frequencies that it cannot tune are left out'),
});

const bestSchema = z.strictObject({
  use: z.enum(['strongest', 'most selective', 'balanced']),
  aerial: aerialAt,
  detector: num.int(),
  outputDb: num.describe('mean over the frequencies, as of the rows'),
  off9Db: num.describe('mean over the frequencies'),
  why: text,
});

export const aroundSchema = z.strictObject({
  second: secondSchema.nullable(),
  aerial: aerialSchema.nullable(),
  detector: detectorSchema.nullable(),
  ranges: z
    .array(
      z.strictObject({
        tap: num.int(),
        lowKhz: num.nullable(),
        highKhz: num.nullable(),
        aerial: aerialAt,
        detector: num.int(),
      }),
    )
    .describe('of every position as it will be in the set, with the balanced pair; null: it tunes nothing near there'),
  channelsKhz: z.array(num).describe('frequencies of the table'),
  pairs: z.array(pairSchema).describe('every aerial contact with every detector tap'),
  best: z.array(bestSchema),
  notes: z.array(text),
});

export type Around = z.infer<typeof aroundSchema>;
export type SecondEntry = z.infer<typeof secondSchema>;
export type AroundPair = z.infer<typeof pairSchema>;
export type AerialEntry = z.infer<typeof aerialSchema>;
export type DetectorEntry = z.infer<typeof detectorSchema>;
export type BestEntry = z.infer<typeof bestSchema>;
export type AerialAt = z.infer<typeof aerialAt>;
