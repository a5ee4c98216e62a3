/** The winding and its taps as the record holds them, from a design. */

import type { CoilShape } from '../coil/coil.ts';
import { angleOf } from '../coil/layout.ts';
import { type Limits, limitsOf, type SpreadInput, WIRE_SPREAD } from '../coil/tolerance.ts';
import type { Job } from '../job/job.ts';
import type { Design, DesignTap } from '../solve/design.ts';
import { spreadOf } from '../solve/spread.ts';
import type { WorkingFigures } from './figures.ts';
import { decimals, mm, significant } from './rounding.ts';
import type { PartsRecord, Tap, UnitTap, Winding } from './schema.ts';
import { LEAD_MM } from './steps.ts';

/** What makes the limits of a tap wide, in words. */
export const INPUT: Record<SpreadInput, string> = {
  diameterMm: 'former diameter',
  pitch: 'pitch',
  bareMm: 'bare wire',
  gap: 'gaps at taps',
  turn: 'place of the tap',
  leadUh: 'lead of the tap',
};

function tapOf(job: Job, design: Design, tap: DesignTap, index: number, limits: Limits, at: WorkingFigures): Tap {
  const { coil, method, taps, unitTaps } = design;
  const { wire } = coil.shape;
  const { turn } = tap;
  const inductanceUh = significant(tap.inductanceUh);
  const targetUh = significant(tap.targetUh);
  // A tap is measured at the end of its own loop, half of which leads there.
  const before = index + unitTaps.length;
  const loops = index < taps.length - 1 ? before + 0.5 : before;
  const loopsM = method.loopInCircuit ? method.loopM * loops : 0;
  const ohm = (bareMm: number) => coil.resistanceOhm(turn, bareMm, loopsM);
  return {
    tap: index + 1,
    turn: decimals(turn, 6),
    positionMm: mm(coil.positionMm(turn)),
    angleDeg: angleOf(turn, job.winding.hand),
    gapMm: index < taps.length - 1 ? mm(method.gapMm) : 0,
    targetUh,
    inductanceUh,
    deviationPercent: decimals(100 * (inductanceUh / targetUh - 1), 3),
    inductanceLowUh: significant(limits.lowUh),
    inductanceHighUh: significant(limits.highUh),
    wireFromStartM: decimals(coil.wireM(turn) + method.loopM * before, 4),
    resistanceDcOhm: significant(ohm(wire.bareMm)),
    resistanceLowOhm: significant(ohm(wire.bareHighMm) * (1 - WIRE_SPREAD)),
    resistanceHighOhm: significant(ohm(wire.bareLowMm) * (1 + WIRE_SPREAD)),
    woundLengthMm: mm(coil.woundMm(turn)),
    dominant: INPUT[limits.dominant],
    ...at,
  };
}

/** All unit taps come before the first of the tens. */
function unitTapOf(job: Job, { coil, method }: Design, turn: number, index: number): UnitTap {
  return {
    unit: index + 1,
    turn: decimals(turn, 6),
    positionMm: mm(coil.positionMm(turn)),
    angleDeg: angleOf(turn, job.winding.hand),
    gapMm: mm(method.gapMm),
    inductanceUh: significant(coil.inductanceUh(turn)),
    wireFromStartM: decimals(coil.wireM(turn) + method.loopM * index, 4),
  };
}

/** Where the turns lie and of what they are: all that the parts need of a winding. */
export function placesOf({ coil, candidate, tension }: Design): PartsRecord['windings'][number] {
  return {
    turns: decimals(coil.turns, 6),
    pitchMm: mm(coil.shape.pitchMm),
    pitchKind: candidate.pitch.kind,
    spacerMm: mm(candidate.pitch.spacerMm),
    turnPositionsMm: Array.from(coil.places, mm),
    startMm: mm(coil.positionMm(0)),
    finishMm: mm(coil.positionMm(coil.turns)),
    meanDiameterMm: mm(coil.shape.meanDiameterMm),
    ...cornersOf(coil.shape),
    wire: { ...candidate.wire },
    tensionHighN: significant(tension.high, 2),
  };
}

/** Keys of a winding from rib to rib; none of a round one. */
function cornersOf({ corners, bendMm = 0 }: CoilShape): Pick<Winding, 'corners' | 'bendMm'> {
  if (corners === undefined) return {};
  return bendMm > 0 ? { corners, bendMm: mm(bendMm) } : { corners };
}

/** The winding of a design; `figures` are those of its taps at work, in order. */
export function windingOf(job: Job, design: Design, figures: readonly WorkingFigures[]): Winding {
  const { coil, candidate, metrics, taps, tension } = design;
  const limits = limitsOf(
    coil,
    taps.map((tap) => tap.turn),
    spreadOf(job, design),
  );
  const list = taps.map((tap, index) => tapOf(job, design, tap, index, limits[index]!, figures[index]!));
  return {
    name: 'main',
    ...placesOf(design),
    spacerName: candidate.pitch.spacerName,
    windingLengthMm: mm(coil.woundMm(coil.turns)),
    wireLengthM: decimals(metrics.wireM, 4),
    leadsM: (2 * LEAD_MM) / 1000,
    wireMassG: significant(metrics.massG, 4),
    resistanceDcOhm: list[list.length - 1]!.resistanceDcOhm,
    inductanceUh: list[list.length - 1]!.inductanceUh,
    selfCapacitancePf: significant(coil.selfPf(coil.turns), 4),
    tensionLowN: significant(tension.low, 2),
    taps: list,
    unitTaps: design.unitTaps.map((turn, index) => unitTapOf(job, design, turn, index)),
  };
}
