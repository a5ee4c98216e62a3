/**
 * The range plate: for each switch of the coil a plate at true scale to cut out and put under the knob, with what to measure a print
 * by. It reads the record and nothing else: same record, same bytes.
 */
import { PLATE } from '../../templates/wording/range-plate.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { type DrawnPlate, drawPlate, HOLE_MM, type Plate, type PlatePosition } from '../drawing/range-plate.ts';
import { checkSquare, RULER_BREADTH_MM, rulerAcross, SQUARE_ROOM_MM } from '../drawing/rulers.ts';
import { moved, movedAll, SMALL_MM } from '../drawing/shapes.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, paragraph, stack } from './block.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { Filling, parted } from './parted.ts';
import { stepOf } from './reference-wiring.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { figures, fixed, short } from './text.ts';
import { titleBlock } from './title-block.ts';
import { lengthText, unitsOf } from './units.ts';

const GAP_MM = 3;

interface NamedPlate extends Plate {
  readonly name: string;
  /** Of the texts; empty where there are none. */
  readonly unit: string;
}

const khz = (value: number) => fixed(value, value >= 100 ? 0 : 1);

function tunes(lowKhz: number | null | undefined, highKhz: number | null | undefined): string | null {
  return typeof lowKhz === 'number' && typeof highKhz === 'number' ? PLATE.between(khz(lowKhz), khz(highKhz)) : null;
}

/** A plate for each switch; none for a coil of one position. */
export function platesOf(record: FiguresRecord): NamedPlate[] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  if (taps.length < 2) return [];
  const ranged = taps.every(({ range }) => range !== null);
  const unit = ranged ? PLATE.kHz : PLATE.uH;
  const plate = (name: string, short: string, unit: string, positions: PlatePosition[]): NamedPlate => ({
    name,
    unit,
    foot: { texts: PLATE.named(short, unit), numbers: short },
    positions,
    stepDeg: stepOf(record, positions.length),
  });
  if (unitTaps.length === 0) {
    const positions = taps.map(({ tap, range, inductanceUh }) => ({
      number: `${tap}`,
      text: tunes(range?.lowKhz, range?.highKhz) ?? figures(inductanceUh),
    }));
    return [plate(PLATE.single, '', unit, positions)];
  }
  const tens = (record.settings ?? []).map(({ tens: number, lowKhz, highKhz, inductancesUh }) => ({
    number: `${number}`,
    text: tunes(lowKhz, highKhz) ?? PLATE.between(figures(inductancesUh.at(-1)!), figures(inductancesUh[0]!)),
  }));
  const units = [0, ...unitTaps.map((tap) => tap.unit)].map((number) => ({ number: `${number}`, text: '' }));
  return [plate(PLATE.tens, PLATE.onPlate.tens, unit, tens), plate(PLATE.units, PLATE.onPlate.units, '', units)];
}

function instructions(
  record: FiguresRecord,
  plates: readonly NamedPlate[],
  listed: boolean,
  widthMm: number,
  measure: Measure,
): Block {
  const ranged = record.windings[0]!.taps.every(({ range }) => range !== null);
  const two = plates.length > 1;
  const told = two ? (ranged ? PLATE.tensRanges : PLATE.tensInductances) : ranged ? PLATE.ranges : PLATE.inductances;
  const hole = lengthText(HOLE_MM, unitsOf(record), { digits: 1, trim: true });
  const words = [
    PLATE.print,
    PLATE.cut(hole),
    `${plates.map(({ name, stepDeg }) => PLATE.angle(name, short(stepDeg, 2))).join(' ')} ${told}${listed ? ` ${PLATE.listed}` : ''}`,
    PLATE.check,
  ];
  return stack(
    words.map((text, i) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold: i === 0 })),
    0.3,
  );
}

interface Row {
  readonly shapes: readonly Shape[];
  readonly heightMm: number;
}

/** Plates side by side where they fit, else one a page. */
function rowsOf(drawn: readonly DrawnPlate[], widthMm: number): Row[] {
  const total = drawn.reduce((sum, { radiusMm }) => sum + 2 * radiusMm, 0);
  const together = total + (drawn.length - 1) * GAP_MM <= widthMm ? [drawn] : drawn.map((one) => [one]);
  return together.map((plates) => {
    const spare = widthMm - plates.reduce((sum, { radiusMm }) => sum + 2 * radiusMm, 0);
    const heightMm = 2 * Math.max(...plates.map(({ radiusMm }) => radiusMm));
    let x = 0;
    const shapes = plates.flatMap((plate) => {
      x += spare / (plates.length + 1) + plate.radiusMm;
      const placed = movedAll(plate, x, -heightMm / 2);
      x += plate.radiusMm;
      return placed;
    });
    return { shapes, heightMm };
  });
}

/** What the plates leave out, as tables over as many pages as it takes. */
function lists(
  plates: readonly NamedPlate[],
  drawn: readonly DrawnPlate[],
  widthMm: number,
  heightMm: number,
  measure: Measure,
) {
  const pages = new Filling(heightMm);
  plates.forEach((plate, i) => {
    if (drawn[i]!.hasTexts || plate.unit === '') return;
    if (pages.bodies.length === 0) pages.page('');
    const words = { heading: PLATE.list(plate.name), more: PLATE.listMore(plate.name) };
    const heads = [
      [PLATE.position, 30, { align: 'centre', bold: true }],
      [plate.unit, 40, { align: 'centre' }],
    ] as const;
    const groups = plate.positions.map(({ number, text }) => [[number, text]]);
    pages.putParted(parted(words, heads, groups, widthMm / 2, measure), '');
  });
  return pages.bodies.map(({ blocks }) => stack(blocks, GAP_MM));
}

/** The pages as drawings; none for a coil of one position. */
export function layOutRangePlate(record: FiguresRecord, measure: Measure): Page[] {
  const plates = platesOf(record);
  if (plates.length === 0) return [];
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (sheet: string) =>
    titleBlock(record, { document: PLATE.document, part: PLATE.part, sheet }, widthMm, measure);
  const head = headOf(PLATE.sheet(10, 10));
  const drawn = plates.map((plate) => drawPlate(plate, measure));
  const listed = plates.some(({ unit }, i) => unit !== '' && !drawn[i]!.hasTexts);
  const words = instructions(record, plates, listed, widthMm, measure);
  const rows = rowsOf(drawn, widthMm);
  const inner = paperHeight - 2 * MARGIN_MM.along - head.heightMm - GAP_MM;
  const tables = lists(plates, drawn, widthMm, inner, measure);
  const count = rows.length + tables.length;
  const page = (n: number, shapes: readonly Shape[]): Page => ({
    widthMm: paperWidth,
    heightMm: paperHeight,
    shapes: [...movedAll(headOf(PLATE.sheet(n, count)), MARGIN_MM.across, paperHeight - MARGIN_MM.along), ...shapes],
  });
  const top = paperHeight - MARGIN_MM.along - head.heightMm - GAP_MM;
  // Ruler and square stand at the foot; the plate in the middle of what is left.
  const foot = MARGIN_MM.along + SQUARE_ROOM_MM + GAP_MM;
  const plated = rows.map((row, i) => {
    const under = top - words.heightMm - GAP_MM;
    const high = under - Math.max(0, (under - foot - row.heightMm) / 2);
    return page(i + 1, [
      ...movedAll(words, MARGIN_MM.across, top),
      ...row.shapes.map((shape) => moved(shape, MARGIN_MM.across, high)),
      ...movedAll(rulerAcross(PLATE.unit), MARGIN_MM.across + 3, MARGIN_MM.along + RULER_BREADTH_MM),
      ...movedAll(
        checkSquare(PLATE.square, measure),
        paperWidth - MARGIN_MM.across - SQUARE_ROOM_MM,
        MARGIN_MM.along + 1,
      ),
    ]);
  });
  return [...plated, ...tables.map((table, i) => page(rows.length + i + 1, movedAll(table, MARGIN_MM.across, top)))];
}

export { frameOf as plateFrame };

/** The range plate of a record as the bytes of a PDF; null for a coil of one position, which has no switch. */
export async function rangePlate(record: FiguresRecord): Promise<Uint8Array | null> {
  const paper = new Paper({ title: `${PLATE.document}: ${record.job}`, subject: `record ${record.hash.slice(0, 12)}` });
  const pages = layOutRangePlate(record, paper);
  return pages.length === 0 ? null : paper.write(pages);
}
