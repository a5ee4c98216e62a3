/**
 * How a tap is brought out, what it costs along the axis and how near its neighbour may stand.
 *
 * Common practice, from memory (no printed source): a close winding leaves no land for a hole of more than the wire, so
 * there the tap stands outward as a twisted loop, or a turn is lifted over a strip and bared, or the wire is cut and
 * anchored as a pair, or held by a lug; where the pitch leaves land, a loop is drawn in through a hole. Twisted loops
 * stand 15 to 30 degrees from their neighbours or three turns apart. The root of a twisted loop pushes the next turn
 * aside by about half a wire.
 */
import type { Wire } from '../stock/wire.ts';

export type TapMethodName = 'twisted loop' | 'lifted turn' | 'cut pair' | 'lug' | 'drawn in';
export type TapLayout = 'in line' | 'staggered';

export interface TapMethod {
  readonly name: TapMethodName;
  /** How far the next turn is pushed aside, mm. */
  readonly gapMm: number;
  /** Neighbouring taps in one line stand at least this many turns apart ... */
  readonly turnsApart: number;
  /** ... or else at least this angle apart. */
  readonly degreesApart: number;
  /** Holes through the former at each tap: how many, and how wide; none where the tap stands outward. */
  readonly holes: 0 | 1 | 2;
  readonly holeMm: number;
  /** Extra wire in each tap, m. */
  readonly loopM: number;
  /** That wire stays in circuit from start to finish; a loop that is soldered at its root does not. */
  readonly loopInCircuit: boolean;
  readonly why: string;
}

/** Plastic or card left between two holes, mm. */
export const WEB_MM = 1;

/** Hole that passes `wires` covered wires without scraping them: a quarter of a wire and 0.2 mm of play, 0.8 mm at least. */
export function wireHoleMm(overallMm: number, wires: 1 | 2): number {
  return Math.max(0.8, Math.ceil((overallMm * (wires + 0.25) + 0.2) * 10) / 10);
}

/** Whole turns between two holes in one line; a printed hole has a roof that makes it a fifth taller. */
function turnsBetweenHoles(holeMm: number, pitchMm: number): number {
  return Math.ceil((1.21 * holeMm + WEB_MM) / pitchMm);
}

/** Between the turn before and the turn after the one that is drawn in, mm: the place of its hole. */
export function landMm(pitchMm: number, overallMm: number): number {
  return 2 * pitchMm - overallMm;
}

/** A hole of two wires clears the turns beside it. */
function hasLand(pitchMm: number, overallMm: number): boolean {
  return wireHoleMm(overallMm, 2) <= landMm(pitchMm, overallMm) + 1e-9;
}

/** Solid wire up to this twists tight by hand (common practice). */
const TWISTS_TO_MM = 0.85;

const isLitz = (wire: Wire) => wire.strands > 1;

/** The methods that a covering and a pitch allow, the usual one first. `pitchMm` is centre to centre. */
export function tapMethodsFor(wire: Wire, pitchMm: number, close: boolean): readonly TapMethod[] {
  const w = wire.overallMm;
  const drawn: TapMethod = {
    name: 'drawn in',
    gapMm: 0,
    turnsApart: turnsBetweenHoles(wireHoleMm(w, 2), pitchMm),
    degreesApart: 15,
    holes: 1,
    holeMm: wireHoleMm(w, 2),
    loopM: 0.12,
    loopInCircuit: true,
    why: `a pitch of ${pitchMm.toFixed(2)} mm leaves land for a hole of two wires`,
  };
  const loop: TapMethod = {
    name: 'twisted loop',
    gapMm: close ? w / 2 : Math.max(0, 2 * w - pitchMm) / 2,
    turnsApart: 3,
    degreesApart: 15,
    holes: 0,
    holeMm: 0,
    loopM: 0.1,
    loopInCircuit: false,
    why: 'the winding leaves no land for holes and this wire twists without breaking',
  };
  const lifted: TapMethod = {
    name: 'lifted turn',
    gapMm: 0,
    turnsApart: 3,
    degreesApart: 20,
    holes: 0,
    holeMm: 0,
    loopM: 0.004,
    loopInCircuit: true,
    why: 'wire this thick does not twist; lifted over a strip it is bared without a gap',
  };
  const pair: TapMethod = {
    name: 'cut pair',
    gapMm: 0,
    turnsApart: turnsBetweenHoles(wireHoleMm(w, 1), pitchMm),
    degreesApart: 20,
    holes: 2,
    holeMm: wireHoleMm(w, 1),
    loopM: 0.2,
    loopInCircuit: true,
    why: 'stranded wire is cut, every strand tinned, and anchored as a pair',
  };
  const lug: TapMethod = {
    name: 'lug',
    gapMm: close ? Math.max(0, 0.5 - (pitchMm - w)) : 0,
    turnsApart: Math.max(3, Math.ceil(5 / pitchMm)),
    degreesApart: 30,
    holes: 0,
    holeMm: 0,
    loopM: 0.01,
    loopInCircuit: true,
    why: 'a lug of 0.5 mm sheet under the turn, soldered',
  };
  const order: TapMethod[] = [];
  // Wire that thick cannot be twisted up inside a former.
  if (hasLand(pitchMm, w) && !close && (isLitz(wire) || wire.bareMm <= TWISTS_TO_MM)) order.push(drawn);
  if (isLitz(wire)) order.push(pair);
  else if (wire.bareMm <= TWISTS_TO_MM) order.push(loop, lifted);
  else order.push(lifted, lug);
  for (const method of isLitz(wire) ? [lug] : [loop, lifted, pair, lug])
    if (!order.includes(method)) order.push(method);
  return order;
}
