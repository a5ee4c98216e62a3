/**
 * When nothing fits: which limit failed, by how much, and the smallest change of each limit that alone would make it fit.
 * Every change offered has been worked out in full; a limit that cannot help alone is not offered.
 */
import { Fault } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { allWires } from '../stock/wires.ts';
import { type Candidate, candidatesOf } from './candidates.ts';
import { type Breach, type Design, designOf } from './design.ts';
import { estimateOf, sizeOf } from './estimate.ts';
import { demandFor, longestMm, type NotFound } from './search.ts';

/** Designs tried for one changed job, the shortest former first. */
const TRIES = 10;

/** The first design that fits a changed job, the candidates ordered by how nearly they should. */
function firstFit(job: Job, order: (candidate: Candidate, lengthMm: number) => number): Design | null {
  const demand = demandFor(job);
  const sized = candidatesOf(job)
    .map((candidate) => sizeOf(job, demand, candidate))
    .filter((size) => size !== null)
    .filter((size) => size.formerLengthMm <= longestMm(job) * 1.03 + 2 && size.turns >= demand.taps * 0.5)
    .sort((a, b) => order(a.candidate, a.formerLengthMm) - order(b.candidate, b.formerLengthMm))
    .slice(0, 4 * TRIES)
    .map((size) => estimateOf(job, demand, size))
    .filter((one) => one.firstTapTurns > 0.45)
    .slice(0, TRIES);
  for (const one of sized) {
    const outcome = designOf(job, demand, one.candidate);
    if (outcome.ok) return outcome.design;
  }
  return null;
}

const shortest = (_: Candidate, lengthMm: number) => lengthMm;

function longerFormer(job: Job): string | null {
  const free = { ...job, former: { ...job.former, longestMm: 1e4 }, printer: { ...job.printer, heightMm: 1e4 } };
  const fit = firstFit(free, shortest);
  if (fit === null || fit.former.lengthMm <= longestMm(job)) return null;
  const needed = `${fit.former.lengthMm} mm`;
  const printer = job.former.kind === 'printed' && fit.former.lengthMm > job.printer.heightMm;
  const short = fit.former.lengthMm > job.former.longestMm;
  const keys = [short ? 'former.longest' : '', printer ? 'printer.height' : ''].filter(Boolean).join(' and ');
  return `raise ${keys} to ${needed} (${fit.candidate.wire.name} on ${fit.former.outsideDiameterMm} mm)`;
}

function otherDiameter(job: Job): string[] {
  const wanted = job.former.diametersMm;
  const low = 'listMm' in wanted ? Math.min(...wanted.listMm) : wanted.lowMm;
  const high = 'listMm' in wanted ? Math.max(...wanted.listMm) : wanted.highMm;
  const fitsAt = (mm: number) =>
    firstFit({ ...job, former: { ...job.former, diametersMm: { listMm: [mm] } } }, shortest) !== null;
  const texts: string[] = [];
  const bed = job.former.kind === 'printed' ? Math.min(job.printer.bedXMm, job.printer.bedYMm) : 400;
  const above = firstOf(high, Math.min(bed, high * 4), fitsAt);
  if (above !== null) texts.push(`raise former.outside-diameter to ${above} mm`);
  const below = firstOf(low, Math.max(8, low / 5), fitsAt);
  if (below !== null) texts.push(`lower former.outside-diameter to ${below} mm`);
  return texts;
}

/** The first whole millimetre from `from` towards `to` at which `fits`; steps of 5 % first, then the gap in single steps. */
function firstOf(from: number, to: number, fits: (mm: number) => boolean): number | null {
  const up = to > from;
  const far = (mm: number) => (up ? mm > to : mm < to);
  let last = from;
  for (let mm = from; !far(mm); ) {
    mm = up ? Math.ceil(mm * 1.05 + 0.5) : Math.floor(mm / 1.05 - 0.5);
    if (far(mm)) return null;
    if (fits(mm)) {
      for (let fine = up ? Math.floor(last) + 1 : Math.ceil(last) - 1; up ? fine < mm : fine > mm; fine += up ? 1 : -1)
        if (fits(fine)) return fine;
      return mm;
    }
    last = mm;
  }
  return null;
}

function otherWire(job: Job): string | null {
  if (job.wires === 'stock') return null;
  const named = job.wires;
  const distance = (candidate: Candidate) =>
    Math.min(...named.map((wire) => Math.abs(Math.log(candidate.wire.overallMm / wire.overallMm))));
  const names = new Set(named.map((wire) => wire.name));
  const wires = allWires().filter((wire) => !names.has(wire.name) && wire.bareMm >= 0.1);
  const fit = firstFit({ ...job, wires }, distance);
  return fit === null ? null : `use ${fit.candidate.wire.name} (${fit.candidate.wire.overallMm} mm over its covering)`;
}

function otherWish(job: Job): string[] {
  const { want } = job;
  const texts: string[] = [];
  const fitsWith = (changed: Job['want']) => firstFit({ ...job, want: changed }, shortest) !== null;
  const tapCount = want.kind === 'list' ? want.inductancesUh.length : want.taps;
  if (want.kind === 'range') {
    for (let taps = want.taps - 1; taps >= 2; taps--)
      if (fitsWith({ ...want, taps })) {
        texts.push(`lower want.taps to ${taps}`);
        break;
      }
    const top = bisect(want.lowUh * 1.05, want.highUh, (highUh) => fitsWith({ ...want, highUh }));
    if (top !== null) texts.push(`lower the upper end of want.inductance to ${top.toPrecision(3)} µH`);
    const bottom = bisect(want.highUh / 1.05, want.lowUh, (lowUh) => fitsWith({ ...want, lowUh }));
    if (bottom !== null) texts.push(`raise the lower end of want.inductance to ${bottom.toPrecision(3)} µH`);
  }
  if (want.kind === 'band') {
    for (let taps = (tapCount ?? demandFor(job).taps) + 1; taps <= 24 && Number.isFinite(taps); taps++)
      if (fitsWith({ ...want, taps })) {
        texts.push(`raise want.taps to ${taps}`);
        break;
      }
    const overlap = bisect(0, want.overlap, (value) => fitsWith({ ...want, overlap: value }));
    if (overlap !== null && overlap > 0)
      texts.push(`lower want.overlap to ${(Math.floor(overlap * 1000) / 10).toFixed(1)} %`);
    else if (want.overlap > 0 && fitsWith({ ...want, overlap: 0 })) texts.push('lower want.overlap to 0 %');
  }
  return texts;
}

/** The value nearest to `bad` at which `fits`, between `good` (tried first) and `bad` (known not to); null if not even there. */
function bisect(good: number, bad: number, fits: (value: number) => boolean): number | null {
  if (!fits(good)) return null;
  let near = good;
  let far = bad;
  for (let k = 0; k < 7; k++) {
    const middle = (near + far) / 2;
    if (fits(middle)) near = middle;
    else far = middle;
  }
  return near;
}

/** What to call the limit that failed: that of the candidate which came nearest, else the length. */
function worst(job: Job, notFound: NotFound): { key: string; got: string } {
  const excess = (breach: Breach) => Math.abs(breach.got - breach.allowed) / Math.max(Math.abs(breach.allowed), 1e-9);
  const nearest = [...notFound.breaches].sort((a, b) => excess(a) - excess(b))[0];
  if (nearest !== undefined) return { key: nearest.limit, got: nearest.text };
  if (notFound.tried === 0) {
    const key = job.wires === 'stock' ? 'former.outside-diameter' : 'wire';
    return { key, got: 'no wire can be wound on this former at a pitch that the job permits' };
  }
  const demand = demandFor(job);
  const sizes = candidatesOf(job)
    .map((candidate) => sizeOf(job, demand, candidate))
    .filter((size) => size !== null);
  const short = sizes.sort((a, b) => a.formerLengthMm - b.formerLengthMm)[0];
  if (short === undefined)
    return { key: 'winding.tap-method', got: `${job.winding.tapMethod} is not possible with any pitch of the job` };
  if (short.formerLengthMm > longestMm(job)) {
    const over = short.formerLengthMm - longestMm(job);
    const got = `the shortest former, ${short.candidate.wire.name} on ${short.candidate.formerMm} mm, is about ${short.formerLengthMm.toFixed(0)} mm long, ${over.toFixed(0)} mm over the limit of ${longestMm(job)} mm`;
    return { key: job.former.longestMm <= longestMm(job) ? 'former.longest' : 'printer.height', got };
  }
  const got = `${demand.taps} taps from ${demand.text}: the lowest inductance takes less than half a turn on ${short.candidate.formerMm} mm`;
  return { key: 'want.taps', got };
}

/** The fault for a job that nothing meets. */
export function refusal(job: Job, notFound: NotFound): Fault {
  const { key, got } = worst(job, notFound);
  const changes = [longerFormer(job), ...otherDiameter(job), otherWire(job), ...otherWish(job)].filter(
    (text) => text !== null,
  );
  const todo =
    changes.length === 0
      ? 'no change of a single limit would do; widen several of former.longest, former.outside-diameter, wire and want together'
      : `any one of these alone would do: ${changes.join('; ')}`;
  const expected = `a coil for ${notFound.demand.text} inside the limits of the job (${notFound.tried} combinations of wire, former and pitch were tried)`;
  return new Fault(4, { code: 'nothing-fits', place: { key }, got, expected, todo });
}
