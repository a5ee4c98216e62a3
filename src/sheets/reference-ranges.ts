/** Ranges, curves and figures of every position, and what they were taken with: blocks of the reference sheet. */
import { CHART, CURVES, ENDS, KINDS, NOTES, POSITIONS, TAKEN } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { drawLegend } from '../drawing/legend.ts';
import { chartHeight, chartSigns, drawRangeChart, type RangeChart, ROW_MM } from '../drawing/range-chart.ts';
import { moved, SMALL_MM } from '../drawing/shapes.ts';
import { curvesLeastMm, drawTuningCurves } from '../drawing/tuning-curves.ts';
import { significantText } from '../quantity/format.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, heading, list, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { figures, fixed, sentence, short } from './text.ts';
import { lengthText, unitsOf } from './units.ts';

const RIGHT = { align: 'right' } as const;
const CENTRE = { align: 'centre' } as const;

const khz = (value: number) => fixed(value, value >= 1000 ? 0 : 1);
/** Three figures. */
const three = (value: number) => (value >= 100 ? fixed(value, 0) : significantText(value, 3));
const half = (value: number) => `${Number(value.toPrecision(2))}`;

function bandOf({ demand }: FiguresRecord): RangeChart['band'] {
  const { bandLowKhz, bandHighKhz } = demand;
  return bandLowKhz === null || bandHighKhz === null ? null : { lowKhz: bandLowKhz, highKhz: bandHighKhz };
}

function chartOf(record: FiguresRecord): RangeChart | null {
  const positions = record.windings[0]!.taps.flatMap(({ tap, range }) => (range === null ? [] : [{ tap, ...range }]));
  return positions.length === 0 ? null : { positions, band: bandOf(record) };
}

/** The chart with its heading and legend, no higher than `mostMm` where rows allow it. */
export function chart(record: FiguresRecord, widthMm: number, mostMm: number, measure: Measure): Block {
  const head = heading(CHART.heading, widthMm, measure);
  const drawn = chartOf(record);
  if (drawn === null) return stack([head, paragraph(CHART.none, widthMm, measure)], 0.5);
  const signs = drawLegend(chartSigns(drawn), widthMm, measure);
  const seconds = drawn.positions.some((one) => one.secondLowKhz !== null || one.secondHighKhz !== null);
  const words = seconds ? `${CHART.right} ${CHART.beyond}` : CHART.right;
  const legend = stack(
    [
      { widthMm, heightMm: signs.heightMm, shapes: signs.shapes },
      paragraph(words, widthMm, measure, { sizeMm: SMALL_MM }),
    ],
    1,
  );
  const room = mostMm - head.heightMm - legend.heightMm - 2 - chartHeight({ ...drawn, positions: [] }, 0);
  const rowMm = Math.min(ROW_MM.most, Math.max(ROW_MM.least, room / drawn.positions.length));
  const heightMm = chartHeight(drawn, rowMm);
  const { shapes } = drawRangeChart(drawn, widthMm, rowMm, measure);
  const picture = { widthMm, heightMm, shapes: shapes.map((shape) => moved(shape, 0, -heightMm)) };
  return stack([head, picture, legend], 1);
}

/** The tuning curves, or why there are none. */
export function curves(record: FiguresRecord, widthMm: number, heightMm: number, measure: Measure): Block {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const { set } = record.demand;
  const head = heading(CURVES.heading, widthMm, measure);
  const drawn = taps.filter(({ curve }) => curve.length > 1).map(({ tap, curve }) => ({ tap, points: curve }));
  if (drawn.length === 0 || set === null) return stack([head, paragraph(CURVES.none, widthMm, measure)], 0.5);
  const band = bandOf(record);
  const fixedPf = set.strayPf + set.aerialPf;
  const words = [
    CURVES.how(short(fixedPf, 2)),
    ...(unitTaps.length > 0 ? [CURVES.units] : []),
    ...(band === null ? [] : [CURVES.band]),
  ];
  const how = paragraph(words.join(' '), widthMm, measure, { sizeMm: SMALL_MM });
  const high = Math.max(curvesLeastMm(drawn.length), heightMm - head.heightMm - how.heightMm - 2);
  const { shapes } = drawTuningCurves({ curves: drawn, fixedPf, band }, widthMm, high, measure);
  const picture = { widthMm, heightMm: high, shapes: shapes.map((shape) => moved(shape, 0, -high)) };
  return stack([head, picture, how], 1);
}

/** Every position in one row. */
export function positions(record: FiguresRecord, widthMm: number, measure: Measure): Parted {
  const { taps } = record.windings[0]!;
  const ranged = taps.some(({ range }) => range !== null);
  const heads: Head[] = [
    [POSITIONS.tap, 8, { ...CENTRE, bold: true }],
    [POSITIONS.turn, 15, RIGHT],
    [POSITIONS.inductance, 17, RIGHT],
    [POSITIONS.limits, 28, CENTRE],
    [POSITIONS.dominant, 24, {}],
    [POSITIONS.dc, 14, RIGHT],
    ...(ranged
      ? ([
          [POSITIONS.low, 24, RIGHT],
          [POSITIONS.high, 24, RIGHT],
          [POSITIONS.second, 17, RIGHT],
        ] as const)
      : []),
    [POSITIONS.q, 10, RIGHT],
    [POSITIONS.at, 14, RIGHT],
  ];
  const groups = taps.map((tap) => {
    const { range } = tap;
    const seconds = [range?.secondLowKhz ?? null, range?.secondHighKhz ?? null].filter((one) => one !== null);
    return [
      [
        `${tap.tap}`,
        short(tap.turn, 3),
        figures(tap.inductanceUh),
        POSITIONS.between(figures(tap.inductanceLowUh), figures(tap.inductanceHighUh)),
        tap.dominant,
        figures(tap.resistanceDcOhm),
        ...(ranged
          ? [
              range === null ? '' : POSITIONS.plusMinus(khz(range.lowKhz), half(range.lowUncertaintyKhz)),
              range === null ? '' : POSITIONS.plusMinus(khz(range.highKhz), half(range.highUncertaintyKhz)),
              seconds.length === 0 ? '' : khz(Math.min(...seconds)),
            ]
          : []),
        fixed(tap.working.q, 0),
        khz(tap.working.frequencyKhz),
      ],
    ];
  });
  return parted(POSITIONS, heads, groups, widthMm, measure);
}

/** Three rows a position with a range, one without. */
export function ends(record: FiguresRecord, widthMm: number, measure: Measure): Parted {
  const { taps } = record.windings[0]!;
  const ranged = taps.some((tap) => tap.ends.length > 0);
  const heads: Head[] = [
    [ENDS.tap, 10, { ...CENTRE, bold: true }],
    ...(ranged ? ([[ENDS.at, 20, {}]] as const) : []),
    [ENDS.kHz, 24, RIGHT],
    [ENDS.inductance, 24, RIGHT],
    [ENDS.resistance, 24, RIGHT],
    [ENDS.q, 18, RIGHT],
    [ENDS.bandwidth, 28, RIGHT],
    [ENDS.parallel, 28, RIGHT],
  ];
  const groups = taps.map((tap) => {
    if (tap.ends.length > 0)
      return tap.ends.map((end, i) => [
        i === 0 ? `${tap.tap}` : '',
        end.at,
        khz(end.frequencyKhz),
        figures(end.inductanceUh),
        figures(end.resistanceOhm),
        fixed(end.q, 0),
        three(end.bandwidthKhz),
        three(end.parallelKohm),
      ]);
    const { frequencyKhz, inductanceUh, resistanceOhm, q } = tap.working;
    const parallel = (q * 2e-3 * Math.PI * frequencyKhz * inductanceUh) / 1e3;
    const cells = [khz(frequencyKhz), figures(inductanceUh), figures(resistanceOhm), fixed(q, 0)];
    return [[`${tap.tap}`, ...(ranged ? [''] : []), ...cells, three(frequencyKhz / q), three(parallel)]];
  });
  const words = ranged ? ENDS : { heading: ENDS.alone, more: ENDS.alone };
  return parted(words, heads, groups, widthMm, measure);
}

export const endsHow = (widthMm: number, measure: Measure): Block =>
  paragraph(ENDS.how, widthMm, measure, { sizeMm: SMALL_MM });

export function kinds(record: FiguresRecord, widthMm: number, measure: Measure): Parted | null {
  const { switchKinds } = record;
  const first = switchKinds[0];
  if (first === undefined) return null;
  const ranged = switchKinds.some(({ positions }) => positions.some((one) => one.lowKhz !== null));
  // Five figures on both sides of the dash are wider than the column.
  const mega = switchKinds.some(({ positions }) => positions.some((one) => (one.highKhz ?? 0) >= 1e4));
  const heads: Head[] = [
    [KINDS.tap, 8, { ...CENTRE, bold: true }],
    ...switchKinds.flatMap(({ kind, inUse }): Head[] => [
      [KINDS.inductance(kind), 17, { ...RIGHT, bold: inUse }],
      [KINDS.q, 10, { ...RIGHT, bold: inUse }],
      ...(ranged ? ([[mega ? KINDS.megaRange : KINDS.range, 21, { ...CENTRE, bold: inUse }]] as const) : []),
    ]),
  ];
  const range = ({ lowKhz, highKhz }: { lowKhz: number | null; highKhz: number | null }) =>
    lowKhz === null || highKhz === null
      ? ''
      : mega
        ? `${fixed(lowKhz / 1e3, 1)}–${fixed(highKhz / 1e3, 1)}`
        : `${fixed(lowKhz, 0)}–${fixed(highKhz, 0)}`;
  const groups = first.positions.map(({ tap }, i) => [
    [
      `${tap}`,
      ...switchKinds.flatMap(({ positions }) => {
        const at = positions[i]!;
        return [figures(at.inductanceUh), fixed(at.q, 0), ...(ranged ? [range(at)] : [])];
      }),
    ],
  ]);
  return parted(KINDS, heads, groups, widthMm, measure);
}

export function kindNotes(record: FiguresRecord, widthMm: number, measure: Measure): Block[] {
  return record.switchKinds.map(({ kind, inUse, note }) =>
    paragraph(
      `${sentence(inUse ? KINDS.inUse(kind) : KINDS.other(kind)).replace(/:\.$/, ':')} ${note}`,
      widthMm,
      measure,
      {
        sizeMm: SMALL_MM,
      },
    ),
  );
}

/** Coil, set and surroundings, and every default that was taken. */
export function taken(record: FiguresRecord, widthMm: number, measure: Measure): Block[] {
  const winding = record.windings[0]!;
  const { set } = record.demand;
  const { surroundings } = record;
  const units = unitsOf(record);
  const length = (mm: number, digits: number) => lengthText(mm, units, { digits, trim: true });
  const lines = [
    TAKEN.coil(short(winding.turns, 3), length(winding.meanDiameterMm, 3), length(winding.windingLengthMm, 2)),
    TAKEN.wire(winding.wire.name, length(winding.wire.bareMm, 4), length(winding.wire.overallMm, 4)),
    set === null
      ? TAKEN.noSet
      : TAKEN.set(
          short(set.capacitorLowPf, 2),
          short(set.capacitorHighPf, 2),
          short(set.strayPf, 2),
          short(set.aerialPf, 2),
        ),
    TAKEN.leads(short(surroundings.leadPf, 2)),
    TAKEN.rest(surroundings.rest, record.frame.earthedEnd),
    TAKEN.copper(short(surroundings.celsius, 1)),
    TAKEN.self(short(winding.selfCapacitancePf, 2)),
    TAKEN.loss(surroundings.formerLoss),
  ];
  const assumed = Object.entries(record.assumed).map(([key, value]) => `${key}: ${String(value)}`);
  const bullets = (items: readonly string[]) =>
    list(
      items.map((text) => ({ mark: '•', text })),
      widthMm,
      measure,
    );
  return [
    heading(TAKEN.heading, widthMm, measure),
    ...bullets(lines),
    ...(assumed.length === 0
      ? []
      : [paragraph(`${TAKEN.assumed}: ${assumed.join('; ')}.`, widthMm, measure, { sizeMm: SMALL_MM })]),
  ];
}

export function notes(record: FiguresRecord, widthMm: number, measure: Measure): Block[] {
  if (record.warnings.length === 0) return [];
  const items = list(
    record.warnings.map(({ text }) => ({ mark: '•', text })),
    widthMm,
    measure,
  );
  return [heading(NOTES.heading, widthMm, measure), ...items];
}
