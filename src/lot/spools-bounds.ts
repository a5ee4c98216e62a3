/** What no cutting can better: sums that hold however coils are spread over reels. */
import type { Cutting, Score } from './spools-problem.ts';

/** Sums of lengths are looked for as bits of one number, while so many bits are written at most: about 30 ms. */
const MOST_BITS = 30_000_000;

/**
 * Of each reel the most that cuts can take from it, with all coils at hand: the largest sum of lengths that it holds. Of long
 * reels with many lengths, which fill nearly anything, all that is on them.
 */
export function fillable({ reels, lengths, counts }: Cutting): readonly number[] {
  const needed = lengths.reduce((sum, length, kind) => sum + length * counts[kind]!, 0);
  const most = Math.max(0, ...reels.filter((reel) => reel < needed));
  // A count of n is put together from 1, 2, 4, ... and a rest.
  const loads = lengths.flatMap((length, kind) => {
    const found: number[] = [];
    for (let left = Math.min(counts[kind]!, Math.floor(most / length)), step = 1; left > 0; left -= step, step *= 2)
      found.push(length * Math.min(step, left));
    return found;
  });
  if (loads.length * most > MOST_BITS) return reels.map((reel) => Math.min(reel, needed));
  // Bit s: some coils are s long together.
  const sums = loads.reduce((found, mm) => BigInt.asUintN(most + 1, found | (found << BigInt(mm))), 1n);
  // A digit holds four of them, the last one the lowest.
  const digits = sums.toString(16);
  const reached = (mm: number) =>
    (Number.parseInt(digits[digits.length - 1 - Math.floor(mm / 4)] ?? '0', 16) >> (mm % 4)) & 1;
  return reels.map((reel) => {
    if (reel >= needed) return needed;
    let mm = reel;
    while (!reached(mm)) mm--;
    return mm;
  });
}

/**
 * The figures that no cutting betters whose figures before are those of `score`.
 * @param full as from `fillable`
 */
export function boundOf(problem: Cutting, full: readonly number[], score: Score): Score {
  const { lengths, counts } = problem;
  const coils = counts.reduce((sum, n) => sum + n, 0);
  const needed = lengths.reduce((sum, length, kind) => sum + length * counts[kind]!, 0);
  const unserved = coils - mostServed(problem, full);
  const most = Math.min(total(full), longest(problem, coils - score[0]));
  const usedMm = needed - score[1];
  return [unserved, needed - most, leastScrap(problem, full, usedMm), fewestReels(full, usedMm)];
}

const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0);

/** Length of so many of the longest coils that the longest reel can serve. */
function longest({ reels, lengths, counts }: Cutting, coils: number): number {
  let left = coils;
  let sum = 0;
  for (const [kind, length] of lengths.entries()) {
    if (length > (reels[0] ?? 0)) continue;
    const taken = Math.min(left, counts[kind]!);
    sum += taken * length;
    left -= taken;
  }
  return sum;
}

/**
 * Coils that can be served at most. For any unit t, cuts of l take floor(l / t) whole units or more, and a reel of c holds
 * floor(c / t) of them: the coils of fewest units are served first. Units are all lengths and their halves and thirds, and
 * a millimetre, with which this is the sum of all lengths.
 */
export function mostServed({ reels, lengths, counts }: Cutting, full: readonly number[]): number {
  const units = [1, ...lengths.flatMap((length) => [length, Math.ceil(length / 2), Math.ceil(length / 3)])];
  let most = Number.POSITIVE_INFINITY;
  for (const unit of units) {
    let room = full.reduce((sum, reel) => sum + Math.floor(reel / unit), 0);
    let served = 0;
    for (let kind = lengths.length - 1; kind >= 0; kind--) {
      const length = lengths[kind]!;
      if (length > (reels[0] ?? 0)) break;
      const size = Math.floor(length / unit);
      const taken = size === 0 ? counts[kind]! : Math.min(counts[kind]!, Math.floor(room / size));
      room -= taken * size;
      served += taken;
      if (taken < counts[kind]!) break;
    }
    most = Math.min(most, served);
  }
  return most;
}

/**
 * Of the reels that could serve a coil, what is not used is left over. A reel that adds no scrap keeps the shortest length or
 * more of it, so only so many reels are free of scrap; each other one loses what cannot be filled, or all that is left over
 * when that is less than the shortest length.
 */
function leastScrap({ reels, lengths }: Cutting, full: readonly number[], usedMm: number): number {
  const shortest = lengths.at(-1)!;
  const usable = reels.filter((reel) => reel >= shortest);
  const overMm = total(usable) - usedMm;
  if (overMm < shortest) return overMm;
  const lost = usable.map((reel, index) => reel - full[index]!).sort((a, b) => a - b);
  return total(lost.slice(0, Math.max(0, lost.length - Math.floor(overMm / shortest))));
}

export function fewestReels(full: readonly number[], usedMm: number): number {
  let left = usedMm;
  let reels = 0;
  for (const most of full.toSorted((a, b) => b - a)) {
    if (left <= 0) break;
    left -= most;
    reels++;
  }
  return reels;
}
