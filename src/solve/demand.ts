/**
 * The wish turned into demands: which inductance each switch position must have.
 *
 * A band is turned by the tuned circuit f = 1 / (2 pi sqrt(L C)): the whole coil with all capacitance in reaches the lower
 * edge, the first tap with all capacitance out the upper edge, and the upper edges of the positions between are spread
 * evenly in ratio. Capacitance is that of the set (capacitor, stray, aerial) and what the coil itself puts across the
 * position, its dead turns counted (`CoilView.selfPf`).
 */
import type { Job } from '../job/job.ts';
import { inductanceFor } from '../physics/tuning.ts';

export type Wish = Job['want'];
export type SetCircuit = NonNullable<Job['set']>;

/** What a coil must tell to have its targets worked out; inductances in uH, capacitances in pF. */
export interface CoilView {
  /** Capacitance that the coil itself puts across the section up to this inductance, dead turns counted. */
  selfPf(inductanceUh: number): number;
  /** Inductance of the section up to this turn. */
  at(turn: number): number;
  /** Turn at which the section has this inductance. */
  turnFor(inductanceUh: number): number;
}

export interface Demand {
  readonly kind: Wish['kind'];
  /** Switch positions; of a two-switch coil the contacts of the tens switch. */
  readonly taps: number;
  /** Contacts of the units switch, the start among them; null: one switch. */
  readonly units: number | null;
  readonly spacing: string;
  readonly text: string;
  /** Least overlap of neighbouring positions, a fraction; null when not asked. */
  readonly overlap: number | null;
  readonly band: { readonly lowKhz: number; readonly highKhz: number } | null;
  /** Inductance of the whole coil for its own self-capacitance in pF. */
  wholeUh(selfPf: number): number;
  /** Inductance of every position, lowest first, the whole coil last. */
  targetsUh(view: CoilView): number[];
}

/** Capacitance in pF with the capacitor all out and all in, self-capacitance not counted. */
export function setCapacitance(set: SetCircuit): { outPf: number; inPf: number } {
  const fixed = set.strayPf + set.aerialPf;
  return { outPf: set.capacitorLowPf + fixed, inPf: set.capacitorHighPf + fixed };
}

const uh = (kHz: number, pf: number) => inductanceFor(kHz * 1e3, pf * 1e-12) * 1e6;

function range(want: Extract<Wish, { kind: 'range' }>): Demand {
  const { lowUh, highUh, taps, spacing } = want;
  const share = (i: number) => (taps === 1 ? 1 : i / (taps - 1));
  const targets = (view: CoilView): number[] => {
    const first = spacing === 'even turns' ? view.turnFor(lowUh) : 0;
    const last = spacing === 'even turns' ? view.turnFor(highUh) : 0;
    return Array.from({ length: taps }, (_, i) => {
      const s = share(i);
      if (i === taps - 1) return highUh;
      if (i === 0) return lowUh;
      if (spacing === 'even ratio') return lowUh * (highUh / lowUh) ** s;
      if (spacing === 'even turns') return view.at(first + (last - first) * s);
      // Frequency goes with 1 / sqrt(L): even steps of that from the highest to the lowest.
      return (lowUh ** -0.5 + (highUh ** -0.5 - lowUh ** -0.5) * s) ** -2;
    });
  };
  return {
    kind: 'range',
    taps,
    units: null,
    spacing,
    text: `${lowUh} µH to ${highUh} µH on ${taps} switch positions, ${spacing}`,
    overlap: null,
    band: null,
    wholeUh: () => highUh,
    targetsUh: targets,
  };
}

/** The tens contacts stand every `units` turns, wherever the inductance falls; the last is the whole coil. */
function twoSwitches(want: Extract<Wish, { kind: 'range' }>, units: number): Demand {
  const { lowUh, highUh, taps } = want;
  return {
    kind: 'range',
    taps,
    units,
    spacing: `every ${units} turns`,
    text: `${lowUh} µH to ${highUh} µH on two switches, ${units} units and ${taps} tens: every whole number of turns from 1 to ${units * taps}`,
    overlap: null,
    band: null,
    wholeUh: () => highUh,
    targetsUh: (view) => Array.from({ length: taps }, (_, i) => (i === taps - 1 ? highUh : view.at((i + 1) * units))),
  };
}

/** Turns of the whole coil where the demand fixes them: two switches leave no choice. Null: the inductance decides. */
export function fixedTurnsOf({ units, taps }: Demand): number | null {
  return units === null ? null : units * taps;
}

/** Taps brought out between start and finish. */
export function tapsBetween({ units, taps }: Demand): number {
  return taps - 1 + (units === null ? 0 : units - 1);
}

function list(inductancesUh: readonly number[]): Demand {
  const last = inductancesUh[inductancesUh.length - 1]!;
  return {
    kind: 'list',
    taps: inductancesUh.length,
    units: null,
    spacing: 'as listed',
    text: `${inductancesUh.map((value) => `${value}`).join(', ')} µH`,
    overlap: null,
    band: null,
    wholeUh: () => last,
    targetsUh: () => [...inductancesUh],
  };
}

/** Fewest positions whose coverages, each `cover` wide in frequency, fill `band` with this overlap; may be Infinity. */
export function fewestPositions(band: number, cover: number, overlap: number): number {
  if (band <= cover) return 1;
  const gain = cover / (1 + overlap);
  if (gain <= 1) return Number.POSITIVE_INFINITY;
  return Math.ceil(1 + Math.log(band / cover) / Math.log(gain) - 1e-9);
}

/** Fewest positions that a band needs when every section has this self-capacitance in pF; may be Infinity. */
export function positionsFor(want: Extract<Wish, { kind: 'band' }>, set: SetCircuit, selfPf: number): number {
  const { outPf, inPf } = setCapacitance(set);
  return fewestPositions(want.highKhz / want.lowKhz, Math.sqrt((inPf + selfPf) / (outPf + selfPf)), want.overlap);
}

function band(want: Extract<Wish, { kind: 'band' }>, set: SetCircuit, taps: number): Demand {
  const { outPf, inPf } = setCapacitance(set);
  const targets = (view: CoilView): number[] => {
    const whole = uh(want.lowKhz, inPf + view.selfPf(Number.POSITIVE_INFINITY));
    const wholeTop = want.lowKhz * Math.sqrt((inPf + view.selfPf(whole)) / (outPf + view.selfPf(whole)));
    return Array.from({ length: taps }, (_, i) => {
      if (i === taps - 1) return whole;
      const top = want.highKhz * (wholeTop / want.highKhz) ** (i / (taps - 1));
      let value = uh(top, outPf);
      for (let round = 0; round < 8; round++) value = uh(top, outPf + view.selfPf(value));
      return value;
    });
  };
  return {
    kind: 'band',
    taps,
    units: null,
    spacing: 'even ratio of upper edges',
    text: `${want.lowKhz} kHz to ${want.highKhz} kHz with ${set.capacitorLowPf} to ${set.capacitorHighPf} pF, overlap ${(want.overlap * 100).toFixed(0)} % at least`,
    overlap: want.overlap,
    band: { lowKhz: want.lowKhz, highKhz: want.highKhz },
    wholeUh: (selfPf) => uh(want.lowKhz, inPf + selfPf),
    targetsUh: targets,
  };
}

/**
 * The demand of a job. A band that leaves the taps out gets as many as it needs when every section has `selfPf`; that
 * number may be more than a switch has, or Infinity. A band without a set has been refused when the job was read.
 */
export function demandOf(job: Job, selfPf: number): Demand {
  const { units } = job.winding;
  if (job.want.kind === 'range') return units === null ? range(job.want) : twoSwitches(job.want, units);
  if (job.want.kind === 'list') return list(job.want.inductancesUh);
  if (job.set === null) throw new Error('a band without a set passed the reading of the job');
  return band(job.want, job.set, job.want.taps ?? positionsFor(job.want, job.set, selfPf));
}
