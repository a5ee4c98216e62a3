/** How the figures of one tap come about, as data: enough to work each out again by hand. */
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { CoilRecord, Tap, Winding } from '../record/schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';

/** A record of any verb, whose taps can be explained. */
export type ExplainedRecord = FiguresRecord & { readonly tapMethod: CoilRecord['tapMethod'] | null };

export interface Input {
  readonly name: string;
  readonly value: number;
  /** Empty for a plain number. */
  readonly unit: string;
}

export interface Step extends Input {
  /** How it follows from what stands above; empty where a law of its own gives it. */
  readonly formula: string;
  /** The record's own value of it; null where the record has none. */
  readonly recorded: number | null;
}

/** One figure: how it comes about, whether its law holds here, and how far it may be off. */
export interface Figure {
  readonly figure: string;
  readonly value: number;
  readonly unit: string;
  /** The record's own value; null for a check by hand beside it. */
  readonly recorded: number | null;
  readonly formula: string;
  readonly source: string;
  readonly inputs: readonly Input[];
  readonly intermediates: readonly Step[];
  readonly validity: { readonly domain: string; readonly inside: boolean };
  /** Estimated error, with what it was found against. */
  readonly error: string;
}

/** The diameter that stands for a turn in laws of round coils. */
export function diameterOf({ winding, coil }: Subject): Input {
  if (winding.corners === undefined) return input('mean diameter D', winding.meanDiameterMm, 'mm');
  return input('diameter D of the circle of a turn’s area', coil.coil.equivalentDiameterMm, 'mm');
}

export interface Explanation {
  readonly job: string;
  /** Of the record. */
  readonly hash: string;
  readonly tap: number;
  readonly turn: number;
  readonly figures: readonly Figure[];
}

/** What every figure is worked out from. */
export interface Subject {
  readonly record: ExplainedRecord;
  readonly winding: Winding;
  readonly tap: Tap;
  readonly coil: WorkingCoil;
}

export const input = (name: string, value: number, unit = ''): Input => ({ name, value, unit });

export const step = (
  name: string,
  formula: string,
  value: number,
  unit = '',
  recorded: number | null = null,
): Step => ({ name, formula, value, unit, recorded });
