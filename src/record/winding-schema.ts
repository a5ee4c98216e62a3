/** The winding in the record: wire, taps with their figures, turns where they lie. Keys end in their unit. */
import * as z from 'zod';
import { COVERINGS } from '../stock/wire.ts';

const text = z.string();
const num = z.number();

const wireSchema = z.strictObject({
  name: text.describe('size and covering, as a person would ask for it'),
  covering: z.enum(COVERINGS),
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

const tapSchema = z.strictObject({
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
  curve: z
    .array(
      z.strictObject({
        capacitancePf: num.describe('of the set across the position: capacitor, stray, aerial'),
        frequencyKhz: num,
      }),
    )
    .describe('frequency against capacitance, from capacitor out to in in equal ratios; empty without a set'),
});

const unitTapSchema = z.strictObject({
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
  meanDiameterMm: num.describe('twice the radius of the wire centre, on a ribbed former over a rib'),
  corners: num
    .int()
    .optional()
    .describe('ribs from which to which the wire runs straight; absent: the turns are round'),
  bendMm: num.optional().describe('radius at which the wire centre bends over a rib; absent: sharp corners'),
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

export type Winding = z.infer<typeof windingSchema>;
export type Tap = z.infer<typeof tapSchema>;
export type UnitTap = z.infer<typeof unitTapSchema>;
