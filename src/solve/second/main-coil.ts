/** What a main coil leaves in the way of a second winding: how far it reaches, where its taps stand out, how wide its bore is. */
import { joiningOf } from '../../coil/seam.ts';
import type { Job } from '../../job/job.ts';
import type { Design } from '../design.ts';

/** Beside the root of a tap that stands out, mm: a strip, a lug or a twist is no wider than twice that. */
const BESIDE_TAP_MM = 3;

/** Ways to bring out a tap after which nothing passes over it: a loop, a strip with its joint, a lug with its lead. */
const STANDS_OUT = new Set(['twisted loop', 'lifted turn', 'lug']);
/** Wires side by side that a tap leaves in the bore, laid flat along it: a twist of two. */
const IN_BORE: Readonly<Record<string, number>> = { 'drawn in': 2, 'cut pair': 2 };

/** Z of the turns themselves, edge to edge over their wire. */
export function edgesOf({ coil }: Design): { lowMm: number; highMm: number } {
  const half = coil.shape.wire.overallMm / 2;
  return { lowMm: coil.positionMm(0) - half, highMm: coil.positionMm(coil.turns) + half };
}

/** Z of all that belongs to the main winding on the former: holes, ridges, groove, turns that trimming adds. */
export function reachOf({ coil, former, holes }: Design): { lowMm: number; highMm: number } {
  const edges = edgesOf({ coil } as Design);
  const { groove, ridges } = former;
  const lows = [edges.lowMm];
  const highs = [edges.highMm];
  let last = coil.turns;
  for (const { axialMm, diameterMm, purpose, turn } of holes) {
    lows.push(axialMm - diameterMm / 2);
    highs.push(axialMm + diameterMm * Math.SQRT1_2);
    if (purpose === 'finish') last = Math.max(last, turn ?? 0);
  }
  highs.push(coil.positionMm(last) + coil.shape.wire.overallMm / 2);
  if (groove !== null) {
    const half = groove.floorMm / 2 + groove.depthMm;
    lows.push(coil.positionMm(-groove.runInTurns) - half);
    highs.push(coil.positionMm(last + groove.runInTurns) + half);
  }
  if (ridges?.start) lows.push(coil.positionMm(ridges.start.fromTurn) + ridges.start.footMm);
  if (ridges?.finish) highs.push(coil.positionMm(ridges.finish.toTurn) + ridges.finish.footMm + ridges.widthMm);
  return { lowMm: Math.min(...lows), highMm: Math.max(...highs) };
}

/** Z between which taps stand out of the winding, so that nothing slides over them; null where they all go inside. */
export function standingOut({ coil, method, taps, unitTaps }: Design): { lowMm: number; highMm: number } | null {
  if (!STANDS_OUT.has(method.name)) return null;
  const places = [...unitTaps, ...taps.slice(0, -1).map(({ turn }) => turn)].map((turn) => coil.positionMm(turn));
  if (places.length === 0) return null;
  return { lowMm: Math.min(...places) - BESIDE_TAP_MM, highMm: Math.max(...places) + BESIDE_TAP_MM };
}

/** Z of the top of what stands round the foot; null where the former ends as plain as it began. */
export function footOf({ former }: Design): number | null {
  const { kind, footMm, flange, base, ears } = former;
  if (kind === 'tube') return null;
  const top = Math.max(footMm, flange?.lowerMm ?? 0, base?.thicknessMm ?? 0, ...ears.map((ear) => ear.thicknessMm));
  return top > 0 ? top : null;
}

/** Radius that is free in the bore: what tongues, rings and the ends of taps leave of it. */
export function freeBoreMm(job: Job, { former, coil, method }: Design): number {
  const bore = former.boreDiameterMm / 2;
  const ribbed = former.ribs === null ? bore : Math.min(bore, former.ribs.innerRings.insideMm / 2);
  const joined =
    former.joints.length === 0
      ? bore
      : joiningOf(former.outsideDiameterMm / 2, bore, former.joints[0]!.glueGapMm, job.printer).ringR;
  // A wire's end at A and F lies inside from hole to hole in any case.
  const wires = IN_BORE[method.name] ?? 1;
  return Math.min(ribbed, joined) - wires * coil.shape.wire.overallMm;
}
