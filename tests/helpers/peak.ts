/** A peak of whatever is looked at over frequency, and its width at 0.707, in the unit of the frequency. */

export interface Peak {
  readonly at: number;
  readonly height: number;
  /** Null where the curve does not fall to 0.707 of the peak on both sides, before it rises again. */
  readonly width: number | null;
  /** Where 0.707 is left; null as the width. */
  readonly low: number | null;
  readonly high: number | null;
}

/** Uphill from `near` with halved steps. Null when it runs away. */
export function peakOf(size: (at: number) => number, near: number): Peak | null {
  let at = near;
  let step = near * 5e-3;
  while (step > near * 1e-7) {
    const [a, b, c] = [size(at - step), size(at), size(at + step)];
    if (b >= a && b >= c) step /= 2;
    else at += a > c ? -step : step;
    if (at > 1.8 * near || at < near / 1.8) return null;
  }
  const height = size(at);
  const edge = height * Math.SQRT1_2;
  const away = (way: 1 | -1): number | null => {
    let [inside, outside] = [0, at * 5e-4];
    for (let before = height; size(at + way * outside) > edge; outside *= 1.2) {
      const here = size(at + way * outside);
      if (here > before || outside > 0.6 * at) return null;
      [inside, before] = [outside, here];
    }
    for (let i = 0; i < 30; i++) {
      const middle = (inside + outside) / 2;
      if (size(at + way * middle) > edge) inside = middle;
      else outside = middle;
    }
    return outside;
  };
  const [below, above] = [away(-1), away(1)];
  if (below === null || above === null) return { at, height, width: null, low: null, high: null };
  return { at, height, width: below + above, low: at - below, high: at + above };
}
