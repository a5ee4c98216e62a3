/**
 * Posts for the leads of lugs. A lug sits under its turn in the middle of the winding, where nothing can stand; what tears
 * it off is a pull on its lead. So every lead is led down to the foot, through the eye of a post and once round it, and
 * goes on from there: the post takes the pull, and what is soldered is soldered beyond it, off the plastic.
 *
 * A post is a fin that grows out of the wall below the start of the winding, on the lower rim or on the bed itself, so
 * that it prints without supports, is held on two sides, and stands in nobody's way while the coil is wound. It stands at
 * its tap's angle, or as near to it as room for fingers allows; taps in one line are set out in their order.
 */
import { angleOf, type Hand } from '../../coil/layout.ts';
import type { Former } from '../../record/schema.ts';
import { type Around, footMm } from './around.ts';

/** Eye for a lead of up to 0.75 square millimetres with its sleeve (common practice). */
const EYE_MM = 1.8;
/** Plastic between eye and winding surface, under the eye, and over its roof. */
const INNER_MM = 1;
const UNDER_MM = 1.5;
/** Between two posts, for fingers; and the least, for pliers. */
const APART_MM = 4;
const LEAST_APART_MM = 2.5;
/** Beside the datum mark. */
const BESIDE_DATUM_MM = 2;

export type Post = Former['posts'][number];
type PostSize = Pick<Post, 'widthMm' | 'reachMm' | 'heightMm' | 'eyeMm' | 'eyeReachMm' | 'axialMm'>;

/** Sizes that all posts share. `heightMm` is over the foot, `axialMm` that of the eye over the datum. */
export function postSize(around: Around): PostSize {
  const { lineMm: line, holeCompensationMm } = around.job.printer;
  // The model's eye is wider by the compensation, and the lines are counted in the model.
  const eyeHalf = (EYE_MM + Math.max(0, holeCompensationMm)) / 2;
  const eyeReachMm = INNER_MM + EYE_MM / 2;
  const eyeUpMm = UNDER_MM + EYE_MM / 2;
  return {
    widthMm: Math.max(2.4, Math.round(400 * line) / 100),
    reachMm: Math.ceil((eyeReachMm + eyeHalf + 2 * line) * 100 - 1e-6) / 100,
    heightMm: Math.ceil((eyeUpMm + EYE_MM * Math.SQRT1_2 + UNDER_MM) * 2) / 2,
    eyeMm: EYE_MM,
    eyeReachMm,
    axialMm: footMm(around) + eyeUpMm,
  };
}

/** Places of the posts, or how much room they would take round the foot and how much there is, mm. */
export type Placed = { readonly posts: readonly Post[] } | { readonly needMm: number; readonly haveMm: number };

/** One post a tap below the whole coil; none without lugs. `unitTaps` are those of a units switch. */
export function postsFor(around: Around, taps: readonly number[], hand: Hand, unitTaps: readonly number[]): Placed {
  if (!around.lugs) return { posts: [] };
  const size = postSize(around);
  const marks = [
    ...unitTaps.map((turn, index) => ({ label: `u${index + 1}`, tap: null, turn })),
    ...taps.slice(0, -1).map((turn, index) => ({ label: `${index + 1}`, tap: index + 1, turn })),
  ];
  const round = Math.PI * (around.outsideMm + size.reachMm);
  const from = size.widthMm / 2 + BESIDE_DATUM_MM;
  const wanted = marks
    .map((mark) => ({ ...mark, arc: (round * angleOf(mark.turn, hand)) / 360 }))
    .sort((a, b) => a.arc - b.arc || a.turn - b.turn);
  const have = round - 2 * from;
  const gaps = Math.max(1, wanted.length - 1);
  const step = Math.min(size.widthMm + APART_MM, have / gaps);
  const least = size.widthMm + LEAST_APART_MM;
  if (step < least - 1e-9) return { needMm: gaps * least + 2 * from, haveMm: round };
  const arcs = setApart(
    wanted.map(({ arc }) => arc),
    step,
    from,
    round - from,
  );
  const posts = wanted.map(({ label, tap }, i) => ({
    label,
    tap,
    angleDeg: Math.round((3600 * arcs[i]!) / round) / 10,
    ...size,
  }));
  return { posts };
}

/** Ascending places moved on, and back from the end, until neighbours are a step apart. */
function setApart(wanted: readonly number[], step: number, from: number, to: number): number[] {
  const places: number[] = [];
  for (const want of wanted) places.push(Math.max(want, places.length === 0 ? from : places.at(-1)! + step));
  let limit = to;
  for (let i = places.length - 1; i >= 0; i--) {
    places[i] = Math.min(places[i]!, limit);
    limit = places[i]! - step;
  }
  return places;
}
