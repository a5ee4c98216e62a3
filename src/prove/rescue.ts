/**
 * Whether a failing coil can be saved, and how: every set of turns at the finish, end turns spread or pressed at F, first turns spread and
 * taps moved is tried on the readings as they stand.
 *
 * Each electrical reading says by which factors the inductance of its tap may change and be within limits: low/reading to high/reading
 * of a meter, (f/high)^2 to (f/low)^2 of a resonance. Each action is a factor for every tap: of the record's corrections for end
 * turns, of the coil's own ring sum for turns and places, from where the tap reads to be. Factors of several actions multiply; what that
 * leaves out is of second order. tests/prove/rescue.test.ts does what is said to simulated coils and works them out anew.
 */
import { RESCUE } from '../../templates/wording/proof.ts';
import { fixed } from '../quantity/decimals.ts';
import { decimals } from '../record/rounding.ts';
import type { CoilRecord } from '../record/schema.ts';
import { electricalOf, inductanceOff, isOut } from './judge.ts';
import { causesOf, excessAtFinish, LOOSE_WIRES, type Seen } from './rescue-causes.ts';
import { END_TURNS, type EndMove, finishMove, startMove, type Trim, Turned, trimsOf } from './rescue-effects.ts';
import type { Judged, ProofCoil, Rescue, RescueAction } from './schema.ts';

/** Places of end turns that are tried, from one end of their room to the other. */
const SHARES = 20;
/** What each action costs beside another: end turns are the least work, taps and turns the most; those at the start disturb all taps. */
const COST = { turns: 1, finish: 0.8, start: 1.4, tap: 1.2 } as const;
/** A coil that reads so near to whole turns off, in turns, is taken to be. */
const MEANT = 0.3;
const MEANT_COST = 0.5;
/** Beyond this much of the way to a limit, nearer to the middle is worth another bit of work. */
const MIDDLE = 0.5;

/** Where a tap stands, and the factors that bring it within. */
interface Standing {
  readonly index: number;
  readonly percent: number;
  readonly low: number;
  readonly high: number;
  readonly out: boolean;
}

function factorsOf({ quantity, value, low, high }: Judged): { low: number; high: number } {
  if (quantity === 'inductance') return { low: low! / value, high: high! / value };
  return { low: (value / high!) ** 2, high: (value / low!) ** 2 };
}

/** Null without an electrical reading that can be judged. */
function standingOf({ readings }: ProofCoil['taps'][number], index: number): Standing | null {
  const electrical = electricalOf(readings);
  const trusted = electrical.filter((one) => one.trusted);
  const used = trusted.length > 0 ? trusted : electrical;
  const [best] = used;
  if (best === undefined) return null;
  const factors = used.map(factorsOf);
  return {
    index,
    percent: inductanceOff(best)!,
    low: Math.max(...factors.map(({ low }) => low)),
    high: Math.min(...factors.map(({ high }) => high)),
    out: used.some(isOut),
  };
}

/** Actions and the factor of every standing tap. */
interface Plan {
  readonly actions: readonly RescueAction[];
  readonly factors: readonly number[];
  readonly within: number;
  readonly cost: number;
}

const sharesOf = (move: EndMove | null): number[] => {
  if (move === null) return [0];
  const between = Array.from({ length: SHARES + 1 }, (_, i) => move.from + ((move.to - move.from) * i) / SHARES);
  return [0, ...between.filter((share) => Math.abs(share) > 1e-9)];
};

/** How far from the middle of what a tap may become; 1 at its limits. */
function farness({ low, high }: Standing, factor: number): number {
  return Math.abs(factor - (low + high) / 2) / ((high - low) / 2);
}

/** The search over everything that acts on the whole coil, with taps moved where that is still wanted. */
class Search {
  readonly #record: CoilRecord;
  readonly #turned: Turned;
  readonly #standing: readonly Standing[];
  readonly #excessMm: number;
  /** Loose end turns read like a turn too few. */
  readonly #loose: boolean;

  constructor(record: CoilRecord, turned: Turned, standing: readonly Standing[], excessMm: number) {
    this.#excessMm = excessMm;
    this.#loose = excessMm > LOOSE_WIRES * record.windings[0]!.wire.overallMm;
    this.#record = record;
    this.#turned = turned;
    this.#standing = standing;
  }

  best(): Plan {
    const finish = finishMove(this.#record, this.#excessMm);
    const start = startMove(this.#record);
    let best: Plan | null = null;
    for (const trim of trimsOf(this.#record))
      for (const last of sharesOf(finish))
        for (const first of sharesOf(start)) {
          const plan = this.#plan(trim, { move: finish, share: last }, { move: start, share: first });
          if (
            best === null ||
            plan.within > best.within ||
            (plan.within === best.within && plan.cost < best.cost - 1e-9)
          )
            best = plan;
        }
    return best!;
  }

  /** A turn that is too many or missing is mended by that turn, rather than hidden by others pushed about. */
  #turnsWork(by: number): number {
    const last = this.#record.windings[0]!.taps.length - 1;
    const end = this.#standing.find(({ index }) => index === last);
    const off = end === undefined ? 0 : this.#turned.offTurns(last, end.percent);
    return Math.abs(by) * (!this.#loose && Math.abs(off + by) < MEANT ? MEANT_COST : 1);
  }

  #plan(
    trim: Trim,
    finish: { move: EndMove | null; share: number },
    start: { move: EndMove | null; share: number },
  ): Plan {
    const last = this.#record.windings[0]!.taps.length - 1;
    const wire = this.#record.windings[0]!.wire.overallMm;
    const shift = (share: number) => fixed(Math.abs(share) * END_TURNS * wire, 1);
    const [atFinish, atStart] = [finish, start].map(({ move, share }) => (share === 0 ? null : move!.perShare(share)));
    const actions: RescueAction[] = [];
    const act = (kind: RescueAction['kind'], doing: string, rest: Partial<RescueAction>) =>
      actions.push({ kind, doing, tap: null, turns: 0, share: 0, ...rest });
    if (start.share !== 0)
      act('start', RESCUE.doing.start(END_TURNS, shift(start.share)), { share: decimals(start.share, 3) });
    if (trim.by !== 0) act('turns', RESCUE.doing.turns(trim.by, trim.hole), { turns: trim.by });
    if (finish.share !== 0)
      act('finish', RESCUE.doing.finish(END_TURNS, shift(finish.share), finish.share < 0), {
        share: decimals(finish.share, 3),
      });
    let within = 0;
    let cost = actions.reduce(
      (sum, { kind, turns }) => sum + COST[kind] * (kind === 'turns' ? this.#turnsWork(turns) : 1),
      0,
    );
    const factors = this.#standing.map((tap) => {
      const { index, percent } = tap;
      const trimmed = index === last && trim.by !== 0 ? this.#turned.moved(index, percent, trim.by) : 1;
      const before = trimmed * (atFinish?.[index] ?? 1) * (atStart?.[index] ?? 1);
      const far = farness(tap, before);
      const move =
        far <= 1 || tap.low > tap.high
          ? null
          : this.#turned.moveTo(index, percent, { low: tap.low / before, high: tap.high / before });
      const moved = move === null ? before : before * this.#turned.moved(index, percent, move);
      const better = move !== null && farness(tap, moved) < far;
      if (better) {
        act('tap', RESCUE.doing.tap(index + 1, move), { tap: index + 1, turns: decimals(move, 4) });
        cost += COST.tap;
      }
      const factor = better ? moved : before;
      const rest = farness(tap, factor);
      if (tap.low <= tap.high && rest <= 1) within++;
      cost += Math.max(0, Math.min(rest, 2) - MIDDLE);
      return factor;
    });
    return { actions, factors, within, cost };
  }
}

const NOTHING = { actions: [], factors: [], within: 0 };

/** What a failing coil needs; for a coil that does not fail there is nothing to ask. */
export function rescueOf(record: CoilRecord, coil: Omit<ProofCoil, 'rescue'>, turned = new Turned(record)): Rescue {
  const all = coil.taps.map(standingOf);
  const standing = all.filter((one) => one !== null);
  const excess = excessAtFinish(coil.taps);
  const seen: Seen[] = standing.map(({ index, percent, out }) => ({
    index,
    percent,
    out,
    offTurns: turned.offTurns(index, percent),
  }));
  const apart = standing.filter(({ low, high }) => low > high).map(({ index }) => index);
  const failing = standing.filter(({ out }) => out);
  const plan =
    failing.length === 0
      ? { ...NOTHING, factors: standing.map(() => 1), within: standing.length }
      : new Search(record, turned, standing, excess).best();
  const isWithin = (i: number) => {
    const { low, high } = standing[i]!;
    return low <= plan.factors[i]! && plan.factors[i]! <= high;
  };
  const ohmic = coil.taps.filter(({ readings }) => readings.some((one) => one.quantity === 'resistance' && isOut(one)));
  const stays = standing.filter((_, i) => !isWithin(i)).map(({ index }) => index + 1);
  const out = [...new Set([...stays, ...ohmic.map(({ tap }) => tap)])].sort((a, b) => a - b);
  const helped = failing.length - stays.length > 0;
  // What helps no tap is not done.
  const done = out.length === 0 || helped;
  const unread = coil.taps.some(({ state, tap }) => state === 'fail' && all[tap - 1] === null);
  const can = out.length === 0 && !unread ? 'yes' : helped ? 'partly' : 'no';
  const why = RESCUE.why;
  const reasons = [
    ...(failing.length === 0 && out.length === 0 && !unread && standing.length === coil.taps.length
      ? [why.electrical]
      : []),
    ...(unread ? [why.unread] : []),
    ...(coil.taps.some(({ again }) => again) || coil.readings.some(({ verdict }) => verdict === 'implausible')
      ? [why.again]
      : []),
    ...(done && plan.actions.length > 0 ? [why.acts] : []),
    ...(done && plan.actions.some(({ kind, turns }) => kind === 'turns' && turns > 0) && excess === 0
      ? [why.length]
      : []),
    ...(stays.length > 0 && !turned.anyMoves ? [why.held] : []),
    ...(stays.length > 0 && !helped ? [why.nothing] : []),
  ];
  return {
    can,
    causes: causesOf(record, coil.taps, seen, apart),
    actions: done ? [...plan.actions] : [],
    taps: standing.map(({ index, percent, low, high }, i) => {
      const factor = done ? plan.factors[i]! : 1;
      return {
        tap: index + 1,
        beforePercent: decimals(percent, 3),
        afterPercent: decimals(100 * ((1 + percent / 100) * factor - 1), 3),
        within: low <= factor && factor <= high,
      };
    }),
    out,
    why: reasons,
  };
}
