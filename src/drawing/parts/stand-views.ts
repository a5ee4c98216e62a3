/** Views of the winding stand's parts, and of both stands as put together, beside the plan of their bases. */
import { arborDimensions } from '../../parts/arbor.ts';
import { circle as ring } from '../../parts/shapes.ts';
import type { Point2 } from '../../parts/solid.ts';
import { drumRows } from '../../parts/stand.ts';
import { type BasePiece, baseCuts, basePieces, pieceOutline } from '../../parts/stand-base.ts';
import { slitOutline } from '../../parts/stand-clamp.ts';
import { outsideMm } from '../../parts/stand-cone.ts';
import { CRANK_RELIEF_MM, crankOutline } from '../../parts/stand-crank.ts';
import {
  type BaseDimensions,
  DOVETAIL,
  type StandDimensions,
  standDimensions,
  type UprightDimensions,
} from '../../parts/stand-dimensions.ts';
import { M4 } from '../../parts/stand-hardware.ts';
import { hull } from '../../parts/stand-outline.ts';
import { latchHole, uprightOutline, windowOutline } from '../../parts/stand-upright.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { said } from '../words.ts';
import { boreShape, collarViews, coneViews } from './arbor-views.ts';
import { across, box, callout, hidden, outline, round, size, upright } from './strokes.ts';

export function standViews(record: PartsRecord): Record<string, View[]> {
  const d = standDimensions(record);
  const { clamp, spool, bush } = d;
  return {
    'stand-upright': uprightViews(d.upright),
    ...baseViews(record, d.base, 'stand-base', assembled(record, d)),
    'stand-crank': crankViews(d),
    'stand-handle': handleViews(d),
    'stand-latch': latchViews(d),
    ...(bush ? { 'stand-bush': bushViews(d, bush) } : {}),
    'stand-spool-upright': uprightViews(d.spoolUpright),
    ...baseViews(record, d.spoolBase, 'stand-spool-base', [holderElevation(record, d)]),
    'stand-spool-cone': coneViews(clamp, spool.cone, drumRows(spool)).map((view) =>
      view.title === 'elevation'
        ? {
            ...view,
            dimensions: [
              ...view.dimensions,
              callout(
                spool.drumRMm,
                spool.drumMm / 2,
                'right',
                said`groove dia ${size(2 * spool.drumRMm)}, ${size(spool.floorMm)} wide`,
              ),
            ],
          }
        : view,
    ),
    'stand-collar': collarViews(clamp),
  };
}

function uprightViews(d: UprightDimensions): View[] {
  const shape = uprightOutline(d, 0);
  const window = windowOutline(d);
  const [hx, hy] = latchHole(d);
  const [half, top] = [d.footMm / 2, d.axisMm + d.headRMm];
  const w = d.tenonWidthMm / 2;
  const plan: View = {
    title: 'plan',
    shapes: [outline(shape), round(hx, hy, M4.holeMm / 2, 'latch'), ...(window ? [outline(window)] : [])],
    dimensions: [
      across(d.tenonXMm - w, d.tenonXMm + w, -d.tenonMm, 'below', said`tenon ${size(d.tenonWidthMm)}`),
      across(-d.screwXMm, d.screwXMm, 0, 'below'),
      across(-half, half, 0, 'below'),
      upright(0, d.axisMm, -half, 'left'),
      upright(-d.tenonMm, top, half, 'right'),
      callout(0, d.axisMm - d.bearingMm / 2, 'left', said`bearing ${size(d.bearingMm)} wide, round below`),
      callout(hx, hy, 'left', said`dia ${size(M4.holeMm)}`),
    ],
  };
  const edge: View = {
    title: 'elevation',
    shapes: [box(-half, 0, 2 * half, d.thicknessMm)],
    dimensions: [upright(0, d.thicknessMm, -half, 'left')],
  };
  return [plan, edge];
}

function baseViews(
  record: PartsRecord,
  d: BaseDimensions,
  part: string,
  together: readonly View[],
): Record<string, View[]> {
  return Object.fromEntries(
    basePieces(d).map((piece, i) => [
      piece.part === 'whole' ? part : `${part}-${piece.part}`,
      [basePlan(record, d, piece), ...(i === 0 ? together : [])],
    ]),
  );
}

function basePlan(record: PartsRecord, d: BaseDimensions, piece: BasePiece): View {
  const plain = { ...record, printer: { ...record.printer, holeCompensationMm: 0 } };
  const shape = pieceOutline(record, d, piece);
  const cuts = baseCuts(plain, d, piece);
  const half = d.widthMm / 2;
  const [mx, my] = d.mortiseMm;
  const x = -d.uprightXMm;
  const ends = piece.part !== 'middle';
  const joint = piece.part === 'whole' ? [] : [piece.toMm, piece.toMm + DOVETAIL.lengthMm];
  return {
    title: 'plan',
    shapes: [
      outline(shape),
      ...[...cuts.mortises, ...cuts.bench, ...cuts.windows].map(outline),
      ...cuts.screws.map(([sx, sy]) => round(sx, sy, M4.holeMm / 2, 'screw')),
    ],
    dimensions: [
      ...(ends ? [across(piece.fromMm, x, -half, 'below')] : []),
      ...(piece.part === 'whole' ? [across(x, -x, -half, 'below')] : []),
      across(piece.fromMm, piece.toMm, -half, 'below'),
      ...(joint.length > 0
        ? [across(joint[0]!, joint[1]!, half, 'above', said`tongue ${size(DOVETAIL.lengthMm)}`)]
        : []),
      upright(-half, half, piece.toMm, 'right'),
      ...(ends
        ? [
            upright(-d.screwYMm, d.screwYMm, piece.fromMm, 'left'),
            callout(x, d.tenonYMm, 'above', said`mortise ${size(mx)} x ${size(my)}`),
          ]
        : []),
      callout(piece.fromMm, 0, 'left', said`${size(d.thicknessMm)} thick`),
    ],
  };
}

function crankViews({ clamp, crank: d }: StandDimensions): View[] {
  const shape = crankOutline(clamp, d);
  const slit = slitOutline(clamp, clamp.boreReachMm + CRANK_RELIEF_MM);
  const left = Math.min(...shape.map((p) => p[0]));
  const top = clamp.heightMm + d.pinLengthMm;
  const plan: View = {
    title: 'plan',
    shapes: [
      outline(shape),
      boreShape(clamp),
      box(slit[0]![0], slit[0]![1], clamp.endXMm - slit[0]![0], clamp.slitMm),
      box(clamp.screwXMm - clamp.nutMm / 2, clamp.nutFromMm, clamp.nutMm, clamp.nutDepthMm),
      round(-d.armMm, 0, d.pinMm / 2, 'pin'),
      round(-d.armMm, 0, M4.pilotMm / 2, 'thread'),
    ],
    dimensions: [
      across(-d.armMm, 0, -clamp.halfWidthMm, 'below'),
      across(left, clamp.endXMm, -clamp.halfWidthMm, 'below'),
      upright(-clamp.halfWidthMm, clamp.halfWidthMm, left, 'left'),
      callout(0, clamp.boreMm / 2, 'above', said`bore ${size(clamp.boreMm)}`),
    ],
  };
  const elevation: View = {
    title: 'elevation',
    shapes: [
      box(left, 0, clamp.endXMm - left, clamp.heightMm),
      box(-d.armMm - d.pinMm / 2, clamp.heightMm, d.pinMm, d.pinLengthMm),
      round(clamp.screwXMm, clamp.heightMm / 2, clamp.screwHoleMm / 2, 'screw'),
    ],
    dimensions: [
      across(-d.armMm - d.pinMm / 2, -d.armMm + d.pinMm / 2, top, 'above', said`dia ${size(d.pinMm)}`),
      upright(clamp.heightMm, top, left, 'left'),
      upright(0, clamp.heightMm, clamp.endXMm, 'right'),
      callout(clamp.screwXMm, clamp.heightMm / 2, 'below', `M4 x ${clamp.screwLengthMm}`),
    ],
  };
  return [plan, elevation];
}

function handleViews({ crank: d }: StandDimensions): View[] {
  const [r, b, top] = [d.handleMm / 2, d.handleBoreMm / 2, d.handleLengthMm];
  const bore = [-b, b].map((x) =>
    hidden([
      [x, 0],
      [x, top],
    ]),
  );
  return [
    {
      title: 'elevation',
      shapes: [box(-r, 0, 2 * r, top), ...bore],
      dimensions: [
        across(-r, r, 0, 'below', said`dia ${size(2 * r)}`),
        across(-b, b, top, 'above', said`bore dia ${size(2 * b)}`),
        upright(0, top, -r, 'left'),
      ],
    },
    { title: 'plan', shapes: [round(0, 0, r), round(0, 0, b, 'bore')], dimensions: [] },
  ];
}

function latchViews({ latch: d }: StandDimensions): View[] {
  const r = d.radiusMm;
  return [
    {
      title: 'plan',
      shapes: [outline(hull([...ring(r, 'solid'), ...ring(r, 'solid', d.reachMm, 0)])), round(0, 0, M4.holeMm / 2)],
      dimensions: [
        across(-r, d.reachMm + r, -r, 'below'),
        upright(-r, r, d.reachMm + r, 'right'),
        callout(0, M4.holeMm / 2, 'above', said`dia ${size(M4.holeMm)}`),
      ],
    },
    {
      title: 'elevation',
      shapes: [box(-r, 0, d.reachMm + 2 * r, d.thicknessMm)],
      dimensions: [upright(0, d.thicknessMm, -r, 'left')],
    },
  ];
}

function bushViews({ clamp }: StandDimensions, d: NonNullable<StandDimensions['bush']>): View[] {
  const [f, r] = [d.flangeMm / 2, d.outsideMm / 2];
  return [
    {
      title: 'elevation',
      shapes: [
        box(-f, 0, 2 * f, d.flangeThicknessMm),
        box(-r, d.flangeThicknessMm, 2 * r, d.heightMm - d.flangeThicknessMm),
      ],
      dimensions: [
        across(-r, r, d.heightMm, 'above', said`dia ${size(d.outsideMm)}`),
        across(-f, f, 0, 'below', said`dia ${size(d.flangeMm)}`),
        upright(0, d.heightMm, -f, 'left'),
        upright(0, d.flangeThicknessMm, f, 'right'),
      ],
    },
    {
      title: 'plan',
      shapes: [round(0, 0, f), round(0, 0, r), boreShape(clamp)],
      dimensions: [callout(0, clamp.boreMm / 2, 'above', said`${size(clamp.boreMm)} across flats`)],
    },
  ];
}

type Shapes = View['shapes'][number];

/** Base, uprights and shaft from the side; x along the shaft, heights from the base's upper face. */
function frameShapes(base: BaseDimensions, stand: UprightDimensions, shaftMm: number, shaftLengthMm: number): Shapes[] {
  const [t, top] = [stand.thicknessMm, stand.axisMm + stand.headRMm];
  return [
    box(-base.lengthMm / 2, -base.thicknessMm, base.lengthMm, base.thicknessMm),
    ...[-1, 1].map((side) => box(side * base.uprightXMm - t / 2, 0, t, top)),
    box(-shaftLengthMm / 2, stand.axisMm - shaftMm / 2, shaftLengthMm, shaftMm),
  ];
}

/** The winding stand as put together: from the side, crank at the left, and from the crank. */
function assembled(record: PartsRecord, d: StandDimensions): View[] {
  const { former, shop } = record;
  const { upright: stand, base, clamp, crank } = d;
  const { cone } = arborDimensions(record);
  const axis = stand.axisMm;
  const half = former.lengthMm / 2;
  const far = half + outsideMm(cone);
  const [end, face] = [base.lengthMm / 2, base.uprightXMm + stand.thicknessMm / 2];
  const r = former.outsideDiameterMm / 2;
  const bottom = -base.thicknessMm;
  const both = (x: number, width: number, y: number, height: number) => [
    box(x, y, width, height),
    box(-x - width, y, width, height),
  ];
  const elevation: View = {
    title: 'elevation',
    shapes: [
      ...frameShapes(base, stand, shop.shaftMm, d.shaftMm),
      box(-half, axis - r, 2 * half, 2 * r),
      ...both(half, far - half, axis - cone.bigMm / 2, cone.bigMm),
      ...both(far, clamp.heightMm, axis - clamp.ringRMm, 2 * clamp.ringRMm),
      box(
        -face - clamp.heightMm,
        axis - crank.armMm - clamp.halfWidthMm,
        clamp.heightMm,
        crank.armMm + clamp.halfWidthMm + clamp.endXMm,
      ),
      box(
        -face - clamp.heightMm - crank.handleLengthMm,
        axis - crank.armMm - crank.handleMm / 2,
        crank.handleLengthMm,
        crank.handleMm,
      ),
      box(face, axis - clamp.ringRMm, clamp.heightMm, 2 * clamp.ringRMm),
    ],
    dimensions: [
      across(-base.uprightXMm + stand.thicknessMm / 2, base.uprightXMm - stand.thicknessMm / 2, bottom, 'below'),
      across(-end, end, bottom, 'below'),
      upright(0, axis, end, 'right'),
      callout(d.shaftMm / 2, axis, 'above', said`shaft ${size(shop.shaftMm)}, ${size(d.shaftMm)} long`),
      callout(-face - clamp.heightMm / 2, axis + clamp.endXMm, 'above', 'crank'),
    ],
  };
  const window = windowOutline(stand);
  const endView: View = {
    title: 'end view',
    shapes: [
      box(-base.widthMm / 2, bottom, base.widthMm, base.thicknessMm),
      outline(uprightOutline(stand, 0).filter(([, y]) => y >= 0)),
      ...(window ? [outline(window)] : []),
      { ...round(0, axis, d.reachMm, 'former'), weight: 'thin', dash: 'dashed' },
      outline(crankOutline(clamp, crank).map(([x, y]): Point2 => [-y, x + axis])),
    ],
    dimensions: [
      upright(axis - crank.armMm, axis, base.widthMm / 2, 'right'),
      callout(-d.reachMm, axis, 'left', 'wire from the left, over the top'),
      callout(0, axis - crank.armMm, 'below', 'turn clockwise'),
    ],
  };
  return [elevation, endView];
}

/** The spool holder as put together, from the side. */
function holderElevation(record: PartsRecord, d: StandDimensions): View {
  const { shop } = record;
  const { spoolUpright: stand, spoolBase: base, spool, clamp } = d;
  const [axis, half, r] = [stand.axisMm, shop.spoolWidthMm / 2, shop.spoolDiameterMm / 2];
  const far = half + outsideMm(spool.cone);
  const end = base.lengthMm / 2;
  return {
    title: 'elevation',
    shapes: [
      ...frameShapes(base, stand, shop.shaftMm, d.spoolShaftMm),
      { ...box(-half, axis - r, 2 * half, 2 * r), weight: 'thin', dash: 'dashed' },
      ...[-1, 1].flatMap((side) => [
        box(side > 0 ? far - spool.drumMm : -far, axis - spool.rimRMm, spool.drumMm, 2 * spool.rimRMm),
        box(side > 0 ? far : -far - clamp.heightMm, axis - clamp.ringRMm, clamp.heightMm, 2 * clamp.ringRMm),
      ]),
    ],
    dimensions: [
      across(-end, end, -base.thicknessMm, 'below'),
      upright(0, axis, end, 'right'),
      callout(0, axis + r, 'above', said`spool dia ${size(2 * r)} x ${size(2 * half)}`),
      callout(d.spoolShaftMm / 2, axis, 'above', said`shaft ${size(d.spoolShaftMm)} long`),
    ],
  };
}
