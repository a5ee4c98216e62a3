/** A small generator with a seed (Park & Miller 1988), so that random coils are the same at every run. */
export function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

export interface RandomCoil {
  readonly positions: number[];
  readonly radius: number;
  readonly wireRadius: number;
  readonly frequency: number;
  readonly cuts: number[];
}

/**
 * A coil of the sort that the program meets, with every ratio at random: wire 0.05 to 3 mm, d/p 0.1 to 0.95, diameter from 8 wires,
 * 10 kHz to 100 MHz, even or with gaps, cut at one to three turns.
 */
export function randomCoil(random: () => number, mostTurns: number): RandomCoil {
  const between = (low: number, high: number) => low * (high / low) ** random();
  const turns = 2 + Math.floor(random() * (mostTurns - 1));
  const wire = between(5e-5, 3e-3);
  const pitch = wire / between(0.1, 0.95);
  const radius = between(4 * wire, 300 * wire);
  const uneven = random() < 0.5;
  const positions: number[] = [];
  for (let i = 0, z = 0; i < turns; i++, z += pitch * (uneven && random() < 0.3 ? 1 + random() : 1)) positions.push(z);
  const inner = Array.from({ length: 3 }, () => 1 + Math.floor(random() * (turns - 1)));
  const cuts = [...new Set([0, ...inner, turns])].sort((a, b) => a - b);
  return { positions, radius, wireRadius: wire / 2, frequency: between(1e4, 1e8), cuts };
}

export const sectionsOf = (cuts: readonly number[]) => cuts.slice(1).map((to, i) => ({ from: cuts[i]!, to }));

export const even = (turns: number, pitch: number) => Array.from({ length: turns }, (_, i) => i * pitch);

/** The winding of the tables of published values: turns, diameter, pitch, wire in mm. */
export function evenCoil(turns: number, diameterMm: number, pitchMm: number, wireMm: number) {
  return [even(turns, pitchMm / 1e3), diameterMm / 2e3, wireMm / 2e3] as const;
}
