/** Makes the record of a measured coil: figures rounded once, given and assumed apart, signed with its hash. */
import type { Coil } from '../coil/coil.ts';
import { angleOf } from '../coil/layout.ts';
import type { Conditions } from '../coil/positions.ts';
import { type Limits, limitsOf, type Spread, WIRE_SPREAD } from '../coil/tolerance.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { CoilFile } from '../job/coil/file.ts';
import { DENSITY } from '../physics/copper.ts';
import { type Figures, figuresOf, type WorkingFigures } from './figures.ts';
import { hashOf } from './hash.ts';
import { decimals, mm, significant } from './rounding.ts';
import type { CoilRecord, Tap, Winding } from './schema.ts';
import { type SurveyRecord, surveyRecordSchema } from './survey-schema.ts';
import { surveyWarnings } from './survey-warnings.ts';

/** Straight leads of a coil as found: 25 mm at 1 nH/mm (common practice). */
const LEAD_UH = 0.025;

const INPUT: Record<keyof Spread, string> = {
  diameterMm: 'diameter',
  pitch: 'pitch',
  bareMm: 'bare wire',
  gap: 'gaps',
  turn: 'place of the tap',
  leadUh: 'leads',
};

function spreadOfSurvey(file: CoilFile): Spread {
  const { wire } = file.coil;
  return {
    diameterMm: file.spread.diameterMm,
    pitch: file.spread.pitch,
    bareMm: Math.max(wire.bareHighMm - wire.bareMm, wire.bareMm - wire.bareLowMm),
    gap: 0,
    turn: file.spread.turn,
    leadUh: LEAD_UH,
  };
}

function tapOf(file: CoilFile, coil: Coil, index: number, limits: Limits, at: WorkingFigures): Tap {
  const { wire } = coil.shape;
  const turn = file.coil.taps[index]!;
  const inductanceUh = significant(coil.inductanceUh(turn));
  return {
    tap: index + 1,
    turn: decimals(turn, 6),
    positionMm: mm(coil.positionMm(turn)),
    angleDeg: angleOf(turn, file.coil.hand),
    gapMm: 0,
    targetUh: inductanceUh,
    inductanceUh,
    deviationPercent: 0,
    inductanceLowUh: significant(limits.lowUh),
    inductanceHighUh: significant(limits.highUh),
    wireFromStartM: decimals(coil.wireM(turn), 4),
    resistanceDcOhm: significant(coil.resistanceOhm(turn)),
    resistanceLowOhm: significant(coil.resistanceOhm(turn, wire.bareHighMm) * (1 - WIRE_SPREAD)),
    resistanceHighOhm: significant(coil.resistanceOhm(turn, wire.bareLowMm) * (1 + WIRE_SPREAD)),
    woundLengthMm: mm(coil.woundMm(turn)),
    dominant: INPUT[limits.dominant],
    ...at,
  };
}

/** Copper in grams; the covering is not weighed. */
function massOf(coil: Coil): number {
  const { strands, strandMm } = coil.shape.wire;
  const areaMm2 = (strands * Math.PI * strandMm ** 2) / 4;
  return (coil.wireM(coil.turns) * areaMm2 * DENSITY) / 1000;
}

function windingOf(file: CoilFile, coil: Coil, figures: Figures): Winding {
  const { wire, taps, sections } = file.coil;
  const limits = limitsOf(coil, taps, spreadOfSurvey(file));
  const list = taps.map((_, i) => tapOf(file, coil, i, limits[i]!, figures.taps[i]!));
  const whole = list[list.length - 1]!;
  const { pitchMm } = coil.shape;
  const close = sections.every((section) => section.pitchMm < wire.overallMm * 1.05);
  return {
    name: 'main',
    turns: decimals(coil.turns, 6),
    pitchMm: mm(pitchMm),
    pitchKind: close ? 'close' : 'spacer',
    spacerMm: close ? 0 : mm(Math.max(0, pitchMm - wire.overallMm)),
    spacerName: close ? 'none' : 'as found',
    turnPositionsMm: Array.from(coil.places, mm),
    startMm: mm(coil.positionMm(0)),
    finishMm: mm(coil.positionMm(coil.turns)),
    meanDiameterMm: mm(coil.shape.meanDiameterMm),
    windingLengthMm: mm(coil.woundMm(coil.turns)),
    wire: { ...wire },
    wireLengthM: decimals(coil.wireM(coil.turns), 4),
    leadsM: 0,
    wireMassG: significant(massOf(coil), 4),
    resistanceDcOhm: whole.resistanceDcOhm,
    inductanceUh: whole.inductanceUh,
    selfCapacitancePf: significant(coil.selfPf(coil.turns), 4),
    tensionLowN: 0,
    tensionHighN: 0,
    taps: list,
  };
}

function setText(file: CoilFile): string {
  const { set } = file;
  if (set === null) return 'a coil as found, without a set';
  return `a coil as found, with ${set.capacitorLowPf} to ${set.capacitorHighPf} pF, ${set.strayPf} pF of stray and ${set.aerialPf} pF of aerial`;
}

function demandOf(file: CoilFile): CoilRecord['demand'] {
  const { set, band, coil } = file;
  return {
    kind: 'list',
    text: setText(file),
    spacing: 'as found',
    taps: coil.taps.length,
    bandLowKhz: band?.lowKhz ?? null,
    bandHighKhz: band?.highKhz ?? null,
    overlapPercent: null,
    set:
      set === null
        ? null
        : {
            capacitorLowPf: set.capacitorLowPf,
            capacitorHighPf: set.capacitorHighPf,
            strayPf: set.strayPf,
            aerialPf: set.aerialPf,
            switch: set.switch,
          },
  };
}

function sectionsOf(file: CoilFile): SurveyRecord['sections'] {
  let from = 0;
  return file.coil.sections.map(({ turns, pitchMm, gapAfterMm }) => {
    const section = { fromTurn: from, toTurn: from + turns, pitchMm: mm(pitchMm), gapAfterMm: mm(gapAfterMm) };
    from += turns;
    return section;
  });
}

/** The record, files still to come. The schema is checked, so that nothing leaves in another shape. */
export function makeSurveyRecord(
  file: CoilFile,
  coil: Coil,
  working: WorkingCoil,
  conditions: Conditions,
  version: string,
): SurveyRecord {
  const figures = figuresOf(working, conditions);
  const body: Omit<SurveyRecord, 'hash' | 'files' | 'program'> = {
    record: 1,
    verb: 'survey',
    job: file.name,
    date: file.date,
    paper: file.paper,
    frame: {
      axis: 'Z runs along the axis, from the start to the finish',
      datum: 'middle of the wire at the start, Z = 0',
      angleZero: 'the start',
      anglePositive: 'counterclockwise seen from the finish',
      hand: file.coil.hand,
      earthedEnd: file.coil.earthed,
      templateSeenFrom: 'outside, printed side out',
      switchSeenFrom: 'behind, the side it is wired from',
    },
    demand: demandOf(file),
    surroundings: {
      ...figures.surroundings,
      ...(conditions.lossTangent === 0 ? { formerLoss: 'none, the former is taken as without loss' } : {}),
    },
    spread: spreadOfSurvey(file),
    coverage: figures.coverage,
    switchKinds: figures.switchKinds,
    windings: [windingOf(file, coil, figures)],
    sections: sectionsOf(file),
    former: {
      kind: 'as found',
      outsideDiameterMm: mm(file.coil.formerDiameterMm),
      material: file.coil.formerMaterial,
    },
    tapMethod: null,
    holes: [],
    steps: [],
    checks: [],
    corrections: [],
    cautions: [],
    chosen: null,
    warnings: surveyWarnings(file, coil, working, figures),
    given: { ...file.given },
    assumed: { ...file.assumed, 'spread.lead': `± ${LEAD_UH * 1000} nH` },
    alternatives: [],
  };
  const hash = hashOf(body as unknown as Parameters<typeof hashOf>[0]);
  return surveyRecordSchema.parse({ ...body, program: `coilwright ${version}`, hash, files: [] });
}
