/**
 * Detectors as the coil sees them: a resistance and a capacitance in parallel, what follows them counted in.
 *
 * Status: common practice, FROM MEMORY, for weak signals. Specimens, bias and strength of the signal move them by a factor of two or three;
 * a detector that was measured is stated in the job instead. The diode valve alone follows a law: half of its load (Terman 1943).
 */
export interface Detector {
  readonly kind: string;
  readonly resistanceKohm: number;
  readonly capacitancePf: number;
  /** What the figures are for. */
  readonly with: string;
}

export const DETECTORS = [
  { kind: 'galena crystal', resistanceKohm: 20, capacitancePf: 5, with: 'headphones of high resistance, 2 to 4 kΩ' },
  {
    kind: 'iron pyrites crystal',
    resistanceKohm: 30,
    capacitancePf: 5,
    with: 'headphones of high resistance, 2 to 4 kΩ',
  },
  {
    kind: 'silicon carbide crystal',
    resistanceKohm: 50,
    capacitancePf: 8,
    with: 'its bias set, and headphones of high resistance',
  },
  {
    kind: 'germanium diode',
    resistanceKohm: 30,
    capacitancePf: 3,
    with: 'headphones of high resistance or a crystal earpiece with 47 kΩ',
  },
  { kind: 'schottky diode', resistanceKohm: 100, capacitancePf: 2, with: 'a load matched by a transformer' },
  { kind: 'diode valve', resistanceKohm: 250, capacitancePf: 5, with: 'a load of 500 kΩ, half of which counts' },
  { kind: 'grid-leak valve', resistanceKohm: 100, capacitancePf: 10, with: 'a leak of 1 to 2 MΩ and no reaction' },
  { kind: 'anode-bend valve', resistanceKohm: 1000, capacitancePf: 10, with: 'no grid current' },
  { kind: 'infinite-impedance valve', resistanceKohm: 2000, capacitancePf: 5, with: 'the load in the cathode' },
] as const satisfies readonly Detector[];

/** Kind of a detector that is none of the table: its resistance must be stated. */
export const OTHER = 'other';
export const DETECTOR_STATUS = 'common practice, from memory';

/** Null for `other`. */
export const detectorOf = (kind: string): Detector | null => DETECTORS.find((one) => one.kind === kind) ?? null;
