/** What `match` says of the old coil before it says of the new one what `plan` does. */
import { frequencyText, lengthText, significantText, tidy, wireText } from '../src/quantity/format.ts';
import type { Matched } from '../src/record/match-schema.ts';
import type { CoilRecord } from '../src/record/schema.ts';
import { type Figure, hung, list, type Page, pageText, table } from './page.ts';

/** Empty for a record that replaces nothing. */
export function showMatch({ matched }: CoilRecord, page: Page): string {
  if (matched === undefined) return '';
  return pageText([
    oldCoil(matched, page),
    oldTaps(matched, page),
    against(matched, page),
    list(
      page,
      'Both ways',
      matched.ways.map(({ way, text }) => (way === matched.replacement ? `${text} (made)` : text)),
    ),
    list(
      page,
      'Lost taps',
      matched.proposals
        .filter(({ confidence }) => confidence >= 0.01)
        .map(({ text, confidence }) => `${text}, confidence ${tidy(100 * confidence, 2)} %`),
    ),
    list(
      page,
      'What would narrow the limits most',
      matched.next.map(
        ({ key, text, nowPercent, thenPercent }) =>
          `${text} (${key}): the widest from ± ${tidy(nowPercent, 2)} % to ± ${tidy(thenPercent, 2)} %`,
      ),
    ),
  ]);
}

type Limits = Matched['old']['bareMm'];

const half = ({ low, high }: Limits) => (high - low) / 2;
const mm = (of: Limits, digits: number) => `${lengthText(of.value, digits)} ± ${lengthText(half(of), digits)}`;

function oldCoil({ old, fit }: Matched, page: Page): string[] {
  const pitch = old.pitchMm.map((of) => mm(of, 4)).join(', ');
  const sections =
    old.pitchMm.length > 1
      ? `${old.pitchMm.length} sections of ${old.sectionTurns.map((turns) => tidy(turns)).join(', ')} turns, pitch ${pitch}`
      : `pitch ${pitch}`;
  const facts = [
    `${old.wire}: bare ${mm(old.bareMm, 3)}, over the covering ${mm(old.overallMm, 3)}`,
    `${tidy(old.turns)} turns, ${sections}; ${mm(old.windingLengthMm, 2)} over the wires; ${old.hand} hand, ${old.earthedEnd} earthed`,
    `form ${mm(old.formerDiameterMm, 2)}, mean diameter of the wire ${mm(old.meanDiameterMm, 2)}; ${wireText(old.wireLengthM.value)} of wire`,
    ...(fit === null
      ? []
      : [`measurements against the coil: chi-square ${tidy(fit.chiSquare, 3)} with ${fit.freedom} to spare`]),
  ];
  return list(page, 'The old coil (± are 95 % limits)', facts);
}

type OldTap = Matched['old']['taps'][number];

const uh = (value: number) => significantText(value, 4);
const others = (tap: OldTap) =>
  tap.candidates
    .filter(({ weight }) => weight >= 0.02)
    .slice(0, 3)
    .map(({ turn, weight }) => `${tidy(turn)} ${(100 * weight).toFixed(0)}%`)
    .join(' ');

const OLD: readonly Figure<OldTap>[] = [
  ['tap', (tap) => tap.name],
  ['turn', (tap) => tidy(Number(tap.turn.toFixed(3)))],
  ['µH', (tap) => uh(tap.inductanceUh.value)],
  ['95 % limits', (tap) => `${uh(tap.inductanceUh.low)}..${uh(tap.inductanceUh.high)}`],
  [
    'from kHz',
    (tap) => (tap.range === null ? '' : `${tidy(tap.range.lowKhz.value, 4)} ± ${tidy(half(tap.range.lowKhz), 2)}`),
  ],
  [
    'to kHz',
    (tap) => (tap.range === null ? '' : `${tidy(tap.range.highKhz.value, 4)} ± ${tidy(half(tap.range.highKhz), 2)}`),
  ],
  ['turns by', (tap) => (tap.by === 'inferred' && !tap.determined ? 'not sure' : tap.by)],
  ['likeliest', (tap) => (tap.by === 'counted' ? '' : others(tap))],
  ['Q', (tap) => tap.working.q.toFixed(0)],
];

function oldTaps({ old }: Matched, page: Page): string[] {
  const wide = old.taps.some(({ range }) => range !== null) ? OLD : OLD.filter(([title]) => !title.endsWith('kHz'));
  const marked =
    old.bandLowKhz === null || old.bandHighKhz === null
      ? []
      : hung(page, '  ', `marked ${frequencyText(old.bandLowKhz)} to ${frequencyText(old.bandHighKhz)}`);
  return [...table(page, 'Its positions, and what they tuned', wide, old.taps), ...marked];
}

const signed = (value: number) => `${value > 0 ? '+' : ''}${value.toFixed(2)}`;

/** Heads of two columns side by side are short; each says the whole where it stands alone. */
const AGAINST: readonly Figure<Matched['comparison'][number]>[] = [
  ['tap', (one) => String(one.tap)],
  ['turn old', (one) => tidy(Number(one.oldTurn.toFixed(3)))],
  ['new', (one) => tidy(Number(one.newTurn.toFixed(3)))],
  ['µH old', (one) => uh(one.oldWorkingUh)],
  ['new', (one) => uh(one.newWorkingUh)],
  ['off %', (one) => signed(one.workingPercent)],
  ['at kHz', (one) => tidy(one.frequencyKhz, 4)],
  ['mm old', (one) => one.oldPositionMm.toFixed(1)],
  ['new', (one) => one.newPositionMm.toFixed(1)],
  ['Q old', (one) => one.oldQ.toFixed(0)],
  ['new', (one) => one.newQ.toFixed(0)],
];

function against({ comparison, worst, replacement }: Matched, page: Page): string[] {
  const figures = AGAINST.map(([head, cell], i): Figure<Matched['comparison'][number]> => {
    const whole = head === 'new' ? (AGAINST[i - 1]?.[0] ?? '').replace('old', 'new') : head;
    return [page.plain === true ? whole : head, cell];
  });
  const text = `worst: tap ${worst.tap}, ${signed(worst.workingPercent)} %`;
  return table(page, `Old against new, ${replacement}, µH at work; ${text}`, figures, comparison);
}
