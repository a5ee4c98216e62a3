/**
 * The former around a winding: where the start lies, how long it gets, how thick its wall is, which holes it has.
 * Every dimension that the part, the template and the sheet use is fixed here, once.
 */
import type { Coil } from '../coil/coil.ts';
import { angleOf, type Hand } from '../coil/layout.ts';
import type { Job } from '../job/job.ts';
import type { Former, Hole } from '../record/schema.ts';
import { findMaterial, type Material } from '../stock/materials.ts';
import { type TapMethod, WEB_MM, wireHoleMm } from './tap-methods.ts';

const RIM_MM = 4;
const FLANGE_MM = 3;
const TUBE_MARGIN_MM = 10;
/** Arc between the anchor hole and the start hole. */
const ANCHOR_ARC_MM = 6;
/** Strain that the winding may put on a printed wall before it is made thicker: 0.2 % of diameter is 0.3 % of L. */
const STRAIN_GOAL = 0.002;
const FINISH_BACK = 3;
const FINISH_ON = 2;
/** Least that may be left between two holes. */
export const LEAST_WEB_MM = 0.8;

/** Depth and floor of a groove for this wire: half a wire deep, so that the wire's centre lies at the outside diameter. */
export function grooveFor(overallMm: number): { depthMm: number; floorMm: number; widthMm: number } {
  const depthMm = overallMm / 2;
  // A wire on a flat floor between flanks of 45 degrees touches all three when the floor is 2 (sqrt 2 - 1) radii wide.
  const floorMm = overallMm * (Math.SQRT2 - 1);
  return { depthMm, floorMm, widthMm: floorMm + 2 * depthMm };
}

/** More than a hand holds steadily; thick wire is straightened and laid rather than stretched (common practice). */
const MOST_N = { low: 12, high: 20 };

/** Tension for winding, N: 30 to 50 N per square millimetre of copper, capped (common practice, from memory). */
export function tensionN(copperMm2: number): { low: number; high: number } {
  return { low: Math.min(30 * copperMm2, MOST_N.low), high: Math.min(50 * copperMm2, MOST_N.high) };
}

/** What the hoop pressure of the winding takes off the diameter, a fraction: T / (p t E). */
function hoopStrain(tension: number, pitchMm: number, wallMm: number, modulusGPa: number): number {
  return tension / (pitchMm * wallMm * modulusGPa * 1e3);
}

export interface Around {
  readonly job: Job;
  readonly outsideMm: number;
  readonly grooved: boolean;
  readonly overallMm: number;
  readonly pitchMm: number;
  readonly tensionN: number;
}

/** Z of the wire centre at the start hole: above the foot, the run-in of the groove and the anchor hole. */
export function startMm(around: Around): number {
  if (around.job.former.kind === 'tube') return TUBE_MARGIN_MM;
  const hole = wireHoleMm(around.overallMm, 1);
  const anchor = hole + 1.2 + hole / 2 + WEB_MM;
  const runIn = around.grooved ? around.pitchMm * 0.75 + around.overallMm : 0;
  const foot = around.job.former.flanges || around.job.former.mounting === 'ears' ? FLANGE_MM : 0;
  return Math.ceil((foot + Math.max(anchor, runIn, 3)) * 2) / 2;
}

/** Turns from one finish hole to the next: a turn and the part of it that keeps the holes apart, also inside the wall. */
function finishStep(around: Around): number {
  const apart = wireHoleMm(around.overallMm, 1) + WEB_MM;
  const arc = Math.sqrt(Math.max(0, apart ** 2 - around.pitchMm ** 2));
  return 1 + arc / (Math.PI * insideMm(around));
}

function finishHoles(around: Around, coil: Coil): { turn: number; offset: number }[] {
  const step = finishStep(around);
  const trim = around.job.winding.finishTrim;
  const back = trim ? Math.min(FINISH_BACK, Math.floor(coil.turns - 1)) : 0;
  const row: { turn: number; offset: number }[] = [];
  for (let k = -back; k <= (trim ? FINISH_ON : 1); k++) row.push({ turn: coil.turns + k * step, offset: k });
  return row;
}

/** Length of the whole former for a winding, mm, rounded up to half a millimetre. */
export function formerLengthMm(around: Around, coil: Coil): number {
  const row = finishHoles(around, coil);
  const last = coil.positionMm(row[row.length - 1]!.turn) + wireHoleMm(around.overallMm, 1) / 2;
  if (around.job.former.kind === 'tube') return Math.ceil(last + TUBE_MARGIN_MM);
  const runOut = around.grooved ? around.overallMm + around.pitchMm : WEB_MM;
  const rim = around.job.former.flanges ? RIM_MM + FLANGE_MM : 2;
  return Math.ceil((last + runOut + rim) * 2) / 2;
}

function wallFor(around: Around): { wallMm: number; strain: number; material: Material } {
  const { job, grooved, overallMm } = around;
  const found = findMaterial(job.former.material);
  if (!found.ok) throw new Error(`material ${job.former.material} passed the reading of the job`);
  const { material } = found;
  const groove = grooved ? overallMm / 2 : 0;
  const strainAt = (wall: number) => hoopStrain(around.tensionN, around.pitchMm, wall - groove, material.modulusGPa);
  const stated = job.former.wallMm;
  if (stated !== null) return { wallMm: stated, strain: strainAt(stated), material };
  const line = job.printer.lineMm;
  let lines = 4;
  while (lines < 8 && strainAt(lines * line + groove) > STRAIN_GOAL) lines++;
  const wallMm = Math.round((lines * line + groove) * 100) / 100;
  return { wallMm, strain: strainAt(wallMm), material };
}

/** Diameter at which holes come nearest to one another: the bore of a printed former, about the outside of a thin tube. */
function insideMm(around: Around): number {
  return Math.max(around.outsideMm - 2 * wallFor(around).wallMm, around.outsideMm / 4);
}

/** Ears at the foot for M4 screws, across the start hole's line so that leads stay free. */
function earsFor(radiusMm: number): Former['ears'] {
  return [90, 270].map((angleDeg) => ({
    angleDeg,
    holeDiameterMm: 4.4,
    centreRadiusMm: radiusMm + 6,
    widthMm: 13,
    thicknessMm: FLANGE_MM,
  }));
}

/** The former with all its dimensions. The stiffness text says what the tension does to the wall. */
export function formerFor(around: Around, coil: Coil, taps: readonly number[], hand: Hand): Former {
  const { job, outsideMm, grooved, overallMm } = around;
  const printed = job.former.kind === 'printed';
  const { wallMm, strain, material } = wallFor(around);
  const flanges = printed && job.former.flanges;
  const flangeMm = outsideMm + 2 * RIM_MM;
  const widest = flanges ? flangeMm : outsideMm;
  const groove = grooveFor(overallMm);
  const numbers = [
    { text: 'S', angleDeg: 0, tap: null },
    ...taps.map((turn, index) => ({ text: `${index + 1}`, angleDeg: angleOf(turn, hand), tap: index + 1 })),
  ];
  const percent = (strain * 100).toFixed(2);
  const ears = printed && job.former.mounting === 'ears' ? earsFor(flanges ? flangeMm / 2 : outsideMm / 2) : [];
  return {
    kind: job.former.kind,
    surface: grooved ? 'grooved' : 'smooth',
    material: material.name,
    densityGCm3: material.densityGPerCm3,
    outsideDiameterMm: outsideMm,
    boreDiameterMm: Math.round((outsideMm - 2 * wallMm) * 100) / 100,
    wallMm,
    lengthMm: formerLengthMm(around, coil),
    footMm: flanges || ears.length > 0 ? FLANGE_MM : 0,
    topMm: flanges ? FLANGE_MM : 0,
    flange: flanges ? { diameterMm: flangeMm, lowerMm: FLANGE_MM, upperMm: FLANGE_MM } : null,
    groove: grooved ? { depthMm: groove.depthMm, floorMm: groove.floorMm, runInTurns: 0.25 } : null,
    chamferMm: printed ? 0.5 : 0,
    ears,
    numbers: flanges ? numbers : [],
    numberHeightMm: 3.2,
    datumMark: printed ? { angleDeg: 0, widthMm: 1.2, depthMm: 0.6 } : null,
    body: 'full',
    ribs: null,
    ridges: null,
    base: null,
    posts: [],
    joints: [],
    tenthMmPercent:
      Math.round(
        1e4 *
          (coil.changed({ meanDiameterMm: coil.shape.meanDiameterMm + 0.1 }).inductanceUh(coil.turns) /
            coil.inductanceUh(coil.turns) -
            1),
      ) / 100,
    // Chords within 0.01 mm of the widest circle, in steps of 12 so that marks fall on them.
    segments: Math.max(48, Math.ceil(Math.PI / Math.acos(1 - 0.01 / (widest / 2)) / 12) * 12),
    stiffness: `${around.tensionN.toFixed(1)} N at this pitch takes ${percent} % off the diameter of a ${wallMm.toFixed(2)} mm wall of ${material.name} (modulus ${material.modulusGPa} GPa), ${(strain * 160).toFixed(2)} % off the inductance; wind no tighter`,
  };
}

/**
 * All radial holes: anchor, start, taps by their method, the row of finish holes. `taps` ends with the whole coil;
 * `unitTaps` are those of a units switch, labelled u1, u2, ...
 */
export function holesFor(
  around: Around,
  coil: Coil,
  taps: readonly number[],
  method: TapMethod,
  hand: Hand,
  unitTaps: readonly number[] = [],
): Hole[] {
  const wireHole = wireHoleMm(around.overallMm, 1);
  const circumference = Math.PI * coil.shape.meanDiameterMm;
  const at = (turn: number) => ({ angleDeg: angleOf(turn, hand), axialMm: coil.positionMm(turn) });
  const holes: Hole[] = [
    {
      purpose: 'anchor',
      tap: null,
      turn: null,
      label: 'A',
      angleDeg: angleOf(-ANCHOR_ARC_MM / circumference, hand),
      axialMm: coil.positionMm(0) - wireHole - 1.2,
      diameterMm: wireHole,
    },
    { purpose: 'start', tap: null, turn: 0, label: 'S', ...at(0), diameterMm: wireHole },
  ];
  const bored = [
    ...unitTaps.map((turn, index) => ({ turn, tap: null, name: `u${index + 1}` })),
    ...taps.slice(0, -1).map((turn, index) => ({ turn, tap: index + 1, name: `${index + 1}` })),
  ];
  const half = (method.holeMm + 1.2) / 2 / circumference;
  const sides = [
    [],
    [[0, '']],
    [
      [-half, 'a'],
      [half, 'b'],
    ],
  ] as const;
  for (const { turn, tap, name } of bored)
    for (const [side, letter] of sides[method.holes])
      holes.push({
        purpose: 'tap',
        tap,
        turn: turn + side,
        label: `${name}${letter}`,
        ...at(turn + side),
        diameterMm: method.holeMm,
      });
  for (const { turn, offset } of finishHoles(around, coil)) {
    const label = offset === 0 ? 'F' : offset > 0 ? `F+${offset}` : `F${offset}`;
    const tap = offset === 0 ? taps.length : null;
    holes.push({ purpose: 'finish', tap, turn, label, ...at(turn), diameterMm: wireHole });
  }
  return holes;
}

/**
 * The two holes that come nearest to one another for their size, if they leave less than 0.8 mm between them anywhere in
 * the wall; printed holes have a roof that rises to 0.71 of their diameter.
 */
export function tightestPair(holes: readonly Hole[], boreMm: number): { a: Hole; b: Hole; leftMm: number } | null {
  let worst: { a: Hole; b: Hole; leftMm: number } | null = null;
  for (let i = 0; i < holes.length; i++)
    for (let j = i + 1; j < holes.length; j++) {
      const [a, b] = holes[i]!.axialMm <= holes[j]!.axialMm ? [holes[i]!, holes[j]!] : [holes[j]!, holes[i]!];
      const turn = Math.abs(a.angleDeg - b.angleDeg) / 360;
      const arc = Math.min(turn, 1 - turn) * Math.PI * boreMm;
      const rise = b.axialMm - a.axialMm;
      const round = Math.hypot(arc, rise) - (a.diameterMm + b.diameterMm) / 2;
      const roof = Math.hypot(arc, rise - a.diameterMm * Math.SQRT1_2) - b.diameterMm / 2;
      const leftMm = Math.min(round, roof);
      if (leftMm < LEAST_WEB_MM - 1e-6 && (worst === null || leftMm < worst.leftMm)) worst = { a, b, leftMm };
    }
  return worst;
}
