/** One random old coil through the inference: how often the truth lies within the limits that it states. */
import { Fault } from '../../src/fault.ts';
import { infer } from '../../src/match/infer.ts';
import type { Estimate, InferredCoil } from '../../src/match/types.ts';
import { randomOldCoil, type TrueCoil } from './match-coils.ts';

/** A kind of figure, and how far the truth lies from the value: over the half width of that side, so within 1 it is inside. */
export type Figure = readonly [kind: string, off: number];

/** A tap whose turns nobody counted surely. */
export interface TurnsFound {
  readonly kind: 'inferred' | 'proposed';
  readonly determined: boolean;
  readonly right: boolean;
  /** Weight that the inference gave to the turn it named, and to the true one. */
  readonly best: number;
  readonly weight: number;
}

export interface MatchOutcome {
  readonly seed: number;
  readonly result: 'inferred' | 'refused' | 'failed';
  readonly figures: readonly Figure[];
  readonly turns: readonly TurnsFound[];
  readonly contradictions: number;
  /** Codes of the refusal, or what went wrong. */
  readonly said: readonly string[];
  readonly ms: number;
}

/** Where the truth lies: 0 on the value, -1 and 1 on the limits. */
function offOf({ value, low, high }: Estimate, truth: number): number {
  const half = truth < value ? value - low : high - value;
  const off = (truth - value) / Math.max(half, 1e-12);
  return Math.abs(truth - value) < 1e-9 * (1 + Math.abs(truth)) ? 0 : off;
}

function figuresOf(found: InferredCoil, truth: TrueCoil): Figure[] {
  const figure = (kind: string, estimate: Estimate, value: number): Figure => [kind, offOf(estimate, value)];
  return [
    figure('mean diameter', found.meanDiameterMm, truth.meanMm),
    figure('former diameter', found.formerDiameterMm, truth.meanMm - truth.overallMm),
    figure('bare wire', found.bareMm, truth.bareMm),
    figure('wire over covering', found.overallMm, truth.overallMm),
    ...found.pitchMm.map((pitch, s) => figure('pitch', pitch, truth.pitchMm[s]!)),
    ...found.sectionGapMm.map((gap, s) => figure('gap of sections', gap, truth.sectionGapMm[s]!)),
    figure('gap of taps', found.tapGapMm, truth.tapGapMm),
    figure('winding length', found.windingLengthMm, truth.windingLengthMm),
    figure('wire length', found.wireLengthM, truth.wireLengthM),
    ...found.taps.flatMap((tap, i) => {
      const real = truth.taps[i]!;
      const kind = real.lost ? ' of a lost tap' : '';
      return [
        figure(`place${kind}`, tap.positionMm, real.positionMm),
        figure(`inductance${kind}`, tap.inductanceUh, real.inductanceUh),
      ];
    }),
  ];
}

/** Angles have errors of their own: the turn is right when it is the nearest at that angle. */
const SAME_TURN = 0.5;

function turnsOf(found: InferredCoil, truth: TrueCoil): TurnsFound[] {
  return found.taps.flatMap((tap, i): TurnsFound[] => {
    const real = truth.taps[i]!;
    if (!real.uncounted) return [];
    const near = ({ turn }: { readonly turn: number }) => Math.abs(turn - real.turn) < SAME_TURN;
    return [
      {
        kind: real.lost ? 'proposed' : 'inferred',
        determined: tap.determined,
        right: near(tap),
        best: tap.candidates.find(({ turn }) => Math.abs(turn - tap.turn) < 1e-6)?.weight ?? 0,
        weight: tap.candidates.filter(near).reduce((sum, { weight }) => sum + weight, 0),
      },
    ];
  });
}

/** `mostTurns` bounds the coil. Never throws. */
export function matchOutcome(seed: number, mostTurns?: number): MatchOutcome {
  const none = { seed, figures: [], turns: [], contradictions: 0, said: [], ms: 0 };
  try {
    const { old, truth } = randomOldCoil(seed, mostTurns);
    const from = performance.now();
    const found = infer(old);
    const ms = Math.round(performance.now() - from);
    const figures = figuresOf(found, truth);
    if (figures.some(([, off]) => !Number.isFinite(off))) throw new Error('a figure that is no number');
    return {
      ...none,
      result: 'inferred',
      figures: figures.map(([kind, off]) => [kind, Number(off.toFixed(3))]),
      turns: turnsOf(found, truth),
      contradictions: found.contradictions.length,
      ms,
    };
  } catch (error) {
    if (error instanceof Fault && error.exit === 3 && error.faults.length > 0) {
      const empty = error.faults.filter(({ got, expected, todo }) => !got || !expected || !todo);
      if (empty.length === 0) return { ...none, result: 'refused', said: error.faults.map(({ code }) => code) };
    }
    return { ...none, result: 'failed', said: [error instanceof Error ? (error.stack ?? error.message) : `${error}`] };
  }
}
