import ledger from './ledger.json' with { type: 'json' };
import { LOW_FREQUENCY } from './low-frequency.ts';
import type { Measures } from './measures.ts';
import { present, SIMULATOR } from './simulator.ts';
import { WORKING_FREQUENCY } from './working-frequency.ts';

/** One line of the ledger. */
export interface Case {
  readonly id: string;
  readonly what: string;
  /** Whether error and bound are relative or absolute. */
  readonly kind: string;
  /** What it is held against, with its source. */
  readonly reference: string;
  /** READ in print, COMPUTED, or FROM MEMORY. */
  readonly status: string;
  /** Number of values that are compared. */
  readonly cases: number;
  /** Largest error when the ledger was last written. */
  readonly error: number;
  /** The error that is accepted. */
  readonly bound: number;
  /** The error that was asked for at the start, where one was. */
  readonly demand?: number;
  /** A program that has to be installed; the case is skipped without it. */
  readonly needs?: string;
}

export const LEDGER: readonly Case[] = ledger;
export const MEASURES: Measures = { ...LOW_FREQUENCY, ...WORKING_FREQUENCY, ...SIMULATOR };

/** Whether a case can be worked out on this machine. */
export const canMeasure = ({ needs }: Pick<Case, 'needs'>): boolean => needs === undefined || present(needs);

/** Below this an error is rounding, of which less is no news. */
export const ROUNDING = 1e-12;

/** Number of values and largest error of a case, as it is now; the error is not a number if any of them is none. */
export function measure(id: string): { cases: number; error: number } {
  const errors = MEASURES[id]!();
  return { cases: errors.length, error: errors.reduce((worst, error) => Math.max(worst, Math.abs(error)), 0) };
}

/** Whether a bound is more than twice what is needed. */
export const canTighten = (bound: number, error: number): boolean => bound > ROUNDING && bound > 2 * error;

/** The smallest of 1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8 times a power of ten that is a fifth above the error, and never below rounding. */
export function boundFor(error: number): number {
  if (1.2 * error <= ROUNDING) return ROUNDING;
  const power = Math.floor(Math.log10(1.2 * error));
  const step = [1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10].find((s) => s * 10 ** power >= 1.2 * error)!;
  return Number(`${step}e${power}`);
}
