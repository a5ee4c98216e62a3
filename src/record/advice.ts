/** What can be done to a coil that reads high or low, worked out for this coil by the ring sum: as a whole, and section by section. */
import { CORRECTION } from '../../templates/wording/steps.ts';
import { Coil } from '../coil/coil.ts';
import type { Job } from '../job/job.ts';
import { lengthText } from '../quantity/written.ts';
import type { Design } from '../solve/design.ts';
import type { AdviceTap, Correction } from './advice-schema.ts';
import type { Measuring } from './meter-schema.ts';
import { decimals, significant } from './rounding.ts';

/** End turns that are spread or pressed together. */
const MOVED_TURNS = 5;
/** Turns off or on at the finish that are looked at, each way. */
const MOST_TRIMMED = 2;
/** A coil of fewer turns than this has no end turns to move. */
const LEAST_TURNS = 2 * MOVED_TURNS;
/** Half of the stretch, in turns, over which the slope at a tap is taken. */
const SLOPE_TURNS = 0.25;

const percent = (share: number) => decimals(100 * share, 2);

/** The coil with a gap added after each of so many turns from `from` on; below 0 they are pressed. */
function moved(coil: Coil, from: number, gapMm: number): Coil {
  const gaps = Array.from({ length: MOVED_TURNS }, (_, i) => ({ turn: from + i, gapMm }));
  return coil.changed({ gaps: [...coil.shape.gaps, ...gaps] });
}

interface Action {
  readonly doing: string;
  readonly kind: Correction['kind'];
  /** A coil so changed, and how many turns of it there are. */
  readonly coil: Coil;
  readonly turns: number;
}

/** Turns off and on at the finish: into the holes of the finish row, where each lies, or anywhere when there is no row. */
function trims({ coil, holes }: Design): Action[] {
  const rowed = holes.some(({ label }) => label === 'F-1' || label === 'F+1');
  const turnOf = (by: number): { label: string | null; turn: number } | null => {
    if (!rowed) return { label: null, turn: coil.turns + by };
    const label = by < 0 ? `F${by}` : `F+${by}`;
    const turn = holes.find((hole) => hole.label === label)?.turn ?? null;
    return turn === null ? null : { label, turn };
  };
  const longer = new Coil({ ...coil.shape, turns: Math.ceil(coil.turns) + MOST_TRIMMED + 1 });
  const actions: Action[] = [];
  for (let by = -MOST_TRIMMED; by <= MOST_TRIMMED; by++) {
    const place = by === 0 ? null : turnOf(by);
    if (place === null || place.turn < 1) continue;
    const { label, turn } = place;
    const doing = CORRECTION.turns(by, label);
    actions.push({ doing, kind: 'trim', coil: by < 0 ? coil : longer, turns: turn });
  }
  return actions;
}

function actionsOf(design: Design, units: Job['units']): Action[] {
  const { coil, candidate } = design;
  const { turns, shape } = coil;
  const actions = trims(design);
  const add = (doing: string, kind: Action['kind'], other: Coil) => actions.push({ doing, kind, coil: other, turns });
  if (turns > LEAST_TURNS && candidate.pitch.kind !== 'groove') {
    const wire = shape.wire.overallMm;
    const last = Math.floor(turns) - MOVED_TURNS;
    add(CORRECTION.spreadFinish(MOVED_TURNS), 'trim', moved(coil, last, wire));
    if (candidate.pitch.kind === 'spacer')
      add(CORRECTION.pressFinish(MOVED_TURNS), 'trim', moved(coil, last, -candidate.pitch.spacerMm / 2));
    add(CORRECTION.spreadStart(MOVED_TURNS), 'start', moved(coil, 1, wire));
  }
  if (candidate.pitch.kind !== 'groove')
    add(CORRECTION.wider, 'next coil', coil.changed({ pitchMm: shape.pitchMm * 1.01 }));
  add(
    CORRECTION.thicker(lengthText(0.1, units, { digits: 1 })),
    'next coil',
    coil.changed({ meanDiameterMm: shape.meanDiameterMm + 0.1 }),
  );
  return actions;
}

/**
 * What each trim is for: readings that it brings nearer to nominal than leaving the coil or any other trim does. A coil that
 * reads (1 + d) of nominal comes to (1 + d)(1 + e), so at the border between two (1 + d)(2 + e + e') = 2. Readings
 * within the limits are left alone; a trim whose readings all lie there has none.
 */
function windowsOf(
  effects: readonly number[],
  whole: Measuring['meter'][number],
): readonly { fromUh: number | null; toUh: number | null }[] {
  const { readingUh, lowUh, highUh, doubt } = whole;
  if (doubt !== null || readingUh === null || lowUh === null || highUh === null)
    return effects.map(() => ({ fromUh: null, toUh: null }));
  const all = [0, ...effects].sort((a, b) => a - b);
  const none = { fromUh: null, toUh: null };
  return effects.map((effect) => {
    const at = all.indexOf(effect);
    const border = (other: number | undefined) => (other === undefined ? null : (2 * readingUh) / (2 + effect + other));
    const [low, high] = [border(all[at + 1]), border(all[at - 1])];
    const from = effect < 0 ? Math.max(low ?? 0, highUh) : low;
    const to = effect > 0 ? Math.min(high ?? Number.POSITIVE_INFINITY, lowUh) : high;
    if (from !== null && to !== null && from >= to) return none;
    return { fromUh: from === null ? null : significant(from), toUh: to === null ? null : significant(to) };
  });
}

/** What can be done to the coil as a whole, and what that does to every tap. */
export function correctionsOf(design: Design, measuring: Pick<Measuring, 'meter'>, units: Job['units']): Correction[] {
  const { coil, taps } = design;
  const actions = actionsOf(design, units).map((action) => ({
    ...action,
    effects: taps.map(({ turn }, i) => {
      const last = i === taps.length - 1;
      return action.coil.inductanceUh(last ? action.turns : turn) / coil.inductanceUh(turn) - 1;
    }),
  }));
  const trimming = actions.filter(({ kind }) => kind === 'trim');
  const windows = windowsOf(
    trimming.map(({ effects }) => effects.at(-1)!),
    measuring.meter.at(-1)!,
  );
  return actions.map((action) => {
    const window = windows[trimming.indexOf(action)] ?? { fromUh: null, toUh: null };
    return { doing: action.doing, kind: action.kind, tapsPercent: action.effects.map(percent), ...window };
  });
}

/** The coil with the turns from..to wound this much longer all along, what follows pushed on. */
function lengthened(coil: Coil, from: number, to: number, mm: number): Coil {
  const whole = Math.floor(coil.turns + 1e-9);
  return new Coil(
    coil.shape,
    coil.places.map((place, i) => {
      const u = i < whole ? i + 0.5 : (whole + coil.turns) / 2;
      return place + mm * Math.min(1, Math.max(0, (u - from) / (to - from)));
    }),
  );
}

/**
 * Section by section: what a turn too few or too many before a tap, and a millimetre more of length of the section that
 * ends there, do to it; and how far along the wire it moves for a percent. A reading beyond half a turn is nearer to a
 * miscount than to what was meant.
 */
export function adviceOf(
  { coil, taps }: Pick<Design, 'coil' | 'taps'>,
  measuring: Pick<Measuring, 'meter'>,
): AdviceTap[] {
  const more = new Coil({ ...coil.shape, turns: coil.turns + 1 });
  return taps.map(({ turn }, i) => {
    const nominal = coil.inductanceUh(turn);
    const by = (uh: number) => uh / nominal - 1;
    const many = by((turn + 1 > coil.turns ? more : coil).inductanceUh(turn + 1));
    const few = turn > 1 ? by(coil.inductanceUh(turn - 1)) : -1;
    const back = Math.min(SLOPE_TURNS, turn / 2);
    const on = Math.min(SLOPE_TURNS, coil.turns - turn);
    const slope = (coil.inductanceUh(turn + on) - coil.inductanceUh(turn - back)) / (on + back);
    const longer = lengthened(coil, taps[i - 1]?.turn ?? 0, turn, 1);
    const { readingUh, doubt } = measuring.meter[i]!;
    const reading = doubt === null ? readingUh : null;
    return {
      tap: i + 1,
      fewPercent: percent(few),
      manyPercent: percent(many),
      fewUh: reading === null ? null : significant(reading * (1 + few / 2)),
      manyUh: reading === null ? null : significant(reading * (1 + many / 2)),
      millimetrePercent: percent(by(longer.inductanceUh(turn))),
      degreesPerPercent: decimals((3.6 * nominal) / slope, 1),
    };
  });
}
