/**
 * The dial of one coil in its set: scales at true size with rulers along both axes, a plate for the switch from what each position was
 * tuned over, and what the arcs were drawn from. It reads the record and the dial and nothing else: same data, same bytes.
 */
import { DIAL } from '../../templates/wording/dial-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { diameterFor, drawDial, MOUNT_MM, positionsOn } from '../drawing/dial-scale.ts';
import type { Shape } from '../drawing/drawing.ts';
import { type DrawnPlate, drawPlate, HOLE_MM } from '../drawing/range-plate.ts';
import { RULER_BREADTH_MM, rulerAcross, rulerUp } from '../drawing/rulers.ts';
import { movedAll, SMALL_MM } from '../drawing/shapes.ts';
import { Fault } from '../fault.ts';
import type { Dial, DialPosition } from '../prove/charts-schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, paragraph, stack } from './block.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { Filling, parted } from './parted.ts';
import { stepOf } from './reference-wiring.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { fixed, short } from './text.ts';
import { titleBlock } from './title-block.ts';
import { lengthText, unitsOf } from './units.ts';

const GAP_MM = 3;

export interface DialOptions {
  /** Of the dial as cut out. */
  readonly diameterMm: number;
}

/** Largest dial that goes beside the ruler, whole millimetres. */
export const largestDialMm = (paper: CoilRecord['paper']): number =>
  Math.floor(PAPER_MM[paper][0] - 2 * MARGIN_MM.across - RULER_BREADTH_MM - 2);

const kHzText = (value: number) => fixed(value, value >= 100 ? 0 : 1);

/** Rounded up: a bound stays one. */
const missText = (percent: number) => fixed(Math.ceil(100 * percent) / 100, 2);

/** Positions on as many dials as they need, evenly: on one where they fit. @throws Fault 4 where no dial of this size can be drawn */
function shared(positions: readonly DialPosition[], diameterMm: number, largest: number): DialPosition[][] {
  const least = diameterFor(1);
  const most = positionsOn(diameterMm);
  if (!(diameterMm <= largest) || most < 1)
    throw new Fault(4, {
      code: 'dial-size',
      got: `a dial of ${short(diameterMm, 2)} mm`,
      expected: `${least} to ${largest} mm on this paper`,
      todo: `ask for ${diameterMm > largest ? largest : least} mm; all positions on one dial want ${diameterFor(positions.length)} mm`,
    });
  const dials = Math.ceil(positions.length / most);
  const each = Math.ceil(positions.length / dials);
  return Array.from({ length: dials }, (_, i) => positions.slice(i * each, (i + 1) * each)).filter(
    (some) => some.length > 0,
  );
}

const running = (texts: readonly string[], widthMm: number, measure: Measure): Block =>
  stack(
    texts.map((text, i) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold: i === 0 })),
    0.3,
  );

/** Switch plate; null where there is one position and so no switch. */
function plateOf(record: CoilRecord, dial: Dial, measure: Measure): DrawnPlate | null {
  if (dial.positions.length < 2) return null;
  const positions = dial.positions.map(({ tap, lowKhz, highKhz }) => ({
    number: `${tap}`,
    text: DIAL.plate.between(kHzText(lowKhz), kHzText(highKhz)),
  }));
  const stepDeg = stepOf(record, positions.length);
  return drawPlate({ positions, stepDeg, foot: { texts: DIAL.plate.foot, numbers: '' } }, measure);
}

function tables(dial: Dial, widthMm: number, heightMm: number, measure: Measure): Block[] {
  const words = DIAL.table;
  const pages = new Filling(heightMm);
  pages.page('');
  const heads = [
    [words.position, 18, { align: 'centre', bold: true }],
    [words.readings, 18, { align: 'centre' }],
    [words.degrees, 30, { align: 'centre' }],
    [words.low, 24, { align: 'right' }],
    [words.high, 24, { align: 'right' }],
    [words.smooth, 22, { align: 'centre' }],
    [words.miss, 20, { align: 'right' }],
  ] as const;
  const rows = dial.positions.map(({ tap, readings, lowKhz, highKhz, smoothIn, missPercent }) => [
    [
      `${tap}`,
      `${readings.length}`,
      `${short(readings[0]!.degrees, 1)}–${short(readings.at(-1)!.degrees, 1)}`,
      kHzText(lowKhz),
      kHzText(highKhz),
      smoothIn,
      missText(missPercent),
    ],
  ]);
  pages.putParted(parted(words, heads, rows, widthMm, measure), '');
  return pages.bodies.map(({ blocks }) => stack(blocks, GAP_MM));
}

/** What the pages are laid out in, mm. */
interface Room {
  readonly widthMm: number;
  readonly left: number;
  readonly foot: number;
  /** Under the head. */
  readonly top: number;
  readonly rulers: readonly Shape[];
}

/** A page for each dial: words, the dial above one ruler and right of the other. */
function scalePages(record: CoilRecord, dial: Dial, diameterMm: number, room: Room, measure: Measure): Shape[][] {
  const { widthMm, left, foot, top, rulers } = room;
  const dials = shared(dial.positions, diameterMm, largestDialMm(record.paper));
  const size = (mm: number) => lengthText(mm, unitsOf(record), { digits: 1, trim: true });
  const miss = Math.max(...dial.positions.map(({ missPercent }) => missPercent));
  return dials.map((positions, i) => {
    const [first, last] = [positions[0]!.tap, positions.at(-1)!.tap];
    const words = running(
      [
        DIAL.print,
        ...(dials.length > 1 ? [DIAL.several(i + 1, dials.length, first, last)] : []),
        DIAL.scale(size(diameterMm), short(dial.spanDeg, 1)),
        DIAL.arcs,
        DIAL.made(dial.serial),
        `${DIAL.fit(size(HOLE_MM), size(MOUNT_MM))} ${DIAL.miss(missText(miss))}`,
      ],
      widthMm,
      measure,
    );
    const drawn = drawDial({ diameterMm, spanDeg: dial.spanDeg, positions, serial: dial.serial }, measure);
    const [under, over] = [foot + RULER_BREADTH_MM + 2, top - words.heightMm - GAP_MM];
    const x = left + RULER_BREADTH_MM + 2 + (widthMm - RULER_BREADTH_MM - 2) / 2;
    return [...movedAll(words, left, top), ...movedAll(drawn, x, (under + over) / 2), ...rulers];
  });
}

/** The plate of the switch and what the arcs were drawn from: on one page where both go on it. */
function platePages(record: CoilRecord, dial: Dial, room: Room, measure: Measure): Shape[][] {
  const { widthMm, left, foot, top, rulers } = room;
  const listed = tables(dial, widthMm, top - foot, measure);
  const plate = plateOf(record, dial, measure);
  if (plate === null) return listed.map((table) => movedAll(table, left, top));
  const words = running(
    [
      DIAL.print,
      DIAL.plate.words,
      DIAL.plate.angle(short(stepOf(record, dial.positions.length), 2)),
      ...(plate.hasTexts ? [] : [DIAL.plate.listed]),
    ],
    widthMm,
    measure,
  );
  const under = foot + RULER_BREADTH_MM + GAP_MM;
  const both = stack([words, ...listed], GAP_MM);
  const together = listed.length === 1 && top - both.heightMm - 2 * GAP_MM - 2 * plate.radiusMm >= under;
  const over = top - (together ? both : words).heightMm - GAP_MM;
  const plated = [
    ...movedAll(together ? both : words, left, top),
    ...movedAll(plate, left + widthMm / 2, (over + under) / 2),
    ...rulers,
  ];
  return together ? [plated] : [plated, ...listed.map((table) => movedAll(table, left, top))];
}

/** The pages as drawings. @throws Fault 4 for a diameter that the paper or the positions do not allow */
export function layOutDialSheet(record: CoilRecord, dial: Dial, { diameterMm }: DialOptions, measure: Measure): Page[] {
  const [paperWidth, paperHeight] = PAPER_MM[record.paper];
  const widthMm = paperWidth - 2 * MARGIN_MM.across;
  const headOf = (sheet: string) =>
    titleBlock(record, { document: DIAL.document, part: DIAL.part(dial.serial), sheet }, widthMm, measure);
  const [left, foot] = [MARGIN_MM.across, MARGIN_MM.along];
  const top = paperHeight - foot - headOf(DIAL.sheet(10, 10)).heightMm - GAP_MM;
  const corner = [left + RULER_BREADTH_MM, foot + RULER_BREADTH_MM] as const;
  const rulers = [...movedAll(rulerAcross(DIAL.unit), ...corner), ...movedAll(rulerUp(DIAL.unit), ...corner)];
  const room: Room = { widthMm, left, foot, top, rulers };
  const bodies = [...scalePages(record, dial, diameterMm, room, measure), ...platePages(record, dial, room, measure)];
  return bodies.map((shapes, i) => ({
    widthMm: paperWidth,
    heightMm: paperHeight,
    shapes: [...movedAll(headOf(DIAL.sheet(i + 1, bodies.length)), left, paperHeight - foot), ...shapes],
  }));
}

export { frameOf as dialFrame };

/** The dial sheet of a coil as the bytes of a PDF. @throws Fault 4 (`dial-size`) for a diameter that cannot be drawn */
export async function dialSheet(record: CoilRecord, dial: Dial, options: DialOptions): Promise<Uint8Array> {
  const paper = new Paper({
    title: `${DIAL.document}: ${record.job}, ${DIAL.coil(dial.serial)}`,
    subject: `record ${record.hash.slice(0, 12)}`,
  });
  return paper.write(layOutDialSheet(record, dial, options, paper));
}
