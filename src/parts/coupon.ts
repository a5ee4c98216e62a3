/**
 * The fit coupon: printed before anything else, it finds the two numbers that no table gives for a printer and its
 * filament, and shows what to enter for the scale.
 *
 *     coupon-plate   a row of sockets for the plug, each wider by its number    -> printer.clearance
 *                    rows of holes, upright and lying, each wider by its number -> printer.hole-compensation
 *                    a stated width and depth                                   -> printer.scale
 *     coupon-plug    a plug of its nominal diameter
 *
 * Its sizes leave out the compensation and the clearance that the job already has: every number on it is counted from the
 * true size, so that what is read off is what is entered, on the first print as on the tenth. Only the scale is at work in
 * it, as in every file; a new scale is the old one times stated over measured.
 */
import type { PartsRecord } from '../record/schema.ts';
import { type CouponDimensions, type CouponHole, couponDimensions } from './coupon-dimensions.ts';
import { teardrop } from './holes.ts';
import { areaOf, circle, prism, rectangle } from './shapes.ts';
import { ringAt, slab, slabMm3 } from './slab.ts';
import type { Frame, Loft, Prism, Solid } from './solid.ts';
import { cutMm3, wordsCut } from './words.ts';

/** Foot line of the figure on the plug's head. */
const PLUG_TEXT_Y_MM = 1.6;

/** Two parts: plate and plug. Nothing is refused: every size follows from the holes of the record. */
export function couponParts(record: PartsRecord): Solid[] {
  const d = couponDimensions(record);
  return [platePart(record, d), plugPart(record, d)];
}

function platePart({ printer }: PartsRecord, d: CouponDimensions): Solid {
  // Centred on the bed.
  const [x0, y0] = [-d.widthMm / 2, -d.depthMm / 2];
  const plate = slab('plate', x0, y0, d.widthMm, d.depthMm, d.plateMm, d.chamferMm);
  const fenceWidth = d.widthMm - 2 * d.fenceInsetMm;
  const fenceDepth = d.fenceToMm - d.fenceFromMm;
  const top = d.plateMm + d.fenceHeightMm;
  const fence = prism(
    'fence',
    [rectangle(x0 + d.fenceInsetMm, y0 + d.fenceFromMm, fenceWidth, fenceDepth)],
    d.plateMm - 1,
    top,
  );
  const cutters = d.holes.map((hole) => (hole.row === 'lying' ? lying(hole, d) : upright(hole, d)));
  const words = wordsCut(
    'words',
    d.words.map((w) => ({ ...w, x: w.x + x0, y: w.y + y0 })),
    d.plateMm,
  );
  const bored = d.holes.reduce(
    (sum, { row, diameterMm }) =>
      sum +
      (row === 'lying'
        ? areaOf(teardrop(diameterMm)) * fenceDepth
        : areaOf(circle(diameterMm / 2, 'hole')) * d.plateMm + footMm3(diameterMm / 2, d.chamferMm)),
    0,
  );
  return {
    part: 'coupon-plate',
    name: 'Fit coupon, plate',
    kind: 'coupon',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [plate, fence],
    cutters: [...cutters, words],
    expected: {
      bodies: 1,
      genus: d.holes.length,
      genusIs: `${d.holes.length} holes`,
      minMm: [x0, y0, 0],
      maxMm: [-x0, -y0, top],
      volumeMm3:
        slabMm3(d.widthMm, d.depthMm, d.plateMm, d.chamferMm) +
        fenceWidth * fenceDepth * d.fenceHeightMm -
        bored -
        cutMm3(words),
    },
    use: `printed first: the first socket that takes the plug as it should gives printer.clearance, the first hole that lets a drill shank of ${d.screwHoleMm} or ${d.wireHoleMm} mm pass gives printer.hole-compensation (the greater of the two), and stated over measured width and depth give printer.scale; the numbers are counted from the true size, whatever the job already has`,
    printNote:
      'flat as it lies, no supports; the layer height and line width of the job; let it cool before it is measured',
  };
}

/** What a chamfered mouth takes more than the hole itself. */
const footMm3 = (r: number, c: number) => Math.PI * c * c * (r + c / 3);

/** Opened out at the bed, where the first layers would narrow it. */
function upright({ x, y, diameterMm, row, stepMm }: CouponHole, d: CouponDimensions): Loft {
  const r = diameterMm / 2;
  const sides = circle(r, 'hole').length;
  const ring = (radius: number, z: number) =>
    ringAt(radius / Math.cos(Math.PI / sides), z, sides, x - d.widthMm / 2, y - d.depthMm / 2);
  const c = d.chamferMm;
  return {
    kind: 'loft',
    name: `${row} ${stepMm}`,
    rings: [ring(r + c + 1, -1), ring(r, c), ring(r, d.plateMm + 1)],
    hubs: null,
  };
}

/** Through the fence; its own y is up, its z runs towards the front. */
function lying({ x, z, diameterMm, stepMm }: CouponHole, d: CouponDimensions): Prism {
  const frame: Frame = { origin: [x - d.widthMm / 2, d.fenceToMm - d.depthMm / 2, z], x: [1, 0, 0], y: [0, 0, 1] };
  return prism(`lying ${stepMm}`, [teardrop(diameterMm)], -1, d.fenceToMm - d.fenceFromMm + 1, frame);
}

function plugPart({ printer }: PartsRecord, d: CouponDimensions): Solid {
  const half = d.headMm / 2;
  const head = slab('head', -half, -half, d.headMm, d.headMm, d.headHeightMm, d.chamferMm);
  const r = d.plugMm / 2;
  const sides = circle(r, 'solid').length;
  const ring = (radius: number, z: number) => ringAt(radius, z, sides);
  const top = d.headHeightMm + d.plugLengthMm;
  const c = d.chamferMm;
  const stem: Loft = {
    kind: 'loft',
    name: 'plug',
    rings: [ring(r, d.headHeightMm - 1), ring(r, top - c), ring(r - c, top)],
    hubs: null,
  };
  const front: Frame = { origin: [0, 0, 0], x: [1, 0, 0], y: [0, 0, 1] };
  const words = wordsCut(
    'words',
    [{ text: `${d.plugMm}`, x: 0, y: PLUG_TEXT_Y_MM, heightMm: d.textMm, align: 'centre' }],
    half,
    front,
  );
  const area = (radius: number) => (sides / 2) * Math.sin((2 * Math.PI) / sides) * radius ** 2;
  const [a, b] = [area(r), area(r - c)];
  return {
    part: 'coupon-plug',
    name: 'Fit coupon, plug',
    kind: 'coupon',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [head, stem],
    cutters: [words],
    expected: {
      bodies: 1,
      genus: 0,
      genusIs: 'no hole',
      minMm: [-half, -half, 0],
      maxMm: [half, half, top],
      volumeMm3:
        slabMm3(d.headMm, d.headMm, d.headHeightMm, c) +
        a * (d.plugLengthMm - c) +
        ((a + b + Math.sqrt(a * b)) * c) / 3 -
        cutMm3(words),
    },
    use: `goes into the sockets of coupon-plate; ${d.plugMm} mm thick if the printer is true`,
    printNote: 'standing on its head, no supports; the settings of coupon-plate',
  };
}
