/**
 * The best few, looked at more closely than a search can afford: loss by the field of every turn, ranges by the coupled
 * circuit of the dead turns. The taps of a band are placed once more by those ranges.
 */
import { atFrequency, type Span, spanOf } from '../coil/positions.ts';
import { WorkingCoil } from '../coil/working-coil.ts';
import type { Job } from '../job/job.ts';
import { capacitanceFor } from '../physics/tuning.ts';
import type { Former } from '../record/schema.ts';
import { findMaterial } from '../stock/materials.ts';
import { type Demand, setCapacitance } from './demand.ts';
import { bandBreaches, type Design, designWith, type Outcome } from './design.ts';
import { plasticShare } from './ribs.ts';
import { sectionAt } from './settle.ts';
import { actingSelfPf } from './working.ts';

/** Positions that are looked at to rank by loss; all of them when there are no more. */
const RANKED_POSITIONS = 4;
/** Families of wire and pitch that are compared by the field, and designs of the best family after that. */
export const FAMILIES = 5;
const OF_FAMILY = 5;
/** An estimate this much worse than the best is not looked at: it errs by less. */
const LOSS_MARGIN = 1.3;
const ROUNDS = 5;

export interface Ranked {
  readonly design: Design;
  /** Mean 1/Q over the positions looked at, by the field of every turn. */
  readonly lossFactor: number;
}

/** Loss tangent of the former's material; of a ribbed one as much of it as plastic takes of its surface. */
export function lossTangentOf(job: Job, former: Former): number {
  const found = findMaterial(job.former.material);
  return (found.ok ? found.material.lossTangent : 0) * plasticShare(former);
}

export function workingCoilOf(job: Job, design: Design): WorkingCoil {
  const around = { leadPf: job.set?.leadPf ?? 0, earthed: job.winding.earthed, celsius: job.celsius };
  return new WorkingCoil(
    design.coil,
    design.taps.map((tap) => tap.turn),
    around,
    design.unitTaps,
  );
}

/** Mean 1/Q of a design by the field of every turn, at the frequencies at which its positions work. */
export function fieldLoss(job: Job, design: Design): number {
  const coil = workingCoilOf(job, design);
  const { taps } = design;
  const count = Math.min(taps.length, RANKED_POSITIONS);
  const looked = Array.from(
    { length: count },
    (_, i) => taps[count === 1 ? taps.length - 1 : Math.round((i * (taps.length - 1)) / (count - 1))]!,
  );
  const tangent = lossTangentOf(job, design.former);
  const rest = job.set?.switch ?? 'open';
  const losses = looked.map((tap) => 1 / atFrequency(coil, tap.turn, tap.workingKhz, rest, tangent).q);
  return losses.reduce((sum, loss) => sum + loss, 0) / losses.length;
}

/** The designs nearest to the least loss, ranked by the field; the best family's runners-up among them. */
export function rankedByField(job: Job, designs: readonly Design[]): Ranked[] {
  const sorted = [...designs].sort((a, b) => a.metrics.lossFactor - b.metrics.lossFactor);
  const limit = (sorted[0]?.metrics.lossFactor ?? 0) * LOSS_MARGIN;
  const near = sorted.filter((design) => design.metrics.lossFactor <= limit);
  const firsts = near.filter((one, i) => near.findIndex((two) => two.candidate.family === one.candidate.family) === i);
  const ranked = firsts.slice(0, FAMILIES).map((design) => ({ design, lossFactor: fieldLoss(job, design) }));
  ranked.sort((a, b) => a.lossFactor - b.lossFactor);
  const family = ranked[0]?.design.candidate.family;
  const more = near.filter((one) => one.candidate.family === family && one !== ranked[0]?.design).slice(0, OF_FAMILY);
  ranked.push(...more.map((design) => ({ design, lossFactor: fieldLoss(job, design) })));
  return ranked.sort((a, b) => a.lossFactor - b.lossFactor);
}

/** What the coupled circuit finds over the estimate, as capacitance across each position. */
function correctionOf(job: Job, design: Design, working: WorkingCoil): { turn: number; pf: number }[] {
  const set = job.set!;
  const { outPf, inPf } = setCapacitance(set);
  const { coil } = design;
  const turns = design.taps.map((tap) => tap.turn);
  return turns.map((turn, i) => {
    const whole = i === turns.length - 1;
    // The whole coil is placed by its lower edge, the taps by their upper ones.
    const pf = whole ? inPf : outPf;
    const first = working.tuned(turn, pf, set.switch);
    const { kHz } = working.tuned(turn, pf, set.switch, working.crowding(turn, first.kHz));
    const acting = capacitanceFor(kHz * 1e3, coil.inductanceUh(turn) * 1e-6) * 1e12 - pf;
    return { turn, pf: acting - actingSelfPf(job, sectionAt(coil, turn, coil.turns, turns.slice(0, -1)), pf) };
  });
}

function sameTaps(a: Design, b: Design): boolean {
  return a.taps.every((tap, i) => Math.abs(tap.turn - b.taps[i]!.turn) < 1e-6);
}

/** A design whose taps stand by the ranges of the coupled circuit, or what it then breaks. As it is when it is no band's. */
export function refine(job: Job, demand: Demand, design: Design): Outcome {
  if (demand.kind !== 'band' || job.set === null) return { ok: true, design };
  let current = design;
  let working = workingCoilOf(job, current);
  for (let round = 0; round < ROUNDS; round++) {
    const correction = correctionOf(job, current, working);
    const outcome = designWith(job, demand, current.candidate, current.method, current.layout, correction);
    if (!outcome.ok) return outcome;
    const settled = sameTaps(current, outcome.design);
    current = outcome.design;
    working = workingCoilOf(job, current);
    if (settled) break;
  }
  const { switch: rest } = job.set;
  const tuning = setCapacitance(job.set);
  const spans: Span[] = current.taps.map((tap) => spanOf(working, tap.turn, tuning, rest));
  const taps = current.taps.map((tap, i) => {
    const [lowKhz, highKhz] = [spans[i]!.low.kHz, spans[i]!.high.kHz];
    return { ...tap, coverage: { lowKhz, highKhz } };
  });
  const breaches = bandBreaches(demand, taps);
  return breaches.length > 0 ? { ok: false, breaches } : { ok: true, design: { ...current, taps, working } };
}
