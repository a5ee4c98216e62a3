/**
 * Shapes of the bench page's model, which knows no page: `counter.ts`, `spool.ts`, `correction.ts`, `judge.ts` and
 * `readings-csv.ts` make and take them. All plain data, so that they can be kept as JSON. Keys end in their unit.
 */
import type { Doubt } from '../record/meter-schema.ts';

export type StopKind = 'tap' | 'unit' | 'check' | 'finish';

/** Where the count is held until what is to be done there is done. */
export interface Stop {
  /** Stable: `u1` a unit tap, `t3` a tap, `c20` the check at turn 20, `F` the finish. */
  readonly key: string;
  readonly kind: StopKind;
  /** Of a tap or unit tap; of the finish that of the whole coil; null of a check. */
  readonly number: number | null;
  readonly turn: number;
  /** The whole turn to count to; from there the wire goes on by `onDeg`. */
  readonly whole: number;
  /** How far past the last whole turn along the wire, 0 <= onDeg < 360, whatever the hand. */
  readonly onDeg: number;
  /** In the record's frame. */
  readonly angleDeg: number;
  /** Z of the wire centre. */
  readonly positionMm: number;
  /** Wire from the start hole, loops of earlier taps included. */
  readonly wireM: number;
  /** The step in the words of the winding sheet, as planned; '' where a correction moved the stop, for it names turns. */
  readonly text: string;
}

/** The count: what led here is kept, so that every event can be taken back. */
export interface Count {
  /** Whole turns past the start mark. */
  readonly whole: number;
  /** Stops that are done. */
  readonly done: number;
  /** A letter an event: `t` a turn, `s` a stop. */
  readonly log: string;
}

export interface Place {
  readonly turn: number;
  readonly positionMm: number;
}
export type Places = Readonly<Record<string, Place>>;

export interface Progress {
  readonly count: Count;
  /** Stops that lie elsewhere than planned, by their key; empty: all as planned. */
  readonly places: Places;
  readonly measures: readonly LengthMeasure[];
}

/** Why kept progress is not taken up. */
export type Refusal = 'damaged' | 'version' | 'another record';
export type Parsed = { readonly ok: true; readonly progress: Progress } | { readonly ok: false; readonly why: Refusal };

/** Wire, m. */
export interface SpoolState {
  /** On the coil: along the helix and in the loops made; without the end left long at the start. */
  readonly usedM: number;
  /** Still to come off the spool to finish, the end left long included. */
  readonly neededM: number;
  /** On the spool; null when what it held at the start is not known. Below 0: more is used than it held. */
  readonly leftM: number | null;
  /** `neededM - leftM` where that is above 0, else 0; null when not known. */
  readonly lackM: number | null;
}

/**
 * How a length was measured. `extent`: from the lower edge at the start hole to the upper edge at the wire's end, as the
 * record states wound lengths (n pitches and a wire). `wires`: over so many wires side by side on one line away from the
 * start hole, as in the check at turn 20 (n - 1 pitches and a wire).
 */
export type LengthOver = 'extent' | 'wires';

export interface LengthMeasure {
  /** Turn that the wire had reached. With `wires` a whole number: so many wires. */
  readonly turn: number;
  readonly lengthMm: number;
  /** Half width of the reading at 95 %; 0.1 where it is not known better. */
  readonly halfMm: number;
  readonly over: LengthOver;
}

/** Wound turns of one pitch. */
export interface PitchPiece {
  readonly fromTurn: number;
  readonly toTurn: number;
  readonly pitchMm: number;
  readonly halfMm: number;
}

/**
 * `made`: done already; nothing moves it. `steps`: whole turns only (taps in
 * line, posts), from rib to rib, or by 5 degrees, which a protractor can set out. `hole`: the former is drilled, one of the wires beside the hole is taken. `kept`: placed by the
 * groove, or of a units switch.
 */
export type Placing = 'made' | 'steps' | 'hole' | 'kept';

export interface CorrectedStop {
  readonly key: string;
  readonly kind: StopKind;
  readonly number: number | null;
  readonly placing: Placing;
  readonly plannedTurn: number;
  readonly turn: number;
  /** Turns from one possible place to the next; null with `made`, `kept` and `hole`. */
  readonly stepTurns: number | null;
  readonly angleDeg: number;
  readonly positionMm: number;
  readonly wireM: number;
  /** Null of unit taps and checks, which have no target. */
  readonly targetUh: number | null;
  readonly inductanceUh: number;
  readonly deviationPercent: number | null;
  /** 95 % limits with the pitch as measured. */
  readonly lowUh: number;
  readonly highUh: number;
  /** What it would be at its planned turn. */
  readonly plannedUh: number;
  /** Where it would meet its target; null without one. */
  readonly idealTurn: number | null;
  /** The hole it is led through, and how far its centre lies above (+) or below the wire's. */
  readonly hole: { readonly label: string; readonly offMm: number } | null;
  /** Turns to unwind to reach the better place that is already wound over; 0: none. */
  readonly backTurns: number;
}

/** What a length does not go together with. */
export type LengthDoubt =
  /** As measured the other way (`over`), or with a turn more or less, it would fit. */
  | 'a turn'
  /** Shorter than wires laid side by side can be. */
  | 'too short'
  /** Further off than any winding. */
  | 'too long'
  /** In a groove: the pitch cannot change, so turns were jumped or miscounted. */
  | 'groove';

export interface Correction {
  readonly pitchKind: 'close' | 'spacer' | 'groove';
  readonly plannedPitchMm: number;
  /** Of the turns to come. In a groove that of the groove. */
  readonly pitchMm: number;
  readonly pitchHalfMm: number;
  /** What is wound, from the start, by as few pitches as go with every length. */
  readonly pieces: readonly PitchPiece[];
  /** Each length against what was planned for its turn, in the order given. */
  readonly lengths: readonly {
    readonly measure: LengthMeasure;
    readonly plannedMm: number;
    readonly doubt: LengthDoubt | null;
    /** Turns that it is off by at the planned pitch. */
    readonly offTurns: number;
  }[];
  /** All stops in order of their turns, checks left out. */
  readonly stops: readonly CorrectedStop[];
  readonly turns: number;
  readonly windingLengthMm: number;
  /** With loops, without the ends that are left long. */
  readonly wireLengthM: number;
  /** What the winding lacks of room on the former, mm; 0 when it fits. */
  readonly lacksMm: number;
}

/** `probed resonance`: with generator and probe on the coil. `width`: between 0.707 of what the probe shows then. */
export type Quantity =
  | 'diameter'
  | 'length'
  | 'resistance'
  | 'inductance'
  | 'resonance'
  | 'probed resonance'
  | 'width'
  | 'other';

/** Something to measure, with its limits. */
export interface Question {
  /** Stable: `former`, `turns-20`, `length-3`, `ohm-3`, `uh-3`, `khz-3-100`, `probed-3-100`, `width-3-100`, or `check-5` of one that is not known. */
  readonly key: string;
  readonly quantity: Quantity;
  /** Null: not of a tap. */
  readonly tap: number | null;
  /** In words: `tap 3 with 100 pF`. */
  readonly what: string;
  /** `mm`, `Ω`, `µH` or `kHz`. */
  readonly unit: string;
  /** Null: cannot be told, the reading is not judged. */
  readonly low: number | null;
  readonly nominal: number | null;
  readonly high: number | null;
  /** Decimals to show. */
  readonly digits: number;
  /** Of a resonance or a width; 0: with no capacitor. */
  readonly capacitancePf: number | null;
  /** Of the meter, of an inductance. */
  readonly frequencyKhz: number | null;
  /** Why the meter is not to be trusted here; null: it can be. */
  readonly doubt: Doubt | null;
}

export type Verdict = 'pass' | 'low' | 'high' | 'implausible' | 'not judged';

export interface Judgement {
  readonly verdict: Verdict;
  /** Limits as they were held against the reading: a resistance's at the temperature of the coil. */
  readonly low: number | null;
  readonly nominal: number | null;
  readonly high: number | null;
  /** Reading against nominal; null without a nominal. */
  readonly deviationPercent: number | null;
  /** Sentences, the likeliest first; empty with `pass`. */
  readonly advice: readonly string[];
}

/** One line of the file of readings. */
export interface ReadingRow {
  /** Hash of the record. */
  readonly record: string;
  readonly serial: string;
  readonly tap: number | null;
  readonly quantity: string;
  /** What it was measured with or at: `100 pF`, `100 pF, probe`, `23.5 degC`, `100 kHz`; '' none. */
  readonly condition: string;
  readonly value: number | null;
  /** In letters of ASCII: mm, ohm, uH, kHz. */
  readonly unit: string;
  readonly low: number | null;
  readonly high: number | null;
  readonly verdict: string;
  readonly remark: string;
}
