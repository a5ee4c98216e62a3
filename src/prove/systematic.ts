/**
 * What all coils of a kind have in common: the most likely error of diameter, pitch and gaps, of the meter and its leads, of known
 * capacitors, given every reading, with 95 % limits.
 *
 *     readings ──> slots with what was expected ──> slips, miscounts, strangers ──> mixed model ──> far ones left out ──> what is off
 *      (types)      (systematic-model)               out (-left-out, -strangers)     (-fit, -columns,  (-left-out)         (here)
 *                                                                                     -mixed)
 *
 * Least squares with priors (the most likely values a posteriori, JCGM 101:2008 names the state of knowledge that limits stand for):
 * instruments may be off as the shop states, the bench by four times the record's spread. What the readings cannot separate stays
 * near its prior and keeps honest limits, so that a meter of 1 % never proves a former of half a percent by itself. Coils differ from one another in
 * diameter and pitch of their own, readings by noise; both are estimated, so that limits shrink with coils and not with readings of one coil.
 * Coverage by simulation with the full physics: tests/prove/systematic.test.ts.
 */
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { SYSTEMATIC } from '../../templates/wording/systematic.ts';
import { cholesky, dot, solveWith } from '../match/linear.ts';
import { fixed, signed } from '../quantity/decimals.ts';
import { tidy } from '../quantity/format.ts';
import { decimals, significant } from '../record/rounding.ts';
import { chanceOfChiSquare } from './chance.ts';
import { type Column, Z95 } from './systematic-columns.ts';
import { expectedOf, type KindFit } from './systematic-fit.ts';
import { fitRobust, fittingOf, type LeftOut } from './systematic-left-out.ts';
import { WEIGHT } from './systematic-mixed.ts';
import { deviationOf, type KindModel, modelOf, type Slot } from './systematic-model.ts';
import { FITTED, type Systematic, UNKNOWNS, type Unknown, type UnknownName } from './systematic-schema.ts';
import { withoutStrangers } from './systematic-strangers.ts';
import type { KindReadings } from './types.ts';

export type { Systematic, Unknown } from './systematic-schema.ts';

/** Two unknowns this correlated are not told apart. */
const CORRELATED = 0.7;
/** 95 % of chi-square with two degrees. */
const TOGETHER = 5.991;
/** A misfit rarer than this is told; and the tap that stands out by so many standard deviations. */
const RARE = 0.01;
const STANDS_OUT = 3;

const UNIT: Readonly<Record<UnknownName, Unknown['unit']>> = {
  diameter: 'mm',
  pitch: '%',
  gaps: '%',
  meter: '%',
  leads: 'µH',
  capacitor: '%',
  strays: 'pF',
};

const isUnknown = (column: Column): column is Column & { readonly name: UnknownName } =>
  (UNKNOWNS as readonly string[]).includes(column.name);

/** What was read in a slot, all coils together. */
interface Common {
  readonly slot: Slot;
  readonly count: number;
  readonly mean: number;
  readonly rest: number;
  readonly weight: number;
}

interface Fitted {
  readonly model: KindModel;
  readonly found: KindFit;
  readonly coils: number;
  readonly common: readonly Common[];
}

/** Half width of the limits, in the unit of the column; never wider than what was known before. */
function halfOf({ found, coils }: Fitted, k: number): number {
  const { fit, columns } = found;
  const variance = fit.covariance[k]![k]!;
  // Only the part that is drawn from coils has as few degrees of freedom as there are coils.
  const share = Math.min(1, Math.max(1e-3, fit.sampled[k]! / variance));
  const degrees = (coils - 1 + WEIGHT) / share ** 2;
  return Math.min(tQuantile(0.975, degrees) * Math.sqrt(variance), columns[k]!.priorHalf);
}

function wordsOf(
  { model, found }: Fitted,
  { name, capacitancePf }: Column & { readonly name: UnknownName },
  high: boolean,
  size: string,
) {
  const pf = capacitancePf === null ? '' : tidy(capacitancePf);
  if (name === 'diameter') {
    const seen = found.slots.some(({ of }) => of === 'former');
    return SYSTEMATIC.off.diameter(high, size, seen);
  }
  if (name === 'pitch') return SYSTEMATIC.off.pitch[model.record.windings[0]!.pitchKind](high, size);
  if (name === 'capacitor') return SYSTEMATIC.off.capacitor(high, size, pf);
  return SYSTEMATIC.off[name](high, size);
}

function withinWords({ name, capacitancePf }: Column & { readonly name: UnknownName }, size: string): string {
  return name === 'capacitor'
    ? SYSTEMATIC.within.capacitor(size, tidy(capacitancePf ?? 0))
    : SYSTEMATIC.within[name](size);
}

/** Decimals that show two figures of a limit: what it bounds is not known better. */
const decimalsFor = (half: number): number =>
  half > 0 ? Math.min(6, Math.max(0, 1 - Math.floor(Math.log10(half)))) : 2;

/** What an unknown does to the inductance read of the whole coil, a fraction for each unit; null: nothing. */
function onWhole({ model }: Fitted, { name, per }: Column): number | null {
  const { tap, turn, inductanceUh } = model.whole;
  const plain = { key: '', tap, turn, expected: inductanceUh, capacitancePf: null, perStrayPf: 0, perCapacitor: 0 };
  if (name === 'capacitor' || name === 'strays') return null;
  return per({ ...plain, of: 'inductance', perLn: 1, perLeadUh: 1 / inductanceUh });
}

function unknownOf(fitted: Fitted, column: Column & { readonly name: UnknownName }, k: number): Unknown {
  const { found, common, model } = fitted;
  const { name, capacitancePf, priorHalf, per } = column;
  const unit = UNIT[name];
  const scale = unit === '%' ? 100 : 1;
  const estimate = found.fit.x[k]!;
  const half = halfOf(fitted, k);
  const total = common.reduce((sum, { weight, mean }) => sum + weight * mean ** 2, 0);
  const explained = common.reduce((sum, { slot, weight, mean }) => sum + weight * mean * per(slot) * estimate, 0);
  const percent = name === 'diameter' ? (100 * estimate) / model.coil.shape.meanDiameterMm : null;
  const digits = decimalsFor(scale * half);
  const is = Math.abs(estimate) > half;
  const size = SYSTEMATIC.signed(
    signed(scale * estimate, digits),
    fixed(scale * half, digits),
    unit,
    percent === null ? null : signed(percent, 2),
  );
  const whole = onWhole(fitted, column);
  return {
    name,
    capacitancePf,
    unit,
    estimate: significant(scale * estimate),
    half: significant(scale * half, 4),
    low: significant(scale * (estimate - half)),
    high: significant(scale * (estimate + half)),
    priorHalf: significant(scale * priorHalf, 4),
    percent: percent === null ? null : decimals(percent, 4),
    significant: is,
    known: decimals(Math.max(0, 1 - (Z95 * Math.sqrt(found.fit.covariance[k]![k]!)) / priorHalf), 3),
    sharePercent: decimals(total > 0 ? (100 * explained) / total : 0, 1),
    wholePercent: whole === null ? null : decimals(100 * whole * estimate, 3),
    text: is ? wordsOf(fitted, column, estimate > 0, size) : withinWords(column, size),
  };
}

/** Which reading would tell two causes apart, of those that were not taken. */
function toMeasure(a: UnknownName, b: UnknownName, slots: readonly Slot[]): string {
  const { measure } = SYSTEMATIC;
  const has = (of: Slot['of']) => slots.some((slot) => slot.of === of);
  const either = (name: UnknownName) => a === name || b === name;
  if (either('pitch') && !has('length')) return measure.length;
  if (either('diameter') && !has('former'))
    return either('meter') && !has('resonance') ? measure.formerOrResonance : measure.former;
  if (either('gaps') && !has('twenty')) return measure.twenty;
  if (either('capacitor') && !has('inductance')) return measure.inductance;
  if (either('meter') && !has('resonance')) return measure.resonance;
  return measure.another;
}

function apartOf(fitted: Fitted, unknowns: readonly Unknown[]): Systematic['apart'] {
  const { covariance, x } = fitted.found.fit;
  const { columns, slots } = fitted.found;
  const reported = columns.flatMap((column, k) => (isUnknown(column) ? [{ name: column.name, k }] : []));
  const list: Systematic['apart'] = [];
  reported.forEach((one, i) => {
    reported.slice(i + 1).forEach((two, j) => {
      const [va, vb, c] = [covariance[one.k]![one.k]!, covariance[two.k]![two.k]!, covariance[one.k]![two.k]!];
      const correlation = c / Math.sqrt(va * vb);
      // Where one is off for sure, or both together are not, there is nothing to tell apart.
      if (Math.abs(correlation) < CORRELATED || one.name === two.name) return;
      if (unknowns[i]!.significant || unknowns[i + 1 + j]!.significant) return;
      const [a, b] = [x[one.k]!, x[two.k]!];
      const together = (vb * a * a - 2 * c * a * b + va * b * b) / (va * vb - c * c);
      if (together < TOGETHER) return;
      const { name } = SYSTEMATIC;
      list.push({
        a: one.name,
        b: two.name,
        correlation: decimals(correlation, 3),
        text: SYSTEMATIC.apart(name[one.name], name[two.name]),
        measure: toMeasure(one.name, two.name, slots),
      });
    });
  });
  return list;
}

/** What taps and rulers would have to be off by for the rest, against what they may be. */
function misfitOf({ found, model }: Fitted): Systematic['misfit'] {
  const { columns, fit } = found;
  const own = columns.flatMap(({ name }, k) => (name === 'place' || name === 'rule' ? [k] : []));
  const prior = (k: number) => (columns[k]!.priorHalf / Z95) ** 2;
  // The variance of an estimate is what the readings took off the prior; where they took nothing the estimate is 0.
  const lower = cholesky(
    own.map((k) => Float64Array.from(own, (l) => (k === l ? prior(k) * (1 + 1e-6) : 0) - fit.covariance[k]![l]!)),
  );
  const x = Float64Array.from(own, (k) => fit.x[k]!);
  const few = { chiSquare: 0, degrees: 0, probability: 1, tap: null, text: SYSTEMATIC.misfit.few };
  if (own.length === 0 || lower === null) return few;
  const chiSquare = dot(x, solveWith(lower, x));
  const probability = chanceOfChiSquare(chiSquare, own.length);
  const figures = {
    chiSquare: significant(chiSquare, 4),
    degrees: own.length,
    probability: significant(probability, 3),
  };
  if (probability >= RARE) return { ...figures, tap: null, text: SYSTEMATIC.misfit.fits };
  const places = own
    .filter((k) => columns[k]!.name === 'place')
    .map((k) => ({
      k,
      sigmas: Math.abs(fit.x[k]!) / Math.sqrt(Math.max(prior(k) - fit.covariance[k]![k]!, 1e-6 * prior(k))),
    }))
    .sort((a, b) => b.sigmas - a.sigmas);
  const first = places[0];
  const slot = first === undefined ? undefined : found.slots.find((each) => columns[first.k]!.per(each) !== 0);
  if (first === undefined || slot === undefined || first.sigmas < STANDS_OUT || slot.tap === null)
    return { ...figures, tap: null, text: SYSTEMATIC.misfit.other };
  const off = fit.x[first.k]!;
  const turns = off / model.perTurn(slot);
  return { ...figures, tap: slot.tap, text: SYSTEMATIC.misfit.tap(slot.tap, signed(100 * off, 2), signed(turns, 3)) };
}

function diagnosisOf(fitted: Fitted, unknowns: readonly Unknown[], apart: Systematic['apart']): string[] {
  const weight = ({ wholePercent, sharePercent }: Unknown) => Math.abs(wholePercent ?? sharePercent / 100);
  const off = unknowns.filter(({ significant: is }) => is).sort((a, b) => weight(b) - weight(a));
  const list = off.map(({ text }) => text);
  for (const { text, measure } of apart) list.push(`${text} ${measure}`);
  const misfit = misfitOf(fitted);
  if (misfit.probability < RARE) list.push(misfit.text);
  return list.length === 0 ? [SYSTEMATIC.nothing] : list;
}

const percentOf = (of: Slot['of']) => of === 'inductance' || of === 'resonance';

function slotOf({ slot, count, mean, rest }: Common): Systematic['slots'][number] {
  const scale = percentOf(slot.of) ? 100 : 1;
  return {
    of: slot.of,
    tap: slot.tap,
    capacitancePf: slot.capacitancePf,
    count,
    unit: percentOf(slot.of) ? '%' : 'mm',
    mean: decimals(scale * mean, 4),
    rest: decimals(scale * rest, 4),
  };
}

/** Null: nothing is read of any coil that could be fitted. */
export function systematicOf({ record, coils: given }: KindReadings): Systematic | null {
  const model = modelOf(record);
  const leftOut: LeftOut[] = [];
  const readable = given.flatMap((coil) => fittingOf(model, coil, leftOut) ?? []);
  const counted = withoutStrangers(model, readable, leftOut);
  if (counted.length === 0) return null;
  const { coils, found } = fitRobust(model, counted, leftOut);
  const { fit, slots, columns } = found;
  const common = slots.map((slot): Common => {
    const values = coils.flatMap(({ readings }) =>
      readings.flatMap((one) => (one.slot === slot ? [deviationOf(slot, one.reading.value)] : [])),
    );
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    // A tap's own place is what is left over, not a cause.
    const fitted = expectedOf(found, slot, ({ name }) => name !== 'place' && name !== 'rule');
    const noise = fit.noise[FITTED.indexOf(slot.of)]!;
    return { slot, count: values.length, mean, rest: mean - fitted, weight: values.length / noise ** 2 };
  });
  const fitted: Fitted = { model, found, coils: coils.length, common };
  const unknowns = columns.flatMap((column, k) => (isUnknown(column) ? [unknownOf(fitted, column, k)] : []));
  const apart = apartOf(fitted, unknowns);
  const order = new Map(given.map(({ serial }, i) => [serial, i]));
  return {
    coils: coils.length,
    readings: coils.reduce((sum, { readings }) => sum + readings.length, 0),
    unknowns,
    diagnosis: diagnosisOf(fitted, unknowns, apart),
    apart,
    scatter: {
      diameterMm: significant(fit.scatter[0]!, 3),
      pitchPercent: significant(100 * fit.scatter[1]!, 3),
      readings: FITTED.flatMap((of, k) =>
        slots.some((slot) => slot.of === of)
          ? [
              {
                of,
                sd: significant((percentOf(of) ? 100 : 1) * fit.noise[k]!, 3),
                unit: percentOf(of) ? ('%' as const) : ('mm' as const),
              },
            ]
          : [],
      ),
    },
    slots: common.map(slotOf),
    misfit: misfitOf(fitted),
    leftOut: leftOut.sort((a, b) => order.get(a.serial)! - order.get(b.serial)! || (a.line ?? 0) - (b.line ?? 0)),
  };
}
