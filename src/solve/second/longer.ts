/** A design whose former is longer at an end, by as much as a second winding beyond the main one takes. */
import { Coil } from '../../coil/coil.ts';
import type { Job } from '../../job/job.ts';
import type { Former, Hole } from '../../record/schema.ts';
import type { Design } from '../design.ts';
import { splitOf } from '../joints.ts';
import { longestMm } from '../search.ts';
import { reachOf } from './main-coil.ts';
import type { Spread } from './room.ts';

export type Longer =
  | { readonly design: Design; readonly shiftMm: number }
  /** What the former would be too long by, and why it cannot be. */
  | { readonly overMm: number; readonly lengthMm: number; readonly why: string };

const halfUp = (value: number) => Math.ceil(value * 2 - 1e-9) / 2;

/**
 * `span` is what the second winding takes on the former and `added` are its holes, in the frame of the design as it is. With it below,
 * the main winding moves up; `shiftMm` is by how much. Seams keep clear of the whole span.
 */
export function lengthened(job: Job, design: Design, span: Spread, way: 1 | -1, added: readonly Hole[]): Longer {
  const reach = reachOf(design);
  const extra = Math.max(0, halfUp(way > 0 ? span.highMm - reach.highMm : reach.lowMm - span.lowMm));
  const shiftMm = way > 0 ? 0 : extra;
  const { former, coil, holes, metrics } = design;
  const lengthMm = former.lengthMm + extra;
  const allowed = longestMm(job);
  if (lengthMm > allowed + 1e-9) return { overMm: lengthMm - allowed, lengthMm, why: `${allowed} mm are allowed` };
  const moved: Coil =
    shiftMm === 0
      ? coil
      : new Coil(
          { ...coil.shape, startMm: coil.shape.startMm + shiftMm },
          Array.from(coil.places, (z) => z + shiftMm),
        );
  const movedHoles: Hole[] = [...holes, ...added].map((hole) => ({ ...hole, axialMm: hole.axialMm + shiftMm }));
  const whole: Former = { ...former, lengthMm, joints: [] };
  const split = splitOf({
    former: whole,
    holes: movedHoles,
    hand: job.winding.hand,
    overallMm: coil.shape.wire.overallMm,
    axialMm: (turn) => moved.positionMm(turn),
    keepClear: { lowMm: span.lowMm + shiftMm, highMm: span.highMm + shiftMm },
    mostMm: job.former.longestMm,
    printer: job.printer,
  });
  if ('none' in split) return { overMm: lengthMm - job.printer.heightMm, lengthMm, why: split.none };
  const { working: _, ...rest } = design;
  return {
    shiftMm,
    design: {
      ...rest,
      coil: moved,
      holes: movedHoles,
      former: { ...whole, joints: split.joints },
      metrics: {
        ...metrics,
        lengthMm,
        volumeMm3: (Math.PI / 4) * former.outsideDiameterMm ** 2 * lengthMm,
      },
    },
  };
}
