/** The second winding on the winding sheet: its figures in a row, what it couples with each tap, and the scale where it slides. */
import { SECOND_BLOCK as WORDS } from '../../templates/wording/second-winding.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { CENTRE, columnsOf, type Parts } from './check-blocks-columns.ts';
import { table } from './table.ts';
import { figures, fixed, short } from './text.ts';
import { lengthCell, lengthText, lengthUnit, unitsOf, wireText } from './units.ts';

/** None without a second winding. */
export function secondBlock(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block[] {
  const second = record.around?.second ?? null;
  if (second === null) return [];
  const units = unitsOf(record);
  const unit = lengthUnit(units);
  const length = (mm: number, digits = 2) => lengthCell(mm, units, { digits });
  const { body, holes, slide, wanted } = second;
  const end = second.startMm > record.windings[0]!.finishMm ? 'finish' : 'start';
  const at = (name: string) => holes.find(({ label }) => label === name)!;
  const cells: [string, number, string][] = [
    [WORDS.wire, 26, second.wire.name],
    [WORDS.turns, 9, `${second.turns}`],
    [WORDS.pitch(unit), 14, lengthCell(second.pitchMm, units, { digits: 3, trim: true })],
    [WORDS.cut, 16, wireText(second.wireLengthM + second.leadsM, units)],
    [WORDS.height('P1', unit), 17, length(at('P1').axialMm)],
    [WORDS.height('P2', unit), 17, length(at('P2').axialMm)],
    [WORDS.angle, 14, short(at('P1').angleDeg, 1)],
    ...(body === null ? [] : [[WORDS.edge(unit), 17, length(body.lowMm, 1)] as [string, number, string]]),
    [WORDS.alone, 13, figures(second.inductanceUh)],
    [WORDS.mutual, 13, figures(second.mutualUh)],
    [WORDS.coupling, 15, fixed(second.coupling, 3)],
  ];
  // Lengths in two units side by side take two rows.
  const rows = units === 'both' && body !== null ? [cells.slice(0, 6), cells.slice(6)] : [cells];
  const tables = rows.map((row) => {
    const parts: Parts = row.map(([head, share]) => [head, share, CENTRE]);
    return table(columnsOf(widthMm, parts), [row.map(([, , text]) => text)], measure, { rowMm, sizeMm: SMALL_MM });
  });
  const tie = Math.abs(holes[0]!.axialMm - second.startMm);
  const told = [
    body === null
      ? WORDS.apart(lengthText(second.distanceMm, units, { digits: 1 }))
      : WORDS.body(
          lengthText(body.outsideDiameterMm, units, { digits: 2, trim: true }),
          lengthText(body.insideDiameterMm, units, { digits: 2, trim: true }),
          lengthText(body.lengthMm, units, { digits: 1 }),
        ),
    ...(second.kind === 'beside' ? [WORDS.apart(lengthText(second.distanceMm, units, { digits: 1 }))] : []),
    WORDS.ends(wireText(second.wireLengthM, units), fixed(second.wireMassG, 1), lengthText(tie, units, { digits: 1 })),
    ...(slide === null ? [] : [WORDS.heights]),
    WORDS.working(second.working.map(({ tap, coupling }) => `${tap}: ${short(coupling, 3)}`).join(', ')),
  ].join(' ');
  const blocks = [heading(WORDS.heading(second.kind, end), widthMm, measure), ...tables];
  if (slide !== null && wanted !== null) {
    const words = slide.travelMm < 0 ? WORDS.scale.down : WORDS.scale.up;
    const scale: Parts = [
      [WORDS.coupling, 20, CENTRE],
      ...slide.scale.map(({ coupling }) => [short(coupling, 4), 12, CENTRE] as Parts[number]),
    ];
    const moved = [WORDS.inUnit(words, unit), ...slide.scale.map(({ mm }) => length(mm, 1))];
    blocks.push(table(columnsOf(widthMm, scale), [moved], measure, { rowMm, sizeMm: SMALL_MM }));
  }
  blocks.push(paragraph(told, widthMm, measure, { sizeMm: SMALL_MM }));
  return [{ ...stack(blocks, 0.8), widthMm }];
}
