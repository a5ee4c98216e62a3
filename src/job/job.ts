/** A job as the planner takes it: plain data, complete, checked, in the units that the names end in. */
import type { Wire } from '../stock/wire.ts';
import type { JobAerial, JobDetector } from './around/aerial.ts';
import type { JobSecond } from './around/second.ts';
import type {
  BODIES,
  MOUNTINGS,
  PARTS,
  PREFERENCES,
  SHAFTS,
  SPACINGS,
  SWITCHES,
  TAP_LAYOUTS,
  TAP_METHODS,
  UNITS,
} from './schema.ts';

export type Spacing = (typeof SPACINGS)[number];
export type SwitchRest = (typeof SWITCHES)[number];
export type TapMethod = (typeof TAP_METHODS)[number];
export type TapLayout = (typeof TAP_LAYOUTS)[number];
export type PartKind = (typeof PARTS)[number];
export type Preference = (typeof PREFERENCES)[number];

export type Want =
  /** `taps` inductances from low to high, 2 to 60 of them. */
  | {
      readonly kind: 'range';
      readonly lowUh: number;
      readonly highUh: number;
      readonly taps: number;
      readonly spacing: Spacing;
    }
  /** One inductance a tap, ascending. */
  | { readonly kind: 'list'; readonly inductancesUh: readonly number[] }
  /** `overlap` is a fraction of frequency; `taps` null: the fewest that give it. Comes with a set. */
  | {
      readonly kind: 'band';
      readonly lowKhz: number;
      readonly highKhz: number;
      readonly overlap: number;
      readonly taps: number | null;
    };

export interface ReceivingSet {
  readonly capacitorLowPf: number;
  readonly capacitorHighPf: number;
  readonly strayPf: number;
  readonly aerialPf: number;
  readonly switch: SwitchRest;
  /** Lead and switch contact of each tap, to earth. */
  readonly leadPf: number;
}

/** A range to choose from freely, or the diameters there are, ascending. */
export type Diameters = { readonly lowMm: number; readonly highMm: number } | { readonly listMm: readonly number[] };

export interface JobFormer {
  readonly kind: 'printed' | 'tube';
  /** Outside. */
  readonly diametersMm: Diameters;
  /** Whole former at most, ends included. */
  readonly longestMm: number;
  /** Null: to be derived from the line width (printed only). */
  readonly wallMm: number | null;
  readonly material: string;
  readonly body: (typeof BODIES)[number];
  /** Null for a body that is not ribbed. */
  readonly ribs: number | null;
  readonly mounting: (typeof MOUNTINGS)[number];
  /** Holes for mounting screws; null without a mounting. */
  readonly screwMm: number | null;
  /** Diameter of their circle; null: as near as they can stand. */
  readonly screwCircleMm: number | null;
  readonly flanges: boolean;
}

export interface JobWinding {
  readonly hand: 'right' | 'left';
  readonly earthed: 'start' | 'finish';
  /** A number is a pitch in mm. */
  readonly pitch: 'any' | 'close' | 'spaced' | number;
  /** Thicknesses in mm, ascending; null: all in stock. */
  readonly spacers: readonly number[] | null;
  readonly tapMethod: TapMethod;
  readonly tapLayout: TapLayout;
  /** Contacts of the units switch of a two-switch coil, the start among them; null: one switch. */
  readonly units: number | null;
  readonly finishTrim: boolean;
}

export interface Printer {
  readonly bedXMm: number;
  readonly bedYMm: number;
  readonly heightMm: number;
  readonly nozzleMm: number;
  readonly lineMm: number;
  readonly layerMm: number;
  readonly holeCompensationMm: number;
  /** On diameter. */
  readonly clearanceMm: number;
  readonly scale: readonly [x: number, y: number, z: number];
  readonly material: string;
}

export interface Shop {
  readonly shaftMm: number;
  readonly shaftForm: (typeof SHAFTS)[number];
  readonly spoolDiameterMm: number;
  readonly spoolWidthMm: number;
  readonly spoolBoreMm: number;
  readonly meterKhz: number;
  readonly meterName: string | null;
  /** Of the reading, a fraction. */
  readonly meterAccuracy: number;
  /** Ascending. */
  readonly capacitorsPf: readonly number[];
  readonly capacitorTolerance: number;
  /** Absent of a record from before they were asked for; what is usual is then taken. */
  readonly instruments?: BenchInstruments | undefined;
}

/** Generator and oscilloscope probe at the hot end. */
export interface BenchInstruments {
  readonly generatorOhm: number;
  /** Between generator and hot end; null: a loop so loose that it loads nothing. */
  readonly couplingPf: number | null;
  readonly probePf: number;
  readonly probeOhm: number;
  /** Whether the job says anything of them. */
  readonly stated: boolean;
}

/** What a bench makes of a plan. */
export interface AsMade {
  /** Added to the mean diameter of the turns; the former is made to its nominal diameter all the same. */
  readonly diameterMm: number;
  /** By how much the pitch of turns that are laid by hand comes out larger, a fraction; printed grooves and notches have their own. */
  readonly pitch: number;
}

export interface Job {
  readonly name: string;
  /** YYYY-MM-DD. */
  readonly date: string | null;
  readonly paper: 'A4' | 'Letter';
  readonly units: (typeof UNITS)[number];
  readonly want: Want;
  readonly set: ReceivingSet | null;
  readonly former: JobFormer;
  readonly wires: readonly Wire[] | 'stock';
  readonly winding: JobWinding;
  /** Null: none. */
  readonly second: JobSecond | null;
  readonly aerial: JobAerial | null;
  readonly detector: JobDetector | null;
  readonly prefer: Preference;
  /** Frequency for the loss estimate when there is no set; null when not given. */
  readonly atKhz: number | null;
  /** Of the copper at work. */
  readonly celsius: number;
  readonly printer: Printer;
  readonly shop: Shop;
  readonly asMade: AsMade;
  /** Null: what suits the former. */
  readonly parts: readonly (PartKind | 'all')[] | null;
  /** Where it was written: the file, and the line of every key that is in it, by dotted key. */
  readonly source: { readonly file: string; readonly lines: Readonly<Record<string, number>> };
  /** What the person wrote, as written, by dotted key. */
  readonly given: Readonly<Record<string, unknown>>;
  /** Every default taken, by dotted key. */
  readonly assumed: Readonly<Record<string, unknown>>;
}
