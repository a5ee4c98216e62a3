import fc from 'fast-check';
import { afterAll, describe, expect, test } from 'vitest';
import { type CutCoil, planSpools, type Reel, type SpoolPlan } from '../../src/lot/spools.ts';

let cases = 0;
let searched = 0;
let proven = 0;
let large = 0;
afterAll(() => {
  console.log(`reels: ${cases} plans, ${searched} against all others, ${large} large ones, ${proven} proven best`);
  expect(Math.min(searched, large)).toBeGreaterThan(0);
});

const mm = (metres: number) => Math.round(metres * 1000);
const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0);

/** Everything that a plan promises; what it comes to, counted from the list of coils alone. */
function check(
  coils: readonly CutCoil[],
  reels: readonly Reel[],
): { readonly plan: SpoolPlan; readonly score: number[] } {
  const plan = planSpools(coils, reels);
  expect(plan.coils.map(({ serial }) => serial)).toEqual(coils.map(({ serial }) => serial));
  expect(plan.spools.map(({ spool }) => spool)).toEqual(reels.map(({ spool }) => spool));
  // Every coil is on one reel of its wire, or to be bought.
  const onReels = plan.spools.flatMap(({ serials }) => serials);
  const bought = plan.toBuy.flatMap((buy) => buy.coils.map(({ serial }) => serial));
  expect([...onReels, ...bought].toSorted()).toEqual(coils.map(({ serial }) => serial).toSorted());
  for (const { serial, spool } of plan.coils) {
    const reel = plan.spools.find((one) => one.serials.includes(serial));
    expect(spool).toBe(reel?.spool ?? null);
    if (reel) expect(reel.wire).toBe(coils.find((coil) => coil.serial === serial)!.wire);
  }
  const cut = new Map(coils.map((coil) => [coil.serial, Math.ceil(coil.cutM * 1000 - 1e-6)]));
  let scrap = 0;
  let opened = 0;
  for (const { serials, leftM, usedM, restM, wire } of plan.spools) {
    const lengths = serials.map((serial) => cut.get(serial)!);
    expect(mm(usedM)).toBe(total(lengths));
    expect(mm(restM)).toBe(mm(leftM) - total(lengths));
    expect(restM).toBeGreaterThanOrEqual(0);
    expect(lengths).toEqual(lengths.toSorted((a, b) => b - a));
    if (lengths.length === 0) continue;
    opened++;
    const shortest = Math.min(...coils.filter((coil) => coil.wire === wire).map(({ cutM }) => mm(cutM)));
    if (mm(restM) < shortest) scrap += mm(restM);
  }
  const buy = total(bought.map((serial) => cut.get(serial)!));
  expect(total(plan.wires.map(({ unserved }) => unserved))).toBe(bought.length);
  expect(total(plan.wires.map(({ buyM }) => mm(buyM)))).toBe(buy);
  expect(total(plan.toBuy.map(({ totalM }) => mm(totalM)))).toBe(buy);
  expect(total(plan.wires.map(({ scrapM }) => mm(scrapM)))).toBe(scrap);
  for (const wire of plan.wires) {
    expect(wire.unserved).toBeGreaterThanOrEqual(wire.unservedBound);
    expect(wire.unserved > wire.unservedBound || wire.buyM >= wire.buyBoundM).toBe(true);
    expect(wire.scrapM).toBeGreaterThanOrEqual(wire.scrapBoundM);
    expect(wire.scrapBoundM).toBeGreaterThanOrEqual(0);
    if (wire.exact) proven++;
  }
  cases++;
  return { plan, score: [bought.length, buy, scrap, opened] };
}

const better = (a: readonly number[], b: readonly number[]) => {
  const at = a.findIndex((value, i) => value !== b[i]);
  return at >= 0 && a[at]! < b[at]!;
};

/** Every coil on every reel, or on none: no thought of lengths that are alike, of bounds or of an order. */
function bestOfAll(coils: readonly CutCoil[], reels: readonly Reel[]): readonly number[] {
  const cuts = coils.map(({ cutM }) => mm(cutM));
  const rest = reels.map(({ leftM }) => mm(leftM));
  const shortest = Math.min(...cuts);
  const used = reels.map(() => 0);
  let best: readonly number[] = [Number.POSITIVE_INFINITY];
  const place = (coil: number, unserved: number, buy: number): void => {
    if (coil === cuts.length) {
      const scrap = total(rest.map((left, reel) => (used[reel]! > 0 && left < shortest ? left : 0)));
      const score = [unserved, buy, scrap, used.filter((n) => n > 0).length];
      if (better(score, best)) best = score;
      return;
    }
    const length = cuts[coil]!;
    place(coil + 1, unserved + 1, buy + length);
    for (const reel of reels.keys()) {
      if (rest[reel]! < length) continue;
      rest[reel]! -= length;
      used[reel]! += 1;
      place(coil + 1, unserved, buy);
      rest[reel]! += length;
      used[reel]! -= 1;
    }
  };
  place(0, 0, 0);
  return best;
}

const WIRE = '24 AWG enamel';
const coilsOf = (lengths: readonly number[], wire = WIRE): CutCoil[] =>
  lengths.map((cutM, i) => ({ serial: `${wire === WIRE ? 'K' : wire}-${i + 1}`, wire, cutM, cutG: cutM * 1.8 }));
const reelsOf = (lengths: readonly number[], wire = WIRE): Reel[] =>
  lengths.map((leftM, i) => ({ spool: `${wire === WIRE ? 'reel' : wire} ${i + 1}`, wire, leftM }));

/** Few whole lengths, so that equal ones, exact fits and near misses are common; some in tenths. */
const small = fc
  .tuple(fc.constantFrom(1, 1, 10), fc.array(fc.integer({ min: 3, max: 13 }), { minLength: 1, maxLength: 3 }))
  .chain(([tenth, kinds]) =>
    fc.record({
      cuts: fc.array(
        fc.constantFrom(...kinds).map((n) => n / tenth),
        { minLength: 1, maxLength: 7 },
      ),
      reels: fc.array(
        fc.integer({ min: 2, max: 30 }).map((n) => n / tenth),
        { maxLength: 3 },
      ),
    }),
  );
const mixed = fc.record({
  cuts: fc.array(fc.integer({ min: 30, max: 90 }), { minLength: 1, maxLength: 6 }),
  reels: fc.array(fc.integer({ min: 20, max: 260 }), { minLength: 1, maxLength: 4 }),
});

describe('small lots', () => {
  test.each([
    ['few lengths', small, 350],
    ['all lengths different', mixed, 150],
  ])('are as good as the best of all plans: %s', (_, lots, numRuns) => {
    fc.assert(
      fc.property(lots, ({ cuts, reels }) => {
        const { plan, score } = check(coilsOf(cuts), reelsOf(reels));
        expect(plan.wires[0]!.exact).toBe(true);
        expect(score).toEqual(bestOfAll(coilsOf(cuts), reelsOf(reels)));
        searched++;
      }),
      { seed: 41, numRuns },
    );
  });

  test('are no better or worse in another order, and no worse with one more reel', () => {
    fc.assert(
      fc.property(
        small,
        fc.integer({ min: 2, max: 30 }),
        fc.infiniteStream(fc.nat()),
        ({ cuts, reels }, more, keys) => {
          const mix = <T>(list: readonly T[]) =>
            list
              .map((item) => ({ item, key: keys.next().value! }))
              .sort((a, b) => a.key - b.key)
              .map(({ item }) => item);
          const { score } = check(coilsOf(cuts), reelsOf(reels));
          expect(check(mix(coilsOf(cuts)), mix(reelsOf(reels))).score).toEqual(score);
          expect(better(score, check(coilsOf(cuts), reelsOf([...reels, more])).score)).toBe(false);
        },
      ),
      { seed: 42, numRuns: 120 },
    );
  });

  test('are no worse served with a longer reel; its longer rest may be scrap', () => {
    fc.assert(
      fc.property(small, fc.integer({ min: 1, max: 12 }), fc.nat(), ({ cuts, reels }, more, at) => {
        if (reels.length === 0) return;
        const { score } = check(coilsOf(cuts), reelsOf(reels));
        const longer = reels.map((left, i) => (i === at % reels.length ? left + more : left));
        expect(better(score.slice(0, 2), check(coilsOf(cuts), reelsOf(longer)).score.slice(0, 2))).toBe(false);
      }),
      { seed: 43, numRuns: 120 },
    );
  });
});

/** Lots of a workshop: so many lengths about 8 to 33 m, reels whose lengths come to a share of what is needed. */
const lots = fc
  .record({
    kinds: fc.integer({ min: 1, max: 20 }),
    reels: fc.integer({ min: 1, max: 30 }),
    coils: fc.integer({ min: 20, max: 1000 }),
    share: fc.double({ min: 0.5, max: 1.6, noNaN: true }),
    seed: fc.integer({ min: 1, max: 2 ** 30 }),
  })
  .map(({ kinds, reels, coils, share, seed }) => {
    let state = seed;
    const random = () => {
      state = (state * 48271) % 2147483647;
      return state / 2147483647;
    };
    const lengths = Array.from({ length: kinds }, () => Math.round(8000 + random() * 25000) / 1000);
    const cuts = Array.from({ length: coils }, () => lengths[Math.floor(random() * kinds)]!);
    const weights = Array.from({ length: reels }, () => 0.2 + random());
    const reelM = weights.map((w) => Math.round((total(cuts) * share * w * 1000) / total(weights)) / 1000);
    return { cuts, reels: reelM };
  });

describe('large lots', () => {
  test('keep to what a plan promises and near their bounds', () => {
    let missed = 0;
    let served = 0;
    fc.assert(
      fc.property(lots, ({ cuts, reels }) => {
        const { plan } = check(coilsOf(cuts), reelsOf(reels));
        const { coils, unserved, unservedBound } = plan.wires[0]!;
        served += coils - unserved;
        missed += unserved - unservedBound;
        large++;
      }),
      { seed: 44, numRuns: 10 },
    );
    // Measured 0.1 %; the bound knows nothing of what cannot be filled on several reels at once.
    expect(missed / served).toBeLessThan(0.005);
  });

  test('a thousand coils of twenty lengths from thirty reels take well under a second', () => {
    const cuts = Array.from({ length: 1000 }, (_, i) => 8 + (i % 20) * 1.237 + (i % 20 === 7 ? 0.011 : 0));
    const reels = Array.from({ length: 30 }, (_, i) => 300 + ((i * 211) % 500));
    const start = performance.now();
    const { plan } = check(coilsOf(cuts), reelsOf(reels));
    // Measured 0.1 to 0.2 s with the checks; machines under load are several times slower.
    expect(performance.now() - start).toBeLessThan(3000);
    // Measured 0.05 %: what so many reels hold beyond sums of the short lengths that are served.
    expect(plan.wires[0]!.scrapM).toBeLessThan(0.001 * plan.wires[0]!.shelfM);
  });
});

describe('known plans', () => {
  test('the longer coil takes the shelf, the shorter one is bought', () => {
    const { plan } = check(coilsOf([10, 12]), reelsOf([13]));
    expect(plan.coils.map(({ spool }) => spool)).toEqual([null, 'reel 1']);
    expect(plan.toBuy).toEqual([{ wire: WIRE, totalM: 10, totalG: 18, coils: [{ serial: 'K-1', cutM: 10 }] }]);
  });

  test('two short coils come before a long one', () => {
    const { score } = check(coilsOf([20, 10, 10]), reelsOf([20]));
    expect(score).toEqual([1, 20_000, 0, 1]);
  });

  test('the first on the shelf that fills up is taken, and a rest for another coil is no scrap', () => {
    expect(check(coilsOf([10, 10]), reelsOf([25, 20])).score).toEqual([0, 0, 0, 1]);
    expect(check(coilsOf([10, 10]), reelsOf([30.5, 25])).score).toEqual([0, 0, 0, 1]);
  });

  test('sums are exact: three tenths fit on a reel of their sum', () => {
    expect(check(coilsOf([0.1, 0.1, 0.1]), reelsOf([0.3])).score).toEqual([0, 0, 0, 1]);
    expect(check(coilsOf([0.1, 0.1, 0.1001]), reelsOf([0.3])).score[0]).toBe(1);
  });

  test('wires are planned apart, reels without coils are listed, and an empty shelf is all to buy', () => {
    const coils = [...coilsOf([10]), ...coilsOf([5, 5], 'litz')];
    const { plan } = check(coils, reelsOf([50, 60], 'litz'));
    expect(plan.coils.map(({ spool }) => spool)).toEqual([null, 'litz 2', 'litz 2']);
    expect(plan.wires.map(({ wire, shelfM }) => [wire, shelfM])).toEqual([
      [WIRE, 0],
      ['litz', 110],
    ]);
    expect(planSpools([], reelsOf([5])).spools).toEqual([
      { spool: 'reel 1', wire: WIRE, leftM: 5, usedM: 0, restM: 5, serials: [] },
    ]);
  });

  test('what is none is refused', () => {
    expect(() => planSpools(coilsOf([0]), [])).toThrow(RangeError);
    expect(() => planSpools([], reelsOf([Number.NaN]))).toThrow(RangeError);
    expect(() => planSpools([...coilsOf([1]), ...coilsOf([1])], [])).toThrow(RangeError);
    expect(() => planSpools([], [...reelsOf([1]), ...reelsOf([1])])).toThrow(RangeError);
  });
});
