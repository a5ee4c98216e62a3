/**
 * The aerial as a one-port of R, L and C: what its source has in series towards the coil. From this list the impedance is worked out,
 * and the netlist is written, so that both have the same circuit.
 */
import { type Complex, inverseOf, plus } from '../physics/circuit/complex.ts';
import type { SourceImpedance } from './response.ts';

/** Values in ohm, uH and pF; 0 of one that is not there. */
export interface AerialCircuit {
  /** In series. */
  readonly resistanceOhm: number;
  /** In series, `shunt` across it. */
  readonly inductanceUh: number;
  /** In series. */
  readonly capacitancePf: number;
  /** A capacitor and a resistor, one behind the other, across the inductance. */
  readonly shunt: { readonly capacitancePf: number; readonly resistanceOhm: number } | null;
  /** Of a capacitor between aerial and coil; null: none. */
  readonly seriesPf: number | null;
}

/**
 * The standard dummy aerial for receivers: 200 pF in series with 20 uH, across which 400 pF and 400 ohm are in series.
 * Source: Institute of Radio Engineers 1948, Standards on radio receivers. FROM MEMORY. By themselves 200 pF and 20 uH resonate at 2.516 MHz.
 */
export const DUMMY: AerialCircuit = {
  resistanceOhm: 0,
  inductanceUh: 20,
  capacitancePf: 200,
  shunt: { capacitancePf: 400, resistanceOhm: 400 },
  seriesPf: null,
};

/** ohm at omega in rad/s. RangeError for a circuit that has neither resistance nor reactance. */
export function aerialImpedance(circuit: AerialCircuit): SourceImpedance {
  const { resistanceOhm, inductanceUh, capacitancePf, shunt, seriesPf } = circuit;
  if (!(resistanceOhm > 0 || inductanceUh > 0 || capacitancePf > 0)) throw new RangeError('an aerial of nothing');
  return (omega) => {
    const capacitor = (pf: number): Complex => ({ re: 0, im: -1e12 / (omega * pf) });
    let coil: Complex = { re: 0, im: omega * inductanceUh * 1e-6 };
    if (shunt !== null && inductanceUh > 0) {
      const across = plus({ re: shunt.resistanceOhm, im: 0 }, capacitor(shunt.capacitancePf));
      coil = inverseOf(plus(inverseOf(coil), inverseOf(across)));
    }
    const parts = [
      { re: resistanceOhm, im: 0 },
      coil,
      ...(capacitancePf > 0 ? [capacitor(capacitancePf)] : []),
      ...(seriesPf === null ? [] : [capacitor(seriesPf)]),
    ];
    return parts.reduce(plus);
  };
}

/** An element of the aerial between two of its nodes: `source` where the voltage acts, `contact` at the coil, `a1`, `a2`... between. */
export interface AerialElement {
  readonly kind: 'R' | 'L' | 'C';
  readonly from: string;
  readonly to: string;
  /** ohm, H or F. */
  readonly value: number;
}

/** The same circuit as a list for a netlist, from `source` to `contact`; what is 0 is left out. */
export function aerialElements(circuit: AerialCircuit): AerialElement[] {
  const { resistanceOhm, inductanceUh, capacitancePf, shunt, seriesPf } = circuit;
  const links: ((from: string, to: string) => AerialElement[])[] = [];
  const one = (kind: AerialElement['kind'], value: number) => {
    if (value > 0) links.push((from, to) => [{ kind, from, to, value }]);
  };
  one('R', resistanceOhm);
  one('C', capacitancePf * 1e-12);
  if (inductanceUh > 0)
    links.push((from, to) => [
      { kind: 'L', from, to, value: inductanceUh * 1e-6 },
      ...(shunt === null
        ? []
        : ([
            { kind: 'C', from, to: 'shunt', value: shunt.capacitancePf * 1e-12 },
            { kind: 'R', from: 'shunt', to, value: shunt.resistanceOhm },
          ] as const)),
    ]);
  one('C', (seriesPf ?? 0) * 1e-12);
  const node = (i: number) => (i === 0 ? 'source' : i === links.length ? 'contact' : `a${i}`);
  return links.flatMap((link, i) => link(node(i), node(i + 1)));
}
