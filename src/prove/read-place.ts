/** Which record and which serial a line of a file of readings belongs to. */
import type { LotRecord } from '../lot/schema.ts';
import { quote } from '../quantity/parse.ts';
import type { CoilRecord } from '../record/schema.ts';

/** Why a line belongs nowhere, or what is to be said of where it belongs. */
export interface PlaceNote {
  readonly code: string;
  readonly column: 'serial' | 'record';
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}

export type Placed =
  | { readonly ok: true; readonly hash: string; readonly serial: string; readonly note: PlaceNote | null }
  /** No record of this hash was found at all. */
  | { readonly ok: 'no record'; readonly hash: string; readonly serial: string }
  | { readonly ok: false; readonly note: PlaceNote };

/** Shorter pieces of a hash may be met by chance. */
const LEAST_HASH = 8;

/** Without the zeros in front that a spreadsheet takes off, and without regard to capitals. */
const loose = (serial: string) =>
  serial
    .toLowerCase()
    .replace(/\d+/g, (digits) => digits.replace(/^0+(?=\d)/, ''))
    .trim();

interface OfLot {
  readonly serial: string;
  readonly hash: string;
  readonly lot: string;
}

export class Places {
  readonly #hashes: readonly string[];
  readonly #exact = new Map<string, OfLot[]>();
  readonly #loose = new Map<string, OfLot[]>();
  readonly #lotsOf = new Map<string, string>();
  readonly #anyLot: boolean;

  constructor(records: ReadonlyMap<string, Pick<CoilRecord, 'job'>>, lots: readonly LotRecord[]) {
    this.#hashes = [...records.keys()];
    this.#anyLot = lots.length > 0;
    for (const lot of lots) {
      const hashOf = new Map(lot.kinds.map(({ kind, hash }) => [kind, hash]));
      for (const { hash } of lot.kinds) this.#lotsOf.set(hash, lot.lot);
      for (const { serial, kind } of lot.coils) {
        const of: OfLot = { serial, hash: hashOf.get(kind) ?? '', lot: lot.lot };
        add(this.#exact, serial, of);
        add(this.#loose, loose(serial), of);
      }
    }
  }

  /** Of the cells of a line, trimmed; the serial `''` where there is none. */
  of(hashCell: string, serialCell: string): Placed {
    const found = this.#inLots(serialCell);
    if (hashCell === '') return this.#bySerial(serialCell, found);
    const hash = hashCell.toLowerCase();
    if (!/^[0-9a-f]+$/.test(hash) || hash.length < LEAST_HASH)
      return refused(
        'record',
        'no-hash',
        quote(hashCell),
        `the hash of a record, or its first ${LEAST_HASH} characters`,
        'copy it from the sheet or the file of readings, or leave the cell empty',
      );
    const matches = this.#hashes.filter((one) => one.startsWith(hash));
    if (matches.length > 1)
      return refused(
        'record',
        'several-records',
        `${quote(hashCell)}, which ${matches.length} records begin with`,
        'a hash that names one record',
        'write more of it',
      );
    const [match] = matches;
    if (match === undefined) return { ok: 'no record', hash, serial: serialCell };
    const own = found.find((one) => one.hash === match);
    if (own !== undefined) return { ok: true, hash: match, serial: own.serial, note: renamed(serialCell, own.serial) };
    const [other] = found;
    if (other !== undefined)
      return refused(
        'serial',
        'other-kind',
        `${quote(serialCell)}, which lot ${quote(other.lot)} has as a coil of record ${other.hash.slice(0, 12)}, beside record ${match.slice(0, 12)}`,
        'a serial and a record that go together',
        'look at the coil and write the serial that is on it',
      );
    const lot = this.#lotsOf.get(match);
    const note: PlaceNote | null =
      lot === undefined || serialCell === ''
        ? null
        : {
            code: 'foreign-serial',
            column: 'serial',
            got: `${quote(serialCell)}, which is not in lot ${quote(lot)}`,
            expected: 'a serial of the lot',
            todo: 'it was judged by the record that its line names; look at the label of the coil',
          };
    return { ok: true, hash: match, serial: serialCell, note };
  }

  #inLots(serial: string): readonly OfLot[] {
    if (serial === '') return [];
    return this.#exact.get(serial) ?? this.#loose.get(loose(serial)) ?? [];
  }

  #bySerial(serial: string, found: readonly OfLot[]): Placed {
    const hashes = new Set(found.map(({ hash }) => hash));
    const [first] = found;
    if (first !== undefined && hashes.size === 1) {
      if (!this.#hashes.includes(first.hash)) return { ok: 'no record', hash: first.hash, serial: first.serial };
      if (new Set(found.map((one) => one.serial)).size === 1)
        return { ok: true, hash: first.hash, serial: first.serial, note: renamed(serial, first.serial) };
    }
    if (first !== undefined)
      return refused(
        'serial',
        'several-coils',
        `${quote(serial)}, which is the serial of several coils`,
        'a serial that names one coil',
        'add the column record with the hash of each coil',
      );
    const [only] = this.#hashes;
    // A lot tells which serials there are; without one, a single record leaves no choice.
    if (only !== undefined && this.#hashes.length === 1 && !this.#anyLot)
      return { ok: true, hash: only, serial, note: null };
    const many = this.#hashes.length;
    return refused(
      'serial',
      serial === '' ? 'no-serial' : 'foreign-serial',
      serial === ''
        ? 'neither a serial nor a record'
        : `${quote(serial)}, which is the serial of no coil of ${this.#anyLot ? 'the lots' : `the ${many} records`} that were found`,
      'a serial of a lot, or the hash of a record in the column record',
      'correct it, or name the folder of its lot with --from',
    );
  }
}

function add<T>(map: Map<string, T[]>, key: string, one: T): void {
  const list = map.get(key);
  if (list === undefined) map.set(key, [one]);
  else list.push(one);
}

function refused(column: PlaceNote['column'], code: string, got: string, expected: string, todo: string): Placed {
  return { ok: false, note: { code, column, got, expected, todo } };
}

function renamed(written: string, serial: string): PlaceNote | null {
  if (written === serial) return null;
  return {
    code: 'serial-read-as',
    column: 'serial',
    got: quote(written),
    expected: `a serial as the lot has it, here ${quote(serial)}`,
    todo: 'it was taken for that one; keep the column as text where a spreadsheet takes zeros off',
  };
}
