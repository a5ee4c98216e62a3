/** Old coils for tests: made from a truth, measured with noise, part of it left out. */
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { placeAt } from '../../src/match/layout.ts';
import { atWork, resonantKhz, shownUh } from '../../src/match/readings.ts';
import { State } from '../../src/match/state.ts';
import type { OldCoil, OldTap, Reading } from '../../src/match/types.ts';
import type { Wire } from '../../src/stock/wire.ts';

export const reading = (value: number, uncertainty: number): Reading => ({ value, uncertainty });

export const LOST: OldTap = {
  name: '',
  turns: null,
  positionMm: null,
  angleDeg: null,
  inductance: null,
  resonance: null,
  resistanceOhm: null,
};

export const EMPTY: OldCoil = {
  diameters: [],
  wire: { named: null, covering: 'enamel', bareMm: null, overallMm: null, massG: null, lengthM: null },
  pitchMm: null,
  windingLengthMm: null,
  sections: [],
  tapGapMm: reading(0, 0.02),
  taps: [],
  hand: 'right',
  earthed: 'start',
  formerMaterial: null,
  meterSystematic: 0.01,
  selfCapacitance: 0.15,
  band: null,
  set: null,
  celsius: 20,
};

export const named = (taps: readonly Partial<OldTap>[]): OldTap[] =>
  taps.map((tap, i) => ({ ...LOST, name: `${i + 1}`, ...tap }));

/** Numbers in [0, 1) from a seed, and normal ones. */
export function chance(seed: number) {
  let at = seed >>> 0;
  const uniform = () => {
    at = (at + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(at ^ (at >>> 15), at | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal, between: (low: number, high: number) => low + (high - low) * uniform() };
}

export interface Truth {
  readonly meanMm: number;
  readonly bareMm: number;
  readonly overallMm: number;
  readonly pitchMm: number;
  readonly tapGapMm: number;
  readonly turns: readonly number[];
  readonly inductancesUh: readonly number[];
  readonly positionsMm: readonly number[];
}

export interface Made {
  readonly truth: Truth;
  readonly old: OldCoil;
}

/** A random coil, and what somebody measured of it: errors are normal, their half widths at 95 % as stated. */
export function randomCoil(seed: number): Made {
  const { uniform, normal, between } = chance(seed);
  const noisy = (value: number, half: number): Reading => reading(value + (normal() * half) / 1.96, half);
  const bareMm = between(0.3, 0.8);
  const overallMm = bareMm + between(0.04, 0.12);
  const meanMm = between(40, 110);
  const pitchMm = overallMm * between(1.02, 1.8);
  const tapGap = reading(0, 0.1 * overallMm);
  const tapGapMm = (normal() * tapGap.uncertainty) / 1.96;
  const count = 3 + Math.floor(uniform() * 8);
  const turns: number[] = [];
  for (let i = 0, turn = 4 + Math.floor(uniform() * 8); i < count; i++) {
    turns.push(turn);
    turn += 3 + Math.floor(uniform() * 12);
  }
  const shape = { sections: 1, capacitors: [] };
  const wire: Wire = {
    name: 'of the test',
    covering: 'enamel',
    bareMm,
    bareLowMm: bareMm,
    bareHighMm: bareMm,
    overallMm,
    overallLowMm: overallMm,
    overallHighMm: overallMm,
    strands: 1,
    strandMm: bareMm,
    solderable: false,
    standard: 'none',
    status: 'computed',
  };
  const x = Float64Array.from([meanMm, bareMm, overallMm, tapGapMm, pitchMm, 0, 0, 0]);
  const state = new State(shape, [{ tap: count - 1 }], wire, x, turns);
  const working = new WorkingCoil(state.coilOf(turns[count - 1]!), turns, { leadPf: 0, earthed: 'start', celsius: 20 });
  const [meter, self, length] = [normal() * 0.01, normal() * 0.15, normal() * 0.01].map((one) => one / 1.96) as [
    number,
    number,
    number,
  ];
  const capacitorError = normal() / 1.96;
  const whole = turns[count - 1]!;
  const kHz = uniform() < 0.5 ? 10 : 100;
  const taps = turns.map((turn, i): Partial<OldTap> => {
    const last = i === count - 1;
    const lowUh = state.inductanceUh(turn);
    const positionMm = !last && uniform() < 0.8 ? noisy(state.placeMm(turn), 0.3) : null;
    const counted = uniform() < (last ? 0.7 : 0.3) ? reading(turn, 0) : null;
    const metered = uniform() < 0.35;
    const resonated = !metered && uniform() < 0.2;
    const at = atWork(working, turn, kHz);
    const shown = shownUh(lowUh, kHz, { ...at, ownPf: at.ownPf * (1 + self) }) * (1 + meter);
    const pf = 330;
    const first = working.tuned(turn, pf, 'open').kHz;
    const atFirst = atWork(working, turn, first, pf);
    const resonant = resonantKhz(lowUh, pf * (1 + 0.01 * capacitorError), {
      ...atFirst,
      ownPf: atFirst.ownPf * (1 + self),
    });
    const told = positionMm !== null || counted !== null || last;
    return {
      turns: counted,
      positionMm,
      inductance: metered || !told ? { uh: noisy(shown, 0.005 * shown + 0.05), kHz } : null,
      resonance: resonated ? { kHz: noisy(resonant, 0.005 * resonant), capacitorPf: reading(pf, 0.01 * pf) } : null,
      resistanceOhm:
        last && uniform() < 0.5
          ? noisy(state.resistanceOhm(turn) * (1 + length), 0.01 * state.resistanceOhm(turn) + 0.02)
          : null,
    };
  });
  const formers = uniform() < 0.3 ? 2 : 1;
  const old: OldCoil = {
    ...EMPTY,
    diameters: Array.from({ length: formers }, () => ({
      of: 'former' as const,
      how: 'caliper' as const,
      mm: noisy(meanMm - overallMm, 0.2),
    })),
    wire: { ...EMPTY.wire, bareMm: noisy(bareMm, 0.01), overallMm: noisy(overallMm, 0.01) },
    pitchMm: uniform() < 0.4 ? noisy(pitchMm, 0.01 * pitchMm) : null,
    windingLengthMm: noisy(state.placeMm(whole) + overallMm, 0.3),
    tapGapMm: tapGap,
    taps: named(taps),
  };
  // Something must tell the pitch.
  const pitched =
    old.pitchMm !== null ||
    old.taps.some((tap, i) => tap.turns !== null && (tap.positionMm !== null || i === count - 1));
  return {
    truth: {
      meanMm,
      bareMm,
      overallMm,
      pitchMm,
      tapGapMm,
      turns,
      inductancesUh: turns.map((turn) => state.inductanceUh(turn)),
      positionsMm: turns.map((turn) => placeAt(state.measures, state.ends, state.pushed, turn)),
    },
    old: pitched ? old : { ...old, pitchMm: noisy(pitchMm, 0.01 * pitchMm) },
  };
}
