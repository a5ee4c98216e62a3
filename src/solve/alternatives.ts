/** Other coils worth knowing: each better than the chosen one in some respect, no two of them alike. */
import type { Design } from './design.ts';
import { ALL_ASPECTS, type Aspect } from './prefer.ts';

export interface Other {
  readonly design: Design;
  readonly betterIn: readonly string[];
}

/** Better by less than this is no reason to show a coil. */
export const WORTH = 0.01;
/** More than the record shows: some claims fall when the loss is judged by the field. */
const SHOWN = 8;

function betterIn(design: Design, chosen: Design): string[] {
  const value = (aspect: Aspect, one: Design) => aspect.of(one.metrics);
  return ALL_ASPECTS.filter((aspect) => value(aspect, design) < value(aspect, chosen) * (1 - WORTH)).map(
    (aspect) => aspect.better,
  );
}

/** Whether two coils are too much alike to show both: by family, then by wire and pitch more closely, then the same coil. */
type Alike = (a: Design, b: Design) => boolean;

const near = (a: number, b: number, part: number) => Math.abs(a / b - 1) < part;

const sameFamily: Alike = (a, b) => a.candidate.family === b.candidate.family || closelyAlike(a, b);

const closelyAlike: Alike = (a, b) => {
  const [x, y] = [a.candidate, b.candidate];
  const sameWire = x.wire.covering === y.wire.covering && near(x.wire.bareMm, y.wire.bareMm, 0.08);
  const samePitch = x.pitch.kind === y.pitch.kind && near(x.pitch.mm, y.pitch.mm, 0.1);
  const sameFormer = near(a.former.outsideDiameterMm, b.former.outsideDiameterMm, 0.04);
  return sameWire && samePitch && sameFormer && a.method.name === b.method.name && a.layout === b.layout;
};

const same: Alike = (a, b) => a === b;

/**
 * Up to six others: first the best in each aspect in which one beats the chosen coil, then those that beat it in most.
 * Coils of one family are shown side by side only when fewer than four others would be left.
 */
export function alternativesTo(chosen: Design, others: readonly Design[]): Other[] {
  const shown: Other[] = [];
  const add = (design: Design, alike: Alike) => {
    const better = betterIn(design, chosen);
    if (better.length === 0 || shown.length >= SHOWN || shown.some((one) => alike(one.design, design))) return;
    shown.push({ design, betterIn: better });
  };
  for (const aspect of ALL_ASPECTS) {
    const best = [...others].sort((a, b) => aspect.of(a.metrics) - aspect.of(b.metrics))[0];
    if (best !== undefined && aspect.of(best.metrics) < aspect.of(chosen.metrics) * (1 - WORTH)) add(best, sameFamily);
  }
  const rank = new Map(others.map((design) => [design, betterIn(design, chosen).length]));
  const ranked = [...others].sort((a, b) => rank.get(b)! - rank.get(a)! || a.metrics.lossFactor - b.metrics.lossFactor);
  for (const alike of [sameFamily, closelyAlike, same])
    if (alike === sameFamily || shown.length < 4) for (const design of ranked) add(design, alike);
  return shown;
}
