/**
 * A winding of whole turns on a surface coaxial with the main coil, and how its coupling goes with turns and place. The mutual
 * inductance of one turn with the whole main coil is worked out by Maxwell's formula every half millimetre and read between by the
 * cubic through four: within 1e-4 of the sum over all pairs where the wires are 2 mm apart, so that a search costs next to nothing.
 * What is reported comes from the full sum (`CoilPair`).
 */
import { Coil } from '../../coil/coil.ts';
import type { WorkingCoil } from '../../coil/working-coil.ts';
import { ringsOf } from '../../physics/field/sections.ts';
import { coaxialMutual } from '../../physics/maxwell.ts';
import type { Wire } from '../../stock/wire.ts';

export interface SecondShape {
  readonly wire: Wire;
  readonly pitchMm: number;
  readonly meanDiameterMm: number;
}

const STEP_MM = 0.5;
/** The least that a place is told apart by, mm. */
const FINE_MM = 1e-3;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

export class SecondTurns {
  readonly shape: SecondShape;
  readonly #rings: ReturnType<typeof ringsOf>;
  readonly #mainUh: number;
  readonly #known = new Map<number, number>();
  #alone: Coil | null = null;

  constructor(main: WorkingCoil, shape: SecondShape) {
    this.shape = shape;
    this.#rings = ringsOf(main.tables, { from: 0, to: main.coil.turns });
    this.#mainUh = main.coil.inductanceUh(main.coil.turns);
  }

  /** From its start hole at `startMm` up. */
  coil(turns: number, startMm: number): Coil {
    return new Coil({ ...this.shape, turns, gaps: [], startMm });
  }

  /** Alone, low frequency. */
  inductanceUh(turns: number): number {
    if (this.#alone === null || this.#alone.turns < turns) this.#alone = this.coil(Math.max(2 * turns, 40), 0);
    return this.#alone.inductanceUh(turns);
  }

  /** One turn at Z with the whole main coil, uH. */
  #turnUh(z: number): number {
    const radius = this.shape.meanDiameterMm / 2e3;
    let sum = 0;
    for (const { radius: own, place, fraction } of this.#rings)
      sum += fraction * coaxialMutual(own, radius, place - z / 1e3);
    return sum * 1e6;
  }

  #at(index: number): number {
    let value = this.#known.get(index);
    if (value === undefined) {
      value = this.#turnUh(index * STEP_MM);
      this.#known.set(index, value);
    }
    return value;
  }

  #between(z: number): number {
    const i = Math.floor(z / STEP_MM);
    const t = z / STEP_MM - i;
    const [a, b, c, d] = [this.#at(i - 1), this.#at(i), this.#at(i + 1), this.#at(i + 2)];
    return (
      (-a * t * (t - 1) * (t - 2)) / 6 +
      (b * (t + 1) * (t - 1) * (t - 2)) / 2 -
      (c * (t + 1) * t * (t - 2)) / 2 +
      (d * (t + 1) * t * (t - 1)) / 6
    );
  }

  #coupling(turns: number, startMm: number, of: (z: number) => number): number {
    let sum = 0;
    for (let i = 0; i < turns; i++) sum += of(startMm + (i + 0.5) * this.shape.pitchMm);
    return sum / Math.sqrt(this.#mainUh * this.inductanceUh(turns));
  }

  /** Coupling coefficient with the whole main coil, by the table. */
  coupling(turns: number, startMm: number): number {
    return this.#coupling(turns, startMm, (z) => this.#between(z));
  }

  /** The same by the sum over all pairs. */
  exactCoupling(turns: number, startMm: number): number {
    return this.#coupling(turns, startMm, (z) => this.#turnUh(z));
  }

  /** Where between two places of the start hole the coupling is greatest. It has one maximum: at the middle of the main coil. */
  tightest(turns: number, lowMm: number, highMm: number): number {
    let [low, high] = [lowMm, highMm];
    while (high - low > FINE_MM) {
      const [a, b] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
      if (this.coupling(turns, a) < this.coupling(turns, b)) low = a;
      else high = b;
    }
    const middle = (low + high) / 2;
    const ends = [lowMm, middle, highMm];
    return ends.reduce((best, z) => (this.coupling(turns, z) > this.coupling(turns, best) ? z : best));
  }

  /** The place between the tightest and a looser one that has this coupling, to 1e-5 of it; it must lie between theirs. */
  placeFor(turns: number, coupling: number, tightMm: number, looseMm: number): number {
    let [near, far] = [tightMm, looseMm];
    while (Math.abs(far - near) > FINE_MM) {
      const middle = (near + far) / 2;
      if (this.coupling(turns, middle) > coupling) near = middle;
      else far = middle;
    }
    let place = (near + far) / 2;
    // What the table is off is taken up by its own slope.
    const step = looseMm > tightMm ? 0.05 : -0.05;
    for (let k = 0; k < 3; k++) {
      const slope = (this.coupling(turns, place + step) - this.coupling(turns, place - step)) / (2 * step);
      const off = this.exactCoupling(turns, place) - coupling;
      if (Math.abs(off) < 1e-6 * coupling || slope === 0) break;
      const next = place - off / slope;
      place = Math.min(Math.max(next, Math.min(tightMm, looseMm)), Math.max(tightMm, looseMm));
    }
    return place;
  }
}
