import type { SectionImpedance } from './impedance.ts';

/** What a switch does with the turns that it does not use. */
export type Rest = 'open' | 'shorted' | 'shorted in sections' | 'disconnected';

/** Sections in use, in series: indices of `SectionImpedance.sections`, the last not included. */
export interface Used {
  readonly from: number;
  readonly to: number;
}

export interface Terminal {
  /** Hz. */
  readonly frequency: number;
  /** ohm, in series. */
  readonly resistance: number;
  /** H, in series. */
  readonly inductance: number;
  /** omega L/R; 0 at direct current. */
  readonly q: number;
}

/**
 * Impedance that the sections in use show at their ends, in series, with what the switch does to the rest.
 *
 * open, disconnected: no current in the dead turns, Z = Z_uu; they still lose power to eddy currents. (The two differ in what the
 * capacitance of the dead turns does: `coupledResonances`.) shorted: the dead turns below the ones in use, and those above, are
 * one closed loop each; shorted in sections: every dead section is a loop of its own. The loops are eliminated,
 * Z = Z_uu - Z_ud Z_dd^-1 Z_du. Turns in no section are open.
 * Domain: 0 <= from < to <= number of sections (RangeError). The short itself has no resistance. Source: Kirchhoff 1847. Exact.
 *
 * Example: terminalImpedance(solveField(fieldTables([0, 1e-3, 2e-3], 0.03, 4e-4), 1e6, 1.7241e-8, [{ from: 0, to: 1 }, { from: 1, to: 3 }]), { from: 0, to: 1 }, 'shorted').inductance = 6.1621e-8
 */
export function terminalImpedance(impedance: SectionImpedance, used: Used, rest: Rest): Terminal {
  const count = impedance.sections.length;
  if (
    !(
      Number.isInteger(used.from) &&
      Number.isInteger(used.to) &&
      0 <= used.from &&
      used.from < used.to &&
      used.to <= count
    )
  ) {
    throw new RangeError(`sections ${used.from} to ${used.to} are not some of ${count}`);
  }
  const loops = [[used.from, used.to] as const, ...deadLoops(used, count, rest)];
  const size = loops.length;
  const omega = 2 * Math.PI * impedance.frequency;
  const re = new Float64Array(size * size);
  const im = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      re[i * size + j] = blockSum(impedance.resistance, count, loops[i]!, loops[j]!);
      im[i * size + j] = omega * blockSum(impedance.inductance, count, loops[i]!, loops[j]!);
    }
  }
  for (let last = size - 1; last >= 1; last--) eliminate(re, im, size, last);
  // A loop carries nothing at direct current, and there omega L has no L to give back.
  const inductance = omega > 0 ? im[0]! / omega : blockSum(impedance.inductance, count, loops[0]!, loops[0]!);
  return { frequency: impedance.frequency, resistance: re[0]!, inductance, q: im[0]! / re[0]! };
}

type Span = readonly [from: number, to: number];

function deadLoops({ from, to }: Used, count: number, rest: Rest): Span[] {
  if (rest === 'open' || rest === 'disconnected') return [];
  if (rest === 'shorted')
    return (
      [
        [0, from],
        [to, count],
      ] as const
    ).filter(([a, b]) => b > a);
  const sections = Array.from({ length: count }, (_, s) => [s, s + 1] as const);
  return sections.filter(([s]) => s < from || s >= to);
}

function blockSum(matrix: Float64Array, count: number, rows: Span, columns: Span): number {
  let sum = 0;
  for (let i = rows[0]; i < rows[1]; i++) {
    for (let j = columns[0]; j < columns[1]; j++) sum += matrix[i * count + j]!;
  }
  return sum;
}

/** Closes loop `last` upon itself: takes Z_il Z_lj/Z_ll from every term before it. */
function eliminate(re: Float64Array, im: Float64Array, size: number, last: number): void {
  const own = last * size + last;
  const scale = 1 / (re[own]! ** 2 + im[own]! ** 2);
  for (let i = 0; i < last; i++) {
    const at = i * size + last;
    const factorRe = (re[at]! * re[own]! + im[at]! * im[own]!) * scale;
    const factorIm = (im[at]! * re[own]! - re[at]! * im[own]!) * scale;
    for (let j = 0; j < last; j++) {
      const other = last * size + j;
      re[i * size + j]! -= factorRe * re[other]! - factorIm * im[other]!;
      im[i * size + j]! -= factorRe * im[other]! + factorIm * re[other]!;
    }
  }
}
