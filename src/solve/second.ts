/**
 * The second winding of a job on the coil that was found for it: wire, turns, place, what it is wound on, its holes, and how far it slides.
 * On the main former that becomes longer; where the job's longest does not allow that, a shorter coil is looked for.
 */
import type { Coil } from '../coil/coil.ts';
import { CoilPair } from '../coil/pair.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import { Fault } from '../fault.ts';
import { type JobSecond, slides } from '../job/around/second.ts';
import type { Job } from '../job/job.ts';
import { inductanceText, lengthText, tidy } from '../quantity/format.ts';
import type { SecondEntry } from '../record/around-schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Wire } from '../stock/wire.ts';
import { closePitch } from './candidates.ts';
import type { Design } from './design.ts';
import { workingCoilOf } from './refine.ts';
import { type Found, search } from './search.ts';
import { chooseSecond, MET, type Unreached } from './second/choose.ts';
import { asWallHoles, awayFrom, holesAmong, holesAt } from './second/holes.ts';
import { lengthened } from './second/longer.ts';
import { edgesOf, standingOut } from './second/main-coil.ts';
import { holeSpanMm, type NoRoom, type Room, roomFor } from './second/room.ts';
import { type Mark, scaleOf } from './second/scale.ts';
import { SecondTurns } from './second/turns.ts';

export interface SecondDesign {
  readonly wish: JobSecond;
  readonly wire: Wire;
  /** Of what is wound along between its turns, mm; 0 when wound close. */
  readonly spacerMm: number;
  /** At the tightest place. */
  readonly coil: Coil;
  readonly pair: CoilPair;
  /** Reached with the whole main coil, low frequency. */
  readonly coupling: number;
  readonly slide: { readonly travelMm: number; readonly scale: readonly Mark[] } | null;
  readonly body: SecondEntry['body'];
  readonly holes: SecondEntry['holes'];
  /** Edge to edge of both windings along the axis; below 0 where they lie over one another. */
  readonly distanceMm: number;
  readonly why: string;
  readonly warnings: CoilRecord['warnings'];
}

const round = (mm: number) => Math.round(mm * 1e3) / 1e3;
/** So many times a shorter coil is looked for, each as much shorter as the one before was too long. */
const SHORTER = 3;
/** Thinner a spacer between turns is none. */
const LEAST_SPACER_MM = 0.05;

function fault(job: Job, key: string, code: string, got: string, expected: string, todo: string): Fault {
  const { file, lines } = job.source;
  const dotted = key === '' ? 'second' : `second.${key}`;
  const line = lines[dotted] ?? Object.entries(lines).find(([name]) => name.startsWith('second.'))?.[1];
  return new Fault(4, { code, place: { file, line, key: dotted }, got, expected, todo });
}

/** Wire and pitch; both may be the job's. */
function woundWith(job: Job, design: Design, second: JobSecond): { wire: Wire; pitchMm: number; spacerMm: number } {
  const wire = second.wire ?? design.candidate.wire;
  if (second.pitch === 'close') {
    if (wire.covering === 'bare')
      throw fault(
        job,
        'wire',
        'second-bare',
        `${wire.name} as in the main winding, wound close`,
        'a covered wire, or turns that do not touch',
        'state second.wire, or second.pitch',
      );
    return { wire, pitchMm: closePitch(wire).mm * (1 + job.asMade.pitch), spacerMm: 0 };
  }
  if (second.pitch < wire.overallMm)
    throw fault(
      job,
      'pitch',
      'second-pitch',
      `a pitch of ${lengthText(second.pitch, 3)} for ${wire.name}, ${lengthText(wire.overallMm, 3)} thick`,
      `${lengthText(wire.overallMm, 3)} or more`,
      'widen second.pitch, or state a thinner second.wire',
    );
  const spacerMm = second.pitch - wire.overallMm;
  return {
    wire,
    pitchMm: second.pitch * (1 + job.asMade.pitch),
    spacerMm: spacerMm < LEAST_SPACER_MM ? 0 : round(spacerMm),
  };
}

/** Rounded to three figures towards what can be had. */
const inwards = (value: number, towards: 'down' | 'up') => {
  const unit = 10 ** (Math.floor(Math.log10(value)) - 2);
  return tidy((towards === 'down' ? Math.floor(value / unit) : Math.ceil(value / unit)) * unit, 3);
};

function noRoom(job: Job, { why, got, expected }: NoRoom): Fault {
  const code = { taps: 'second-taps', bore: 'second-bore', distance: 'second-distance' }[why];
  const todo = {
    taps: 'take second.end: finish, second.kind: same former or inner, or winding.tap-method: drawn in, which leaves nothing outside',
    bore: 'take second.kind: sleeve, a thinner second.wire, or a wider former.outside-diameter',
    distance: 'widen second.distance, or leave it out for the least',
  }[why];
  return fault(job, why === 'distance' ? 'distance' : 'kind', code, got, expected, todo);
}

/** The coupling cannot be had: what can, and which key would do. */
function unreachable(job: Job, design: Design, second: JobSecond, found: Unreached): Fault {
  const { leastCoupling, mostCoupling, fromTurns, toTurns } = found;
  const { lowest, highest } = second.coupling!;
  const [least, most] = [inwards(leastCoupling, 'up'), inwards(mostCoupling, 'down')];
  const turns = fromTurns === toTurns ? `${fromTurns} turns` : `${fromTurns} to ${toTurns} turns`;
  const tight = highest > mostCoupling;
  const todo: string[] = [];
  if (second.distanceMm !== null) todo.push('leave second.distance out, so that the place gives the coupling');
  else if (tight) {
    todo.push(`ask for ${most} or less`);
    if (second.turns !== null || second.inductanceUh !== null)
      todo.push(`leave second.${second.turns !== null ? 'turns' : 'inductance'} out: more turns couple tighter`);
    if (second.kind === 'same former' || second.kind === 'beside') todo.push('take second.kind: sleeve or inner');
    else if (second.kind === 'inner') todo.push('take second.kind: sleeve, which lies nearer');
    else if (standingOut(design) !== null)
      todo.push('take winding.tap-method: drawn in, so that the sleeve may lie over the taps');
  } else {
    todo.push(`ask for ${least} or more`);
    todo.push(second.end === 'start' ? 'take second.end: finish' : 'take second.kind: beside');
  }
  const asked = lowest === highest ? `a coupling of ${lowest}` : `couplings from ${lowest} to ${highest}`;
  const where = second.kind === 'same former' ? 'on the former of the main winding' : `with kind: ${second.kind}`;
  return fault(
    job,
    'coupling',
    'second-coupling',
    asked,
    `${least} to ${most}, which ${turns} can have ${where} towards the ${second.end}`,
    todo.join(', or '),
  );
}

interface Placed {
  readonly design: Design;
  readonly second: SecondDesign;
}

/** What stands in the way on the main former: it would be too long by so much. */
interface TooLong {
  readonly overMm: number;
  readonly lengthMm: number;
  readonly why: string;
}

function place(job: Job, design: Design, wish: JobSecond): Placed | TooLong {
  const { wire, pitchMm, spacerMm } = woundWith(job, design, wish);
  const room = roomFor(job, design, wish, wire, pitchMm);
  if ('why' in room) throw noRoom(job, room);
  const main = design.working ?? workingCoilOf(job, design);
  const turns = new SecondTurns(main, { wire, pitchMm, meanDiameterMm: room.meanDiameterMm });
  const edges = edgesOf(design);
  const choice = chooseSecond(turns, room, wish, design.coil.turns, edges.highMm - edges.lowMm);
  if (choice === 'no room') throw tooShort(job, design, wish, room, pitchMm);
  if ('leastCoupling' in choice) throw unreachable(job, design, wish, choice);
  const { turns: n, startMm, looseMm } = choice;
  const span = room.bodySpan(n, startMm, looseMm);
  const places = {
    startMm,
    finishMm: startMm + holeSpanMm(n, pitchMm, wire.overallMm),
    meanDiameterMm: room.meanDiameterMm,
    wireMm: wire.overallMm,
    hand: job.winding.hand,
  };
  const finishDeg = design.holes.find(({ label }) => label === 'F')?.angleDeg ?? 0;
  const holes =
    wish.kind === 'same former'
      ? holesAmong(places, design.holes, design.former.boreDiameterMm)
      : holesAt(places, wish.kind === 'beside' ? 0 : awayFrom([0, finishDeg]));
  const longer =
    wish.kind === 'same former' ? lengthened(job, design, span, room.way, asWallHoles(holes)) : { design, shiftMm: 0 };
  if ('overMm' in longer) return longer;
  const shift = longer.shiftMm;
  const working: WorkingCoil = longer.design === design ? main : workingCoilOf(job, longer.design);
  const coil = turns.coil(n, startMm + shift);
  const pair = new CoilPair(working, coil);
  const coupling = pair.coupling();
  const slide = slides(wish)
    ? {
        travelMm: round(looseMm - startMm),
        scale: scaleOf(wish.coupling!.lowest, wish.coupling!.highest, (k) =>
          k >= wish.coupling!.highest
            ? 0
            : k <= wish.coupling!.lowest
              ? Math.abs(looseMm - startMm)
              : Math.abs(turns.placeFor(n, k, startMm, looseMm) - startMm),
        ).map(({ mm, coupling: k }) => ({ mm: round(mm), coupling: k })),
      }
    : null;
  const half = wire.overallMm / 2;
  const distanceMm = Math.max(
    coil.positionMm(0) - half - (edges.highMm + shift),
    edges.lowMm + shift - (coil.positionMm(n) + half),
  );
  const second: SecondDesign = {
    wish,
    wire,
    spacerMm,
    coil,
    pair,
    coupling,
    slide,
    body:
      room.body === null
        ? null
        : {
            insideDiameterMm: room.body.insideMm,
            outsideDiameterMm: room.body.outsideMm,
            lengthMm: round(span.highMm - span.lowMm),
            lowMm: round(span.lowMm),
          },
    holes: holes.map((hole) => ({ ...hole, axialMm: hole.axialMm + shift })),
    distanceMm,
    why: whyOf(design, wish, n, coupling),
    warnings: warningsOf(wish, turns, pair, coupling),
  };
  return { design: longer.design, second };
}

/** Not so much as one winding of these turns has room. */
function tooShort(job: Job, design: Design, wish: JobSecond, room: Room, pitchMm: number): Fault {
  const n = wish.turns ?? 1;
  const need = n * pitchMm + 2 * room.marginMm;
  const { lowMm, highMm } = room.bounds(0);
  const have = highMm - lowMm + 2 * room.marginMm;
  return fault(
    job,
    'kind',
    'second-room',
    `${lengthText(Math.max(0, have), 1)} of the winding ${standingOut(design) === null ? 'that it can reach' : 'without a tap that stands out'}, for a ${wish.kind} of ${n} ${n === 1 ? 'turn' : 'turns'} ${lengthText(need, 1)} long`,
    `${lengthText(need, 1)} or more`,
    `take fewer turns, second.end: ${wish.end === 'start' ? 'finish' : 'start'}, or another second.kind`,
  );
}

function whyOf(design: Design, wish: JobSecond, n: number, coupling: number): string {
  const given = wish.turns !== null ? 'turns as given' : wish.inductanceUh !== null ? 'turns by the inductance' : null;
  const turns =
    given ??
    (wish.distanceMm !== null
      ? 'the turns that come nearest at this distance'
      : `the fewest turns from a tenth of the main coil’s ${tidy(design.coil.turns, 3)} on that reach it`);
  const where = {
    'same former': `on the main former, beyond the ${wish.end}, where it is made longer for it`,
    beside: `on a former of its own beyond the ${wish.end}`,
    sleeve:
      standingOut(design) === null
        ? 'on a sleeve over the main winding, whose taps all go inside'
        : `on a sleeve that stays clear of the taps, which stand out`,
    inner: 'on a smaller former in the bore, clear of what taps leave there',
  }[wish.kind];
  const asked = wish.coupling === null ? `coupling ${tidy(coupling, 3)} follows` : 'the place gives the coupling';
  return `${n} turns (${turns}) ${where}; ${asked}`;
}

/** With the lowest position it should couple by this share of what it does with the whole coil. */
const LOOSE_SHARE = 0.2;
/** Further off than this from the inductance asked for is said. */
const UH_OFF = 0.02;

function warningsOf(wish: JobSecond, turns: SecondTurns, pair: CoilPair, coupling: number): CoilRecord['warnings'] {
  const n = pair.second.turns;
  const list: CoilRecord['warnings'] = [];
  const wanted = wish.coupling?.highest ?? null;
  if (wanted !== null && Math.abs(coupling / wanted - 1) > MET)
    list.push({
      code: 'second-nearest',
      text: `The second winding couples by ${tidy(coupling, 3)} with ${n} turns, not ${wanted}: at the distance that is asked for whole turns come no nearer.`,
    });
  const uh = turns.inductanceUh(n);
  if (wish.inductanceUh !== null && Math.abs(uh / wish.inductanceUh - 1) > UH_OFF)
    list.push({
      code: 'second-inductance',
      text: `The second winding has ${inductanceText(uh)} with ${n} whole turns, not ${inductanceText(wish.inductanceUh)}.`,
    });
  const lowest = pair.coupling(pair.main.taps[0]);
  if (lowest < LOOSE_SHARE * coupling)
    list.push({
      code: 'second-loose-tap',
      text: `The second winding lies at the end whose turns the lower positions leave out: with position 1 it couples by ${tidy(lowest, 2)} only, with the whole coil by ${tidy(coupling, 2)}. Towards the start all positions would couple.`,
    });
  return list;
}

/**
 * What was found, with the second winding of the job on it; as it is where the job has none. `again` is how a coil that is shorter is
 * found; without it the coil stays as it is.
 * @throws Fault (exit 4) for a second winding that cannot be
 */
export function withSecond(job: Job, found: Found, again: ((job: Job) => Found | null) | null = searchAgain): Found {
  const wish = job.second;
  if (wish === null) return found;
  const first = place(job, found.chosen, wish);
  if ('second' in first) return { ...found, chosen: first.design, second: first.second };
  let { longestMm } = job.former;
  let overMm = first.overMm;
  for (let round = 0; again !== null && round < SHORTER; round++) {
    longestMm -= Math.ceil(overMm);
    const shorter = longestMm > 0 ? again({ ...job, former: { ...job.former, longestMm } }) : null;
    if (shorter === null) break;
    const placed = placedOrNot(job, shorter.chosen, wish);
    if (placed === null) break;
    if ('second' in placed) return { ...shorter, chosen: placed.design, second: placed.second };
    overMm = placed.overMm;
  }
  const { lengthMm, why } = first;
  throw fault(
    job,
    'kind',
    'second-length',
    `a former ${lengthText(lengthMm, 1)} long with the second winding beyond the ${wish.end}, ${lengthText(first.overMm, 1)} too long: ${why}`,
    `${lengthText(Math.max(0, lengthMm - first.overMm), 1)} or less`,
    `raise former.longest to ${lengthText(Math.ceil(lengthMm), 0)}, take a tighter second.coupling, fewer second.turns, or second.kind: sleeve, inner or beside`,
  );
}

/** Null on a coil that cannot have it at all. */
function placedOrNot(job: Job, design: Design, wish: JobSecond): Placed | TooLong | null {
  try {
    return place(job, design, wish);
  } catch (error) {
    if (error instanceof Fault) return null;
    throw error;
  }
}

function searchAgain(job: Job): Found | null {
  const found = search(job);
  return 'chosen' in found ? found : null;
}
