/** A hand-made record for tests of sheets and parts: plain arithmetic, not the planner, so that both can be wrong apart. */
import { angleOf, axialAt, layTurns } from '../../src/coil/layout.ts';
import type { CoilRecord, Hole } from '../../src/record/schema.ts';

export interface SampleOptions {
  readonly hand?: 'right' | 'left';
  readonly surface?: 'smooth' | 'grooved';
  readonly kind?: 'printed' | 'tube';
  /** Turn of each tap, the last one the whole coil. */
  readonly turns?: readonly number[];
  /** Turns of the unit taps of a two-switch coil; none for one switch. */
  readonly unitTurns?: readonly number[];
  readonly diameterMm?: number;
  readonly bareMm?: number;
  readonly overallMm?: number;
  readonly pitchMm?: number;
  readonly method?: CoilRecord['tapMethod']['name'];
  readonly gapMm?: number;
  readonly flanges?: boolean;
  readonly ears?: boolean;
  readonly job?: string;
  readonly paper?: 'A4' | 'Letter';
}

export function sampleRecord(options: SampleOptions = {}): CoilRecord {
  const hand = options.hand ?? 'right';
  const surface = options.surface ?? 'grooved';
  const kind = options.kind ?? 'printed';
  const unitsAt = options.unitTurns ?? [];
  const turnsAt = options.turns ?? [12.25, 20.5, 31.125, 47, 60.75];
  const turns = turnsAt[turnsAt.length - 1]!;
  const outside = options.diameterMm ?? 60;
  const bare = options.bareMm ?? 0.5;
  const overall = options.overallMm ?? 0.544;
  const pitch = options.pitchMm ?? (surface === 'grooved' ? 1.2 : overall * 1.02);
  const gap = options.gapMm ?? 0;
  const method = options.method ?? (surface === 'grooved' ? 'drawn in' : 'twisted loop');
  const flanges = options.flanges ?? kind === 'printed';
  const ears = options.ears ?? kind === 'printed';
  const depth = surface === 'grooved' ? overall / 2 : 0;
  const mean = outside - 2 * depth + overall;
  const start = 12;
  const gaps = [...unitsAt, ...turnsAt.slice(0, -1)].map((turn) => ({ turn, gapMm: gap }));
  const round = (x: number, digits = 4) => Number(x.toFixed(digits));
  const places = Array.from(layTurns(turns, pitch, gaps, start), (z) => round(z));
  const at = (u: number) => round(axialAt(places, turns, pitch, u));
  const finish = at(turns);
  const length = round(Math.ceil(finish + 3 * pitch + 8), 2);
  const metre = (u: number) => (u * Math.PI * mean) / 1000;
  const ohm = (u: number) => (1.7241e-8 * metre(u)) / ((Math.PI * (bare / 1000) ** 2) / 4);
  const uh = (u: number) =>
    (3.9479 * (mean / 1000) ** 2 * u * u * 250) / ((u * pitch) / 1000 + 0.45 * (mean / 1000)) / 1000;
  const kHz = (of: number, pf: number) => 1e6 / (2 * Math.PI * Math.sqrt(of * (pf + 3.1)));
  const drawn = method === 'drawn in';
  const holes: Hole[] = [
    {
      purpose: 'anchor',
      tap: null,
      turn: null,
      label: 'A',
      angleDeg: angleOf(0.985, hand),
      axialMm: round(start - 3),
      diameterMm: 1.2,
    },
    { purpose: 'start', tap: null, turn: 0, label: 'S', angleDeg: 0, axialMm: at(0), diameterMm: 1.2 },
  ];
  if (drawn)
    unitsAt.forEach((turn, i) => {
      const angleDeg = angleOf(turn, hand);
      holes.push({ purpose: 'tap', tap: null, turn, label: `u${i + 1}`, angleDeg, axialMm: at(turn), diameterMm: 1.6 });
    });
  if (drawn)
    for (let i = 0; i < turnsAt.length - 1; i++)
      holes.push({
        purpose: 'tap',
        tap: i + 1,
        turn: turnsAt[i]!,
        label: `${i + 1}`,
        angleDeg: angleOf(turnsAt[i]!, hand),
        axialMm: at(turnsAt[i]!),
        diameterMm: 1.6,
      });
  for (let k = -3; k <= 2; k++) {
    const turn = turns + k + k / 60;
    holes.push({
      purpose: 'finish',
      tap: k === 0 ? turnsAt.length : null,
      turn: round(turn),
      label: k === 0 ? 'F' : k > 0 ? `F+${k}` : `F${k}`,
      angleDeg: angleOf(turn, hand),
      axialMm: at(turn),
      diameterMm: 1.2,
    });
  }
  return {
    record: 1,
    program: 'coilwright 0.1.0',
    verb: 'plan',
    job: options.job ?? 'Sample coil for tests',
    date: null,
    hash: '3f9a1c0de5b2476890ab1c2d3e4f5061728394a5b6c7d8e9f00112233445566a',
    paper: options.paper ?? 'A4',
    frame: {
      axis: 'Z along the axis, up, as the former is printed',
      datum: 'lower face of the foot, Z = 0',
      angleZero: 'the start hole',
      anglePositive: 'counterclockwise seen from above',
      hand,
      earthedEnd: 'start',
      templateSeenFrom: 'outside',
      switchSeenFrom: 'behind',
    },
    demand: {
      kind: 'range',
      text: '20 to 240 uH in 5 taps, even ratio',
      spacing: 'even ratio',
      taps: turnsAt.length,
      bandLowKhz: 530,
      bandHighKhz: 1700,
      overlapPercent: 5,
      set: { capacitorLowPf: 15, capacitorHighPf: 380, strayPf: 12, aerialPf: 60, switch: 'open' },
    },
    surroundings: { leadPf: 2, celsius: 20, rest: 'open', formerLossTangent: 0.012, formerLoss: 'estimate: half' },
    spread: { diameterMm: 0.15, pitch: 0.002, bareMm: 0.005, gap: 0.5, turn: 0.008, leadUh: 0.025 },
    coverage: {
      neighbours: turnsAt.slice(1).map((_, i) => ({ from: i + 1, to: i + 2, overlapPercent: 5.2 })),
      gaps: [],
      deadEnds: [],
    },
    switchKinds: (['open', 'shorted', 'shorted in sections', 'disconnected'] as const).map((each) => ({
      kind: each,
      inUse: each === 'open',
      note: `What ${each} does.`,
      positions: turnsAt.map((turn, i) => ({
        tap: i + 1,
        frequencyKhz: 1000,
        inductanceUh: round(uh(turn), 3),
        q: 180,
        lowKhz: 530 + i,
        highKhz: 1200 + i,
      })),
    })),
    settings:
      unitsAt.length === 0
        ? []
        : turnsAt.map((turn, i) => ({
            tens: i + 1,
            turnsLeast: Math.round(turn) - unitsAt.length,
            turnsMost: Math.round(turn),
            inductancesUh: [0, ...unitsAt].map((from) => round(uh(turn - from), 3)),
            stepPercent: 12.34,
            frequencyKhz: 1000,
            q: 180,
            lowKhz: 530 + i,
            highKhz: 1300 + i,
          })),
    windings: [
      {
        name: 'main',
        turns,
        pitchMm: pitch,
        pitchKind: surface === 'grooved' ? 'groove' : 'close',
        spacerMm: 0,
        spacerName: 'none',
        turnPositionsMm: places,
        startMm: at(0),
        finishMm: finish,
        meanDiameterMm: round(mean),
        windingLengthMm: round(finish - start + overall),
        wire: {
          name: '0.5 mm enamel',
          covering: 'enamel',
          bareMm: bare,
          bareLowMm: bare * 0.99,
          bareHighMm: bare * 1.01,
          overallMm: overall,
          overallLowMm: overall * 0.97,
          overallHighMm: overall * 1.02,
          strands: 1,
          strandMm: bare,
          solderable: true,
          standard: 'IEC 60317-0-1',
          status: 'from memory',
        },
        wireLengthM: round(metre(turns), 3),
        leadsM: 0.4,
        wireMassG: round(((metre(turns) * 8890 * Math.PI * (bare / 1000) ** 2) / 4) * 1000, 1),
        resistanceDcOhm: round(ohm(turns)),
        inductanceUh: round(uh(turns), 3),
        selfCapacitancePf: 3.1,
        tensionLowN: 6,
        tensionHighN: 10,
        unitTaps: unitsAt.map((turn, i) => ({
          unit: i + 1,
          turn,
          positionMm: at(turn),
          angleDeg: angleOf(turn, hand),
          gapMm: gap,
          inductanceUh: round(uh(turn), 3),
          wireFromStartM: round(metre(turn), 3),
        })),
        taps: turnsAt.map((turn, i) => ({
          tap: i + 1,
          turn,
          positionMm: at(turn),
          angleDeg: angleOf(turn, hand),
          gapMm: i < turnsAt.length - 1 ? gap : 0,
          targetUh: round(uh(turn) * 1.001, 3),
          inductanceUh: round(uh(turn), 3),
          deviationPercent: -0.1,
          inductanceLowUh: round(uh(turn) * 0.98, 3),
          inductanceHighUh: round(uh(turn) * 1.02, 3),
          wireFromStartM: round(metre(turn), 3),
          resistanceDcOhm: round(ohm(turn)),
          resistanceLowOhm: round(ohm(turn) * 0.97),
          resistanceHighOhm: round(ohm(turn) * 1.03),
          woundLengthMm: round(at(turn) - start + overall),
          dominant: 'pitch',
          working: {
            frequencyKhz: 1000,
            inductanceUh: round(uh(turn), 3),
            resistanceOhm: 3,
            q: 180,
            kind: 'field of every turn',
          },
          range: {
            lowKhz: 530 + i,
            lowUncertaintyKhz: 0.5,
            highKhz: 1200 + i,
            highUncertaintyKhz: 4,
            secondLowKhz: 4000,
            secondHighKhz: 4200,
            capacitanceLowPf: 90,
            capacitanceHighPf: 455,
          },
          ends: (['low', 'middle', 'high'] as const).map((at, k) => ({
            at,
            frequencyKhz: 530 + 300 * k,
            inductanceUh: round(uh(turn), 3),
            resistanceOhm: 2 + k,
            q: 200 - 10 * k,
            bandwidthKhz: 4 + k,
            parallelKohm: 120 + 20 * k,
          })),
          // As straight on logarithmic axes as a coil without capacitance of its own.
          curve: Array.from({ length: 9 }, (_, k) => ({
            capacitancePf: round(90 * (455 / 90) ** (k / 8), 2),
            frequencyKhz: round((1200 + i) * ((530 + i) / (1200 + i)) ** (k / 8), 2),
          })),
        })),
      },
    ],
    former: {
      kind,
      surface,
      material: kind === 'printed' ? 'PETG' : 'phenolic paper',
      densityGCm3: 1.27,
      outsideDiameterMm: outside,
      boreDiameterMm: outside - 5.4,
      wallMm: 2.7,
      lengthMm: length,
      footMm: 3,
      topMm: 3,
      flange: flanges ? { diameterMm: outside + 8, lowerMm: 3, upperMm: 3 } : null,
      groove:
        surface === 'grooved' ? { depthMm: round(depth), floorMm: round(overall * 0.4142), runInTurns: 0.25 } : null,
      chamferMm: kind === 'printed' ? 0.5 : 0,
      ears: ears
        ? [45, 225].map((angleDeg) => ({
            angleDeg,
            holeDiameterMm: 4.3,
            centreRadiusMm: outside / 2 + 10,
            widthMm: 14,
            thicknessMm: 3,
          }))
        : [],
      numbers: flanges
        ? [
            { text: 'S', angleDeg: 0, tap: null },
            ...turnsAt.map((turn, i) => ({ text: `${i + 1}`, angleDeg: angleOf(turn, hand), tap: i + 1 })),
          ]
        : [],
      numberHeightMm: 3.2,
      datumMark: kind === 'printed' ? { angleDeg: 0, widthMm: 1.2, depthMm: 0.6 } : null,
      body: 'full',
      ribs: null,
      ridges: null,
      base: null,
      posts: [],
      joints: [],
      tenthMmPercent: 0.21,
      segments: 144,
      stiffness: '8 N at this pitch shrinks the former by 0.05 %',
    },
    tapMethod: {
      name: method,
      layout: 'staggered',
      gapMm: gap,
      loopM: 0.12,
      why: 'the pitch leaves land for a hole of two wires',
      how: ['Wind to the tap hole.', 'Draw a loop of 60 mm in through the hole.', 'Twist it inside and go on winding.'],
    },
    holes,
    printer: {
      bedXMm: 220,
      bedYMm: 220,
      heightMm: 250,
      nozzleMm: 0.4,
      lineMm: 0.45,
      layerMm: 0.2,
      holeCompensationMm: 0,
      clearanceMm: 0.3,
      scale: [1, 1, 1],
      material: 'PLA',
      densityGCm3: 1.24,
    },
    shop: {
      shaftMm: 8,
      shaftForm: 'round',
      spoolDiameterMm: 80,
      spoolWidthMm: 70,
      spoolBoreMm: 16,
      meterKhz: 100,
      meterName: null,
      meterAccuracy: 0.01,
      capacitorsPf: [100, 330],
      capacitorTolerance: 0.01,
    },
    wanted: kind === 'printed' ? ['former'] : [],
    parts: [],
    beds: [],
    steps: [
      { step: 1, kind: 'prepare', tap: null, turn: null, wireM: null, text: 'Cut the wire or set up the spool.' },
      {
        step: 2,
        kind: 'start',
        tap: null,
        turn: 0,
        wireM: 0,
        text: 'Anchor the wire in hole A and lead it through S.',
      },
      ...unitsAt.map((turn, i) => ({
        step: 3 + i,
        kind: 'tap' as const,
        tap: null,
        unit: i + 1,
        turn,
        wireM: round(metre(turn), 2),
        text: `Wind to turn ${turn}, make unit tap u${i + 1}.`,
      })),
      ...turnsAt.map((turn, i) => ({
        step: 3 + unitsAt.length + i,
        kind: i < turnsAt.length - 1 ? ('tap' as const) : ('finish' as const),
        tap: i + 1,
        turn,
        wireM: round(metre(turn), 2),
        text: `Wind to turn ${turn}, make tap ${i + 1}.`,
      })),
      {
        step: 3 + unitsAt.length + turnsAt.length,
        kind: 'after',
        tap: null,
        turn: null,
        wireM: null,
        text: 'Measure and write the readings on page 2.',
      },
    ],
    checks: [
      { what: 'Length over the first 20 turns', low: 23.2, nominal: 23.34, high: 23.5, unit: 'mm', digits: 1 },
      { what: 'DC resistance, start to finish', low: 0.9, nominal: 1, high: 1.1, unit: 'Ω', digits: 3 },
      { what: 'Resonance with 100 pF', low: 800, nominal: 810, high: 820, unit: 'kHz', digits: 0 },
    ],
    corrections: [
      {
        doing: 'one turn off at the finish',
        kind: 'trim',
        tapsPercent: turnsAt.map((_, i) => (i === turnsAt.length - 1 ? -2.1 : 0)),
        fromUh: round(uh(turns) * 1.0105, 3),
        toUh: null,
      },
      {
        doing: 'last five turns spread by one wire each',
        kind: 'trim',
        tapsPercent: turnsAt.map((_, i) => (i === turnsAt.length - 1 ? -0.7 : 0)),
        fromUh: null,
        toUh: null,
      },
      {
        doing: 'former 0.1 mm larger (next coil)',
        kind: 'next coil',
        tapsPercent: turnsAt.map(() => 0.21),
        fromUh: null,
        toUh: null,
      },
    ],
    advice: turnsAt.map((turn, i) => ({
      tap: i + 1,
      fewPercent: round((100 * uh(turn - 1)) / uh(turn) - 100, 2),
      manyPercent: round((100 * uh(turn + 1)) / uh(turn) - 100, 2),
      fewUh: round((uh(turn) + uh(turn - 1)) / 2, 3),
      manyUh: round((uh(turn) + uh(turn + 1)) / 2, 3),
      millimetrePercent: -0.61,
      degreesPerPercent: round(3.6 * turn * 0.6, 1),
    })),
    measuring: {
      leadUh: 0.02,
      clipPf: 1,
      meter: turnsAt.map((turn, i) => ({
        tap: i + 1,
        inductanceUh: round(uh(turn) * 0.998, 3),
        readingUh: round(uh(turn) * 0.999, 3),
        lowUh: round(uh(turn) * 0.976, 3),
        highUh: round(uh(turn) * 1.022, 3),
        q: round(20 + turn, 1),
        doubt: null,
      })),
      fromTap: 1,
      toTap: turnsAt.length,
      lengths: turnsAt.map((turn, i) => ({
        tap: i + 1,
        lowMm: round(at(turn) - start + overall - 0.1 - 0.002 * turn),
        highMm: round(at(turn) - start + overall + 0.1 + 0.002 * turn),
      })),
      resonances: turnsAt.flatMap((turn, i) =>
        [100, 330].map((pf) => ({
          tap: i + 1,
          capacitancePf: pf,
          frequencyKhz: round(kHz(uh(turn), pf), 2),
          lowKhz: round(kHz(uh(turn), pf) * 0.99, 2),
          highKhz: round(kHz(uh(turn), pf) * 1.01, 2),
        })),
      ),
      line: {
        slopePerPf: round(4e-6 * Math.PI ** 2 * uh(turns), 8),
        selfPf: 3.1,
        inductanceUh: round(uh(turns), 3),
        inductancePercent: 1.5,
        selfHalfPf: 2.1,
      },
    },
    cautions: [
      'Keep hair, sleeves and gloves away from a turning mandrel.',
      'Wire under tension and cut ends fly: wear eye protection.',
    ],
    chosen: {
      prefer: 'least loss',
      why: 'lowest loss of 200 candidates that fit',
      lossFactor: 0.0052,
      massG: 20.1,
      worstTapPercent: 0.1,
      tried: 400,
      feasible: 200,
    },
    warnings: [{ code: 'estimate', text: 'Loss figures are estimates.' }],
    given: { job: 'Sample coil for tests' },
    assumed: { 'winding.hand': hand },
    alternatives: [
      {
        wire: '0.4 mm enamel',
        formerMm: 55,
        pitchMm: 0.9,
        pitchKind: 'groove',
        turns: 66,
        lengthMm: 70,
        wireM: 11,
        massG: 14,
        worstTapPercent: 0.3,
        lossFactor: 0.0061,
        tapMethod: 'drawn in, staggered',
        betterIn: ['compact', 'least wire'],
      },
    ],
    files: [],
  };
}
