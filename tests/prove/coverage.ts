/** How often the limits of the fit hold: lots by chance, each with a known error, and instruments drawn as good as the shop states. */

import { type Systematic, systematicOf, type Unknown } from '../../src/prove/systematic.ts';
import { shapeHalves, Z95 } from '../../src/prove/systematic-columns.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type Lot, NOTHING, normals, simulated, type Truth } from './simulated.ts';

export interface Tally {
  lots: number;
  /** Of each unknown: lots that have it, lots whose limits hold the truth, and lots that call it off. */
  readonly seen: Map<string, number>;
  readonly held: Map<string, number>;
  readonly called: Map<string, number>;
  /** Unknowns called off to the wrong side. */
  wrongSide: number;
  /** Lots in which anything is called off. */
  any: number;
  /** Lots of which a coil is left out. */
  leftOut: number;
  /** Lots whose misfit is called rare. */
  misfits: number;
}

export const tally = (): Tally => ({
  lots: 0,
  seen: new Map(),
  held: new Map(),
  called: new Map(),
  wrongSide: 0,
  any: 0,
  leftOut: 0,
  misfits: 0,
});

const more = (map: Map<string, number>, name: string) => map.set(name, (map.get(name) ?? 0) + 1);

/** The truth of an unknown in its unit; null where the simulation has none. */
export function truthOf({ name, unit }: Unknown, truth: Truth): number | null {
  const value = {
    diameter: truth.diameterMm,
    pitch: truth.pitch,
    gaps: truth.gaps,
    meter: truth.meter,
    leads: truth.leadUh,
    capacitor: truth.capacitor,
    strays: null,
  }[name];
  return value === null ? null : unit === '%' ? 100 * value : value;
}

/** Instruments and gaps by chance, as good as the record states. */
export function drawn(record: CoilRecord, seed: number, shape: Pick<Truth, 'diameterMm' | 'pitch'>): Truth {
  const gauss = normals(seed + 31337);
  const { shop, measuring } = record;
  return {
    ...shape,
    gaps: (gauss() * shapeHalves(record).gaps) / Z95,
    meter: (gauss() * shop.meterAccuracy) / Z95,
    leadUh: (gauss() * measuring.leadUh) / Z95,
    capacitor: (gauss() * shop.capacitorTolerance) / Z95,
  };
}

/** Noise and scatter of a bench as it is usual: readings 0.3 %, lengths 0.05 mm, coils by a quarter of the record's spread. */
export function lotOf(record: CoilRecord, seed: number, truth: Truth = NOTHING, over: Partial<Lot> = {}): Lot {
  return {
    seed,
    coils: 6 + (seed % 9),
    truth,
    scatterMm: record.spread.diameterMm / 4,
    scatterPitch: record.spread.pitch / 4,
    noise: 0.003,
    lengthMm: 0.05,
    reads: ['inductance', 'length', 'former'],
    places: true,
    ...over,
  };
}

export function add(to: Tally, record: CoilRecord, lot: Lot): Systematic {
  const found = systematicOf(simulated(record, lot));
  if (found === null) throw new Error('a lot with readings is fitted');
  to.lots++;
  let any = false;
  for (const one of found.unknowns) {
    const truth = truthOf(one, lot.truth);
    if (truth === null) continue;
    more(to.seen, one.name);
    if (one.low <= truth && truth <= one.high) more(to.held, one.name);
    if (!one.significant) continue;
    more(to.called, one.name);
    any = true;
    if (Math.sign(one.estimate) !== Math.sign(truth)) to.wrongSide++;
  }
  if (any) to.any++;
  if (found.leftOut.length > 0) to.leftOut++;
  if (found.misfit.probability < 0.01) to.misfits++;
  return found;
}
