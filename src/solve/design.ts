/** A candidate worked out in full by the ring sum, judged against every limit of the job. */
import type { Coil } from '../coil/coil.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { Job } from '../job/job.ts';
import type { Former, Hole } from '../record/schema.ts';
import type { Candidate } from './candidates.ts';
import type { Demand } from './demand.ts';
import {
  type Around,
  formerFor,
  holesFor,
  LEAST_WEB_MM,
  leastCircleMm,
  postsFor,
  ribsFor,
  startMm,
  tensionN,
  tightestPair,
  widestMm,
} from './former.ts';
import { splitOf } from './joints.ts';
import { BEHIND_MM, mostRibs, ribDepths, ribSection, ribTensionN } from './ribs.ts';
import { coilOf, freedomsOf, type Setting, sectionAt, settle, targetsOf } from './settle.ts';
import { inductanceSpread } from './spread.ts';
import { switchBreaches } from './switch-breaches.ts';
import type { TapLayout, TapMethod } from './tap-methods.ts';
import {
  type Coverage,
  copperG,
  copperMm2,
  coverageEstimate,
  lossFactor,
  sectionLossOhm,
  workingKhz,
} from './working.ts';

export interface DesignTap {
  readonly turn: number;
  readonly targetUh: number;
  readonly inductanceUh: number;
  /** Inductance against target, a fraction. */
  readonly deviation: number;
  readonly coverage: Coverage | null;
  readonly workingKhz: number;
  readonly lossOhm: number;
  readonly lossFactor: number;
}

export interface Metrics {
  readonly lossFactor: number;
  readonly volumeMm3: number;
  readonly lengthMm: number;
  readonly diameterMm: number;
  readonly wireM: number;
  readonly massG: number;
  readonly worstTap: number;
  readonly turns: number;
  readonly spread: number;
}

export interface Design {
  readonly candidate: Candidate;
  readonly coil: Coil;
  readonly method: TapMethod;
  readonly layout: TapLayout;
  readonly taps: readonly DesignTap[];
  /** Turns of the taps of the units switch; empty for one switch. */
  readonly unitTaps: readonly number[];
  readonly former: Former;
  readonly holes: readonly Hole[];
  readonly tension: { readonly low: number; readonly high: number };
  readonly metrics: Metrics;
  /** The coil at work, once it has been asked for. */
  readonly working?: WorkingCoil;
}

export type Limit =
  | 'former.longest'
  | 'printer.height'
  | 'printer.bed'
  | 'former.wall'
  | 'former.ribs'
  | 'former.screw-circle'
  | 'want.taps'
  | 'want.inductance'
  | 'winding.units'
  | 'want.overlap'
  | 'want.band'
  | 'winding.tap-method'
  | 'holes';

/** A limit of the job that a candidate breaks, with the value it has and the value that the job allows. */
export interface Breach {
  readonly limit: Limit;
  readonly got: number;
  readonly allowed: number;
  readonly text: string;
  /** No other way to bring out the taps would mend it. */
  readonly anyMethod?: true;
}

export type Outcome =
  | { readonly ok: true; readonly design: Design }
  | { readonly ok: false; readonly breaches: readonly Breach[] };

/** A whole coil on a printed former that is farther off than this is not taken. */
const WHOLE_OFF = 1e-3;
/** On ribs the finish stands in one of them: half the way to the next, in L, may be missing where nothing else is free. */
const wholeOff = ({ turns, shape }: Coil) =>
  Math.max(WHOLE_OFF, shape.corners === undefined ? 0 : 1 / (shape.corners * turns));
/** A printed former grows 0.1 % at most by its angle step; what is finer than this is not a miss of the band. */
const BAND_SLACK = 2e-3;

function sectionOf(coil: Coil, turn: number) {
  const { wire } = coil.shape;
  const meanDiameterMm = coil.equivalentDiameterMm;
  const deadTurns = Math.max(0, coil.turns - turn);
  return { wire, meanDiameterMm, turns: turn, deadTurns, pitchMm: coil.meanPitchMm(turn), wireM: coil.wireM(turn) };
}

function tapsOf(setting: Setting, coil: Coil, turns: readonly number[]): DesignTap[] {
  const taps = turns.slice(0, -1);
  const targets = targetsOf(setting, coil, taps);
  return turns.map((turn, index) => {
    const inductanceUh = coil.inductanceUh(turn);
    const coverage = coverageEstimate(setting.job, sectionAt(coil, turn, coil.turns, taps));
    const kHz = workingKhz(setting.job, coverage);
    const lossOhm = sectionLossOhm(sectionOf(coil, turn), kHz);
    return {
      turn,
      targetUh: targets[index]!,
      inductanceUh,
      deviation: inductanceUh / targets[index]! - 1,
      coverage,
      workingKhz: kHz,
      lossOhm,
      lossFactor: lossFactor(inductanceUh, lossOhm, kHz),
    };
  });
}

export function bandBreaches(demand: Demand, taps: readonly DesignTap[]): Breach[] {
  if (demand.band === null || demand.overlap === null) return [];
  const breaches: Breach[] = [];
  const cover = taps.map((tap) => tap.coverage!);
  for (let i = 1; i < cover.length; i++) {
    const overlap = cover[i]!.highKhz / cover[i - 1]!.lowKhz - 1;
    if (overlap < demand.overlap - BAND_SLACK)
      breaches.push({
        limit: 'want.overlap',
        got: overlap,
        allowed: demand.overlap,
        text: `positions ${i} and ${i + 1} overlap by ${(overlap * 100).toFixed(1)} %, wanted ${(demand.overlap * 100).toFixed(1)} %`,
      });
  }
  const low = cover[cover.length - 1]!.lowKhz;
  const high = cover[0]!.highKhz;
  if (low > demand.band.lowKhz * (1 + BAND_SLACK) || high < demand.band.highKhz * (1 - BAND_SLACK))
    breaches.push({
      limit: 'want.band',
      got: high / low,
      allowed: demand.band.highKhz / demand.band.lowKhz,
      text: `covers ${low.toFixed(0)} to ${high.toFixed(0)} kHz of ${demand.band.lowKhz} to ${demand.band.highKhz} kHz`,
    });
  return breaches;
}

function sizeBreaches(job: Job, former: Former): Breach[] {
  const breaches: Breach[] = [];
  const check = (limit: Limit, got: number, allowed: number, what: string) => {
    if (got > allowed + 1e-9)
      breaches.push({ limit, got, allowed, text: `${what} ${got.toFixed(1)} mm, allowed ${allowed.toFixed(1)} mm` });
  };
  check('former.longest', former.lengthMm, job.former.longestMm, 'the former would be');
  if (former.kind !== 'printed') return breaches;
  const round = Math.max(
    former.flange?.diameterMm ?? former.outsideDiameterMm,
    former.base?.diameterMm ?? 0,
    ...former.posts.map((post) => former.outsideDiameterMm + 2 * post.reachMm),
  );
  const ear = former.ears[0];
  if (ear !== undefined) {
    const across = 2 * ear.centreRadiusMm + ear.widthMm;
    check('printer.bed', across, Math.max(job.printer.bedXMm, job.printer.bedYMm), 'the former is across its ears');
  }
  check(
    'printer.bed',
    round,
    Math.min(job.printer.bedXMm, job.printer.bedYMm),
    former.base === null ? 'the former is across' : 'the base is across',
  );
  return breaches;
}

/** Screws that stand so near that their heads do not pass the rim. */
function circleBreaches(around: Around): Breach[] {
  const { kind, screwMm, screwCircleMm } = around.job.former;
  if (kind !== 'printed' || screwMm === null || screwCircleMm === null) return [];
  const widest = widestMm(around);
  const least = leastCircleMm(around, widest);
  if (screwCircleMm >= least - 1e-9) return [];
  const text = `screws on a circle of ${screwCircleMm} mm: heads of ${2 * screwMm} mm pass the former, ${widest.toFixed(1)} mm wide, from ${least} mm on`;
  return [{ limit: 'former.screw-circle', got: screwCircleMm, allowed: least, text, anyMethod: true }];
}

function heightBreach(job: Job, former: Former, why: string): Breach {
  const { heightMm } = job.printer;
  const text = `the former would stand ${former.lengthMm.toFixed(1)} mm on a printer of ${heightMm} mm, and ${why}`;
  return { limit: 'printer.height', got: former.lengthMm, allowed: heightMm, text };
}

/** Ribs that do not go round the former: too many, or of a depth that cannot be. */
function ribBreach({ job, ribs, outsideMm, overallMm }: Around): Breach {
  if (!ribs) throw new Error('a full body has no ribs');
  const { least, most } = ribDepths(ribs, outsideMm, overallMm, job.printer.lineMm);
  const { wallMm } = job.former;
  const round = `${ribs.count} ribs ${ribs.widthMm} mm wide on ${outsideMm} mm`;
  if (wallMm !== null && least <= most) {
    const text = `${round} may be ${(least + BEHIND_MM).toFixed(2)} to ${(most + BEHIND_MM).toFixed(2)} mm deep, the wall is ${wallMm} mm`;
    const allowed = Math.min(Math.max(wallMm, least + BEHIND_MM), most + BEHIND_MM);
    return { limit: 'former.wall', got: wallMm, allowed, text, anyMethod: true };
  }
  const allowed = mostRibs(outsideMm, ribs.widthMm, overallMm);
  const text = `${round} leave less air than plastic, or no room behind their notches for rings`;
  return { limit: 'former.ribs', got: ribs.count, allowed, text };
}

function wallBreaches(job: Job, former: Former): Breach[] {
  if (former.kind !== 'printed') return [];
  const left = former.wallMm - (former.groove?.depthMm ?? 0);
  const least = 2 * job.printer.lineMm;
  if (left >= least - 1e-9 && former.boreDiameterMm > 0) return [];
  const text = `wall ${former.wallMm} mm leaves ${left.toFixed(2)} mm under the winding, two lines are ${least.toFixed(2)} mm`;
  return [{ limit: 'former.wall', got: left, allowed: least, text }];
}

/**
 * A candidate with its taps brought out in one way. `correction` is what the coupled circuit found over the estimate; with
 * it the taps are placed, and whether they cover a band is left to the circuit.
 */
export function designWith(
  job: Job,
  demand: Demand,
  candidate: Candidate,
  method: TapMethod,
  layout: TapLayout,
  correction: NonNullable<Setting['correction']> = [],
): Outcome {
  const ribs = ribSection(job, candidate.wire.overallMm, method);
  const tension = (ribs === null ? tensionN : ribTensionN)(copperMm2(candidate.wire));
  const hand = job.winding.hand;
  const base = {
    job,
    grooved: candidate.pitch.kind === 'groove',
    overallMm: candidate.wire.overallMm,
    tensionN: tension.high,
    lugs: method.name === 'lug' && job.former.kind === 'printed' && ribs === null,
    ribs,
  };
  const start = startMm({ ...base, outsideMm: candidate.formerMm, pitchMm: candidate.pitch.mm });
  const setting: Setting = { job, demand, candidate, method, layout, startMm: start, correction };
  let settled: ReturnType<typeof settle> = 'no room';
  for (const freedom of freedomsOf(job, candidate)) {
    settled = settle(setting, freedom);
    if (settled !== 'no room') break;
  }
  if (settled === 'no room') throw new Error('the finish angle always finds room');
  if ('noPlaceFor' in settled) {
    const breach = { limit: 'want.taps', got: demand.taps, allowed: settled.noPlaceFor - 1 } as const;
    const beyond = `tap ${settled.noPlaceFor} of ${demand.taps} would lie beyond the whole coil: fewer switch positions are enough`;
    const near = `${settled.unit ? 'unit tap' : 'tap'} ${settled.noPlaceFor} finds no place: its neighbours are nearer than a ${method.name} allows`;
    if (settled.beyond) return { ok: false, breaches: [{ ...breach, text: beyond, anyMethod: true }] };
    return { ok: false, breaches: [{ ...breach, text: near }] };
  }
  const coil = coilOf(setting, settled, settled.turns);
  const turns = [...settled.taps, settled.turns];
  const around: Around = { ...base, outsideMm: settled.outsideMm, pitchMm: settled.pitchMm };
  const holes = holesFor(around, coil, turns, method, hand, settled.unitTaps);
  const placed = postsFor(around, turns, hand, settled.unitTaps);
  const posts = 'posts' in placed ? placed.posts : [];
  const plan = ribsFor(around, coil);
  if (plan === 'no room') return { ok: false, breaches: [ribBreach(around)] };
  const whole = formerFor(around, coil, turns, hand, { holes, posts, ribs: plan });
  const taps = tapsOf(setting, coil, turns);
  const breaches = [...sizeBreaches(job, whole), ...wallBreaches(job, whole), ...circleBreaches(around)];
  const split = splitOf({
    former: whole,
    holes,
    hand,
    overallMm: base.overallMm,
    axialMm: (turn) => coil.positionMm(turn),
    mostMm: job.former.longestMm,
    printer: job.printer,
  });
  if ('none' in split) breaches.push(heightBreach(job, whole, split.none));
  const former: Former = 'none' in split ? whole : { ...whole, joints: split.joints };
  if ('needMm' in placed)
    breaches.push({
      limit: 'want.taps',
      got: placed.needMm,
      allowed: placed.haveMm,
      text: `the posts of ${turns.length - 1 + settled.unitTaps.length} lugs take ${placed.needMm.toFixed(1)} mm round the foot, there are ${placed.haveMm.toFixed(1)} mm`,
    });
  if (correction.length === 0) breaches.push(...bandBreaches(demand, taps));
  const off = Math.abs(taps[taps.length - 1]!.deviation);
  if (demand.units !== null) breaches.push(...switchBreaches(setting, coil, settled.unitTaps, turns[0]!));
  else if (former.kind === 'printed' && off > wholeOff(coil)) {
    const allowed = wholeOff(coil);
    const text = `taps keep the finish from its place: the whole coil would be ${(off * 100).toFixed(2)} % off, ${+(allowed * 100).toFixed(2)} % at most`;
    breaches.push({ limit: 'want.taps', got: off, allowed, text });
  }
  const tight = tightestPair(holes, former.boreDiameterMm);
  if (tight !== null)
    breaches.push({
      limit: 'holes',
      got: tight.leftMm,
      allowed: LEAST_WEB_MM,
      text: `holes ${tight.a.label} and ${tight.b.label} leave ${tight.leftMm.toFixed(2)} mm between them`,
    });
  if (breaches.length > 0) return { ok: false, breaches };
  const wireM = coil.wireM(coil.turns) + method.loopM * (settled.taps.length + settled.unitTaps.length);
  const metrics: Metrics = {
    lossFactor: taps.reduce((sum, tap) => sum + tap.lossFactor, 0) / taps.length,
    volumeMm3: (Math.PI / 4) * former.outsideDiameterMm ** 2 * former.lengthMm,
    lengthMm: former.lengthMm,
    diameterMm: former.outsideDiameterMm,
    wireM,
    massG: copperG(candidate.wire, wireM),
    worstTap: Math.max(...taps.map((tap) => Math.abs(tap.deviation))),
    turns: coil.turns,
    spread: inductanceSpread(job, candidate),
  };
  return {
    ok: true,
    design: { candidate, coil, method, layout, taps, unitTaps: settled.unitTaps, former, holes, tension, metrics },
  };
}

/**
 * The best design of a candidate: the usual tap method first, in one line when the taps clear one another there, else
 * staggered; `closest taps` looks at both and takes the closer. Without one, what the first method breaks.
 */
export function designOf(job: Job, demand: Demand, candidate: Candidate): Outcome {
  const asked = job.winding.tapLayout;
  const layouts: readonly TapLayout[] = asked === 'auto' ? ['in line', 'staggered'] : [asked];
  const found: Design[] = [];
  let breaches: readonly Breach[] = [
    { limit: 'winding.tap-method', got: 0, allowed: 0, text: `${job.winding.tapMethod} is not possible at this pitch` },
  ];
  for (const method of candidate.methods) {
    for (const layout of layouts) {
      const outcome = designWith(job, demand, candidate, method, layout);
      if (!outcome.ok) breaches = outcome.breaches;
      else if (job.prefer === 'closest taps') found.push(outcome.design);
      else return outcome;
    }
    if (found.length > 0) break;
    // Another tap method helps where a tap found no place or holes collide, not against a former that is too long.
    const byMethod = ({ limit, anyMethod }: Breach) => !anyMethod && (limit === 'want.taps' || limit === 'holes');
    if (!breaches.some(byMethod)) break;
  }
  const best = found.sort((a, b) => a.metrics.worstTap - b.metrics.worstTap)[0];
  return best === undefined ? { ok: false, breaches } : { ok: true, design: best };
}

const LAYOUTS: readonly TapLayout[] = ['in line', 'staggered'];

/** The same candidate with its taps brought out in every other way that fits. */
export function variantsOf(job: Job, demand: Demand, design: Design): Design[] {
  const list: Design[] = [];
  for (const method of design.candidate.methods)
    for (const layout of demand.units === null ? LAYOUTS : [design.layout]) {
      if (method.name === design.method.name && layout === design.layout) continue;
      const outcome = designWith(job, demand, design.candidate, method, layout);
      if (outcome.ok) list.push(outcome.design);
    }
  return list;
}
