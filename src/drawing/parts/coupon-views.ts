/** Views of the fit coupon. */
import { type CouponDimensions, type CouponHole, couponDimensions } from '../../parts/coupon-dimensions.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { said } from '../words.ts';
import { across, box, callout, hidden, round, size, upright } from './strokes.ts';

export function couponViews(record: PartsRecord): Record<string, View[]> {
  const d = couponDimensions(record);
  return { 'coupon-plate': [platePlan(d), plateElevation(d)], 'coupon-plug': [plugElevation(d), plugPlan(d)] };
}

function platePlan(d: CouponDimensions): View {
  const upper = d.holes.filter(({ row }) => row !== 'lying');
  const lying = d.holes.filter(({ row }) => row === 'lying');
  // The last of each row: its leader line crosses no other.
  const last = (row: CouponHole['row']) => d.holes.findLast((hole) => hole.row === row)!;
  const [socket, screw, wire] = [last('socket'), last('upright'), last('lying')];
  return {
    title: 'plan',
    shapes: [
      box(0, 0, d.widthMm, d.depthMm),
      box(d.fenceInsetMm, d.fenceFromMm, d.widthMm - 2 * d.fenceInsetMm, d.fenceToMm - d.fenceFromMm),
      ...upper.map(({ row, x, y, diameterMm, stepMm }) => round(x, y, diameterMm / 2, `${row} ${stepMm}`)),
      ...lying.flatMap(({ x, diameterMm }) =>
        [-0.5, 0.5].map((side) =>
          hidden([
            [x + side * diameterMm, d.fenceFromMm],
            [x + side * diameterMm, d.fenceToMm],
          ]),
        ),
      ),
    ],
    dimensions: [
      across(0, d.widthMm, 0, 'below'),
      upright(0, d.depthMm, 0, 'left'),
      callout(socket.x, socket.y, 'right', said`sockets dia ${size(d.plugMm)} + number (mm)`),
      callout(screw.x, screw.y, 'right', said`holes dia ${size(d.screwHoleMm)} + number (mm)`),
      callout(wire.x, wire.y, 'right', said`lying holes dia ${size(d.wireHoleMm)} + number (mm)`),
    ],
  };
}

function plateElevation(d: CouponDimensions): View {
  const top = d.plateMm + d.fenceHeightMm;
  const lying = d.holes.filter(({ row }) => row === 'lying');
  return {
    title: 'elevation',
    shapes: [
      box(0, 0, d.widthMm, d.plateMm),
      box(d.fenceInsetMm, d.plateMm, d.widthMm - 2 * d.fenceInsetMm, d.fenceHeightMm),
      ...lying.map(({ x, z, diameterMm, stepMm }) => round(x, z, diameterMm / 2, `lying ${stepMm}`)),
    ],
    dimensions: [upright(0, d.plateMm, 0, 'left'), upright(0, top, d.widthMm, 'right')],
  };
}

function plugElevation(d: CouponDimensions): View {
  const r = d.plugMm / 2;
  const top = d.headHeightMm + d.plugLengthMm;
  const c = d.chamferMm;
  return {
    title: 'elevation',
    shapes: [
      box(-d.headMm / 2, 0, d.headMm, d.headHeightMm),
      {
        shape: 'polyline',
        weight: 'outline',
        points: [
          [-r, d.headHeightMm],
          [-r, top - c],
          [-r + c, top],
          [r - c, top],
          [r, top - c],
          [r, d.headHeightMm],
        ],
      },
    ],
    dimensions: [
      across(-r, r, top - c, 'above', said`dia ${size(d.plugMm)}`),
      across(-d.headMm / 2, d.headMm / 2, 0, 'below'),
      upright(0, top, -d.headMm / 2, 'left'),
    ],
  };
}

function plugPlan(d: CouponDimensions): View {
  const half = d.headMm / 2;
  return {
    title: 'plan',
    shapes: [box(-half, -half, d.headMm, d.headMm), round(0, 0, d.plugMm / 2)],
    dimensions: [upright(-half, half, -half, 'left')],
  };
}
