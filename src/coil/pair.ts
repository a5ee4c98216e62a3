/**
 * A main coil and a second winding on the same axis, each where its turns lie: mutual inductance by the sum over pairs of rings,
 * coupling, and both at the working frequency by the field of both. Microhenry, millimetres, kilohertz and turns outside.
 */
import { fieldTables, resistivityAt, type Section } from '../physics/field/field.ts';
import type { FieldTables } from '../physics/field/tables.ts';
import { type PairImpedance, pairMutual, type Side, solvePair } from '../physics/field/two-windings.ts';
import { type Coil, LITZ_TAKE_UP } from './coil.ts';
import type { WorkingCoil } from './working-coil.ts';

const VACUUM_PF_PER_M = 8.8541878188;

/** What the pair is at a frequency, seen from the turns 0..turn of the main coil and the whole second winding. */
export interface PairAt {
  readonly kHz: number;
  readonly mainUh: number;
  readonly secondUh: number;
  readonly mutualUh: number;
  /** M over the root of the product of the two inductances. */
  readonly coupling: number;
  /** Copper of the second winding in the field of both. */
  readonly secondOhm: number;
  /** What the copper of the second winding adds to the turns in use of the main coil, nothing connected to it. */
  readonly addedOhm: number;
  /** Resistance between the two by the loss in either's copper: voltage in phase with the current of the other. */
  readonly mutualOhm: number;
}

export class CoilPair {
  readonly main: WorkingCoil;
  /** Its Z is counted as the main coil's. */
  readonly second: Coil;
  readonly #tables: FieldTables;
  readonly #solved = new Map<string, PairImpedance>();

  constructor(main: WorkingCoil, second: Coil) {
    this.main = main;
    this.second = second;
    const { places, turnShape, shape, turns } = second;
    const metres = Float64Array.from(places, (z) => z / 1e3);
    this.#tables = fieldTables(metres, turnShape, shape.wire.bareMm / 2e3, { turns });
  }

  get #whole(): Section {
    return { from: 0, to: this.second.turns };
  }

  /** Mutual inductance of the turns from..to of the main coil with the whole second winding, low frequency. */
  mutualUh(from: number, to: number): number {
    return pairMutual(this.main.tables, { from, to }, this.#tables, this.#whole) * 1e6;
  }

  /** Coupling coefficient of the turns 0..turn, low frequency. */
  coupling(turn = this.main.coil.turns): number {
    const both = this.main.coil.inductanceUh(turn) * this.second.inductanceUh(this.second.turns);
    return this.mutualUh(0, turn) / Math.sqrt(both);
  }

  #solve(turn: number, kHz: number): PairImpedance {
    const key = `${turn} ${kHz}`;
    const known = this.#solved.get(key);
    if (known !== undefined) return known;
    const { turns } = this.main.coil;
    const sections =
      turns - turn > 1e-6
        ? [
            { from: 0, to: turn },
            { from: turn, to: turns },
          ]
        : [{ from: 0, to: turns }];
    const first: Side = { tables: this.main.tables, bundle: bundleOf(this.main.coil), sections };
    const second: Side = { tables: this.#tables, bundle: bundleOf(this.second), sections: [this.#whole] };
    const solved = solvePair(first, second, kHz * 1e3, resistivityAt(this.main.around.celsius));
    this.#solved.set(key, solved);
    return solved;
  }

  /** The turns 0..turn in use, the rest open. */
  at(turn: number, kHz: number): PairAt {
    const { count, inductance, resistance } = this.#solve(turn, kHz);
    const last = count - 1;
    const [mainH, mutualH, secondH] = [inductance[0]!, inductance[last]!, inductance[count * count - 1]!];
    const alone = this.main.terminal(turn, kHz, 'open').resistanceOhm;
    return {
      kHz,
      mainUh: mainH * 1e6,
      secondUh: secondH * 1e6,
      mutualUh: mutualH * 1e6,
      coupling: mutualH / Math.sqrt(mainH * secondH),
      secondOhm: resistance[count * count - 1]!,
      addedOhm: resistance[0]! - alone,
      mutualOhm: resistance[last]!,
    };
  }

  /**
   * Capacitance between the two where they lie over one another, pF at a turn of the main coil: of coaxial cylinders through the middles of
   * the gap's two faces, `permittivity` of what fills it. An estimate; field beyond the overlap is left out.
   */
  betweenPf(permittivity: number): { turn: number; pf: number }[] {
    const [a, b] = [this.main.coil, this.second];
    const outer = (coil: Coil) => (coil.equivalentDiameterMm + coil.shape.wire.bareMm) / 2;
    const inner = (coil: Coil) => (coil.equivalentDiameterMm - coil.shape.wire.bareMm) / 2;
    const ratio = inner(a) > outer(b) ? inner(a) / outer(b) : inner(b) / outer(a);
    if (!(ratio > 1)) return [];
    const [low, high] = [b.positionMm(0), b.positionMm(b.turns)];
    const perMm = (2e-3 * Math.PI * VACUUM_PF_PER_M * permittivity) / Math.log(ratio);
    const parts: { turn: number; pf: number }[] = [];
    for (let turn = 0; turn < a.turns; turn++) {
      const to = Math.min(turn + 1, a.turns);
      const [from, end] = [Math.max(a.positionMm(turn), low), Math.min(a.positionMm(to), high)];
      if (end > from) parts.push({ turn: (turn + to) / 2, pf: perMm * (end - from) });
    }
    return parts;
  }
}

function bundleOf({ shape: { wire } }: Coil): Side['bundle'] {
  return wire.strands > 1 ? { strands: wire.strands, strandDiameter: wire.strandMm / 1e3, takeUp: LITZ_TAKE_UP } : null;
}
