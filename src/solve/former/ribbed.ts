/** What a ribbed body has in place of a wall: ribs and rings, their length, and what the record says of them. */
import type { Coil } from '../../coil/coil.ts';
import { angleOf, type Hand } from '../../coil/layout.ts';
import type { Former } from '../../record/schema.ts';
import {
  BEHIND_MM,
  END_MM,
  type Load,
  overHoleMm,
  overSeatMm,
  planRibs,
  type RibPlan,
  type RibSection,
  ribStiffnessText,
  seatMm,
} from '../ribs.ts';
import { wireHoleMm } from '../tap-methods.ts';
import { type Around, FLANGE_MM, grooveFor, widestRibbedMm } from './around.ts';
import { finishHoles } from './finish-row.ts';
import { materialOf } from './wall.ts';

const round = (mm: number) => Math.round(mm * 1e3) / 1e3;

/** Z at which the upper end ring begins: above the finish row. */
function seatOf(around: Around, ribs: RibSection, coil: Coil): number {
  const { outsideMm, overallMm } = around;
  const last = finishHoles(around, coil).at(-1)!;
  return seatMm(ribs, outsideMm, overallMm, overHoleMm(coil.positionMm(last.turn), wireHoleMm(overallMm, 1)));
}

/** Length of the whole former, mm. */
export function ribbedLengthMm(around: Around, ribs: RibSection, coil: Coil): number {
  return round(seatOf(around, ribs, coil) + overSeatMm(around.job, ribs, around.outsideMm, around.overallMm));
}

const loadOf = (around: Around) => ({ ...around, material: materialOf(around.job) }) satisfies Load;

/** The ribs of a ribbed body, null for a full one; `no room` where ribs of no depth go round this diameter. */
export function ribsFor(around: Around, coil: Coil): RibPlan | 'no room' | null {
  const { job, ribs } = around;
  if (!ribs) return null;
  return planRibs(job, ribs, loadOf(around), seatOf(around, ribs, coil)) ?? 'no room';
}

/**
 * The keys of a former that ribs change. Its rims are the end rings, and on the upper one stand the numbers of the ribs: S at the
 * start, then 1, 2, ... as the wire meets them.
 */
export function ribbedKeys(around: Around, { ribs, give }: RibPlan, hand: Hand) {
  const { outsideMm, overallMm, job } = around;
  const groove = grooveFor(overallMm);
  const wallMm = round(ribs.depthMm + BEHIND_MM);
  return {
    surface: 'grooved',
    boreDiameterMm: round(outsideMm - 2 * wallMm),
    wallMm,
    footMm: END_MM,
    topMm: END_MM,
    flange: { diameterMm: widestRibbedMm(around), lowerMm: FLANGE_MM, upperMm: FLANGE_MM },
    groove: { depthMm: groove.depthMm, floorMm: groove.floorMm, runInTurns: 0 },
    numbers: Array.from({ length: ribs.count }, (_, rib) => ({
      text: rib === 0 ? 'S' : `${rib}`,
      angleDeg: angleOf(rib / ribs.count, hand),
      tap: null,
    })),
    body: 'ribbed',
    ribs,
    stiffness: ribStiffnessText({ ribs, give }, { ...loadOf(around), material: materialOf(job) }),
  } satisfies Partial<Former>;
}
