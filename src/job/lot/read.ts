/** From the data of a lot file to a {@link LotFile}: defaults, schema, checks across keys. */
import { Fault, type FaultParts, type Place } from '../../fault.ts';
import type { LotPrinter, Spool } from '../../lot/types.ts';
import { linearMassGM } from '../../stock/linear-mass.ts';
import { type Data, isData } from '../defaults.ts';
import { faultsOf, keyText } from '../faults.ts';
import { type Finding, finding } from '../finding.ts';
import { nameOfFile } from '../name.ts';
import type { Path, Tree } from '../tree.ts';
import { numberedEntries, readFromFolder } from './entries.ts';
import type { LotFile } from './file.ts';
import { LOT_DEFAULTS, listedLotSchema, type ReadLotFile, tabledLotSchema } from './schema.ts';

const FALLBACK_NAME = 'Lot';

/** Fills in what was left out. Does not judge what is there. */
function complete(written: unknown, file: string): unknown {
  if (!isData(written)) return written;
  const data: Data = { ...written };
  // A heading whose lines are all commented out is a section left out.
  for (const section of ['coils', 'spools', 'printers']) if (data[section] === null) delete data[section];
  return { lot: nameOfFile(file, FALLBACK_NAME), ...LOT_DEFAULTS, ...data };
}

/** The lot that a tree holds. Throws a {@link Fault} with exit code 3 that carries every fault of the file. */
export function lotFileOf(tree: Tree, file: string): LotFile {
  const data = complete(tree.data, file);
  const schema = isData(data) && typeof data.coils === 'string' ? tabledLotSchema : listedLotSchema;
  const parsed = schema.safeParse(data);
  const read = parsed.success ? parsed.data : readable(data, schema.shape);
  const place = (path: Path): Place => ({ file, line: tree.lineOf(path), key: keyText(path) });
  const faults: FaultParts[] = (parsed.error?.issues ?? []).flatMap((issue) =>
    faultsOf(issue, tree, file, schema.shape),
  );
  for (const { path, ...parts } of namesTwice(read, tree)) faults.push({ place: place(path), ...parts });
  const { coils } = read;
  const listed = typeof coils === 'object' ? coils : [];
  const ordered = listed.map((entry, i) => ({ entry, place: (key: string) => place(['coils', i, key]) }));
  const judged =
    coils !== undefined && 'first-serial' in read && !(isData(data) && 'serials' in data && !('serials' in read));
  const numbered = judged
    ? numberedEntries(ordered, {
        file,
        pattern: read.serials ?? null,
        first: read['first-serial'] ?? 1,
        name: read.lot ?? FALLBACK_NAME,
      })
    : { entries: [], faults: [] };
  faults.push(...numbered.faults);
  if (faults.length > 0 || !parsed.success)
    throw new Fault(
      3,
      faults.sort((a, b) => (a.place?.line ?? 0) - (b.place?.line ?? 0)),
    );
  const lot: ReadLotFile = parsed.data;
  return {
    file,
    name: lot.lot,
    date: lot.date ?? null,
    paper: lot.paper ?? null,
    checkedBy: lot['checked-by'] ?? null,
    entries: numbered.entries,
    table:
      typeof lot.coils === 'string'
        ? { path: lot.coils, readFrom: readFromFolder(file, lot.coils), place: place(['coils']) }
        : null,
    pattern: lot.serials ?? null,
    firstSerial: lot['first-serial'],
    spools: (lot.spools ?? []).map(toSpool),
    printers: (lot.printers ?? []).map(toPrinter),
    jigs: lot.jigs,
  };
}

/** The keys that can be read on their own, when the whole cannot. */
function readable(
  data: unknown,
  shape: typeof listedLotSchema.shape | typeof tabledLotSchema.shape,
): Partial<ReadLotFile> {
  if (!isData(data)) return {};
  const found: Record<string, unknown> = {};
  for (const [key, schema] of Object.entries(shape)) {
    const parsed = Object.hasOwn(data, key) ? schema.safeParse(data[key]) : null;
    if (parsed?.success) found[key] = parsed.data;
  }
  return found as Partial<ReadLotFile>;
}

/** Reels and machines are told apart by their names alone. */
function namesTwice({ spools = [], printers = [] }: Partial<ReadLotFile>, tree: Tree): Finding[] {
  const found: Finding[] = [];
  for (const [section, list, noun] of [
    ['spools', spools, 'reel'],
    ['printers', printers, 'printer'],
  ] as const) {
    const seen = new Map<string, number>();
    list.forEach(({ name }, i) => {
      const first = seen.get(name.toLowerCase());
      if (first === undefined) seen.set(name.toLowerCase(), i);
      else
        found.push(
          finding(
            'name-twice',
            [section, i, 'name'],
            `the name ${name} a second time, after line ${tree.lineOf([section, first, 'name'])}`,
            `a name of its own for each ${noun}, capitals or not`,
            section === 'spools'
              ? 'number the reels, as they are marked on the shelf'
              : 'write count for machines that are alike',
          ),
        );
    });
  }
  return found;
}

type ReadSpool = NonNullable<ReadLotFile['spools']>[number];
type ReadPrinter = NonNullable<ReadLotFile['printers']>[number];

function toSpool({ name, wire, left }: ReadSpool): Spool {
  const metres = 'm' in left ? left.m : left.g / linearMassGM(wire.wire);
  // Down to a millimetre: no reel has more than it is said to have.
  return { name, wire: wire.wire, leftM: Math.floor(metres * 1000 + 1e-6) / 1000 };
}

function toPrinter({ name, bed, height, count = 1 }: ReadPrinter): LotPrinter {
  return { name, bedXMm: bed.x, bedYMm: bed.y, heightMm: height, count };
}
