/** One part on the parts sheet: its name and facts, its views to a standard scale, its pictures beside them. */
import { CARD } from '../../templates/wording/parts-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { dimensioned } from '../drawing/dimensioned.ts';
import { scaleText } from '../drawing/elevation.ts';
import { BODY_MM, label, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import type { View } from '../drawing/views.ts';
import { reworded } from '../drawing/words.ts';
import type { PartEntry } from '../record/schema.ts';
import { type Block, LEADING, paragraph, stack } from './block.ts';
import { type Card, GAP_MM, lowest, over, plain, rowHeight, rowsOf, set, shifted, twoColumns } from './cards.ts';
import { figures, fixed, sentence, wrap } from './text.ts';
import { type LengthStyle, lengthCell, lengthsText, lengthWord, type Units } from './units.ts';

/** A shaded picture of a part. */
export interface Picture {
  readonly png: Uint8Array;
  readonly widthPx: number;
  readonly heightPx: number;
}

export interface PartShown {
  readonly units: Units;
  readonly entry: PartEntry;
  readonly beds: string;
  readonly views: readonly View[];
  readonly pictures: readonly Picture[];
}

/** Scales of drawings (ISO 5455, and 1:2.5 as in common use), the largest first. */
const SCALES = [2, 1, 1 / 2, 1 / 2.5, 1 / 5, 1 / 10, 1 / 20, 1 / 50];
/** Of the size at 250 dots to the inch. */
const PICTURE_SHARES = [1, 0.8, 0.62, 0.5];
const DOTS_MM = 250 / 25.4;
/** Between the head of a card and what is drawn. */
const HEAD_GAP = 2;
const STRIP_MM = 6.4;

function picture({ png, widthPx, heightPx }: Picture, share: number): Card {
  const [widthMm, heightMm] = [(widthPx / DOTS_MM) * share, (heightPx / DOTS_MM) * share];
  return { widthMm, heightMm, shapes: [], pictures: [{ png, x: 0, y: -heightMm, widthMm, heightMm }] };
}

/** A view with its title under the middle of its outline. */
function drawn(view: View, scale: number, measure: Measure): Card {
  const { shapes, box, bodyBox, missing } = dimensioned(view, scale, measure);
  const middle = (bodyBox.left + bodyBox.right) / 2;
  const half = measure.width(view.title, SMALL_MM) / 2 + 1;
  const left = Math.min(box.left, middle - half);
  const widthMm = Math.max(box.right, middle + half) - left;
  const high = box.top - box.bottom;
  const note = missing.length > 0 ? wrap(CARD.missing(missing.join(', ')), widthMm, SMALL_MM, false, measure) : [];
  const base = (i: number) => -high - 1.2 - (i + 0.8) * SMALL_MM * LEADING;
  return {
    widthMm,
    heightMm: high + 1.2 + (1 + note.length) * SMALL_MM * LEADING,
    shapes: [
      ...movedAll({ shapes }, -left, -box.top),
      label(middle - left, base(0), view.title, { align: 'centre' }),
      ...note.map((text, i) => label(widthMm / 2, base(1 + i), text, { align: 'centre' })),
    ],
    pictures: [],
  };
}

/**
 * Views and pictures as they are lowest: pictures in a column at the right, as a column or singly among the views, all in two
 * columns, or two columns over the last view.
 */
function arranged(views: readonly Card[], pictures: readonly Card[], widthMm: number): Card {
  if (pictures.length === 0) return set(lowest(views, widthMm), widthMm);
  const column = over(pictures, 3);
  const beside = widthMm - column.widthMm - GAP_MM;
  const ways = [
    set(lowest([...views, column], widthMm), widthMm),
    set(lowest([...views, ...pictures], widthMm), widthMm),
  ];
  if (views.every((view) => view.widthMm <= beside)) {
    const left = set(lowest(views, beside), beside);
    const heightMm = Math.max(left.heightMm, column.heightMm);
    const [a, b] = [
      shifted(left, 0, -(heightMm - left.heightMm) / 2),
      shifted(column, beside + GAP_MM, -(heightMm - column.heightMm) / 2),
    ];
    const shapes = [...a.shapes, ...b.shapes];
    ways.unshift({ widthMm, heightMm, shapes, pictures: [...a.pictures, ...b.pictures] });
  }
  const rest = twoColumns([...views.slice(0, -1), ...pictures], widthMm);
  const last = set([views.slice(-1)], widthMm);
  for (const way of [twoColumns([...views, ...pictures], widthMm), rest && over([rest, last], GAP_MM)])
    if (way) ways.push(way);
  return ways.reduce((best, way) => (way.heightMm < best.heightMm - 0.01 ? way : best));
}

/** Sizes of parts: to a hundredth, without noughts at the end. */
export const PART_STYLE: LengthStyle = { digits: 2, trim: true };

/** Name and scale in a grey strip, then what there is to know. */
function head({ entry, beds, units }: PartShown, scale: number, widthMm: number, measure: Measure): Block {
  const right = CARD.scale(scaleText(scale), lengthWord(units));
  const nameWidth = widthMm - measure.width(right, SMALL_MM) - 9;
  const name = wrap(titleOf(entry.name), nameWidth, BODY_MM, true, measure);
  const strip = STRIP_MM + (name.length - 1) * BODY_MM * LEADING;
  const shapes = [
    rectangle(0, -strip, widthMm, strip, 'hair', 0.92),
    ...name.map((text, i) =>
      label(2, -STRIP_MM / 2 - i * BODY_MM * LEADING, text, { anchor: 'middle', sizeMm: BODY_MM, bold: true }),
    ),
    label(widthMm - 2, -STRIP_MM / 2, right, { align: 'right', anchor: 'middle' }),
  ];
  const facts = CARD.facts(
    entry.quantity,
    entry.material,
    grams(entry.massG),
    lengthsText(entry.sizeMm, units, ' × ', PART_STYLE),
  );
  const words = [`${facts}; ${CARD.where(entry.path, beds)}`, CARD.use(entry.use), CARD.print(entry.printNote)];
  const lines = words.map((text) => paragraph(sentence(text), widthMm - 4, measure, { sizeMm: SMALL_MM }));
  const text = stack(lines, 0.3);
  return stack(
    [
      { widthMm, heightMm: strip, shapes },
      { ...text, shapes: movedAll(text, 2, 0) },
    ],
    1,
  );
}

/** A name as a title. */
export const titleOf = (name: string): string => name.charAt(0).toUpperCase() + name.slice(1);

/** Grams: three figures, no more decimals than a scale shows. */
export function grams(massG: number): string {
  return massG >= 100 ? fixed(massG, 0) : massG >= 1 ? fixed(massG, 1) : figures(massG);
}

interface Fitted {
  readonly card: Card;
  readonly scale: number;
}

/** The part at the largest scale at which all of it is no higher than `heightMm`. */
function fitted(
  part: PartShown,
  viewsAt: (scale: number) => readonly Card[],
  scales: readonly number[],
  widthMm: number,
  heightMm: number,
  measure: Measure,
): Fitted | null {
  for (const scale of scales) {
    const views = viewsAt(scale);
    if (views.some((view) => view.widthMm > widthMm)) continue;
    const top = head(part, scale, widthMm, measure);
    for (const share of PICTURE_SHARES) {
      const pictures = part.pictures.map((each) => picture(each, share));
      const body = arranged(views, pictures, widthMm);
      const card = over([plain(top), body], HEAD_GAP);
      if (card.heightMm <= heightMm) return { card, scale };
    }
  }
  return null;
}

/**
 * A part as a card of a third, a half or the whole of a page: the smallest that shows it at full size, or as large as a
 * whole page does. More than one card only where its views do not go on a page together.
 */
export function partCards(part: PartShown, widthMm: number, heightMm: number, measure: Measure): Card[] {
  const known = new Map<number, readonly Card[]>();
  const views = part.views.map((view) => reworded(view, (mm) => lengthCell(mm, part.units, PART_STYLE)));
  const viewsAt = (scale: number) => {
    const found = known.get(scale) ?? views.map((view) => drawn(view, scale, measure));
    known.set(scale, found);
    return found;
  };
  const within = (scales: readonly number[], most: number) => fitted(part, viewsAt, scales, widthMm, most, measure);
  const whole = within(
    SCALES.filter((scale) => scale <= 1),
    heightMm,
  );
  const least = Math.min(1, whole?.scale ?? 1);
  const large = SCALES.filter((scale) => scale >= least);
  for (const count of [3, 2]) {
    const found = within(large, (heightMm - (count - 1) * GAP_MM) / count);
    if (found) return [found.card];
  }
  return whole ? [whole.card] : apart(part, viewsAt, widthMm, heightMm, measure);
}

/** Each view and all pictures as large as the page takes them, on as many cards as that needs. */
function apart(
  part: PartShown,
  viewsAt: (scale: number) => readonly Card[],
  widthMm: number,
  heightMm: number,
  measure: Measure,
): Card[] {
  const later = { ...part, entry: { ...part.entry, name: CARD.continued(part.entry.name) } };
  const free = heightMm - HEAD_GAP - head(later, SCALES[0]!, widthMm, measure).heightMm;
  const fits = (card: Card) => card.widthMm <= widthMm && card.heightMm <= free;
  const scale = SCALES.find((each) => each <= 1 && viewsAt(each).every(fits)) ?? SCALES[SCALES.length - 1]!;
  const cards: Card[] = [];
  const pictures = part.pictures.map((each) => picture(each, PICTURE_SHARES[1]!));
  let rows: Card[][] = [];
  const close = () => {
    const named = cards.length === 0 ? part : later;
    cards.push(over([plain(head(named, scale, widthMm, measure)), set(rows, widthMm)], HEAD_GAP));
    rows = [];
  };
  for (const row of rowsOf([...viewsAt(scale), ...pictures], widthMm)) {
    const height = [...rows, row].reduce((sum, each) => sum + rowHeight(each) + GAP_MM, 0);
    if (rows.length > 0 && height - GAP_MM > free) close();
    rows.push(row);
  }
  close();
  return cards;
}
