/**
 * Named dimensions of what the second winding is wound on: a plain tube that is printed standing, P1 below. Heights are those of the part,
 * from its lower edge, which lies at `lowMm` of the record; angles are the record's.
 */
import { Fault } from '../fault.ts';
import type { SecondPlaces } from '../record/around-second.ts';
import type { PartsRecord } from '../record/schema.ts';
import { roofMm } from './dimensions.ts';
import { chordsFor } from './shapes.ts';

/** Between a hole and a rim. */
const RIM_GAP_MM = 0.2;
/** A rim is as thick as this at its edge, where there is room. */
const RIM_MM = 1.2;
/** The least that prints as a rim. */
const LEAST_RIM_MM = 0.3;
/** Higher than the wire by this, so that an end turn does not climb over it. */
const RIM_OVER_MM = 0.4;
const CHAMFER_MM = 0.4;

/** A rim: its flat side towards the winding below it, a slope of 45 degrees above it, so that both print without supports. */
export interface Rim {
  readonly fromMm: number;
  readonly toMm: number;
  /** Its underside rises from here at 45 degrees; the same as `fromMm` for one on the bed. */
  readonly slopeFromMm: number;
}

export interface SecondHole {
  readonly label: string;
  readonly angleDeg: number;
  readonly zMm: number;
  /** As it is modelled: wider than the record's by the printer's compensation. */
  readonly diameterMm: number;
}

/** All in mm. */
export interface SecondDimensions {
  readonly part: 'sleeve' | 'inner-former' | 'beside-former';
  readonly insideMm: number;
  readonly outsideMm: number;
  readonly lengthMm: number;
  readonly chamferMm: number;
  /** Over the winding surface; 0 without rims. */
  readonly rimMm: number;
  readonly lowerRim: Rim | null;
  readonly upperRim: Rim | null;
  readonly holes: readonly SecondHole[];
  /** Wire centres of the first and the last turn. */
  readonly firstTurnMm: number;
  readonly lastTurnMm: number;
  readonly segments: number;
}

const PARTS = { sleeve: 'sleeve', inner: 'inner-former', beside: 'beside-former' } as const;

/** The second winding and what it is wound on. @throws Fault (exit 4) `no-second-former` without one */
export function secondOnItsOwn({ around }: PartsRecord): {
  second: SecondPlaces;
  body: NonNullable<SecondPlaces['body']>;
} {
  const second = around?.second ?? null;
  if (second !== null && second.body !== null) return { second, body: second.body };
  throw new Fault(4, {
    code: 'no-second-former',
    place: { key: 'parts' },
    got: second === null ? 'a job without a second winding' : 'a second winding on the former of the main one',
    expected: 'second.kind: sleeve, inner or beside',
    todo: 'leave second former and carriage out of parts, or add a second winding of such a kind',
  });
}

/** @throws Fault (exit 4) `no-second-former` */
export function secondDimensions(record: PartsRecord): SecondDimensions {
  const { second, body } = secondOnItsOwn(record);
  const more = record.printer.holeCompensationMm;
  const { lowMm, lengthMm, insideDiameterMm, outsideDiameterMm } = body;
  const holes = second.holes.map(({ label, angleDeg, axialMm, diameterMm }) => ({
    label,
    angleDeg,
    zMm: axialMm - lowMm,
    diameterMm: diameterMm + more,
  }));
  const wallMm = (outsideDiameterMm - insideDiameterMm) / 2;
  const chamferMm = Math.min(CHAMFER_MM, wallMm / 4);
  const belowMm = Math.min(...holes.map(({ zMm, diameterMm }) => zMm - diameterMm / 2)) - RIM_GAP_MM;
  const aboveMm = Math.max(...holes.map(({ zMm, diameterMm }) => zMm + roofMm(diameterMm))) + RIM_GAP_MM;
  // In a bore a rim must not be higher than the wire, which has been reckoned with.
  const wanted = second.wire.overallMm + (second.kind === 'inner' ? 0 : RIM_OVER_MM);
  const rimMm = Math.min(wanted, lengthMm - aboveMm - LEAST_RIM_MM, belowMm - chamferMm);
  const has = rimMm >= LEAST_RIM_MM;
  return {
    part: PARTS[second.kind as keyof typeof PARTS],
    insideMm: insideDiameterMm,
    outsideMm: outsideDiameterMm,
    lengthMm,
    chamferMm,
    rimMm: has ? rimMm : 0,
    lowerRim: has ? lowerRim(belowMm, rimMm) : null,
    upperRim: has ? upperRim(aboveMm, rimMm, lengthMm) : null,
    holes,
    firstTurnMm: (second.turnPositionsMm[0] ?? second.startMm) - lowMm,
    lastTurnMm: (second.turnPositionsMm.at(-1) ?? second.finishMm) - lowMm,
    // Whole quarters, so that the box has the same size every way.
    segments: 4 * Math.ceil(chordsFor(outsideDiameterMm / 2) / 4),
  };
}

/** Down to the bed where that is near. */
function lowerRim(toMm: number, rimMm: number): Rim {
  const fromMm = toMm - RIM_MM;
  if (fromMm - rimMm < RIM_MM) return { fromMm: 0, toMm, slopeFromMm: 0 };
  return { fromMm, toMm, slopeFromMm: fromMm - rimMm };
}

/** Up to the top where that is near. */
function upperRim(slopeFromMm: number, rimMm: number, lengthMm: number): Rim {
  const fromMm = slopeFromMm + rimMm;
  const toMm = lengthMm - (fromMm + RIM_MM) < RIM_MM ? lengthMm : fromMm + RIM_MM;
  return { fromMm, toMm, slopeFromMm };
}
