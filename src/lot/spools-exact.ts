/**
 * The best cutting by search of all of them: reel by reel, how many of each length, never which coil of a length. What could
 * not be better than the best one known is left out, and so is what leads to the same coils on the same reels, no better.
 */
import { fewestReels } from './spools-bounds.ts';
import { type Cuts, type Cutting, compareScores, type Score, scoreOf, scrapOf } from './spools-problem.ts';

export interface Searched {
  readonly cuts: Cuts;
  /** All were searched: none is better. */
  readonly complete: boolean;
}

/** Cut so far, on the reels before the one looked at. */
interface Prefix {
  readonly left: readonly number[];
  readonly coils: number;
  readonly mm: number;
  readonly scrapMm: number;
  readonly opened: number;
}

/**
 * @param full as from `fillable`
 * @param steps choices of how many of a length that are made, at most
 */
export function branchAndBound(problem: Cutting, full: readonly number[], start: Cuts, steps: number): Searched {
  const { reels, lengths, counts } = problem;
  // What is left of each length as one number; where it has too many digits the search would never end.
  const places = counts.map((_, kind) => counts.slice(0, kind).reduce((product, n) => product * (n + 1), 1));
  const states = counts.reduce((product, n) => product * (n + 1), 1);
  if (states > Number.MAX_SAFE_INTEGER) return { cuts: start, complete: false };

  const shortest = lengths.at(-1)!;
  const coils = counts.reduce((sum, n) => sum + n, 0);
  const needed = lengths.reduce((sum, length, kind) => sum + length * counts[kind]!, 0);
  const after = (values: readonly number[]) =>
    values.map((_, reel) => values.slice(reel).reduce((sum, mm) => sum + mm, 0)).concat(0);
  const fullAfter = after(full);
  const usableAfter = after(reels.map((mm) => (mm >= shortest ? mm : 0)));
  const seen = reels.map(() => new Map<number, readonly [scrapMm: number, opened: number]>());

  let best = start;
  let bestScore = scoreOf(problem, start);
  let left = steps;
  const chosen: number[][] = [];

  /** Figures that nothing which begins like this betters. */
  function hopeful(reel: number, prefix: Prefix): boolean {
    const reelMm = reels[reel] ?? 0;
    const roomMm = fullAfter[reel]!;
    let more = 0;
    let sum = 0;
    for (let kind = lengths.length - 1; kind >= 0 && lengths[kind]! <= reelMm; kind--) {
      const taken = Math.min(prefix.left[kind]!, Math.floor((roomMm - sum) / lengths[kind]!));
      more += taken;
      sum += taken * lengths[kind]!;
      if (taken < prefix.left[kind]!) break;
    }
    const unserved = coils - prefix.coils - more;
    if (unserved !== bestScore[0]) return unserved < bestScore[0];
    let longest = 0;
    for (const [kind, length] of lengths.entries()) {
      if (length > reelMm) continue;
      const taken = Math.min(more, prefix.left[kind]!);
      more -= taken;
      longest += taken * length;
    }
    const buyMm = needed - prefix.mm - Math.min(roomMm, longest);
    if (buyMm !== bestScore[1]) return buyMm < bestScore[1];
    const usedMm = needed - bestScore[1] - prefix.mm;
    const overMm = usableAfter[reel]! - usedMm;
    const scrapMm = prefix.scrapMm + (overMm < shortest ? overMm : 0);
    if (scrapMm !== bestScore[2]) return scrapMm < bestScore[2];
    return prefix.opened + fewestReels(full.slice(reel), usedMm) < bestScore[3];
  }

  function visit(reel: number, prefix: Prefix): void {
    if (reel === reels.length) {
      const score: Score = [coils - prefix.coils, needed - prefix.mm, prefix.scrapMm, prefix.opened];
      if (compareScores(score, bestScore) >= 0) return;
      best = chosen.map((cut) => [...cut]);
      bestScore = score;
      return;
    }
    if (!hopeful(reel, prefix)) return;
    // The same coils are left: only scrap and reels can differ.
    const state = prefix.left.reduce((sum, n, kind) => sum + n * places[kind]!, 0);
    const before = seen[reel]!.get(state);
    if (before && (before[0] < prefix.scrapMm || (before[0] === prefix.scrapMm && before[1] <= prefix.opened))) return;
    seen[reel]!.set(state, [prefix.scrapMm, prefix.opened]);
    const cut = lengths.map(() => 0);
    chosen.push(cut);
    fill(reel, prefix, cut, 0, reels[reel]!);
    chosen.pop();
  }

  /** Most of the longest first: the first cutting of a reel is a full one. */
  function fill(reel: number, prefix: Prefix, cut: number[], kind: number, restMm: number): void {
    left--;
    if (kind === lengths.length) {
      const usedMm = reels[reel]! - restMm;
      visit(reel + 1, {
        left: prefix.left.map((n, i) => n - cut[i]!),
        coils: prefix.coils + cut.reduce((sum, n) => sum + n, 0),
        mm: prefix.mm + usedMm,
        scrapMm: prefix.scrapMm + (usedMm === 0 ? 0 : scrapOf(restMm, shortest)),
        opened: prefix.opened + (usedMm === 0 ? 0 : 1),
      });
      return;
    }
    const length = lengths[kind]!;
    for (let n = Math.min(prefix.left[kind]!, Math.floor(restMm / length)); n >= 0 && left > 0; n--) {
      cut[kind] = n;
      fill(reel, prefix, cut, kind + 1, restMm - n * length);
    }
    cut[kind] = 0;
  }

  visit(0, { left: counts, coils: 0, mm: 0, scrapMm: 0, opened: 0 });
  return { cuts: best, complete: left > 0 };
}
