/** The blocks of the page to check by. */
import { CHECKS } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { label, line, SMALL_MM } from '../drawing/shapes.ts';
import { capacitanceText, resistanceText } from '../quantity/format.ts';
import type { CoilRecord, Setting, Tap } from '../record/schema.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { sectionCells, sectionParts, sectionWords } from './check-blocks-advice.ts';
import { BLANK, CENTRE, columnsOf, RIGHT, TICK } from './check-blocks-columns.ts';
import { shares, table } from './table.ts';
import { figures, fixed, sentence, short } from './text.ts';
import { lengthCell, lengthCells, lengthHeads, lengthUnit, unitsOf } from './units.ts';

/** What stands for a range of figures in a narrow column. */
const between = (low: string, high: string) => `${low}–${high}`;

/** What is measured besides the taps. */
export function checks(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block {
  const units = unitsOf(record);
  const columns = columnsOf(widthMm, [
    [CHECKS.what, 38, {}],
    [CHECKS.nominal, 13, { ...CENTRE, bold: true }],
    [CHECKS.limits, 22, CENTRE],
    [CHECKS.unit, 9, CENTRE],
    [CHECKS.reading, 18, BLANK],
    ['', 6, TICK],
  ]);
  const rows = record.checks
    // Resonances have their rows where they are drawn.
    .filter(({ unit }) => unit !== 'kHz')
    .map(({ what, low, nominal, high, unit, digits }) => {
      const told = (value: number) => (unit === 'mm' ? lengthCells(value, units, { digits }) : [fixed(value, digits)]);
      const highs = told(high);
      return [
        what,
        told(nominal).join('\n'),
        told(low)
          .map((text, i) => between(text, highs[i]!))
          .join('\n'),
        (unit === 'mm' ? lengthHeads(units) : [unit]).join('\n'),
      ];
    });
  const body = table(columns, rows, measure, { rowMm, sizeMm: SMALL_MM });
  return { ...stack([heading(CHECKS.heading, widthMm, measure), body], 0), widthMm };
}

/** Rows of a table of taps that go on one page at most. */
const ROWS = 30;

/** Every tap with its limits, in as many tables as go on one page each; with what to do about a tap in its row where `advised`. */
export function tapChecks(
  record: CoilRecord,
  widthMm: number,
  rowMm: number,
  measure: Measure,
  advised = false,
): Block[] {
  const { taps } = record.windings[0]!;
  const parts = Math.ceil(taps.length / ROWS);
  const each = Math.ceil(taps.length / parts);
  const { former } = record;
  const tables = (probed: boolean) =>
    Array.from({ length: parts }, (_, i) =>
      tapCheckTable(record, taps.slice(i * each, (i + 1) * each), widthMm, rowMm, measure, { advised, probed }),
    );
  const wider = isProbed(record) ? tables(true) : [];
  // Two columns more may be more than the page is wide.
  const probed = wider.length > 0 && wider.every((one) => one.widthMm <= widthMm + 1e-6);
  const words = [
    `${meterWords(record)} ${CHECKS.limitsHold(dominants(record))} ${measureWords(record, probed)}`,
    `${sentence(former.material)} ${sentence(former.stiffness)}`,
    ...(advised ? [sectionWords(record)] : []),
  ].map((text) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM }));
  return (probed ? wider : tables(false)).map((body, i) => {
    const head = heading(i === 0 ? CHECKS.taps : CHECKS.tapsMore, widthMm, measure);
    return stack(i === parts - 1 ? [stack([head, body], 0), stack(words, 0.3)] : [head, body], 0.8);
  });
}

/** Limits of what the meter shows; in brackets where it is not to be trusted. */
function meterCell({ lowUh, highUh, doubt }: CoilRecord['measuring']['meter'][number]): string {
  if (lowUh === null || highUh === null) return CHECKS.none;
  const text = between(figures(lowUh), figures(highUh));
  return doubt === null ? text : `(${text})`;
}

/** The known capacitor that taps are measured with: the largest, beside which strays count least. */
export const tapCapacitorPf = (record: CoilRecord): number | null => record.shop.capacitorsPf.at(-1) ?? null;

/** Whether whoever measures has stated generator and probe: then the table says what these will show. */
export const isProbed = ({ shop, measuring }: CoilRecord): boolean =>
  shop.instruments?.stated === true && measuring.instruments !== undefined;

/** A width is not read nearer. */
const twoFigures = (value: number) => fixed(value, value < 1 ? 2 : value < 10 ? 1 : 0);

/** Limits of resonance and width with generator and probe, each with room to write. */
function probedCells({ measuring }: CoilRecord, tap: number, pf: number): string[] {
  const row = measuring.instruments?.rows.find((one) => one.tap === tap && one.capacitancePf === pf);
  if (row === undefined || row.lowKhz === null || row.widthLowKhz === null) return [CHECKS.none, '', CHECKS.none, ''];
  return [
    between(kiloHertz(row.lowKhz), kiloHertz(row.highKhz!)),
    '',
    between(twoFigures(row.widthLowKhz), twoFigures(row.widthHighKhz!)),
    '',
  ];
}

function tapCheckTable(
  record: CoilRecord,
  taps: readonly Tap[],
  widthMm: number,
  rowMm: number,
  measure: Measure,
  { advised, probed }: { readonly advised: boolean; readonly probed: boolean },
): Block {
  const { measuring, shop } = record;
  const read = advised ? 12 : 14;
  const units = unitsOf(record);
  const pf = tapCapacitorPf(record);
  const lengths =
    units === 'both' ? [CHECKS.lengthIn('mm'), CHECKS.lengthIn('in')] : [CHECKS.lengthIn(lengthUnit(units))];
  const columns = columnsOf(widthMm, [
    [CHECKS.tap, 8, { ...CENTRE, bold: true }],
    ...lengths.map((head) => [head, 24, CENTRE] as const),
    [CHECKS.read, read, BLANK],
    [CHECKS.resistance, 22, CENTRE],
    [CHECKS.read, read, BLANK],
    [CHECKS.meterShows(short(shop.meterKhz, 3)), 22, CENTRE],
    [CHECKS.read, read, BLANK],
    ...(probed
      ? ([
          [pf === null ? CHECKS.probedAlone : CHECKS.probed(short(pf, 3)), 20, CENTRE],
          [CHECKS.read, read, BLANK],
          [CHECKS.width, 13, CENTRE],
          [CHECKS.read, read, BLANK],
        ] as const)
      : pf === null
        ? []
        : ([
            [CHECKS.resonance(short(pf, 3)), 20, CENTRE],
            [CHECKS.read, read, BLANK],
          ] as const)),
    [CHECKS.good, advised ? 7 : 9, TICK],
    ...(advised ? sectionParts(record) : []),
  ]);
  const rows = taps.map(({ tap, resistanceLowOhm, resistanceHighOhm }) => {
    const { lowMm, highMm } = measuring.lengths[tap - 1]!;
    const high = lengthCells(highMm, units);
    const found = measuring.resonances.find((one) => one.tap === tap && one.capacitancePf === pf);
    return [
      `${tap}`,
      ...lengthCells(lowMm, units).map((low, i) => between(low, high[i]!)),
      '',
      between(ohms(resistanceLowOhm), ohms(resistanceHighOhm)),
      '',
      meterCell(measuring.meter[tap - 1]!),
      '',
      ...(probed
        ? probedCells(record, tap, pf ?? 0)
        : found === undefined
          ? []
          : [between(kiloHertz(found.lowKhz), kiloHertz(found.highKhz)), '']),
      '',
      ...(advised ? sectionCells(record, tap) : []),
    ];
  });
  return table(columns, rows, measure, { rowMm, sizeMm: SMALL_MM });
}

/** Thousandths, or four figures when there are fewer than those. */
export const ohms = (value: number) => fixed(value, value < 0.1 ? 4 : value < 10 ? 3 : value < 100 ? 2 : 1);
/** To a thousandth at least. */
export const kiloHertz = (value: number) => fixed(value, value < 100 ? 2 : value < 1000 ? 1 : 0);

/** How to measure; with generator and probe, where they are stated. */
function measureWords(record: CoilRecord, probed: boolean): string {
  const { instruments } = record.shop;
  if (!probed || instruments === undefined) {
    const elsewhere = isProbed(record) ? ` ${CHECKS.probedElsewhere}` : '';
    return `${CHECKS.measureHow} ${CHECKS.resonanceHow}${elsewhere}`;
  }
  const { generatorOhm, couplingPf, probePf, probeOhm } = instruments;
  const generator = CHECKS.generator(
    resistanceText(generatorOhm),
    couplingPf === null ? null : capacitanceText(couplingPf),
  );
  const probe = CHECKS.probe(capacitanceText(probePf), resistanceText(probeOhm));
  return `${CHECKS.measureHow} ${CHECKS.probedHow(generator, probe)}`;
}

/** Which meter, where it can be trusted, and what to take where it cannot. */
function meterWords(record: CoilRecord): string {
  const { measuring, shop } = record;
  const { meter, fromTap, toTap } = measuring;
  const name = CHECKS.meter(shop.meterName, short(shop.meterKhz, 3), short(100 * shop.meterAccuracy, 3));
  const where = fromTap === null ? CHECKS.nowhere : CHECKS.trusted(fromTap, toTap!, meter.length);
  const doubts = [...new Set(meter.flatMap(({ doubt }) => doubt ?? []))];
  if (doubts.length === 0) return `${name} ${where}`;
  const why = doubts.map((doubt) => CHECKS.doubts[doubt](short(measuring.leadUh, 3))).join('; ');
  return `${name} ${where} ${CHECKS.brackets(why)} ${shop.capacitorsPf.length > 0 ? CHECKS.insteadResonance : CHECKS.instead}`;
}

/** What makes the limits wide, with the taps where it does: `pitch (taps 1 to 3), former diameter (tap 4)`. */
function dominants(record: CoilRecord): string {
  const runs: { input: string; first: number; last: number }[] = [];
  for (const { tap, dominant } of record.windings[0]!.taps) {
    const last = runs[runs.length - 1];
    if (last?.input === dominant) last.last = tap;
    else runs.push({ input: dominant, first: tap, last: tap });
  }
  return runs.map(({ input, first, last }) => CHECKS.dominant(input, first, last)).join(', ');
}

/** What the two switches set, in as many tables as go on one page each; nothing for one switch. */
export function settings(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block[] {
  const rows = record.settings ?? [];
  const parts = Math.ceil(rows.length / ROWS);
  const each = Math.ceil(rows.length / parts);
  return Array.from({ length: parts }, (_, i) =>
    settingsOf(rows.slice(i * each, (i + 1) * each), i === parts - 1, widthMm, rowMm, measure),
  );
}

function settingsOf(
  rows: readonly Setting[],
  isLast: boolean,
  widthMm: number,
  rowMm: number,
  measure: Measure,
): Block {
  const last = rows[rows.length - 1]!;
  const ranged = rows.some((row) => row.lowKhz !== null);
  const columns = columnsOf(widthMm, [
    [CHECKS.tens, 12, { ...CENTRE, bold: true }],
    [CHECKS.turnsUsed, 26, CENTRE],
    [CHECKS.unitLast(last.inductancesUh.length - 1), 22, RIGHT],
    [CHECKS.unitZero, 22, { ...RIGHT, bold: true }],
    [CHECKS.step, 18, RIGHT],
    [CHECKS.q, 18, RIGHT],
    [CHECKS.atKhz, 18, RIGHT],
    ...(ranged ? ([[CHECKS.range, 34, CENTRE]] as const) : []),
  ]);
  const lines = rows.map((row) => {
    const cells = [
      `${row.tens}`,
      CHECKS.between(`${row.turnsLeast}`, `${row.turnsMost}`),
      figures(row.inductancesUh[row.inductancesUh.length - 1]!),
      figures(row.inductancesUh[0]!),
      fixed(row.stepPercent, 1),
      fixed(row.q, 0),
      fixed(row.frequencyKhz, 0),
    ];
    if (row.lowKhz !== null && row.highKhz !== null)
      cells.push(CHECKS.between(fixed(row.lowKhz, 0), fixed(row.highKhz, 0)));
    return cells;
  });
  const how = paragraph(CHECKS.settingsHow('1', `${last.turnsMost}`), widthMm, measure, { sizeMm: SMALL_MM });
  const body = [heading(CHECKS.settings, widthMm, measure), table(columns, lines, measure, { rowMm })];
  return stack(isLast ? [...body, how] : body, 0.5);
}

/** Sizes of the former as it should come out. */
export function formerSizes(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const { former } = record;
  const units = unitsOf(record);
  const size = (mm: number) => lengthCell(mm, units);
  const rows: [string, string][] = [
    [CHECKS.length, size(former.lengthMm)],
    [CHECKS.bore, size(former.boreDiameterMm)],
    former.ribs === null
      ? [CHECKS.wall, size(former.wallMm)]
      : [CHECKS.ribSize, `${size(former.ribs.widthMm)} × ${size(former.ribs.depthMm)}`],
  ];
  if (former.flange) rows.push([CHECKS.rim, size(former.flange.diameterMm)]);
  if (former.groove) rows.push([former.ribs === null ? CHECKS.groove : CHECKS.notch, size(former.groove.depthMm)]);
  const columns = columnsOf(widthMm, [
    [CHECKS.part, 30, {}],
    [lengthUnit(units), 30, { ...RIGHT, bold: true }],
    [CHECKS.reading, 24, BLANK],
  ]);
  return stack([heading(CHECKS.former, widthMm, measure), table(columns, rows, measure, { sizeMm: SMALL_MM })], 0);
}

export function signature(widthMm: number, measure: Measure): Block {
  const heightMm = 9;
  const widths = shares(widthMm, [48, 30, 48, 30, 30]);
  const shapes: Shape[] = [];
  let x = 0;
  CHECKS.signature.forEach((words, i) => {
    shapes.push(label(x, -heightMm + 1, words));
    shapes.push(line(x + measure.width(words, SMALL_MM) + 1.5, -heightMm + 0.6, x + widths[i]! - 3, -heightMm + 0.6));
    x += widths[i]!;
  });
  return { widthMm, heightMm, shapes };
}
