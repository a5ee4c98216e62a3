/** What is known of the old coil: inferred, in doubt, proposed, contradicted, worth measuring, measured; blocks of the comparison sheet. */
import {
  ASSUMED,
  COILS,
  CONTRADICTED,
  MEASURED,
  NEXT,
  PROPOSED,
  TURNS,
} from '../../templates/wording/comparison-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { MatchRecord } from '../drawing/comparison.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import type { Matched } from '../record/match-schema.ts';
import { type Block, heading, list, paragraph } from './block.ts';
import { halved } from './comparison-sheet-taps.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { figures, fixed, sentence, short, signed } from './text.ts';
import { type LengthStyle, lengthText, unitsOf, wireText } from './units.ts';

const RIGHT = { align: 'right' } as const;
type Estimate = Matched['old']['meanDiameterMm'];

/** Both coils figure by figure, the old one with its limits. */
export function coils(record: MatchRecord, widthMm: number, measure: Measure): Parted {
  const { old } = record.matched;
  const units = unitsOf(record);
  const winding = record.windings[0]!;
  const { former } = record;
  const length = (mm: number, style: LengthStyle) => lengthText(mm, units, style);
  const limited = (name: string, { value, low, high }: Estimate, made: string, text: (value: number) => string) => [
    name,
    text(value),
    `${text(low)} – ${text(high)}`,
    made,
  ];
  const sized = (name: string, estimate: Estimate, made: number | null, digits: number) =>
    limited(name, estimate, made === null ? COILS.none : length(made, { digits }), (mm) => length(mm, { digits }));
  const several = old.pitchMm.length > 1;
  const rows: string[][] = [
    [COILS.wire, old.wire, '', winding.wire.name],
    [COILS.turns, short(old.turns, 3), '', short(winding.turns, 3)],
    sized(COILS.former, old.formerDiameterMm, former.outsideDiameterMm, 2),
    sized(COILS.mean, old.meanDiameterMm, winding.meanDiameterMm, 2),
    sized(COILS.bare, old.bareMm, winding.wire.bareMm, 3),
    sized(COILS.overall, old.overallMm, winding.wire.overallMm, 3),
    ...old.pitchMm.map((pitch, i) =>
      sized(
        several ? COILS.pitchOf(i + 1, short(old.sectionTurns[i]!, 3)) : COILS.pitch,
        pitch,
        i === 0 ? winding.pitchMm : null,
        4,
      ),
    ),
    ...old.sectionGapMm.map((gap, i) => sized(COILS.sectionGap(i + 1), gap, null, 2)),
    sized(COILS.tapGap, old.tapGapMm, record.tapMethod.gapMm, 3),
    sized(COILS.length, old.windingLengthMm, winding.windingLengthMm, 2),
    limited(COILS.wireLength, old.wireLengthM, wireText(winding.wireLengthM, units), (m) => wireText(m, units)),
    [COILS.self, COILS.pf(figures(old.selfCapacitancePf)), '', COILS.pf(figures(winding.selfCapacitancePf))],
    [COILS.hand, COILS.wound(old.hand, old.earthedEnd), '', COILS.wound(record.frame.hand, record.frame.earthedEnd)],
  ];
  const heads: Head[] = [
    [COILS.figure, 38, {}],
    [COILS.old, 50, {}],
    [COILS.limits, 50, {}],
    [COILS.new, 50, {}],
  ];
  return parted(
    { heading: COILS.heading, more: COILS.more },
    heads,
    rows.map((row) => [row]),
    widthMm,
    measure,
  );
}

const percent = (share: number) => (share > 0 && share < 0.005 ? '<1' : fixed(100 * share, 0));

/** A heading and its items. */
function told(words: string, items: readonly string[], widthMm: number, measure: Measure): Block[] {
  const head = heading(words, widthMm, measure);
  return [
    head,
    ...list(
      items.map((text) => ({ mark: '•', text })),
      widthMm,
      measure,
    ),
  ];
}

const MOST_CANDIDATES = 6;

/** Which turns are in doubt, with what else fits. */
export function doubts({ matched }: MatchRecord, widthMm: number, measure: Measure): Block[] {
  const open = matched.old.taps.filter((tap) => !tap.determined);
  if (open.length === 0)
    return [heading(TURNS.heading, widthMm, measure), paragraph(TURNS.all, widthMm, measure, { sizeMm: SMALL_MM })];
  const items = open.map(({ tap, name, candidates }) => {
    const fits = candidates
      .slice(0, MOST_CANDIDATES)
      .map(({ turn, weight }) => TURNS.fit(short(turn, 3), percent(weight)));
    return TURNS.tap(tapName(tap, name), fits.join(', '));
  });
  return told(TURNS.heading, items, widthMm, measure);
}

const tapName = (tap: number, name: string) => (name === `${tap}` ? `Tap ${tap}` : `Tap ${tap}, ${name}`);

/** Empty when no tap is lost. */
export function proposals({ matched }: MatchRecord, widthMm: number, measure: Measure): Block[] {
  if (matched.proposals.length === 0) return [];
  const items = matched.proposals.map(({ text, confidence }) => PROPOSED.text(sentence(text), percent(confidence)));
  return told(PROPOSED.heading, items, widthMm, measure);
}

/** A reading with its unit; lengths as the job wants them. */
function reading(record: MatchRecord, value: number, unit: string): string {
  if (unit === 'mm') return lengthText(value, unitsOf(record), { digits: Math.abs(value) < 5 ? 3 : 2 });
  const number = value === 0 ? '0' : figures(value);
  return unit === '' ? number : `${number} ${unit === 'uH' ? 'µH' : unit === 'ohm' ? 'Ω' : unit}`;
}

/** Empty when there is none; the words under the measurements say so then. */
export function contradictions(record: MatchRecord, widthMm: number, measure: Measure): Block[] {
  const found = record.matched.contradictions;
  if (found.length === 0) return [];
  const items = found.map(({ text, got, expected, unit, sigmas }) =>
    CONTRADICTED.text(
      sentence(text),
      reading(record, got, unit),
      reading(record, expected, unit),
      fixed(Math.abs(sigmas), 1),
    ),
  );
  return told(CONTRADICTED.heading, items, widthMm, measure);
}

export function nextOnes({ matched }: MatchRecord, widthMm: number, measure: Measure): Block[] {
  if (matched.next.length === 0)
    return [heading(NEXT.heading, widthMm, measure), paragraph(NEXT.none, widthMm, measure, { sizeMm: SMALL_MM })];
  const items = matched.next.map(({ text, nowPercent, thenPercent }) =>
    NEXT.text(sentence(text), fixed(nowPercent, 2), fixed(thenPercent, 2)),
  );
  return told(NEXT.heading, items, widthMm, measure);
}

/** Every measurement against the inferred coil, in two halves side by side. */
export function measured(record: MatchRecord, widthMm: number, measure: Measure): Parted {
  const heads: Head[] = [
    [MEASURED.key, 36, {}],
    [MEASURED.measured, 22, RIGHT],
    [MEASURED.fitted, 22, RIGHT],
    [MEASURED.sigmas, 10, RIGHT],
  ];
  const rows = record.matched.residuals.map((each) => [
    each.key,
    // Two units take a line each.
    reading(record, each.measured, each.unit).replace(' (', '\n('),
    reading(record, each.fitted, each.unit).replace(' (', '\n('),
    signed(each.sigmas, 1),
  ]);
  const both = rows.length > 1 ? [...heads, ...heads] : heads;
  const lines = rows.length > 1 ? halved(rows, heads.length) : rows;
  return parted(
    { heading: MEASURED.heading, more: MEASURED.more },
    both,
    lines.map((line) => [line]),
    widthMm,
    measure,
  );
}

/** Chi-square beyond this many standard deviations of its distribution is not what errors as stated give. */
const UNLIKELY = 2;

export function fitText({ matched: { fit, contradictions } }: MatchRecord, widthMm: number, measure: Measure): Block {
  const words = () => {
    if (fit === null) return MEASURED.spare;
    const off = (fit.chiSquare - fit.freedom) / Math.sqrt(2 * fit.freedom);
    const verdict = off > UNLIKELY ? MEASURED.loose : off < -UNLIKELY ? MEASURED.tight : MEASURED.good;
    return MEASURED.fit(fixed(fit.chiSquare, 1), fit.freedom, verdict);
  };
  const none = contradictions.length === 0 ? `${CONTRADICTED.none} ` : '';
  return paragraph(`${none}${words()}`, widthMm, measure, { sizeMm: SMALL_MM });
}

/** Empty when everything was measured. */
export function assumed({ matched }: MatchRecord, widthMm: number, measure: Measure): Block[] {
  const items = Object.entries(matched.assumed).map(([key, words]) => `${key}: ${words}`);
  return items.length === 0 ? [] : told(ASSUMED.heading, items, widthMm, measure);
}
