/**
 * The coil where it works: resistance, inductance and Q of every switch position by the field of every turn, and what each
 * position tunes with its dead turns as a coupled circuit.
 *
 * Microhenry, picofarad, kilohertz, ohm and turns outside; SI only towards `physics/`. Geometry tables and the circuit are
 * made once, when first asked for. Turns with corners have their own inductances and length, so at low frequency L is the coil's own
 * to rounding; only the fields that crowd the current are those of circles of equal area.
 */
import {
  type CoupledWinding,
  coupledWinding,
  nodesFor,
  resonanceBracket,
  type TunedCircuit,
} from '../physics/coupled/coupled.ts';
import {
  type FieldTables,
  fieldTables,
  resistivityAt,
  type SectionImpedance,
  sectionInductances,
  solveField,
  solveLitz,
  terminalImpedance,
} from '../physics/field/field.ts';
import { skinDepth } from '../physics/skin.ts';
import { type Coil, LITZ_TAKE_UP } from './coil.ts';

export const RESTS = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;
/** What the switch does with the turns that it does not use. */
export type Rest = (typeof RESTS)[number];

/** What hangs on the coil besides the tuning capacitor. */
export interface Surroundings {
  /** Each tap's lead and switch contact to earth, at its own turn, pF. */
  readonly leadPf: number;
  readonly earthed: 'start' | 'finish';
  readonly celsius: number;
}

export interface Terminal {
  readonly kHz: number;
  readonly inductanceUh: number;
  readonly resistanceOhm: number;
  readonly q: number;
}

/** A resonance with what is not known of it; `secondKhz` null where there is none. */
export interface Tuned {
  readonly kHz: number;
  readonly uncertaintyKhz: number;
  readonly secondKhz: number | null;
}

export class WorkingCoil {
  readonly coil: Coil;
  /** Turns of the switch positions, the whole coil last. */
  readonly taps: readonly number[];
  readonly around: Surroundings;
  /** Turns of the taps of a units switch, which picks one of them or the start as the beginning; empty for one switch. */
  readonly unitTaps: readonly number[];
  #tables: FieldTables | null = null;
  #winding: CoupledWinding | null = null;
  readonly #solved = new Map<string, SectionImpedance>();

  constructor(coil: Coil, taps: readonly number[], around: Surroundings, unitTaps: readonly number[] = []) {
    this.coil = coil;
    this.taps = taps;
    this.around = around;
    this.unitTaps = unitTaps;
  }

  /** Geometry of the turns for the field, SI. */
  get tables(): FieldTables {
    const { places, shape, turnShape, turns } = this.coil;
    const metres = Float64Array.from(places, (z) => z / 1e3);
    this.#tables ??= fieldTables(metres, turnShape, shape.wire.bareMm / 2e3, { turns });
    return this.#tables;
  }

  get #circuit(): CoupledWinding {
    if (this.#winding === null) {
      const nodes = nodesFor(this.coil.turns, [...this.unitTaps, ...this.taps.slice(0, -1)]);
      const sections = nodes.slice(1).map((to, i) => ({ from: nodes[i]!, to }));
      this.#winding = coupledWinding(nodes, sectionInductances(this.tables, sections));
    }
    return this.#winding;
  }

  /**
   * Ohm a turn of the turns 0..turn and of those beyond, evenly over each, at a frequency, for a circuit without resistances between
   * sections: what loops of the rest lose together with the turns in use is given to those, so that the position comes out as it is.
   */
  turnOhm(turn: number, kHz: number, rest: Rest): { used: number; dead: number } {
    const { resistance } = this.sections(kHz, [turn]);
    const turns = this.coil.turns - turn;
    const used = resistance[0]! / turn;
    if (turns < 1e-6) return { used, dead: used };
    const dead = resistance[3]! / turns;
    if (rest === 'open' || rest === 'disconnected') return { used, dead };
    const solved = this.sections(kHz, rest === 'shorted in sections' ? this.#beyond(turn) : [turn]);
    const count = solved.sections.length;
    const even = new Float64Array(count * count);
    solved.sections.forEach(({ from, to }, s) => {
      even[s * count + s] = (to - from) * (from < turn - 1e-6 ? used : dead);
    });
    const inUse = { from: 0, to: 1 };
    const lost = terminalImpedance({ ...solved, resistance: even }, inUse, rest).resistance;
    return { used: used + (terminalImpedance(solved, inUse, rest).resistance - lost) / turn, dead };
  }

  /** Taps from a turn on, but for the whole coil. */
  #beyond(turn: number): number[] {
    return this.taps.filter((tap) => tap >= turn - 1e-6 && tap < this.coil.turns - 1e-6);
  }

  /** Strands of litz thin enough for their model at this frequency; solid wire always is. */
  lossValid(kHz: number): boolean {
    const { strands, strandMm } = this.coil.shape.wire;
    return strands === 1 || strandMm / 1e3 < 1.5 * skinDepth(kHz * 1e3);
  }

  /** Impedance of the sections between these turns, rising, and both ends. */
  sections(kHz: number, cuts: readonly number[]): SectionImpedance {
    const ends = [0, ...cuts, this.coil.turns].filter((turn, i, all) => i === 0 || turn - all[i - 1]! > 1e-6);
    const key = `${kHz} ${ends.join(' ')}`;
    const known = this.#solved.get(key);
    if (known !== undefined) return known;
    const sections = ends.slice(1).map((to, i) => ({ from: ends[i]!, to }));
    const { wire } = this.coil.shape;
    const rho = resistivityAt(this.around.celsius);
    const solved =
      wire.strands > 1
        ? solveLitz(
            this.tables,
            kHz * 1e3,
            rho,
            { strands: wire.strands, strandDiameter: wire.strandMm / 1e3, takeUp: LITZ_TAKE_UP },
            sections,
          )
        : solveField(this.tables, kHz * 1e3, rho, sections);
    this.#solved.set(key, solved);
    return solved;
  }

  /** Low-frequency inductance of the turns from..to, uH. */
  inductanceUh(from: number, to: number): number {
    return from === 0 ? this.coil.inductanceUh(to) : sectionInductances(this.tables, [{ from, to }])[0]! * 1e6;
  }

  /** Resistance and inductance at the ends of the turns from..turn in use, the rest as the switch leaves it. */
  terminal(turn: number, kHz: number, rest: Rest, from = 0): Terminal {
    const before = this.unitTaps.filter((tap) => tap <= from - 1e-6);
    const later = this.#beyond(turn);
    const begin = from > 0 ? [from] : [];
    const solved = this.sections(
      kHz,
      rest === 'shorted in sections' ? [...before, ...begin, ...later] : [...begin, turn],
    );
    const used = solved.sections.findIndex((section) => Math.abs(section.from - from) < 1e-6);
    const { resistance, inductance, q } = terminalImpedance(solved, { from: used, to: used + 1 }, rest);
    return { kHz, inductanceUh: inductance * 1e6, resistanceOhm: resistance, q };
  }

  /** What crowding of the current takes off the inductance at this frequency: low-frequency over working inductance, 1 or more. */
  crowding(turn: number, kHz: number, from = 0): number {
    return this.inductanceUh(from, turn) / this.terminal(turn, kHz, 'open', from).inductanceUh;
  }

  /**
   * The winding between nodes, low-frequency inductances, and what hangs on it with the turns from..turn in use and this much
   * capacitance across them. Every contact has its lead; at the start there is one only when a second switch goes there.
   */
  circuit(
    turn: number,
    pf: number,
    rest: Rest,
    from = 0,
  ): { winding: CoupledWinding; on: Omit<TunedCircuit, 'distribution'> } {
    const { leadPf, earthed } = this.around;
    const units = this.unitTaps.length > 0 ? [0, ...this.unitTaps] : [];
    const contacts = [...units, ...this.taps];
    const on = {
      from,
      to: turn,
      earthed: earthed === 'start' ? ('from' as const) : ('to' as const),
      rest,
      taps: contacts,
      selfCapacitance: this.coil.selfPf(this.coil.turns) * 1e-12,
      tuning: pf * 1e-12,
      strays: leadPf > 0 ? contacts.map((tap) => ({ turn: tap, capacitance: leadPf * 1e-12 })) : [],
    };
    return { winding: this.#circuit, on };
  }

  /**
   * First and second resonance of the turns from..turn with this much capacitance across them, besides the coil's own and the
   * leads'. The circuit has low-frequency inductances; `crowding` (1 = none) raises what comes out by its square root, which
   * holds as long as all inductances shrink by the same share.
   */
  tuned(turn: number, pf: number, rest: Rest, crowding = 1, from = 0): Tuned {
    const { winding, on } = this.circuit(turn, pf, rest, from);
    const found = resonanceBracket(winding, on);
    const scale = Math.sqrt(crowding) / 1e3;
    return {
      kHz: found.first.mean * scale,
      uncertaintyKhz: found.first.uncertainty * scale,
      secondKhz: found.second === undefined ? null : found.second.mean * scale,
    };
  }
}
