/** What a printer can take at all, and for what it cannot, the nearest printer that would. */
import { Fault, type FaultParts } from '../fault.ts';
import type { Solid } from './solid.ts';

export interface BedPart {
  readonly id: string;
  readonly quantity: number;
  /** Its box as drawn. */
  readonly widthMm: number;
  readonly depthMm: number;
  readonly heightMm: number;
}

export interface BedSize {
  readonly bedXMm: number;
  readonly bedYMm: number;
  readonly heightMm: number;
}

/** A millionth of a millimetre is the noise of arithmetic on a length, not a longer part. */
const NOISE_UM = 1e-3;
/** Whole micrometres: of what needs room, and of the room there is. */
export const umUp = (mm: number): number => Math.ceil(mm * 1000 - NOISE_UM);
export const umDown = (mm: number): number => Math.floor(mm * 1000 + NOISE_UM);

/**
 * The bare bed counts, and the whole height. Only quarter turns are for the layout to choose; where the box would fit at
 * another angle, the fault says at which.
 *
 * @throws Fault with exit 4 for all that does not fit: `part-larger-than-bed`, `part-taller-than-printer`
 */
export function requireFit(parts: readonly BedPart[], printer: BedSize): void {
  const faults = parts.flatMap((part) => fitFaults(part, printer));
  if (faults.length > 0) throw new Fault(4, faults);
}

/** As `requireFit`, for solids before they are listed: as large as they are in their files. */
export function requireSolidsFit(
  solids: readonly Solid[],
  printer: BedSize & { readonly scale: readonly number[] },
): void {
  requireFit(
    solids.map(({ part, quantity, expected: { minMm, maxMm } }) => {
      const [widthMm, depthMm, heightMm] = maxMm.map((most, i) => (most - minMm[i]!) * printer.scale[i]!) as [
        number,
        number,
        number,
      ];
      return { id: part, quantity, widthMm, depthMm, heightMm };
    }),
    printer,
  );
}

/** As `requireFit`, as data: empty when the printer takes the part. */
export function fitFaults(part: BedPart, printer: BedSize): readonly FaultParts[] {
  return [...bedFaults(part, printer), ...heightFaults(part, printer)];
}

const text = (um: number) => String(um / 1000);
const size = (x: number, y: number) => `${text(x)} x ${text(y)} mm`;

function bedFaults(part: BedPart, printer: BedSize): FaultParts[] {
  const w = umUp(part.widthMm);
  const d = umUp(part.depthMm);
  const x = umDown(printer.bedXMm);
  const y = umDown(printer.bedYMm);
  if ((w <= x && d <= y) || (d <= x && w <= y)) return [];
  // The smaller enlargement of the bed, of the two ways to lay the part.
  const drawn = [Math.max(x, w), Math.max(y, d)] as const;
  const turned = [Math.max(x, d), Math.max(y, w)] as const;
  const nearest = turned[0] * turned[1] < drawn[0] * drawn[1] ? turned : drawn;
  const oblique = obliqueDeg(w, d, x, y);
  return [
    {
      code: 'part-larger-than-bed',
      place: { key: 'printer.bed' },
      got: `part ${part.id} of ${size(w, d)} for a bed of ${size(x, y)}`,
      expected: 'parts that lie on the bed as drawn or turned by a quarter',
      todo: `${oblique === null ? '' : `place it by hand, turned by ${oblique} degrees, which this bed has room for; or `}use a printer with a bed of ${size(...nearest)} or larger, or make the part smaller`,
    },
  ];
}

/** Angles tried for a box that no quarter turn fits; nobody sets a part by hand more finely. */
const STEPS_A_DEGREE = 10;

/**
 * Degrees, within the first quarter, at which a box of w x d lies on x by y: the middle of those that do, to a whole degree
 * where that fits. Null when there is none.
 */
function obliqueDeg(w: number, d: number, x: number, y: number): number | null {
  const fits = (degrees: number) => {
    const c = Math.cos((degrees * Math.PI) / 180);
    const s = Math.sin((degrees * Math.PI) / 180);
    return w * c + d * s <= x && w * s + d * c <= y;
  };
  const angles = Array.from({ length: 90 * STEPS_A_DEGREE - 1 }, (_, i) => (i + 1) / STEPS_A_DEGREE).filter(fits);
  const middle = angles[Math.floor(angles.length / 2)];
  if (middle === undefined) return null;
  return fits(Math.round(middle)) ? Math.round(middle) : middle;
}

function heightFaults(part: BedPart, printer: BedSize): FaultParts[] {
  const height = umUp(part.heightMm);
  const room = umDown(printer.heightMm);
  if (height <= room) return [];
  return [
    {
      code: 'part-taller-than-printer',
      place: { key: 'printer.height' },
      got: `part ${part.id}, ${text(height)} mm high, for a printer of ${text(room)} mm`,
      expected: 'parts no higher than the printer can build',
      todo: `use a printer that builds ${text(height)} mm or more, or make the part lower`,
    },
  ];
}
