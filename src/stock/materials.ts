/**
 * What formers are made of: print materials and tube materials. Density in g/cm3, Young's modulus in GPa, softening
 * temperature in degrees Celsius, permittivity and loss tangent near 1 MHz (from memory). Status: every figure is common practice, a typical value; grades differ.
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
  /** Relative permittivity and loss tangent near 1 MHz, dry; damp doubles the loss of card and wood. */
  readonly permittivity: number;
  readonly lossTangent: number;
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
  permittivity: number,
  lossTangent: number,
];

const TABLE: readonly Columns[] = [
  ['PLA', 'print', 1.24, 3.3, 60, 2.8, 0.012],
  ['PETG', 'print', 1.27, 2.1, 75, 3.0, 0.015],
  ['ABS', 'print', 1.04, 2.2, 100, 2.7, 0.008],
  ['ASA', 'print', 1.07, 2.0, 100, 3.0, 0.02],
  ['card', 'tube', 0.8, 2.0, null, 2.5, 0.04],
  ['phenolic paper', 'tube', 1.35, 7.0, 120, 5.0, 0.03],
  ['wood', 'tube', 0.65, 10.0, null, 2.5, 0.04],
  ['polystyrene', 'tube', 1.05, 3.2, 90, 2.55, 0.0003],
  ['acrylic', 'tube', 1.18, 3.0, 95, 2.9, 0.02],
  ['PVC', 'tube', 1.4, 3.0, 75, 3.0, 0.016],
];

const MATERIALS: readonly Material[] = TABLE.map(
  ([name, use, densityGPerCm3, modulusGPa, softensC, permittivity, lossTangent]) => ({
    name,
    use,
    densityGPerCm3,
    modulusGPa,
    softensC,
    permittivity,
    lossTangent,
    status: 'common practice',
  }),
);

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
