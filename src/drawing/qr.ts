/**
 * A QR code (ISO/IEC 18004) as black rectangles, so that it prints as sharply as the lines beside it. Its border, the
 * quiet zone of four modules that readers need, is part of its size.
 */
import encodeQR from 'qr';
import type { Polyline } from './drawing.ts';
import { rectangle } from './shapes.ts';
import { WEIGHT_MM } from './stroke.ts';

/** Share of the code that may be lost: about 15 % (medium), 25 % (quartile). */
export type Spare = 'medium' | 'quartile';

export interface QrCode {
  /** Lower left corner of the quiet zone at the origin. */
  readonly shapes: readonly Polyline[];
  /** Modules along an edge, without the quiet zone. */
  readonly modules: number;
  readonly moduleMm: number;
}

/** Free all round, in modules (ISO/IEC 18004, 5.3.8). */
export const QUIET_MODULES = 4;

interface Rect {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  h: number;
}

/** Dark modules as rectangles: runs along a row, joined with the same run of the row below. */
function rectangles(rows: readonly (readonly boolean[])[]): Rect[] {
  const found: Rect[] = [];
  let above = new Map<string, Rect>();
  rows.forEach((row, y) => {
    const here = new Map<string, Rect>();
    for (let x = 0; x < row.length; x++) {
      if (!row[x]) continue;
      const from = x;
      while (row[x + 1]) x++;
      const key = `${from} ${x}`;
      const grown = above.get(key);
      const rect = grown ?? { x: from, y, w: x - from + 1, h: 0 };
      rect.h++;
      if (!grown) found.push(rect);
      here.set(key, rect);
    }
    above = here;
  });
  return found;
}

/**
 * @param sizeMm edge of the code with its quiet zone
 * @throws Error for a text that no code holds (about 2000 signs)
 */
export function qrCode(text: string, sizeMm: number, spare: Spare): QrCode {
  const bordered = encodeQR(text, 'raw', { ecc: spare, border: 1 });
  const rows = bordered.slice(1, -1).map((row) => row.slice(1, -1));
  const modules = rows.length;
  const moduleMm = sizeMm / (modules + 2 * QUIET_MODULES);
  const quiet = QUIET_MODULES * moduleMm;
  // A rectangle is filled and stroked: half the stroke inside leaves its outer edge where the module ends.
  const inset = WEIGHT_MM.hair / 2;
  const shapes = rectangles(rows).map(({ x, y, w, h }) =>
    rectangle(
      quiet + x * moduleMm + inset,
      quiet + (modules - y - h) * moduleMm + inset,
      w * moduleMm - 2 * inset,
      h * moduleMm - 2 * inset,
      'hair',
      0,
    ),
  );
  return { shapes, modules, moduleMm };
}

/** What the code of a coil says: its serial and the hash of its record, a blank between them. */
export const coilText = (serial: string, hash: string): string => `${serial} ${hash}`;
