/**
 * The smallest change of each limit of a job that would alone give it a coil. Every change offered has been searched for in
 * full; a limit that cannot help alone is not offered.
 */
import type { Job, Want } from '../job/job.ts';
import { MOST_TAPS } from '../job/schema.ts';
import type { Former } from '../record/schema.ts';
import { allWires } from '../stock/wires.ts';
import { type Candidate, leastGroovePitchMm, wiresFor } from './candidates.ts';
import { positionsFor } from './demand.ts';
import { type Design, designOf } from './design.ts';
import { fits, fitsOf, nearestCount, nearestFit, type Order, shortest, threeDigits } from './first-fit.ts';
import { demandFor, hasCoil, longestMm } from './search.ts';
import { wireHoleMm } from './tap-methods.ts';

interface Change {
  readonly text: string;
  readonly job: Job;
}

const FREE_MM = 1e4;
/** Candidates worked out where one fit has to be compared with another, and where a wire is looked for. */
const TO_COMPARE = 24;
const TO_FIND_WIRE = 60;
const THICKEST_WALL_MM = 5;
/** As the job's own limit. */
const FEWEST_RIBS = 6;

const withFormer = (job: Job, former: Partial<Job['former']>): Job => ({
  ...job,
  former: { ...job.former, ...former },
});
const withPrinter = (job: Job, printer: Partial<Job['printer']>): Job => ({
  ...job,
  printer: { ...job.printer, ...printer },
});
const withWinding = (job: Job, winding: Partial<Job['winding']>): Job => ({
  ...job,
  winding: { ...job.winding, ...winding },
});

/** Key that holds the length down: a printed former that names no length has the height of the printer. */
export function lengthKey(job: Job): 'former.longest' | 'printer.height' {
  const printed = job.former.kind === 'printed';
  return printed && ('former.longest' in job.assumed || longestMm(job) < job.former.longestMm)
    ? 'printer.height'
    : 'former.longest';
}

function shortestFit(job: Job): { former: Former; how: string } | null {
  let fit: Design | null = null;
  for (const design of fitsOf(job, shortest, TO_COMPARE))
    if (fit === null || design.former.lengthMm < fit.former.lengthMm) fit = design;
  if (fit === null) return null;
  const { former, candidate } = fit;
  const sections = former.joints.length > 0 ? `, printed in ${former.joints.length + 1} sections` : '';
  return { former, how: `(${candidate.wire.name} on ${former.outsideDiameterMm} mm${sections})` };
}

/** A longer former, in sections where the printer is lower. */
function longerFormer(job: Job): Change[] {
  const fit = shortestFit(withFormer(job, { longestMm: FREE_MM }));
  if (fit === null || fit.former.lengthMm <= job.former.longestMm) return [];
  const mm = fit.former.lengthMm;
  return [{ text: `raise former.longest to ${mm} mm ${fit.how}`, job: withFormer(job, { longestMm: mm }) }];
}

/** A printer that takes the former whole; the length follows where the job is silent. */
function tallerPrinter(job: Job): Change[] {
  if (job.former.kind !== 'printed') return [];
  const follows = 'former.longest' in job.assumed;
  if (!follows && job.former.longestMm <= job.printer.heightMm) return [];
  const upTo = (mm: number) =>
    withPrinter(follows ? withFormer(job, { longestMm: mm }) : job, { heightMm: Math.max(mm, job.printer.heightMm) });
  const fit = shortestFit(upTo(FREE_MM));
  if (fit === null || fit.former.lengthMm <= job.printer.heightMm) return [];
  const mm = fit.former.lengthMm;
  return [{ text: `raise printer.height to ${mm} mm ${fit.how}`, job: upTo(mm) }];
}

function otherDiameter(job: Job): Change[] {
  const wanted = job.former.diametersMm;
  const all = 'listMm' in wanted ? wanted.listMm : [wanted.lowMm, wanted.highMm];
  const [low, high] = [Math.min(...all), Math.max(...all)];
  const at = (mm: number) => withFormer(job, { diametersMm: { listMm: [mm] } });
  const widest = job.former.kind === 'printed' ? Math.min(job.printer.bedXMm, job.printer.bedYMm) - 1 : 400;
  const changes: Change[] = [];
  const above = firstOf(high, Math.min(widest, high * 4), (mm) => fits(at(mm)));
  if (above !== null) changes.push({ text: `raise former.outside-diameter to ${above} mm`, job: at(above) });
  const below = firstOf(low, Math.max(8, low / 5), (mm) => fits(at(mm)));
  if (below !== null) changes.push({ text: `lower former.outside-diameter to ${below} mm`, job: at(below) });
  return changes;
}

/** The first whole millimetre from `from` towards `to` that fits; steps of 5 % first, then the gap in single steps. */
function firstOf(from: number, to: number, fitsAt: (mm: number) => boolean): number | null {
  const up = to > from;
  const far = (mm: number) => (up ? mm > to : mm < to);
  let last = from;
  for (let mm = from; !far(mm); ) {
    mm = up ? Math.ceil(mm * 1.05 + 0.5) : Math.floor(mm / 1.05 - 0.5);
    if (far(mm)) return null;
    if (fitsAt(mm)) {
      for (let fine = up ? Math.floor(last) + 1 : Math.ceil(last) - 1; up ? fine < mm : fine > mm; fine += up ? 1 : -1)
        if (fitsAt(fine)) return fine;
      return mm;
    }
    last = mm;
  }
  return null;
}

function otherWire(job: Job): Change[] {
  if (job.wires === 'stock') return [];
  const named = job.wires;
  const distance: Order = ({ wire }: Candidate) =>
    Math.min(...named.map((one) => Math.abs(Math.log(wire.overallMm / one.overallMm))));
  const names = new Set(named.map((wire) => wire.name));
  const wires = allWires().filter((wire) => !names.has(wire.name) && wire.bareMm >= 0.1);
  for (const { candidate } of fitsOf({ ...job, wires }, distance, TO_FIND_WIRE)) {
    const { wire } = candidate;
    return [
      { text: `use ${wire.name} (${wire.overallMm.toFixed(3)} mm over its covering)`, job: { ...job, wires: [wire] } },
    ];
  }
  return [];
}

/** So many tens more or fewer are tried. */
const TENS_TRIED = 6;

type WithTaps = (changed: { taps: number }) => Job;

const fewerTaps = (taps: number, wish: WithTaps) =>
  nearestCount(taps, 2, (count) => fits(wish({ taps: count }), TO_COMPARE));

/** The number of tens contacts nearest to `taps`, more or fewer, that makes the turns which the inductance needs. */
function otherTens(taps: number, wish: WithTaps): number | null {
  for (let step = 1; step <= TENS_TRIED; step++)
    for (const count of [taps - step, taps + step])
      if (count >= 2 && count <= MOST_TAPS && fits(wish({ taps: count }))) return count;
  return null;
}

function otherRange(job: Job, want: Extract<Want, { kind: 'range' }>): Change[] {
  const changes: Change[] = [];
  const wish = (changed: Partial<typeof want>): Job => ({ ...job, want: { ...want, ...changed } });
  const taps = job.winding.units === null ? fewerTaps(want.taps, wish) : otherTens(want.taps, wish);
  if (taps !== null)
    changes.push({ text: `${taps < want.taps ? 'lower' : 'raise'} want.taps to ${taps}`, job: wish({ taps }) });
  const top = nearestFit(want.highUh, want.lowUh * 1.1, 0.9, (highUh) => fits(wish({ highUh })));
  if (top !== null) {
    const highUh = threeDigits(top, 'down');
    changes.push({ text: `lower the upper end of want.inductance to ${highUh} µH`, job: wish({ highUh }) });
  }
  const bottom = nearestFit(want.lowUh, want.highUh / 1.1, 1.12, (lowUh) => fits(wish({ lowUh })));
  if (bottom !== null) {
    const lowUh = threeDigits(bottom, 'up');
    changes.push({ text: `raise the lower end of want.inductance to ${lowUh} µH`, job: wish({ lowUh }) });
  }
  return changes;
}

function otherBand(job: Job, want: Extract<Want, { kind: 'band' }>): Change[] {
  if (job.set === null) return [];
  const changes: Change[] = [];
  const wish = (changed: Partial<typeof want>): Job => ({ ...job, want: { ...want, ...changed } });
  if (want.taps !== null) {
    const fewest = positionsFor(want, job.set, 0);
    for (let taps = Math.max(want.taps + 1, fewest); taps <= Math.min(fewest + 2, MOST_TAPS); taps++)
      if (fits(wish({ taps }), TO_COMPARE)) {
        changes.push({ text: `raise want.taps to ${taps}`, job: wish({ taps }) });
        break;
      }
    const fewer =
      want.taps > fewest ? nearestCount(want.taps, fewest, (taps) => fits(wish({ taps }), TO_COMPARE)) : null;
    if (fewer !== null) changes.push({ text: `lower want.taps to ${fewer}`, job: wish({ taps: fewer }) });
  }
  const percent = nearestFit(want.overlap * 100, 0.2, 0.9, (value) => fits(wish({ overlap: value / 100 })));
  const least = percent === null ? 0 : Math.floor(percent * 10) / 10;
  if (want.overlap > 0) changes.push({ text: `lower want.overlap to ${least} %`, job: wish({ overlap: least / 100 }) });
  const high = nearestFit(want.highKhz, want.lowKhz * 1.05, 0.95, (highKhz) => fits(wish({ highKhz })));
  if (high !== null) {
    const highKhz = threeDigits(high, 'down');
    changes.push({ text: `lower the upper end of want.band to ${highKhz} kHz`, job: wish({ highKhz }) });
  }
  return changes;
}

function otherWish(job: Job): Change[] {
  if (job.want.kind === 'range') return otherRange(job, job.want);
  return job.want.kind === 'band' ? otherBand(job, job.want) : [];
}

/** The nearest pitch above a stated one that has room for a groove, and for a hole of two wires where loops are drawn in. */
function otherPitches(job: Job): number[] {
  const { pitch, tapMethod } = job.winding;
  if (typeof pitch !== 'number' || job.former.kind !== 'printed') return [];
  const { layerMm } = job.printer;
  const needed = wiresFor(job).map(({ overallMm }) => {
    const hole = tapMethod === 'drawn in' ? (wireHoleMm(overallMm, 2) + overallMm) / 2 : 0;
    return Math.max(leastGroovePitchMm(overallMm, layerMm), layerMm * Math.ceil(hole / layerMm - 1e-9));
  });
  const above = needed.filter((mm) => mm > pitch + 1e-9).sort((a, b) => a - b)[0];
  return above === undefined ? [] : [Math.round(above * 1e4) / 1e4];
}

/** What the job asks of the way of winding, given up. */
function otherWinding(job: Job): Change[] {
  const { pitch, tapMethod, tapLayout } = job.winding;
  const changes: Change[] = [];
  for (const mm of otherPitches(job))
    changes.push({ text: `set winding.pitch to ${mm} mm`, job: withWinding(job, { pitch: mm }) });
  if (pitch !== 'any') changes.push({ text: 'set winding.pitch to any', job: withWinding(job, { pitch: 'any' }) });
  if (tapMethod !== 'auto')
    changes.push({ text: 'set winding.tap-method to auto', job: withWinding(job, { tapMethod: 'auto' }) });
  if (tapLayout !== 'auto')
    changes.push({ text: 'set winding.tap-layout to auto', job: withWinding(job, { tapLayout: 'auto' }) });
  return changes;
}

function otherPrint(job: Job): Change[] {
  if (job.former.kind !== 'printed') return [];
  const changes: Change[] = [];
  const { wallMm } = job.former;
  if (wallMm !== null && job.former.ribs === null) {
    const thicker = nearestFit(wallMm, THICKEST_WALL_MM, 1.25, (wall) => fits(withFormer(job, { wallMm: wall })));
    if (thicker !== null) {
      const wall = Math.ceil(thicker * 100 - 1e-9) / 100;
      changes.push({ text: `raise former.wall to ${wall} mm`, job: withFormer(job, { wallMm: wall }) });
    }
  }
  // Who states screws is not told to leave them out: that would take more than one change.
  const stated = 'former.screw' in job.given || job.former.screwCircleMm !== null;
  if (job.former.mounting !== 'none' && !stated)
    changes.push({
      text: 'set former.mounting to none',
      job: withFormer(job, { mounting: 'none', screwMm: null, screwCircleMm: null }),
    });
  return [...changes, ...otherCircle(job), ...largerBed(job)];
}

/** Fewer ribs, of any depth; or a wall all round. */
function otherRibs(job: Job): Change[] {
  const { ribs, wallMm } = job.former;
  if (ribs === null) return [];
  const changes: Change[] = [];
  for (let count = ribs - 1; count >= FEWEST_RIBS; count--) {
    if (!fits(withFormer(job, { ribs: count }))) continue;
    changes.push({ text: `lower former.ribs to ${count}`, job: withFormer(job, { ribs: count }) });
    break;
  }
  if (wallMm !== null) changes.push({ text: 'leave former.wall out', job: withFormer(job, { wallMm: null }) });
  return [...changes, { text: 'set former.body to full', job: withFormer(job, { body: 'full', ribs: null }) }];
}

/** The circle of screws nearest to the one stated that passes the former, and that the bed takes. */
function otherCircle(job: Job): Change[] {
  const { screwCircleMm } = job.former;
  if (screwCircleMm === null) return [];
  const free = withFormer(job, { screwCircleMm: null });
  for (const { former } of fitsOf(free, ({ formerMm }) => formerMm, 1)) {
    const [ear] = former.ears;
    const least = former.base?.circleDiameterMm ?? 2 * (ear?.centreRadiusMm ?? 0);
    const { bedXMm, bedYMm } = job.printer;
    const most =
      former.base === null
        ? Math.max(bedXMm, bedYMm) - (ear?.widthMm ?? 0)
        : Math.min(bedXMm, bedYMm) - (former.base.diameterMm - former.base.circleDiameterMm);
    const mm: number = Math.floor(10 * Math.max(least, Math.min(screwCircleMm, most)) + 1e-6) / 10;
    if (mm !== screwCircleMm)
      return [
        {
          text: `${mm > screwCircleMm ? 'raise' : 'lower'} former.screw-circle to ${mm} mm`,
          job: withFormer(job, { screwCircleMm: mm }),
        },
      ];
  }
  return [];
}

function largerBed(job: Job): Change[] {
  const free = withPrinter(job, { bedXMm: FREE_MM, bedYMm: FREE_MM });
  for (const { candidate, former } of fitsOf(free, ({ formerMm }) => formerMm, 1)) {
    const outcome = designOf(job, demandFor(job), candidate);
    if (outcome.ok) return [];
    const { bedXMm, bedYMm } = job.printer;
    const over = outcome.breaches.filter(({ limit }) => limit === 'printer.bed').map(({ got }) => Math.ceil(got));
    // Ears lie along the longer side; across them, and without them, the former needs the shorter one.
    const long = Math.max(bedXMm, bedYMm, ...over);
    const round = former.ears.length === 0 ? over : over.slice(1);
    const short = Math.max(Math.min(bedXMm, bedYMm), ...round);
    const [x, y] = bedXMm >= bedYMm ? [long, short] : [short, long];
    return [{ text: `raise printer.bed to ${x} x ${y} mm`, job: withPrinter(job, { bedXMm: x, bedYMm: y }) }];
  }
  return [];
}

/** Every change that alone would do, in words. */
export function changesFor(job: Job): string[] {
  const all = [longerFormer, tallerPrinter, otherDiameter, otherWire, otherWish, otherWinding, otherRibs, otherPrint];
  return all
    .flatMap((changesOf) => changesOf(job))
    .filter((change) => hasCoil(change.job))
    .map(({ text }) => text);
}
