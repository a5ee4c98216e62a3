/**
 * A former in sections. Each is the whole former, cut at the seam above it and at the seam below it:
 *
 *     upper section      |   |          collar: the spigot goes on above the seam and runs back to the bore at 45 degrees
 *                       /    |
 *                 bore |    /           seam: falls inwards at 45 degrees, so that nothing of the upper section hangs over
 *                      | | /|
 *     spigot           | |  |  lower section, its tongue in the notch of the spigot
 *                      |_|  |
 *
 * The upper section is printed standing on its spigot, the lower on its own foot or spigot; angles stay those of the
 * record. Cutters of a seam are one closed ring each, stood proud of everything they cut.
 */
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
import { wallCutters } from './holes.ts';
import { sectionVolumes } from './joints-volume.ts';
import { prism } from './shapes.ts';
import type { Cutter, Loft, Point2, Point3, Prism, Skin, Solid } from './solid.ts';

const RAD = Math.PI / 180;
const PROUD_MM = 1;
/** What is set into a wall reaches so far into it. */
const INTO_MM = 0.3;
/** Half the arc over which the step of a seam leans, so that its faces slide on one another as the joint is closed. */
const STEP_LEAN_MM = 0.05;
/** The first layers spread; a spigot with a sharp lower edge would not go in. */
const SPIGOT_CHAMFER_MM = 0.5;
/** Between the lower end of the spigot and that of the tongue. */
const TONGUE_BACK_MM = 0.5;
/** Between the end of the tongue and the roof of the notch, so that the seam closes first. */
const TONGUE_CLEAR_MM = 0.3;
/** Plastic of the spigot that stays between the point of the notch and the seam. */
const OVER_NOTCH_MM = 0.5;

/** A joint with all its dimensions, at its place in the whole former. Lengths in mm. */
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
interface Bored {
  readonly hole: Hole;
  readonly section: number;
  readonly spigotOf: number | null;
}

/**
 * The sections of a whole former, lowest first.
 * @throws Fault (exit 4) for a joint that meets a hole or finds no room
 */
export function formerSections(record: PartsRecord, d: FormerDimensions, whole: Solid, body: Skin): Solid[] {
  const joints = jointDimensions(record);
  requireJointRoom(d, joints);
  const bored = d.holes.map((hole) => boredIn(hole, joints, d));
  const names = new Set(wallCutters(d).map(({ name }) => name));
  const others = whole.cutters.filter(({ name }) => !names.has(name));
  const volumes = sectionVolumes(d, whole, body, joints, bored);
  const count = joints.length + 1;
  return volumes.map((volumeMm3, i) => {
    const below = joints[i - 1];
    const above = joints[i];
    const own = bored.filter(({ section }) => section === i).map(({ hole }) => hole);
    const through = bored.filter(({ spigotOf }) => spigotOf === i).map(({ hole }) => widened(hole, record));
    const cutters: Cutter[] = [...others, ...wallCutters({ ...d, holes: [...own, ...through] })];
    if (below) cutters.push(belowCutter(below, d, whole), notchCutter(below));
    if (above) cutters.push(aboveCutter(above, d, whole));
    const elsewhere = whole.expected.genus - 1 - d.holes.length;
    const genus = 1 + own.length + through.length + (i === 0 ? elsewhere : 0);
    return {
      ...whole,
      part: `former-${i + 1}`,
      name: `Former, section ${i + 1} of ${count} from below`,
      shapes: [...whole.shapes, ...(below ? [spigot(below, d)] : []), ...(above ? [tongue(above)] : [])],
      cutters,
      // As a mesh holds it, so that the lower end comes to lie on 0 and not beside it.
      lowerMm: Math.fround(below?.endMm ?? 0),
      expected: {
        bodies: 1,
        genus,
        genusIs: `1 bore, ${own.length} holes in the wall, ${through.length} in the spigot, ${i === 0 ? elsewhere : 0} others`,
        ...box(whole, body, d, below, above),
        volumeMm3,
      },
      use: `${whole.use}; ${gluedTo(i, count)}`,
      printNote: i === 0 ? whole.printNote : whole.printNote.replace('standing on the foot', 'standing on the spigot'),
    };
  });
}

function gluedTo(i: number, count: number): string {
  const to = [...(i > 0 ? [`into former-${i}`] : []), ...(i < count - 1 ? [`under former-${i + 2}`] : [])];
  return `glued ${to.join(' and ')}`;
}

/** A hole in a spigot lies behind one in the wall; wider, so that the two pass a wire where they do not quite meet. */
const widened = (hole: Hole, record: PartsRecord): Hole => ({
  ...hole,
  diameterMm: hole.diameterMm + record.printer.clearanceMm,
});

function boredIn(hole: Hole, joints: readonly JointDimensions[], d: FormerDimensions): Bored {
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

function requireJointRoom(d: FormerDimensions, joints: readonly JointDimensions[]): void {
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

/** Ring and collar, before the seam is cut round them. */
function spigot(j: JointDimensions, d: FormerDimensions): Skin {
  const out = j.boreR + INTO_MM;
  const rim = j.boreR + INTO_MM / 2;
  const c = j.chamferMm;
  const top = j.collarMm + rim - j.ringR;
  return {
    kind: 'skin',
    segments: d.segments,
    hand: d.hand,
    outer: [
      { rMm: j.spigotR - c, zMm: j.endMm },
      { rMm: out, zMm: j.endMm + c + out - j.spigotR },
      { rMm: out, zMm: top },
    ],
    inner: [
      { rMm: rim, zMm: top },
      { rMm: j.ringR, zMm: j.collarMm },
      { rMm: j.ringR, zMm: j.endMm },
    ],
    groove: null,
  };
}

function tongue(j: JointDimensions): Prism {
  const [r, reach, half] = [j.boreR, j.tongueReachMm, j.tongueWidthMm / 2];
  const outline: Point2[] = [
    [r + INTO_MM, j.tongueFromMm - reach - INTO_MM],
    [r + INTO_MM, j.tongueToMm],
    [r - reach, j.tongueToMm],
    [r - reach, j.tongueFromMm],
  ];
  return prism('tongue', [outline], -half, half, {
    origin: [0, 0, 0],
    x: [Math.cos(j.keyDeg * RAD), Math.sin(j.keyDeg * RAD), 0],
    y: [0, 0, 1],
  });
}

/** Open at the bed, with a roof at 45 degrees. */
function notchCutter(j: JointDimensions): Prism {
  const half = j.notchWidthMm / 2;
  const outline: Point2[] = [
    [-half, j.endMm - PROUD_MM],
    [half, j.endMm - PROUD_MM],
    [half, j.notchToMm],
    [0, j.notchToMm + half],
    [-half, j.notchToMm],
  ];
  return prism('notch', [outline], j.ringR - PROUD_MM, j.boreR + INTO_MM, {
    origin: [0, 0, 0],
    x: [-Math.sin(j.keyDeg * RAD), Math.cos(j.keyDeg * RAD), 0],
    y: [0, 0, 1],
  });
}

/** All that lies below a seam, outside the spigot. */
function belowCutter(j: JointDimensions, d: FormerDimensions, whole: Solid): Loft {
  const far = widest(whole) + PROUD_MM;
  const low = whole.expected.minMm[2] - PROUD_MM;
  return seamRing('below the seam', j, d, (z) => [
    [j.spigotR, z - (j.outsideR - j.spigotR)],
    [j.spigotR, low],
    [far, low],
    [far, z + PROUD_MM],
    [j.outsideR + PROUD_MM, z + PROUD_MM],
  ]);
}

/** All that lies above a seam. */
function aboveCutter(j: JointDimensions, d: FormerDimensions, whole: Solid): Loft {
  const far = widest(whole) + PROUD_MM;
  const high = whole.expected.maxMm[2] + PROUD_MM;
  const near = j.boreR - PROUD_MM;
  return seamRing('above the seam', j, d, (z) => [
    [near, z - (j.outsideR - near)],
    [near, high],
    [far, high],
    [far, z + PROUD_MM],
    [j.outsideR + PROUD_MM, z + PROUD_MM],
  ]);
}

/** Farthest that anything of the former stands from the axis. */
function widest({ expected: { minMm, maxMm } }: Solid): number {
  const [x, y] = [0, 1].map((i) => Math.max(-minMm[i]!, maxMm[i]!)) as [number, number];
  return Math.hypot(x, y) + PROUD_MM;
}

/** A ring round the axis whose section follows the seam; at the key two rings of points make its step. */
function seamRing(name: string, j: JointDimensions, d: FormerDimensions, section: (z: number) => Point2[]): Loft {
  const n = d.segments;
  const turn = d.hand === 'right' ? 1 : -1;
  const lean = j.turn === null ? 0 : STEP_LEAN_MM / j.outsideR;
  const ring = (share: number, lead: number): Point3[] => {
    const a = j.keyDeg * RAD + turn * (2 * Math.PI * share + lead);
    return section(j.seamAt(share)).map(([r, z]) => [r * Math.cos(a), r * Math.sin(a), z]);
  };
  const rings = Array.from({ length: n }, (_, i) => ring(i / n, i === 0 ? lean : 0));
  if (j.turn !== null) rings.push(ring(1, -lean));
  return { kind: 'loft', name, rings, joined: true, hubs: null };
}

/** Extremes of what of the whole lies between two seams; lowered on to the bed. */
function box(
  whole: Solid,
  body: Skin,
  d: FormerDimensions,
  below: JointDimensions | undefined,
  above: JointDimensions | undefined,
): Pick<Solid['expected'], 'minMm' | 'maxMm'> {
  const inside = ([x, y, z]: Point3) => {
    const over = (joint: JointDimensions) => z - joint.seamAt(shareOf(joint.keyDeg, Math.atan2(y, x) / RAD, d.hand));
    return (below === undefined || over(below) > 0) && (above === undefined || over(above) < 0);
  };
  const rims = body.outer.filter(({ rMm, zMm }) => inside([rMm, 0, zMm])).map(({ rMm }) => rMm);
  const r = Math.max(d.outsideR, ...rims) * Math.cos(Math.PI / d.segments);
  const points = whole.shapes.flatMap((shape) => (shape.kind === 'loft' ? shape.rings.flat() : [])).filter(inside);
  const extreme = (of: (...values: number[]) => number, i: number, round: number) =>
    points.reduce((most, point) => of(most, point[i]!), round);
  const top = above === undefined ? whole.expected.maxMm[2] : seamTopMm(above, d);
  return {
    minMm: [extreme(Math.min, 0, -r), extreme(Math.min, 1, -r), 0],
    maxMm: [extreme(Math.max, 0, r), extreme(Math.max, 1, r), top - (below?.endMm ?? 0)],
  };
}

/** Highest of a seam: columns of the body stand half a chord beside those of the seam, a little outside its flats. */
function seamTopMm(j: JointDimensions, d: FormerDimensions): number {
  const half = Math.PI / d.segments;
  const sag = j.outsideR * (1 - Math.cos(half));
  return Math.max(j.seamAt(1 - 0.5 / d.segments) + sag / Math.cos(half), j.seamAt(1) - sag);
}
