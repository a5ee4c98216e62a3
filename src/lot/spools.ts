/**
 * Which coil is wound from which reel. Every coil takes one piece from one reel, without a joint; each wire is a problem of its
 * own. Lengths are whole millimetres inside, cuts rounded up and reels down, so that sums are exact.
 *
 * What is best, the first that differs decides:
 * 1. the fewest coils that no reel serves;
 * 2. among these the least length to buy: what lies on the shelf is paid for, so of two coils the longer one is cut from it;
 * 3. the least scrap: what is left on reels that were cut from and is too short for any coil of this wire in the lot;
 * 4. the fewest reels cut from, since each one is fetched, mounted and measured again.
 *
 * No allowance is added to a piece: the length to cut holds both ends that are left long, and a cutter takes nothing away.
 */
import { decimals } from '../record/rounding.ts';
import type { LotCoil, LotSpool, LotWire, ToBuy } from './schema.ts';
import { scoreOf } from './spools-problem.ts';
import { cutting } from './spools-search.ts';

/** One coil of the lot, as its wire is cut. */
export interface CutCoil {
  readonly serial: string;
  /** Name of the wire: coils and reels of one name are one problem. */
  readonly wire: string;
  /** Winding, loops of taps and both ends. */
  readonly cutM: number;
  readonly cutG: number;
}

export interface Reel {
  /** As written on it; all names differ. */
  readonly spool: string;
  readonly wire: string;
  readonly leftM: number;
}

export interface SpoolPlan {
  /** The reel of each coil, in the order given; null: to be bought. */
  readonly coils: readonly Pick<LotCoil, 'serial' | 'spool'>[];
  /** All reels in the order given, those of wires that no coil takes too. */
  readonly spools: readonly LotSpool[];
  /** One for each wire that coils take, in the order of the first coil of each. */
  readonly wires: readonly LotWire[];
  /** Only wires of which something is to be bought. */
  readonly toBuy: readonly ToBuy[];
}

/**
 * @throws RangeError for lengths that are none, or serials or reels named twice
 */
export function planSpools(coils: readonly CutCoil[], reels: readonly Reel[]): SpoolPlan {
  requireSound(coils, reels);
  const names = [...new Set(coils.map(({ wire }) => wire))];
  const plans = names.map((wire) =>
    planWire(
      wire,
      coils.filter((coil) => coil.wire === wire),
      reels.filter((reel) => reel.wire === wire),
    ),
  );
  const reelOf = new Map(plans.flatMap(({ spoolOf }) => [...spoolOf]));
  const cutFrom = new Map(plans.flatMap(({ cutFrom }) => [...cutFrom]));
  return {
    coils: coils.map(({ serial }) => ({ serial, spool: reelOf.get(serial) ?? null })),
    spools: reels.map(({ spool, wire, leftM }) => {
      const cut = cutFrom.get(spool) ?? [];
      const usedMm = sum(cut.map(cutMm));
      return {
        spool,
        wire,
        leftM,
        usedM: usedMm / MM,
        restM: (reelMm(leftM) - usedMm) / MM,
        serials: cut.map(({ serial }) => serial),
      };
    }),
    wires: plans.map(({ figures }) => figures),
    toBuy: plans.flatMap(({ toBuy }) => toBuy),
  };
}

const MM = 1000;
/** A millionth of a millimetre is the noise of arithmetic on a length. */
const NOISE_MM = 1e-6;
const cutMm = ({ cutM }: CutCoil) => Math.ceil(cutM * MM - NOISE_MM);
const reelMm = (leftM: number) => Math.floor(leftM * MM + NOISE_MM);
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

interface WirePlan {
  readonly spoolOf: ReadonlyMap<string, string>;
  readonly cutFrom: ReadonlyMap<string, readonly CutCoil[]>;
  readonly figures: LotWire;
  readonly toBuy: readonly ToBuy[];
}

function planWire(wire: string, coils: readonly CutCoil[], reels: readonly Reel[]): WirePlan {
  // Longest first, whatever the order given; equal ones keep it.
  const shelf = reels.toSorted((a, b) => reelMm(b.leftM) - reelMm(a.leftM));
  const lengths = [...new Set(coils.map(cutMm))].sort((a, b) => b - a);
  const waiting = lengths.map((length) => coils.filter((coil) => cutMm(coil) === length));
  const problem = {
    reels: shelf.map(({ leftM }) => reelMm(leftM)),
    lengths,
    counts: waiting.map((alike) => alike.length),
  };
  const { cuts, exact, bound } = cutting(problem);

  // From each reel the longest coil first: should it hold less than is written on it, the shortest one is found missing.
  const next = lengths.map(() => 0);
  const cutFrom = new Map<string, readonly CutCoil[]>();
  for (const [index, { spool }] of shelf.entries()) {
    const taken = cuts[index]!.flatMap((count, kind) => {
      const from = next[kind]!;
      next[kind] = from + count;
      return waiting[kind]!.slice(from, from + count);
    });
    cutFrom.set(spool, taken);
  }
  const served = new Map([...cutFrom].flatMap(([spool, cut]) => cut.map(({ serial }) => [serial, spool] as const)));
  const missing = coils.filter(({ serial }) => !served.has(serial));
  const [unserved, buyMm, scrapMm] = scoreOf(problem, cuts);
  return {
    spoolOf: served,
    cutFrom,
    figures: {
      wire,
      coils: coils.length,
      neededM: sum(coils.map(cutMm)) / MM,
      neededG: decimals(sum(coils.map(({ cutG }) => cutG)), 1),
      shelfM: sum(problem.reels) / MM,
      unserved,
      unservedBound: bound[0],
      buyM: buyMm / MM,
      buyBoundM: bound[1] / MM,
      scrapM: scrapMm / MM,
      scrapBoundM: bound[2] / MM,
      exact,
    },
    toBuy:
      missing.length === 0
        ? []
        : [
            {
              wire,
              totalM: buyMm / MM,
              totalG: decimals(sum(missing.map(({ cutG }) => cutG)), 1),
              coils: missing.map((coil) => ({ serial: coil.serial, cutM: cutMm(coil) / MM })),
            },
          ],
  };
}

function requireSound(coils: readonly CutCoil[], reels: readonly Reel[]): void {
  for (const { serial, cutM } of coils)
    if (!(cutM > 0 && Number.isFinite(cutM))) throw new RangeError(`coil ${serial}: a length of ${cutM} m`);
  for (const { spool, leftM } of reels)
    if (!(leftM >= 0 && Number.isFinite(leftM))) throw new RangeError(`reel ${spool}: a length of ${leftM} m`);
  if (new Set(coils.map(({ serial }) => serial)).size < coils.length) throw new RangeError('a serial given twice');
  if (new Set(reels.map(({ spool }) => spool)).size < reels.length) throw new RangeError('a reel given twice');
}
