/** When nothing fits: which limit failed, by how much, and what change of a single limit would help. */
import { Fault, type Place } from '../fault.ts';
import type { Job } from '../job/job.ts';
import type { Wire } from '../stock/wire.ts';
import {
  type Candidate,
  candidatesOf,
  diametersFor,
  LEAST_LAYERS,
  leastGroovePitchMm,
  wiresFor,
} from './candidates.ts';
import { changesFor, lengthKey } from './changes.ts';
import { fixedTurnsOf } from './demand.ts';
import type { Breach, Limit } from './design.ts';
import { sizeOf } from './estimate.ts';
import { grooveFor } from './former.ts';
import { mostRibs, ribSection } from './ribs.ts';
import { demandFor, longestMm, type NotFound } from './search.ts';
import { landMm, wireHoleMm } from './tap-methods.ts';

/** Where the job says what a limit holds down. */
function keyOf(job: Job, limit: Limit): string {
  if (limit === 'holes') return 'want.taps';
  return limit === 'former.longest' ? lengthKey(job) : limit;
}

/** Why a stated pitch is none for a groove, of the wire that comes nearest to it. */
function withoutGroove(job: Job, pitch: number): { key: string; got: string } | null {
  if (job.former.kind !== 'printed' || job.winding.spacers !== null) return null;
  const { layerMm } = job.printer;
  const off = (wire: Wire) => Math.abs(leastGroovePitchMm(wire.overallMm, layerMm) - pitch);
  const wire = [...wiresFor(job)].sort((a, b) => off(a) - off(b))[0];
  if (wire === undefined || leastGroovePitchMm(wire.overallMm, layerMm) <= pitch) return null;
  const { widthMm } = grooveFor(wire.overallMm);
  const land = wire.overallMm / 4;
  const got = `a pitch of ${pitch} mm is ${Number((pitch / layerMm).toFixed(2))} layers of ${layerMm} mm, a groove takes ${LEAST_LAYERS}; for ${wire.name} it is ${widthMm.toFixed(2)} mm wide with ${land.toFixed(2)} mm of land: ${Number(leastGroovePitchMm(wire.overallMm, layerMm).toFixed(3))} mm in whole layers at least`;
  return { key: 'winding.pitch', got };
}

/** Why ribs do not go round the widest former of the job, for the wire that asks for the narrowest ones. */
function withoutRibs(job: Job, widest: number): { key: string; got: string } | null {
  if (job.former.ribs === null) return null;
  const full: Job = { ...job, former: { ...job.former, body: 'full', ribs: null } };
  const [narrowest] = candidatesOf(full)
    .filter(({ pitch }) => pitch.kind === 'groove')
    .map(({ wire, methods }) => ({ wire, ribs: ribSection(job, wire.overallMm, methods[0])! }))
    .sort((a, b) => a.ribs.widthMm - b.ribs.widthMm);
  if (narrowest === undefined) return null;
  const { wire, ribs } = narrowest;
  const got = `${ribs.count} ribs, ${ribs.widthMm} mm wide for ${wire.name}, leave less air than plastic round ${widest} mm; ${mostRibs(widest, ribs.widthMm, wire.overallMm)} would do`;
  return { key: 'former.ribs', got };
}

/** Why the tap method of the job has no place at any pitch of the job. */
function noMethod(job: Job): string {
  const none = `${job.winding.tapMethod} is not possible with any pitch of the job`;
  if (job.winding.tapMethod !== 'drawn in') return none;
  const room = ({ wire, pitch }: Candidate) => landMm(pitch.mm, wire.overallMm) - wireHoleMm(wire.overallMm, 2);
  const best = candidatesOf(job).sort((a, b) => room(b) - room(a))[0];
  if (best === undefined || room(best) >= 0) return none;
  const { wire, pitch } = best;
  const hole = wireHoleMm(wire.overallMm, 2);
  return `${none}: ${wire.name} needs a hole of ${hole} mm for two wires, and at ${pitch.mm} mm its neighbours leave ${landMm(pitch.mm, wire.overallMm).toFixed(2)} mm; ${((hole + wire.overallMm) / 2).toFixed(2)} mm of pitch would do`;
}

/** Why the job leaves no pair of wire and former to try. */
function noCandidate(job: Job): { key: string; got: string } {
  const thinnest = [...wiresFor(job)].sort((a, b) => a.overallMm - b.overallMm)[0];
  const wire = thinnest === undefined ? 'no wire' : `${thinnest.name}, ${thinnest.overallMm.toFixed(3)} mm`;
  const { pitch } = job.winding;
  if (diametersFor(job).length === 0)
    return { key: 'former.outside-diameter', got: 'no tube in stock has a diameter in this range' };
  if (typeof pitch === 'number' && thinnest !== undefined && pitch < thinnest.overallMm)
    return { key: 'winding.pitch', got: `a pitch of ${pitch} mm is narrower than the thinnest wire (${wire})` };
  if (pitch !== 'any' && wiresFor(job).every(({ covering }) => covering === 'bare'))
    return { key: 'winding.pitch', got: `bare wire (${wire}) at pitch: ${pitch} would touch its neighbours` };
  const noGroove = typeof pitch === 'number' ? withoutGroove(job, pitch) : null;
  if (noGroove !== null) return noGroove;
  const widest = Math.max(...diametersFor(job));
  const noRibs = withoutRibs(job, widest);
  if (noRibs !== null) return noRibs;
  return { key: 'wire', got: `the thinnest wire (${wire}) does not lie at a pitch of the job round ${widest} mm` };
}

/** What to call the limit that failed: that of the candidate which came nearest, else the length. */
function worst(job: Job, notFound: NotFound): { key: string; got: string } {
  const excess = (breach: Breach) => Math.abs(breach.got - breach.allowed) / Math.max(Math.abs(breach.allowed), 1e-9);
  const worstOf = (breaches: readonly Breach[]) => breaches.reduce((a, b) => (excess(b) > excess(a) ? b : a));
  // Of each candidate the limit that it misses most, and of these the nearest miss.
  const nearest = notFound.breaches.map(worstOf).sort((a, b) => excess(a) - excess(b))[0];
  if (nearest !== undefined) return { key: keyOf(job, nearest.limit), got: nearest.text };
  if (notFound.tried === 0) return noCandidate(job);
  const demand = demandFor(job);
  const sizes = candidatesOf(job)
    .map((candidate) => sizeOf(job, demand, candidate))
    .filter((size) => size !== null);
  const short = sizes.sort((a, b) => a.formerLengthMm - b.formerLengthMm)[0];
  if (short === undefined) return { key: 'winding.tap-method', got: noMethod(job) };
  if (short.formerLengthMm > longestMm(job)) {
    const over = short.formerLengthMm - longestMm(job);
    const got = `the shortest former, ${short.candidate.wire.name} on ${short.candidate.formerMm} mm, is about ${short.formerLengthMm.toFixed(0)} mm long, ${over.toFixed(0)} mm over the limit of ${longestMm(job)} mm`;
    return { key: lengthKey(job), got };
  }
  const fixed = fixedTurnsOf(demand);
  if (fixed !== null) {
    const off = (turns: number) => Math.abs(turns / fixed - 1);
    const near = sizes.reduce((a, b) => (off(b.turns) < off(a.turns) ? b : a));
    const got = `${demand.units} units and ${demand.taps} tens make ${fixed} turns; the coil nearest to that, ${near.candidate.wire.name} on ${near.candidate.formerMm} mm, has ${near.wholeUh} µH at about ${near.turns.toFixed(1)} turns`;
    return { key: 'winding.units', got };
  }
  const most = sizes.reduce((a, b) => (b.turns > a.turns ? b : a));
  if (most.turns < demand.taps * 0.5) {
    const got = `${demand.taps} taps on ${most.turns.toFixed(1)} turns at most: neighbours stand half a turn apart at least`;
    return { key: 'want.taps', got };
  }
  const got = `${demand.text}: the lowest inductance takes less than half a turn on ${short.candidate.formerMm} mm`;
  return { key: 'want.taps', got };
}

/** Where the limit stands in the job; the line of what it belongs to when the limit itself was left out. */
function placeOf(job: Job, key: string): Place {
  const { file, lines } = job.source;
  return { file, line: lines[key] ?? lines[key.split('.')[0]!], key };
}

/** The fault for a job that nothing meets. */
export function refusal(job: Job, notFound: NotFound): Fault {
  const { key, got } = worst(job, notFound);
  const changes = changesFor(job);
  const todo =
    changes.length === 0
      ? 'no change of a single limit would do; widen several of former.longest, former.outside-diameter, wire and want together'
      : `any one of these alone would do: ${changes.join('; ')}`;
  const expected = `a coil for ${notFound.demand.text} inside the limits of the job (${notFound.tried} combinations of wire, former and pitch were tried)`;
  return new Fault(4, { code: 'nothing-fits', place: placeOf(job, key), got, expected, todo });
}
