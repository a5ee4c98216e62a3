/** The rib at an angle, as it is numbered on the upper end ring. */
import type { Former } from './schema.ts';

/** Angles of a record are rounded. */
const SAME_DEG = 0.05;

/** `S`, `1`, `2`, ...; null for a full body. */
export function ribName({ ribs, numbers }: Pick<Former, 'ribs' | 'numbers'>, angleDeg: number): string | null {
  if (ribs === null) return null;
  const apart = (deg: number) => Math.abs(((((deg - angleDeg + 180) % 360) + 360) % 360) - 180);
  return numbers.find((number) => apart(number.angleDeg) < SAME_DEG)?.text ?? null;
}
