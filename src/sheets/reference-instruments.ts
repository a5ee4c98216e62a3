/** What generator and probe will show of the finished coil, beside what it does without them. */
import { INSTRUMENTS } from '../../templates/wording/instruments.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { capacitanceText, resistanceText } from '../quantity/format.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { fixed, short } from './text.ts';

/** What of a record tells of the bench; one that was surveyed has neither. */
export type BenchRecord = Partial<Pick<CoilRecord, 'measuring' | 'shop'>>;

const RIGHT = { align: 'right' } as const;
const CENTRE = { align: 'centre' } as const;

const khz = (value: number) => fixed(value, value < 100 ? 2 : value < 1000 ? 1 : 0);
const wide = (value: number) => fixed(value, value < 10 ? 2 : value < 100 ? 1 : 0);
const between = (low: number | null, high: number | null, text: (value: number) => string) =>
  low === null || high === null ? INSTRUMENTS.none : `${text(low)}–${text(high)}`;
const or = (value: number | null, text: (value: number) => string) => (value === null ? INSTRUMENTS.none : text(value));

/** The table; null of a record without. */
export function instruments({ measuring }: BenchRecord, widthMm: number, measure: Measure): Parted | null {
  const found = measuring?.instruments;
  if (found === undefined) return null;
  const words = INSTRUMENTS;
  const heads: Head[] = [
    [words.tap, 9, { ...CENTRE, bold: true }],
    [words.with, 14, RIGHT],
    [words.alone, 20, RIGHT],
    [words.aloneWidth, 15, RIGHT],
    [words.aloneQ, 11, RIGHT],
    [words.shows, 20, { ...RIGHT, bold: true }],
    [words.limits, 28, CENTRE],
    [words.width, 18, { ...RIGHT, bold: true }],
    [words.widthLimits, 26, CENTRE],
    [words.q, 11, RIGHT],
  ];
  const rows = found.rows.map((row, i) => [
    found.rows[i - 1]?.tap === row.tap ? '' : `${row.tap}`,
    short(row.capacitancePf, 3),
    khz(row.aloneKhz),
    or(row.aloneWidthKhz, wide),
    or(row.aloneQ, (value) => fixed(value, 0)),
    or(row.frequencyKhz, khz),
    between(row.lowKhz, row.highKhz, khz),
    or(row.widthKhz, wide),
    between(row.widthLowKhz, row.widthHighKhz, wide),
    or(row.q, (value) => fixed(value, 0)),
  ]);
  return parted(
    words,
    heads,
    rows.map((row) => [row]),
    widthMm,
    measure,
  );
}

/** Which instruments, how limits come about, what to suspect; null of a record without. */
export function instrumentWords({ measuring, shop }: BenchRecord, widthMm: number, measure: Measure): Block | null {
  const found = measuring?.instruments;
  const taken = shop?.instruments;
  if (found === undefined || taken === undefined) return null;
  const { generatorOhm, couplingPf, probePf, probeOhm, stated } = taken;
  const generator = INSTRUMENTS.generator(
    resistanceText(generatorOhm),
    couplingPf === null ? null : capacitanceText(couplingPf),
  );
  const probe = INSTRUMENTS.probe(capacitanceText(probePf), resistanceText(probeOhm));
  const percent = (value: number) => short(value, 1);
  const limits = INSTRUMENTS.limitsAre(
    percent(found.tolerancePercent),
    percent(found.copperPercent),
    percent(found.formerPercent),
    percent(found.readingPercent),
    short(found.capacitorLoss, 4),
    short(found.probeLoss, 4),
  );
  const texts = [
    `${INSTRUMENTS.set(stated ? INSTRUMENTS.stated : INSTRUMENTS.usual, generator, probe)} ${INSTRUMENTS.how}`,
    limits,
    INSTRUMENTS.suspect,
  ];
  return stack(
    texts.map((text) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM })),
    0.5,
  );
}
