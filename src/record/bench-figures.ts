/**
 * Inductance, resistance and resonance of every tap of a coil that lies on the bench: start earthed, the turns beyond a tap open, no
 * leads. What the tables of `measuring` are made of.
 */
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { Shop } from '../job/job.ts';
import { resonanceBracket } from '../physics/coupled/coupled.ts';
import { terminalImpedance } from '../physics/field/field.ts';

/** What clips and a loose coupling put across the coil (common practice). */
export const CLIP_PF = 1;
/** Medhurst's table is stated to 5 %. */
export const SELF_SPREAD = 0.05;
/** What of a shop these figures are taken with. */
export type Bench = Pick<Shop, 'meterKhz' | 'meterAccuracy' | 'capacitorsPf' | 'capacitorTolerance' | 'instruments'>;

/** A tap at a frequency, the rest open. */
export interface AtKhz {
  readonly inductanceUh: number;
  readonly resistanceOhm: number;
  /** Of the turns beyond, by themselves; 0 without any. */
  readonly deadOhm: number;
}

/** So low that no current crowds. */
const NO_CROWDING_KHZ = 1e-3;

/**
 * Inductance and resistance of every tap from the start, the rest open; one solution of the field serves all. Where sections end
 * within a turn their sum is a few parts in a thousand off the whole, at every frequency alike: the share by which the current's
 * crowding lowers it is taken from there, and the inductance itself from the ring sum.
 */
export function sectionsAt(coil: WorkingCoil, kHz: number): AtKhz[] {
  const [solved, plain] = [coil.sections(kHz, coil.taps), coil.sections(NO_CROWDING_KHZ, coil.taps)];
  return coil.taps.map((turn, i) => {
    const used = { from: 0, to: i + 1 };
    const { inductance, resistance } = terminalImpedance(solved, used, 'open');
    const share = inductance / terminalImpedance(plain, used, 'open').inductance;
    const beyond = { from: i + 1, to: solved.sections.length };
    const deadOhm = beyond.from < beyond.to ? terminalImpedance(solved, beyond, 'open').resistance : 0;
    return { inductanceUh: share * coil.coil.inductanceUh(turn), resistanceOhm: resistance, deadOhm };
  });
}

/**
 * First resonance with so much capacitance from the start to a turn: start earthed, no leads. kHz, and half of what is not known.
 * Pieces of turns make the circuit's own inductance a little off, as in `sectionsAt`: that is put right here.
 */
export function resonanceAt(coil: WorkingCoil, turn: number, pf: number): { kHz: number; halfKhz: number } {
  const { winding, on } = coil.circuit(turn, pf, 'open');
  const { first } = resonanceBracket(winding, { ...on, earthed: 'from', strays: [] });
  const node = winding.nodes.findIndex((each) => Math.abs(each - turn) < 1e-6);
  const circuitUh = winding.fromStart[node * winding.nodes.length + node]! * 1e6;
  const scale = Math.sqrt(circuitUh / coil.coil.inductanceUh(turn)) / 1e3;
  return { kHz: first.mean * scale, halfKhz: first.uncertainty * scale };
}

/** Frequencies at which the field is solved; between them what comes of it is taken in between in their logarithm. */
const MOST_SOLVED = 5;

/** What the field says of a tap at any frequency between two. */
export interface WorkedOut {
  /** Low-frequency inductance over that of the field. */
  readonly crowding: number;
  readonly usedOhm: number;
  readonly deadOhm: number;
}

/** Of every tap by its index, at any frequency between two. */
export function workedBetween(
  coil: WorkingCoil,
  lowKhz: number,
  highKhz: number,
): (index: number, kHz: number) => WorkedOut {
  const ratio = highKhz / lowKhz;
  // One capacitor on a coil of one position: there is nothing between.
  const count = ratio > 1 ? Math.min(MOST_SOLVED, 1 + Math.ceil(Math.log2(ratio) + 1e-9)) : 1;
  const solved = Array.from({ length: count }, (_, i) =>
    sectionsAt(coil, lowKhz * ratio ** (count > 1 ? i / (count - 1) : 0)).map(
      ({ inductanceUh, resistanceOhm, deadOhm }, tap): WorkedOut => ({
        crowding: coil.coil.inductanceUh(coil.taps[tap]!) / inductanceUh,
        usedOhm: resistanceOhm,
        deadOhm,
      }),
    ),
  );
  return (index, kHz) => {
    if (count === 1) return solved[0]![index]!;
    const place = Math.min(Math.max((Math.log(kHz / lowKhz) / Math.log(ratio)) * (count - 1), 0), count - 1);
    const i = Math.min(Math.floor(place), count - 2);
    const [a, b] = [solved[i]![index]!, solved[i + 1]![index]!];
    const between = (of: (one: WorkedOut) => number) => of(a) + (place - i) * (of(b) - of(a));
    return {
      crowding: between(({ crowding }) => crowding),
      usedOhm: between(({ usedOhm }) => usedOhm),
      deadOhm: between(({ deadOhm }) => deadOhm),
    };
  };
}
