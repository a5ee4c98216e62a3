/** The objectives: by which figure of a design the best is chosen, and in what others may be better. */
import type { Job } from '../job/job.ts';
import type { Metrics } from './design.ts';
import type { Estimate } from './estimate.ts';

export interface Aspect {
  readonly name: string;
  /** How the record says that a design is better in this. */
  readonly better: string;
  of(metrics: Metrics): number;
  /** The same from an estimate; a stand-in that orders candidates alike where the figure itself is not known yet. */
  guess(estimate: Estimate): number;
}

/** Taps this near are as good as nearer ones: no bench tells them apart, and other figures decide. */
const NEAR_ENOUGH = 1e-3;

/** About how far out the first tap is when half a step of 5 degrees is missing; L goes with about the power of 1.8 there. */
const coarseness = (estimate: Estimate) => Math.max(NEAR_ENOUGH, 1.8 / 144 / Math.max(estimate.firstTapTurns, 1e-3));

export const ASPECTS = {
  loss: { name: 'loss', better: 'less loss', of: (m) => m.lossFactor, guess: (e) => e.lossFactor },
  volume: { name: 'size', better: 'more compact', of: (m) => m.volumeMm3, guess: (e) => e.volumeMm3 },
  wire: { name: 'wire', better: 'less wire', of: (m) => m.wireM, guess: (e) => e.wireM },
  worstTap: { name: 'taps', better: 'closer taps', of: (m) => Math.max(m.worstTap, NEAR_ENOUGH), guess: coarseness },
  mass: { name: 'copper', better: 'less copper', of: (m) => m.massG, guess: (e) => e.massG },
  length: { name: 'length', better: 'shorter', of: (m) => m.lengthMm, guess: (e) => e.formerLengthMm },
  turns: { name: 'turns', better: 'fewer turns', of: (m) => m.turns, guess: (e) => e.turns },
  spread: { name: 'spread', better: 'narrower limits', of: (m) => m.spread, guess: (e) => e.spread },
  diameter: { name: 'diameter', better: 'thinner', of: (m) => m.diameterMm, guess: (e) => e.candidate.formerMm },
} as const satisfies Record<string, Aspect>;

export const ALL_ASPECTS: readonly Aspect[] = Object.values(ASPECTS);

export function aspectOf(prefer: Job['prefer']): Aspect {
  if (prefer === 'compact') return ASPECTS.volume;
  if (prefer === 'least wire') return ASPECTS.wire;
  if (prefer === 'closest taps') return ASPECTS.worstTap;
  return ASPECTS.loss;
}
