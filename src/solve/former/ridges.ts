/**
 * Ridges that a close winding on a smooth printed former leans on: two low helical shelves, each over most of a turn. The
 * first turn lies on the start ridge, so that the winding sets out at its pitch and does not creep down to the foot.
 *
 * The finish ridge stands over the last turn that the finish row allows for, not over the last one of the plan: turns that
 * are added in trimming take the place between, and nothing is in their way. Without a finish row to trim by it stands
 * over the last turn itself. Until then it stops turns that come loose before they are fixed.
 *
 * Both are half a wire high, flat above and sloping at 45 degrees below, so that they print without supports. The printer
 * makes their slant in steps of a layer: on wire thinner than one and a half layers such a step would lift a turn out of its
 * row, and there are none.
 */
import type { Coil } from '../../coil/coil.ts';
import { angleOf } from '../../coil/layout.ts';
import type { Former, Hole } from '../../record/schema.ts';
import type { Around } from './around.ts';

type Ridges = NonNullable<Former['ridges']>;
type Run = Omit<NonNullable<Ridges['start']>, 'footMm'>;

/** Lower than this a ridge does not show in the print; it may then be as high as the wire. */
const LEAST_HEIGHT_MM = 0.2;
/** A winding whose pitch is no more than this over its wire is a close one. */
const CLOSE = 1.06;
const LEAST_LAYERS = 1.5;
/** Between a ridge and a hole. */
const CLEAR_MM = 0.8;
/** Places looked at in a turn, and the shortest ridge that guides. */
const STEPS = 120;
const SHORTEST_TURNS = 0.25;
/** A wire against a slope of 45 degrees touches it when the slope's foot is so many radii from its middle. */
const SLOPE_FOOT = Math.SQRT2 - 1;

/** Height and width of the ridges, or null where there are none. */
export function ridgeSize(around: Around): { heightMm: number; widthMm: number } | null {
  const { job, overallMm: wire, grooved, pitchMm } = around;
  const { layerMm, lineMm } = job.printer;
  const plain = job.former.kind === 'printed' && job.former.body === 'full' && !grooved;
  if (!plain || pitchMm > CLOSE * wire || wire < LEAST_LAYERS * layerMm) return null;
  const heightMm = Math.max(wire / 2, Math.min(wire, LEAST_HEIGHT_MM));
  const widthMm = Math.max(2 * lineMm, heightMm + 2 * layerMm);
  return { heightMm: Math.round(100 * heightMm) / 100, widthMm: Math.round(100 * widthMm) / 100 };
}

/** Z of the ridge's lower edge on the winding surface, from the middle of the wire that leans on it. */
export function ridgeFootMm(end: 'start' | 'finish', wireMm: number, widthMm: number): number {
  return end === 'start' ? -wireMm / 2 - widthMm : (SLOPE_FOOT * wireMm) / 2;
}

/** The ridges, each as long as the holes leave it within its turn. `lastTurn` is where a winding may end at most. */
export function ridgesFor(around: Around, coil: Coil, holes: readonly Hole[], lastTurn: number): Former['ridges'] {
  const size = ridgeSize(around);
  if (size === null) return null;
  const { hand } = around.job.winding;
  const clearOf = (end: 'start' | 'finish', turn: number): boolean => {
    const low = coil.positionMm(turn) + ridgeFootMm(end, around.overallMm, size.widthMm);
    const angle = angleOf(turn, hand);
    return holes.every((hole) => {
      const apart = Math.abs(angle - hole.angleDeg) % 360;
      const arc = (Math.min(apart, 360 - apart) / 360) * Math.PI * around.outsideMm;
      const r = hole.diameterMm / 2;
      return (
        arc > r + CLEAR_MM ||
        hole.axialMm + Math.SQRT2 * r < low - CLEAR_MM ||
        hole.axialMm - r > low + size.widthMm + CLEAR_MM
      );
    });
  };
  const ridge = (end: 'start' | 'finish', from: number): Ridges['start'] => {
    const run = longestRun(from, (turn) => clearOf(end, turn));
    const footMm = ridgeFootMm(end, around.overallMm, size.widthMm);
    return run && { ...run, footMm: Math.round(1e4 * footMm) / 1e4 };
  };
  const start = ridge('start', 0);
  const finish = ridge('finish', lastTurn - 1);
  return start === null && finish === null ? null : { ...size, start, finish };
}

/** The longest part of the turn after `from` in which every place will do; null when it is short. */
function longestRun(from: number, willDo: (turn: number) => boolean): Run | null {
  let best: Run | null = null;
  let begun: number | null = null;
  for (let k = 1; k <= STEPS; k++) {
    const turn = from + k / STEPS;
    if (k < STEPS && willDo(turn)) begun ??= turn;
    else if (begun !== null) {
      const toTurn = from + (k - 1) / STEPS;
      if (best === null || toTurn - begun > best.toTurn - best.fromTurn) best = { fromTurn: begun, toTurn };
      begun = null;
    }
  }
  if (best === null || best.toTurn - best.fromTurn < SHORTEST_TURNS) return null;
  return { fromTurn: round6(best.fromTurn), toTurn: round6(best.toTurn) };
}

const round6 = (x: number) => Math.round(x * 1e6) / 1e6;
