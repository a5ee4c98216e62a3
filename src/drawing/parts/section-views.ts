/**
 * Views of the sections of a former that is put together from several: each from outside with the start hole in front, from
 * above, its surface developed, and cut through its keys. Heights are those of the whole former, so that a section is drawn
 * where it will stand. Sizes are those that should come out.
 */
import { shareOf } from '../../coil/seam.ts';
import { type FormerDimensions, formerDimensions } from '../../parts/dimensions.ts';
import { type Bored, boredIn, type JointDimensions, jointDimensions } from '../../parts/joint-dimensions.ts';
import { formerSkin } from '../../parts/skin.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { Box } from '../boxes.ts';
import { clipped } from '../clip.ts';
import { circle, line, polygon, polyline } from '../shapes.ts';
import type { Callout, Mark, Span, View } from '../views.ts';
import { said, type Wording } from '../words.ts';
import { developed, holeSizes } from './former-developed.ts';
import { elevation } from './former-elevation.ts';
import { endView } from './former-end-view.ts';
import { callout, degrees, mark, mm, type Point, round, span } from './sizes.ts';

const RAD = Math.PI / 180;
/** Steps of a drawn seam. */
const STEP_DEG = 3;
type Shapes = View['shapes'][number];
type Profile = readonly { readonly rMm: number; readonly zMm: number }[];

/** A section with its joints: the one it stands in by its spigot, and the one that its tongue reaches into. */
interface Section {
  readonly d: FormerDimensions;
  readonly record: PartsRecord;
  readonly below: JointDimensions | null;
  readonly above: JointDimensions | null;
  readonly holes: readonly Bored[];
  readonly index: number;
}

/** The views by part: `former-1` is the lowest. */
export function sectionViews(record: PartsRecord): Record<string, View[]> {
  const exact = { ...record, printer: { ...record.printer, holeCompensationMm: 0 } };
  const d = formerDimensions(exact);
  const joints = jointDimensions(exact);
  const holes = d.holes.map((hole) => boredIn(hole, joints, d));
  return Object.fromEntries(
    [null, ...joints].map((below, index) => {
      const section = { d, record: exact, below, above: joints[index] ?? null, holes, index };
      return [`former-${index + 1}`, [outside(section), fromAbove(section), rolledOut(section), cut(section)]];
    }),
  );
}

/** Z of a seam on the outside at an angle. */
const seamZ = (d: FormerDimensions, joint: JointDimensions, angleDeg: number) =>
  joint.seamAt(shareOf(joint.keyDeg, angleDeg, d.hand));

/** Either side of a step, degrees. */
const BESIDE_DEG = 1e-6;

/** Angles from one to another, both a hair inside, with the two sides of the key between them: steps are drawn upright. */
function anglesPast(keyDeg: number, from: number, to: number): number[] {
  const angles = [from + BESIDE_DEG, to - BESIDE_DEG];
  for (let a = from + STEP_DEG; a < to; a += STEP_DEG) angles.push(a);
  for (const key of [keyDeg - 360, keyDeg, keyDeg + 360])
    if (key > from + BESIDE_DEG && key < to - BESIDE_DEG) angles.push(key - BESIDE_DEG, key + BESIDE_DEG);
  return angles.sort((a, b) => a - b);
}

/** A seam as it is seen in front, from the left edge to the right. */
function seamInFront(d: FormerDimensions, joint: JointDimensions): Point[] {
  return anglesPast(joint.keyDeg, -90, 90).map((a): Point => [d.outsideR * Math.sin(a * RAD), seamZ(d, joint, a)]);
}

/** What of the far side of a seam stands higher than the near side. */
function seamBehind(d: FormerDimensions, joint: JointDimensions): Shapes[] {
  const runs: Point[][] = [[]];
  for (const a of anglesPast(180 - joint.keyDeg, -90, 90)) {
    const z = seamZ(d, joint, 180 - a);
    if (z > seamZ(d, joint, a) + 0.01) runs.at(-1)!.push([d.outsideR * Math.sin(a * RAD), z]);
    else if (runs.at(-1)!.length > 0) runs.push([]);
  }
  return runs.filter((points) => points.length > 1).map((points) => polyline(points, 'hair'));
}

/** The part of a turned profile between two heights, from below. Both lie where the profile is the winding surface. */
function between(profile: Profile, r: number, from: number | null, to: number | null): Point[] {
  const inner = profile
    .filter(({ zMm }) => (from === null || zMm > from) && (to === null || zMm < to))
    .map(({ rMm, zMm }): Point => [rMm, zMm]);
  return [...(from === null ? [] : [[r, from] as Point]), ...inner, ...(to === null ? [] : [[r, to] as Point])];
}

/** Lower end of a section and the highest point of it. */
function ends({ d, below, above }: Section): [number, number] {
  return [below?.endMm ?? 0, above === null ? d.lengthMm : above.seamAt(1)];
}

/** The spigot's profile at the right, from its end to the seam at a height on the outside. */
function spigotProfile(d: FormerDimensions, j: JointDimensions, seam: number): Point[] {
  return [
    [j.spigotR - j.chamferMm, j.endMm],
    [j.spigotR, j.endMm + j.chamferMm],
    [j.spigotR, seam - (d.outsideR - j.spigotR)],
  ];
}

function outside(section: Section): View {
  const { d, record, below, above, holes, index } = section;
  const { outer } = formerSkin(d);
  const side = (angleDeg: number): Point[] => {
    const low = below && seamZ(d, below, angleDeg);
    const high = above && seamZ(d, above, angleDeg);
    return [...(below ? spigotProfile(d, below, low!) : []), ...between(outer, d.outsideR, low, high)];
  };
  const left = side(-90).map(([r, z]): Point => [-r, z]);
  const top = above ? seamInFront(d, above) : [];
  const [low, high] = ends(section);
  const edge = below ? below.seamAt(0) : 0;
  const wide = Math.max(d.footR, d.topR) + 100;
  const shapes: Shapes[] = [
    polygon([...side(90), ...top.toReversed(), ...left.toReversed()], 'outline'),
    ...(below ? [polyline(seamInFront(d, below), 'outline'), ...notchSeen(below)] : []),
    ...(above ? seamBehind(d, above) : []),
    // The body's outline comes first and the axis last in the view of the whole.
    ...within(elevation(d, record).shapes.slice(1, -1), { left: -wide, right: wide, bottom: edge, top: high }),
    ...holes
      .filter(({ hole, section: own, spigotOf }) => (own === index || spigotOf === index) && inFront(hole.angleDeg))
      .map(({ hole, section: own }) => {
        const r = own === index ? d.outsideR : below!.spigotR;
        const more = own === index ? 0 : record.printer.clearanceMm;
        const x = r * Math.sin(hole.angleDeg * RAD);
        return circle(x, hole.axialMm, (hole.diameterMm + more) / 2, 'thin', 1, `hole ${hole.label}`);
      }),
    line(0, low - 3, 0, high + 3, 'hair', 'centre'),
  ];
  return { title: 'elevation', shapes, dimensions: outsideSizes(section) };
}

const inFront = (angleDeg: number) => Math.cos(angleDeg * RAD) > -1e-9;

/** What lies in a window; holes are drawn by the section they belong to. */
function within(shapes: readonly Shapes[], window: Box): Shapes[] {
  const lines = shapes.filter((shape) => shape.shape !== 'circle');
  return clipped(lines, window, { width: () => 0 }).filter((shape) => shape.shape !== 'text');
}

/** The notch in the spigot, where it is in front. */
function notchSeen(j: JointDimensions): Shapes[] {
  if (Math.cos(j.keyDeg * RAD) < 0.2) return [];
  const at = (t: number, z: number): Point => [j.spigotR * Math.sin(j.keyDeg * RAD) + t * Math.cos(j.keyDeg * RAD), z];
  const half = j.notchWidthMm / 2;
  const points = [at(-half, j.endMm), at(-half, j.notchToMm), at(0, j.notchToMm + half), at(half, j.notchToMm)];
  return [polyline([...points, at(half, j.endMm)], 'thin')];
}

function outsideSizes(section: Section): View['dimensions'] {
  const { d, below, above } = section;
  const { outsideR: r } = d;
  const [low, high] = ends(section);
  const [from, to] = [below ? below.seamMm : d.surfaceFromMm, above ? above.seamMm : d.surfaceToMm];
  const waist = (from + to) / 2;
  const dimensions: (Span | Callout)[] = [
    span('y', [-(below?.spigotR ?? d.footR), low], [-(above ? r : d.topR), high], 'left', mm(high - low)),
    span('x', [-r, waist], [r, waist], 'below', round(2 * r)),
  ];
  if (below) {
    dimensions.unshift(span('y', [-below.spigotR, low], [-r, from], 'left', mm(from - low)));
    dimensions.push(
      span('x', [-below.spigotR, low], [below.spigotR, low], 'below', said`${round(2 * below.spigotR)} spigot`),
    );
  } else if (d.footR > r) dimensions.push(span('x', [-d.footR, 0], [d.footR, 0], 'below', round(2 * d.footR)));
  if (!above && d.topR > r)
    dimensions.push(span('x', [-d.topR, d.lengthMm], [d.topR, d.lengthMm], 'above', round(2 * d.topR)));
  for (const joint of [below, above])
    if (joint) dimensions.push(callout([r, seamZ(d, joint, 90)], 'right', seamWords(joint)));
  return dimensions;
}

/** Where the seam lies and how it runs. */
function seamWords(joint: JointDimensions): Wording {
  const key = said`key at ${degrees(joint.keyDeg)}, ${mm(joint.seamMm)} above the datum`;
  return joint.turn === null ? said`flat seam, ${key}` : said`seam, climbs ${mm(joint.climbMm)} a turn, ${key}`;
}

/** A place from above, the start hole at the bottom; `t` beside the radius. */
const place = (angleDeg: number, r: number, t = 0): Point => [
  r * Math.sin(angleDeg * RAD) + t * Math.cos(angleDeg * RAD),
  -r * Math.cos(angleDeg * RAD) + t * Math.sin(angleDeg * RAD),
];

/** From above: foot fittings belong to the lowest section, the upper rim to the highest. */
function fromAbove({ d, below, above }: Section): View {
  const { former } = d;
  const view = endView({
    ...d,
    topR: above ? d.outsideR : d.topR,
    footR: below ? d.outsideR : d.footR,
    screws: below ? [] : d.screws,
    former: below ? { ...former, ears: [], posts: [], base: null, datumMark: null } : former,
  });
  const shapes: Shapes[] = [...view.shapes];
  const dimensions: (Span | Callout | Mark)[] = [...view.dimensions];
  if (above) {
    const [half, r] = [above.tongueWidthMm / 2, above.boreR - above.tongueReachMm];
    const at = (t: number) => [place(above.keyDeg, d.boreR, t), place(above.keyDeg, r, t)] as const;
    shapes.push(polyline([...at(-half), ...at(half).toReversed()], 'thin'));
    const words = said`tongue ${mm(above.tongueWidthMm)} wide, out ${mm(above.tongueReachMm)}, at ${degrees(above.keyDeg)}`;
    dimensions.push(callout(place(above.keyDeg, r), 'left', words));
  }
  if (below) {
    const half = below.notchWidthMm / 2;
    shapes.push(circle(0, 0, below.ringR, 'thin'));
    const at = (t: number) => [place(below.keyDeg, below.spigotR, t), place(below.keyDeg, below.ringR, t)] as const;
    for (const t of [-half, half]) shapes.push(line(...at(t)[0], ...at(t)[1], 'hair', 'dashed'));
    const words = said`notch ${mm(below.notchWidthMm)} wide in the spigot, at ${degrees(below.keyDeg)}`;
    dimensions.push(
      callout(place(below.keyDeg, (below.spigotR + below.ringR) / 2), 'left', words),
      span('x', [-below.ringR, 0], [below.ringR, 0], 'above', said`${round(2 * below.ringR)} spigot inside`),
    );
  }
  return { title: 'end view', shapes, dimensions };
}

/** The winding surface between the seams. */
function rolledOut(section: Section): View {
  const { d, record, below, above, holes, index } = section;
  const whole = developed(d, record);
  const half = Math.PI * d.outsideR;
  const x = (angleDeg: number) => ((((angleDeg + 180) % 360) + 360) % 360) * (half / 180) - half;
  const edge = (joint: JointDimensions | null, flat: number): Point[] =>
    joint === null
      ? [
          [-half, flat],
          [half, flat],
        ]
      : anglesPast(joint.keyDeg, -180, 180).map((a): Point => [(a * half) / 180, seamZ(d, joint, a)]);
  const [low, high] = [edge(below, d.surfaceFromMm), edge(above, d.surfaceToMm)];
  const own = holes.filter(({ section: of }) => of === index).map(({ hole }) => hole);
  const at = (points: readonly Point[]) => points.map(([, z]) => z);
  const window = {
    left: -half,
    right: half,
    bottom: Math.min(...at(low)),
    top: Math.max(...at(high)),
  };
  const [right, up] = [low.at(-1)!, high.at(-1)!];
  return {
    title: 'developed surface',
    shapes: [
      polygon([...low, ...high.toReversed()], 'outline'),
      ...within(whole.shapes.slice(1), window),
      ...own.map((hole) =>
        circle(x(hole.angleDeg), hole.axialMm, hole.diameterMm / 2, 'thin', undefined, `hole ${hole.label}`),
      ),
    ],
    dimensions: [
      span('x', low[0]!, right, 'below', mm(2 * half)),
      span('y', right, up, 'right', mm(up[1] - right[1])),
      ...holeSizes(own, x),
      ...own.map((hole) => mark([x(hole.angleDeg) + hole.diameterMm / 2, hole.axialMm], hole.label)),
      ...(below
        ? []
        : d.former.posts.map((post) => mark([x(post.angleDeg) + post.widthMm / 2, post.axialMm], post.label))),
    ],
  };
}

/** The wall cut through its keys: the spigot open where the notch is, the tongue in the bore. */
function cut(section: Section): View {
  const { d, below, above } = section;
  const { outer, inner } = formerSkin(d);
  const [low, high] = ends(section);
  const wall = d.outsideR - d.boreR;
  const roof = below && below.notchToMm + below.notchWidthMm / 2;
  const points: Point[] = [
    ...(below
      ? ([
          [below.ringR, roof!],
          [below.spigotR, roof!],
          [below.spigotR, below.seamMm - (d.outsideR - below.spigotR)],
        ] as Point[])
      : []),
    ...between(outer, d.outsideR, below?.seamMm ?? null, above?.seamMm ?? null),
    ...(above ? [[d.boreR, above.seamMm - wall] as Point] : []),
    ...inner
      .filter(({ zMm }) => (!above || zMm < above.seamMm - wall) && (!below || zMm > below.collarEndMm))
      .map(({ rMm, zMm }): Point => [rMm, zMm]),
    ...(below
      ? ([
          [d.boreR, below.collarEndMm],
          [below.ringR, below.collarMm],
        ] as Point[])
      : []),
  ];
  const shapes: Shapes[] = [
    polygon(points, 'outline', 0.9),
    line(0, low - 3, 0, high + 3, 'hair', 'centre'),
    ...(below ? spigotBeside(below, roof!) : []),
    ...(above ? [tongueCut(above)] : []),
  ];
  return { title: 'section', shapes, dimensions: cutSizes(section) };
}

/** The spigot beside the notch, seen past the cut. */
function spigotBeside(j: JointDimensions, roof: number): Shapes[] {
  const outline: Point[] = [
    [j.ringR, roof],
    [j.ringR, j.endMm],
    [j.spigotR - j.chamferMm, j.endMm],
    [j.spigotR, j.endMm + j.chamferMm],
    [j.spigotR, roof],
  ];
  return [polyline(outline, 'thin'), line(j.ringR, j.notchToMm, j.spigotR, j.notchToMm, 'hair')];
}

function tongueCut(j: JointDimensions): Shapes {
  const r = j.boreR - j.tongueReachMm;
  const outline: Point[] = [
    [j.boreR, j.tongueFromMm - j.tongueReachMm],
    [j.boreR, j.tongueToMm],
    [r, j.tongueToMm],
    [r, j.tongueFromMm],
  ];
  return polygon(outline, 'outline', 0.9);
}

function cutSizes({ d, below, above }: Section): View['dimensions'] {
  const wall = d.outsideR - d.boreR;
  const dimensions: (Span | Callout | Mark)[] = [];
  if (below) {
    const inside = below.seamMm - wall;
    dimensions.push(
      span('y', [below.ringR, below.endMm], [below.spigotR, inside], 'left', mm(inside - below.endMm)),
      span('y', [below.ringR, below.endMm], [below.ringR, below.collarMm], 'left', mm(below.collarMm - below.endMm)),
      callout(
        [below.spigotR, (below.endMm + inside) / 2],
        'right',
        said`spigot, ${mm(below.glueGapMm)} for glue on the radius`,
      ),
      callout(
        [below.ringR, below.notchToMm],
        'below',
        said`notch up to ${mm(below.notchToMm - below.endMm)}, roof 45°`,
      ),
    );
  }
  if (above) {
    const r = above.boreR - above.tongueReachMm;
    dimensions.push(
      span('y', [r, above.tongueFromMm], [r, above.tongueToMm], 'left', mm(above.tongueToMm - above.tongueFromMm)),
      callout([r, above.tongueFromMm], 'below', said`tongue, out ${mm(above.tongueReachMm)}`),
      callout([d.outsideR, above.seamMm], 'right', 'seam falls inwards at 45°'),
    );
  }
  return dimensions;
}
