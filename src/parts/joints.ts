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
import { shareOf } from '../coil/seam.ts';
import type { Hole, PartsRecord } from '../record/schema.ts';
import type { FormerDimensions } from './dimensions.ts';
import { wallCutters } from './holes.ts';
import { boredIn, type JointDimensions, jointDimensions, requireJointRoom } from './joint-dimensions.ts';
import { sectionVolumes } from './joints-volume.ts';
import { prism } from './shapes.ts';
import type { Cutter, Loft, Point2, Point3, Prism, Skin, Solid } from './solid.ts';

const RAD = Math.PI / 180;
const PROUD_MM = 1;
/** What is set into a wall reaches so far into it. */
const INTO_MM = 0.3;
/** Half the arc over which the step of a seam leans, so that its faces slide on one another as the joint is closed. */
const STEP_LEAN_MM = 0.05;

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
