/** The wiring of the switch, from both sides, as blocks of the reference sheet. */
import { WIRING } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { label, moved, SMALL_MM } from '../drawing/shapes.ts';
import { placesFor, stepFor } from '../drawing/switch-angles.ts';
import { type Contact, drawWafer, type Side, type Wafer } from '../drawing/switch-wiring.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, beside, heading, list, paragraph, stack } from './block.ts';
import { short } from './text.ts';

export interface NamedWafer extends Wafer {
  readonly name: string;
}

/** Angle between the positions of a switch of the record, degrees. */
export const stepOf = (record: FiguresRecord, positions: number): number =>
  stepFor(placesFor(positions, record.surroundings.rest));

/** A switch's wafers: the one with the common, and one of pairs where the winding is cut at each tap. */
function wafersOfSwitch(
  record: FiguresRecord,
  name: string,
  contacts: readonly Contact[],
  /** Where the dead turns lie in turning order. */
  dead: 'before' | 'behind',
  hot: boolean,
): NamedWafer[] {
  const { rest } = record.surroundings;
  const middle = (contacts.length - 1) / 2;
  const plain = {
    contacts,
    stepDeg: stepOf(record, contacts.length),
    // Between its ends, so that dead turns and turns in use are both there to see.
    shown: dead === 'behind' ? Math.floor(middle) : Math.ceil(middle),
    link: null,
    bridge: null,
  };
  const common = hot ? { words: WIRING.set } : ('earth' as const);
  if (rest === 'disconnected') {
    // At its end in use the whole winding stays as it is: nothing to cut there.
    const whole = dead === 'behind' ? contacts.length - 1 : 0;
    const cut = contacts.map((contact, i) => (i === whole ? { ...contact, name: '' } : contact));
    return [
      { ...plain, name: WIRING.first(name), common },
      { ...plain, name: WIRING.second(name), contacts: cut, common: null },
    ];
  }
  const link = rest === 'shorted' ? (dead === 'behind' ? ('last' as const) : ('first' as const)) : null;
  return [{ ...plain, name, common, link, bridge: rest === 'shorted in sections' ? dead : null }];
}

/** Every wafer of the coil's switches; none for a coil of one position. */
export function wafersOf(record: FiguresRecord): NamedWafer[] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  if (taps.length < 2) return [];
  const startEarthed = record.frame.earthedEnd === 'start';
  const tens = taps.map(({ tap }, i) => ({
    number: `${tap}`,
    name: i === taps.length - 1 ? WIRING.finish : WIRING.tap(tap),
  }));
  if (unitTaps.length === 0) return wafersOfSwitch(record, WIRING.single, tens, 'behind', startEarthed);
  const units = [
    { number: '0', name: WIRING.start },
    ...unitTaps.map(({ unit }) => ({ number: `${unit}`, name: WIRING.unit(unit) })),
  ];
  return [
    ...wafersOfSwitch(record, WIRING.tens, tens, 'behind', startEarthed),
    ...wafersOfSwitch(record, WIRING.units, units, 'before', !startEarthed),
  ];
}

/** A wafer in the middle of its column, its name above it. */
function view(wafer: NamedWafer, side: Side, widthMm: number, measure: Measure): Block {
  const drawn = drawWafer(wafer, side, widthMm / 2 - 1, measure);
  const caption = WIRING.wafer(wafer.name, WIRING[side]);
  const down = 5.5 + drawn.box.top;
  const shapes = [
    label(widthMm / 2, -3.4, caption, { align: 'centre', bold: true }),
    ...drawn.shapes.map((shape) => moved(shape, widthMm / 2, -down)),
  ];
  return { widthMm, heightMm: down - drawn.box.bottom, shapes };
}

/** The rows of wafers, the heading on the first, and the words that belong to them. */
export function wiring(record: FiguresRecord, widthMm: number, measure: Measure): Block[] {
  const wafers = wafersOf(record);
  const head = heading(WIRING.heading, widthMm, measure);
  if (wafers.length === 0) return [stack([head, paragraph(WIRING.one, widthMm, measure)], 0.5)];
  const rows = wafers.map((wafer) =>
    beside([view(wafer, 'front', widthMm / 2, measure), view(wafer, 'behind', widthMm / 2, measure)], 0),
  );
  const [first, ...others] = rows as [Block, ...Block[]];
  return [stack([head, words(record, wafers, widthMm, measure), first], 1), ...others];
}

function words(record: FiguresRecord, wafers: readonly NamedWafer[], widthMm: number, measure: Measure): Block {
  const { rest } = record.surroundings;
  const two = (record.windings[0]!.unitTaps ?? []).length > 0;
  const { earthedEnd } = record.frame;
  const switches = wafers.filter(({ common }) => common !== null);
  const shown = switches.map((wafer) => `${short(wafer.stepDeg, 2)}`);
  const named = ({ name }: NamedWafer) => name.replace(/, wafer A$/, '');
  const at = switches
    .map((wafer) => WIRING.at(named(wafer).toLowerCase(), wafer.contacts[wafer.shown]!.number))
    .join(', ');
  const most = Math.max(...switches.map(({ contacts }) => contacts.length));
  const stops = switches.filter(({ contacts, stepDeg }) => (contacts.length + 1) * stepDeg <= 360);
  const items = [
    WIRING.turning([...new Set(shown)].join('° and '), at),
    two ? WIRING.namesUnits : WIRING.names,
    (two ? WIRING.earthUnits : WIRING.earth)[earthedEnd],
    `${WIRING.rest[rest]}${rest === 'shorted in sections' ? ` ${WIRING.reach(most, placesFor(most, rest))}` : ''}`,
    ...(stops.length > 0 ? [stops.map((wafer) => WIRING.stop(named(wafer), wafer.contacts.length)).join(' ')] : []),
  ];
  const marked = items.map((text) => ({ mark: '•', text }));
  return stack(list(marked, widthMm, measure, SMALL_MM), 0.3);
}
