/**
 * The coil seen from above, the start hole in front (at the bottom), angles counterclockwise: where round the former
 * each tap stands. Taps at one angle share a line. Millimetres on paper, the origin on the axis.
 */
import type { CoilRecord } from '../record/schema.ts';
import { type Box, type Measure, shapeBox } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { onRing, ringNames } from './ring-labels.ts';
import { arrowHead, circle, line, polyline } from './shapes.ts';

export interface EndView extends Drawing {
  /** All that is drawn, text included. */
  readonly box: Box;
}

/** True when the taps do not all stand over the start hole, give or take a degree. */
export function isStaggered(record: CoilRecord): boolean {
  const { taps, unitTaps = [] } = record.windings[0]!;
  return [...unitTaps, ...taps].some((tap) => Math.min(tap.angleDeg, 360 - tap.angleDeg) > 1);
}

interface Group {
  readonly angle: number;
  readonly names: string[];
}

/** Taps whose dots are `nearDeg` apart or less share a name. */
function groups(record: CoilRecord, nearDeg: number): Group[] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const marks = [
    { angle: 0, name: 'S' },
    ...unitTaps.map((tap) => ({ angle: tap.angleDeg, name: `u${tap.unit}` })),
    ...taps.map((tap) => ({ angle: tap.angleDeg, name: tap.tap === taps.length ? `F${tap.tap}` : `${tap.tap}` })),
  ].sort((a, b) => a.angle - b.angle);
  const found: Group[] = [];
  for (const mark of marks) {
    const last = found[found.length - 1];
    if (last && mark.angle - last.angle < nearDeg) last.names.push(mark.name);
    else found.push({ angle: mark.angle, names: [mark.name] });
  }
  return found;
}

/** Three whole numbers or more that follow one another become a span: `1-11`. */
function spans(names: readonly string[]): string[] {
  const found: string[] = [];
  for (let i = 0; i < names.length; ) {
    let end = i + 1;
    while (Number(names[end]) === Number(names[i]) + end - i) end++;
    if (end - i > 2) found.push(`${names[i]}-${names[end - 1]}`);
    else found.push(...names.slice(i, end));
    i = end;
  }
  return found;
}

/** From the rim to the nearest names. */
const NEAR_MM = 4.5;
/** Dots that are nearer cannot be told apart. */
const SAME_MM = 0.4;

export function endView(record: CoilRecord, rimMm: number, measure: Measure): EndView {
  const found = groups(record, ((SAME_MM / rimMm) * 180) / Math.PI);
  // The unit taps of two switches share a few neighbouring angles: more room beside each.
  const crowded = (record.windings[0]!.unitTaps ?? []).length > 0;
  const ring = { rimMm, nearMm: rimMm + NEAR_MM, stepDeg: crowded ? 30 : 22 };
  const shapes: Shape[] = [circle(0, 0, rimMm, 'outline'), circle(0, 0, rimMm * 0.88, 'hair')];
  shapes.push(line(-2, 0, 2, 0, 'hair'), line(0, -2, 0, 2, 'hair'));
  for (const { angle } of found) shapes.push(circle(...onRing(angle, rimMm), 0.75, 'thin', 0));
  shapes.push(
    ...ringNames(
      found.map(({ angle, names }) => ({ angle, words: spans(names) })),
      ring,
      measure,
    ),
  );
  // The sense of angles, inside the rim.
  const sense = Array.from({ length: 13 }, (_, i) => onRing(20 + i * 5, rimMm * 0.6));
  const [tx, ty] = sense[12]!;
  shapes.push(polyline(sense, 'thin'), arrowHead(tx, ty, 80, 2.2));
  const boxes = shapes.map((shape) => shapeBox(shape, measure));
  return {
    shapes,
    box: {
      left: Math.min(...boxes.map((box) => box.left)),
      right: Math.max(...boxes.map((box) => box.right)),
      bottom: Math.min(...boxes.map((box) => box.bottom)),
      top: Math.max(...boxes.map((box) => box.top)),
    },
  };
}
