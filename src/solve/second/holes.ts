/**
 * The holes of a second winding: each end comes out of a hole where the winding begins or ends, P1 below and P2 above, and is tied through a
 * second one beside it, on the far side from the turns, as the main winding's ends are.
 */
import type { Hand } from '../../coil/layout.ts';
import { webMm } from '../../parts/dimensions.ts';
import type { SecondEntry } from '../../record/around-schema.ts';
import type { Hole } from '../../record/schema.ts';
import { wireHoleMm } from '../tap-methods.ts';
import { tieMm } from './room.ts';

type SecondHole = SecondEntry['holes'][number];

/** Arc between a hole and the one that ties the end. */
const TIE_ARC_MM = 6;
const TRIED_DEG = 5;

const turned = (angleDeg: number) => Math.round((((angleDeg % 360) + 360) % 360) * 100) / 100;

export interface HolePlaces {
  readonly startMm: number;
  readonly finishMm: number;
  readonly meanDiameterMm: number;
  readonly wireMm: number;
  readonly hand: Hand;
}

/** With the start and finish at this angle: the turns are whole. */
export function holesAt(places: HolePlaces, angleDeg: number): SecondHole[] {
  const { startMm, finishMm, meanDiameterMm, wireMm, hand } = places;
  const back = ((hand === 'right' ? -1 : 1) * 360 * TIE_ARC_MM) / (Math.PI * meanDiameterMm);
  const diameterMm = wireHoleMm(wireMm, 1);
  const tie = tieMm(wireMm);
  const hole = (purpose: SecondHole['purpose'], label: string, angle: number, axialMm: number): SecondHole => ({
    purpose,
    label,
    angleDeg: turned(angle),
    axialMm,
    diameterMm,
  });
  return [
    hole('start', 'P1a', angleDeg + back, startMm - tie),
    hole('start', 'P1', angleDeg, startMm),
    hole('finish', 'P2', angleDeg, finishMm),
    hole('finish', 'P2a', angleDeg - back, finishMm + tie),
  ];
}

/** On a wall that others are in: at the angle that leaves the most between them. `boreMm` is where they come nearest. */
export function holesAmong(places: HolePlaces, others: readonly Hole[], boreMm: number): SecondHole[] {
  let best: { holes: SecondHole[]; left: number } | null = null;
  for (let angle = 0; angle < 360; angle += TRIED_DEG) {
    const holes = holesAt(places, angle);
    const left = Math.min(...holes.flatMap((one) => others.map((other) => webMm(one, other, boreMm / 2))));
    if (best === null || left > best.left + 1e-9) best = { holes, left };
  }
  return best!.holes;
}

/** Angle farthest from those at which ends of the main winding lie. */
export function awayFrom(anglesDeg: readonly number[]): number {
  let best = { angle: 0, off: -1 };
  for (let angle = 0; angle < 360; angle += TRIED_DEG) {
    const off = Math.min(
      ...anglesDeg.map((other) => {
        const apart = Math.abs(angle - other) % 360;
        return Math.min(apart, 360 - apart);
      }),
    );
    if (off > best.off) best = { angle, off };
  }
  return best.angle;
}

/** As holes of the wall of the main former. */
export function asWallHoles(holes: readonly SecondHole[]): Hole[] {
  return holes.map((hole) => ({ ...hole, tap: null, turn: null }));
}
