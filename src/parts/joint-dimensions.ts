/** Named dimensions of a former's joints, which hole belongs to which section, and what no joint can be. Lengths in mm. */
import {
  collarEndMm,
  collarMm,
  innerSeamMm,
  type Joining,
  joiningOf,
  type Seam,
  seamMm,
  shareOf,
  spigotEndMm,
} from '../coil/seam.ts';
import { Fault } from '../fault.ts';
import type { Hole, PartsRecord } from '../record/schema.ts';
import { type FormerDimensions, formerDimensions, roofMm } from './dimensions.ts';

/** The first layers spread; a spigot with a sharp lower edge would not go in. */
const SPIGOT_CHAMFER_MM = 0.5;
/** Between the lower end of the spigot and that of the tongue. */
const TONGUE_BACK_MM = 0.5;
/** Between the end of the tongue and the roof of the notch, so that the seam closes first. */
const TONGUE_CLEAR_MM = 0.3;
/** Plastic of the spigot that stays between the point of the notch and the seam. */
const OVER_NOTCH_MM = 0.5;

/** A joint with all its dimensions, at its place in the whole former. */
export interface JointDimensions extends Joining, Seam {
  readonly keyDeg: number;
  readonly glueGapMm: number;
  /** Lower end of the spigot. */
  readonly endMm: number;
  readonly chamferMm: number;
  /** Top of the collar's straight part, and of its run back to the bore. */
  readonly collarMm: number;
  readonly collarEndMm: number;
  /** The straight part of the tongue; below it runs out at 45 degrees. */
  readonly tongueFromMm: number;
  readonly tongueToMm: number;
  /** Where the roof of the notch begins. */
  readonly notchToMm: number;
  /** Z of the seam on the outside, a share of a turn on from the key. */
  readonly seamAt: (share: number) => number;
}

/** The joints of a former from below; none for one that is printed whole. */
export function jointDimensions(record: PartsRecord): JointDimensions[] {
  const d = formerDimensions(record);
  return record.former.joints.map((joint) => {
    const j = joiningOf(d.outsideR, d.boreR, joint.glueGapMm, record.printer);
    const notchToMm = innerSeamMm(joint, j) - joint.glueGapMm - OVER_NOTCH_MM - j.notchWidthMm / 2;
    const endMm = spigotEndMm(joint, j);
    return {
      ...joint,
      ...j,
      endMm,
      chamferMm: SPIGOT_CHAMFER_MM,
      collarMm: collarMm(joint),
      collarEndMm: collarEndMm(joint, j),
      tongueFromMm: endMm + TONGUE_BACK_MM + j.tongueReachMm,
      tongueToMm: notchToMm - TONGUE_CLEAR_MM,
      notchToMm,
      seamAt: (share: number) => seamMm(joint, d.axialMm, share),
    };
  });
}

/** Which section a hole of the wall belongs to, and the section above whose spigot it goes through too. */
export interface Bored {
  readonly hole: Hole;
  readonly section: number;
  readonly spigotOf: number | null;
}

/** @throws Fault (exit 4) for a hole that a seam meets */
export function boredIn(hole: Hole, joints: readonly JointDimensions[], d: FormerDimensions): Bored {
  let section = 0;
  let spigotOf: number | null = null;
  for (const [i, joint] of joints.entries()) {
    const top = joint.seamAt(shareOf(joint.keyDeg, hole.angleDeg, d.hand));
    const low = hole.axialMm - hole.diameterMm / 2;
    const high = hole.axialMm + roofMm(hole.diameterMm);
    if (low > top) section = i + 1;
    else if (high > top - (d.outsideR - d.boreR)) throw meets(joint, hole);
    else if (high > joint.endMm) spigotOf = i + 1;
  }
  return { hole, section, spigotOf };
}

function meets(joint: JointDimensions, hole: Hole): Fault {
  return new Fault(4, {
    code: 'former-joint-meets-hole',
    got: `a seam at ${joint.seamMm} mm, its key at ${joint.keyDeg} degrees, and hole ${hole.label} at ${hole.axialMm} mm`,
    expected: 'a seam that falls through the wall clear of every hole',
    todo: 'plan the coil again, or move the seam by a turn or its key by some degrees',
  });
}

/** @throws Fault (exit 4) for a joint that finds no room */
export function requireJointRoom(d: FormerDimensions, joints: readonly JointDimensions[]): void {
  for (const [i, joint] of joints.entries()) {
    const from = i === 0 ? d.chamferMm : joints[i - 1]!.collarEndMm;
    const to = d.surfaceToMm;
    const most = Math.max(joint.seamMm + joint.climbMm, joint.collarEndMm + d.surfaceToMm - d.lengthMm);
    if (joint.endMm > from && joint.seamMm > d.surfaceFromMm && most < to && joint.ringR > d.boreR / 2) continue;
    throw new Fault(4, {
      code: 'former-joint-no-room',
      got: `a seam at ${joint.seamMm} mm, its spigot down to ${joint.endMm.toFixed(2)} mm in a bore of ${2 * d.boreR} mm`,
      expected: `a spigot that begins above ${from.toFixed(2)} mm and a seam below ${to.toFixed(2)} mm`,
      todo: 'plan the coil again, or move the seam',
    });
  }
}
