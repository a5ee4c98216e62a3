/** What ears, base, posts and ridges of a former cannot be: reasons to refuse a record that was written or changed by hand. */
import type { FaultParts } from '../fault.ts';
import { angleBetween, type FormerDimensions, roofMm } from './dimensions.ts';
import { earHalfRootMm, earOverlapMm } from './holes.ts';
import { postTopMm } from './posts.ts';

const mm = (x: number) => `${Number(x.toFixed(3))} mm`;
const RAD = Math.PI / 180;
/** Up to where a nearest value is given: next tenth of a millimetre. */
const upTenth = (x: number) => mm(Math.ceil(x * 10 - 1e-6) / 10);

export function earFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  for (const ear of d.former.ears) {
    const r = ear.holeDiameterMm / 2;
    if (ear.widthMm / 2 - r < 2 * d.lineMm || ear.centreRadiusMm - r < d.footR || ear.thicknessMm <= 2 * d.chamferMm)
      faults.push({
        code: 'former-ear-no-room',
        got: `an ear ${mm(ear.widthMm)} wide and ${mm(ear.thicknessMm)} thick, its hole of ${mm(ear.holeDiameterMm)} at radius ${mm(ear.centreRadiusMm)}`,
        expected: `two lines round the hole, and the hole outside the foot (radius ${mm(d.footR)})`,
        todo: `make the ear ${upTenth(2 * r + 4 * d.lineMm)} wide or wider, its hole at radius ${upTenth(d.footR + r)} or farther out`,
      });
    const mark = d.former.datumMark;
    const half = earHalfRootMm(ear, d.footR - earOverlapMm(d)) + (mark?.widthMm ?? 0);
    if (mark && angleBetween(mark.angleDeg, ear.angleDeg) * RAD * d.footR < half)
      faults.push({
        code: 'former-ear-hides-datum',
        got: `an ear at ${ear.angleDeg} degrees`,
        expected: `ears clear of the datum mark at ${mark.angleDeg} degrees`,
        todo: 'turn the ears',
      });
  }
  return faults;
}

export function baseFaults(d: FormerDimensions): FaultParts[] {
  const { base, datumMark } = d.former;
  if (base === null) return [];
  const faults: FaultParts[] = [];
  const hole = base.holeDiameterMm;
  const circle = base.circleDiameterMm;
  const least = 2 * d.topR + 2 * hole;
  if (circle < least)
    faults.push({
      code: 'former-base-no-room',
      got: `screws of ${mm(hole)} on a circle of ${mm(circle)}`,
      expected: `a circle on which their heads, twice as wide, pass the top of the former (${mm(2 * d.topR)})`,
      todo: `use a circle of ${upTenth(least)} or more`,
    });
  const rim = circle + hole + 4 * d.lineMm;
  if (base.diameterMm < rim || base.thicknessMm <= 2 * d.chamferMm)
    faults.push({
      code: 'former-base-small',
      got: `a base of ${mm(base.diameterMm)}, ${mm(base.thicknessMm)} thick`,
      expected: 'two lines outside its screw holes, and more than its chamfers in thickness',
      todo: `make it ${upTenth(rim)} wide and ${upTenth(2 * d.chamferMm + 1)} thick, or more`,
    });
  if (base.holes < 2 || circle * Math.sin(Math.PI / base.holes) < 2 * hole)
    faults.push({
      code: 'former-base-holes',
      got: `${base.holes} screws with heads of ${mm(2 * hole)} on a circle of ${mm(circle)}`,
      expected: 'two or more whose heads lie side by side',
      todo: `use 2 to ${Math.max(2, Math.floor(Math.PI / Math.asin(Math.min(1, (2 * hole) / circle))))}`,
    });
  // The notch at the edge and a hole nearest to it on the same radius.
  const marked = datumMark !== null && d.screws.some((s) => angleBetween(s.angleDeg, datumMark.angleDeg) < 1);
  if (marked)
    faults.push({
      code: 'former-base-hides-datum',
      got: `a screw hole at ${datumMark.angleDeg} degrees`,
      expected: 'screw holes clear of the datum mark',
      todo: 'turn the ring of holes',
    });
  return faults;
}

export function postFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  const { posts } = d.former;
  const lowest = Math.min(...d.holes.map((hole) => hole.axialMm - hole.diameterMm / 2), d.surfaceToMm);
  for (const [i, post] of posts.entries()) {
    const eye = post.eyeMm;
    const outer = post.reachMm - post.eyeReachMm - eye / 2;
    const under = post.axialMm - eye / 2 - d.surfaceFromMm;
    const over = postTopMm(d, post) - post.axialMm - roofMm(eye);
    const web = 2 * d.lineMm - 0.01;
    if (!(eye > 0) || outer < web || post.eyeReachMm < eye / 2 || under < d.lineMm || over < web || post.widthMm < web)
      faults.push({
        code: 'former-post-no-room',
        got: `post ${post.label}: an eye of ${mm(eye)} with ${mm(outer)} outside it, ${mm(under)} under and ${mm(over)} over it`,
        expected: `two printed lines, ${mm(2 * d.lineMm)}, outside and over the eye, one under it`,
        todo: `make the post reach out ${upTenth(post.eyeReachMm + eye / 2 + 2 * d.lineMm)} and stand ${upTenth(post.axialMm + roofMm(eye) + 2 * d.lineMm - d.surfaceFromMm)} high`,
      });
    if (postTopMm(d, post) + d.lineMm > lowest)
      faults.push({
        code: 'former-post-tall',
        got: `post ${post.label} up to ${mm(postTopMm(d, post))}`,
        expected: `posts below the lowest hole of the wall, which begins at ${mm(lowest)}`,
        todo: `lower it to ${mm(Math.max(0, Math.floor((lowest - d.lineMm - d.surfaceFromMm) * 10) / 10))} over the foot, or raise the winding`,
      });
    for (const other of posts.slice(i + 1)) {
      const middleR = d.outsideR + post.reachMm / 2;
      const apart = 2 * middleR * Math.sin((angleBetween(post.angleDeg, other.angleDeg) * RAD) / 2);
      const need = (post.widthMm + other.widthMm) / 2 + 2;
      if (apart < need)
        faults.push({
          code: 'former-posts-close',
          got: `posts ${post.label} and ${other.label}, ${mm(apart)} apart`,
          expected: `room for a wire between posts: ${mm(need)} from middle to middle`,
          todo: 'set them farther apart',
        });
    }
  }
  return faults;
}

export function ridgeFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  for (const ridge of d.ridges) {
    const low = d.axialMm(ridge.fromTurn) + ridge.footMm;
    const high = d.axialMm(ridge.toTurn) + ridge.footMm + ridge.widthMm;
    const turns = ridge.toTurn - ridge.fromTurn;
    const { heightMm, widthMm } = ridge;
    if (low < d.surfaceFromMm || high > d.surfaceToMm || !(turns > 0.02 && turns < 1) || d.groove !== null)
      faults.push({
        code: 'former-ridge-no-room',
        got: `a ${ridge.end} ridge from ${mm(low)} to ${mm(high)}, ${Number(turns.toFixed(3))} of a turn`,
        expected: `less than a turn between ${mm(d.surfaceFromMm)} and ${mm(d.surfaceToMm)} of a smooth former`,
        todo: 'make the former longer, or leave the ridges out',
      });
    if (!(heightMm > 0) || widthMm < heightMm + 0.05)
      faults.push({
        code: 'former-ridge-steep',
        got: `a ridge ${mm(heightMm)} high and ${mm(widthMm)} wide`,
        expected: 'a ridge wider than it is high: its underside rises at 45 degrees',
        todo: `make it ${upTenth(heightMm + 0.2)} wide`,
      });
  }
  return faults;
}
