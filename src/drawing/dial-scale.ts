/**
 * A dial that stands still behind a pointer: an arc of frequencies for each position of the switch, seen from the front. At true scale,
 * origin in the middle of the shaft, Y up, millimetres. Angles are clockwise from the top; the stop with the capacitor fully in lies half
 * the span before it.
 */
import { DIAL } from '../../templates/wording/dial-sheet.ts';
import type { DialPosition } from '../prove/charts-schema.ts';
import { degreesAt } from '../prove/dial.ts';
import type { Measure } from './boxes.ts';
import { marksOf, type ScaleMark } from './dial-marks.ts';
import type { Drawing, Shape } from './drawing.ts';
import { HOLE_MM } from './range-plate.ts';
import { CAP_SHARE, circle, label, line, polyline, SMALL_MM } from './shapes.ts';

/** Screws of 3 mm (common practice). */
export const MOUNT_MM = 3.2;
/** Outside the arcs: room for screws and the marks of the stops. */
const RIM_MM = 9;
/** Inside them: a knob of 30 mm and its pointer's foot. */
const INNER_MM = 18;
/** From arc to arc. */
const RING_MM = { least: 7, most: 11 } as const;
/** Lengths of marks at the least ring; they grow with it. */
const MARK_MM = { long: 2.6, middle: 1.9, short: 1.2 } as const;
const TEXT_OVER_MARK_MM = 0.6;
/** Least distance of marks, and of texts, along an arc. */
const APART_MM = { apartMm: 1, textsMm: 1.6 } as const;
/** Above this frequency an arc is written in megahertz. */
const MEGAHERTZ_FROM_KHZ = 3000;
/** Stops nearer than this to a screw turn all four screws aside. */
const SCREW_CLEAR_DEG = 9;

/** How many positions go on a dial of this diameter; 0: none. */
export const positionsOn = (diameterMm: number): number =>
  Math.max(0, Math.floor((diameterMm / 2 - RIM_MM - INNER_MM) / RING_MM.least + 1e-9));

/** The least diameter for so many positions, in whole millimetres. */
export const diameterFor = (positions: number): number =>
  Math.ceil(2 * (RIM_MM + INNER_MM + positions * RING_MM.least));

export interface DialPicture {
  readonly diameterMm: number;
  readonly spanDeg: number;
  /** The first inside, the last outside. */
  readonly positions: readonly DialPosition[];
  /** Told on the dial where there is room. */
  readonly serial: string;
}

/** A point at this radius, clockwise from the top. */
export function placeAt(radius: number, deg: number): [number, number] {
  const a = (deg * Math.PI) / 180;
  return [radius * Math.sin(a), radius * Math.cos(a)];
}

/** From the dial's reading to the angle clockwise from the top. */
export const drawnDeg = (degrees: number, spanDeg: number): number => degrees - spanDeg / 2;

interface Ring {
  readonly radius: number;
  readonly sizeMm: number;
  /** Of marks against those of the least ring. */
  readonly grown: number;
}

/** Arcs from the inside out. */
export function ringsOf(diameterMm: number, count: number): Ring[] {
  const outer = diameterMm / 2 - RIM_MM;
  const ring = Math.min(RING_MM.most, (outer - INNER_MM) / count);
  const grown = ring / RING_MM.least;
  return Array.from({ length: count }, (_, i) => ({
    radius: outer - (count - i) * ring,
    sizeMm: Math.min(1.25, grown) * SMALL_MM,
    grown: Math.min(1.25, grown),
  }));
}

/** Text along an arc, its foot to the middle, its middle at this angle. */
const along = (text: string, radius: number, deg: number, sizeMm: number, bold = false): Shape =>
  label(...placeAt(radius, deg), text, { sizeMm, bold, align: 'centre', turnDeg: -deg });

/** The marks of a position as they are written and where, for its ring. */
export function positionMarks(position: DialPosition, radius: number, sizeMm: number, measure: Measure): ScaleMark[] {
  const angle = degreesAt(position);
  const known = new Map<number, number>();
  const atMm = (kHz: number) => {
    const found = known.get(kHz) ?? (angle(kHz) * Math.PI * radius) / 180;
    known.set(kHz, found);
    return found;
  };
  const mega = position.highKhz >= MEGAHERTZ_FROM_KHZ;
  return marksOf(
    { lowKhz: position.lowKhz, highKhz: position.highKhz, atMm },
    (kHz) => `${Number((mega ? kHz / 1000 : kHz).toPrecision(10))}`,
    (text) => measure.width(text, sizeMm),
    APART_MM,
  );
}

function arcShapes(position: DialPosition, ring: Ring, spanDeg: number, measure: Measure): Shape[] {
  const { radius, sizeMm, grown } = ring;
  const [first, last] = [position.readings[0]!.degrees, position.readings.at(-1)!.degrees];
  const steps = Math.max(8, Math.ceil(last - first));
  const points = Array.from({ length: steps + 1 }, (_, i) =>
    placeAt(radius, drawnDeg(first + ((last - first) * i) / steps, spanDeg)),
  );
  const foot = radius + MARK_MM.long * grown + TEXT_OVER_MARK_MM;
  const marks = positionMarks(position, radius, sizeMm, measure);
  const beside = (text: string, bold: boolean) => {
    const half = ((measure.width(text, sizeMm, bold) / 2 + 1.2) * 180) / (Math.PI * radius);
    return { half, text, bold };
  };
  const number = beside(`${position.tap}`, true);
  const unit = beside(position.highKhz >= MEGAHERTZ_FROM_KHZ ? DIAL.MHz : DIAL.kHz, false);
  // A text at the end of an arc stands out over it: number and unit stand clear of those.
  const over = (mark: ScaleMark | undefined, at: number) => {
    if (mark === undefined || mark.text === null) return 0;
    const deg = (mark.atMm * 180) / (Math.PI * radius);
    const half = ((measure.width(mark.text, sizeMm) / 2) * 180) / (Math.PI * radius);
    return Math.max(0, half - Math.abs(deg - at));
  };
  const written = marks.filter(({ text }) => text !== null);
  const numberDeg = drawnDeg(first, spanDeg) - over(written[0], first) - number.half;
  const unitDeg = drawnDeg(last, spanDeg) + over(written.at(-1), last) + unit.half;
  return [
    polyline(points, 'thin'),
    ...marks.flatMap(({ atMm, text, length }): Shape[] => {
      const deg = drawnDeg((atMm * 180) / (Math.PI * radius), spanDeg);
      const mark = line(
        ...placeAt(radius, deg),
        ...placeAt(radius + MARK_MM[length] * grown, deg),
        length === 'short' ? 'hair' : 'thin',
      );
      return text === null ? [mark] : [mark, along(text, foot, deg, sizeMm)];
    }),
    along(number.text, foot, numberDeg, sizeMm, true),
    along(unit.text, foot, unitDeg, sizeMm),
  ];
}

/** Where the four screws lie: at the corners, or between them where a stop is near. */
function screwDegs(spanDeg: number): number[] {
  const corners = [45, 135, 225, 315];
  const stops = [-spanDeg / 2, spanDeg / 2].map((deg) => (deg + 360) % 360);
  const near = corners.some((deg) => stops.some((stop) => Math.abs(deg - stop) < SCREW_CLEAR_DEG));
  return near ? corners.map((deg) => deg - 45) : corners;
}

/** The coil's name in the gap at the foot, where it has room. */
function nameShapes({ serial, spanDeg, diameterMm }: DialPicture, measure: Measure): Shape[] {
  const text = DIAL.coil(serial);
  const half = measure.width(text, SMALL_MM) / 2 + 4;
  const free = Math.min(89, 180 - spanDeg / 2 - 8);
  const most = diameterMm / 2 - RIM_MM - 4;
  for (let radius = INNER_MM; radius <= most; radius += 1) {
    const high = radius - CAP_SHARE * SMALL_MM;
    // Above all as low as the numbers of the innermost arc hang over its ends.
    if (half <= high * Math.tan((free * Math.PI) / 180) - 3 && Math.hypot(half, radius) < most)
      return [label(0, -radius, text, { align: 'centre' })];
  }
  return [];
}

/** @throws RangeError where the positions have no room: `positionsOn` tells how many have */
export function drawDial(picture: DialPicture, measure: Measure): Drawing {
  const { diameterMm, spanDeg, positions } = picture;
  if (positions.length > positionsOn(diameterMm))
    throw new RangeError(`${positions.length} positions have no room on a dial of ${diameterMm} mm`);
  const radius = diameterMm / 2;
  const rings = ringsOf(diameterMm, positions.length);
  const stops = [
    { deg: drawnDeg(0, spanDeg), text: DIAL.from },
    { deg: drawnDeg(spanDeg, spanDeg), text: DIAL.to },
  ];
  const shapes: Shape[] = [
    circle(0, 0, radius, 'thin', undefined, 'cut'),
    circle(0, 0, HOLE_MM / 2, 'thin', undefined, 'hole'),
    line(-2.5, 0, 2.5, 0, 'hair'),
    line(0, -2.5, 0, 2.5, 'hair'),
    ...screwDegs(spanDeg).flatMap((deg): Shape[] => {
      const [x, y] = placeAt(radius - RIM_MM / 2, deg);
      return [
        circle(x, y, MOUNT_MM / 2, 'thin', undefined, 'mount'),
        line(x - 2.6, y, x + 2.6, y, 'hair'),
        line(x, y - 2.6, x, y + 2.6, 'hair'),
      ];
    }),
    ...stops.flatMap(({ deg, text }): Shape[] => [
      line(...placeAt(radius - RIM_MM + 1, deg), ...placeAt(radius - RIM_MM + 4, deg), 'outline'),
      along(text, radius - RIM_MM + 4.6, deg, SMALL_MM, true),
    ]),
    ...positions.flatMap((position, i) => arcShapes(position, rings[i]!, spanDeg, measure)),
    ...nameShapes(picture, measure),
  ];
  return { shapes };
}
