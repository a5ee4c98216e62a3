/**
 * Correction while winding: from lengths of what is wound, where the taps and the finish still to come must go, and what the
 * finished coil will be. The turns are laid and summed by the program's own coil; pure, for the browser as well.
 *
 * What is wound has the pitches that were measured, the turns to come that of the turns wound last. The diameter and the gaps
 * at taps are taken as planned.
 */
import { Coil } from '../coil/coil.ts';
import { angleOf, type Gap } from '../coil/layout.ts';
import { limitsOf } from '../coil/tolerance.ts';
import { coilOf } from '../record/rebuild.ts';
import { ribName } from '../record/rib-name.ts';
import { decimals } from '../record/rounding.ts';
import type { CoilRecord, Tap } from '../record/schema.ts';
import type {
  CorrectedStop,
  Correction,
  Count,
  LengthDoubt,
  LengthMeasure,
  LengthOver,
  Places,
  Placing,
  Stop,
} from './api.ts';
import { type CountedRecord, turnOf } from './counter.ts';
import { laidPlaces, type Pitches, pitchesOf, plannedLengthMm, spanOf } from './pitches.ts';

export type CorrectedRecord = CountedRecord & Pick<CoilRecord, 'former' | 'holes' | 'spread' | 'demand'>;

export interface Wound {
  readonly measures: readonly LengthMeasure[];
  /** As the counter has them: those that are done stay where they are. */
  readonly stops: readonly Stop[];
  readonly count: Count;
}

/** Places on the developed surface that a protractor can set out, a turn. */
const STEPS = 72;
/** So much longer than planned a coil is looked at: a pitch a quarter off asks for a tenth more turns. */
const LONGER = 1.15;
const LONGER_TURNS = 3;
/** Gaps move with the taps, which moves these again: settled after two or three rounds. */
const MOST_ROUNDS = 5;
/** A wire this much of a pitch off a hole, and no more, can still be led into it. */
const BESIDE = 0.75;
/** Taps lie no nearer to one another than this where their steps are finer. */
const APART_TURNS = 0.25;
/** A length off by more than this is of another coil. */
const FAR = 0.15;
/** Hard pulled, wires lie this much nearer than the covering's least diameter says. */
const SQUEEZED = 0.97;

/** A stop on its way through the working out. */
interface Moving {
  readonly stop: Stop;
  readonly plannedTurn: number;
  readonly placing: Placing;
  readonly stepTurns: number | null;
  readonly gapMm: number;
  readonly tap: Tap | null;
  turn: number;
  backTurns: number;
  hole: CorrectedStop['hole'];
}

function placingOf(record: CorrectedRecord, stop: Stop, made: boolean): Pick<Moving, 'placing' | 'stepTurns'> {
  const held = (placing: Placing) => ({ placing, stepTurns: null });
  const steps = (count: number) => ({ placing: 'steps' as const, stepTurns: 1 / count });
  const { former, holes, tapMethod, windings } = record;
  if (made) return held('made');
  if (stop.kind === 'unit' || windings[0]!.pitchKind === 'groove') return held('kept');
  const purpose = stop.kind === 'finish' ? 'finish' : 'tap';
  if (holes.some((hole) => hole.purpose === purpose && (purpose === 'finish' || hole.tap === stop.number)))
    return held('hole');
  const ribs = former.ribs !== null && ribName(former, stop.angleDeg) !== null ? former.ribs.count : null;
  if (stop.kind === 'finish') return steps(ribs ?? STEPS);
  if (tapMethod.layout === 'in line' || former.posts.some(({ tap }) => tap === stop.number)) return steps(1);
  return steps(ribs ?? STEPS);
}

function movingStops(record: CorrectedRecord, { stops, count }: Wound): Moving[] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  return stops.flatMap((stop, i) => {
    if (stop.kind === 'check') return [];
    const tap = stop.kind === 'unit' ? null : (taps.find((one) => one.tap === stop.number) ?? null);
    const of = tap ?? unitTaps.find(({ unit }) => unit === stop.number);
    if (of === undefined) return [];
    const made = i < count.done;
    const { turn: plannedTurn, gapMm } = of;
    const turn = made ? stop.turn : plannedTurn;
    return [{ stop, plannedTurn, ...placingOf(record, stop, made), gapMm, tap, turn, backTurns: 0, hole: null }];
  });
}

const gapsOf = (moving: readonly Moving[]): Gap[] =>
  moving.filter(({ gapMm }) => gapMm > 0).map(({ turn, gapMm }) => ({ turn, gapMm }));

/** The coil with these pitches, so many turns of it. */
function coilWith(record: CorrectedRecord, pitches: Pitches, gaps: readonly Gap[], turns: number): Coil {
  const { shape } = coilOf(record);
  return new Coil({ ...shape, pitchMm: pitches.pitchMm, gaps, turns }, laidPlaces(record, pitches, turns, gaps));
}

/** A place from which the wire would have to be wound back is moved on by whole steps to where the wire is. */
function reachable(turn: number, stepTurns: number, least: number): Pick<Moving, 'turn' | 'backTurns'> {
  if (turn >= least - 1e-9) return { turn, backTurns: 0 };
  return { turn: turn + stepTurns * Math.ceil((least - turn) / stepTurns - 1e-9), backTurns: least - turn };
}

/** The place nearest in inductance among those a step apart. */
function nearestStep(coil: Coil, moving: Moving, targetUh: number, notAbove: boolean): number {
  const step = moving.stepTurns!;
  const ideal = Math.min(coil.turnFor(targetUh), coil.turns);
  // Places of 5 degrees count from the start, as the plan's; whole turns and ribs from the planned place.
  const from = step === 1 / STEPS ? 0 : moving.plannedTurn;
  const below = from + step * Math.floor((ideal - from) / step + 1e-9);
  const off = (turn: number) =>
    turn > 0 && turn <= coil.turns ? Math.abs(coil.inductanceUh(turn) - targetUh) : Number.POSITIVE_INFINITY;
  const above = below + step;
  return (notAbove && below > 0) || off(below) <= off(above) ? below : above;
}

/** The turns beside a hole that was drilled for `turn`, at its angle: one, or two where the hole lies between them. */
function turnsAtHole(coil: Coil, turn: number, axialMm: number): number[] {
  const { pitchMm } = coil.shape;
  const off = (at: number) => Math.abs(axialMm - coil.positionMm(at));
  const nearest = turn + Math.round((axialMm - coil.positionMm(turn)) / pitchMm);
  return [nearest - 1, nearest, nearest + 1].filter(
    (at) => at > 0 && at <= coil.turns && (at === nearest || off(at) <= BESIDE * pitchMm),
  );
}

interface Drilled {
  readonly label: string;
  readonly turn: number;
  readonly axialMm: number;
}

/** Holes of the row that the end can be led in at: it comes out at the next. */
function finishHoles({ holes }: CorrectedRecord): Drilled[] {
  const row = holes
    .flatMap(({ purpose, label, turn, axialMm }) =>
      purpose === 'finish' && turn !== null ? [{ label, turn, axialMm }] : [],
    )
    .sort((a, b) => a.turn - b.turn);
  return row.length > 1 ? row.slice(0, -1) : row;
}

/** The hole of a tap, or the middle of the two of a cut pair. */
function tapHole({ holes }: CorrectedRecord, { stop, plannedTurn }: Moving): Drilled {
  const own = holes.filter(({ purpose, tap }) => purpose === 'tap' && tap === stop.number);
  const axialMm = own.reduce((sum, hole) => sum + hole.axialMm, 0) / own.length;
  return { label: own.map(({ label }) => label).join(', '), turn: plannedTurn, axialMm };
}

function atHole(record: CorrectedRecord, coil: Coil, moving: Moving, least: number): void {
  const usable = moving.stop.kind === 'finish' ? finishHoles(record) : [tapHole(record, moving)];
  const targetUh = moving.tap!.targetUh;
  let best: { off: number; turn: number; backTurns: number; hole: CorrectedStop['hole'] } | null = null;
  for (const { label, turn, axialMm } of usable)
    for (const at of turnsAtHole(coil, turn, axialMm)) {
      const { turn: reached, backTurns } = reachable(at, 1, least);
      if (reached > coil.turns) continue;
      // Only what can be reached is compared, as long as anything can.
      const off = Math.abs(coil.inductanceUh(reached) - targetUh) + (backTurns > 0 ? targetUh : 0);
      const offMm = axialMm - coil.positionMm(reached);
      if (best === null || off < best.off) best = { off, turn: reached, backTurns, hole: { label, offMm } };
    }
  if (best === null) return;
  moving.turn = best.turn;
  moving.backTurns = best.backTurns;
  moving.hole = best.hole;
}

/** Places every stop to come on a coil long enough; whether any moved. */
function place(record: CorrectedRecord, coil: Coil, moving: readonly Moving[], wound: number): boolean {
  let moved = false;
  let previous = 0;
  for (const one of moving) {
    const before = one.turn;
    const step = one.stepTurns ?? 1;
    const least = Math.max(wound, previous === 0 ? 0 : previous + Math.min(step, APART_TURNS));
    if (one.placing === 'hole') atHole(record, coil, one, least);
    else if (one.placing === 'steps') {
      const notAbove = record.demand.kind === 'band' && one.stop.number === 1;
      Object.assign(one, reachable(nearestStep(coil, one, one.tap!.targetUh, notAbove), step, least));
    }
    one.turn = decimals(one.turn, 6);
    if (Math.abs(one.turn - before) > 1e-9) moved = true;
    previous = one.turn;
  }
  return moved;
}

/** What a length does not go together with, and how many turns it is off by. */
function judged(record: CorrectedRecord, gaps: readonly Gap[], measure: LengthMeasure) {
  const { pitchMm, pitchKind, wire } = record.windings[0]!;
  const plannedMm = plannedLengthMm(record, gaps, measure);
  const [from, to] = spanOf(measure);
  const turns = Math.max(to - from, 1e-9);
  const offMm = measure.lengthMm - plannedMm;
  const offTurns = offMm / pitchMm;
  const usual = Math.hypot(measure.halfMm, record.spread.pitch * pitchMm * turns, 0.05 * wire.overallMm);
  let doubt: LengthDoubt | null = null;
  if (pitchKind === 'groove') doubt = Math.abs(offTurns) > 0.5 ? 'groove' : null;
  else if (Math.abs(offMm) > 2 * usual && Math.abs(Math.abs(offMm) - pitchMm) <= usual) doubt = 'a turn';
  else if (measure.lengthMm - wire.overallMm + measure.halfMm < SQUEEZED * wire.overallLowMm * turns)
    doubt = 'too short';
  else if (Math.abs(offMm) > FAR * plannedMm) doubt = offMm > 0 ? 'too long' : 'too short';
  return { measure, plannedMm, doubt, offTurns };
}

/** Length that is planned for a turn and a way of measuring, mm. */
export function plannedMm(record: CorrectedRecord, turn: number, over: LengthOver): number {
  return plannedLengthMm(record, coilOf(record).shape.gaps, { turn, over });
}

/** Whether a length may be taken at this turn: along a line away from the start it takes whole turns, two at least. */
export const measurable = (turn: number, over: LengthOver): boolean =>
  over === 'extent' ? turn >= 1 : turn >= 2 && Math.abs(turn - Math.round(turn)) < 1e-6;

function correctedStop(
  record: CorrectedRecord,
  one: Moving,
  before: number,
  coils: { readonly coil: Coil; readonly long: Coil },
  limits: { readonly lowUh: number; readonly highUh: number },
): CorrectedStop {
  const { stop, turn, tap } = one;
  const inductanceUh = coils.coil.inductanceUh(turn);
  const targetUh = tap?.targetUh ?? null;
  return {
    key: stop.key,
    kind: stop.kind,
    number: stop.number,
    placing: one.placing,
    plannedTurn: one.plannedTurn,
    turn,
    stepTurns: one.stepTurns,
    angleDeg: angleOf(turn, record.frame.hand),
    positionMm: coils.coil.positionMm(turn),
    wireM: coils.coil.wireM(turn) + record.tapMethod.loopM * before,
    targetUh,
    inductanceUh,
    deviationPercent: targetUh === null ? null : 100 * (inductanceUh / targetUh - 1),
    ...limits,
    plannedUh: coils.long.inductanceUh(Math.min(one.plannedTurn, coils.long.turns)),
    idealTurn: targetUh === null ? null : coils.long.turnFor(targetUh),
    hole: one.hole,
    backTurns: one.backTurns,
  };
}

/** The coil as it comes out when the taps and the finish still to come go where they then belong. */
export function correct(record: CorrectedRecord, wound: Wound): Correction {
  const winding = record.windings[0]!;
  const { former } = record;
  const moving = movingStops(record, wound);
  const pitches = pitchesOf(record, wound.measures, gapsOf(moving));
  const longTurns = Math.ceil(winding.turns * LONGER) + LONGER_TURNS;
  const reached = turnOf(wound.stops, wound.count);
  const longWith = () => coilWith(record, pitches, gapsOf(moving), longTurns);
  let long = longWith();
  for (let round = 0; round < MOST_ROUNDS && place(record, long, moving, reached); round++) long = longWith();
  const turns = moving.at(-1)?.turn ?? winding.turns;
  const coil = coilWith(record, pitches, gapsOf(moving), turns);
  const pitch = pitches.halfMm / pitches.pitchMm;
  const limits = limitsOf(
    coil,
    moving.map(({ turn }) => turn),
    { ...record.spread, pitch },
  );
  const stops = moving.map((one, i) => correctedStop(record, one, i, { coil, long }, limits[i]!));
  const room = former.lengthMm - former.topMm;
  const gaps = gapsOf(moving);
  return {
    pitchKind: winding.pitchKind,
    plannedPitchMm: winding.pitchMm,
    pitchMm: pitches.pitchMm,
    pitchHalfMm: pitches.halfMm,
    pieces: pitches.pieces,
    lengths: wound.measures.map((measure) => judged(record, gaps, measure)),
    stops,
    turns,
    windingLengthMm: coil.woundMm(turns),
    wireLengthM: stops.at(-1)?.wireM ?? winding.wireLengthM,
    lacksMm: Math.max(0, coil.positionMm(turns) + winding.wire.overallMm / 2 - room),
  };
}

/** Wires that lie so near to their planned place, mm, lie there. */
const SAME_MM = 1e-3;

/** Where the counter is to stop from now on, and where stops that are made really lie: all that are not as planned. */
export function placesOf(record: Pick<CoilRecord, 'windings'>, { stops }: Pick<Correction, 'stops'>): Places {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const plannedMm = ({ kind, number }: CorrectedStop) =>
    (kind === 'unit' ? unitTaps.find(({ unit }) => unit === number) : taps.find(({ tap }) => tap === number))
      ?.positionMm;
  const moved = stops.filter(
    (stop) =>
      Math.abs(stop.turn - stop.plannedTurn) > 1e-9 ||
      Math.abs(stop.positionMm - (plannedMm(stop) ?? stop.positionMm)) > SAME_MM,
  );
  return Object.fromEntries(moved.map(({ key, turn, positionMm }) => [key, { turn, positionMm }]));
}
