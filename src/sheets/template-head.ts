/** The head of a page of the wrap template: title block, what to do, and where among its neighbours a tile lies. */
import { WRAP } from '../../templates/wording/wrap-template.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { label, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { type Developed, PAPER_THICKNESS_MM } from '../drawing/template.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, paragraph, stack } from './block.ts';
import { short } from './text.ts';
import type { Tile, Tiling } from './tiles.ts';
import { titleBlock } from './title-block.ts';
import { lengthText, lengthWord, unitsOf } from './units.ts';

/** Side of the check square: always also in millimetres, which stand beside it. */
export const checkSize = (record: CoilRecord): string =>
  lengthText(50, unitsOf(record) === 'metric' ? 'metric' : 'both', { digits: 1, trim: true });

/** Of a sheet for another surface than the main former's: what it is for, and what its lower edge is. */
export interface SurfaceWords {
  readonly part: string;
  readonly set: string;
  readonly edge: string;
  /** Where heights are counted from. */
  readonly from: string;
}

/** What to do with the sheet. */
function instructions(
  record: CoilRecord,
  drawn: Developed,
  tiled: boolean,
  widthMm: number,
  measure: Measure,
  surface: SurfaceWords | null,
): Block {
  const { former } = record;
  const units = unitsOf(record);
  const taps = record.windings[0]!.taps.length > 1;
  const named = (mm: number, digits: number) => lengthText(mm, units, { digits, trim: true });
  const set =
    former.flange !== null
      ? WRAP.setRim(lengthText(drawn.bottomMm, units))
      : former.kind === 'tube'
        ? WRAP.setTube
        : WRAP.setFoot;
  const words = [
    WRAP.print(units === 'metric' ? WRAP.rulers : WRAP.rulersInch, checkSize(record)),
    WRAP.side,
    surface?.set ??
      `${set} ${former.kind === 'tube' ? WRAP.jig : WRAP.printed}${taps ? ` ${WRAP.taps[record.tapMethod.name]}` : ''}${former.joints.length > 0 ? ` ${WRAP.sections}` : ''}`,
    ...(former.kind === 'tube' ? [WRAP.seam(short(drawn.seamDeg, 1))] : []),
    WRAP.measure(
      named(former.outsideDiameterMm / 2, 3),
      named(PAPER_THICKNESS_MM / 2, 3),
      named(PAPER_THICKNESS_MM, 1),
      lengthText(drawn.circumferenceMm, units),
      lengthWord(units),
      surface?.from,
    ),
    ...(drawn.unlabelled.length > 0 ? [WRAP.unlabelled(drawn.unlabelled.join(', '))] : []),
    ...(tiled ? [WRAP.tiles] : []),
  ];
  const lines = words.map((text, i) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold: i === 0 }));
  return stack(lines, 0.3);
}

/** Where among its neighbours a tile lies. */
function tileMap(tiling: Tiling, here: Tile): Block {
  const cell = { width: 8, height: 4.6 };
  const heightMm = tiling.rows * cell.height;
  const shapes: Shape[] = [];
  for (const each of tiling.tiles) {
    const x = each.column * cell.width;
    const y = -heightMm + each.row * cell.height;
    shapes.push(rectangle(x, y, cell.width, cell.height, 'thin', each === here ? 0.8 : 1));
    shapes.push(label(x + cell.width / 2, y + cell.height / 2, each.name, { align: 'centre', anchor: 'middle' }));
  }
  return { widthMm: tiling.columns * cell.width, heightMm, shapes };
}

/** The head of one page. `here` is the tile that it shows. */
export function templateHead(
  record: CoilRecord,
  drawn: Developed,
  tiling: Tiling,
  here: Tile,
  sheet: string,
  widthMm: number,
  measure: Measure,
  surface: SurfaceWords | null = null,
): Block {
  const tiled = tiling.tiles.length > 1;
  const whole = tiled ? WRAP.tile(here.name) : WRAP.part('1:1');
  const part = surface === null ? whole : `${surface.part}, ${whole}`;
  const title = titleBlock(record, { document: WRAP.document, part, sheet }, widthMm, measure);
  const map = tileMap(tiling, here);
  const wordsWidth = tiled ? widthMm - map.widthMm - 4 : widthMm;
  const words = instructions(record, drawn, tiled, wordsWidth, measure, surface);
  const shapes: Shape[] = [...title.shapes, ...movedAll(words, 0, -title.heightMm - 1.5)];
  if (tiled) shapes.push(...movedAll(map, widthMm - map.widthMm - 0.5, -title.heightMm - 2));
  const under = Math.max(words.heightMm, tiled ? map.heightMm + 0.5 : 0);
  return { widthMm, heightMm: title.heightMm + 1.5 + under, shapes };
}
