/** The drawing of the winding sheet on the page, with the turn being wound lit and the next stop marked. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { DRAWING } from '../../templates/wording/winding-sheet.ts';
import { axialAt } from '../coil/layout.ts';
import type { Measure } from '../drawing/boxes.ts';
import { type Elevation, elevation, elevationScale, frontOfTurn } from '../drawing/elevation.ts';
import { svgOf } from '../drawing/svg.ts';
import { lengthCell, unitsOf } from '../quantity/written.ts';
import type { CoilRecord } from '../record/schema.ts';
import { svgEl } from './page-dom.ts';

/** Room that the drawing is laid out for, so that its type is legible on a phone; it grows with the page. */
const ROOM_MM = { wide: 84, high: 112 } as const;
const MARK_MM = 3.2;

/** Widths as the browser sets them. */
function browserMeasure(): Measure {
  const pen = document.createElement('canvas').getContext('2d');
  return {
    width(text, sizeMm, bold = false) {
      if (pen === null) return text.length * sizeMm * 0.62;
      pen.font = `${bold ? 'bold ' : ''}100px "DejaVu Sans", Verdana, sans-serif`;
      return (pen.measureText(text).width * sizeMm) / 100;
    },
  };
}

export interface Picture {
  readonly element: Element;
  /** `turn` of the wire's end; `next` the turn of the stop ahead, or null after the last. */
  show(turn: number, next: number | null): void;
}

export function pictureOf(record: CoilRecord): Picture {
  const measure = browserMeasure();
  const length = (mm: number) => lengthCell(mm, unitsOf(record));
  const scale = elevationScale(record, ROOM_MM.wide, ROOM_MM.high, DRAWING, measure, length);
  const drawing = elevation(record, scale, DRAWING, measure, length);
  const view = { left: -drawing.leftMm, right: drawing.rightMm, bottom: -drawing.downMm, top: drawing.upMm };
  const text = svgOf(drawing, view, { title: BENCH.picture.title(record.job), description: BENCH.picture.words });
  const svg = document.importNode(new DOMParser().parseFromString(text, 'image/svg+xml').documentElement, true);
  svg.removeAttribute('width');
  svg.removeAttribute('height');
  svg.setAttribute('role', 'img');
  svg.setAttribute('aria-label', BENCH.picture.title(record.job));
  // A title inside would show as a balloon wherever a pointer rests.
  svg.querySelector('title')?.remove();
  const live = svgEl('g', { 'stroke-linecap': 'round', 'stroke-linejoin': 'round' });
  svg.append(live);
  return { element: svg, show: (turn, next) => live.replaceChildren(...marks(record, drawing, turn, next)) };
}

function marks(record: CoilRecord, drawing: Elevation, turn: number, next: number | null): SVGElement[] {
  const winding = record.windings[0]!;
  const { scale } = drawing;
  const x = (mm: number) => (mm + drawing.leftMm).toFixed(3);
  const y = (mm: number) => (drawing.upMm - mm).toFixed(3);
  const r = (winding.meanDiameterMm / 2) * scale;
  // Just outside the rims, where nothing else of the drawing stands.
  const edge = -(drawing.leftMm - 9);
  const place = (u: number) => axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, u) * scale;
  const triangle = (at: number, className: string) =>
    svgEl('polygon', {
      class: className,
      points: `${x(edge - MARK_MM)},${y(at + MARK_MM / 2)} ${x(edge)},${y(at)} ${x(edge - MARK_MM)},${y(at - MARK_MM / 2)}`,
      'stroke-width': 0.4,
    });
  const shapes: SVGElement[] = [];
  if (turn > 0) {
    const low = place(0);
    const high = place(turn);
    shapes.push(svgEl('rect', { class: 'wound', x: x(-r), y: y(high), width: 2 * r, height: Math.max(0, high - low) }));
  }
  if (next !== null) {
    const at = place(next);
    const line = { x1: x(edge), x2: x(r), y1: y(at), y2: y(at), 'stroke-width': 0.4, 'stroke-dasharray': '1.6 1' };
    shapes.push(svgEl('line', { class: 'next', ...line }), triangle(at, 'next'));
  }
  const points = frontOfTurn(record, Math.min(turn, winding.turns), scale)
    .map(([px, py]) => `${x(px)},${y(py)}`)
    .join(' ');
  const thick = Math.max(1.1, winding.wire.overallMm * scale);
  shapes.push(
    svgEl('polyline', { class: 'halo', points, fill: 'none', 'stroke-width': thick + 0.8 }),
    svgEl('polyline', { class: 'lit', points, fill: 'none', 'stroke-width': thick }),
    triangle(place(Math.min(turn, winding.turns)), 'here'),
  );
  return shapes;
}
