/** What the record of `match` holds besides that of its replacement: the old coil and old against new, rounded once. */
import { coilOf, frequencyLimits, type OldAtWork } from '../match/old-at-work.ts';
import type { Replacement, Tried } from '../match/replace.ts';
import type { Estimate, InferredCoil, OldCoil } from '../match/types.ts';
import { lengthText, percentText } from '../quantity/format.ts';
import type { Matched } from './match-schema.ts';
import { decimals, mm, significant } from './rounding.ts';

const rounded = ({ value, low, high }: Estimate, round: (value: number) => number) => ({
  value: round(value),
  low: round(low),
  high: round(high),
});
const six = (value: number) => significant(value);

function tapsOf(inferred: InferredCoil, { positions }: OldAtWork): Matched['old']['taps'] {
  return inferred.taps.map((tap, i) => {
    const { working, span } = positions[i]!;
    const limits = (end: { kHz: number; uncertaintyKhz: number }) =>
      rounded(frequencyLimits(end.kHz, end.uncertaintyKhz, tap.inductanceUh), (kHz) => significant(kHz, 5));
    return {
      tap: i + 1,
      name: tap.name,
      by: tap.by,
      turn: decimals(tap.turn, 6),
      determined: tap.determined,
      candidates: tap.candidates.map(({ turn, weight }) => ({ turn: decimals(turn, 6), weight: decimals(weight, 4) })),
      positionMm: rounded(tap.positionMm, mm),
      angleDeg: decimals(tap.angleDeg, 4),
      inductanceUh: rounded(tap.inductanceUh, six),
      working: {
        frequencyKhz: significant(working.kHz, 5),
        inductanceUh: significant(working.inductanceUh),
        resistanceOhm: significant(working.resistanceOhm, 4),
        q: significant(working.q, 3),
      },
      range: span === null ? null : { lowKhz: limits(span.low), highKhz: limits(span.high) },
    };
  });
}

function oldOf(name: string, old: OldCoil, inferred: InferredCoil, work: OldAtWork): Matched['old'] {
  const coil = coilOf(inferred);
  return {
    name,
    hand: old.hand,
    earthedEnd: old.earthed,
    wire: inferred.wire.name,
    turns: decimals(coil.turns, 6),
    meanDiameterMm: rounded(inferred.meanDiameterMm, mm),
    formerDiameterMm: rounded(inferred.formerDiameterMm, mm),
    bareMm: rounded(inferred.bareMm, mm),
    overallMm: rounded(inferred.overallMm, mm),
    pitchMm: inferred.pitchMm.map((pitch) => rounded(pitch, mm)),
    sectionTurns: inferred.sectionTurns.map((turns) => decimals(turns, 6)),
    sectionGapMm: inferred.sectionGapMm.map((gap) => rounded(gap, mm)),
    tapGapMm: rounded(inferred.tapGapMm, mm),
    windingLengthMm: rounded(inferred.windingLengthMm, mm),
    wireLengthM: rounded(inferred.wireLengthM, (metres) => decimals(metres, 4)),
    selfCapacitancePf: significant(coil.selfPf(coil.turns), 4),
    turnPositionsMm: inferred.turnPositionsMm.map(mm),
    taps: tapsOf(inferred, work),
    bandLowKhz: old.band?.lowKhz ?? null,
    bandHighKhz: old.band?.highKhz ?? null,
  };
}

/** Whether so many times the old inductance still lies within its limits. */
const within = ({ value, low, high }: Estimate, ratio: number) => ratio >= low / value && ratio <= high / value;

const percent = (fraction: number) => decimals(100 * fraction, 3);

function comparisonOf(of: Replacement, inferred: InferredCoil, work: OldAtWork): Matched['comparison'] {
  const { taps } = of.found.chosen;
  return of.taps.map((tap, i) => {
    const was = inferred.taps[i]!;
    const { working } = work.positions[i]!;
    const newUh = taps[i]!.inductanceUh;
    return {
      tap: i + 1,
      oldTurn: decimals(was.turn, 6),
      newTurn: decimals(tap.turn, 6),
      oldPositionMm: mm(was.positionMm.value),
      newPositionMm: mm(tap.positionMm),
      oldUh: significant(was.inductanceUh.value),
      newUh: significant(newUh),
      deviationPercent: percent(tap.low),
      frequencyKhz: significant(working.kHz, 5),
      oldWorkingUh: significant(working.inductanceUh),
      newWorkingUh: significant(tap.workingUh),
      workingPercent: percent(tap.working),
      oldQ: significant(working.q, 3),
      newQ: significant(tap.q, 3),
      withinLimits: within(was.inductanceUh, 1 + tap.working),
    };
  });
}

function wayOf(way: Replacement['way'], tried: Tried): Matched['ways'][number] {
  if (!tried.ok) {
    const { got } = tried.why.faults[0]!;
    return {
      way,
      possible: false,
      text: `${way}: not with what is on hand: ${got}`,
      wire: null,
      formerMm: null,
      turns: null,
      worstPercent: null,
      worstTap: null,
      farthestMm: null,
      taps: [],
    };
  }
  const { found, taps, worst, farthestMm } = tried.of;
  const { candidate, coil, former } = found.chosen;
  return {
    way,
    possible: true,
    text: `${way}: ${candidate.wire.name} on ${lengthText(former.outsideDiameterMm)}, worst tap ${percentText(worst.working)} off, farthest tap ${lengthText(farthestMm, 1)} from where it lay`,
    wire: candidate.wire.name,
    formerMm: mm(former.outsideDiameterMm),
    turns: decimals(coil.turns, 6),
    worstPercent: percent(worst.working),
    worstTap: worst.tap + 1,
    farthestMm: mm(farthestMm),
    taps: taps.map(({ turn, positionMm, working }, i) => ({
      tap: i + 1,
      turn: decimals(turn, 6),
      positionMm: mm(positionMm),
      workingPercent: percent(working),
    })),
  };
}

export interface MatchedParts {
  readonly name: string;
  readonly old: OldCoil;
  readonly inferred: InferredCoil;
  readonly work: OldAtWork;
  readonly chosen: Replacement;
  readonly worked: Tried;
  readonly was: Tried;
}

export function matchedOf({ name, old, inferred, work, chosen, worked, was }: MatchedParts): Matched {
  return {
    replacement: chosen.way,
    old: oldOf(name, old, inferred, work),
    comparison: comparisonOf(chosen, inferred, work),
    worst: { tap: chosen.worst.tap + 1, workingPercent: percent(chosen.taps[chosen.worst.tap]!.working) },
    ways: [wayOf('as it worked', worked), wayOf('as it was', was)],
    residuals: inferred.residuals.map((one) => ({
      ...one,
      measured: significant(one.measured),
      fitted: significant(one.fitted),
      sigmas: decimals(one.sigmas, 2),
    })),
    contradictions: inferred.contradictions.map((one) => ({
      ...one,
      sigmas: decimals(one.sigmas, 2),
      got: significant(one.got),
      expected: significant(one.expected),
    })),
    proposals: inferred.proposals.map((one) => ({ ...one, confidence: decimals(one.confidence, 4) })),
    next: inferred.next.map((one) => ({
      ...one,
      nowPercent: significant(one.nowPercent, 3),
      thenPercent: significant(one.thenPercent, 3),
    })),
    fit:
      inferred.fit === null
        ? null
        : { chiSquare: significant(inferred.fit.chiSquare, 4), freedom: inferred.fit.freedom },
    assumed: { ...inferred.assumed },
  };
}
