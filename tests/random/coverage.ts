/** How often the truth lies within the limits that were stated, over many coils. */
import type { MatchOutcome, TurnsFound } from './match.ts';

export interface Coverage {
  readonly kind: string;
  readonly figures: number;
  readonly inside: number;
  /** Percent. */
  readonly percent: number;
  /** Percent within half of the limits: 67 of normal errors, all of limits that are only wide. */
  readonly halfPercent: number;
  /** Standard error of the percentage, were every figure alone (binomial at 95 %), and as figures of one coil share their errors. */
  readonly alone: number;
  readonly byCoils: number;
}

/** Of one kind, or of all figures. */
export function coverageOf(outcomes: readonly MatchOutcome[], kind: string | null): Coverage {
  const coils = outcomes.flatMap(({ figures }) => {
    const of = figures.filter(([one]) => kind === null || one === kind);
    const within = (limit: number) => of.filter(([, off]) => Math.abs(off) <= limit).length;
    return of.length === 0 ? [] : [{ count: of.length, inside: within(1), half: within(0.5) }];
  });
  const figures = coils.reduce((sum, { count }) => sum + count, 0);
  const inside = coils.reduce((sum, one) => sum + one.inside, 0);
  const share = inside / figures;
  // Ratio of two sums over coils (Cochran, Sampling Techniques, 1977, section 6.3).
  const square = coils.reduce((sum, one) => sum + (one.inside - share * one.count) ** 2, 0);
  return {
    kind: kind ?? 'all figures',
    figures,
    inside,
    percent: 100 * share,
    halfPercent: (100 * coils.reduce((sum, { half }) => sum + half, 0)) / figures,
    alone: 100 * Math.sqrt((0.95 * 0.05) / figures),
    byCoils: (100 * Math.sqrt(square)) / figures,
  };
}

export const kindsOf = (outcomes: readonly MatchOutcome[]): string[] => [
  ...new Set(outcomes.flatMap(({ figures }) => figures.map(([kind]) => kind))),
];

export interface TurnsRight {
  readonly kind: TurnsFound['kind'];
  readonly determined: boolean;
  readonly count: number;
  readonly right: number;
  /** How many would be right by the weights that were stated. */
  readonly stated: number;
}

/** Turns that nobody counted surely, by how they were found and whether they were said to be determined. */
export function turnsOf(outcomes: readonly MatchOutcome[]): TurnsRight[] {
  const all = outcomes.flatMap(({ turns }) => turns);
  return (['inferred', 'proposed'] as const).flatMap((kind) =>
    [true, false].map((determined) => {
      const of = all.filter((one) => one.kind === kind && one.determined === determined);
      return {
        kind,
        determined,
        count: of.length,
        right: of.filter(({ right }) => right).length,
        stated: of.reduce((sum, { best }) => sum + best, 0),
      };
    }),
  );
}
