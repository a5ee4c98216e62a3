/** What of the record concerns printing: the printer, which parts are wanted, and the list of the parts themselves. */
import { slides } from '../job/around/second.ts';
import type { Job, PartKind } from '../job/job.ts';
import { COIL_PARTS, PARTS } from '../job/schema.ts';
import { layOutBeds } from '../parts/bed-layout.ts';
import { type Solid, stlPath } from '../parts/solid.ts';
import type { Design } from '../solve/design.ts';
import { findMaterial } from '../stock/materials.ts';
import { decimals, significant } from './rounding.ts';
import type { BedEntry, PartEntry, PrinterFigures } from './schema.ts';

export function printerOf({ printer }: Job): PrinterFigures {
  const found = findMaterial(printer.material);
  if (!found.ok) throw new Error(`material ${printer.material} passed the reading of the job`);
  const { material, scale, ...rest } = printer;
  return { ...rest, scale: [...scale], material: found.material.name, densityGCm3: found.material.densityGPerCm3 };
}

/** What belongs to a second winding. */
function secondParts({ second }: Job): Partial<Record<PartKind, boolean>> {
  const own = second !== null && second.kind !== 'same former';
  // A sleeve that stays where it is lies on the winding.
  return { 'second former': own, carriage: own && (second.kind !== 'sleeve' || slides(second)) };
}

/** The parts that a coil cannot do without, whatever jigs there are. */
export function ownPartsOf(job: Job): PartKind[] {
  const has: Partial<Record<PartKind, boolean>> = { former: job.former.kind === 'printed', ...secondParts(job) };
  return COIL_PARTS.filter((part) => has[part]);
}

/** The parts that suit a coil: what its former and its way of winding have no use for is left out. */
function suitable(
  job: Job,
  { former, method, candidate }: Pick<Design, 'former' | 'method' | 'candidate'>,
): PartKind[] {
  const has: Partial<Record<PartKind, boolean>> = {
    former: former.kind === 'printed',
    ...secondParts(job),
    saddle: former.kind !== 'printed',
    comb: candidate.pitch.kind === 'spacer',
    'loop gauge': method.name === 'twisted loop',
  };
  return PARTS.filter((part) => has[part] !== false);
}

/** Left out, all but the winding stand, which is hours of printing and serves every later coil too. */
export function wantedOf(job: Job, design: Pick<Design, 'former' | 'method' | 'candidate'>): PartKind[] {
  if (job.parts === null) return suitable(job, design).filter((part) => part !== 'stand');
  if (job.parts.includes('all')) return suitable(job, design);
  return PARTS.filter((part) => job.parts?.includes(part));
}

/** Kinds that the job asks for: by name, or by stating what only they are for. Others are left out when they cannot be. */
export function askedFor(job: Job): ReadonlySet<PartKind> {
  const asked = new Set<PartKind>();
  for (const part of job.parts ?? []) if (part !== 'all') asked.add(part);
  if ('shop.shaft' in job.given) asked.add('arbor');
  return asked;
}

/** The list of parts, as they should come out. */
export function entriesOf(solids: readonly Solid[]): PartEntry[] {
  return solids.map(({ part, name, kind, quantity, material, densityGCm3, expected, use, printNote }) => ({
    part,
    name,
    kind,
    path: stlPath(part),
    quantity,
    material,
    sizeMm: expected.maxMm.map((most, i) => decimals(most - expected.minMm[i]!, 3)),
    volumeMm3: decimals(expected.volumeMm3, 0),
    massG: significant((expected.volumeMm3 * densityGCm3) / 1000, 3),
    use,
    printNote,
  }));
}

/**
 * The parts laid out on beds, as large as they are in their files; a bed holds one material.
 * @throws Fault (exit 4) for a part that the printer cannot take
 */
export function bedsOf(parts: readonly PartEntry[], printer: PrinterFigures): BedEntry[] {
  const [x, y, z] = printer.scale as [number, number, number];
  const beds = [...new Set(parts.map(({ material }) => material))].flatMap((material) =>
    layOutBeds(
      parts
        .filter((part) => part.material === material)
        .map(({ part, quantity, sizeMm }) => {
          const [width, depth, height] = sizeMm as [number, number, number];
          return { id: part, quantity, widthMm: width * x, depthMm: depth * y, heightMm: height * z };
        }),
      printer,
    ).map(({ items }) => ({ material, items: items.map((item) => ({ ...item })) })),
  );
  return beds.map((bed, index) => ({ path: `bed-${index + 1}.3mf`, ...bed }));
}
