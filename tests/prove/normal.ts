/** Normal numbers from a seed, for simulations that come out the same every time. */
export function normals(seed: number): () => number {
  let state = seed;
  const even = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return () => Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even());
}

export const sample = (count: number, next: () => number): number[] => Array.from({ length: count }, next);

/** Share of simulations that something holds in, percent. */
export function percentOf(runs: number, holds: () => boolean): number {
  let count = 0;
  for (let i = 0; i < runs; i++) if (holds()) count++;
  return (100 * count) / runs;
}
