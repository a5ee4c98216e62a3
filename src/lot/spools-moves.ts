/**
 * Moves a coil to another reel, or swaps one or two coils with one of another reel, as long as the plan gets better. Coils
 * that no reel serves lie in a heap that counts as one more reel, of any length.
 */
import { type Cuts, type Cutting, scrapOf } from './spools-problem.ts';

/** Moves that may still be weighed. */
export interface Work {
  left: number;
}

/** A reel while coils are moved. */
interface Bin {
  /** Infinite for the heap. */
  readonly mm: number;
  restMm: number;
  readonly cut: number[];
}

/** What goes over: up to two of the lengths of one reel for one, or none, of the other. */
interface Exchange {
  readonly there: readonly number[];
  readonly back: number | null;
}

export function improve(problem: Cutting, cuts: Cuts, work: Work): Cuts {
  const { reels, lengths, counts } = problem;
  const bins = reels.map((mm, reel): Bin => {
    const cut = [...cuts[reel]!];
    return { mm, cut, restMm: mm - cut.reduce((sum, n, kind) => sum + n * lengths[kind]!, 0) };
  });
  bins.push({
    mm: Number.POSITIVE_INFINITY,
    restMm: Number.POSITIVE_INFINITY,
    cut: counts.map((count, kind) => count - cuts.reduce((sum, cut) => sum + cut[kind]!, 0)),
  });
  const single = lengths.map((_, kind) => [kind]);
  const pairs = lengths.flatMap((_, a) => lengths.slice(a).map((_, b) => [a, a + b]));
  // Twos only where ones help no longer: there are many more of them.
  while (pass(bins, lengths, single, work) || pass(bins, lengths, pairs, work));
  return bins.slice(0, -1).map(({ cut }) => cut);
}

/** Every exchange of these lengths once; those that help are made. */
function pass(
  bins: readonly Bin[],
  lengths: readonly number[],
  loads: readonly (readonly number[])[],
  work: Work,
): boolean {
  let helped = false;
  const shortest = lengths.at(-1)!;
  for (const from of bins)
    for (const there of loads) {
      const thereMm = there.reduce((sum, kind) => sum + lengths[kind]!, 0);
      for (const to of bins) {
        if (to === from) continue;
        for (let back = -1; back < lengths.length; back++) {
          if (work.left-- <= 0) return false;
          if (!has(from, there)) break;
          if (back >= 0 && (to.cut[back] === 0 || there.includes(back))) continue;
          const moreMm = thereMm - (back < 0 ? 0 : lengths[back]!);
          if (moreMm > to.restMm || -moreMm > from.restMm) continue;
          if (!helps(from, to, moreMm, there.length - (back < 0 ? 0 : 1), shortest)) continue;
          exchange(from, to, { there, back: back < 0 ? null : back }, moreMm);
          helped = true;
        }
      }
    }
  return helped;
}

const has = ({ cut }: Bin, [a, b]: readonly number[]) =>
  b === undefined ? cut[a!]! > 0 : a === b ? cut[a!]! > 1 : cut[a!]! > 0 && cut[b]! > 0;

/** In the order of the score; of equal ones the exchange that gathers rests on one reel, where they may do for a coil. */
function helps(from: Bin, to: Bin, moreMm: number, moreCoils: number, shortest: number): boolean {
  const served = from.mm === Number.POSITIVE_INFINITY ? 1 : to.mm === Number.POSITIVE_INFINITY ? -1 : 0;
  if (served !== 0 && moreCoils !== 0) return served * moreCoils > 0;
  if (served !== 0 && moreMm !== 0) return served * moreMm > 0;
  const scrap = (mm: number, restMm: number) =>
    restMm === mm || mm === Number.POSITIVE_INFINITY ? 0 : scrapOf(restMm, shortest);
  const less =
    scrap(from.mm, from.restMm) +
    scrap(to.mm, to.restMm) -
    scrap(from.mm, from.restMm + moreMm) -
    scrap(to.mm, to.restMm - moreMm);
  if (less !== 0) return less > 0;
  const opened = ({ mm, restMm }: Bin, more: number) => (restMm + more < mm ? 1 : 0);
  const fewer = opened(from, 0) + opened(to, 0) - opened(from, moreMm) - opened(to, -moreMm);
  if (fewer !== 0) return fewer > 0;
  if (served !== 0 || moreMm === 0) return false;
  // (f + m)^2 + (t - m)^2 > f^2 + t^2
  return moreMm * (from.restMm - to.restMm + moreMm) > 0;
}

function exchange(from: Bin, to: Bin, { there, back }: Exchange, moreMm: number): void {
  for (const kind of there) {
    from.cut[kind]! -= 1;
    to.cut[kind]! += 1;
  }
  if (back !== null) {
    to.cut[back]! -= 1;
    from.cut[back]! += 1;
  }
  from.restMm += moreMm;
  to.restMm -= moreMm;
}
