/** What a ribbed former cannot be, with the nearest value that can. */
import type { FaultParts } from '../fault.ts';
import { gableMm, type RibbedDimensions, ringFootMm } from './ribbed-dimensions.ts';

const mm = (x: number) => `${Number(x.toFixed(3))} mm`;
const up = (x: number, steps = 100) => Math.ceil(x * steps - 1e-6) / steps;
const down = (x: number, steps = 100) => Math.floor(x * steps + 1e-6) / steps;

const LEAST_LINES = 3;
const LINES_BESIDE = 4;
const LEAST_LAND_MM = 0.05;
/** Angles and widths of a record are rounded. */
const ROUNDING_MM = 0.02;
/** Between a notch's floor and the inner rings, between inner rings. */
const LEAST_APART_MM = 0.4;
/** Of faces behind one another, so that none coincide. */
const LEAST_BEHIND_MM = 0.1;
/** Least span of an inner ring's underside, so that it is a window. */
const LEAST_GABLE_MM = 0.5;

export function ribFaults(d: RibbedDimensions): FaultParts[] {
  return [...sectionFaults(d), ...notchFaults(d), ...placeFaults(d), ...ringFaults(d)];
}

function sectionFaults(d: RibbedDimensions): FaultParts[] {
  const { count, widthMm, depthMm } = d.ribs;
  const faults: FaultParts[] = [];
  const round = 2 * Math.PI * d.outsideR;
  if (2 * count * widthMm > round + 1e-6)
    faults.push({
      code: 'ribs-no-air',
      got: `${count} ribs ${mm(widthMm)} wide on a circumference of ${mm(round)}`,
      expected: 'as much air as plastic between ribs',
      todo: `take ${Math.floor(round / 2 / widthMm)} ribs, or ribs ${mm(down(round / 2 / count))} wide`,
    });
  const widest = Math.max(0, ...d.holes.map((hole) => hole.diameterMm));
  const least = Math.max(LEAST_LINES * d.lineMm, widest + LINES_BESIDE * d.lineMm);
  if (widthMm < least - 1e-6)
    faults.push({
      code: 'ribs-narrow',
      got: `ribs ${mm(widthMm)} wide with holes of ${mm(widest)}`,
      expected: `two lines of ${mm(d.lineMm)} on either side of a hole`,
      todo: `make the ribs ${mm(up(least))} wide`,
    });
  const shallowest = d.notch.depthMm + LINES_BESIDE * d.lineMm;
  if (depthMm < shallowest - 1e-6)
    faults.push({
      code: 'ribs-shallow',
      got: `ribs ${mm(depthMm)} deep with notches of ${mm(d.notch.depthMm)}`,
      expected: `four lines of ${mm(d.lineMm)} behind the notches`,
      todo: `make the ribs ${mm(up(shallowest))} deep`,
    });
  return faults;
}

function notchFaults(d: RibbedDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  let step = Number.POSITIVE_INFINITY;
  for (const heights of d.notchesMm)
    for (let i = 1; i < heights.length; i++) step = Math.min(step, heights[i]! - heights[i - 1]!);
  const land = step - d.notch.openMm;
  if (land < LEAST_LAND_MM)
    faults.push({
      code: 'ribs-no-land',
      got: `${mm(land)} of land between notches ${mm(d.notch.openMm)} high, ${mm(step)} apart`,
      expected: 'notches that do not run together',
      todo: `use a pitch of ${mm(up(d.notch.openMm + LEAST_LAND_MM))} or more`,
    });
  const low = Math.min(...d.notchesMm.flat()) - d.notch.openMm / 2;
  const high = Math.max(...d.notchesMm.flat()) + d.notch.openMm / 2;
  if (low < d.surfaceFromMm || high > d.surfaceToMm)
    faults.push({
      code: 'ribs-notch-no-room',
      got: `notches from ${mm(low)} to ${mm(high)}`,
      expected: `notches between the end rings, ${mm(d.surfaceFromMm)} to ${mm(d.surfaceToMm)}`,
      todo: `let the upper ring begin at ${mm(up(Math.max(high, d.surfaceToMm)))}, and start the winding at ${mm(up(d.axialMm(0) + Math.max(0, d.surfaceFromMm - low)))}`,
    });
  return faults;
}

/** The two holes of a pair stand on either side of a rib's middle. */
function placeFaults(d: RibbedDimensions): FaultParts[] {
  const step = 360 / d.ribs.count;
  const nearest = (angleDeg: number) => Math.round(angleDeg / step) * step;
  const off = d.holes.filter(({ angleDeg, diameterMm }) => {
    const arc = (Math.abs(angleDeg - nearest(angleDeg)) / 360) * 2 * Math.PI * d.outsideR;
    return arc + diameterMm / 2 + (LINES_BESIDE / 2) * d.lineMm > d.ribs.widthMm / 2 + ROUNDING_MM;
  });
  if (off.length === 0) return [];
  return [
    {
      code: 'ribs-hole-in-air',
      got: off.map((hole) => `hole ${hole.label} at ${hole.angleDeg} degrees`).join(', '),
      expected: `holes in ribs, which stand every ${Number(step.toFixed(3))} degrees from 0`,
      todo: off
        .map((hole) => `move ${hole.label} to ${Number((nearest(hole.angleDeg) % 360).toFixed(3))} degrees`)
        .join(', '),
    },
  ];
}

function ringFaults(d: RibbedDimensions): FaultParts[] {
  const { topsMm, crownMm } = d.ribs.innerRings;
  const faults: FaultParts[] = [];
  const fault = (got: string, expected: string, todo: string) =>
    faults.push({ code: 'ribs-ring-no-room', got, expected, todo });
  const half = Math.PI / d.ribs.count;
  const most = (d.outsideR - d.notch.depthMm - LEAST_APART_MM) * Math.cos(half);
  if (d.ringOuterA > most + 1e-3)
    fault(
      `inner rings ${mm(2 * d.ringOuterA)} across`,
      'inner rings behind the floors of the notches',
      `make them ${mm(down(2 * most))} across`,
    );
  if (gableMm(d, d.ringInnerA) < LEAST_GABLE_MM) {
    const narrow = (LEAST_GABLE_MM + d.ribs.widthMm / 2 / Math.cos(half)) / Math.tan(half);
    fault(
      `inner rings ${mm(2 * d.ringInnerA)} across inside, where ribs nearly meet`,
      'air between ribs at the inner rings',
      `make them ${mm(up(2 * narrow))} across inside`,
    );
  }
  const corner = d.ringCornerR;
  if (d.seatR - corner < (LINES_BESIDE * d.lineMm) / 2 || corner > d.seatR || d.seatR > d.ringOuterA - 0.2)
    fault(
      `inner rings ${mm(2 * d.ringInnerA)} to ${mm(2 * d.ringOuterA)} across under an upper ring that begins ${mm(2 * d.seatR)} wide`,
      'an upper ring that begins inside the flats of the inner ring and outside its inner corners',
      `make the inner rings ${mm(down(2 * (d.seatR - (LINES_BESIDE * d.lineMm) / 2) * Math.cos(half)))} across inside, and let the upper ring begin ${mm(down(2 * (d.ringOuterA - 0.2)))} wide`,
    );
  const behind = d.ribInnerR + (d.ribs.widthMm / 2) * Math.tan(half);
  if (corner < behind + LEAST_BEHIND_MM || d.boreR > d.ribInnerR - LEAST_BEHIND_MM)
    fault(
      `ribs whose inner faces lie at a radius of ${mm(d.ribInnerR)}, a bore of ${mm(d.boreR)} and inner corners at ${mm(corner)}`,
      'ribs behind the bore, and inner rings that do not stand out beside the inner faces of the ribs',
      `make the ribs ${mm(down(d.outsideR - d.boreR - LEAST_BEHIND_MM))} deep at most and the inner rings ${mm(up(2 * (behind + LEAST_BEHIND_MM) * Math.cos(half)))} across inside`,
    );
  let below = d.surfaceFromMm;
  for (const [i, top] of topsMm.entries()) {
    const foot = ringFootMm(d, top);
    if (foot < below + LEAST_APART_MM)
      fault(
        `inner ring ${i + 1}, ${mm(foot)} to ${mm(top)}, over a ring that ends at ${mm(below)}`,
        'a window between rings',
        `let it end at ${mm(up(top + below + LEAST_APART_MM - foot))}`,
      );
    below = top;
  }
  const last = topsMm[topsMm.length - 1]!;
  if (!(last > d.ribs.seatMm + 0.1) || last > d.ribs.seatMm + crownMm / 2)
    fault(
      `an upper ring that begins at ${mm(d.ribs.seatMm)} on an inner ring that ends at ${mm(last)}`,
      'the one let into the other',
      `let the inner ring end at ${mm(d.ribs.seatMm + 0.4)}`,
    );
  const top = d.ribs.seatMm + d.topR - d.seatR + d.former.flange!.upperMm;
  if (Math.abs(top - d.lengthMm) > 0.01)
    fault(
      `a former ${mm(d.lengthMm)} long whose upper ring begins at ${mm(d.ribs.seatMm)}`,
      'an upper ring that widens at 45 degrees to its rim',
      `make the former ${mm(Number(top.toFixed(3)))} long`,
    );
  return faults;
}
