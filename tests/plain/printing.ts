/** Claims of a record on former, parts and beds that arithmetic alone can tell; files are measured by `files.ts`. And its hash. */
import { createHash } from 'node:crypto';
import type { CoilRecord } from '../../src/record/schema.ts';
import type { Claims } from './claims.ts';

/** JSON with keys in the order of their code units, written out here. */
function written(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(written).join(',')}]`;
  if (value === null || typeof value !== 'object') return JSON.stringify(value);
  const keys = Object.keys(value).filter((key) => (value as Record<string, unknown>)[key] !== undefined);
  keys.sort();
  return `{${keys.map((key) => `${JSON.stringify(key)}:${written((value as Record<string, unknown>)[key])}`).join(',')}}`;
}

export function hashOf(record: CoilRecord): string {
  const { hash: _, files: __, program: ___, ...rest } = record;
  return createHash('sha256').update(written(rest)).digest('hex');
}

export function printingClaims(claims: Claims, record: CoilRecord): void {
  const { former, printer, parts, beds } = record;
  if (hashOf(record) !== record.hash) claims.faults.push(`hash: ${record.hash}, recomputed ${hashOf(record)}`);
  claims.near('former.boreDiameterMm', former.boreDiameterMm, former.outsideDiameterMm - 2 * former.wallMm, 2e-3);
  claims.holds('former.wallMm', former.wallMm > 0 && 2 * former.wallMm < former.outsideDiameterMm, `${former.wallMm}`);
  claims.holds(
    'former.lengthMm',
    former.lengthMm >= former.footMm + record.windings[0]!.windingLengthMm + former.topMm - 1e-3,
    `${former.lengthMm} for foot, winding and top`,
  );
  claims.holds(
    'former.outsideDiameterMm',
    former.outsideDiameterMm < record.windings[0]!.meanDiameterMm + 2 * (former.groove?.depthMm ?? 0) + 2,
    `${former.outsideDiameterMm}`,
  );
  for (const part of parts) {
    const about = ` of ${part.part}`;
    claims.holds('parts[].quantity', Number.isInteger(part.quantity) && part.quantity >= 1, `${part.quantity}${about}`);
    const density =
      part.material === former.material
        ? former.densityGCm3
        : part.material === printer.material
          ? printer.densityGCm3
          : null;
    if (density !== null)
      claims.near('parts[].massG', part.massG, (part.volumeMm3 * density) / 1000, 0.0052 * part.massG + 0.001, about);
    claims.holds(
      'parts[].volumeMm3',
      part.volumeMm3 > 0 && part.volumeMm3 <= part.sizeMm.reduce((box, mm) => box * mm, 1),
      `${part.volumeMm3}${about}`,
    );
    claims.holds(
      'parts[].sizeMm[]',
      part.sizeMm.every((mm) => mm > 0),
      `${part.sizeMm}${about}`,
    );
  }
  bedClaims(claims, record);
  claims.holds(
    'beds[].items[].copy',
    beds.flatMap(({ items }) => items).length === parts.reduce((sum, { quantity }) => sum + quantity, 0),
    'every piece lies on a bed',
  );
}

/** Pieces lie within their bed and beside one another; every copy once. */
function bedClaims(claims: Claims, record: CoilRecord): void {
  const { printer, parts, beds } = record;
  const copies = new Map<string, number[]>();
  for (const bed of beds) {
    const boxes = bed.items.map((item) => {
      const part = parts.find((one) => one.part === item.part)!;
      const [x, y] = part.sizeMm.map((mm, i) => mm * printer.scale[i]!) as [number, number, number];
      const [width, depth] = item.turned ? [y, x] : [x, y];
      copies.set(item.part, [...(copies.get(item.part) ?? []), item.copy]);
      return { name: item.part, left: item.xMm, front: item.yMm, right: item.xMm + width, back: item.yMm + depth };
    });
    boxes.forEach((one, i) => {
      claims.holds(
        'beds[].items[].xMm',
        one.left >= -1e-3 && one.right <= printer.bedXMm + 0.01,
        `${one.name} from ${one.left} to ${one.right} of ${printer.bedXMm}`,
      );
      claims.holds(
        'beds[].items[].yMm',
        one.front >= -1e-3 && one.back <= printer.bedYMm + 0.01,
        `${one.name} from ${one.front} to ${one.back} of ${printer.bedYMm}`,
      );
      for (const other of boxes.slice(i + 1)) {
        const beside =
          one.right <= other.left + 1e-3 ||
          other.right <= one.left + 1e-3 ||
          one.back <= other.front + 1e-3 ||
          other.back <= one.front + 1e-3;
        claims.holds('beds[].items[].xMm', beside, `${one.name} over ${other.name}`);
      }
    });
  }
  for (const part of parts) {
    const found = (copies.get(part.part) ?? []).sort((a, b) => a - b);
    claims.holds(
      'beds[].items[].copy',
      found.length === part.quantity && found.every((copy, i) => copy === found[0]! + i),
      `copies ${found} of ${part.part}`,
    );
  }
}
