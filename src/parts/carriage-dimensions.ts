/**
 * Named dimensions of the carriage: a rail along the axis, a plug that holds it in the bore of the main former, and hubs in what the second
 * winding is wound on, which slide along it or are glued to it.
 *
 *     sleeve, beside     former ==[plug]----rail----[hub]--|   read at the outer edge, in line with the outer face of the hub
 *     inner    [plug]===== former =====[hub]---[hub]--|        the plug lies at the far end, so that the way out is free
 *
 * Lengths along the rail are counted from its end in the plug, which lies flush with the face of the plug that looks away from the hubs;
 * the other face is flush with the end of the former. For an inner former it is the other way about.
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { textWidthMm } from './lettering.ts';
import { secondOnItsOwn } from './second-dimensions.ts';
import { chordsFor } from './shapes.ts';
import type { Point2 } from './solid.ts';

/** Thickness of plug and hubs, along the axis: with common clearances the rail then tilts by no more than two degrees. */
export const DISC_MM = 12;
/** How far what slides stands out of the main former at the least: a sleeve by its hub, an inner former by what fingers can take. */
export const STANDS_OUT_MM = { sleeve: DISC_MM + 1, inner: 4 } as const;

/** On lower edges: the first layers spread, and a rail must slide. */
const CHAMFER_MM = 0.5;
const TICK_MM = 2.4;
/** Of a mark that carries its number. */
const LONG_TICK_MM = 3.4;
/** From a tick to its number, and round both. */
export const GAP_MM = 0.8;
const FIGURE_MM = { across: 3, along: 2.6 } as const;
/** Half the width of each of the four arms, and the most of it that the middle is wide. */
const HALF_ARM_MM = 5;
const ARM_SHARE = 0.6;
/** Walls round the rail, in printed lines. */
const WALL_LINES = 3;
/** Beyond the last mark. */
const TAIL_MM = 4;

export interface CarriageMark {
  readonly coupling: number;
  /** From the rail's end in the plug: there the outer edge of what slides must be. */
  readonly atMm: number;
  /** Null where there is no room for the number beside those of its neighbours. */
  readonly text: string | null;
}

/** A disc with four arms that fits into a bore, open between them for wires. All in mm. */
export interface Disc {
  readonly part: 'carriage-plug' | 'carriage-hub';
  readonly quantity: number;
  /** Radius of the arms: that of the bore less half the clearance. */
  readonly armR: number;
  /** Radius between them. */
  readonly coreR: number;
  readonly depthMm: number;
  readonly chamferMm: number;
  /** Of the hole for the rail. */
  readonly slotWidthMm: number;
  readonly slotDepthMm: number;
}

/** All in mm. */
export interface CarriageDimensions {
  readonly rail: {
    readonly widthMm: number;
    readonly heightMm: number;
    readonly lengthMm: number;
    readonly chamferMm: number;
    /** Numbers stand across the rail, or along it where it is narrow. */
    readonly figures: 'across' | 'along';
    readonly figureMm: number;
    readonly tickMm: number;
    readonly longTickMm: number;
  };
  readonly plug: Disc;
  readonly hub: Disc;
  /** Up or down from the plug to the hubs, in the frame of the main coil. */
  readonly out: 1 | -1;
  /** Z of the rail's end in the plug, in that frame. */
  readonly railZeroMm: number;
  /** Where the outer edge of what slides lies along the rail at the tightest place, or for good. */
  readonly tightMm: number;
  readonly slides: boolean;
  readonly marks: readonly CarriageMark[];
}

interface Lies {
  readonly out: 1 | -1;
  readonly zeroMm: number;
  readonly innerMm: number;
  readonly outerMm: number;
}

/** @throws Fault (exit 4) `no-second-former`, `carriage-not-needed`, `carriage-narrow`, `carriage-no-room` */
export function carriageDimensions(record: PartsRecord): CarriageDimensions {
  const { second, body } = secondOnItsOwn(record);
  const { former, printer, windings } = record;
  const { slide, kind } = second;
  if (kind === 'sleeve' && slide === null)
    throw new Fault(4, {
      code: 'carriage-not-needed',
      place: { key: 'parts' },
      got: 'a sleeve that stays where it is, on the main winding',
      expected: 'a second winding that slides, or one with second.kind: inner or beside',
      todo: 'leave carriage out of parts, or ask for a range of second.coupling',
    });
  const play = printer.clearanceMm;
  const plugR = (former.boreDiameterMm - play) / 2;
  const hubR = (body.insideDiameterMm - play) / 2;
  const texts = slide === null ? [] : slide.scale.map(({ coupling }) => `${Number(coupling.toPrecision(3))}`);
  const wireMm = Math.max(windings[0]!.wire.overallMm, second.wire.overallMm);
  const rail = railSection(texts, Math.min(plugR, hubR), play, printer.lineMm, wireMm);
  if ('leastR' in rail) {
    const least = Math.ceil(10 * (2 * rail.leastR + play)) / 10;
    const inFormer = plugR < hubR;
    throw new Fault(4, {
      code: 'carriage-narrow',
      place: { key: inFormer ? 'former.outside-diameter' : 'second' },
      got: `a bore of ${mm(inFormer ? former.boreDiameterMm : body.insideDiameterMm)} in ${inFormer ? 'the main former' : 'what the second winding is wound on'}`,
      expected: `${mm(least)} or more, for a rail with a scale`,
      todo: 'leave carriage out of parts, widen former.outside-diameter, or take second.kind: sleeve',
    });
  }
  const travelMm = slide?.travelMm ?? 0;
  const lies = liesOf(record, travelMm);
  const tightMm = lies.outerMm;
  const sense = lies.out * Math.sign(travelMm);
  const places = (slide?.scale ?? []).map(({ mm: at, coupling }) => ({ coupling, atMm: tightMm + sense * at }));
  const marks = withNumbers(places, texts, rail);
  const last = marks.reduce<CarriageMark | null>((far, one) => (far !== null && far.atMm > one.atMm ? far : one), null);
  const endMm = Math.max(tightMm, last?.atMm ?? 0);
  const tailMm =
    last === null
      ? 0
      : TAIL_MM + (rail.figures === 'along' ? GAP_MM + textWidthMm(last.text ?? '', rail.figureMm) : rail.figureMm / 2);
  const depthMm = Math.min(DISC_MM, body.lengthMm);
  const two = kind !== 'sleeve' && body.lengthMm >= 2 * depthMm + 2;
  const slot = {
    slotWidthMm: rail.widthMm + play,
    slotDepthMm: rail.heightMm + play,
    chamferMm: CHAMFER_MM,
    coreR: rail.coreR,
  };
  return {
    rail: { ...rail, lengthMm: endMm + tailMm },
    plug: { part: 'carriage-plug', quantity: 1, armR: plugR, depthMm: DISC_MM, ...slot },
    hub: { part: 'carriage-hub', quantity: two ? 2 : 1, armR: hubR, depthMm, ...slot },
    out: lies.out,
    railZeroMm: lies.zeroMm,
    tightMm,
    slides: slide !== null,
    marks,
  };
}

const mm = (x: number): string => `${Number(x.toFixed(1))} mm`;

/** Where plug and hubs lie: on the side to which what slides stands out, or the nearer one. @throws Fault (exit 4) `carriage-no-room` */
function liesOf(record: PartsRecord, travelMm: number): Lies {
  const { second, body } = secondOnItsOwn(record);
  const { lengthMm } = record.former;
  const [lowMm, highMm] = [body.lowMm, body.lowMm + body.lengthMm];
  const up = highMm + Math.min(0, travelMm) > lengthMm;
  const down = lowMm + Math.max(0, travelMm) < 0;
  const beyond = second.slide !== null && up !== down ? up : (lowMm + highMm) / 2 > lengthMm / 2;
  const ways = (beyond ? [1, -1] : [-1, 1]) as (1 | -1)[];
  const tried = (second.kind === 'inner' && second.slide === null ? ways : ways.slice(0, 1)).map((out): Lies => {
    const end = second.kind === 'inner' ? (out > 0 ? 0 : lengthMm) : out > 0 ? lengthMm - DISC_MM : DISC_MM;
    const along = (z: number) => out * (z - end);
    const [a, b] = [along(lowMm), along(highMm)];
    return { out, zeroMm: end, innerMm: Math.min(a, b) + Math.min(0, out * travelMm), outerMm: Math.max(a, b) };
  });
  // Of a sleeve only the hub at its outer edge is in the way of the plug.
  const spareMm = (one: Lies) =>
    (second.kind === 'sleeve' ? one.outerMm + Math.min(0, one.out * travelMm) - DISC_MM : one.innerMm) - DISC_MM;
  const best = tried.find((one) => spareMm(one) >= -1e-6) ?? tried[0]!;
  const short = -spareMm(best);
  if (short <= 1e-6) return best;
  throw new Fault(4, {
    code: 'carriage-no-room',
    place: { key: 'second' },
    got: `hubs that would reach ${mm(short)} into the plug of ${mm(DISC_MM)} in the bore of the main former`,
    expected: 'what the second winding is wound on clear of the plug at every place',
    todo: `leave carriage out of parts, or take fewer second.turns, by at least ${Math.ceil(short / second.pitchMm)}`,
  });
}

type Section = Pick<
  CarriageDimensions['rail'],
  'widthMm' | 'heightMm' | 'chamferMm' | 'figures' | 'figureMm' | 'tickMm' | 'longTickMm'
> & {
  readonly coreR: number;
};

/** The wider section, with its numbers across, where both bores take it. */
function railSection(
  texts: readonly string[],
  leastBoreR: number,
  play: number,
  lineMm: number,
  wireMm: number,
): Section | { leastR: number } {
  const cutOut = 2 * wireMm + 0.4;
  const sectionOf = (figures: 'across' | 'along'): Section => {
    const figureMm = FIGURE_MM[figures];
    const [tickMm, longTickMm] = figures === 'across' ? [TICK_MM, LONG_TICK_MM] : [1.4, 2.2];
    const text = figures === 'across' ? Math.max(6, ...texts.map((each) => textWidthMm(each, figureMm))) : figureMm;
    const widthMm = Math.ceil(2 * (longTickMm + text + 2 * GAP_MM + 0.3)) / 2;
    const heightMm = figures === 'across' ? 5 : 3.6;
    const coreR = Math.hypot(widthMm + play, heightMm + play) / 2 + WALL_LINES * lineMm;
    return { widthMm, heightMm, chamferMm: CHAMFER_MM, figures, figureMm, tickMm, longTickMm, coreR };
  };
  const sections = [sectionOf('across'), sectionOf('along')];
  const found = sections.find(({ coreR }) => coreR + cutOut <= leastBoreR);
  return found ?? { leastR: sections[1]!.coreR + cutOut };
}

/** Both ends have their numbers, those between where there is room. */
function withNumbers(
  places: readonly { coupling: number; atMm: number }[],
  texts: readonly string[],
  { figures, figureMm }: Section,
): CarriageMark[] {
  const wide = (i: number) => (figures === 'across' ? figureMm : textWidthMm(texts[i]!, figureMm)) + 1;
  const along = [...places.keys()].sort((a, b) => places[a]!.atMm - places[b]!.atMm);
  const shown = new Set<number>();
  let free = Number.NEGATIVE_INFINITY;
  const lastAlong = along.at(-1) ?? 0;
  for (const i of along) {
    const here = places[i]!.atMm;
    const clear = here >= free && (i === lastAlong || here + wide(i) <= places[lastAlong]!.atMm);
    if (!clear && i !== lastAlong) continue;
    shown.add(i);
    free = here + wide(i);
  }
  return places.map(({ coupling, atMm }, i) => ({
    coupling,
    atMm,
    text: shown.has(i) ? texts[i]! : null,
  }));
}

/** Outline of a disc with its arms shortened by `insetMm`: counterclockwise, seen whole from its middle. */
export function discOutline({ armR, coreR }: Disc, insetMm = 0): Point2[] {
  const half = Math.min(HALF_ARM_MM, ARM_SHARE * coreR);
  const points: Point2[] = [];
  const arc = (radius: number, from: number, to: number, chords: number) => {
    for (let i = 0; i <= chords; i++) {
      const a = from + ((to - from) * i) / chords;
      points.push([radius * Math.cos(a), radius * Math.sin(a)]);
    }
  };
  const [onArm, onCore] = [Math.asin(half / armR), Math.asin(half / coreR)];
  const quarter = Math.PI / 2;
  const [armChords, coreChords] = [chordsFor(armR, 2 * onArm, 2), chordsFor(coreR, quarter - 2 * onCore, 2)];
  for (const middle of [0, 1, 2, 3].map((k) => k * quarter)) {
    // An even number, so that a point lies on the axis and the box is as wide as the bore asks.
    arc(armR - insetMm, middle - onArm, middle + onArm, 2 * Math.ceil(armChords / 2));
    arc(coreR, middle + onCore, middle + quarter - onCore, coreChords);
  }
  return points;
}
