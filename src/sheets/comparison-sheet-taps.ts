/** Old against new: the pair drawn, every tap in two rows, and the two ways to replace a coil; blocks of the comparison sheet. */
import { AGAINST, PAIR, WAYS } from '../../templates/wording/comparison-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { comparison, type MatchRecord } from '../drawing/comparison.ts';
import { scaleText } from '../drawing/elevation.ts';
import { moved, SMALL_MM } from '../drawing/shapes.ts';
import type { Matched } from '../record/match-schema.ts';
import { type Block, heading, list, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { table } from './table.ts';
import { figures, fixed, sentence, short, signed } from './text.ts';
import { type LengthStyle, lengthCell, lengthUnit, type Units, unitsOf } from './units.ts';

const RIGHT = { align: 'right' } as const;
const CENTRE = { align: 'centre' } as const;

type Estimate = Matched['old']['meanDiameterMm'];
type Way = Matched['ways'][number];

/** The wider half of the limits. */
const halfWidth = ({ value, low, high }: Estimate) => Math.max(high - value, value - low);
const two = (value: number) => `${Number(value.toPrecision(2))}`;
const khz = (value: number) => fixed(value, value >= 1000 ? 0 : 1);

/** A length in a narrow column: where both units are wanted, inches on a line of their own. */
function narrow(mm: number, units: Units, style: LengthStyle = {}): string {
  if (units !== 'both') return lengthCell(mm, units, style);
  return `${lengthCell(mm, 'metric', style)}\n(${lengthCell(mm, 'inch', style)})`;
}

/** Both coils drawn, with heading and words, no higher than about `mostMm`. */
export function pair(record: MatchRecord, widthMm: number, mostMm: number, measure: Measure): Block {
  const units = unitsOf(record);
  const words = { ...PAIR, new: PAIR.new(record.matched.replacement) };
  const how = paragraph(PAIR.how(lengthUnit(units)), widthMm, measure, { sizeMm: SMALL_MM });
  const room = mostMm - how.heightMm - 8;
  const picture = comparison(record, widthMm, room, words, measure, (mm) => lengthCell(mm, units));
  const drawn: Block = {
    widthMm,
    heightMm: picture.upMm + picture.downMm,
    shapes: picture.shapes.map((shape) => moved(shape, 0, -picture.upMm)),
  };
  return stack([heading(PAIR.heading(scaleText(picture.scale)), widthMm, measure), drawn, how], 1);
}

/** A range's end as inferred: its value and half width. */
const ended = (estimate: Estimate) => AGAINST.plusMinus(khz(estimate.value), two(halfWidth(estimate)));

/** Two rows a tap, the old one over the new. */
export function against(record: MatchRecord, widthMm: number, measure: Measure): Parted {
  const { matched } = record;
  const units = unitsOf(record);
  const newTaps = new Map(record.windings[0]!.taps.map((tap) => [tap.tap, tap]));
  const oldTaps = new Map(matched.old.taps.map((tap) => [tap.tap, tap]));
  const ranged = matched.old.taps.some(({ range }) => range !== null);
  const unit = lengthUnit(units);
  const heads: Head[] = [
    [AGAINST.tap, 8, { bold: true }],
    // Inches leave its words no line of their own.
    [AGAINST.which, 25, units === 'metric' ? CENTRE : {}],
    [AGAINST.turns, 12, RIGHT],
    [AGAINST.position(unit), 15, RIGHT],
    [AGAINST.spread, 10, RIGHT],
    [AGAINST.inductance, 13, RIGHT],
    [AGAINST.limits, 24, CENTRE],
    [AGAINST.off, 11, RIGHT],
    [AGAINST.at, 11, RIGHT],
    [AGAINST.working, 13, RIGHT],
    [AGAINST.workingOff, 12, RIGHT],
    [AGAINST.q, 9, RIGHT],
    ...(ranged
      ? ([
          [AGAINST.low, 20, RIGHT],
          [AGAINST.high, 20, RIGHT],
        ] as const)
      : []),
  ];
  const groups = matched.comparison.map((each) => {
    const old = oldTaps.get(each.tap)!;
    const made = newTaps.get(each.tap)!;
    const turn = short(each.oldTurn, 3);
    const before = [
      `${each.tap}`,
      AGAINST.old(old.by),
      old.determined ? turn : AGAINST.doubt(turn),
      narrow(each.oldPositionMm, units),
      narrow(halfWidth(old.positionMm), units),
      figures(each.oldUh),
      AGAINST.between(figures(old.inductanceUh.low), figures(old.inductanceUh.high)),
      '',
      khz(each.frequencyKhz),
      figures(each.oldWorkingUh),
      '',
      fixed(each.oldQ, 0),
    ];
    const after = [
      '',
      AGAINST.new,
      short(each.newTurn, 3),
      narrow(each.newPositionMm, units),
      '',
      figures(each.newUh),
      each.withinLimits ? AGAINST.within : AGAINST.outside,
      signed(each.deviationPercent, 2),
      '',
      figures(each.newWorkingUh),
      signed(each.workingPercent, 2),
      fixed(each.newQ, 0),
    ];
    if (ranged) {
      before.push(...(old.range === null ? ['', ''] : [ended(old.range.lowKhz), ended(old.range.highKhz)]));
      after.push(...(made.range === null ? ['', ''] : [khz(made.range.lowKhz), khz(made.range.highKhz)]));
    }
    return [before, after];
  });
  return parted({ heading: AGAINST.heading, more: AGAINST.more }, heads, groups, widthMm, measure);
}

/** How the table is read, the worst tap, and the band of the old set. */
export function againstHow({ matched }: MatchRecord, widthMm: number, measure: Measure): Block {
  const { bandLowKhz, bandHighKhz } = matched.old;
  const told = [
    AGAINST.worst(matched.worst.tap, signed(matched.worst.workingPercent, 2)),
    ...(bandLowKhz === null || bandHighKhz === null ? [] : [AGAINST.band(khz(bandLowKhz), khz(bandHighKhz))]),
  ];
  const last = matched.old.taps.length;
  // The whole coil is called that by every old coil.
  const named = matched.old.taps.filter(({ tap, name }) => name !== `${tap}` && tap !== last);
  const names = named.map(({ tap, name }) => AGAINST.named(tap, name)).join(', ');
  return stack(
    [
      paragraph(told.join(' '), widthMm, measure, { sizeMm: SMALL_MM, bold: true }),
      paragraph(AGAINST.how, widthMm, measure, { sizeMm: SMALL_MM }),
      ...(names === '' ? [] : [paragraph(AGAINST.names(names), widthMm, measure, { sizeMm: SMALL_MM })]),
    ],
    0.5,
  );
}

/** A hundredth of a turn and a tenth of a millimetre tell nobody two coils apart. */
const SAME = { turn: 0.01, mm: 0.1 } as const;

function differ(a: Way, b: Way): boolean {
  return a.taps.some(({ turn, positionMm }, i) => {
    const other = b.taps[i];
    return (
      other === undefined ||
      Math.abs(other.turn - turn) > SAME.turn ||
      Math.abs(other.positionMm - positionMm) > SAME.mm
    );
  });
}

/** The two ways side by side under a heading, or that they are one. */
export function ways(record: MatchRecord, widthMm: number, measure: Measure): Block[] {
  const { matched } = record;
  const head = heading(WAYS.heading, widthMm, measure);
  const possible = matched.ways.filter((way) => way.possible);
  const [first, second] = possible;
  if (first !== undefined && second !== undefined && !differ(first, second))
    return [head, paragraph(WAYS.same, widthMm, measure, { sizeMm: SMALL_MM })];
  const units = unitsOf(record);
  const unit = lengthUnit(units);
  const heads: Head[] = [
    [WAYS.way, 26, { bold: true }],
    [WAYS.made, 20, CENTRE],
    [WAYS.wire, 42, {}],
    [WAYS.former(unit), 20, RIGHT],
    [WAYS.turns, 14, RIGHT],
    [WAYS.worst, 24, RIGHT],
    [WAYS.farthest(unit), 20, RIGHT],
  ];
  const or = <T>(value: T | null, text: (value: T) => string) => (value === null ? WAYS.none : text(value));
  const rows = matched.ways.map((way) => [
    way.way,
    way.way === matched.replacement ? WAYS.yes : '',
    way.wire ?? WAYS.none,
    or(way.formerMm, (mm) => narrow(mm, units)),
    or(way.turns, (turns) => short(turns, 3)),
    or(way.worstPercent, (percent) =>
      way.worstTap === null ? signed(percent, 2) : WAYS.worstTap(signed(percent, 2), way.worstTap),
    ),
    or(way.farthestMm, (mm) => narrow(mm, units)),
  ]);
  const total = heads.reduce((sum, [, share]) => sum + share, 0);
  const columns = heads.map(([title, share, rest]) => ({ head: title, widthMm: (widthMm * share) / total, ...rest }));
  const notes = list(
    matched.ways.filter((way) => !way.possible).map((way) => ({ mark: '•', text: sentence(way.text) })),
    widthMm,
    measure,
  );
  const how = paragraph(WAYS.how, widthMm, measure, { sizeMm: SMALL_MM });
  const body = table(columns, rows, measure, { rowMm: 4.7, sizeMm: SMALL_MM });
  return [head, stack([body, how], 1.4), ...notes];
}

/** Rows of two halves side by side, to be read down the first half and then down the second. */
export function halved(rows: readonly (readonly string[])[], columns: number): string[][] {
  const half = Math.ceil(rows.length / 2);
  const blank = Array.from({ length: columns }, () => '');
  return Array.from({ length: half }, (_, i) => [...rows[i]!, ...(rows[half + i] ?? blank)]);
}

/** Taps both ways, where both can be made and differ; null otherwise. */
export function waysTaps(record: MatchRecord, widthMm: number, measure: Measure): Parted | null {
  const [first, second] = record.matched.ways.filter((way) => way.possible);
  if (first === undefined || second === undefined || !differ(first, second)) return null;
  const units = unitsOf(record);
  const of = (way: Way): Head[] => [
    [WAYS.turn(way.way), 18, RIGHT],
    [WAYS.position(lengthUnit(units)), 16, RIGHT],
    [WAYS.off, 14, RIGHT],
  ];
  const heads: Head[] = [[WAYS.tap, 7, { align: 'centre', bold: true }], ...of(first), ...of(second)];
  const cells = (way: Way, i: number) => {
    const tap = way.taps[i];
    return tap === undefined
      ? ['', '', '']
      : [short(tap.turn, 3), narrow(tap.positionMm, units), signed(tap.workingPercent, 2)];
  };
  const rows = first.taps.map(({ tap }, i) => [`${tap}`, ...cells(first, i), ...cells(second, i)]);
  const groups = halved(rows, heads.length).map((row) => [row]);
  const both = rows.length > 1 ? [...heads, ...heads] : heads;
  return parted({ heading: WAYS.taps, more: WAYS.tapsMore }, both, groups, widthMm, measure);
}
