/**
 * A tuned position with what the set connects: aerial at one node, detector at one, tuning capacitor at the hot end. Voltages per
 * volt of the aerial's source, the capacitance that tunes it, loaded Q, bandwidth and what is left of neighbouring channels.
 */
import {
  type Complex,
  type ComplexMatrix,
  inverseMatrix,
  inverseOf,
  plus,
  sizeOf,
  times,
  zeroMatrix,
} from '../physics/circuit/complex.ts';
import { EARTH, portImpedance } from '../physics/circuit/network.ts';
import type { Position } from './position.ts';

/** A source of voltage with an impedance in series, ohm at omega in rad/s. */
export type SourceImpedance = (omega: number) => Complex;

/** Detector and what follows it, in parallel to earth. */
export interface Load {
  /** S; 0 for none. */
  readonly conductance: number;
  /** F. */
  readonly capacitance: number;
}

/** Where aerial and detector are connected: a tap, counted from 1; 0, the start of a coil whose finish is earthed; the second winding; whichever end is hot. */
export type Contact = number | 'second' | 'hot';

export interface Connected {
  readonly aerial: { readonly at: Contact; readonly source: SourceImpedance } | null;
  readonly detector: { readonly at: Contact; readonly load: Load };
}

/** Impedances between every contact of a position, and its hot end, at any frequency near the one it was made for. */
export class Ports {
  readonly #position: Position;
  readonly #nodes: readonly number[];
  readonly #known = new Map<number, ComplexMatrix>();

  constructor(position: Position) {
    this.#position = position;
    const { hot, taps, second } = position;
    const all = second === null ? [hot, ...taps] : [hot, ...taps, second];
    this.#nodes = [...new Set(all)].filter((node) => node !== EARTH);
  }

  /** Its place among the ports; null of a contact that lies on earth, or is not there. */
  at(contact: Contact): number | null {
    const { hot, start, taps, second } = this.#position;
    const node = contact === 'hot' ? hot : contact === 'second' ? second : contact === 0 ? start : taps[contact - 1];
    const place = node === null || node === undefined ? -1 : this.#nodes.indexOf(node);
    return place < 0 ? null : place;
  }

  impedance(omega: number): ComplexMatrix {
    let known = this.#known.get(omega);
    if (known === undefined) {
      known = portImpedance(this.#position.network, omega, this.#nodes);
      this.#known.set(omega, known);
    }
    return known;
  }
}

/** Voltages for one volt of the source; the impedance at the hot end with everything connected. */
interface Voltages {
  readonly hot: Complex;
  readonly detector: Complex;
  readonly atHot: Complex;
}

const NOTHING: Complex = { re: 0, im: 0 };

/** Everything connected at one frequency; `tuning` is the capacitance at the hot end, F. Null where a contact is on earth. */
function voltagesAt(ports: Ports, connected: Connected, omega: number, tuning: number): Voltages | null {
  const hot = ports.at('hot')!;
  const detector = ports.at(connected.detector.at);
  const aerial = connected.aerial === null ? null : ports.at(connected.aerial.at);
  if (detector === null || (connected.aerial !== null && aerial === null)) return null;
  const used = [...new Set([hot, detector, ...(aerial === null ? [] : [aerial])])];
  const place = (port: number) => used.indexOf(port);
  const size = used.length;
  const Z = subMatrix(ports.impedance(omega), used);
  const admittance: Complex[] = used.map(() => NOTHING);
  const add = (port: number, value: Complex) => {
    admittance[place(port)] = plus(admittance[place(port)]!, value);
  };
  add(hot, { re: 0, im: omega * tuning });
  const { conductance, capacitance } = connected.detector.load;
  add(detector, { re: conductance, im: omega * capacitance });
  const source = connected.aerial === null ? NOTHING : inverseOf(connected.aerial.source(omega));
  if (aerial !== null) add(aerial, source);
  // V = (1 + Z Y)^-1 Z I
  const loaded = zeroMatrix(size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      const product = times(entry(Z, i, j), admittance[j]!);
      loaded.re[i * size + j] = product.re + (i === j ? 1 : 0);
      loaded.im[i * size + j] = product.im;
    }
  }
  const back = inverseMatrix(loaded);
  const transfer = (to: number, from: number) => {
    let sum = NOTHING;
    for (let k = 0; k < size; k++) sum = plus(sum, times(entry(back, to, k), entry(Z, k, from)));
    return sum;
  };
  const drive = (to: number) => (aerial === null ? NOTHING : times(transfer(place(to), place(aerial)), source));
  return { hot: drive(hot), detector: drive(detector), atHot: transfer(place(hot), place(hot)) };
}

const entry = ({ re, im, size }: ComplexMatrix, i: number, j: number): Complex => ({
  re: re[i * size + j]!,
  im: im[i * size + j]!,
});

function subMatrix(matrix: ComplexMatrix, of: readonly number[]): ComplexMatrix {
  const out = zeroMatrix(of.length);
  of.forEach((p, i) => {
    of.forEach((q, j) => {
      const { re, im } = entry(matrix, p, q);
      out.re[i * of.length + j] = re;
      out.im[i * of.length + j] = im;
    });
  });
  return out;
}

/** Share of the frequency over which the slope of the susceptance is taken. */
const SLOPE = 1e-3;

/** A position as tuned to a frequency. */
export interface TunedTo {
  readonly kHz: number;
  /** Capacitance at the hot end that it takes, besides what the network holds, pF; may be below 0: then it cannot be tuned so high. */
  readonly tuningPf: number;
  /** With everything connected. */
  readonly q: number;
  /** Between the frequencies at which 0.707 of the voltage at the hot end is left, by Q. */
  readonly bandwidthKhz: number;
  /** Volts at the detector, and at the hot end, per volt of the aerial's source; 0 without an aerial. */
  readonly gain: number;
  readonly hotGain: number;
  /** Power into the detector's conductance per square volt of the source, W. */
  readonly power: number;
}

/**
 * What it takes to tune a position to a frequency with aerial and detector connected, and what comes of it. Null where a contact is
 * on earth. Everything that is connected counts, so `q` is loaded.
 */
export function tunedTo(ports: Ports, connected: Connected, kHz: number): TunedTo | null {
  const omega = 2e3 * Math.PI * kHz;
  const bare = (w: number) => voltagesAt(ports, connected, w, 0)?.atHot ?? null;
  const at = bare(omega);
  const low = bare(omega * (1 - SLOPE));
  const high = bare(omega * (1 + SLOPE));
  if (at === null || low === null || high === null) return null;
  const Y = inverseOf(at);
  const tuning = -Y.im / omega;
  // The tuning capacitor's own slope joins that of the coil.
  const slope = (inverseOf(high).im - inverseOf(low).im) / (2 * SLOPE * omega) + tuning;
  const q = (omega * slope) / (2 * Y.re);
  const found = voltagesAt(ports, connected, omega, tuning)!;
  const gain = sizeOf(found.detector);
  return {
    kHz,
    tuningPf: tuning * 1e12,
    q,
    bandwidthKhz: kHz / q,
    gain,
    hotGain: sizeOf(found.hot),
    power: gain ** 2 * connected.detector.load.conductance,
  };
}

/** Capacitance at the hot end that tunes a position to a frequency, pF, as in `tunedTo`, and nothing else. Null where a contact is on earth. */
export function tuningFor(ports: Ports, connected: Connected, kHz: number): number | null {
  const omega = 2e3 * Math.PI * kHz;
  const at = voltagesAt(ports, connected, omega, 0);
  return at === null ? null : (-inverseOf(at.atHot).im / omega) * 1e12;
}

/** Volts at the detector per volt of the aerial's source with this capacitance at the hot end, pF; 0 where a contact is on earth. */
export function gainAt(ports: Ports, connected: Connected, kHz: number, tuningPf: number): number {
  const at = voltagesAt(ports, connected, 2e3 * Math.PI * kHz, tuningPf * 1e-12);
  return at === null ? 0 : sizeOf(at.detector);
}

/** Voltage at the detector this far off, with the tuning as it is, over that on frequency; the stronger of the two sides. */
export function leftOf(ports: Ports, connected: Connected, tuned: TunedTo, offKhz: number): number {
  const tuning = tuned.tuningPf * 1e-12;
  const sides = [-offKhz, offKhz].map((off) => {
    const found = voltagesAt(ports, connected, 2e3 * Math.PI * (tuned.kHz + off), tuning);
    return found === null ? 0 : sizeOf(found.detector);
  });
  return Math.max(...sides) / tuned.gain;
}
