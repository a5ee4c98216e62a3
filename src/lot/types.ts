/** A lot as read from its file, with the jobs it names: plain data, in the units that the names end in. */
import type { Job } from '../job/job.ts';
import type { Wire } from '../stock/wire.ts';

export interface Spool {
  /** As written on the reel. */
  readonly name: string;
  readonly wire: Wire;
  readonly leftM: number;
}

/** Machines that are alike. */
export interface LotPrinter {
  readonly name: string;
  readonly bedXMm: number;
  readonly bedYMm: number;
  readonly heightMm: number;
  /** How many of them there are, at least 1. */
  readonly count: number;
}

/** So many coils of one job. */
export interface LotEntry {
  readonly job: Job;
  /** The job's file, as the lot names it. */
  readonly path: string;
  readonly quantity: number;
  /** One a coil, in order; all serials of a lot differ. */
  readonly serials: readonly string[];
}

export interface Lot {
  readonly name: string;
  /** YYYY-MM-DD. */
  readonly date: string | null;
  readonly paper: 'A4' | 'Letter';
  /** Who checks the finished coils, as printed at the foot of the travellers. */
  readonly checkedBy: string | null;
  readonly entries: readonly LotEntry[];
  /** In the order written; empty: nothing is known of the shelf, all wire is to be bought. */
  readonly spools: readonly Spool[];
  /** Empty: one printer, as the jobs state it. */
  readonly printers: readonly LotPrinter[];
  /** Arbor, comb and other jigs: once for each kind that needs them, or not at all. */
  readonly jigs: 'once' | 'none';
}
