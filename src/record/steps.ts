/** The winding in order, from the design: what to do, at which turn, with how much wire used. */
import { STEP } from '../../templates/wording/steps.ts';
import { Coil } from '../coil/coil.ts';
import type { Job } from '../job/job.ts';
import { forcesText, lengthText, wireText } from '../quantity/written.ts';
import type { Design } from '../solve/design.ts';
import { findMaterial } from '../stock/materials.ts';
import { ribName } from './rib-name.ts';
import { decimals } from './rounding.ts';
import type { Former, Step, Winding } from './schema.ts';

/** Wire left free at each end, mm. */
export const LEAD_MM = 200;

/** A turn as people count: 12, 12.25. */
const turnText = (turn: number) => String(decimals(turn, 2));

function placeText(former: Former, turn: number, angleDeg: number): string {
  const whole = Math.floor(turn + 1e-6);
  const rib = ribName(former, angleDeg);
  if (rib !== null) return STEP.turnAndRib(whole, rib);
  return turn - whole < 1e-6 ? STEP.turn(whole) : STEP.turnAndAngle(whole, angleDeg.toFixed(0));
}

function percentPerTenth(design: Design): string {
  const { coil } = design;
  const wider = new Coil({ ...coil.shape, meanDiameterMm: coil.shape.meanDiameterMm + 0.1 });
  return (100 * (wider.inductanceUh(coil.turns) / coil.inductanceUh(coil.turns) - 1)).toFixed(2);
}

/** What softens below this does not stand a soldering iron beside it; phenolic paper and card do. */
const SOFT_BELOW_C = 120;

/** Tubes that are dried and sealed before they are wound; phenolic paper is sealed by its resin. */
const TAKES_WATER = new Set(['card', 'wood']);

/** Whether a soldering iron harms a former of this material. */
function softens(material: string): boolean {
  const found = findMaterial(material);
  return found.ok && (found.material.softensC ?? SOFT_BELOW_C) < SOFT_BELOW_C;
}

/** Which holes are drilled how wide; all alike: one size. */
function drillText(holes: Design['holes'], units: Job['units']): string {
  const sizeOf = (some: Design['holes']) =>
    [...new Set(some.map((hole) => hole.diameterMm))]
      .map((size) => lengthText(size, units, { digits: 2, trim: true }))
      .join(', ');
  const wide = holes.filter((hole) => hole.purpose === 'tap');
  const rest = holes.filter((hole) => hole.purpose !== 'tap');
  const alike = wide.length === 0 || sizeOf(wide) === sizeOf(rest);
  return STEP.holes(holes.length, alike ? sizeOf(rest) : null, sizeOf(wide), sizeOf(rest));
}

export function stepsOf(job: Job, design: Design, winding: Winding): Step[] {
  const { former, method, holes } = design;
  const { units } = job;
  const length = (mm: number, digits: number) => lengthText(mm, units, { digits });
  const steps: Step[] = [];
  const add = (
    kind: Step['kind'],
    text: string,
    place?: { tap?: number; unit?: number; turn: number; wireM: number },
  ) =>
    steps.push({
      step: steps.length + 1,
      kind,
      tap: place?.tap ?? null,
      ...(place?.unit === undefined ? {} : { unit: place.unit }),
      turn: place?.turn ?? null,
      wireM: place?.wireM ?? null,
      text,
    });
  const [joint] = former.joints;
  if (joint) {
    const climbs = former.joints.some(({ climbMm }) => climbMm > 0);
    const { joints, lengthMm } = former;
    add(
      'prepare',
      STEP.glue(joints.length + 1, lengthText(joint.glueGapMm, units, { trim: true }), climbs, length(lengthMm, 1)),
    );
  }
  add('prepare', STEP.measure(length(former.outsideDiameterMm, 2), length(0.1, 1), percentPerTenth(design)));
  if (former.kind === 'tube') add('prepare', STEP.drill(drillText(holes, units)));
  if (former.kind === 'tube' && TAKES_WATER.has(former.material)) add('prepare', STEP.dry);
  if (method.holes === 0 && winding.taps.length > 1) add('prepare', former.ribs === null ? STEP.mark : STEP.markRibs);
  const wire = wireText(winding.wireLengthM + winding.leadsM, units, 1);
  add('prepare', STEP.set(wire, forcesText([winding.tensionLowN, winding.tensionHighN], units)));
  if (winding.pitchKind === 'spacer') add('prepare', STEP.spacer(winding.spacerName));
  add('start', STEP.start(length(LEAD_MM, 0)), { turn: 0, wireM: 0 });
  add('start', STEP.direction[job.winding.hand]);
  let last = 0;
  let checked = false;
  for (const { unit, turn, angleDeg, wireFromStartM } of winding.unitTaps ?? []) {
    const wind = STEP.wind(turnText(turn - last), placeText(former, turn, angleDeg));
    add('tap', `${wind}: ${STEP.unitTap(unit)}`, { unit, turn, wireM: decimals(wireFromStartM, 2) });
    last = turn;
  }
  for (const tap of winding.taps) {
    const whole = tap.tap === winding.taps.length;
    if (!checked && last < 20 && tap.turn > 20 && winding.pitchKind !== 'groove') {
      checked = true;
      add('wind', STEP.check(length(overTwenty(design), 1)), {
        turn: 20,
        wireM: decimals(design.coil.wireM(20) + method.loopM * (tap.tap - 1 + design.unitTaps.length), 2),
      });
    }
    const wind = STEP.wind(turnText(tap.turn - last), placeText(former, tap.turn, tap.angleDeg));
    const then = whole ? STEP.finish(length(LEAD_MM, 0)) : STEP.tap(tap.tap);
    add(whole ? 'finish' : 'tap', whole ? `${wind}. ${then}` : `${wind}: ${then}`, {
      tap: tap.tap,
      turn: tap.turn,
      wireM: decimals(tap.wireFromStartM, 2),
    });
    last = tap.turn;
  }
  if (winding.pitchKind === 'spacer') add('after', STEP.takeSpacer);
  if (winding.taps.length > 1) add('after', STEP.taps[softens(former.material) ? 'soft' : 'firm']);
  if (former.posts.length > 0) add('after', STEP.posts);
  add('after', STEP.afterMeasure);
  const textile = /cotton|silk/.test(winding.wire.covering);
  add('after', textile ? STEP.seal.textile : STEP.seal.other);
  return steps;
}

/** Edge to edge over turns 1 to 20, measured along one line between taps. */
export function overTwenty(design: Design): number {
  const { places, shape } = design.coil;
  return places[19]! - places[0]! + shape.wire.overallMm;
}
