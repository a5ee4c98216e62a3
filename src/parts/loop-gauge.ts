/**
 * The tap-loop gauge: a plate with pegs, so that all twisted loops take the same wire. The neck of the loop lies in a slot
 * of the edge that is held against the winding; the wire runs out to a peg, round it and back, and is twisted from there.
 *
 *     edge  ==slot======================( peg )     LOOP 50: half the wire of a tap
 *
 * The middle lane is the loop of the record; the others are shorter and longer by a step, for a switch nearer or farther.
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { textWidthMm } from './lettering.ts';
import { areaOf, circle, prism, rectangle } from './shapes.ts';
import { ringAt, slab, slabMm3 } from './slab.ts';
import type { Loft, Solid } from './solid.ts';
import { cutMm3, type Words, wordsCut } from './words.ts';

/** A radius that copper wire does not kink at, and a peg that does not break. */
const PEG_R_MM = 3;
const PEG_HEIGHT_MM = 6;
/** The top of a peg narrows, so that a twisted loop slips off. */
const PEG_CHAMFER_MM = 0.8;
const PLATE_MM = 3;
const CHAMFER_MM = 0.5;
/** From lane to lane: fingers and the neighbour's peg keep out of the way. */
const LANE_MM = 16;
/** From the far side of the longest peg to the end of the plate. */
const END_MM = 4;
const SLOT_DEPTH_MM = 3;
/** Half loops of the side lanes differ from the middle one by this. */
const STEP_MM = 10;
const TEXT_MM = 4;

export interface Lane {
  /** Half of the wire in the loop. */
  readonly halfMm: number;
  /** From the edge to the middle of the peg. */
  readonly pegMm: number;
  /** Middle of the lane, from the middle of the plate. */
  readonly yMm: number;
}

/** All in mm; x from the edge with the slots. */
export interface LoopGaugeDimensions {
  readonly lanes: readonly Lane[];
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly plateMm: number;
  readonly chamferMm: number;
  readonly pegR: number;
  readonly pegHeightMm: number;
  /** Takes both legs of the loop. */
  readonly slotMm: number;
  readonly slotDepthMm: number;
  readonly words: readonly Words[];
}

/** Wire from the root at the edge round a peg at `pegMm` and back: two tangents and the arc, at the wire's middle. */
export function loopWireMm(pegMm: number, pegR: number, overallMm: number): number {
  const r = pegR + overallMm / 2;
  return 2 * Math.sqrt(pegMm ** 2 - r ** 2) + r * (Math.PI + 2 * Math.asin(r / pegMm));
}

/** The place of the peg for a length of wire; the length grows with the distance, so that halving finds it. */
function pegFor(wireMm: number, overallMm: number): number {
  let low = PEG_R_MM + overallMm / 2;
  let high = wireMm;
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (loopWireMm(middle, PEG_R_MM, overallMm) < wireMm) low = middle;
    else high = middle;
  }
  return high;
}

/** The nearest a peg may stand to the edge: behind the slot, with plate between. */
const LEAST_PEG_MM = SLOT_DEPTH_MM + PEG_R_MM + 4;

/** @throws Fault (exit 4) `loop-gauge-short` for loops that go round no peg */
export function loopGaugeDimensions({ tapMethod, windings, printer }: PartsRecord): LoopGaugeDimensions {
  const { overallMm, overallHighMm } = windings[0]!.wire;
  const halfMm = tapMethod.loopM * 500;
  const leastMm = Math.ceil(loopWireMm(LEAST_PEG_MM, PEG_R_MM, overallMm));
  if (2 * halfMm < leastMm)
    throw new Fault(4, {
      code: 'loop-gauge-short',
      place: { key: 'parts' },
      got: `${Number((2 * halfMm).toFixed(1))} mm of wire in each tap (${tapMethod.name})`,
      expected: `loops of ${leastMm} mm of wire or more, which go round a peg of ${2 * PEG_R_MM} mm`,
      todo: 'leave the loop gauge out of parts, or choose twisted loops as the tap method',
    });
  const halves = [halfMm - STEP_MM, halfMm, halfMm + STEP_MM].filter((half) => 2 * half >= leastMm);
  const lanes = halves.map((half, i) => ({
    halfMm: half,
    pegMm: pegFor(2 * half, overallMm),
    yMm: (i - (halves.length - 1) / 2) * LANE_MM,
  }));
  const longest = Math.max(...lanes.map(({ pegMm }) => pegMm));
  const words = lanes.map(({ halfMm: half, pegMm, yMm }): Words => {
    const from = SLOT_DEPTH_MM + 1.5;
    const room = pegMm - PEG_R_MM - 1 - from;
    const figure = `${Number(half.toFixed(1))}`;
    const text = [`LOOP ${figure}`, figure].find((one) => textWidthMm(one, TEXT_MM) <= room) ?? '';
    return { text, x: from, y: yMm - TEXT_MM / 2, heightMm: TEXT_MM };
  });
  return {
    lanes,
    lengthMm: longest + PEG_R_MM + END_MM,
    widthMm: lanes.length * LANE_MM,
    plateMm: PLATE_MM,
    chamferMm: CHAMFER_MM,
    pegR: PEG_R_MM,
    pegHeightMm: PEG_HEIGHT_MM,
    slotMm: 2 * overallHighMm + Math.max(0.4, printer.lineMm),
    slotDepthMm: SLOT_DEPTH_MM,
    words: words.filter(({ text }) => text !== ''),
  };
}

/** @throws Fault (exit 4) as {@link loopGaugeDimensions} */
export function loopGaugeParts(record: PartsRecord): Solid[] {
  const d = loopGaugeDimensions(record);
  const { printer } = record;
  const left = -d.lengthMm / 2;
  const plate = slab('plate', left, -d.widthMm / 2, d.lengthMm, d.widthMm, d.plateMm, d.chamferMm);
  const sides = circle(d.pegR, 'solid').length;
  const top = d.plateMm + d.pegHeightMm;
  const pegs = d.lanes.map(({ halfMm, pegMm, yMm }): Loft => {
    const ring = (r: number, z: number) => ringAt(r, z, sides, left + pegMm, yMm);
    return {
      kind: 'loft',
      name: `peg ${halfMm}`,
      rings: [ring(d.pegR, d.plateMm - 1), ring(d.pegR, top - PEG_CHAMFER_MM), ring(d.pegR - PEG_CHAMFER_MM, top)],
      hubs: null,
    };
  });
  const slots = d.lanes.map(({ halfMm, yMm }) =>
    prism(`slot ${halfMm}`, [rectangle(left - 1, yMm - d.slotMm / 2, d.slotDepthMm + 1, d.slotMm)], -1, d.plateMm + 1),
  );
  const words = wordsCut(
    'words',
    d.words.map((each) => ({ ...each, x: each.x + left })),
    d.plateMm,
  );
  const whole = areaOf(circle(d.pegR, 'solid'));
  const end = whole * ((d.pegR - PEG_CHAMFER_MM) / d.pegR) ** 2;
  const pegMm3 =
    whole * (d.pegHeightMm - PEG_CHAMFER_MM) + ((whole + end + Math.sqrt(whole * end)) * PEG_CHAMFER_MM) / 3;
  const slotMm3 = d.slotMm * (d.slotDepthMm * d.plateMm - d.chamferMm ** 2 / 2);
  const nominal = record.tapMethod.loopM * 500;
  return [
    {
      part: 'loop-gauge',
      name: 'Tap-loop gauge',
      kind: 'loop gauge',
      quantity: 1,
      material: printer.material,
      densityGCm3: printer.densityGCm3,
      shapes: [plate, ...pegs],
      cutters: [...slots, words],
      expected: {
        bodies: 1,
        genus: 0,
        genusIs: 'no hole',
        minMm: [left, -d.widthMm / 2, 0],
        maxMm: [-left, d.widthMm / 2, top],
        volumeMm3:
          slabMm3(d.lengthMm, d.widthMm, d.plateMm, d.chamferMm) + d.lanes.length * (pegMm3 - slotMm3) - cutMm3(words),
      },
      use: `makes all loops alike: the slot against the winding, the wire round the peg marked ${Number(nominal.toFixed(1))} and back, then twisted from the slot outwards`,
      printNote: 'flat as it lies, pegs up, no supports',
    },
  ];
}
