/** The printed parts of a lot as pieces to lay out: formers and what else belongs to a coil as often as there are coils, jigs once, equal ones once for all kinds. */
import { COIL_PARTS } from '../job/schema.ts';
import type { PartEntry } from '../record/schema.ts';
import type { LotPiece } from './beds.ts';
import type { PlannedKind } from './planned.ts';
import type { Lot, LotPrinter } from './types.ts';

/**
 * Formers of every kind, then jigs. Jigs are equal when their files are, byte for byte, in the same material and printed the same
 * way: then the first kind's is printed, named with the letters of all kinds it serves.
 */
export function piecesOf(kinds: readonly PlannedKind[]): LotPiece[] {
  const formers = kinds.flatMap((kind) =>
    partsOf(kind, true).map((entry) => piece(kind, entry, [kind.kind], entry.quantity * kind.serials.length)),
  );
  const jigs = new Map<string, { kind: PlannedKind; entry: PartEntry; letters: string[]; quantity: number }>();
  for (const kind of kinds) {
    for (const entry of partsOf(kind, false)) {
      const key = JSON.stringify([fileHash(kind, entry), entry.material, entry.name, settingsOf(kind)]);
      const same = jigs.get(key) ?? { kind, entry, letters: [], quantity: 0 };
      same.letters.push(kind.kind);
      same.quantity = Math.max(same.quantity, entry.quantity);
      jigs.set(key, same);
    }
  }
  return [
    ...formers,
    ...[...jigs.values()].map(({ kind, entry, letters, quantity }) => piece(kind, entry, letters, quantity)),
  ];
}

const partsOf = ({ record }: PlannedKind, formers: boolean): PartEntry[] =>
  record.parts.filter(({ kind }) => COIL_PARTS.includes(kind) === formers);

const settingsOf = ({ record: { printer } }: PlannedKind) => ({
  layerMm: printer.layerMm,
  nozzleMm: printer.nozzleMm,
  scale: printer.scale,
});

function fileHash({ record }: PlannedKind, { path }: PartEntry): string {
  const file = record.files.find((one) => one.path === path);
  if (file === undefined) throw new Error(`no file ${path} in the record of ${record.job}`);
  return file.sha256;
}

function piece(kind: PlannedKind, entry: PartEntry, letters: readonly string[], quantity: number): LotPiece {
  const { part, name, material, sizeMm, massG } = entry;
  const perCoil = COIL_PARTS.includes(entry.kind) ? entry.quantity : 0;
  return {
    kind: kind.kind,
    part,
    name: `${lettersText(letters)} ${name}`,
    quantity,
    perCoil,
    material,
    ...settingsOf(kind),
    sizeMm,
    massG,
  };
}

/** "A", "A, B": of many the first two and how many more. */
function lettersText(letters: readonly string[]): string {
  return letters.length <= 3
    ? letters.join(', ')
    : `${letters.slice(0, 2).join(', ')} and ${letters.length - 2} more kinds:`;
}

/** The printers of the lot; those that its jobs state when the lot has none. */
export function printersOf(lot: Lot, kinds: readonly PlannedKind[]): LotPrinter[] {
  if (lot.printers.length > 0) return [...lot.printers];
  const beds = new Map(
    kinds.map(({ record: { printer } }) => {
      const { bedXMm, bedYMm, heightMm } = printer;
      return [JSON.stringify([bedXMm, bedYMm, heightMm]), { bedXMm, bedYMm, heightMm }];
    }),
  );
  return [...beds.values()].map((bed, index) => ({
    name: beds.size === 1 ? 'printer' : `printer ${letterOfPrinter(index)}`,
    ...bed,
    count: 1,
  }));
}

const letterOfPrinter = (index: number): string => String.fromCharCode(97 + (index % 26));
