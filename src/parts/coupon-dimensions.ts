/**
 * Named dimensions of the fit coupon. Every size is a true one: neither the compensation nor the clearance of the job is in
 * it, so that the numbers on it are what is to be entered.
 */
import type { PartsRecord } from '../record/schema.ts';
import { textWidthMm } from './lettering.ts';
import type { Words } from './words.ts';

/** What each hole is wider than its nominal size; printed holes come out small by 0 to 0.5 mm (common practice, from memory). */
const HOLE_STEPS_MM = [0, 0.1, 0.2, 0.3, 0.4, 0.5] as const;
/** Gaps on diameter, from a press fit to a loose one. */
const CLEARANCE_STEPS_MM = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6] as const;
/** Thick enough to hold by, small enough for little plastic. */
const PLUG_MM = 8;
const PLUG_LENGTH_MM = 12;
const HEAD_MM = 12;
const HEAD_HEIGHT_MM = 6;
const PLATE_MM = 4;
/** On lower edges: the first layers spread, and a size taken there would be theirs. */
const CHAMFER_MM = 0.5;
/** Where no mounting screw is known: a hole that passes a screw of 4 mm. */
const SCREW_HOLE_MM = 4.4;
const FENCE_MM = 3;
const FENCE_INSET_MM = 1;
const TEXT_MM = 3;
/** Between rows and round the edge. */
const GAP_MM = 2;
/** Widths and depths that are easy to compare with a caliper's reading. */
const ROUND_MM = 10;

/** One hole or socket of the plate; x and y from the lower left corner of the plate, z from the bed. */
export interface CouponHole {
  readonly row: 'socket' | 'upright' | 'lying';
  readonly x: number;
  /** Of an upright hole; a lying one runs along y through the fence. */
  readonly y: number;
  /** Of a lying hole. */
  readonly z: number;
  /** As modelled, which is as it should come out if the printer were true. */
  readonly diameterMm: number;
  readonly stepMm: number;
}

/** All in mm. */
export interface CouponDimensions {
  readonly widthMm: number;
  readonly depthMm: number;
  readonly plateMm: number;
  readonly chamferMm: number;
  readonly plugMm: number;
  readonly plugLengthMm: number;
  readonly headMm: number;
  readonly headHeightMm: number;
  /** Nominal diameter of the wire holes, lying, and of screw holes, upright. */
  readonly wireHoleMm: number;
  readonly screwHoleMm: number;
  /** The fence with the lying holes: from y to y, its height over the plate, its distance from the sides. */
  readonly fenceFromMm: number;
  readonly fenceToMm: number;
  readonly fenceHeightMm: number;
  readonly fenceInsetMm: number;
  readonly textMm: number;
  readonly holes: readonly CouponHole[];
  readonly words: readonly Words[];
}

export function couponDimensions({ former, holes: bored, printer }: PartsRecord): CouponDimensions {
  const wireHoleMm = bored.find((hole) => hole.purpose === 'start')?.diameterMm ?? 1;
  const screwHoleMm = former.ears[0]?.holeDiameterMm ?? former.base?.holeDiameterMm ?? SCREW_HOLE_MM;
  const greatest = (steps: readonly number[]) => steps[steps.length - 1]!;
  const most = {
    socket: PLUG_MM + greatest(CLEARANCE_STEPS_MM),
    upright: screwHoleMm + greatest(HOLE_STEPS_MM),
    lying: wireHoleMm + greatest(HOLE_STEPS_MM),
  };
  const pitch = Math.max(most.socket, most.upright, most.lying) + Math.max(2.4, 4 * printer.lineMm);
  const titles = [`CLEARANCE: PLUG ${PLUG_MM} IN`, `HOLES ${screwHoleMm} AND ${wireHoleMm} PLUS`];
  const widest = Math.max(...titles.map((title) => textWidthMm(title, TEXT_MM)));
  const widthMm = roundUp(Math.max(HOLE_STEPS_MM.length * pitch, widest) + 2 * GAP_MM);
  const line = TEXT_MM + GAP_MM;

  // From the front to the back: the stated size, the sockets, the upright holes, the fence.
  const statedY = GAP_MM + CHAMFER_MM;
  const titleY = [statedY + line + 1];
  const socketY = titleY[0]! + line - 1 + most.socket / 2;
  const numberY = [socketY + most.socket / 2 + 1];
  titleY.push(numberY[0]! + line + 1);
  const uprightY = titleY[1]! + line - 1 + most.upright / 2;
  numberY.push(uprightY + most.upright / 2 + 1);
  const depthMm = roundUp(numberY[1]! + TEXT_MM + 1 + FENCE_MM + FENCE_INSET_MM);
  const fenceToMm = depthMm - FENCE_INSET_MM;
  const fenceFromMm = fenceToMm - FENCE_MM;
  const lyingZ = PLATE_MM + most.lying / 2 + 1;

  const at = (k: number) => widthMm / 2 + (k - (HOLE_STEPS_MM.length - 1) / 2) * pitch;
  const row = (kind: CouponHole['row'], steps: readonly number[], nominal: number, y: number, z: number) =>
    steps.map((stepMm, k): CouponHole => ({ row: kind, x: at(k), y, z, diameterMm: nominal + stepMm, stepMm }));
  const centred = (text: string, x: number, y: number): Words => ({ text, x, y, heightMm: TEXT_MM, align: 'centre' });
  return {
    widthMm,
    depthMm,
    plateMm: PLATE_MM,
    chamferMm: CHAMFER_MM,
    plugMm: PLUG_MM,
    plugLengthMm: PLUG_LENGTH_MM,
    headMm: HEAD_MM,
    headHeightMm: HEAD_HEIGHT_MM,
    wireHoleMm,
    screwHoleMm,
    fenceFromMm,
    fenceToMm,
    fenceHeightMm: lyingZ - PLATE_MM + most.lying * Math.SQRT1_2 + Math.max(1, 2 * printer.lineMm),
    fenceInsetMm: FENCE_INSET_MM,
    textMm: TEXT_MM,
    holes: [
      ...row('socket', CLEARANCE_STEPS_MM, PLUG_MM, socketY, 0),
      ...row('upright', HOLE_STEPS_MM, screwHoleMm, uprightY, 0),
      ...row('lying', HOLE_STEPS_MM, wireHoleMm, (fenceFromMm + fenceToMm) / 2, lyingZ),
    ],
    words: [
      centred(`X ${widthMm}  Y ${depthMm}  ON DIAM.`, widthMm / 2, statedY),
      ...titles.map((title, i) => centred(title, widthMm / 2, titleY[i]!)),
      ...CLEARANCE_STEPS_MM.map((step, k) => centred(figure(step), at(k), numberY[0]!)),
      ...HOLE_STEPS_MM.map((step, k) => centred(figure(step), at(k), numberY[1]!)),
    ],
  };
}

/** `.3`: the nought would only be more to cut. */
const figure = (step: number) => step.toFixed(1).replace(/^0(?=\.[1-9])|\.0$/, '');

const roundUp = (mm: number) => Math.ceil(mm / ROUND_MM - 1e-9) * ROUND_MM;
