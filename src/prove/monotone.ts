/**
 * A smooth curve through points that rises (or falls) with them: piecewise cubics with slopes of parabolas through three
 * neighbours, cut back so that no piece turns (Fritsch and Carlson 1980, SIAM J. Numer. Anal. 17, 238-246: both slopes of a piece at
 * most three times that of its chord). Exact for parabolas that need no cutting back.
 *
 * Domain: two points at least, x strictly rising, y strictly rising or strictly falling; RangeError otherwise.
 */
export interface MonotoneCurve {
  /** At an x between the ends. @throws RangeError outside */
  at(x: number): number;
}

/** Slope at each point before it is cut back: of the parabola through it and its neighbours. */
function slopes(h: readonly number[], chord: readonly number[]): number[] {
  const n = chord.length;
  if (n === 1) return [chord[0]!, chord[0]!];
  const inner = Array.from(
    { length: n - 1 },
    (_, i) => (h[i + 1]! * chord[i]! + h[i]! * chord[i + 1]!) / (h[i]! + h[i + 1]!),
  );
  const first = chord[0]! + (chord[0]! - chord[1]!) * (h[0]! / (h[0]! + h[1]!));
  const last = chord[n - 1]! + (chord[n - 1]! - chord[n - 2]!) * (h[n - 1]! / (h[n - 1]! + h[n - 2]!));
  return [first, ...inner, last];
}

export function monotoneCurve(points: readonly (readonly [x: number, y: number])[]): MonotoneCurve {
  const h = points.slice(1).map(([x], i) => x - points[i]![0]);
  const chord = points.slice(1).map(([, y], i) => (y - points[i]![1]) / h[i]!);
  const way = Math.sign(chord[0] ?? 0);
  if (way === 0 || !h.every((step) => step > 0) || !chord.every((slope) => Math.sign(slope) === way))
    throw new RangeError('a monotone curve needs two points at least, each beyond the one before in both');
  const limited = slopes(h, chord).map((slope, i) => {
    const least = Math.min(Math.abs(chord[i - 1] ?? chord[i]!), Math.abs(chord[i] ?? chord[i - 1]!));
    return way * Math.min(Math.max(way * slope, 0), 3 * least);
  });
  const [from, to] = [points[0]![0], points.at(-1)![0]];
  return {
    at(x) {
      if (!(x >= from && x <= to)) throw new RangeError(`${x} lies outside ${from} to ${to}`);
      const i = Math.max(
        0,
        points.findLastIndex(([px], k) => k < points.length - 1 && px <= x),
      );
      const [x0, y0] = points[i]!;
      const t = (x - x0) / h[i]!;
      const y1 = points[i + 1]![1];
      const rest = 1 - t;
      return (
        rest * rest * (1 + 2 * t) * y0 +
        t * t * (1 + 2 * rest) * y1 +
        h[i]! * t * rest * (rest * limited[i]! - t * limited[i + 1]!)
      );
    },
  };
}
