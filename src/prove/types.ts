/** Readings of finished coils, each tied to what it measures: what judging, fitting and charts take. Plain data. */
import type { Quantity } from '../bench/api.ts';
import type { CoilRecord } from '../record/schema.ts';

/** One measured figure, in the unit of its quantity: mm, Ω, µH, kHz; turns for a count of turns; degrees of a dial have a type of their own. */
export interface Reading {
  /** Line of the file it stands on. */
  readonly line: number;
  /** Of the bench's questions, and turns that were actually wound up to a tap. */
  readonly quantity: Quantity | 'turns';
  /** Null: not of a tap (former, 20 turns). */
  readonly tap: number | null;
  readonly value: number;
  /** As typed, for messages and tables. */
  readonly written: string;
  /** Of a resonance or a width: the known capacitor; 0 where it was taken with the probe alone. */
  readonly capacitancePf: number | null;
  /** Of an inductance: the frequency of the meter. */
  readonly frequencyKhz: number | null;
  /** Of the copper, for a resistance; null: not stated. */
  readonly celsius: number | null;
  /** What tells readings without a tap apart: `former`, `turns-20`, ...; the key of the bench's question where one fits. */
  readonly key: string | null;
  readonly remark: string;
}

/** Where a dial stands when a position is tuned to a frequency. */
export interface DialReading {
  readonly line: number;
  readonly tap: number;
  /** Of the dial, clockwise from its end stop with the capacitor fully in. */
  readonly degrees: number;
  readonly frequencyKhz: number;
}

export interface CoilReadings {
  readonly serial: string;
  /** In the order of the file. */
  readonly readings: readonly Reading[];
  readonly dial: readonly DialReading[];
  /** Remarks that belong to no figure. */
  readonly remarks: readonly string[];
}

/** All coils of one record, in the order in which their serials first appear: the order of the charts. */
export interface KindReadings {
  readonly record: CoilRecord;
  readonly coils: readonly CoilReadings[];
}

/** What is to be said of a line of the file. */
export interface FileNote {
  readonly line: number;
  /** Title of the column as written; null: of the line as a whole. */
  readonly column: string | null;
  /** Stable, kebab-case. */
  readonly code: string;
  /** `left out`: it counts nowhere; `kept`: it counts as it stands, and should be looked at. */
  readonly fate: 'left out' | 'kept';
  /** Figures that are left out by this note; 0 with `kept`. */
  readonly figures: number;
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}

/** Every figure of the file ends in exactly one of these: figures = readings + dial + missing + leftOut. */
export interface FileCount {
  /** Cells in which a reading could stand. */
  readonly figures: number;
  readonly readings: number;
  readonly dial: number;
  /** Blank. */
  readonly missing: number;
  readonly leftOut: number;
}

/** A file of readings as read. */
export interface ReadingsFile {
  readonly kinds: readonly KindReadings[];
  /** In the order of their lines. */
  readonly notes: readonly FileNote[];
  readonly count: FileCount;
}
