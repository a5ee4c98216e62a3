/**
 * The space that is searched: wire x former diameter x pitch, as far as the job permits it.
 *
 * Close: wire against wire; enamel comes out 2 % looser than its diameter, textile coverings at their diameter (common
 * practice: enamel 1 to 3 %, cotton compresses). Bare wire cannot be wound close. Spaced on a smooth former: by a second
 * wire or by spacer stock wound along and taken off. Grooved: whole layers of the printer, four at least, wide enough for
 * the groove and a land of a quarter of a wire. A pitch that is stated is taken as it stands or not at all: on a printed
 * former it is close, or wide enough for a groove, or held by spacers that the job names. Ribs have a notch a turn: the
 * pitches of a groove.
 *
 * What the bench makes of a pitch (`as-made`) is in the pitch of close and spaced turns, so that holes, template and figures are
 * those of the coil as it comes out; a groove's or notch's pitch is printed, and its error is one of the printer's scale.
 */
import type { Job } from '../job/job.ts';
import { spacers } from '../stock/spacers.ts';
import { tubes } from '../stock/tubes.ts';
import type { Wire } from '../stock/wire.ts';
import { allWires } from '../stock/wires.ts';
import { roundDiameterMm, turnsFor } from './estimate.ts';
import { grooveFor } from './former.ts';
import { ribSection, ribsFit } from './ribs.ts';
import { type TapMethod, tapMethodsFor } from './tap-methods.ts';

export type PitchKind = 'close' | 'spacer' | 'groove';

export interface Pitch {
  readonly kind: PitchKind;
  readonly mm: number;
  readonly spacerMm: number;
  readonly spacerName: string;
}

export interface Candidate {
  readonly wire: Wire;
  readonly formerMm: number;
  readonly pitch: Pitch;
  /** Ways to bring out its taps that the job permits, the usual one first; empty when the one asked for is not possible. */
  readonly methods: readonly TapMethod[];
  /** The same for every candidate of this wire and kind of pitch. */
  readonly family: string;
}

/** Steps of the diameter grid on a printed former, mm. */
const DIAMETER_STEP_MM = 1;
/** A groove of fewer layers does not print (common practice). */
export const LEAST_LAYERS = 4;
/** Wider than this many wires a pitch only costs length. */
const WIDEST_IN_WIRES = 3;
/** Thinner wire breaks under a hand that winds it on a form (common practice); who names it gets it. */
const THINNEST_FROM_STOCK_MM = 0.15;
/** Wire thicker than this share of the former does not lie round it. */
const THICKEST_SHARE = 1 / 15;

/** Closeness of a close winding: pitch over covered diameter. */
function looseness(wire: Wire): number {
  return wire.covering === 'enamel' || wire.covering === 'enamel heavy' ? 1.02 : 1;
}

/** Turn against turn. */
export const closePitch = (wire: Wire): Pitch => ({
  kind: 'close',
  mm: round4(wire.overallMm * looseness(wire)),
  spacerMm: 0,
  spacerName: 'none',
});

const round4 = (value: number) => Math.round(value * 1e4) / 1e4;

function spacedBy(wire: Wire, spacer: { name: string; thicknessMm: number }): Pitch {
  return {
    kind: 'spacer',
    mm: round4(wire.overallMm + spacer.thicknessMm),
    spacerMm: spacer.thicknessMm,
    spacerName: spacer.name,
  };
}

/** Narrowest groove pitch that a wire and a layer height allow, mm. */
export function leastGroovePitchMm(overallMm: number, layerMm: number): number {
  const needed = grooveFor(overallMm).widthMm + overallMm / 4;
  return layerMm * Math.max(LEAST_LAYERS, Math.ceil(needed / layerMm - 1e-9));
}

/** Turns pressed nearer than this share of the least covered diameter are no turns side by side. */
const SQUEEZED = 0.97;

/** All pitches of a wire that the job permits, those that a hand lays as they come out. */
function pitchesFor(job: Job, wire: Wire): Pitch[] {
  const { pitch } = job.asMade;
  const planned = pitchesPlanned(job, wire);
  if (pitch === 0) return planned;
  return planned
    .map((one) => (one.kind === 'groove' ? one : { ...one, mm: round4(one.mm * (1 + pitch)) }))
    .filter(({ kind, mm }) => kind === 'groove' || mm >= SQUEEZED * wire.overallLowMm);
}

function pitchesPlanned(job: Job, wire: Wire): Pitch[] {
  const asked = job.winding.pitch;
  const bare = wire.covering === 'bare';
  const printed = job.former.kind === 'printed';
  const ribbed = job.former.body === 'ribbed';
  const widest = WIDEST_IN_WIRES * wire.overallMm;
  const list: Pitch[] = [];
  if (typeof asked === 'number') return pitchAsked(job, wire, asked);
  if (asked !== 'spaced' && !bare && !ribbed) list.push(closePitch(wire));
  if (asked === 'close') return list;
  if (printed) {
    for (let mm = leastGroovePitchMm(wire.overallMm, job.printer.layerMm); mm <= widest; mm += job.printer.layerMm)
      list.push({ kind: 'groove', mm: round4(mm), spacerMm: 0, spacerName: 'none' });
  }
  // Bare wire that a spacer no longer holds can touch its neighbour; only who names it gets it on a smooth former.
  const holds = !bare || job.wires !== 'stock';
  if (holds && !ribbed && (!printed || job.winding.spacers !== null)) {
    const stock =
      job.winding.spacers?.map((thicknessMm) => ({ name: `${thicknessMm} mm spacer`, thicknessMm })) ?? spacers();
    for (const spacer of stock)
      if (wire.overallMm + spacer.thicknessMm <= widest && spacer.thicknessMm >= 0.1) list.push(spacedBy(wire, spacer));
    if (job.winding.spacers === null)
      list.push(spacedBy(wire, { name: 'a second wire of the same kind', thicknessMm: wire.overallMm }));
  }
  return list;
}

function pitchAsked(job: Job, wire: Wire, mm: number): Pitch[] {
  const close = wire.overallMm * looseness(wire);
  if (mm < wire.overallMm) return [];
  const ribbed = job.former.body === 'ribbed';
  if (!ribbed && mm <= close * 1.03 && wire.covering !== 'bare')
    return [{ kind: 'close', mm, spacerMm: 0, spacerName: 'none' }];
  const grooved = job.former.kind === 'printed' && mm >= LEAST_LAYERS * job.printer.layerMm;
  const wide = mm >= grooveFor(wire.overallMm).widthMm + wire.overallMm / 4;
  if (grooved && wide) return [{ kind: 'groove', mm, spacerMm: 0, spacerName: 'none' }];
  if (ribbed || (job.former.kind === 'printed' && job.winding.spacers === null)) return [];
  const spacerMm = round4(mm - wire.overallMm);
  return [{ kind: 'spacer', mm, spacerMm, spacerName: `${spacerMm} mm spacer` }];
}

/** Former diameters to try, mm, ascending. On a bought tube a range means the stock tubes in it. */
export function diametersFor(job: Job): number[] {
  const wanted = job.former.diametersMm;
  if ('listMm' in wanted) return [...wanted.listMm].sort((a, b) => a - b);
  const { lowMm, highMm } = wanted;
  if (lowMm === highMm) return [lowMm];
  if (job.former.kind === 'tube')
    return tubes()
      .map((tube) => tube.outsideDiameterMm)
      .filter((mm) => mm >= lowMm - 1e-9 && mm <= highMm + 1e-9)
      .sort((a, b) => a - b);
  const steps = Math.max(1, Math.ceil((highMm - lowMm) / DIAMETER_STEP_MM));
  return Array.from({ length: steps + 1 }, (_, i) => lowMm + ((highMm - lowMm) * i) / steps);
}

export function wiresFor(job: Job): readonly Wire[] {
  if (job.wires !== 'stock') return job.wires;
  return allWires().filter((wire) => wire.bareMm >= THINNEST_FROM_STOCK_MM);
}

function methodsFor(job: Job, wire: Wire, pitch: Pitch): readonly TapMethod[] {
  const methods = tapMethodsFor(wire, pitch.mm, pitch.kind === 'close');
  const asked = job.winding.tapMethod;
  return asked === 'auto' ? methods : methods.filter((method) => method.name === asked);
}

/** Turns for an inductance go with about the inverse of the diameter: so many steps meet them to a few hundredths of a percent. */
const STEPS = 4;

/** The diameter of a range at which the fixed turns of two switches have the inductance asked for, or the end that is nearest. */
function diameterForTurns(
  job: Job,
  turns: number,
  uh: number,
  { lowMm, highMm }: { lowMm: number; highMm: number },
  of: Omit<Candidate, 'formerMm'>,
  gapsMm: number,
): number {
  let formerMm = Math.sqrt(lowMm * highMm);
  for (let k = 0; k < STEPS; k++) {
    const mean = roundDiameterMm(job, { ...of, formerMm });
    const ratio = turnsFor(uh, mean, of.pitch.mm, of.wire.bareMm, gapsMm) / turns;
    formerMm = Math.min(highMm, Math.max(lowMm, formerMm * ratio));
  }
  return Math.round(100 * formerMm) / 100;
}

/** Diameters to try for a wire and a pitch: all there are, or the one that two switches need of a printed range. */
function diametersOf(job: Job, all: readonly number[], of: Omit<Candidate, 'formerMm'>): readonly number[] {
  const { want, winding, former } = job;
  const range = former.diametersMm;
  if (winding.units === null || want.kind !== 'range' || former.kind !== 'printed' || 'listMm' in range) return all;
  const gapsMm = (of.methods[0]?.gapMm ?? 0) * (want.taps + winding.units - 2);
  return [diameterForTurns(job, winding.units * want.taps, want.highUh, range, of, gapsMm)];
}

/** Whether the ribs of a ribbed body leave as much air as they take, with the usual tap method of the wire. */
function ribsGoRound(job: Job, wire: Wire, methods: readonly TapMethod[], formerMm: number): boolean {
  const ribs = ribSection(job, wire.overallMm, methods[0]);
  return ribs === null || ribsFit(ribs, formerMm, wire.overallMm);
}

/** The whole space, wire by wire. */
export function candidatesOf(job: Job): Candidate[] {
  const diameters = diametersFor(job);
  const list: Candidate[] = [];
  for (const wire of wiresFor(job)) {
    for (const pitch of pitchesFor(job, wire)) {
      const methods = methodsFor(job, wire, pitch);
      const family = `${wire.name}, ${pitch.kind}`;
      for (const formerMm of diametersOf(job, diameters, { wire, pitch, methods, family }))
        if (wire.overallMm <= formerMm * THICKEST_SHARE && ribsGoRound(job, wire, methods, formerMm))
          list.push({ wire, formerMm, pitch, methods, family });
    }
  }
  return list;
}
