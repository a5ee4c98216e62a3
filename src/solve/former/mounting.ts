/**
 * How a printed former stands: on two ears, or on a round base with four holes. A screw's head is taken as twice as wide
 * as its hole (common practice), and it must pass the upper rim on its way down.
 */
import type { Former } from '../../record/schema.ts';
import { type Around, FLANGE_MM } from './around.ts';

/** Between a screw's head and what stands up beside it. */
const HEAD_CLEAR_MM = 1.6;
/** Material beside the hole of an ear, and beyond the head on a base. */
const EAR_SIDE_MM = 4.3;
const BASE_RIM_MM = 1;
/** Ears stand across the start hole's line, holes of a base between its quarters, so that leads stay free. */
const EARS_DEG = [90, 270];
const BASE = { holes: 4, firstDeg: 45 };

export type Mounting = Pick<Former, 'ears' | 'base'>;

/** Diameter of the narrowest circle of screws round a former whose widest part has this diameter. */
export function leastCircleMm({ job }: Around, widestMm: number): number {
  return Math.ceil((widestMm + 2 * ((job.former.screwMm ?? 0) + HEAD_CLEAR_MM)) * 10 - 1e-6) / 10;
}

/** Ears or base of the job, their screws on the circle of the job, else as near as their heads allow. */
export function mountingFor(around: Around, widestMm: number): Mounting {
  const { kind, mounting, screwMm, screwCircleMm } = around.job.former;
  if (kind !== 'printed' || mounting === 'none' || screwMm === null) return { ears: [], base: null };
  const circleDiameterMm = screwCircleMm ?? leastCircleMm(around, widestMm);
  if (mounting === 'base') {
    const diameterMm = circleDiameterMm + 2 * (screwMm + BASE_RIM_MM);
    return {
      ears: [],
      base: { diameterMm, thicknessMm: FLANGE_MM, circleDiameterMm, holeDiameterMm: screwMm, ...BASE },
    };
  }
  const widthMm = Math.max(screwMm + 2 * EAR_SIDE_MM, 2 * screwMm + 1);
  const ears = EARS_DEG.map((angleDeg) => ({
    angleDeg,
    holeDiameterMm: screwMm,
    centreRadiusMm: circleDiameterMm / 2,
    widthMm,
    thicknessMm: FLANGE_MM,
  }));
  return { ears, base: null };
}
