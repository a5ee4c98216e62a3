/**
 * What formers are made of: print materials and tube materials. Density in g/cm3, Young's modulus in GPa, softening
 * temperature in degrees Celsius. Status: every figure is common practice, a typical value; grades differ.
 */
import { distance } from 'fastest-levenshtein';
import { type Refusal, refuse } from './found.ts';
import { quoted, tidy } from './names.ts';

export interface Material {
  readonly name: string;
  /** How a former comes to be of it. */
  readonly use: 'print' | 'tube';
  readonly densityGPerCm3: number;
  readonly modulusGPa: number;
  /** Where it begins to give under a winding; null for what chars or swells before it softens. */
  readonly softensC: number | null;
  readonly status: string;
}

type Columns = readonly [
  name: string,
  use: Material['use'],
  densityGPerCm3: number,
  modulusGPa: number,
  softensC: number | null,
];

const TABLE: readonly Columns[] = [
  ['PLA', 'print', 1.24, 3.3, 60],
  ['PETG', 'print', 1.27, 2.1, 75],
  ['ABS', 'print', 1.04, 2.2, 100],
  ['ASA', 'print', 1.07, 2.0, 100],
  ['card', 'tube', 0.8, 2.0, null],
  ['phenolic paper', 'tube', 1.35, 7.0, 120],
  ['wood', 'tube', 0.65, 10.0, null],
  ['polystyrene', 'tube', 1.05, 3.2, 90],
  ['acrylic', 'tube', 1.18, 3.0, 95],
  ['PVC', 'tube', 1.4, 3.0, 75],
];

const MATERIALS: readonly Material[] = TABLE.map(([name, use, densityGPerCm3, modulusGPa, softensC]) => ({
  name,
  use,
  densityGPerCm3,
  modulusGPa,
  softensC,
  status: 'common practice',
}));

/** Print materials first. */
export function materials(): readonly Material[] {
  return MATERIALS;
}

export interface FoundMaterial {
  readonly ok: true;
  readonly material: Material;
}

/** The material of this name, in any case; refused with the nearest name. Never throws. */
export function findMaterial(text: string): FoundMaterial | Refusal {
  const asked = tidy(text);
  const material = MATERIALS.find((one) => tidy(one.name) === asked);
  if (material !== undefined) return { ok: true, material };
  const expected = MATERIALS.map((one) => one.name).join(', ');
  if (asked === '') return refuse('nothing', expected, 'write one of them');
  const nearest = MATERIALS.reduce((best, one) =>
    distance(tidy(one.name), asked) < distance(tidy(best.name), asked) ? one : best,
  );
  return refuse(quoted(text), expected, `did you mean \`${nearest.name}\`?`);
}
