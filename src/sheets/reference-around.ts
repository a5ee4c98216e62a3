/** The set around the coil: what hangs on it, what to connect where, every pair at one frequency, and the ranges that come of it. */
import { AROUND } from '../../templates/wording/around-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { drawLegend } from '../drawing/legend.ts';
import { drawPairMap, type MapMark, mapLeastMm, mapSigns, type PairMap } from '../drawing/pair-map.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { capacitanceText, inductanceText, resistanceText } from '../quantity/format.ts';
import type { AerialEntry, Around, DetectorEntry } from '../record/around-schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, beside, heading, list, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { fixed, sentence, signed } from './text.ts';

const SMALL = { sizeMm: SMALL_MM };
const RIGHT = { align: 'right' } as const;
const CENTRE = { align: 'centre' } as const;
const GAP_MM = 6;

const khz = (value: number) => fixed(value, value >= 1000 ? 0 : 1);

/** Around of a record that has something to connect; null without. */
export function connectedOf(record: FiguresRecord): Around | null {
  const { around } = record;
  return around === undefined || (around.aerial === null && around.detector === null) ? null : around;
}

function aerialLine({ kind, capacitancePf, inductanceUh, resistanceOhm, shunt, seriesPf, to }: AerialEntry): string {
  const parts = [
    capacitanceText(capacitancePf),
    ...(inductanceUh > 0 ? [inductanceText(inductanceUh)] : []),
    ...(resistanceOhm > 0 ? [resistanceText(resistanceOhm)] : []),
  ];
  const across =
    shunt === null
      ? ''
      : AROUND.across(`${capacitanceText(shunt.capacitancePf)} and ${resistanceText(shunt.resistanceOhm)}`);
  const series = seriesPf === null ? '' : AROUND.series(capacitanceText(seriesPf));
  const place = to === null ? AROUND.best : AROUND.fixed(AROUND.contact(to));
  return AROUND.aerial(AROUND.kinds[kind] ?? kind, `${parts.join(', ')}${across}${series}`, place);
}

function detectorLine({ kind, resistanceKohm, capacitancePf, with: what, to }: DetectorEntry): string {
  const load = `${resistanceText(resistanceKohm * 1e3)}, ${capacitanceText(capacitancePf)}`;
  const place = to === null ? AROUND.best : AROUND.fixed(AROUND.contact(to));
  return AROUND.detector(kind, `${load}${what === null ? '' : AROUND.with(what)}`, place);
}

/** Aerial and detector as entered, with where the figures come from; the caution of a wire outdoors. */
export function connected(around: Around, cautions: readonly string[], widthMm: number, measure: Measure): Block {
  const { aerial, detector } = around;
  const blocks = [
    ...(aerial === null ? [] : [paragraph(aerialLine(aerial), widthMm, measure)]),
    ...(aerial === null ? [] : [paragraph(sentence(AROUND.source(aerial.source)), widthMm, measure, SMALL)]),
    ...(detector === null ? [] : [paragraph(detectorLine(detector), widthMm, measure)]),
    ...(detector === null ? [] : [paragraph(sentence(AROUND.source(detector.source)), widthMm, measure, SMALL)]),
    ...cautions.map((text) => paragraph(`${AROUND.caution}: ${text}`, widthMm, measure, { bold: true, ...SMALL })),
  ];
  return stack([heading(AROUND.heading, widthMm, measure), stack(blocks, 0.6)], 0);
}

/** The three pairs with the reasons. Null where no pair tunes anything. */
export function uses({ best, channelsKhz }: Around, widthMm: number, measure: Measure): Block | null {
  if (best.length === 0) return null;
  const words = AROUND.use;
  const heads: Head[] = [
    [words.use, 20, { bold: true }],
    [words.aerial, 17, {}],
    [words.detector, 15, {}],
    [words.output, 14, RIGHT],
    [words.off, 16, RIGHT],
    [words.why, 104, {}],
  ];
  const groups = best.map(({ use, aerial, detector, outputDb, off9Db, why }) => [
    [use, AROUND.contact(aerial), AROUND.contact(detector), signed(outputDb, 1), signed(off9Db, 1), why],
  ]);
  const all = channelsKhz.map((value) => fixed(value, 0)).join(', ');
  return stack(
    [
      parted(words, heads, groups, widthMm, measure).block(groups, false),
      paragraph(words.how(all), widthMm, measure, SMALL),
    ],
    1,
  );
}

function mapsOf(around: Around): { output: PairMap; off: PairMap; kHz: number } | null {
  const { channelsKhz, pairs, best } = around;
  const kHz = channelsKhz[Math.floor((channelsKhz.length - 1) / 2)];
  if (kHz === undefined) return null;
  const rows = [...new Set(pairs.map(({ aerial }) => aerial))];
  const columns = [...new Set(pairs.map(({ detector }) => detector))];
  const at = (aerial: (typeof rows)[number], detector: number) => {
    const pair = pairs.find((one) => one.aerial === aerial && one.detector === detector);
    const marks: MapMark[] = best
      .filter((one) => one.aerial === aerial && one.detector === detector)
      .map(({ use }) => use);
    return { row: pair?.rows.find((one) => one.kHz === kHz) ?? null, marks };
  };
  const map = (title: string, key: 'outputDb' | 'off9Db'): PairMap => ({
    title,
    rows: rows.map(AROUND.short),
    columns: columns.map(AROUND.short),
    cells: rows.map((aerial) =>
      columns.map((detector) => {
        const { row, marks } = at(aerial, detector);
        return { text: row === null ? null : down(row[key]), dead: row?.dead ?? false, marks };
      }),
    ),
  });
  return { output: map(AROUND.map.output, 'outputDb'), off: map(AROUND.map.off, 'off9Db'), kHz };
}

/** Decibels down, without the sign that all have; one that is up has its plus. */
function down(db: number): string {
  const text = fixed(Math.abs(db), Math.abs(db) < 9.95 ? 1 : 0);
  return db > 0 && Number(text) > 0 ? `+${text}` : text;
}

/** The two grids, side by side or one below the other, where each may go on a page of its own. */
export function maps(around: Around, widthMm: number, measure: Measure): Block[] {
  const found = mapsOf(around);
  if (found === null || around.pairs.length < 2) return [];
  const head = heading(AROUND.map.heading(khz(found.kHz)), widthMm, measure);
  const words = (text: string) => paragraph(text, widthMm, measure, SMALL);
  if (found.output.cells.flat().every(({ text }) => text === null))
    return [stack([head, words(AROUND.map.nothing)], 0.5)];
  const half = (widthMm - GAP_MM) / 2;
  const least = Math.max(mapLeastMm(found.output, measure), mapLeastMm(found.off, measure));
  if (least > widthMm || found.output.rows.length > MOST_ROWS) return [stack([head, words(AROUND.map.many)], 0.5)];
  const drawn = (map: PairMap, width: number): Block => ({ widthMm: width, ...drawPairMap(map, width, measure) });
  const signs = [{ widthMm, ...drawLegend(mapSigns(), widthMm, measure) }, words(AROUND.map.words)];
  if (least <= half)
    return [stack([head, beside([drawn(found.output, half), drawn(found.off, half)], GAP_MM), ...signs], 1)];
  return [stack([head, drawn(found.output, widthMm)], 1), stack([drawn(found.off, widthMm), ...signs], 1)];
}

/** More rows than these are no picture any more. */
const MOST_ROWS = 26;

/** What every position tunes with the balanced pair. Null where there is none. */
export function setRanges(record: FiguresRecord, around: Around, widthMm: number, measure: Measure): Parted | null {
  const [first] = around.ranges;
  if (first === undefined) return null;
  const words = AROUND.ranges;
  const heads: Head[] = [
    [words.tap, 12, { ...CENTRE, bold: true }],
    [words.alone, 46, CENTRE],
    [words.set, 46, CENTRE],
    [words.low, 40, RIGHT],
    [words.high, 40, RIGHT],
  ];
  const groups = around.ranges.map(({ tap, lowKhz, highKhz }) => {
    const range = record.windings[0]!.taps[tap - 1]?.range ?? null;
    const alone = range === null ? '' : `${khz(range.lowKhz)} – ${khz(range.highKhz)}`;
    if (lowKhz === null || highKhz === null || range === null) return [[`${tap}`, alone, words.nothing, '', '']];
    const moves = (now: number, before: number) => signed(100 * (now / before - 1), 1);
    return [
      [`${tap}`, alone, `${khz(lowKhz)} – ${khz(highKhz)}`, moves(lowKhz, range.lowKhz), moves(highKhz, range.highKhz)],
    ];
  });
  const named = { ...words, heading: words.heading(AROUND.contact(first.aerial), AROUND.contact(first.detector)) };
  return parted(named, heads, groups, widthMm, measure);
}

export function aroundNotes({ notes }: Around, widthMm: number, measure: Measure): Block | null {
  if (notes.length === 0) return null;
  return stack(
    list(
      notes.map((text) => ({ mark: '•', text })),
      widthMm,
      measure,
    ),
    0.5,
  );
}
