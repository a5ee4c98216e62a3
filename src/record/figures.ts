/** The figures at work as the record holds them: positions, coverage, switch kinds, what they were taken with. */
import {
  type AtFrequency,
  type Conditions,
  FORMER_SHARE,
  kindsOf,
  neighboursOf,
  type Position,
  positionOf,
  type Span,
  tapsToClose,
} from '../coil/positions.ts';
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { curveOf } from './curves.ts';
import { decimals, significant } from './rounding.ts';
import type { CoilRecord, Setting, Tap } from './schema.ts';
import { settingsOf } from './settings.ts';

export type WorkingFigures = Pick<Tap, 'working' | 'range' | 'ends' | 'curve'>;

/** Positions of a coil at work, and the parts of the record that follow from them. */
export interface Figures {
  /** One a tap, in order. */
  readonly taps: readonly WorkingFigures[];
  readonly surroundings: CoilRecord['surroundings'];
  readonly coverage: CoilRecord['coverage'];
  readonly switchKinds: CoilRecord['switchKinds'];
  /** One a tens contact; none for one switch. */
  readonly settings: Setting[];
}

/** A second resonance up to a third above the range is in the way: strong signals come through on it. */
const NEAR_SECOND = 4 / 3;

const NOTES: Record<Rest, string> = {
  open: 'Dead turns hang on the coil and step the voltage up. Make-before-break joins two taps for a moment: the turns between are shorted.',
  shorted:
    'Dead turns are one closed loop that takes inductance and Q from those in use. Make-before-break does no harm.',
  'shorted in sections':
    'Every dead step is a loop of its own; no dead-end resonance is left, at the highest price in Q. Needs a switch that bridges all unused taps.',
  disconnected:
    'Dead turns are cut off and float; they still couple. Needs a second pole that breaks the winding at each tap, break-before-make.',
};

const atOf = (at: AtFrequency) => ({
  frequencyKhz: significant(at.kHz, 5),
  inductanceUh: significant(at.inductanceUh),
  resistanceOhm: significant(at.resistanceOhm, 4),
  q: significant(at.q, 3),
});

function rangeOf({ span }: Position, conditions: Conditions): Tap['range'] {
  if (span === null || conditions.tuning === null) return null;
  const second = (kHz: number | null) => (kHz === null ? null : significant(kHz, 4));
  return {
    lowKhz: significant(span.low.kHz, 5),
    lowUncertaintyKhz: significant(span.low.uncertaintyKhz, 2),
    highKhz: significant(span.high.kHz, 5),
    highUncertaintyKhz: significant(span.high.uncertaintyKhz, 2),
    secondLowKhz: second(span.low.secondKhz),
    secondHighKhz: second(span.high.secondKhz),
    capacitanceLowPf: significant(conditions.tuning.outPf, 5),
    capacitanceHighPf: significant(conditions.tuning.inPf, 5),
  };
}

/** `spans` are what each position tunes; on two switches what each tens contact does with all units. */
function coverageOf(spans: readonly (Span | null)[]): CoilRecord['coverage'] {
  if (!spans.every((span) => span !== null)) return null;
  const neighbours = neighboursOf(spans);
  const gaps = neighbours
    .filter(({ overlap }) => overlap < 0)
    .map(({ from, to }) => {
      const [lowKhz, highKhz] = [spans[to - 1]!.high.kHz, spans[from - 1]!.low.kHz];
      const width = Math.min(...[from, to].map((n) => spans[n - 1]!.high.kHz / spans[n - 1]!.low.kHz));
      const closing = tapsToClose(lowKhz, highKhz, width);
      return { from, to, lowKhz: significant(lowKhz, 5), highKhz: significant(highKhz, 5), tapsToClose: closing };
    });
  const highest = Math.max(...spans.map((span) => span.high.kHz));
  const deadEnds = spans.flatMap((span, i) => {
    const second =
      span.high.secondKhz === null ? null : Math.min(span.high.secondKhz, span.low.secondKhz ?? span.high.secondKhz);
    return second !== null && second < NEAR_SECOND * highest ? [{ tap: i + 1, secondKhz: significant(second, 4) }] : [];
  });
  return {
    neighbours: neighbours.map(({ from, to, overlap }) => ({ from, to, overlapPercent: decimals(overlap * 100, 2) })),
    gaps,
    deadEnds,
  };
}

/** All figures at work of a coil. */
export function figuresOf(coil: WorkingCoil, conditions: Conditions): Figures {
  const positions = coil.taps.map((turn) => positionOf(coil, turn, conditions));
  const rows = settingsOf(coil, positions, conditions);
  const litz = coil.coil.shape.wire.strands > 1;
  const names = ['low', 'middle', 'high'] as const;
  return {
    taps: positions.map((position) => ({
      working: {
        ...atOf(position.working),
        kind: litz ? 'strand loss in the coil’s field' : 'field of every turn',
      },
      range: rangeOf(position, conditions),
      ends: position.ends.map((at, i) => ({
        at: names[i]!,
        ...atOf(at),
        bandwidthKhz: significant(at.bandwidthKhz, 3),
        parallelKohm: significant(at.parallelKohm, 3),
      })),
      curve: curveOf(coil, position, conditions),
    })),
    surroundings: {
      leadPf: coil.around.leadPf,
      celsius: coil.around.celsius,
      rest: conditions.rest,
      formerLossTangent: conditions.lossTangent,
      formerLoss: `estimate: ${FORMER_SHARE * 100} % of the self-capacitance lies in the former and has its loss tangent`,
    },
    coverage: coverageOf(rows.length > 0 ? rows.map(({ span }) => span) : positions.map(({ span }) => span)),
    settings: rows.map(({ setting }) => setting),
    switchKinds:
      positions.length === 1
        ? []
        : kindsOf(coil, positions, conditions).map(({ kind, positions: of }) => ({
            kind,
            inUse: kind === conditions.rest,
            note: NOTES[kind],
            positions: of.map(({ at, span }, i) => ({
              tap: i + 1,
              frequencyKhz: significant(at.kHz, 5),
              inductanceUh: significant(at.inductanceUh),
              q: significant(at.q, 3),
              lowKhz: span === null ? null : significant(span.low.kHz, 5),
              highKhz: span === null ? null : significant(span.high.kHz, 5),
            })),
          })),
  };
}
