/** A lot as its file alone tells it, the jobs not yet read: plain data. */
import type { Place } from '../../fault.ts';
import type { LotPrinter, Spool } from '../../lot/types.ts';

/** So many coils of a job that is still to be read. */
export interface LotFileEntry {
  /** Job file, from the folder of the lot file, as written where it can be. */
  readonly path: string;
  /** Where it is to be read, from the folder that the lot file was named from; the same file is the same text. */
  readonly readFrom: string;
  readonly quantity: number;
  /** One a coil. */
  readonly serials: readonly string[];
  /** Where the lot, or its table, names the job. */
  readonly place: Place;
}

export interface LotFile {
  /** As it was named, for messages. */
  readonly file: string;
  readonly name: string;
  /** YYYY-MM-DD. */
  readonly date: string | null;
  /** Null: that of the first job. */
  readonly paper: 'A4' | 'Letter' | null;
  readonly checkedBy: string | null;
  /** Empty while the table is to be read. */
  readonly entries: readonly LotFileEntry[];
  /** A CSV file with the coils, still to be read (see {@link withTable}); null: the coils are here. */
  readonly table: { readonly path: string; readonly readFrom: string; readonly place: Place } | null;
  /** Pattern of serials; null: the initials of the lot. */
  readonly pattern: string | null;
  readonly firstSerial: number;
  readonly spools: readonly Spool[];
  readonly printers: readonly LotPrinter[];
  readonly jigs: 'once' | 'none';
}
