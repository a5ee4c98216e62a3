/**
 * The surface of the former, developed and seen from outside, at true scale. X is the arc, growing to the right with
 * the angle (counterclockwise seen from above is to the right seen from outside with Z up); Y is Z, from the datum.
 * The paper counts: the arc is taken at the outside radius and half its thickness. The seam lies in the widest angle
 * without a hole.
 */
import type { CoilRecord, Hole } from '../record/schema.ts';
import type { Box, Measure } from './boxes.ts';
import type { Line, Shape } from './drawing.ts';
import { type Marked, placeLabels } from './labels.ts';
import { seamLines } from './seam-lines.ts';
import { secondHere } from './second-turns.ts';
import { circle, label, line, polyline, rectangle } from './shapes.ts';
import { loopMarks, markAtTap } from './tap-marks.ts';

/** Thickness of the paper, mm. */
export const PAPER_THICKNESS_MM = 0.1;
/** Width of the overlap beyond the seam, mm. */
export const TAB_MM = 10;
/** Height of the scale of angles above the sheet, mm. */
export const SCALE_MM = 6.5;

/** Room that a figure of the scale of angles needs. */
const FIGURE_ROOM_MM = 9;

export interface Developed {
  readonly shapes: readonly Shape[];
  /** What labels and holes take up. */
  readonly taken: readonly Box[];
  /** The edges of the winding, and seams of a former in sections: written over only where there is no better place. */
  readonly lines: readonly Box[];
  /** Labels for which there was no room. */
  readonly unlabelled: readonly string[];
  /** Some tap has no hole. */
  readonly unbored: boolean;
  readonly circumferenceMm: number;
  readonly seamDeg: number;
  /** Lower and upper edge of the sheet above the datum. */
  readonly bottomMm: number;
  readonly topMm: number;
}

interface Place {
  readonly name: string;
  readonly tap: boolean;
  readonly label: string;
  readonly angleDeg: number;
  readonly axialMm: number;
  /** 0 when there is no hole. */
  readonly diameterMm: number;
}

const holeName = (hole: Hole) => `hole ${hole.purpose} ${hole.label}`;

/** Every hole of the wall, and the places of taps that have none. */
export function places(record: CoilRecord): Place[] {
  const found: Place[] = record.holes.map((hole) => ({
    name: holeName(hole),
    tap: hole.purpose === 'tap',
    label: hole.label,
    angleDeg: hole.angleDeg,
    axialMm: hole.axialMm,
    diameterMm: hole.diameterMm,
  }));
  const { taps, unitTaps = [] } = record.windings[0]!;
  if (record.holes.some((hole) => hole.purpose === 'tap')) return found;
  const marked = [
    ...unitTaps.map((tap) => ({ ...tap, label: `u${tap.unit}` })),
    ...taps.slice(0, -1).map((tap) => ({ ...tap, label: `${tap.tap}` })),
  ];
  for (const tap of marked) {
    found.push({
      name: `tap ${tap.label}`,
      tap: true,
      label: tap.label,
      angleDeg: tap.angleDeg,
      axialMm: tap.positionMm,
      diameterMm: 0,
    });
  }
  return found;
}

/** The middle of the widest gap between neighbouring angles. */
export function seamOf(angles: readonly number[]): number {
  const sorted = [...new Set(angles.map((angle) => ((angle % 360) + 360) % 360))].sort((a, b) => a - b);
  let best = { from: sorted[0] ?? 0, gap: 0 };
  sorted.forEach((from, i) => {
    const gap = i + 1 < sorted.length ? sorted[i + 1]! - from : sorted[0]! + 360 - from;
    if (gap > best.gap) best = { from, gap };
  });
  return (best.from + best.gap / 2) % 360;
}

/** A centre cross that runs past the hole. */
function crossAt(x: number, y: number, reach: number): Shape[] {
  return [line(x - reach, y, x + reach, y, 'hair'), line(x, y - reach, x, y + reach, 'hair')];
}

/** A hole with its centre cross; an oblique cross where there is none. */
export function markOf(place: Place, x: number): Shape[] {
  const y = place.axialMm;
  const r = place.diameterMm / 2;
  if (r > 0) return [circle(x, y, r, 'hair', undefined, place.name), ...crossAt(x, y, r + 0.7)];
  const d = 1.4;
  return [line(x - d, y - d, x + d, y + d, 'thin'), line(x - d, y + d, x + d, y - d, 'thin')];
}

/** Ticks every 10 degrees, figures every 30 (on a small former fewer) clear of the corners, above the upper edge. */
function angleScale(seam: number, circumference: number, top: number): Shape[] {
  const shapes: Shape[] = [];
  const figures = [30, 60, 90, 180].find((step) => (step / 360) * circumference >= FIGURE_ROOM_MM) ?? 360;
  for (let angle = 0; angle < 360; angle += 10) {
    const x = (((angle - seam + 360) % 360) / 360) * circumference;
    const long = angle % 30 === 0;
    shapes.push(line(x, top, x, top + (long ? 2.6 : 1.4), long ? 'thin' : 'hair'));
    if (angle % figures === 0 && x > 4.5) shapes.push(label(x, top + 3.4, `${angle}°`, { align: 'centre' }));
  }
  return shapes;
}

/** Small boxes along a line, for what is to keep off it. */
function alongLine({ x1, y1, x2, y2 }: Line): Box[] {
  const count = Math.max(1, Math.ceil(Math.hypot(x2 - x1, y2 - y1)));
  return Array.from({ length: count + 1 }, (_, i) => {
    const [x, y] = [x1 + ((x2 - x1) * i) / count, y1 + ((y2 - y1) * i) / count];
    return { left: x - 0.2, right: x + 0.2, bottom: y - 0.2, top: y + 0.2 };
  });
}

/** Of a second winding on the same former. */
function secondEdges(record: CoilRecord): number[] {
  const second = secondHere(record);
  if (second === null) return [];
  const half = second.wire.overallMm / 2;
  return [second.startMm - half, second.finishMm + half];
}

export function developed(record: CoilRecord, measure: Measure): Developed {
  const { former } = record;
  const winding = record.windings[0]!;
  const circumference = Math.PI * (former.outsideDiameterMm + PAPER_THICKNESS_MM);
  const bottom = former.flange ? former.flange.lowerMm : 0;
  const top = former.lengthMm - (former.flange ? former.flange.upperMm : 0);
  const all = places(record).filter((place) => place.axialMm > bottom && place.axialMm < top);
  const seam = seamOf(all.map((place) => place.angleDeg));
  const x = (angleDeg: number) => ((((angleDeg - seam) % 360) + 360) % 360) * (circumference / 360);
  const shapes: Shape[] = [
    rectangle(0, bottom, circumference, top - bottom, 'outline'),
    line(circumference, bottom, circumference + TAB_MM, bottom, 'thin', 'dashed'),
    line(circumference + TAB_MM, bottom, circumference + TAB_MM, top, 'thin', 'dashed'),
    line(circumference, top, circumference + TAB_MM, top, 'thin', 'dashed'),
    ...angleScale(seam, circumference, top),
  ];
  const half = winding.wire.overallMm / 2;
  const edges = [winding.startMm - half, winding.finishMm + half, ...secondEdges(record)];
  for (const z of edges) shapes.push(line(0, z, circumference, z, 'hair', 'dashed'));
  const lines: Box[] = edges.map((z): Box => ({ left: 0, right: circumference, bottom: z - 0.1, top: z + 0.1 }));
  for (const places of seamLines(record, seam, seam + 360)) {
    const points = places.map(([a, z]) => [((a - seam) / 360) * circumference, z] as const);
    const heights = points.map(([, z]) => z);
    shapes.push(polyline(points, 'thin'));
    lines.push({ left: 0, right: circumference, bottom: Math.min(...heights), top: Math.max(...heights) + 0.1 });
  }
  const method = record.tapMethod.name;
  const marks: Marked[] = [];
  for (const place of all) {
    const at = x(place.angleDeg);
    shapes.push(...markOf(place, at));
    const own = markAtTap(method, at, place.axialMm, winding.wire.overallMm, winding.pitchMm);
    const bored = place.diameterMm > 0;
    if (place.tap && !bored) shapes.push(...own.shapes);
    marks.push({
      text: place.label,
      x: at,
      y: place.axialMm,
      reachMm: bored ? place.diameterMm / 2 + 0.7 : own.reachMm,
    });
  }
  const region = { left: 1, right: circumference - 1, bottom: bottom + 0.6, top: top - 0.6 };
  const labels = placeLabels(marks, region, [], lines, measure);
  const leaders = labels.shapes.filter((shape): shape is Line => shape.shape === 'line').flatMap(alongLine);
  const taps = all.filter(({ tap }) => tap).map((place) => ({ x: x(place.angleDeg), y: place.axialMm }));
  const loops = loopMarks(method, taps, region, [...labels.taken, ...leaders]);
  shapes.push(...labels.shapes, ...loops.shapes);
  return {
    shapes,
    taken: [...labels.taken, ...loops.taken],
    lines,
    unlabelled: labels.missing,
    unbored: all.some((place) => place.diameterMm === 0),
    circumferenceMm: circumference,
    seamDeg: seam,
    bottomMm: bottom,
    topMm: top,
  };
}
