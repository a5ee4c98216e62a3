/**
 * All printed parts of a lot on few beds, and few different ones: formers as often as there are coils, jigs once. A bed is laid
 * out once and counted as often as it is printed.
 */
import { Fault, type FaultParts } from '../fault.ts';
import { type BedPart, type BedSize, fitFaults, umUp } from '../parts/bed-fit.ts';
import { type Piece, type Place, type Sheet, sheetOf, UM } from '../parts/bed-rectangles.ts';
import { decimals } from '../record/rounding.ts';
import { capacityOf, repeatedBeds } from './beds-repeat.ts';
import { type BedLoad, busiest } from './machines.ts';
import type { LotBed } from './schema.ts';
import type { LotPrinter } from './types.ts';

/** One part of one kind. */
export interface LotPiece {
  readonly kind: string;
  /** As in the record of the kind. */
  readonly part: string;
  /** For people, with the letter of the kind. */
  readonly name: string;
  /** Pieces in the whole lot. */
  readonly quantity: number;
  /** Pieces that one coil takes: of a former 1, of ribs more; 0 for jigs, which no serial is tied to. */
  readonly perCoil: number;
  readonly material: string;
  readonly layerMm: number;
  readonly nozzleMm: number;
  /** What files are enlarged by along x, y and z. */
  readonly scale: readonly number[];
  /** As the part should come out, in print orientation; files, and beds, hold it enlarged. */
  readonly sizeMm: readonly number[];
  /** Of solid plastic, one piece. */
  readonly massG: number;
}

/** One bed more is worth it when it saves the busiest machine this much plastic: it is heated, watched and cleared once more. */
const BED_G = 50;

/**
 * A bed holds one material, and what one print job has in common: layer, nozzle and scale. Parts are shared out so that the
 * machines have about the same mass to print, and lie on the beds as `layOutBeds` puts them.
 *
 * @param printers at least one; a part goes to those that can take it
 * @param gapMm between any two boxes
 * @returns beds from 1 on: materials and settings in the order of the pieces, printers in theirs
 * @throws Fault (exit 4) for all parts that no printer takes: `part-larger-than-bed`, `part-taller-than-printer`
 */
export function layOutLot(pieces: readonly LotPiece[], printers: readonly LotPrinter[], gapMm = 5): readonly LotBed[] {
  if (printers.length === 0) throw new RangeError('no printer');
  const wanted = pieces.filter(({ quantity }) => quantity > 0);
  requirePrinters(wanted, printers);
  const sheets = printers.map((printer) => sheetOf(printer, gapMm));
  const keys = wanted.map(({ material, layerMm, nozzleMm, scale }) =>
    JSON.stringify([material, layerMm, nozzleMm, scale]),
  );
  const beds: Laid[] = [];
  for (const key of new Set(keys)) {
    const group = wanted.filter((_, i) => keys[i] === key);
    const boxes = group.map((of, index): Box => {
      const { id, ...size } = bedPartOf(of);
      const piece = { index, width: umUp(size.widthMm), depth: umUp(size.depthMm) };
      const takers = printers.flatMap((printer, i) => (fitFaults({ id, ...size }, printer).length === 0 ? [i] : []));
      const full = printers.map((_, i) =>
        takers.length > 1 && takers.includes(i) ? capacityOf(piece, sheets[i]!) : of.quantity,
      );
      return { of, piece, takers, full };
    });
    // On every printer, or as far as can be on one of them: a few pieces are not worth a bed of each.
    const ways = [null, ...printers.keys()]
      .slice(0, printers.length === 1 ? 1 : undefined)
      .map((only) => layOutGroup(boxes, shared(boxes, printers, beds, only), sheets));
    const cost = (way: readonly Laid[]) => {
      const all = [...beds, ...way].map(({ printer, massG, count }) => ({ printer, massG, count }));
      return busiest(all, printers) + BED_G * way.reduce((sum, { count }) => sum + count, 0);
    };
    const costs = ways.map(cost);
    beds.push(...ways[costs.indexOf(Math.min(...costs))]!);
  }
  return beds.map(({ printer, massG, count, places, boxes }, index) => {
    const { material, layerMm, nozzleMm } = boxes[0]!.of;
    const { name, bedXMm, bedYMm } = printers[printer]!;
    return {
      bed: index + 1,
      path: `beds/bed-${index + 1}.3mf`,
      material,
      layerMm,
      nozzleMm,
      printer: name,
      bedXMm,
      bedYMm,
      count,
      massG,
      items: itemsOf(places, boxes),
    };
  });
}

/** The part as it lies in its file. */
function bedPartOf({ kind, part, quantity, sizeMm, scale }: LotPiece): BedPart {
  const [widthMm, depthMm, heightMm] = sizeMm.map((mm, axis) => mm * scale[axis]!) as [number, number, number];
  return { id: `${part} of kind ${kind}`, quantity, widthMm, depthMm, heightMm };
}

/** Faults name the printer that lacks least: by how much its room would have to grow. */
function requirePrinters(pieces: readonly LotPiece[], printers: readonly LotPrinter[]): void {
  const faults = pieces.flatMap((piece): FaultParts[] => {
    const part = bedPartOf(piece);
    for (const mm of [part.widthMm, part.depthMm, part.heightMm])
      if (!(mm > 0 && Number.isFinite(mm))) throw new RangeError(`${part.id}: a size of ${mm} mm`);
    if (!Number.isInteger(piece.quantity)) throw new RangeError(`${part.id}: ${piece.quantity} copies`);
    if (printers.some((printer) => fitFaults(part, printer).length === 0)) return [];
    const lacks = printers.map((printer) => growth(part, printer));
    const nearest = printers[lacks.indexOf(Math.min(...lacks))]!;
    return fitFaults(part, nearest).map((fault) => ({
      ...fault,
      place: { key: 'printers' },
      got: `${fault.got} (${nearest.name}${printers.length > 1 ? ', the one that comes nearest' : ''})`,
    }));
  });
  if (faults.length > 0) throw new Fault(4, faults);
}

function growth({ widthMm, depthMm, heightMm }: BedPart, { bedXMm, bedYMm, heightMm: room }: BedSize): number {
  const flat = (w: number, d: number) => Math.max(1, w / bedXMm) * Math.max(1, d / bedYMm);
  return Math.min(flat(widthMm, depthMm), flat(depthMm, widthMm)) * Math.max(1, heightMm / room);
}

interface Box {
  readonly of: LotPiece;
  readonly piece: Piece;
  /** Printers by their index. */
  readonly takers: readonly number[];
  /** Copies on one bed of each printer; all, where only one printer takes it. */
  readonly full: readonly number[];
}

interface Laid extends BedLoad {
  readonly places: readonly Place[];
  readonly boxes: readonly Box[];
}

/**
 * How many of each box go to each printer: always a full bed of it to the one that then has least to do a machine, parts
 * with the fewest takers first.
 * @param only takes all that it can
 */
function shared(
  boxes: readonly Box[],
  printers: readonly LotPrinter[],
  beds: readonly BedLoad[],
  only: number | null,
): readonly (readonly number[])[] {
  const shares = printers.map(() => boxes.map(() => 0));
  const loadG = printers.map((_, i) =>
    beds.reduce((sum, { printer, massG, count }) => sum + (printer === i ? massG * count : 0), 0),
  );
  const order = boxes.toSorted(
    (a, b) =>
      a.takers.length - b.takers.length ||
      b.of.massG * b.of.quantity - a.of.massG * a.of.quantity ||
      a.piece.index - b.piece.index,
  );
  for (const { of, piece, takers, full } of order) {
    const among = only !== null && takers.includes(only) ? [only] : takers;
    for (let left = of.quantity; left > 0; ) {
      const taken = (printer: number) => Math.min(left, full[printer]!);
      const after = among.map((printer) => (loadG[printer]! + taken(printer) * of.massG) / printers[printer]!.count);
      const printer = among[after.indexOf(Math.min(...after))]!;
      shares[printer]![piece.index]! += taken(printer);
      loadG[printer]! += taken(printer) * of.massG;
      left -= taken(printer);
    }
  }
  return shares;
}

function layOutGroup(boxes: readonly Box[], shares: readonly (readonly number[])[], sheets: readonly Sheet[]): Laid[] {
  return shares.flatMap((share, printer) => {
    const stacks = boxes.map(({ piece }) => ({ piece, left: share[piece.index]! })).filter(({ left }) => left > 0);
    if (stacks.length === 0) return [];
    return repeatedBeds(stacks, sheets[printer]!).map(({ places, count }): Laid => {
      const massG = places.reduce((sum, { piece }) => sum + boxes[piece.index]!.of.massG, 0);
      return { printer, count, massG: decimals(massG, 1), places, boxes };
    });
  });
}

/** Numbered on the bed where a part lies on it more than once. */
function itemsOf(places: readonly Place[], boxes: readonly Box[]): LotBed['items'] {
  return places.map(({ piece, x, y, turned }, at) => {
    const { kind, part, name } = boxes[piece.index]!.of;
    const alike = places.flatMap((place, i) => (place.piece.index === piece.index ? [i] : []));
    const numbered = alike.length > 1 ? `${name}, ${alike.indexOf(at) + 1} of ${alike.length}` : name;
    return { kind, part, name: numbered, xMm: x / UM, yMm: y / UM, turned };
  });
}
