/**
 * What `match` passes on: an old coil as far as it was measured, the coil that was inferred from it, and how a replacement
 * compares. Millimetres, microhenry, picofarad, kilohertz, ohm, grams, degrees; places along the axis are counted from the
 * middle of the wire at the start (Z = 0 there), turns from the start, angles counterclockwise seen from the finish.
 *
 * Every uncertainty is a half width at 95 % of a normal error: its standard deviation is the half width over 1.96.
 */
import type { ReceivingSet } from '../job/job.ts';
import type { Covering, Wire } from '../stock/wire.ts';

/** A measured value and its half width at 95 %, in the unit of its name. A half width of 0: taken as exact. */
export interface Reading {
  readonly value: number;
  readonly uncertainty: number;
}

/** One reading of a diameter; a circumference is turned into one before it comes here. */
export interface DiameterReading {
  readonly of: 'former' | 'over wire' | 'mean';
  readonly how: 'caliper' | 'circumference';
  readonly mm: Reading;
}

/** An inductance as a meter showed it. */
export interface InductanceReading {
  readonly uh: Reading;
  /** Of the meter. */
  readonly kHz: number;
}

/** Resonance with a known capacitor across the tap. Readings with the same capacitor share its error. */
export interface ResonanceReading {
  readonly kHz: Reading;
  readonly capacitorPf: Reading;
}

/** What is known of a tap; the whole coil is one too, the last. All null: the tap is lost. */
export interface OldTap {
  /** What it is called on the old set, or its number from 1. */
  readonly name: string;
  /** Counted; a half width of 0 is a count that is sure. Fractions are angles. */
  readonly turns: Reading | null;
  readonly positionMm: Reading | null;
  /** In the frame, 0 to 360. Null: it lies in line with the start, at whole turns, unless `turns` has a fraction. */
  readonly angleDeg: Reading | null;
  readonly inductance: InductanceReading | null;
  readonly resonance: ResonanceReading | null;
  readonly resistanceOhm: Reading | null;
}

/** A section of the winding; they end at taps, or where turns are counted. */
export interface OldSection {
  /** Null: as many as the taps in it tell. */
  readonly turns: number | null;
  /** Number of the tap (from 1) at which it ends; null: not at a tap. The last ends with the coil. */
  readonly endsAtTap: number | null;
  readonly pitchMm: Reading | null;
  /** Over its wires, edge to edge. */
  readonly lengthMm: Reading | null;
  /** Clear distance to the next, edge to edge; null behind the last. */
  readonly gapAfterMm: Reading | null;
}

export interface OldWire {
  /** Named in words: its stock diameters are readings with the standard's limits. */
  readonly named: Wire | null;
  /** What covers it; taken as enamel where nothing tells. */
  readonly covering: Covering | null;
  readonly bareMm: Reading | null;
  readonly overallMm: Reading | null;
  /** Wire of the whole coil as taken off, its covering included. */
  readonly massG: Reading | null;
  readonly lengthM: Reading | null;
}

/** An old coil, as far as it was measured. */
export interface OldCoil {
  readonly diameters: readonly DiameterReading[];
  readonly wire: OldWire;
  /** Centre to centre; `close`: the turns touch (common practice: enamel lies 1 % to 3 % looser than its diameter, textile within 3 %). */
  readonly pitchMm: Reading | 'close' | null;
  /** Over all wires, edge to edge. */
  readonly windingLengthMm: Reading | null;
  /** Empty: one even winding. */
  readonly sections: readonly OldSection[];
  /** By how much a tap pushes the next turn aside, the same at all. */
  readonly tapGapMm: Reading;
  /** From the start, the whole coil last. */
  readonly taps: readonly OldTap[];
  readonly hand: 'right' | 'left';
  readonly earthed: 'start' | 'finish';
  readonly formerMaterial: string | null;
  /** Error that all inductance readings share, a fraction of the reading, half width. */
  readonly meterSystematic: number;
  /** How far all capacitance of the coil itself may be off the law, a fraction, half width. */
  readonly selfCapacitance: number;
  /** What the set was marked to tune; null: not known. */
  readonly band: { readonly lowKhz: number; readonly highKhz: number } | null;
  readonly set: ReceivingSet | null;
  /** Of the copper when its resistance was read. */
  readonly celsius: number;
}

/** An inferred figure and its 95 % limits. */
export interface Estimate {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

/** How the turns of a tap are known. */
export type TurnsBy =
  /** Counted by whoever measured, and nothing speaks against it. */
  | 'counted'
  /** Follow from the measurements. */
  | 'inferred'
  /** Nothing is known of the tap itself: proposed from the pattern of the others. */
  | 'proposed';

export interface InferredTap {
  readonly name: string;
  readonly by: TurnsBy;
  /** The likeliest. */
  readonly turn: number;
  /** More than 95 % of the weight lies on `turn`. */
  readonly determined: boolean;
  /** What else fits, the likeliest first, `turn` among them; weights add to 1 within what was listed. */
  readonly candidates: readonly { readonly turn: number; readonly weight: number }[];
  readonly positionMm: Estimate;
  readonly angleDeg: number;
  /** Low frequency, ring sum. */
  readonly inductanceUh: Estimate;
}

/** A pattern that the known taps follow, and what it proposes for those that are lost. */
export interface Proposal {
  /** Name of the lost tap. */
  readonly tap: string;
  readonly pattern: 'equal steps' | 'growing steps' | 'equal ratio';
  readonly turn: number;
  /** 0 to 1: share of the evidence that this pattern has among the patterns that were tried. */
  readonly confidence: number;
  readonly text: string;
}

/** A measurement that does not go with the others. */
export interface Contradiction {
  /** Dotted key in the file, such as `taps[5].position`. */
  readonly key: string;
  /** In words, with both numbers: "tap 5: 31 turns do not fit 17.2 mm at the pitch of the others". */
  readonly text: string;
  /** How many standard deviations it is off what the others say. */
  readonly sigmas: number;
  /** What was written, and what the others make of it, in the unit of the reading. */
  readonly got: number;
  readonly expected: number;
  readonly unit: string;
}

/** A measurement that was not made, and how much it would narrow. */
export interface NextMeasurement {
  /** Dotted key to add to the file. */
  readonly key: string;
  readonly text: string;
  /** Widest relative limit of a tap's inductance, half width in percent, now and with it. */
  readonly nowPercent: number;
  readonly thenPercent: number;
}

/** One reading against what the inferred coil would have shown. */
export interface Residual {
  readonly key: string;
  readonly measured: number;
  readonly fitted: number;
  readonly unit: string;
  readonly sigmas: number;
}

/** The coil that fits what was measured. */
export interface InferredCoil {
  readonly meanDiameterMm: Estimate;
  /** Outside of what the wire lies on. */
  readonly formerDiameterMm: Estimate;
  readonly bareMm: Estimate;
  readonly overallMm: Estimate;
  /** One a section. */
  readonly pitchMm: readonly Estimate[];
  /** Clear distances between sections, one fewer than sections. */
  readonly sectionGapMm: readonly Estimate[];
  readonly tapGapMm: Estimate;
  readonly windingLengthMm: Estimate;
  readonly wireLengthM: Estimate;
  /** From the start, the whole coil last. */
  readonly taps: readonly InferredTap[];
  /** The likeliest wire: that of the stock when it was named, else with the inferred diameters. */
  readonly wire: Wire;
  /** Turns of each section as inferred; one entry for an even winding. */
  readonly sectionTurns: readonly number[];
  /** Turn middles of the likeliest coil, Z = 0 at the start; see `coil/layout.ts`. */
  readonly turnPositionsMm: readonly number[];
  /** Chi-square of the likeliest coil over its degrees of freedom; null without any to spare. */
  readonly fit: { readonly chiSquare: number; readonly freedom: number } | null;
  readonly residuals: readonly Residual[];
  readonly contradictions: readonly Contradiction[];
  readonly proposals: readonly Proposal[];
  /** Widest gain first; empty when nothing that is left to measure would narrow it by a tenth. */
  readonly next: readonly NextMeasurement[];
  /** What was taken where nothing was measured, by key, in words. */
  readonly assumed: Readonly<Record<string, string>>;
}
