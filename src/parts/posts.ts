/** Posts for the leads of lugs: fins from the foot up along the wall, each with an eye across it. */
import type { Former } from '../record/schema.ts';
import type { FormerDimensions } from './dimensions.ts';
import { at, PROUD_MM, teardrop } from './holes.ts';
import { rectangle } from './shapes.ts';
import type { Loft, Point2, Point3 } from './solid.ts';

type Post = Former['posts'][number];

/** The foot carries posts that do not reach beyond it; others stand on the bed. */
export function standsOnFoot(d: FormerDimensions, post: Post): boolean {
  return d.outsideR + post.reachMm <= d.footR;
}

/** Underside of a post: within the foot, or the bed. */
function underMm(d: FormerDimensions, post: Post): number {
  return standsOnFoot(d, post) ? d.surfaceFromMm / 2 : 0;
}

export const postTopMm = (d: FormerDimensions, post: Post): number => d.surfaceFromMm + post.heightMm;

export function postAdders(d: FormerDimensions): Loft[] {
  return d.former.posts.map((post) => {
    const inner = d.outsideR - Math.min(1, (d.outsideR - d.boreR) / 2);
    const ring = (z: number, inset: number): Point3[] => {
      const length = d.outsideR + post.reachMm - inner - inset;
      const outline: Point2[] = rectangle(inner, -post.widthMm / 2 + inset, length, post.widthMm - 2 * inset);
      return outline.map(([x, y]) => at(post.angleDeg, x, y, z));
    };
    const under = underMm(d, post);
    const c = under === 0 ? d.chamferMm : 0;
    const rings = c > 0 ? [ring(0, c), ring(c, 0)] : [ring(under, 0)];
    return { kind: 'loft', name: `post ${post.label}`, rings: [...rings, ring(postTopMm(d, post), 0)], hubs: null };
  });
}

export function eyeCutters(d: FormerDimensions): Loft[] {
  return d.former.posts.map((post) => {
    const shape = teardrop(post.eyeMm);
    const across = post.widthMm / 2 + PROUD_MM;
    const ring = (y: number) =>
      shape.map(([x, z]) => at(post.angleDeg, d.outsideR + post.eyeReachMm + x, y, post.axialMm + z));
    return { kind: 'loft', name: `eye ${post.label}`, rings: [ring(-across), ring(across)], hubs: null };
  });
}

/** What the posts add: what stands out of the wall above the foot or the bed, less the eye and a chamfer at the bed. */
export function postsVolume(d: FormerDimensions): number {
  let sum = 0;
  for (const post of d.former.posts) {
    const { widthMm: w, reachMm, eyeMm } = post;
    const r = d.outsideR;
    // A chord's segment of the wall lies before the flat inner end.
    const segment = r * r * Math.asin(w / (2 * r)) - (w / 2) * Math.sqrt(r * r - (w * w) / 4);
    const area = w * (r + reachMm - Math.sqrt(r * r - (w * w) / 4)) - segment;
    const from = standsOnFoot(d, post) ? d.surfaceFromMm : 0;
    const c = from === 0 ? d.chamferMm : 0;
    sum += area * (postTopMm(d, post) - from) - (eyeMm / 2) ** 2 * (0.75 * Math.PI + 1) * w;
    sum -= ((w + 2 * reachMm) * c * c) / 2;
  }
  return sum;
}
