/**
 * The coil seen from above, the start hole in front (at the bottom), angles counterclockwise: where round the former
 * each tap stands. Taps at one angle share a line. Millimetres on paper, the origin on the axis.
 */
import type { CoilRecord } from '../record/schema.ts';
import { type Box, type Measure, shapeBox } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { arrowHead, circle, label, line, polyline } from './shapes.ts';
import { spread } from './spread.ts';

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

function groups(record: CoilRecord): Group[] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const marks = [
    { angle: 0, name: 'S' },
    ...unitTaps.map((tap) => ({ angle: tap.angleDeg, name: `u${tap.unit}` })),
    ...taps.map((tap) => ({ angle: tap.angleDeg, name: tap.tap === taps.length ? `F${tap.tap}` : `${tap.tap}` })),
  ].sort((a, b) => a.angle - b.angle);
  const found: Group[] = [];
  for (const mark of marks) {
    const last = found[found.length - 1];
    if (last && mark.angle - last.angle < 1) last.names.push(mark.name);
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

/** Lines of at most `most` names. */
function rows(names: readonly string[], most: number): string[] {
  const lines: string[] = [];
  for (let i = 0; i < names.length; i += most) lines.push(names.slice(i, i + most).join(' '));
  return lines;
}

export function endView(record: CoilRecord, rimMm: number, measure: Measure): EndView {
  const found = groups(record);
  // The circle of labels is cut where the gap between neighbours is widest, then they are moved apart along it.
  const gaps = found.map((group, i) => (found[(i + 1) % found.length]!.angle - group.angle + 360) % 360 || 360);
  const widest = gaps.indexOf(Math.max(...gaps));
  const order = [...found.slice(widest + 1), ...found.slice(0, widest + 1)];
  const first = order[0]!.angle;
  const wanted = order.map((group) => (group.angle - first + 360) % 360);
  // The unit taps of two switches share a few neighbouring angles: one name a line there, and more room beside it.
  const crowded = (record.windings[0]!.unitTaps ?? []).length > 0;
  const step = Math.min(crowded ? 30 : 22, 360 / order.length);
  const centre = gaps[widest]! / 2;
  const places = spread(wanted, step, -centre + step / 2, 360 - centre - step / 2);
  const outer = Math.max(rimMm + 7, 3.6 / (2 * Math.sin((step * Math.PI) / 360)));
  const shapes: Shape[] = [circle(0, 0, rimMm, 'outline'), circle(0, 0, rimMm * 0.88, 'hair')];
  shapes.push(line(-2, 0, 2, 0, 'hair'), line(0, -2, 0, 2, 'hair'));
  const at = (angle: number, r: number) => {
    const a = (angle * Math.PI) / 180;
    return [r * Math.sin(a), -r * Math.cos(a)] as const;
  };
  order.forEach((group, i) => {
    const place = places[i]! + first;
    const [x1, y1] = at(group.angle, rimMm);
    const [x2, y2] = at(place, outer - 3);
    shapes.push(circle(x1, y1, 0.75, 'thin', 0), line(x1, y1, x2, y2, 'hair'));
    const [x, y] = at(place, outer);
    const sideways = Math.sin((place * Math.PI) / 180);
    // Above and below the former neighbours stand side by side: there a wide line would run into the next.
    const narrow = crowded || (order.length > 12 && Math.abs(sideways) < 0.5);
    const lines = rows(spans(group.names), narrow ? 1 : 4);
    const align = lines[0]!.length <= 3 ? 'centre' : sideways > 0.3 ? 'left' : sideways < -0.3 ? 'right' : 'centre';
    const drop = y < 0 ? 0 : (lines.length - 1) * 3.3;
    lines.forEach((text, k) => {
      shapes.push(label(x, y + drop - k * 3.3, text, { anchor: 'middle', align, bold: true }));
    });
  });
  // The sense of angles, inside the rim.
  const sense = Array.from({ length: 13 }, (_, i) => at(20 + i * 5, rimMm * 0.6));
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
