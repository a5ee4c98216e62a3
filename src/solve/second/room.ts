/**
 * Where a second winding may lie, by its kind.
 *
 * same former: beyond an end of the main winding, clear of its holes; the former is made longer by as much. beside: on a former of
 * its own as wide as the main one, butted against its end or farther off.
 *
 * sleeve: a tube over the main winding. Nothing passes over a tap that stands out of the winding (a twisted loop, a lifted turn, a
 * lug with its lead), and what is soldered there cannot be laid flat; so a sleeve lies, and comes on, where there are none: over the
 * upper rim down to the last such tap, or over the lower end up to the first where no foot is in the way. Taps that go inside leave
 * the whole length. It clears an end of either winding laid flat under it, and every rim that it passes.
 *
 * inner: a tube in the bore, clear of what taps leave there.
 *
 * A sleeve or inner tube whose winding lies beyond the end of the former is as much longer as keeps it guided by a centimetre. One
 * that slides stands out of the former at every place, so that a carriage can hold it there and its scale can be read.
 */
import { type JobSecond, slides } from '../../job/around/second.ts';
import type { Job } from '../../job/job.ts';
import { DISC_MM, STANDS_OUT_MM } from '../../parts/carriage-dimensions.ts';
import type { Wire } from '../../stock/wire.ts';
import type { Design } from '../design.ts';
import { WEB_MM, wireHoleMm } from '../tap-methods.ts';
import { edgesOf, footOf, freeBoreMm, reachOf, standingOut } from './main-coil.ts';

/** Of a tube on the former, or in it, at its loosest place. */
const GUIDE_MM = 10;
/** Farther from the end of the main former a second winding is not looked for. */
const MOST_OFF_MM = 200;
/** Between a winding and the holes of the other. */
const CLEAR_MM = 0.5;
/** Printed lines in the wall of a sleeve or an inner tube, and of a former that stands beside. */
const LINES = { tube: 3, beside: 4 };
/** Narrower inside than this an inner tube is not made. */
const LEAST_INSIDE_MM = 5;

export interface Spread {
  readonly lowMm: number;
  readonly highMm: number;
}

export interface Room {
  readonly meanDiameterMm: number;
  /** Diameters of what it is wound on; null on the former of the main coil. */
  readonly body: { readonly insideMm: number; readonly outsideMm: number } | null;
  /** From the wire's centre at its start or finish to the edge of what it is wound on, holes included. */
  readonly marginMm: number;
  /** Towards the looser places: up or down. */
  readonly way: 1 | -1;
  /** Z of the start hole for so many turns; `lowMm` above `highMm` where there is no room. */
  bounds(turns: number): Spread;
  /** The loosest place to which it slides from a tightest one. */
  farthestMm(turns: number, tightMm: number): number;
  /** What it is wound on, where it lies between these two. */
  bodySpan(turns: number, tightMm: number, looseMm: number): Spread;
}

/** Why there is no room whatever the turns. */
export interface NoRoom {
  readonly why: 'taps' | 'bore' | 'distance';
  readonly got: string;
  readonly expected: string;
}

/** Edge to edge from the main winding, the least that holes and ends leave: on the main former, or beside it. */
export function leastDistanceMm(
  design: Design,
  kind: 'same former' | 'beside',
  end: JobSecond['end'],
  marginMm: number,
  wireMm: number,
): number {
  const edges = edgesOf(design);
  const own = marginMm - wireMm / 2;
  if (kind === 'beside') return own + (end === 'finish' ? design.former.lengthMm - edges.highMm : edges.lowMm);
  const reach = reachOf(design);
  const others = end === 'finish' ? reach.highMm - edges.highMm : edges.lowMm - reach.lowMm;
  return Math.ceil((others + own + CLEAR_MM) * 10) / 10;
}

/** Distance along the axis of the hole that ties an end from the one it comes out at. */
export const tieMm = (wireMm: number): number => wireHoleMm(wireMm, 1) + 1.2;

/** Along the axis from the hole of the start to that of the finish: of so few turns that the two would meet, as much as keeps them apart. */
export function holeSpanMm(turns: number, pitchMm: number, wireMm: number): number {
  const hole = wireHoleMm(wireMm, 1);
  return Math.max(turns * pitchMm, hole / 2 + hole * Math.SQRT1_2 + WEB_MM);
}

const mm = (value: number) => `${Number(value.toFixed(2))} mm`;

export function roomFor(job: Job, design: Design, second: JobSecond, wire: Wire, pitchMm: number): Room | NoRoom {
  const { former, coil } = design;
  const { kind, end } = second;
  const w = wire.overallMm;
  const hole = wireHoleMm(w, 1);
  const marginMm = Math.ceil((tieMm(w) + hole * Math.SQRT1_2 + WEB_MM) * 10) / 10;
  const way = end === 'finish' ? 1 : -1;
  const made = job.asMade.diameterMm;
  const line = job.printer.lineMm;
  const edges = edgesOf(design);
  const spanMm = (turns: number) => holeSpanMm(turns, pitchMm, w);

  if (kind === 'same former' || kind === 'beside') {
    const least = leastDistanceMm(design, kind, end, marginMm, w);
    const stated = second.distanceMm;
    if (stated !== null && stated < least - 1e-9)
      return {
        why: 'distance',
        got: `a distance of ${mm(stated)}`,
        expected: `${mm(least)} or more: ${kind === 'beside' ? 'the ends of both formers' : 'the holes of both windings'} lie between`,
      };
    const bounds = (turns: number): Spread => {
      const [from, to] = [stated ?? least, stated ?? MOST_OFF_MM];
      if (way > 0) return { lowMm: edges.highMm + from + w / 2, highMm: edges.highMm + to + w / 2 };
      const top = (d: number) => edges.lowMm - d - w / 2 - spanMm(turns);
      return { lowMm: top(to), highMm: top(from) };
    };
    const outsideMm = former.outsideDiameterMm;
    const insideMm = outsideMm - 2 * (former.kind === 'printed' ? former.wallMm : LINES.beside * line);
    return {
      meanDiameterMm: outsideMm + w + made,
      body: kind === 'beside' ? { insideMm, outsideMm } : null,
      marginMm,
      way,
      bounds,
      farthestMm: (turns) => (way > 0 ? bounds(turns).highMm : bounds(turns).lowMm),
      bodySpan: (turns, tight) => ({ lowMm: tight - marginMm, highMm: tight + spanMm(turns) + marginMm }),
    };
  }

  const taps = kind === 'sleeve' ? standingOut(design) : null;
  const foot = footOf(design);
  if (taps !== null && way < 0 && (foot !== null || design.method.name === 'lug'))
    return {
      why: 'taps',
      got: `taps by ${design.method.name} that stand out from ${mm(taps.lowMm)} up, and ${foot === null ? 'their leads' : 'the foot of the former'} below`,
      expected: 'an end of the main winding over which a sleeve comes on',
    };
  const { lengthMm } = former;
  const mounted = job.former.mounting !== 'none';
  // The end of the former at which it stands out: what is screwed down, or has a foot, has only one.
  const out = way > 0 || (kind === 'sleeve' ? foot !== null : mounted) ? 1 : -1;
  const [endless, none] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  // An inner tube leaves the other end to what its carriage is held by.
  const free: Spread =
    kind === 'sleeve'
      ? {
          lowMm: taps !== null && way > 0 ? taps.highMm : (foot ?? none),
          highMm: taps !== null && way < 0 ? taps.lowMm : endless,
        }
      : { lowMm: out > 0 ? DISC_MM : none, highMm: out > 0 ? endless : lengthMm - DISC_MM };
  const play = job.printer.clearanceMm;
  const tube = 2 * LINES.tube * line;
  let body: { insideMm: number; outsideMm: number };
  if (kind === 'sleeve') {
    const over = coil.shape.meanDiameterMm + coil.shape.wire.overallMm + 2 * Math.max(coil.shape.wire.overallMm, w);
    const rim = former.flange?.diameterMm ?? 0;
    const insideMm = Math.ceil((Math.max(over, rim) + play) * 10 - 1e-6) / 10;
    body = { insideMm, outsideMm: Math.round(100 * (insideMm + tube)) / 100 };
  } else {
    const outsideMm = Math.floor((2 * (freeBoreMm(job, design) - w) - play) * 10 + 1e-6) / 10;
    body = { insideMm: Math.round(100 * (outsideMm - tube)) / 100, outsideMm };
    if (body.insideMm < LEAST_INSIDE_MM)
      return {
        why: 'bore',
        got: `a bore of ${mm(former.boreDiameterMm)}, which leaves an inner former ${mm(Math.max(0, outsideMm))} wide`,
        expected: `room for one ${mm(LEAST_INSIDE_MM + tube)} wide`,
      };
  }
  const bounds = (turns: number): Spread => ({
    lowMm: Math.max(free.lowMm + marginMm, -MOST_OFF_MM),
    highMm: Math.min(free.highMm - marginMm - spanMm(turns), lengthMm + MOST_OFF_MM),
  });
  return {
    meanDiameterMm: body.outsideMm + w + made,
    body,
    marginMm,
    way,
    bounds,
    farthestMm(turns, tight) {
      const { lowMm, highMm } = bounds(turns);
      if (way > 0)
        return Math.min(highMm, Math.max(lengthMm - GUIDE_MM + marginMm, tight + lengthMm - GUIDE_MM - free.lowMm));
      return Math.max(lowMm, Math.min(GUIDE_MM - marginMm - spanMm(turns), tight + GUIDE_MM - free.highMm));
    },
    bodySpan(turns, tight, loose) {
      let [lowMm, highMm] = [tight - marginMm, tight + spanMm(turns) + marginMm];
      if (way > 0) lowMm = Math.min(lowMm, lengthMm - GUIDE_MM - (loose - tight));
      else highMm = Math.max(highMm, GUIDE_MM + (tight - loose));
      if (!slides(second)) return { lowMm, highMm };
      if (out > 0) highMm = Math.max(highMm, lengthMm + STANDS_OUT_MM[kind] + Math.max(0, tight - loose));
      else lowMm = Math.min(lowMm, -STANDS_OUT_MM[kind] - Math.max(0, loose - tight));
      return { lowMm, highMm };
    },
  };
}
