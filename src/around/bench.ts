/**
 * A finished coil on the bench, by itself: start earthed, the turns beyond the tap open, no leads and no switch; with a known
 * capacitor, a generator and an oscilloscope probe at the hot end. The same laws as `position.ts`, with as few nodes as they need.
 */
import { type Complex, inverseOf, plus, sizeOf } from '../physics/circuit/complex.ts';
import { EARTH, type Network, portImpedance } from '../physics/circuit/network.ts';
import { selfCapacitances } from '../physics/coupled/capacitance.ts';
import type { CoupledWinding } from '../physics/coupled/coupled.ts';
import { connect } from '../physics/coupled/network.ts';

/** Turns up to a tap at one frequency, the rest open. */
export interface BenchTap {
  readonly turn: number;
  /** Of the turns in use at this frequency. */
  readonly inductanceUh: number;
  readonly usedOhm: number;
  readonly deadOhm: number;
  /** In parallel, for the former's loss, S. */
  readonly formerSiemens: number;
  /** Of the whole coil. */
  readonly selfPf: number;
}

/** Generator and probe at the hot end. */
export interface Instruments {
  readonly generatorOhm: number;
  /** Between generator and hot end; null: by a loop so loose that it loads nothing. */
  readonly couplingPf: number | null;
  /** 0: none. */
  readonly probePf: number;
  readonly probeOhm: number;
}

export interface Seen {
  /** Where the probe shows most. */
  readonly kHz: number;
  /** Between the frequencies where it shows 0.707 of that. */
  readonly widthKhz: number;
  /** Shares of the loss there: of former, and of generator and probe; the rest is the wire's. */
  readonly formerShare: number;
  readonly instrumentShare: number;
}

/** Stretches of the turns in use, and of those beyond: of 4 and 2 the resonance of 100 turns is 2e-4 off, which a ratio hardly sees. */
const STRETCHES = { used: 8, dead: 8 } as const;

/** The nodes of a winding that are kept: both ends, the tap, and few between, as evenly as there are. */
function coarse({ nodes, fromStart }: CoupledWinding, turn: number): CoupledWinding {
  const points = nodes.length;
  const tap = nodes.findIndex((node) => Math.abs(node - turn) < 1e-6);
  if (tap < 1) throw new RangeError(`turn ${turn} is no node of the winding`);
  const spread = (from: number, to: number, count: number) => {
    const pieces = Math.min(count, to - from);
    return Array.from({ length: pieces }, (_, i) => from + Math.round(((i + 1) * (to - from)) / pieces));
  };
  const kept = [0, ...spread(0, tap, STRETCHES.used), ...spread(tap, points - 1, STRETCHES.dead)];
  return {
    nodes: Float64Array.from(kept, (k) => nodes[k]!),
    fromStart: Float64Array.from(kept.flatMap((m) => kept.map((n) => fromStart[m * points + n]!))),
  };
}

/** Admittance at the hot end of a network, S at rad/s, between few frequencies by a polynomial in each window of them. */
class HotEnd {
  readonly #network: Network;
  readonly #hot: number;
  readonly #windows = new Map<number, readonly { readonly omega: number; readonly value: Complex }[]>();

  constructor(network: Network, hot: number) {
    this.#network = network;
    this.#hot = hot;
  }

  admittance(omega: number): Complex {
    const k = Math.round(Math.log(omega) / WINDOW);
    const known = this.#windows.get(k) ?? this.#solved(k);
    this.#windows.set(k, known);
    let [re, im] = [0, 0];
    for (const { omega: at, value } of known) {
      let weight = 1;
      for (const other of known) if (other.omega !== at) weight *= (omega - other.omega) / (at - other.omega);
      re += weight * value.re;
      im += weight * value.im;
    }
    return { re: re / omega, im: im / omega };
  }

  /** omega Y, which is even of a coil, at the places of Chebyshev. */
  #solved(k: number) {
    return Array.from({ length: PLACES }, (_, i) => {
      const omega = Math.exp(WINDOW * (k + 0.55 * Math.cos((Math.PI * (i + 0.5)) / PLACES)));
      const Z = portImpedance(this.#network, omega, [this.#hot]);
      const Y = inverseOf({ re: Z.re[0]!, im: Z.im[0]! });
      return { omega, value: { re: omega * Y.re, im: omega * Y.im } };
    });
  }
}

/** Of ln omega, and frequencies in each: what is between is right to 1e-7. */
const WINDOW = 0.12;
const PLACES = 5;

/** The coil up to a tap at one frequency. */
export class BenchCoil {
  readonly #end: HotEnd;
  readonly #former: number;

  /** @throws RangeError for a turn that is no tap */
  constructor(winding: CoupledWinding, tap: BenchTap) {
    const few = coarse(winding, tap.turn);
    const { turn } = tap;
    const connected = connect(few, { from: 0, to: turn, earthed: 'from', rest: 'open', taps: [] });
    const node = (k: number) => (k === 0 ? EARTH : k - 1);
    const points = few.nodes.length;
    const size = points - 1;
    const turns = few.nodes[size]!;
    const at = (m: number, n: number) => few.fromStart[m * points + n]!;
    const end = connected.index[connected.hot]!;
    const scale = tap.inductanceUh / (at(end, end) * 1e6);
    const resistance = new Float64Array(size * size);
    const inductance = new Float64Array(size * size);
    for (let s = 0; s < size; s++) {
      const long = few.nodes[s + 1]! - few.nodes[s]!;
      resistance[s * size + s] = s < end ? (tap.usedOhm * long) / turn : (tap.deadOhm * long) / (turns - turn);
      for (let t = 0; t < size; t++)
        inductance[s * size + t] = scale * (at(s + 1, t + 1) - at(s, t + 1) - at(s + 1, t) + at(s, t));
    }
    const own = selfCapacitances(few, connected, 'from', tap.selfPf * 1e-12, 'spread');
    const network: Network = {
      nodes: size,
      coils: Array.from({ length: size }, (_, s) => ({ from: node(s), to: node(s + 1) })),
      resistance,
      inductance,
      capacitors: Array.from(own, (capacitance, k) => ({ from: node(k), to: EARTH, capacitance })).slice(1),
      conductances: tap.formerSiemens > 0 ? [{ from: node(end), to: EARTH, conductance: tap.formerSiemens }] : [],
    };
    this.#end = new HotEnd(network, node(end));
    this.#former = tap.formerSiemens;
  }

  /**
   * What the probe shows with a known capacitor (pF; 0: none) near a frequency, or what there is without instruments. With a
   * coupling capacitor that is the voltage for an even one of the generator, which pushes a low broad peak up a little; else, and
   * without instruments, that for an even current. Null where everything together is damped so that no peak has two sides.
   */
  seen(capacitorPf: number, instruments: Instruments | null, nearKhz: number): Seen | null {
    const loads = (omega: number) => loadsOf(instruments, omega);
    const size = (kHz: number) => {
      const omega = 2e3 * Math.PI * kHz;
      const { generator, probe } = loads(omega);
      const Y = this.#end.admittance(omega);
      const all = plus(plus(plus(Y, { re: 0, im: omega * capacitorPf * 1e-12 }), generator), probe);
      const drive = instruments === null || instruments.couplingPf === null ? 1 : sizeOf(generator);
      return drive / sizeOf(all);
    };
    const kHz = peakOf(size, nearKhz);
    if (kHz === null) return null;
    const edge = size(kHz) * Math.SQRT1_2;
    const [below, above] = [edgeOf(size, kHz, -1, edge), edgeOf(size, kHz, 1, edge)];
    if (below === null || above === null) return null;
    const omega = 2e3 * Math.PI * kHz;
    const { generator, probe } = loads(omega);
    const lost = generator.re + probe.re;
    const all = this.#end.admittance(omega).re + lost;
    return {
      kHz,
      widthKhz: above - below,
      formerShare: this.#former / all,
      instrumentShare: lost / all,
    };
  }
}

const NOTHING: Complex = { re: 0, im: 0 };

/** Admittances of both at the hot end. */
function loadsOf(instruments: Instruments | null, omega: number): { generator: Complex; probe: Complex } {
  if (instruments === null) return { generator: NOTHING, probe: NOTHING };
  const { generatorOhm, couplingPf, probePf, probeOhm } = instruments;
  const generator =
    couplingPf === null ? NOTHING : inverseOf({ re: generatorOhm, im: -1 / (omega * couplingPf * 1e-12) });
  return { generator, probe: { re: 1 / probeOhm, im: omega * probePf * 1e-12 } };
}

/** How far from where it is looked for a peak may lie, and how near it is found. */
const FAR = 2;
const NEAR = 1e-8;

/** Uphill with halved steps; null when it runs away. */
function peakOf(size: (kHz: number) => number, nearKhz: number): number | null {
  let centre = nearKhz;
  let step = nearKhz * 0.02;
  while (step > nearKhz * NEAR) {
    const [a, b, c] = [size(centre - step), size(centre), size(centre + step)];
    if (b >= a && b >= c) step /= 2;
    else centre += a > c ? -step : step;
    if (centre > nearKhz * FAR || centre < nearKhz / FAR) return null;
  }
  return centre;
}

/** Where less than `edge` is left, on one side of the peak; null: nowhere near. */
function edgeOf(size: (kHz: number) => number, kHz: number, way: 1 | -1, edge: number): number | null {
  let [inside, outside] = [0, kHz * 1e-4];
  while (size(kHz + way * outside) > edge) {
    inside = outside;
    outside *= 1.5;
    if (outside > 0.7 * kHz) return null;
  }
  for (let i = 0; i < 40; i++) {
    const middle = (inside + outside) / 2;
    if (size(kHz + way * middle) > edge) inside = middle;
    else outside = middle;
  }
  return kHz + way * outside;
}
