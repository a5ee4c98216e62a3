/**
 * The arbor that holds a former, or a tube that was bought, on the shaft of the bench: a cone in each end of the bore, and
 * a split collar behind each cone.
 *
 *     collar  cone  ===== former =====  cone  collar
 *     -[|]----<|>---------------------<|>----[|]---   shaft
 *
 * One collar is clamped, the other pressed on by hand and clamped as well. The cones turn the former by friction; keys on
 * the collars turn the cones, so that a round shaft needs neither flat nor keyway. A hexagon has a bore of its own shape.
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import type { Solid } from './solid.ts';
import { type ClampDimensions, clampDimensions, collarSolid } from './stand-clamp.ts';
import {
  type ConeDimensions,
  coneDimensions,
  coneSolid,
  discRows,
  greatestShaftMm,
  hasWall,
  pressN,
} from './stand-cone.ts';

/** Bores are off by 2 %, or as much as tubes of small diameter are: half a millimetre (common practice, from memory). */
const OFF_SHARE = 0.02;
const OFF_LEAST_MM = 0.5;

/** Lengths in mm. */
export interface ArborDimensions {
  readonly clamp: ClampDimensions;
  readonly cone: ConeDimensions;
  /** Force that the second collar is pressed on with, so that the cones hold twice the greatest pull of the wire. */
  readonly pressN: number;
}

export function arborDimensions(record: PartsRecord): ArborDimensions {
  const { boreDiameterMm, outsideDiameterMm } = record.former;
  const clamp = clampDimensions(record);
  const offMm = Math.max(OFF_SHARE * boreDiameterMm, OFF_LEAST_MM);
  const cone = coneDimensions(record, clamp, { boreMm: boreDiameterMm, offMm });
  const pullN = record.windings[0]!.tensionHighN;
  return { clamp, cone, pressN: pressN(cone, pullN, outsideDiameterMm / 2) };
}

/** Two parts: cone and collar, two of each. @throws Fault (exit 4) `arbor-shaft-thick` */
export function arborParts(record: PartsRecord): Solid[] {
  const d = arborDimensions(record);
  requireRoom(record, d);
  const { clamp, cone } = d;
  const press = Math.max(5, Math.ceil(d.pressN / 5) * 5);
  const screw = `M4 x ${clamp.screwLengthMm} screw and nut`;
  return [
    coneSolid(record, clamp, cone, discRows(cone), {
      part: 'arbor-cone',
      name: 'Arbor cone',
      kind: 'arbor',
      quantity: 2,
      use: `one in each end of the former, small end inwards; takes bores of ${mm(cone.leastBoreMm)} to ${mm(cone.mostBoreMm)} mm`,
    }),
    collarSolid(record, {
      part: 'arbor-collar',
      name: 'Arbor collar',
      kind: 'arbor',
      quantity: 2,
      use: `behind each cone, its keys in the keyway; each with an ${screw}: clamp one, press the other on with ${press} N (${mm(press / 9.81, 1)} kg), clamp it`,
    }),
  ];
}

const mm = (x: number, digits = 2): string => `${Number(x.toFixed(digits))}`;

function requireRoom(record: PartsRecord, { clamp, cone }: ArborDimensions): void {
  if (hasWall(record, clamp, cone)) return;
  const { shaftMm, shaftForm } = record.shop;
  const most = greatestShaftMm(record, cone.smallMm);
  const across = shaftForm === 'round' ? '' : ' across flats';
  throw new Fault(4, {
    code: 'arbor-shaft-thick',
    place: { key: 'shop.shaft' },
    got: `a ${shaftForm} shaft of ${mm(shaftMm)} mm${across} through cones for a bore of ${mm(cone.boreMm)} mm, whose small end is ${mm(cone.smallMm)} mm`,
    expected: 'three printed lines of plastic round the shaft',
    todo:
      most >= 1
        ? `use a shaft of ${mm(most)} mm${across} or less, or a former with a greater bore`
        : 'use a former with a greater bore',
  });
}
