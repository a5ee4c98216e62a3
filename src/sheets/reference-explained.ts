/** How the main figures of one tap come about, with the numbers of this coil: blocks of the reference sheet. */
import { EXPLAINED } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { type ExplainedRecord, explainTap, type Figure, type Input } from '../explain/explain.ts';
import { tidy } from '../quantity/format.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { sentence } from './text.ts';

/** Figures that are left to `--explain`: where the wire lies is read off the winding sheet. */
const LEFT_OUT = ['place along the axis', 'angle of the tap', 'wire from the start'];
/** Steps that a figure may take on paper; the rest is in `--explain` as well. */
const STEPS = 7;

const valued = ({ name, value, unit }: Input) => `${name} = ${tidy(value, 5)}${unit === '' ? '' : ` ${unit}`}`;

/** The tap in the middle, so that turns in use and dead turns are both there. */
export const exampleTap = (record: ExplainedRecord): number => {
  const { taps } = record.windings[0]!;
  return taps[Math.floor((taps.length - 1) / 2)]!.tap;
};

function figureBlock(figure: Figure, widthMm: number, measure: Measure): Block {
  const { value, unit, formula, source, inputs, intermediates, validity, error } = figure;
  const steps = intermediates.slice(0, STEPS);
  const lines = [
    EXPLAINED.how(formula, source),
    ...(inputs.length > 0 ? [EXPLAINED.from(inputs.map(valued).join('; '))] : []),
    ...(steps.length > 0 ? [EXPLAINED.by(steps.map(valued).join('; '))] : []),
    `${EXPLAINED.error(error)}${validity.inside ? '' : ` ${EXPLAINED.outside(validity.domain)}`}`,
  ];
  const told = `${tidy(value, 5)}${unit === '' ? '' : ` ${unit}`}`;
  const title = EXPLAINED.value(sentence(figure.figure).replace(/\.$/, ''), told);
  const small = { sizeMm: SMALL_MM };
  return stack(
    [
      paragraph(title, widthMm, measure, { ...small, bold: true }),
      ...lines.map((text) => paragraph(text, widthMm, measure, small)),
    ],
    0.2,
  );
}

/** Heading first, then a block a figure, then where the rest is to be had. */
export function explained(record: ExplainedRecord, widthMm: number, measure: Measure): Block[] {
  const { tap, figures } = explainTap(record, exampleTap(record));
  const told = figures.filter(({ figure }) => !LEFT_OUT.some((start) => figure.startsWith(start)));
  return [
    heading(EXPLAINED.heading(tap), widthMm, measure),
    ...told.map((figure) => {
      const block = figureBlock(figure, widthMm, measure);
      return { ...block, heightMm: block.heightMm + 1 };
    }),
    paragraph(EXPLAINED.rest, widthMm, measure, { sizeMm: SMALL_MM }),
  ];
}
