/**
 * The winding stand: two uprights on a base, a crank, and a holder for the wire spool with a drag that can be set.
 *
 *     from above                         from the crank
 *
 *      crank  [|]==o== former ==o==[|]        spool            former
 *                   \                          ( )------------( )     clockwise, wire over the top
 *                    \ wire                     |  drag        |
 *              [|]==spool==[|]               ___|___       ____|____
 *
 * **Which way to turn.** Stand at the crank and look along the shaft. A right-hand helix is a screw: followed clockwise it
 * runs away from you, followed counterclockwise it comes towards you. The wire reaches the former at a fixed place in
 * space, so the former turns against the way in which the wire goes round it. Turned clockwise, the former takes the wire
 * on counterclockwise, and a right-hand coil comes towards you: its start lies at the far end, away from the crank. A
 * left-hand coil is the mirror image and starts at the crank's end. So the crank is always turned clockwise, and the hand
 * decides which end of the former points to the crank: the foot, where every winding starts (Z = 0 of the record), points
 * away from it for a right-hand coil and to it for a left-hand one.
 *
 * **Where the spool stands.** Clockwise, the top of the former moves to the right; wire from a spool on the left goes on
 * over the top, where it can be seen. Its pull, to the left, and the former's weight press the shaft into bearings that are
 * open upwards to the right.
 *
 * **The drag** is explained beside its sizes in `stand-dimensions.ts`.
 */
import { Fault, type FaultParts } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { boundsOf } from './shapes.ts';
import type { Solid } from './solid.ts';
import { baseSolids } from './stand-base.ts';
import { collarSolid } from './stand-clamp.ts';
import { coneSolid, coneWallMm, greatestShaftMm, hasWall, leastSmallMm, SEAT_MM } from './stand-cone.ts';
import { crankSolid, handleSolid } from './stand-crank.ts';
import {
  HELD,
  SPOOL_OFF_MM,
  SPOOL_OFF_SHARE,
  type SpoolDimensions,
  type StandDimensions,
  standDimensions,
  uprightScrewMm,
} from './stand-dimensions.ts';
import { M4, screwLengthMm } from './stand-hardware.ts';
import { bushSolid, latchSolid, uprightOutline, uprightSolid } from './stand-upright.ts';

/** Everything on the two stands. @throws Fault (exit 4) `stand-upright-large`, `stand-spool-large`, `stand-spool-bore` */
export function standParts(record: PartsRecord): Solid[] {
  const d = standDimensions(record);
  requireRoom(record, d);
  const { clamp, crank, spool, bush } = d;
  const screw = `an M4 x ${clamp.screwLengthMm} screw and nut`;
  const uprightScrew = `M4 x ${uprightScrewMm(d.upright)} countersunk screws with nuts`;
  const latchScrew = screwLengthMm(d.latch.thicknessMm + d.upright.thicknessMm + M4.nutHeightMm);
  const right = record.frame.hand === 'right';
  const away = right ? 'away from the crank' : 'to the crank';
  return [
    uprightSolid(record, d.upright, {
      part: 'stand-upright',
      name: 'Winding stand, upright',
      use: `two on the base, arrow to the spool, lettering to the crank; carry a shaft of ${record.shop.shaftMm} mm, ${d.shaftMm} mm long`,
    }),
    ...baseSolids(record, d.base, {
      part: 'stand-base',
      name: 'Winding stand, base',
      use: `carries the uprights with four ${uprightScrew} from below; screw or clamp it to the bench; for this ${record.frame.hand}-hand coil the foot points ${away}, and the crank turns clockwise`,
    }),
    crankSolid(record, clamp, crank, {
      part: 'stand-crank',
      name: 'Crank',
      use: `on the shaft outside the upright, clamped with ${screw}; always turned clockwise, as its arrow shows`,
    }),
    handleSolid(record, crank, {
      part: 'stand-handle',
      name: 'Crank handle',
      use: `turns freely on the crank's pin, kept by an M4 x 16 screw into the pin over a washer of ${M4.washerMm} mm`,
    }),
    latchSolid(record, d.latch, {
      part: 'stand-latch',
      name: 'Latch',
      quantity: 4,
      use: `turned across the open bearing once the shaft lies in it, inside on the winding stand, outside on the spool holder; each with an M4 x ${latchScrew} screw and nut`,
    }),
    ...(bush
      ? [
          bushSolid(record, bush, {
            part: 'stand-bush',
            name: 'Bush',
            quantity: 4,
            use: 'round on the hexagon, one in every bearing, flange outwards on the stand and inwards at the spool',
          }),
        ]
      : []),
    uprightSolid(record, d.spoolUpright, {
      part: 'stand-spool-upright',
      name: 'Spool holder, upright',
      use: `two on the spool base, arrow to the coil; carry a shaft of ${record.shop.shaftMm} mm, ${d.spoolShaftMm} mm long; the notches take the drag's rubber band`,
    }),
    ...baseSolids(record, d.spoolBase, {
      part: 'stand-spool-base',
      name: 'Spool holder, base',
      use: `carries the spool's uprights with four ${uprightScrew}; stands ${d.awayMm} mm or more from the winding stand, on the left as seen from the crank`,
    }),
    coneSolid(record, clamp, spool.cone, drumRows(spool), {
      part: 'stand-spool-cone',
      name: 'Spool cone with drum',
      kind: 'stand',
      quantity: 2,
      use: spoolUse(record, spool),
    }),
    collarSolid(record, {
      part: 'stand-collar',
      name: 'Stand collar',
      kind: 'stand',
      quantity: 3,
      use: `one behind each spool cone, keys in the keyway, one on the winding shaft outside the far upright; each with ${screw}`,
    }),
  ];
}

function spoolUse({ windings, shop }: PartsRecord, { cone, bandN, drumRMm }: SpoolDimensions): string {
  const full = (HELD * drumRMm) / (shop.spoolDiameterMm / 2);
  return `one in each end of the spool's hole, ${mm(cone.leastBoreMm)} to ${mm(cone.mostBoreMm)} mm; drag: a cord one and a half times round the groove, one end tied to the upright, a rubber band on the end that the drum pulls at, hooked into a notch of the upright: a lower one pulls harder; the wire's tension is ${full.toFixed(2)} of the band's pull on a full spool and grows as the spool runs empty: for ${mm(windings[0]!.tensionHighN)} N stretch the band to ${mm(bandN, 0)} N, and check with a scale on the wire`;
}

/** The drum of the drag: two rims and a groove with flanks at 45 degrees, seen from the bed up. */
export function drumRows({ rimRMm, drumRMm, rimMm, floorMm, cone }: SpoolDimensions) {
  const step = rimRMm - drumRMm;
  const foot = 0.4;
  return [
    { rMm: rimRMm - foot, zMm: 0 },
    { rMm: rimRMm, zMm: foot },
    { rMm: rimRMm, zMm: rimMm },
    { rMm: drumRMm, zMm: rimMm + step },
    { rMm: drumRMm, zMm: rimMm + step + floorMm },
    { rMm: rimRMm, zMm: rimMm + 2 * step + floorMm },
    { rMm: rimRMm, zMm: cone.discMm },
    { rMm: cone.bigMm / 2, zMm: cone.discMm },
  ];
}

const mm = (x: number, digits = 2): string => `${Number(x.toFixed(digits))}`;

function requireRoom(record: PartsRecord, d: StandDimensions): void {
  const faults = [...uprightFaults(record, d), ...spoolFaults(record, d)];
  if (faults.length > 0) throw new Fault(4, faults);
}

/** Outer size of an upright, greater first, and of what stands under it. */
function sizeOf(d: StandDimensions['upright'], baseMm: number): { long: number; short: number } {
  const { min, max } = boundsOf(uprightOutline(d, 0));
  const height = max[1] - min[1];
  return { long: Math.max(height, baseMm), short: Math.min(height, baseMm) };
}

/** An upright as tall as the former asks for has to lie on the bed in one piece, and the base's width with it. */
function uprightFaults(record: PartsRecord, d: StandDimensions): FaultParts[] {
  const { bedXMm, bedYMm } = record.printer;
  const [short, long] = [Math.min(bedXMm, bedYMm), Math.max(bedXMm, bedYMm)];
  const fits = (of: StandDimensions) =>
    [sizeOf(of.upright, of.base.widthMm), sizeOf(of.spoolUpright, of.spoolBase.widthMm)].map(
      (size) => size.long <= long && size.short <= short,
    );
  const [stand, holder] = fits(d);
  const faults: FaultParts[] = [];
  if (!stand) {
    const { long: l, short: s } = sizeOf(d.upright, d.base.widthMm);
    const reach = greatest(d.reachMm, (tried) => fits(standDimensions(withReach(record, tried)))[0]!);
    faults.push({
      code: 'stand-upright-large',
      place: { key: 'printer.bed' },
      got: `uprights and a base that need ${mm(l)} x ${mm(s)} mm, for a former that reaches ${mm(d.reachMm)} mm from its axis, on a bed of ${mm(bedXMm)} x ${mm(bedYMm)} mm`,
      expected: 'uprights that the bed takes whole',
      todo: `${reach === null ? '' : `wind formers that reach ${mm(reach, 1)} mm or less from their axis (leave out ears, base or flange), or `}use a printer with a bed of ${Math.ceil(l)} x ${Math.ceil(s)} mm or larger`,
    });
  }
  if (!holder) {
    const { long: l, short: s } = sizeOf(d.spoolUpright, d.spoolBase.widthMm);
    const most = greatest(record.shop.spoolDiameterMm, (tried) => fits(standDimensions(withSpool(record, tried)))[1]!);
    faults.push({
      code: 'stand-spool-large',
      place: { key: 'shop.spool' },
      got: `a spool of ${mm(record.shop.spoolDiameterMm)} mm, whose uprights and base need ${mm(l)} x ${mm(s)} mm, on a bed of ${mm(bedXMm)} x ${mm(bedYMm)} mm`,
      expected: 'uprights that the bed takes whole',
      todo: `${most === null ? '' : `use spools of ${mm(most, 1)} mm or less, or `}a printer with a bed of ${Math.ceil(l)} x ${Math.ceil(s)} mm or larger`,
    });
  }
  return faults;
}

/** The greatest value, to a tenth, below one that does not fit; null when none does. */
function greatest(tooMuch: number, fits: (tried: number) => boolean): number | null {
  let [low, high] = [1, Math.ceil(tooMuch * 10)];
  if (!fits(low / 10)) return null;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (fits(middle / 10)) low = middle;
    else high = middle;
  }
  return low / 10;
}

const withReach = (record: PartsRecord, reach: number): PartsRecord => ({
  ...record,
  former: { ...record.former, outsideDiameterMm: 1, flange: null, ears: [], posts: [], base: baseOf(reach) },
});

const baseOf = (reach: number): PartsRecord['former']['base'] => ({
  diameterMm: 2 * reach,
  thicknessMm: 1,
  holes: 0,
  circleDiameterMm: 0,
  holeDiameterMm: 0,
  firstDeg: 0,
});

const withSpool = (record: PartsRecord, spoolDiameterMm: number): PartsRecord => ({
  ...record,
  shop: { ...record.shop, spoolDiameterMm },
});

/** The spool's hole has to take the shaft and a cone round it. */
function spoolFaults(record: PartsRecord, { clamp, spool }: StandDimensions): FaultParts[] {
  const { shaftMm, shaftForm, spoolBoreMm, spoolDiameterMm } = record.shop;
  if (spoolBoreMm >= spoolDiameterMm)
    return [
      {
        code: 'stand-spool-bore',
        place: { key: 'shop.spool-bore' },
        got: `a spool of ${mm(spoolDiameterMm)} mm with a hole of ${mm(spoolBoreMm)} mm`,
        expected: 'a hole smaller than the spool',
        todo: `state a hole below ${mm(spoolDiameterMm)} mm, or a larger spool`,
      },
    ];
  if (hasWall(record, clamp, spool.cone)) return [];
  const small = leastSmallMm(clamp, coneWallMm(record));
  // The least hole that the cone takes, and how far the one that it is made for may be off.
  const least = small + 2 * SEAT_MM;
  const bore = Math.ceil(Math.max(least + SPOOL_OFF_MM, least / (1 - SPOOL_OFF_SHARE)) * 10) / 10;
  const most = greatestShaftMm(record, spool.cone.smallMm);
  const across = shaftForm === 'round' ? '' : ' across flats';
  return [
    {
      code: 'stand-spool-bore',
      place: { key: 'shop.spool-bore' },
      got: `a spool with a hole of ${mm(spoolBoreMm)} mm on a ${shaftForm} shaft of ${mm(shaftMm)} mm${across}`,
      expected: 'room in the hole for the shaft and three printed lines of a cone round it',
      todo: `use spools with a hole of ${mm(bore, 1)} mm or more${most >= 1 ? `, or a shaft of ${mm(most)} mm${across} or less` : ''}`,
    },
  ];
}
