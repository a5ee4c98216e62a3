/** Records of replacements made by hand for tests of sheets: plain arithmetic over a sample, not the inference. */
import { layTurns } from '../../src/coil/layout.ts';
import type { MatchRecord } from '../../src/drawing/comparison.ts';
import type { Matched } from '../../src/record/match-schema.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type SampleOptions, sampleRecord } from './sample.ts';

export interface MatchedOptions extends SampleOptions {
  readonly units?: CoilRecord['units'];
  readonly replacement?: Matched['replacement'];
  readonly ranged?: boolean;
  /** Numbers from 0 to 1, the same for the same coil. */
  readonly random?: () => number;
  readonly sections?: number;
  /** How many lines of each list; 0: none. */
  readonly lines?: number;
  readonly residuals?: number;
  /** Both ways can be made and differ, come to one, or one cannot be made. */
  readonly ways?: 'differ' | 'same' | 'one';
}

const WORDS =
  'the turns that were counted do not go with where the tap was found, measure it again before the form is broken';

export function matchedRecord(options: MatchedOptions = {}): MatchRecord {
  const random = options.random ?? (() => 0.4);
  const base = sampleRecord(options);
  const winding = base.windings[0]!;
  const near = (value: number, part: number) => ({
    value,
    low: value * (1 - part * (0.2 + random())),
    high: value * (1 + part * (0.2 + random())),
  });
  const text = (words: number) => WORDS.split(' ').slice(0, words).join(' ');
  const swell = 0.9 + 0.3 * random();
  const diameter = base.former.outsideDiameterMm * (0.8 + 0.4 * random());
  const pitch = winding.pitchMm * swell;
  const turns = Math.max(1, Math.round(winding.turns * (0.9 + 0.2 * random())));
  const sections = options.sections ?? 1;
  const share = (tap: number) => tap / winding.taps.length;
  const doubted = () => random() < 0.3;
  const taps: Matched['old']['taps'] = winding.taps.map((tap, i) => {
    const last = i === winding.taps.length - 1;
    const turn = last ? turns : Math.max(1, Math.round(turns * share(i + 1)));
    const open = doubted();
    const high = 9000 / 1.3 ** i;
    return {
      tap: tap.tap,
      name: random() < 0.3 ? `stud ${tap.tap} lower row` : `${tap.tap}`,
      by: random() < 0.4 ? 'counted' : random() < 0.7 ? 'inferred' : 'proposed',
      turn,
      determined: !open,
      candidates: open
        ? Array.from({ length: 9 }, (_, k) => ({
            turn: turn + (k % 2 ? 1 : -1) * Math.ceil(k / 2),
            weight: 0.5 / (k + 1),
          }))
        : [{ turn, weight: 1 }],
      positionMm: near(turn * pitch, 0.03),
      angleDeg: Math.round(random() * 3599) / 10,
      inductanceUh: near(tap.inductanceUh, 0.04),
      working: {
        frequencyKhz: high,
        inductanceUh: tap.inductanceUh * 1.03,
        resistanceOhm: 1.2,
        q: 80 + 100 * random(),
      },
      range: options.ranged === false ? null : { lowKhz: near(high / 3, 0.01), highKhz: near(high, 0.02) },
    };
  });
  const comparison: Matched['comparison'] = winding.taps.map((tap, i) => {
    const old = taps[i]!;
    const percent = 8 * (random() - 0.5);
    return {
      tap: tap.tap,
      oldTurn: old.turn,
      newTurn: tap.turn,
      oldPositionMm: old.positionMm.value,
      newPositionMm: Number((tap.positionMm - winding.startMm).toFixed(4)),
      oldUh: old.inductanceUh.value,
      newUh: tap.inductanceUh,
      deviationPercent: 100 * (tap.inductanceUh / old.inductanceUh.value - 1),
      frequencyKhz: old.working.frequencyKhz,
      oldWorkingUh: old.working.inductanceUh,
      newWorkingUh: old.working.inductanceUh * (1 + percent / 100),
      workingPercent: percent,
      oldQ: old.working.q,
      newQ: old.working.q * (0.8 + 0.4 * random()),
      withinLimits: random() < 0.7,
    };
  });
  const way = (name: Matched['replacement'], moved: number, possible = true): Matched['ways'][number] => ({
    way: name,
    possible,
    text: text(12),
    wire: possible ? winding.wire.name : null,
    formerMm: possible ? base.former.outsideDiameterMm : null,
    turns: possible ? winding.turns + moved : null,
    worstPercent: possible ? -2.34 : null,
    worstTap: possible ? 2 : null,
    farthestMm: possible ? 3.21 : null,
    taps: possible
      ? comparison.map((each) => ({
          tap: each.tap,
          turn: each.newTurn + moved,
          positionMm: each.newPositionMm + moved,
          workingPercent: each.workingPercent + moved,
        }))
      : [],
  });
  const worst = comparison.reduce((a, b) => (Math.abs(b.workingPercent) > Math.abs(a.workingPercent) ? b : a));
  const ways = options.ways ?? 'differ';
  const lines = options.lines ?? 3;
  const units = ['mm', 'uH', 'kHz', 'ohm', 'turns', ''];
  const list = <T>(make: (i: number) => T): T[] => Array.from({ length: lines }, (_, i) => make(i));
  const replacement = options.replacement ?? 'as it worked';
  const matched: Matched = {
    replacement,
    old: {
      name: 'Old coil',
      hand: random() < 0.5 ? 'right' : 'left',
      earthedEnd: random() < 0.5 ? 'start' : 'finish',
      wire: '0.55 mm double silk, as inferred',
      turns,
      meanDiameterMm: near(diameter + winding.wire.overallMm, 0.005),
      formerDiameterMm: near(diameter, 0.005),
      bareMm: near(winding.wire.bareMm, 0.03),
      overallMm: near(winding.wire.overallMm, 0.03),
      pitchMm: Array.from({ length: sections }, () => near(pitch, 0.01)),
      sectionTurns: Array.from({ length: sections }, () => turns / sections),
      sectionGapMm: Array.from({ length: sections - 1 }, () => near(4, 0.1)),
      tapGapMm: near(0.2, 0.9),
      windingLengthMm: near(turns * pitch, 0.01),
      wireLengthM: near(11, 0.02),
      selfCapacitancePf: 3.21,
      turnPositionsMm: Array.from(layTurns(turns, pitch, [], 0)),
      taps,
      bandLowKhz: options.ranged === false ? null : 530,
      bandHighKhz: options.ranged === false ? null : 1700,
    },
    comparison,
    worst: { tap: worst.tap, workingPercent: worst.workingPercent },
    ways:
      ways === 'one'
        ? [way('as it worked', 0), way('as it was', 0, false)]
        : [way('as it worked', 0), way('as it was', ways === 'same' ? 0 : 1.25)],
    residuals: Array.from({ length: options.residuals ?? 12 }, (_, i) => ({
      key: `taps[${i}].${['position', 'inductance', 'resonance', 'resistance', 'turns', 'angle'][i % 6]}`,
      measured: 10 + 1000 * random(),
      fitted: 10 + 1000 * random(),
      unit: units[i % 6]!,
      sigmas: 4 * (random() - 0.5),
    })),
    contradictions: list((i) => ({
      key: `taps[${i + 1}].position`,
      text: text(14 + i),
      sigmas: 5.1,
      got: 17.2,
      expected: 19.3,
      unit: 'mm',
    })),
    proposals: list((i) => ({
      tap: i % 2 ? `${i + 1}` : 'lost stud',
      pattern: 'equal steps',
      turn: 12,
      confidence: 0.71,
      text: text(9),
    })),
    next: list((i) => ({ key: `taps[${i + 1}].inductance`, text: text(11), nowPercent: 3.21, thenPercent: 1.23 })),
    fit: { chiSquare: 12.3, freedom: 11 },
    assumed: Object.fromEntries(list((i) => [`old.key-${i}`, text(8)])),
  };
  const plan = winding.taps.map((tap, i) => ({
    ...tap,
    range:
      options.ranged === false || tap.range === null
        ? null
        : { ...tap.range, lowKhz: 3000 / 1.3 ** i, highKhz: 9000 / 1.3 ** i },
  }));
  return { ...base, verb: 'match', units: options.units ?? 'metric', windings: [{ ...winding, taps: plan }], matched };
}
