/** The wall: whole printed lines, as many as the winding tension asks for, and what the tension does to it. */
import { findMaterial, type Material } from '../../stock/materials.ts';
import type { Around } from './around.ts';

/** Strain that the winding may put on a printed wall before it is made thicker: 0.2 % of diameter is 0.3 % of L. */
const STRAIN_GOAL = 0.002;
/** More than a hand holds steadily; thick wire is straightened and laid rather than stretched (common practice). */
const MOST_N = { low: 12, high: 20 };
/** Lines in a wall: what stays stiff in the hand, and more than which is only weight. */
const LINES = { least: 4, most: 8 };

/** Tension for winding, N: 30 to 50 N per square millimetre of copper, capped (common practice, from memory). */
export function tensionN(copperMm2: number): { low: number; high: number } {
  return { low: Math.min(30 * copperMm2, MOST_N.low), high: Math.min(50 * copperMm2, MOST_N.high) };
}

/** What the hoop pressure of the winding takes off the diameter, a fraction: T / (p t E). */
function hoopStrain(tension: number, pitchMm: number, wallMm: number, modulusGPa: number): number {
  return tension / (pitchMm * wallMm * modulusGPa * 1e3);
}

export interface Wall {
  readonly wallMm: number;
  /** What the tension takes off the diameter, a fraction. */
  readonly strain: number;
  readonly material: Material;
}

export function materialOf({ former }: Around['job']): Material {
  const found = findMaterial(former.material);
  if (!found.ok) throw new Error(`material ${former.material} passed the reading of the job`);
  return found.material;
}

/** The wall of the job, else whole lines under the groove. */
export function wallFor(around: Around): Wall {
  const { job, grooved, overallMm } = around;
  const material = materialOf(job);
  const groove = grooved ? overallMm / 2 : 0;
  const strainAt = (wall: number) => hoopStrain(around.tensionN, around.pitchMm, wall - groove, material.modulusGPa);
  const stated = job.former.wallMm;
  if (stated !== null) return { wallMm: stated, strain: strainAt(stated), material };
  const line = job.printer.lineMm;
  let lines = LINES.least;
  while (lines < LINES.most && strainAt(lines * line + groove) > STRAIN_GOAL) lines++;
  const wallMm = Math.round((lines * line + groove) * 100) / 100;
  return { wallMm, strain: strainAt(wallMm), material };
}

/** Diameter at which holes come nearest to one another: the bore of a printed former, about the outside of a thin tube. */
export function insideMm(around: Around): number {
  return Math.max(around.outsideMm - 2 * wallFor(around).wallMm, around.outsideMm / 4);
}

/** What the tension does to the wall, in words; for a printed one how many lines it is made of. */
export function stiffnessText(around: Around, { wallMm, strain, material }: Wall): string {
  const { job, grooved, overallMm } = around;
  const percent = (strain * 100).toFixed(2);
  const solid = wallMm - (grooved ? overallMm / 2 : 0);
  const lines =
    job.former.kind === 'printed'
      ? ` (${(solid / job.printer.lineMm).toFixed(1)} lines of ${job.printer.lineMm} mm${grooved ? ' under the groove' : ''})`
      : '';
  return `${around.tensionN.toFixed(1)} N at this pitch takes ${percent} % off the diameter of a ${wallMm.toFixed(2)} mm wall${lines} of ${material.name} (modulus ${material.modulusGPa} GPa), ${(strain * 160).toFixed(2)} % off the inductance; wind no tighter`;
}
