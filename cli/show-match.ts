/** What `match` says of the old coil before it says of the new one what `plan` does. */
import { frequencyText, lengthText, significantText, tidy, wireText } from '../src/quantity/format.ts';
import type { Matched } from '../src/record/match-schema.ts';
import type { CoilRecord } from '../src/record/schema.ts';
import { inAscii } from './show-survey.ts';
import { lay, wrap } from './table.ts';

/** Plain text, no wider than `columns`, no colours; empty for a record that replaces nothing. */
export function showMatch({ matched }: CoilRecord, columns: number, plain: boolean): string {
  if (matched === undefined) return '';
  const sections = [
    oldCoil(matched, columns),
    oldTaps(matched, columns),
    against(matched, columns),
    list(
      'Both ways',
      matched.ways.map(({ way, text }) => (way === matched.replacement ? `${text} (made)` : text)),
      columns,
    ),
    list(
      'Lost taps',
      matched.proposals
        .filter(({ confidence }) => confidence >= 0.01)
        .map(({ text, confidence }) => `${text}, confidence ${tidy(100 * confidence, 2)} %`),
      columns,
    ),
    list(
      'What would narrow the limits most',
      matched.next.map(
        ({ key, text, nowPercent, thenPercent }) =>
          `${text} (${key}): the widest from ± ${tidy(nowPercent, 2)} % to ± ${tidy(thenPercent, 2)} %`,
      ),
      columns,
    ),
  ];
  const text = sections
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n');
  return `${plain ? inAscii(text) : text}\n`;
}

type Limits = Matched['old']['bareMm'];

const half = ({ low, high }: Limits) => (high - low) / 2;
const mm = (of: Limits, digits: number) => `${lengthText(of.value, digits)} ± ${lengthText(half(of), digits)}`;

function oldCoil({ old, fit }: Matched, columns: number): string[] {
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
  return list('The old coil (± are 95 % limits)', facts, columns);
}

type Column = readonly [title: string, cell: (tap: Matched['old']['taps'][number]) => string];

const uh = (value: number) => significantText(value, 4);
const others = (tap: Matched['old']['taps'][number]) =>
  tap.candidates
    .filter(({ weight }) => weight >= 0.02)
    .slice(0, 3)
    .map(({ turn, weight }) => `${tidy(turn)} ${(100 * weight).toFixed(0)}%`)
    .join(' ');

const OLD: readonly Column[] = [
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

function oldTaps({ old }: Matched, columns: number): string[] {
  const wide = old.taps.some(({ range }) => range !== null) ? OLD : OLD.filter(([title]) => !title.endsWith('kHz'));
  const rows = tableOf(wide, old.taps, columns);
  const band =
    old.bandLowKhz === null || old.bandHighKhz === null
      ? []
      : [`  marked ${frequencyText(old.bandLowKhz)} to ${frequencyText(old.bandHighKhz)}`];
  return ['Its positions, and what they tuned', ...rows, ...band];
}

type Against = readonly [title: string, cell: (tap: Matched['comparison'][number]) => string];
const signed = (value: number) => `${value > 0 ? '+' : ''}${value.toFixed(2)}`;

const AGAINST: readonly Against[] = [
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

function against({ comparison, worst, replacement }: Matched, columns: number): string[] {
  const text = `worst: tap ${worst.tap}, ${signed(worst.workingPercent)} %`;
  return [`Old against new, ${replacement}, µH at work; ${text}`, ...tableOf(AGAINST, comparison, columns)];
}

/** As many of the columns as the page holds, the first ones first. */
function tableOf<T>(
  figures: readonly (readonly [string, (one: T) => string])[],
  rows: readonly T[],
  columns: number,
): string[] {
  for (let count = figures.length; count > 0; count--) {
    const used = figures.slice(0, count);
    const table = lay(
      used.map(([title]) => title),
      rows.map((row) => used.map(([, cell]) => cell(row))),
      used.map(() => true),
    );
    if (count === 1 || table.every((line) => line.length + 2 <= columns))
      return table.map((line) => `  ${line}`.slice(0, columns));
  }
  return [];
}

function list(title: string, items: readonly string[], columns: number): string[] {
  if (items.length === 0) return [];
  return [
    ...wrap(title, columns),
    ...items.flatMap((text) =>
      wrap(text, columns - 4).map((line, index) => (index === 0 ? `  - ${line}` : `    ${line}`)),
    ),
  ];
}
