/**
 * The wrap template: the surface of the former at true scale, to wrap round it printed side out. One page where it
 * fits, turned if need be, else tiles. It reads the record and nothing else: same record, same bytes.
 */
import { TITLE } from '../../templates/wording/winding-sheet.ts';
import { WRAP } from '../../templates/wording/wrap-template.ts';
import { type Box, type Measure, overlap } from '../drawing/boxes.ts';
import { clipped } from '../drawing/clip.ts';
import type { Shape } from '../drawing/drawing.ts';
import { freePlace } from '../drawing/labels.ts';
import {
  checkSquare,
  cross,
  INCH_RULER_MM,
  inchRuler,
  RULER_BREADTH_MM,
  rulerAcross,
  rulerUp,
  SQUARE_ROOM_MM,
} from '../drawing/rulers.ts';
import { arrow, label, line, moved, movedAll, SMALL_MM } from '../drawing/shapes.ts';
import { type Developed, developed, SCALE_MM, TAB_MM } from '../drawing/template.ts';
import type { CoilRecord } from '../record/schema.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { secondSurface } from './second-surface.ts';
import { checkSize, type SurfaceWords, templateHead } from './template-head.ts';
import { type Joint, joints, SHARED_MM, type Tile, type Tiling, tile } from './tiles.ts';
import { lengthText, unitsOf } from './units.ts';

/** Left free round every page, mm: what most printers cannot print on. */
const TEMPLATE_MARGIN_MM = 7;
/** What the rulers take at the left and at the foot of the page. */
const RULER_BAND = RULER_BREADTH_MM + 3;
/** Where the ruler in inches begins, beside the one in millimetres where the page is wide enough, else over it. */
const INCHES_FROM = 118;
const inchesBeside = (roomWidthMm: number) => roomWidthMm >= INCHES_FROM + INCH_RULER_MM;
const HEAD_GAP = 3;
const INFO = { width: 47, height: 14 };

/** One page to be: its size, the room for the drawing and its tiling. */
interface Format {
  readonly widthMm: number;
  readonly heightMm: number;
  readonly tiling: Tiling;
  readonly roomWidthMm: number;
  readonly roomHeightMm: number;
  /** What the rulers take at the foot. */
  readonly footMm: number;
}

const wholeOf = (drawn: Developed): Box => ({
  left: 0,
  right: drawn.circumferenceMm + TAB_MM,
  bottom: drawn.bottomMm,
  top: drawn.topMm + SCALE_MM,
});

/** The way to lay the paper that needs the fewest pages; upright when it makes no difference. */
function formatOf(record: CoilRecord, drawn: Developed, measure: Measure, other: SurfaceWords | null): Format {
  const [short, long] = PAPER_MM[record.paper];
  const whole = wholeOf(drawn);
  const formats = [
    [short, long],
    [long, short],
  ].map(([widthMm, heightMm]): Format => {
    const inner = widthMm! - 2 * TEMPLATE_MARGIN_MM;
    const roomWidthMm = inner - RULER_BAND;
    const over = unitsOf(record) !== 'metric' && !inchesBeside(roomWidthMm);
    const foot = RULER_BAND + (over ? RULER_BREADTH_MM : 0);
    // The head is lower without a map: try one page first.
    const room = (tiling: Tiling) =>
      heightMm! -
      2 * TEMPLATE_MARGIN_MM -
      foot -
      HEAD_GAP -
      templateHead(record, drawn, tiling, tiling.tiles[0]!, TITLE.sheet(10, 10), inner, measure, other).heightMm;
    const one = tile(whole, Infinity, Infinity);
    let roomHeightMm = room(one);
    let tiling = tile(whole, roomWidthMm, roomHeightMm);
    if (tiling.tiles.length > 1)
      for (let i = 0; i < 2; i++) {
        roomHeightMm = room(tiling);
        tiling = tile(whole, roomWidthMm, roomHeightMm);
      }
    return { widthMm: widthMm!, heightMm: heightMm!, tiling, roomWidthMm, roomHeightMm, footMm: foot };
  });
  const [upright, turned] = formats as [Format, Format];
  return turned.tiling.tiles.length < upright.tiling.tiles.length ? turned : upright;
}

/** The arrow up, which side is printed, and which way the wire climbs. */
function info(record: CoilRecord): Shape[] {
  const right = record.frame.hand === 'right';
  const [from, to] = right ? [6, INFO.width - 2] : [INFO.width - 2, 6];
  return [
    ...arrow(2.5, 0.5, 2.5, INFO.height - 0.5, 'outline'),
    label(6, INFO.height - 3, `${WRAP.up}, ${WRAP.out}`, { bold: true }),
    label(6, INFO.height - 7.2, WRAP.wire[record.frame.hand]),
    ...arrow(from, 1.5, to, 3.5, 'outline'),
  ];
}

/** What the lower edge is, written along it where there is room. */
function datumWords(
  record: CoilRecord,
  drawn: Developed,
  here: Tile,
  taken: readonly Box[],
  measure: Measure,
  other: SurfaceWords | null,
): Shape[] {
  if (here.row > 0) return [];
  const { bottomMm } = drawn;
  const words =
    other !== null ? other.edge : bottomMm === 0 ? WRAP.datum : WRAP.aboveDatum(lengthText(bottomMm, unitsOf(record)));
  const width = measure.width(words, SMALL_MM);
  // As low as there is room, clear of the dashed edge of the winding.
  for (let up = 0.5; up < 25; up += 0.5) {
    const strip = { ...surface(drawn, here), bottom: bottomMm + up, top: bottomMm + up + 2.85 };
    const place = freePlace(strip, [...taken, ...drawn.lines], width, 2.8);
    if (place) return [label(place.x, place.y + 0.7, words)];
  }
  return [];
}

/** The words on the tab, as much of them as a window shows whole: of a tube that is bought also where its own seam goes. */
function tabWords(record: CoilRecord, drawn: Developed, window: Box, measure: Measure): Shape[] {
  const low = Math.max(drawn.bottomMm, window.bottom);
  const high = Math.min(drawn.topMm, window.top);
  const lines = record.former.kind === 'tube' ? [...WRAP.overlap, WRAP.tubeSeam] : WRAP.overlap;
  const step = 9.6 / (lines.length + 0.2);
  const long = Math.max(...lines.map((words) => measure.width(words, SMALL_MM)));
  if (high - low < long + 2) return [];
  const words = lines.map((text, i) =>
    label(drawn.circumferenceMm + step * (i + 0.9), (low + high) / 2, text, { align: 'centre', turnDeg: 90 }),
  );
  return clipped(words, window, measure);
}

/** The nearest place along a strip where a cross and its letter stand clear, or null. */
function slide(joint: Joint, taken: readonly Box[]): { x: number; y: number; room: Box } | null {
  const half = SHARED_MM / 2;
  const from = joint[joint.along];
  for (let off = 0; off <= joint.high - joint.low; off += 1)
    for (const place of [from + off, from - off]) {
      if (place < joint.low + half || place > joint.high - half) continue;
      const x = joint.along === 'x' ? place : joint.x;
      const y = joint.along === 'y' ? place : joint.y;
      const room = { left: x - half, right: x + half, bottom: y - half, top: y + half };
      if (!taken.some((box) => overlap(box, room))) return { x, y, room };
    }
  return null;
}

/** Crosses on the shared strips with their letters, and the lines to cut along. */
function joined(tiling: Tiling, drawn: Developed): { shapes: Shape[]; taken: Box[] } {
  const shapes: Shape[] = [];
  const taken = [...drawn.taken];
  for (const { row, column, window } of tiling.tiles) {
    const x = window.right - SHARED_MM / 2;
    const y = window.top - SHARED_MM / 2;
    if (column < tiling.columns - 1) shapes.push(line(x, window.bottom, x, window.top, 'hair', 'centre'));
    if (row < tiling.rows - 1) shapes.push(line(window.left, y, window.right, y, 'hair', 'centre'));
  }
  let letters = 0;
  for (const joint of joints(tiling)) {
    const place = slide(joint, taken);
    if (!place) continue;
    const text = String.fromCharCode(97 + (letters++ % 26));
    const letter = label(place.x + 2.8, place.y + 2, text, { anchor: 'middle', bold: true });
    shapes.push(...cross(place.x, place.y, 2.5), letter);
    taken.push(place.room);
  }
  return { shapes, taken };
}

/** Where the check square goes: beside the drawing, above it, or on free surface. */
function squarePlace(format: Format, drawn: Developed, taken: readonly Box[]) {
  for (const here of format.tiling.tiles) {
    const { window } = here;
    const width = window.right - window.left;
    const high = window.top - window.bottom;
    const last = here.column === format.tiling.columns - 1;
    if (last && format.roomWidthMm - width >= SQUARE_ROOM_MM + 4)
      return { tile: here, x: window.right + 4, y: window.bottom + 1 };
    if (here.row === format.tiling.rows - 1 && format.roomHeightMm - high >= SQUARE_ROOM_MM + 2)
      return { tile: here, x: window.left + 1, y: window.top + 2 };
  }
  for (const here of format.tiling.tiles) {
    const free = surface(drawn, here);
    const place =
      freePlace(free, [...taken, ...drawn.lines], SQUARE_ROOM_MM, SQUARE_ROOM_MM) ??
      freePlace(free, taken, SQUARE_ROOM_MM, SQUARE_ROOM_MM);
    if (place) return { tile: here, x: place.x + 1, y: place.y + 1 };
  }
  return null;
}

/** The part of the sheet proper that a tile shows, a little inside its edges. */
function surface(drawn: Developed, here: Tile): Box {
  return {
    left: Math.max(0, here.window.left) + 2,
    right: Math.min(drawn.circumferenceMm, here.window.right) - 2,
    bottom: Math.max(drawn.bottomMm, here.window.bottom) + 2,
    top: Math.min(drawn.topMm, here.window.top) - 2,
  };
}

/** The pages as drawings: the main former, then what a second winding is wound on where that is another body. */
export function layOutWrapTemplate(record: CoilRecord, measure: Measure): Page[] {
  const second = secondSurface(record);
  return [
    ...surfacePages(record, measure, null),
    ...(second === null ? [] : surfacePages(second.record, measure, second.words)),
  ];
}

function surfacePages(record: CoilRecord, measure: Measure, other: SurfaceWords | null): Page[] {
  const drawn = developed(record, measure);
  const format = formatOf(record, drawn, measure, other);
  const { tiling } = format;
  const { shapes: seams, taken: used } = joined(tiling, drawn);
  const all = [...drawn.shapes, ...seams];
  const square = squarePlace(format, drawn, used);
  const pictures = checkSquare(WRAP.square(checkSize(record)), measure);
  const many = tiling.tiles.length + (square ? 0 : 1);
  const x0 = TEMPLATE_MARGIN_MM + RULER_BAND;
  const y0 = TEMPLATE_MARGIN_MM + format.footMm;
  const metric = unitsOf(record) === 'metric';
  const [inchX, inchY] = inchesBeside(format.roomWidthMm)
    ? [x0 + INCHES_FROM, TEMPLATE_MARGIN_MM + RULER_BREADTH_MM]
    : [x0, TEMPLATE_MARGIN_MM + 2 * RULER_BREADTH_MM];
  const inner = format.widthMm - 2 * TEMPLATE_MARGIN_MM;

  const page = (here: Tile, n: number, content: readonly Shape[]): Page => {
    const top = templateHead(record, drawn, tiling, here, TITLE.sheet(n, many), inner, measure, other);
    return {
      widthMm: format.widthMm,
      heightMm: format.heightMm,
      shapes: [
        ...movedAll(top, TEMPLATE_MARGIN_MM, format.heightMm - TEMPLATE_MARGIN_MM),
        ...movedAll(rulerAcross(WRAP.unit), x0, TEMPLATE_MARGIN_MM + RULER_BREADTH_MM),
        ...(metric ? [] : movedAll(inchRuler(WRAP.inch), inchX, inchY)),
        ...movedAll(rulerUp(WRAP.unit), TEMPLATE_MARGIN_MM + RULER_BREADTH_MM, y0),
        ...content,
      ],
    };
  };

  const pages = tiling.tiles.map((here, i) => {
    const toPage = (shape: Shape) => moved(shape, x0 - here.window.left, y0 - here.window.bottom);
    const taken = [...used];
    const shapes = [...clipped(all, here.window, measure), ...tabWords(record, drawn, here.window, measure)];
    if (square?.tile === here) {
      shapes.push(...movedAll(pictures, square.x, square.y));
      taken.push({
        left: square.x - 1,
        right: square.x + SQUARE_ROOM_MM,
        bottom: square.y - 1,
        top: square.y + SQUARE_ROOM_MM,
      });
    }
    const free = surface(drawn, here);
    const place =
      freePlace(free, [...taken, ...drawn.lines], INFO.width + 4, INFO.height + 4) ??
      freePlace(free, taken, INFO.width + 4, INFO.height + 4);
    if (place) {
      shapes.push(...info(record).map((shape) => moved(shape, place.x + 2, place.y + 2)));
      taken.push({ left: place.x, right: place.x + INFO.width + 4, bottom: place.y, top: place.y + INFO.height + 4 });
    }
    shapes.push(...datumWords(record, drawn, here, taken, measure, other));
    return page(here, i + 1, shapes.map(toPage));
  });
  // A surface too full for the square: it gets a page.
  if (!square) pages.push(page(tiling.tiles[0]!, many, movedAll(pictures, x0 + 4, y0 + 4)));
  return pages;
}

/** What a page of the template keeps free of ink. */
export function templateFrame(page: Page): Box {
  return {
    left: TEMPLATE_MARGIN_MM,
    right: page.widthMm - TEMPLATE_MARGIN_MM,
    bottom: TEMPLATE_MARGIN_MM,
    top: page.heightMm - TEMPLATE_MARGIN_MM,
  };
}

/** The wrap template of a record as the bytes of a PDF. */
export async function wrapTemplate(record: CoilRecord): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${WRAP.document}: ${record.job}`,
    subject: TITLE.record(record.hash.slice(0, 12)),
  });
  return paper.write(layOutWrapTemplate(record, paper));
}
