/**
 * What a former cannot be: reasons to refuse it before a mesh is made. The planner chooses dimensions that pass; these
 * catch a record that was written or changed by hand.
 */
import { Fault, type FaultParts } from '../fault.ts';
import { type FormerDimensions, roofMm, webMm } from './dimensions.ts';
import { baseFaults, earFaults, postFaults, ridgeFaults } from './room-fittings.ts';

const mm = (x: number) => `${Number(x.toFixed(3))} mm`;

/** @throws Fault with exit 4 that lists every reason at once. */
export function requireRoom(d: FormerDimensions): void {
  const checks = [wallFaults, surfaceFaults, grooveFaults, holeFaults, earFaults, baseFaults, postFaults, ridgeFaults];
  const faults = checks.flatMap((check) => check(d));
  if (faults.length > 0) throw new Fault(4, faults);
}

function wallFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  const left = d.outsideR - d.boreR - (d.groove?.depthMm ?? 0);
  if (!(d.boreR > 0) || !(left >= 2 * d.lineMm))
    faults.push({
      code: 'former-wall-thin',
      got: `a wall of ${mm(left)} under the winding (outside ${mm(2 * d.outsideR)}, bore ${mm(2 * d.boreR)})`,
      expected: `at least two printed lines, ${mm(2 * d.lineMm)}, and a bore`,
      todo: `make the wall ${mm(2 * d.lineMm + (d.groove?.depthMm ?? 0))} or thicker, or the groove shallower`,
    });
  if (!Number.isInteger(d.segments) || d.segments < 24 || d.segments % 4 !== 0)
    faults.push({
      code: 'former-segments',
      got: `${d.segments} chords round the former`,
      expected: 'a multiple of four, 24 or more',
      todo: 'use 144 for a former of about 80 mm',
    });
  if (d.footR < d.outsideR)
    faults.push({
      code: 'former-flange-small',
      got: `a flange of ${mm(2 * d.footR)} on an outside of ${mm(2 * d.outsideR)}`,
      expected: 'a flange wider than the outside',
      todo: 'make the flange wider or leave it out',
    });
  return faults;
}

function surfaceFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  const wound = d.holes.filter((hole) => hole.purpose !== 'anchor' && hole.purpose !== 'mount');
  const top = Math.max(d.axialMm(0), ...wound.map((hole) => hole.axialMm + roofMm(hole.diameterMm)));
  const short = top - d.surfaceToMm;
  if (short > 1e-9)
    faults.push({
      code: 'former-rim-no-room',
      got: `the last hole ends ${mm(short)} above the winding surface, which ends at ${mm(d.surfaceToMm)}`,
      expected: 'the slope under the upper rim begins above the last hole',
      todo: `make the former ${mm(Math.ceil(short * 10) / 10)} longer, or the flange smaller`,
    });
  return faults;
}

function grooveFaults(d: FormerDimensions): FaultParts[] {
  const { groove } = d;
  if (!groove) return [];
  const faults: FaultParts[] = [];
  const half = groove.floorMm / 2 + groove.depthMm;
  const low = d.axialMm(groove.fromTurn) - half;
  const high = d.axialMm(groove.toTurn) + half;
  if (low < d.surfaceFromMm || high > d.surfaceToMm)
    faults.push({
      code: 'former-groove-no-room',
      got: `a groove from ${mm(low)} to ${mm(high)}`,
      expected: `a groove between foot and top, ${mm(d.surfaceFromMm)} to ${mm(d.surfaceToMm)}`,
      todo: 'make the former longer or the run-in of the groove shorter',
    });
  if (groove.toTurn - groove.fromTurn < 1.5)
    faults.push({
      code: 'former-groove-short',
      got: `a groove of ${groove.toTurn - groove.fromTurn} turns`,
      expected: 'at least a turn and a half',
      todo: 'wind so few turns on a smooth former',
    });
  let land = Number.POSITIVE_INFINITY;
  for (let u = groove.fromTurn; u + 1 <= groove.toTurn; u += 0.125)
    land = Math.min(land, d.axialMm(u + 1) - d.axialMm(u) - 2 * half);
  if (land < 0.05)
    faults.push({
      code: 'former-groove-no-land',
      got: `${mm(land)} of land between neighbouring grooves`,
      expected: 'grooves that do not run together',
      todo: 'use a greater pitch, a shallower groove, or wind close on a smooth former',
    });
  return faults;
}

function holeFaults(d: FormerDimensions): FaultParts[] {
  const faults: FaultParts[] = [];
  for (const hole of d.holes) {
    const r = hole.diameterMm / 2;
    const under = hole.axialMm - r - d.chamferMm;
    const over = d.lengthMm - hole.axialMm - roofMm(hole.diameterMm);
    if (!(r > 0) || r > 0.6 * d.boreR || under < d.lineMm || over < d.lineMm)
      faults.push({
        code: 'former-hole-no-room',
        got: `hole ${hole.label} of ${mm(hole.diameterMm)} at ${mm(hole.axialMm)}`,
        expected: `a hole inside the wall of a former ${mm(d.lengthMm)} long with a bore of ${mm(2 * d.boreR)}`,
        todo: 'move the hole, or make it smaller',
      });
  }
  for (const [i, a] of d.holes.entries())
    for (const b of d.holes.slice(i + 1)) {
      const clear = webMm(a, b, d.boreR);
      if (clear <= 0)
        faults.push({
          code: 'former-holes-meet',
          got: `holes ${a.label} and ${b.label} run together by ${mm(-clear)} at the bore`,
          expected: 'material between neighbouring holes',
          todo: 'stagger the taps, use a greater pitch or smaller holes',
        });
    }
  return faults;
}
