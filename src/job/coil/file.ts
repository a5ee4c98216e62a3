/** A measured coil as `survey` takes it: plain data, complete, checked, in the units that the names end in. */
import type { Wire } from '../../stock/wire.ts';
import type { ReceivingSet } from '../job.ts';

export interface MeasuredSection {
  readonly turns: number;
  readonly pitchMm: number;
  /** Clear distance to the next section, edge to edge over the covering; 0 behind the last. */
  readonly gapAfterMm: number;
}

/** The covering of measured wire is what the stock has nearest. */
export interface MeasuredCoil {
  readonly wire: Wire;
  readonly meanDiameterMm: number;
  /** Of what the wire lies on. */
  readonly formerDiameterMm: number;
  readonly turns: number;
  /** From the start; one when the winding is even. */
  readonly sections: readonly MeasuredSection[];
  /** Turns from the start, ascending, the whole coil last. */
  readonly taps: readonly number[];
  readonly hand: 'right' | 'left';
  readonly earthed: 'start' | 'finish';
  /** Null: nothing, or nothing that counts. */
  readonly formerMaterial: string | null;
}

/** Half widths at 95 %. */
export interface MeasuredSpread {
  readonly diameterMm: number;
  /** Fractions. */
  readonly pitch: number;
  readonly bare: number;
  /** Place of a tap along the wire. */
  readonly turn: number;
}

export interface CoilFile {
  readonly name: string;
  /** YYYY-MM-DD. */
  readonly date: string | null;
  readonly paper: 'A4' | 'Letter';
  readonly coil: MeasuredCoil;
  readonly set: ReceivingSet | null;
  readonly band: { readonly lowKhz: number; readonly highKhz: number } | null;
  /** Null: the middle of each range; never null without a set. */
  readonly atKhz: number | null;
  /** Of the copper. */
  readonly celsius: number;
  readonly spread: MeasuredSpread;
  /** What the person wrote, as written, by dotted key. */
  readonly given: Readonly<Record<string, unknown>>;
  /** Every default taken and every value inferred, by dotted key. */
  readonly assumed: Readonly<Record<string, unknown>>;
}
