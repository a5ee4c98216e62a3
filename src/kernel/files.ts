/** The files of the printed parts: one STL a part, one 3MF a bed, each with what is said of it after a run. */

import type { OutputFile } from '../record/listing.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Kernel, PartFile } from './client.ts';

export function partFiles(record: CoilRecord, made: readonly PartFile[]): OutputFile[] {
  return made.map(({ part, path, kind, bytes }) => {
    const { name, sizeMm, massG, material, quantity } = entryOf(record, part);
    const size = sizeMm.map((mm) => mm.toFixed(1)).join(' x ');
    const many = quantity > 1 ? `print ${quantity}; ` : '';
    return { path, kind, bytes, note: `${name}: ${many}${size} mm, ${massG} g of ${material}` };
  });
}

/** The beds of the record, filled with the parts that were made. The meshes of the parts are used up. */
export async function bedFiles(kernel: Kernel, record: CoilRecord, made: readonly PartFile[]): Promise<OutputFile[]> {
  const { beds } = record;
  const meshes = new Map(made.map(({ part, mesh }) => [part, mesh]));
  return Promise.all(
    beds.map(async ({ path, material, items }, index): Promise<OutputFile> => {
      const later = new Set(beds.slice(index + 1).flatMap((bed) => bed.items.map(({ part }) => part)));
      const objects = [...new Set(items.map(({ part }) => part))].map((part) => {
        const mesh = meshes.get(part);
        if (mesh === undefined) throw new Error(`no mesh of ${part} for ${path}`);
        // What a later bed needs too is lent as a copy.
        return { id: part, name: entryOf(record, part).name, mesh: later.has(part) ? structuredClone(mesh) : mesh };
      });
      const bed = await kernel.bed({
        path,
        title: `${record.job}, bed ${index + 1} of ${beds.length}`,
        objects,
        items: items.map(({ part, copy, xMm, yMm, turned }) => {
          const { name, quantity } = entryOf(record, part);
          return { object: part, name: quantity > 1 ? `${name} ${copy}` : name, xMm, yMm, turned };
        }),
      });
      const pieces = items.length === 1 ? '1 piece' : `${items.length} pieces`;
      return { ...bed, note: `bed ${index + 1} of ${beds.length}, ${pieces} in ${material}` };
    }),
  );
}

function entryOf(record: CoilRecord, part: string): CoilRecord['parts'][number] {
  const entry = record.parts.find((one) => one.part === part);
  if (entry === undefined) throw new Error(`part ${part} is not in the record`);
  return entry;
}
