/**
 * Control charts for the wall, one a page and across: individuals above, moving ranges below, what they say and how capable the
 * process is. They read records and charts and nothing else: same charts, same bytes.
 */
import { CONTROL } from '../../templates/wording/control-charts.ts';
import type { Measure } from '../drawing/boxes.ts';
import { beyondMark, type MarkSizes, offMark, outlierMark, runMark, valueMark } from '../drawing/chart-marks.ts';
import { digitsOf, drawControlChart, recordLine } from '../drawing/control-chart.ts';
import type { Shape } from '../drawing/drawing.ts';
import { label, line, moved, movedAll, SMALL_MM } from '../drawing/shapes.ts';
import { CAPABLE_FROM } from '../prove/capability.ts';
import type { Chart } from '../prove/charts-schema.ts';
import { RUN_LENGTH, SETTLED_FROM } from '../prove/control.ts';
import { ALPHA } from '../prove/outliers.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, paragraph, stack } from './block.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { figures, fixed, short } from './text.ts';
import { type Headed, titleBlock } from './title-block.ts';

export type ChartedRecord = Headed & Pick<CoilRecord, 'paper'>;

/** The charts of one kind. */
export interface KindCharts {
  readonly record: ChartedRecord;
  readonly charts: readonly Chart[];
}

/** Title, verdicts and words below, each to be read from a step away or from near. */
const TYPE_MM = { title: 5.2, verdict: 4.6 } as const;
const GAP_MM = 2.5;
/** Serials in a sentence before the rest is counted. */
const MOST_NAMED = 8;

function titleOf({ quantity, tap, whole, nominalOf, capacitancePf, frequencyKhz }: Chart): string {
  const { what } = CONTROL;
  if (quantity === 'diameter' || quantity === 'length') return what[quantity];
  const where = what.where(tap!, whole);
  return quantity === 'inductance'
    ? what.inductance(where, figures(nominalOf), short(frequencyKhz!, 3))
    : what.resonance(where, figures(nominalOf), short(capacitancePf!, 3));
}

function listed(texts: readonly string[]): string {
  const rest = texts.length - MOST_NAMED;
  return rest <= 1 ? texts.join(', ') : [...texts.slice(0, MOST_NAMED), CONTROL.more(rest)].join(', ');
}

/** First and last serial of each run. */
function stretches({ points }: Chart): string[] {
  const found: string[] = [];
  let from = -1;
  for (let i = 0; i <= points.length; i++) {
    const run = points[i]?.run === true;
    if (run && from < 0) from = i;
    if (!run && from >= 0) {
      found.push(CONTROL.stretch(points[from]!.serial, points[i - 1]!.serial));
      from = -1;
    }
  }
  return found;
}

const serialsWhere = ({ points }: Chart, which: (point: Chart['points'][number]) => boolean): string[] =>
  points.filter(which).map(({ serial }) => serial);

function verdictOf(chart: Chart): string {
  if (chart.inControl) return CONTROL.inControl;
  const beyond = serialsWhere(chart, (point) => point.beyond).length;
  const runs = stretches(chart).length;
  return CONTROL.notInControl(
    CONTROL.and([
      ...(beyond > 0 ? [CONTROL.beyondCount(beyond)] : []),
      ...(runs > 0 ? [CONTROL.runCount(runs, RUN_LENGTH)] : []),
    ]),
  );
}

function capabilityWords(chart: Chart): { readonly verdict: string; readonly how: string | null } {
  const { capability, noCapability, points } = chart;
  if (capability === null)
    return { verdict: CONTROL.none[noCapability ?? 'no limits'](points.length, CAPABLE_FROM), how: null };
  const two = (value: number) => fixed(value, 2);
  const { cp, cpLow, cpHigh, cpk, cpkLow, cpkHigh, coils, standardDeviation } = capability;
  return {
    verdict: CONTROL.capability(
      two(cp),
      CONTROL.between(two(cpLow), two(cpHigh)),
      two(cpk),
      CONTROL.between(two(cpkLow), two(cpkHigh)),
    ),
    how: CONTROL.capabilityHow(coils, `${fixed(standardDeviation, digitsOf(chart) + 1)} ${chart.unit}`),
  };
}

/** Small print: which coils, and how sure all of it is. */
function notes(chart: Chart): string {
  const { points, suspected, leftOut, chancePercent, few } = chart;
  const outliers = serialsWhere(chart, ({ outlier }) => outlier);
  const beyond = serialsWhere(chart, (point) => point.beyond);
  const runs = stretches(chart);
  const alpha = short(100 * ALPHA, 1);
  const { how } = capabilityWords(chart);
  return [
    ...(beyond.length > 0 ? [CONTROL.beyond(listed(beyond))] : []),
    ...(runs.length > 0 ? [CONTROL.runs(listed(runs))] : []),
    ...(how === null ? [] : [how]),
    ...(few ? [CONTROL.few(points.length, SETTLED_FROM)] : []),
    outliers.length > 0 ? CONTROL.outliers(listed(outliers), suspected, alpha) : CONTROL.noOutliers(suspected, alpha),
    ...(leftOut.length > 0 ? [CONTROL.leftOut(listed(leftOut))] : []),
    CONTROL.chance(fixed(chancePercent, chancePercent < 10 ? 1 : 0), points.length),
    CONTROL.rule,
  ].join(' ');
}

const MARK: MarkSizes = { r: 1.1 };

/** What the marks and lines are, those alone that stand on the chart. */
function legend(chart: Chart, measure: Measure): Block {
  const words = CONTROL.legend;
  const { points, limits } = chart;
  const some = (which: (point: Chart['points'][number]) => boolean) => points.some(which);
  const items: { shapes: readonly Shape[]; widthMm: number; text: string }[] = [
    { shapes: [valueMark(2.5, 0, MARK)], widthMm: 5, text: words.inside },
  ];
  if (some((point) => point.run)) items.push({ shapes: [runMark(2.5, 0, MARK)], widthMm: 5, text: words.run });
  if (some((point) => point.beyond || point.rangeBeyond))
    items.push({ shapes: [beyondMark(2.5, 0, MARK)], widthMm: 5, text: words.beyond });
  if (some((point) => point.outlier))
    items.push({ shapes: [outlierMark(3, 0, MARK), valueMark(3, 0, MARK)], widthMm: 6, text: words.outlier });
  if (some((point) => point.outlier || point.rangeBeyond))
    items.push({ shapes: [offMark(2.5, 1.3, 1, MARK)], widthMm: 5, text: words.off });
  items.push({ shapes: [line(0, 0, 9, 0, 'outline', 'dashed')], widthMm: 10, text: words.control });
  if (limits !== null) items.push({ shapes: recordLine(0, 9, -0.7, 1), widthMm: 10, text: words.record });
  const blocks = items.map(({ shapes, widthMm, text }): Block => {
    const width = widthMm + measure.width(text, SMALL_MM) + 1;
    const words = label(widthMm + 1, -2.6, text, { anchor: 'middle' });
    return { widthMm: width, heightMm: 5.2, shapes: [...shapes.map((shape) => moved(shape, 0, -2.6)), words] };
  });
  return beside(blocks, 5);
}

function pageOf(
  { record, chart }: { readonly record: ChartedRecord; readonly chart: Chart },
  sheet: string,
  measure: Measure,
): Page {
  // Across: the serials want the longer side.
  const [heightOfPage, widthOfPage] = PAPER_MM[record.paper];
  const widthMm = widthOfPage - 2 * MARGIN_MM.across;
  const heightMm = heightOfPage - 2 * MARGIN_MM.along;
  const { points } = chart;
  const coils = CONTROL.coils(points.length, points[0]!.serial, points.at(-1)!.serial);
  const head = stack(
    [
      titleBlock(record, { document: CONTROL.document, part: coils, sheet }, widthMm, measure),
      paragraph(titleOf(chart), widthMm, measure, { sizeMm: TYPE_MM.title, bold: true }),
    ],
    GAP_MM,
  );
  const verdict = (text: string) => paragraph(text, widthMm, measure, { sizeMm: TYPE_MM.verdict, bold: true });
  const marks = legend(chart, measure);
  const foot = stack(
    [
      { ...marks, heightMm: marks.heightMm + 1 },
      verdict(verdictOf(chart)),
      verdict(capabilityWords(chart).verdict),
      paragraph(notes(chart), widthMm, measure, { sizeMm: SMALL_MM }),
    ],
    1,
  );
  const drawn = drawControlChart(chart, widthMm, heightMm - head.heightMm - foot.heightMm - 2 * GAP_MM, measure);
  const bottom = MARGIN_MM.along + foot.heightMm;
  return {
    widthMm: widthOfPage,
    heightMm: heightOfPage,
    shapes: [
      ...movedAll(head, MARGIN_MM.across, heightOfPage - MARGIN_MM.along),
      ...movedAll(drawn, MARGIN_MM.across, bottom + GAP_MM),
      ...movedAll(foot, MARGIN_MM.across, bottom),
    ],
  };
}

/** The pages as drawings, kind after kind. */
export function layOutControlCharts(kinds: readonly KindCharts[], measure: Measure): Page[] {
  const all = kinds.flatMap(({ record, charts }) => charts.map((chart) => ({ record, chart })));
  return all.map((one, i) => pageOf(one, CONTROL.sheet(i + 1, all.length), measure));
}

export { frameOf as chartFrame };

/** The charts of all kinds as the bytes of a PDF; null where no kind has any. */
export async function controlCharts(kinds: readonly KindCharts[]): Promise<Uint8Array | null> {
  const charted = kinds.filter(({ charts }) => charts.length > 0);
  if (charted.length === 0) return null;
  const subject = `record ${charted.map(({ record }) => record.hash.slice(0, 12)).join(', ')}`;
  const paper = new Paper({
    title: `${CONTROL.title}: ${charted.map(({ record }) => record.job).join(', ')}`,
    subject,
  });
  return paper.write(layOutControlCharts(charted, paper));
}
