/** The spread of what a coil is made of, by how it is made; common practice where no standard says it. */
import type { Spread } from '../coil/tolerance.ts';
import type { Job } from '../job/job.ts';
import type { Candidate } from './candidates.ts';
import type { Design } from './design.ts';

/** A printed diameter, measured against its drawing, and a bought tube against its name, mm. */
const PRINTED_DIAMETER_MM = 0.15;
const TUBE_DIAMETER_MM = 0.3;
/** Angle at which a tap is really soldered. */
const TAP_DEGREES = 3;
/** Twisted tap leads of 100 mm at 0.25 nH/mm. */
const LEAD_UH = 0.025;
const GAP = 0.5;

function pitchSpread({ wire, pitch }: Candidate): number {
  if (pitch.kind === 'groove') return 0.002;
  // Enamel wound close comes out 1 to 3 % looser than its diameter, and 2 % are counted on.
  if (pitch.kind === 'close') return wire.covering === 'enamel' || wire.covering === 'enamel heavy' ? 0.01 : 0.02;
  return (0.05 * pitch.spacerMm) / pitch.mm;
}

function diameterSpread(job: Job): number {
  return job.former.kind === 'printed' ? PRINTED_DIAMETER_MM : TUBE_DIAMETER_MM;
}

/** Half width of the whole coil's inductance, a fraction, to compare candidates by: L goes with about D^1.65 and p^-0.6. */
export function inductanceSpread(job: Job, candidate: Candidate): number {
  return Math.hypot((1.65 * diameterSpread(job)) / candidate.formerMm, 0.6 * pitchSpread(candidate));
}

export function spreadOf(job: Job, design: Design): Spread {
  const { wire } = design.candidate;
  return {
    diameterMm: diameterSpread(job),
    pitch: pitchSpread(design.candidate),
    bareMm: Math.max(wire.bareHighMm - wire.bareMm, wire.bareMm - wire.bareLowMm),
    gap: design.method.gapMm > 0 ? GAP : 0,
    turn: TAP_DEGREES / 360,
    leadUh: LEAD_UH,
  };
}

/** The same in words, for the list of what was assumed. */
export function spreadInWords(spread: Spread): Record<string, string> {
  return {
    'spread.diameter': `± ${spread.diameterMm} mm`,
    'spread.pitch': `± ${(spread.pitch * 100).toFixed(2)} %`,
    'spread.bare-wire': `± ${spread.bareMm.toFixed(4)} mm`,
    'spread.tap-gap': `± ${(spread.gap * 100).toFixed(0)} %`,
    'spread.tap-angle': `± ${(spread.turn * 360).toFixed(0)} degrees`,
    'spread.lead': `± ${(spread.leadUh * 1000).toFixed(0)} nH`,
  };
}
