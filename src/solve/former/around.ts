/** What a former is made round, and the sizes that all its pieces share. */
import type { Job } from '../../job/job.ts';
import { type RibSection, ribRimMm } from '../ribs.ts';

/** How far a rim stands out over the winding surface, and how thick rims, ears and base are. */
export const RIM_MM = 4;
export const FLANGE_MM = 3;

export interface Around {
  readonly job: Job;
  readonly outsideMm: number;
  readonly grooved: boolean;
  readonly overallMm: number;
  readonly pitchMm: number;
  readonly tensionN: number;
  /** Taps of a printed former are made with lugs, whose leads are tied to posts at the foot. */
  readonly lugs: boolean;
  /** Of a ribbed body; absent or null for a full one. */
  readonly ribs?: RibSection | null;
}

/** Depth and floor of a groove for this wire: half a wire deep, so that the wire's centre lies at the outside diameter. */
export function grooveFor(overallMm: number): { depthMm: number; floorMm: number; widthMm: number } {
  const depthMm = overallMm / 2;
  // A wire on a flat floor between flanks of 45 degrees touches all three when the floor is 2 (sqrt 2 - 1) radii wide.
  const floorMm = overallMm * (Math.SQRT2 - 1);
  return { depthMm, floorMm, widthMm: floorMm + 2 * depthMm };
}

/** Thickness of what stands round the foot: a lower rim, ears or a base; 0 for a plain tube. */
export function footMm({ job }: Around): number {
  const { flanges, mounting, kind, body } = job.former;
  // A ribbed body stands on its lower end ring.
  if (body === 'ribbed') return FLANGE_MM;
  return kind === 'printed' && (flanges || mounting !== 'none') ? FLANGE_MM : 0;
}

/** Across the end rings of a ribbed body. */
export function widestRibbedMm({ outsideMm, job }: Around): number {
  return outsideMm + 2 * ribRimMm(job);
}
