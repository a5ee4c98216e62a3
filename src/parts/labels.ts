/**
 * Where numbers go on a ring. Every number keeps a tick at its true angle; the numbers themselves stand as near to their
 * ticks as their widths allow.
 *
 * The rule: ticks closer than `tickGapMm` become one tick with one joined text (`S,1-12` for taps in line). Texts that
 * would overlap are moved apart, least squares of the moves; where a text would have to move by more than `moveMm` it is
 * joined to its neighbour instead (`4,5`, at most three ticks). When even that is too wide for the ring, every second, then every third number
 * is left out and keeps its tick. Texts run counterclockwise, as does the angle.
 */

export interface Label {
  readonly text: string;
  readonly angleDeg: number;
  readonly tap: number | null;
}

export interface PlacedText {
  readonly text: string;
  /** Middle of the text. */
  readonly angleDeg: number;
  /** True angles of the ticks it belongs to. */
  readonly ticksDeg: readonly number[];
}

export interface Placement {
  readonly texts: readonly PlacedText[];
  /** How many texts carry more than one tick, and how many were left out. */
  readonly joined: number;
  readonly leftOut: number;
}

export interface Ring {
  /** Lengths along the ring are measured at this radius. */
  readonly radiusMm: number;
  readonly tickGapMm: number;
  readonly moveMm: number;
  readonly gapMm: number;
  readonly widthMm: (text: string) => number;
}

const MOST_TICKS = 3;

interface Group {
  readonly labels: readonly Label[];
  readonly ticks: readonly number[];
}

/** Null when not even every third number has room. */
export function placeLabels(labels: readonly Label[], ring: Ring): Placement | null {
  if (labels.length === 0) return { texts: [], joined: 0, leftOut: 0 };
  const groups = sameTick(labels, ring);
  for (const keep of [1, 2, 3]) {
    const kept = groups.filter((group, i) => i % keep === 0 || group.labels.some((label) => label.tap === null));
    const texts = joinUntilTheyFit(kept, ring);
    if (!texts) continue;
    const bare = groups
      .filter((group) => !kept.includes(group))
      .map((group) => ({ text: '', angleDeg: group.ticks[0]!, ticksDeg: group.ticks }));
    return {
      texts: [...texts, ...bare],
      joined: texts.filter((text) => text.ticksDeg.length > 1).length,
      leftOut: bare.length,
    };
  }
  return null;
}

/** `S`, then runs of whole numbers written as a span, the rest one by one. */
export function joinTexts(texts: readonly string[]): string {
  const out: string[] = [];
  for (let i = 0; i < texts.length; ) {
    const first = Number(texts[i]);
    let end = i;
    if (Number.isInteger(first)) while (Number(texts[end + 1]) === first + (end + 1 - i)) end++;
    if (end - i >= 2) out.push(`${texts[i]}-${texts[end]}`);
    else out.push(...texts.slice(i, end + 1));
    i = end + 1;
  }
  return out.join(',');
}

function arc(ring: Ring, deg: number): number {
  return (ring.radiusMm * deg * Math.PI) / 180;
}

function byAngle(a: Label, b: Label): number {
  return a.angleDeg - b.angleDeg || (a.tap ?? 0) - (b.tap ?? 0);
}

/** Unrolls the ring at its widest free place, so that what belongs together stays together. */
function unroll<T>(items: readonly T[], angleOf: (item: T) => number): { item: T; deg: number }[] {
  let cut = 0;
  let widest = -1;
  for (let i = 0; i < items.length; i++) {
    const before = i === 0 ? angleOf(items[items.length - 1]!) - 360 : angleOf(items[i - 1]!);
    const gap = angleOf(items[i]!) - before;
    if (gap > widest + 1e-9) {
      widest = gap;
      cut = i;
    }
  }
  return items.map((_, i) => {
    const k = (cut + i) % items.length;
    return { item: items[k]!, deg: angleOf(items[k]!) + (cut + i >= items.length ? 360 : 0) };
  });
}

function sameTick(labels: readonly Label[], ring: Ring): Group[] {
  const groups: { labels: Label[]; from: number; to: number }[] = [];
  for (const { item, deg } of unroll([...labels].sort(byAngle), (label) => label.angleDeg)) {
    const last = groups[groups.length - 1];
    if (last && arc(ring, deg - last.to) < ring.tickGapMm) {
      last.labels.push(item);
      last.to = deg;
    } else groups.push({ labels: [item], from: deg, to: deg });
  }
  return groups.map((group) => ({ labels: group.labels, ticks: [(group.from + group.to) / 2] }));
}

const middle = (group: Group) => (group.ticks[0]! + group.ticks[group.ticks.length - 1]!) / 2;
const textOf = (group: Group) => joinTexts(group.labels.map((label) => label.text));

function joinUntilTheyFit(start: readonly Group[], ring: Ring): PlacedText[] | null {
  let groups = [...start];
  for (;;) {
    const widths = groups.map((group) => ring.widthMm(textOf(group)) + ring.gapMm);
    const wanted = groups.map((group) => arc(ring, middle(group)));
    const placed = spread(wanted, widths);
    const round = 2 * Math.PI * ring.radiusMm;
    const seam = placed[0]! + round - placed[placed.length - 1]!;
    const seamFits =
      seam >= (widths[0]! + widths[widths.length - 1]!) / 2 || (groups.length === 1 && round > widths[0]!);
    const moved = placed.map((x, i) => Math.abs(x - wanted[i]!));
    if (seamFits && Math.max(...moved) <= ring.moveMm)
      return groups.map((group, i) => ({
        text: textOf(group),
        angleDeg: ((placed[i]! / ring.radiusMm) * 180) / Math.PI,
        ticksDeg: group.ticks,
      }));
    const joined = joinClosest(groups, moved, ring);
    if (!joined) return null;
    groups = joined;
  }
}

/**
 * Joins the two neighbours that stand closest among those that moved too far (among all, when only the seam is tight).
 * Null when every such pair would make a text of more than {@link MOST_TICKS} ticks, which nobody could tell apart.
 */
function joinClosest(groups: readonly Group[], moved: readonly number[], ring: Ring): Group[] | null {
  let best = -1;
  let least = Number.POSITIVE_INFINITY;
  const far = (i: number) => moved[i]! > ring.moveMm;
  const any = groups.some((_, i) => far(i));
  for (let i = 0; i + 1 < groups.length; i++) {
    if (any && !far(i) && !far(i + 1)) continue;
    if (groups[i]!.ticks.length + groups[i + 1]!.ticks.length > MOST_TICKS) continue;
    const apart = groups[i + 1]!.ticks[0]! - groups[i]!.ticks[groups[i]!.ticks.length - 1]!;
    if (apart < least) {
      least = apart;
      best = i;
    }
  }
  if (best < 0) return null;
  const a = groups[best]!;
  const b = groups[best + 1]!;
  const both: Group = { labels: [...a.labels, ...b.labels], ticks: [...a.ticks, ...b.ticks] };
  return [...groups.slice(0, best), both, ...groups.slice(best + 2)];
}

/** Least-squares places on a line that keep order and half widths apart (pool adjacent violators). */
export function spread(wanted: readonly number[], widths: readonly number[]): number[] {
  const offset: number[] = [0];
  for (let i = 1; i < wanted.length; i++) offset.push(offset[i - 1]! + (widths[i - 1]! + widths[i]!) / 2);
  const pools: { sum: number; count: number }[] = [];
  for (let i = 0; i < wanted.length; i++) {
    pools.push({ sum: wanted[i]! - offset[i]!, count: 1 });
    while (pools.length > 1) {
      const b = pools[pools.length - 1]!;
      const a = pools[pools.length - 2]!;
      if (a.sum / a.count <= b.sum / b.count) break;
      pools.splice(-2, 2, { sum: a.sum + b.sum, count: a.count + b.count });
    }
  }
  return pools
    .flatMap((pool) => Array.from({ length: pool.count }, () => pool.sum / pool.count))
    .map((x, i) => x + offset[i]!);
}
