import { MU0 } from '../constants.ts';
import { type Excitation, excitation } from './excite.ts';
import type { SectionImpedance } from './impedance.ts';
import { begin, type Iteration, newIteration, step } from './residuals.ts';
import { outerInductances, type Section } from './sections.ts';
import type { FieldTables } from './tables.ts';
import { type Multipoles, noMultipoles, translate } from './translate.ts';
import { type WireResponse, wireResponse } from './wire-response.ts';

export interface FieldSolution extends SectionImpedance {
  /** Products of the iteration, over all sections: how hard it was. */
  readonly products: number;
}

/** Relative residual of the incident multipoles. The impedance errs by its square. */
const TOLERANCE = 1e-7;
/** Close, thick, perfectly conducting turns take about 40. */
const MOST_STEPS = 400;

/**
 * Resistance and inductance of sections of a winding of solid round wire at a frequency: each turn a ring of current with the multipoles
 * that the fields of the others raise in its round section.
 *
 * Units: Hz, ohm m (`resistivityAt`), sections in turns from the start, in order and without overlap. Every section has its own current;
 * turns in none are dead, but shield and lose. Cut the winding at every tap, and any switching is sums of the matrix
 * (`terminalImpedance`); for one tap, its turns and the rest are enough.
 * Domain: frequency from 0 to where the wire is a small part of a wavelength; wire up to touching turns (`fieldOrder`); 1 turn and more.
 * Method: the incident multipoles x of every wire obey (1 - T C) x = e, with e from the net currents, C the answer of a round wire
 * (`wireResponse`) and T the translation from wire to wire. With the root of C on both sides that is complex symmetric; conjugate
 * residuals solve it in 4 (d/p = 0.2) to 35 (touching) products a section. Then Z_st = j omega L_st + delta_st N_s Zi +
 * j omega (2 pi R)(2 pi/mu0) sum m C_m e_s x_t. An arc of a turn excites by its fraction, and its own loss is in proportion; where it
 * lies around the circle is left out of the eddy currents, though not of L (`sectionInductances`).
 * Source: Butterworth 1922 and 1925 for the round wire among others, carried to all orders and to a coil's rings.
 * Accuracy: against three axisymmetric finite-element solutions (5 to 30 turns, d/p 0.375 to 0.89, one with a shorted rest): inductance
 * 0.02 %, resistance 0.7 %. Against full elimination of the same system: 2e-13 of short random coils, 5e-12 of 200 turns. Limits: direct current and the ring sum to rounding.
 * The wire is taken as rings: a helix is longer by (p/(pi D))^2/2.
 * Cost on one core: 100 turns in 12 sections 0.05 s, 500 thick close turns in two 0.3 s; grows with the square of the turns.
 *
 * Example: solveField(fieldTables([0, 4e-3, 8e-3, 12e-3, 16e-3], 0.03, 7.5e-4), 1e6, 1.7241e-8, [{ from: 0, to: 5 }]).inductance[0] = 1.88824e-6
 */
export function solveField(
  tables: FieldTables,
  frequency: number,
  resistivity: number,
  sections: readonly Section[],
): FieldSolution {
  const inductance = outerInductances(tables, sections);
  const wire = wireResponse(tables.wireRadius, frequency, resistivity, tables.order);
  const count = sections.length;
  const resistance = new Float64Array(count * count);
  const circumference = tables.shape.length;
  sections.forEach(({ from, to }, s) => {
    resistance[s * count + s] = (to - from) * circumference * wire.resistance;
    inductance[s * count + s]! += (to - from) * circumference * wire.inductance;
  });
  const { solved, products } = solveMultipoles(tables, wire, sections);
  const perWeber = (circumference * 2 * Math.PI) / MU0;
  const omega = 2 * Math.PI * frequency;
  for (let s = 0; s < count; s++) {
    for (let t = s; t < count; t++) {
      const [re, im] = reaction(solved[s]!, solved[t]!);
      for (const at of s === t ? [s * count + s] : [s * count + t, t * count + s]) {
        inductance[at]! += perWeber * re;
        resistance[at]! -= omega * perWeber * im;
      }
    }
  }
  return { sections, frequency, resistance, inductance, products };
}

/**
 * The multipoles at every wire for one ampere in each section, one section after the other: the across and the along system, both scaled
 * by the root of C.
 */
export function solveMultipoles(tables: FieldTables, wire: WireResponse, sections: readonly Section[]) {
  return solveExcitations(
    tables,
    wire,
    sections.map((section) => excitation(tables, section)),
  );
}

/** The same for fields of any origin. */
export function solveExcitations(tables: FieldTables, wire: WireResponse, sources: readonly Excitation[]) {
  const solver = newSolver(tables, rootResponse(tables, wire));
  const solved = sources.map((source) => solver.solve(source));
  return { solved, products: solver.products() };
}

/** Square root of each wire's C_m, a last part turn answering by its fraction; entry (m - 1) N + i. */
function rootResponse(tables: FieldTables, wire: WireResponse): Multipoles {
  const count = tables.positions.length;
  const root = noMultipoles(tables.order * count);
  for (let m = 1; m <= tables.order; m++) {
    const re = wire.re[m - 1]!;
    const im = wire.im[m - 1]!;
    const size = Math.hypot(re, im);
    // C lies in the third quadrant: its root in the fourth, and no difference loses digits.
    const rootIm = -Math.sqrt((size - re) / 2);
    const rootRe = rootIm === 0 ? 0 : im / (2 * rootIm);
    for (let i = 0; i < count; i++) {
      const share = Math.sqrt(tables.presence[i]!);
      root.re[(m - 1) * count + i] = share * rootRe;
      root.im[(m - 1) * count + i] = share * rootIm;
    }
  }
  return root;
}

/** Both systems of a field, across and along, when done. */
export type Solved = readonly [Part, Part];

/** One of the two systems of a section, when done: right-hand side, solution, what is left. */
interface Part {
  readonly b: Multipoles;
  readonly x: Multipoles;
  readonly rest: Multipoles;
}

function newSolver(tables: FieldTables, root: Multipoles) {
  const size = root.re.length;
  const across = newIteration(size);
  const along = newIteration(size);
  const scaled = [noMultipoles(size), noMultipoles(size)] as const;
  let products = 0;
  /** image = residual -+ D T D residual, D the roots: the sine terms translate with the other sign. */
  const fillImages = () => {
    multiply(root, across.residual, scaled[0]);
    multiply(root, along.residual, scaled[1]);
    translate(tables, scaled[0], scaled[1], across.image, along.image);
    finishImage(root, across, -1);
    finishImage(root, along, 1);
    products++;
  };
  return {
    products: () => products,
    solve(source: Excitation): Solved {
      const b = [timesReal(root, source.across), timesReal(root, source.along)] as const;
      copy(b[0], across.residual);
      copy(b[1], along.residual);
      begin(across, TOLERANCE);
      begin(along, TOLERANCE);
      for (let count = 0; !(across.settled && along.settled); count++) {
        if (count === MOST_STEPS) throw new Error(`the field solution did not settle in ${MOST_STEPS} steps`);
        fillImages();
        step(across);
        step(along);
      }
      return [partOf(b[0], across), partOf(b[1], along)];
    },
  };
}

function partOf(b: Multipoles, it: Iteration): Part {
  return { b, x: clone(it.x), rest: clone(it.residual) };
}

/**
 * b_s . x_t with the remaining residual put in once more, b_s . x_t + x_s . r_t: what errs in it is of the second order, and it is the
 * same with s and t exchanged.
 */
export function reaction(s: Solved, t: Solved): [re: number, im: number] {
  let re = 0;
  let im = 0;
  const add = (a: Multipoles, b: Multipoles) => {
    for (let i = 0; i < a.re.length; i++) {
      re += a.re[i]! * b.re[i]! - a.im[i]! * b.im[i]!;
      im += a.re[i]! * b.im[i]! + a.im[i]! * b.re[i]!;
    }
  };
  for (const which of [0, 1] as const) {
    add(s[which].b, t[which].x);
    add(s[which].x, t[which].rest);
  }
  return [re, im];
}

function multiply(a: Multipoles, b: Multipoles, out: Multipoles): void {
  for (let i = 0; i < a.re.length; i++) {
    out.re[i] = a.re[i]! * b.re[i]! - a.im[i]! * b.im[i]!;
    out.im[i] = a.re[i]! * b.im[i]! + a.im[i]! * b.re[i]!;
  }
}

function finishImage(root: Multipoles, it: Iteration, sign: 1 | -1): void {
  const { residual, image } = it;
  for (let i = 0; i < root.re.length; i++) {
    const re = root.re[i]! * image.re[i]! - root.im[i]! * image.im[i]!;
    const im = root.re[i]! * image.im[i]! + root.im[i]! * image.re[i]!;
    image.re[i] = residual.re[i]! + sign * re;
    image.im[i] = residual.im[i]! + sign * im;
  }
}

function timesReal(a: Multipoles, b: Float64Array): Multipoles {
  return { re: a.re.map((value, i) => value * b[i]!), im: a.im.map((value, i) => value * b[i]!) };
}

function copy(from: Multipoles, to: Multipoles): void {
  to.re.set(from.re);
  to.im.set(from.im);
}

function clone({ re, im }: Multipoles): Multipoles {
  return { re: re.slice(), im: im.slice() };
}
