/** Why this coil, and which others would do: blocks of the reference sheet, from the record of a plan. */
import { CHOSEN } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Alternative, CoilRecord } from '../record/schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { fixed, sentence, short } from './text.ts';
import { lengthCell, lengthUnit, type Units, unitsOf, wireCell, wireUnit } from './units.ts';

const RIGHT = { align: 'right' } as const;

export function why(chosen: CoilRecord['chosen'], widthMm: number, measure: Measure): Block {
  const first = CHOSEN.chosen(chosen.prefer, `${chosen.tried}`, `${chosen.feasible}`);
  const text = paragraph(`${first} ${sentence(chosen.why)}`, widthMm, measure);
  return stack([heading(CHOSEN.heading, widthMm, measure), text], 0);
}

export const noOthers = (widthMm: number, measure: Measure): Block =>
  stack([heading(CHOSEN.alternatives, widthMm, measure), paragraph(CHOSEN.none, widthMm, measure)], 0);

/** Former, pitch with its kind, turns, length and wire; kind and turns only where they are told first. */
function lengths(each: Alternative, units: Units, told: (text: string) => string): string[] {
  const former = told(lengthCell(each.formerMm, units, { trim: true }));
  const pitch = told(lengthCell(each.pitchMm, units, { digits: 3, trim: true }));
  const length = told(lengthCell(each.lengthMm, units, { digits: 1 }));
  const wire = told(wireCell(each.wireM, units));
  const again = told('') !== '';
  return [former, pitch, again ? '' : each.pitchKind, again ? '' : short(each.turns, 2), length, wire];
}

/** Null when there are none. */
export function others(record: FiguresRecord, widthMm: number, measure: Measure): Parted | null {
  if (record.alternatives.length === 0) return null;
  const units = unitsOf(record);
  const unit = lengthUnit(units);
  const heads: Head[] = [
    [CHOSEN.wire, 23, {}],
    [`${CHOSEN.former} ${unit}`, 13, RIGHT],
    [`${CHOSEN.pitch} ${unit}`, 13, RIGHT],
    ['', 15, { align: 'centre' }],
    [CHOSEN.turns, 12, RIGHT],
    [`${CHOSEN.length} ${unit}`, 13, RIGHT],
    [`${CHOSEN.wireLength} ${wireUnit(units)}`, 13, RIGHT],
    [CHOSEN.mass, 12, RIGHT],
    [CHOSEN.worst, 12, RIGHT],
    [CHOSEN.loss, 14, RIGHT],
    [CHOSEN.taps, 23, {}],
    [CHOSEN.better, 64, {}],
  ];
  // Two units in one cell would leave no room for the words: inches stand in a row of their own below.
  const first = units === 'both' ? 'metric' : units;
  const groups = record.alternatives.map((each) => {
    const row = [
      each.wire,
      ...lengths(each, first, (text) => text),
      short(each.massG, 1),
      fixed(each.worstTapPercent, 2),
      fixed(each.lossFactor, 5),
      each.tapMethod,
      each.betterIn.join(', '),
    ];
    return units === 'both' ? [row, ['', ...lengths(each, 'inch', (text) => `(${text})`), '', '', '', '', '']] : [row];
  });
  return parted({ heading: CHOSEN.alternatives, more: CHOSEN.more }, heads, groups, widthMm, measure);
}
