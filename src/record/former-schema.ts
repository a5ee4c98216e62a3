/** The former in the record: every dimension that part, template and sheets use. Keys end in their unit. */
import * as z from 'zod';

const text = z.string();
const num = z.number();

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

export type Former = z.infer<typeof formerSchema>;
