/** Blocks of the proof sheet: tallies, what to do with coils that fail, what is to be read again, marks coil by coil, notes on the file. */
import { MARK, PROOF, RESCUE } from '../../templates/wording/proof.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { isElectrical, isOut } from '../prove/judge.ts';
import type { Judged, ProofCoil, ProofKind, ProofRecord, ProofTap } from '../prove/schema.ts';
import { type Block, heading, list, paragraph, stack } from './block.ts';
import { type Head, type Parted, parted } from './parted.ts';
import { figures, fixed, sentence, signed } from './text.ts';

const CENTRE = { align: 'centre' } as const;
const RIGHT = { align: 'right' } as const;

const serialOf = ({ serial }: ProofCoil) => (serial === '' ? PROOF.table.none : serial);
const sum = (values: readonly number[]) => values.reduce((all, value) => all + value, 0);

/** Coils of each kind: how many passed, failed, lack readings, can be saved. */
export function tallies({ kinds }: ProofRecord, widthMm: number, measure: Measure): Parted {
  const words = PROOF.tally;
  const rows = kinds.map(({ job, hash, tally, coils }) => ({
    name: job,
    hash: hash.slice(0, 12),
    counts: [
      tally.coils,
      tally.pass,
      tally.fail,
      tally.missing,
      coils.filter(({ rescue }) => rescue?.can === 'yes').length,
    ],
  }));
  const cells = rows.map(({ name, hash, counts }) => [name, hash, ...counts.map(String)]);
  if (rows.length > 1)
    cells.push([words.all, '', ...rows[0]!.counts.map((_, i) => `${sum(rows.map(({ counts }) => counts[i]!))}`)]);
  const heads: Head[] = [
    [words.kind, 62, { bold: true }],
    [words.hash, 30, {}],
    [words.coils, 16, RIGHT],
    [words.pass, 16, RIGHT],
    [words.fail, 16, RIGHT],
    [words.missing, 18, RIGHT],
    [words.saved, 28, RIGHT],
  ];
  return parted(
    words,
    heads,
    cells.map((row) => [row]),
    widthMm,
    measure,
  );
}

export function inputText({ input, count }: ProofRecord, widthMm: number, measure: Measure): Block {
  const { figures: all, readings, dial, missing, leftOut } = count;
  const text = PROOF.input(input.file, all, readings, dial, missing, leftOut);
  return paragraph(`${text} ${PROOF.meaning}`, widthMm, measure, { sizeMm: SMALL_MM });
}

const told = (words: string, items: readonly string[], widthMm: number, measure: Measure): Block[] => [
  heading(words, widthMm, measure),
  ...list(
    items.map((text) => ({ mark: '•', text })),
    widthMm,
    measure,
  ),
];

/** What the readings of a kind have in common, in words. */
export function systematic(
  { job, systematic: found, firstOff }: ProofKind,
  widthMm: number,
  measure: Measure,
): Block[] {
  const words = PROOF.systematic;
  const items =
    found === null
      ? [words.few]
      : [
          ...found.diagnosis,
          ...found.leftOut.map(({ serial, text }) => words.left(serial === '' ? PROOF.table.none : serial, text)),
        ];
  if (firstOff !== null) {
    const { path, why, changes, notes: more } = firstOff;
    if (path !== null) items.push(words.next(path, changes.map(({ key, after }) => `${key} ${after}`).join(', ')));
    else if (why !== null) items.push(words.none(why));
    items.push(...more);
  }
  return told(words.heading(job), items, widthMm, measure);
}

const allOf = ({ readings, taps }: ProofCoil): Judged[] => [...readings, ...taps.flatMap((tap) => tap.readings)];
/** A figure more than elsewhere: a reading outside shows that it is. */
const exact = (value: number) => `${Number(value.toPrecision(5))}`;
/** Readings of one coil that are named one by one; the rest stands in the record. */
const MOST_OUT = 3;

/** Taps that are electrically outside with the farthest of them, and other readings that are. */
function outside(coil: ProofCoil): string {
  const words = PROOF.failing;
  const taps = coil.taps.filter(({ readings }) => readings.some((one) => isElectrical(one) && isOut(one)));
  const parts: string[] = [];
  if (taps.length > 0) {
    const size = ({ deviationPercent }: ProofTap) => Math.abs(deviationPercent ?? 0);
    const far = taps.reduce((a, b) => (size(b) > size(a) ? b : a));
    const named = RESCUE.several(
      taps.map(({ tap }) => tap),
      coil.taps.length,
    );
    const off = signed(far.deviationPercent ?? 0, 1);
    parts.push(taps.length === 1 ? words.one(named, off) : words.far(named, off, far.tap));
  }
  const others = allOf(coil).filter((one) => !isElectrical(one) && isOut(one));
  for (const { what, value, unit, low, high } of others.slice(0, MOST_OUT))
    parts.push(words.reading(what, `${exact(value)} ${unit}`.trim(), exact(low!), exact(high!)));
  if (others.length > MOST_OUT) parts.push(words.more(others.length - MOST_OUT));
  return parts.join('; ');
}

/** Said once below the table rather than at every coil. */
const COMMON: readonly string[] = [RESCUE.why.acts, RESCUE.why.length, RESCUE.why.held, RESCUE.why.again];

function toDo(coil: ProofCoil): string {
  const words = PROOF.failing;
  const { actions, taps, out, why } = coil.rescue!;
  const last = coil.taps.length;
  const changed = taps.filter(({ beforePercent, afterPercent }) => Math.abs(beforePercent - afterPercent) > 0.05);
  const expected = changed.map(({ tap, beforePercent, afterPercent }) =>
    words.tap(RESCUE.where(tap, last), signed(beforePercent, 1), signed(afterPercent, 1)),
  );
  return [
    ...(actions.length > 0 ? [sentence(actions.map(({ doing }) => doing).join('; '))] : []),
    ...(expected.length > 0 ? [words.expected(expected.join(', '))] : []),
    ...(out.length > 0 ? [words.out(RESCUE.several(out, last))] : []),
    ...why.filter((text) => !COMMON.includes(text)),
  ].join(' ');
}

const failingIn = ({ kinds }: ProofRecord) =>
  kinds.flatMap(({ coils }) => coils.filter(({ rescue }) => rescue !== null));

/** Coils that fail: what is outside, what it looks like, what to do, and what is then expected. */
export function failing(record: ProofRecord, widthMm: number, measure: Measure): Parted {
  const words = PROOF.failing;
  const heads: Head[] = [
    [words.serial, 22, { bold: true }],
    [words.saved, 14, {}],
    [words.outside, 62, {}],
    [words.looks, 42, {}],
    [words.toDo, 46, {}],
  ];
  const rows = failingIn(record).map((coil) => [
    serialOf(coil),
    words.can[coil.rescue!.can],
    outside(coil),
    coil.rescue!.causes.join(' '),
    toDo(coil),
  ]);
  return parted(
    words.head,
    heads,
    rows.map((row) => [row]),
    widthMm,
    measure,
  );
}

/** What holds for several coils of that table; that no coil fails. */
export function failingHow(record: ProofRecord, widthMm: number, measure: Measure): Block {
  const coils = failingIn(record);
  if (coils.length === 0)
    return stack(
      [
        heading(PROOF.failing.head.heading, widthMm, measure),
        paragraph(PROOF.failing.none, widthMm, measure, { sizeMm: SMALL_MM }),
      ],
      0,
    );
  const said = COMMON.filter((text) => coils.some(({ rescue }) => rescue!.why.includes(text)));
  return paragraph([...said, PROOF.failing.figures].join(' '), widthMm, measure, { sizeMm: SMALL_MM });
}

/** Readings that are not of their coil; empty without any. */
export function again({ kinds }: ProofRecord, widthMm: number, measure: Measure): Block[] {
  const items = kinds.flatMap((kind) =>
    kind.coils.flatMap((coil) =>
      allOf(coil)
        .filter(({ verdict }) => verdict === 'implausible')
        .map(({ what, written, line, advice }) =>
          PROOF.again.item(serialOf(coil), what, written, line, advice.join(' ')),
        ),
    ),
  );
  return items.length === 0 ? [] : told(PROOF.again.heading, items, widthMm, measure);
}

const markOf = ({ state, again: reread }: Pick<ProofTap, 'state' | 'again'>) =>
  state === 'fail' ? MARK.fail : reread ? MARK.again : MARK[state];

/** Former, 20 turns and the like: blank when nothing of it was judged. */
function otherMark({ readings }: ProofCoil): string {
  const judged = readings.filter(({ verdict }) => verdict !== 'not judged');
  if (judged.length === 0) return '';
  if (judged.some(isOut)) return MARK.fail;
  return judged.some(({ verdict }) => verdict === 'implausible') ? MARK.again : MARK.pass;
}

/** The tap that is farthest off. */
function farthest({ taps }: ProofCoil): string {
  const off = taps.filter(({ deviationPercent }) => deviationPercent !== null);
  if (off.length === 0) return '';
  const far = off.reduce((a, b) => (Math.abs(b.deviationPercent!) > Math.abs(a.deviationPercent!) ? b : a));
  return PROOF.table.at(signed(far.deviationPercent!, 2), far.tap);
}

/** Columns of marks that a page holds beside serial and verdict. */
const MOST_TAPS = 20;

/** A mark a tap, a row a coil; several tables where the taps are many. */
export function marks({ job, taps, coils }: ProofKind, widthMm: number, measure: Measure): Parted[] {
  const words = PROOF.table;
  const tables = Math.ceil(taps / MOST_TAPS);
  const each = Math.ceil(taps / tables);
  return Array.from({ length: tables }, (_, t) => {
    const from = t * each;
    const to = Math.min(taps, from + each);
    const name = tables === 1 ? job : words.part(job, from + 1, to);
    const first = t === 0;
    const heads: Head[] = [
      [words.serial, 34, { bold: true }],
      [words.state, 12, { ...CENTRE, bold: true }],
      ...Array.from({ length: to - from }, (_each, i): Head => [words.tap(from + i + 1), 5.2, CENTRE]),
      ...(first
        ? ([
            [words.other, 13, CENTRE],
            [words.off, 28, RIGHT],
          ] as const)
        : []),
    ];
    const rows = coils.map((coil) => [
      serialOf(coil),
      MARK[coil.state],
      ...coil.taps.slice(from, to).map(markOf),
      ...(first ? [otherMark(coil), farthest(coil)] : []),
    ]);
    const narrow = Math.min(widthMm, sum(heads.map(([, share]) => share)) * WIDEN);
    return parted(
      { heading: words.heading(name), more: words.more(name) },
      heads,
      rows.map((row) => [row]),
      narrow,
      measure,
    );
  });
}

/** Tables of few taps are not drawn out over the page. */
const WIDEN = 1.3;

/** Inductances by two capacitors; empty without any. */
export function lines({ kinds }: ProofRecord, widthMm: number, measure: Measure): Block[] {
  const words = PROOF.lines;
  const items = kinds.flatMap(({ coils }) =>
    coils.flatMap((coil) =>
      coil.taps.flatMap(({ tap, line }) => {
        if (line === null) return [];
        const off = line.deviationPercent === null ? '' : words.off(signed(line.deviationPercent, 1));
        const where = RESCUE.where(tap, coil.taps.length);
        return [
          words.item(
            serialOf(coil),
            where,
            figures(line.inductanceUh),
            fixed(line.halfPercent, 1),
            fixed(line.selfPf, 1),
            off,
          ),
        ];
      }),
    ),
  );
  return items.length === 0 ? [] : told(words.heading, items, widthMm, measure);
}

/** Remarks of the file, with what they were made of; empty without any. */
export function remarks({ kinds }: ProofRecord, widthMm: number, measure: Measure): Block[] {
  const words = PROOF.remarks;
  const items = kinds.flatMap(({ coils }) =>
    coils.flatMap((coil) => [
      ...coil.remarks.map((remark) => words.item(serialOf(coil), '', remark)),
      ...allOf(coil).flatMap(({ remark, what }) =>
        remark === '' ? [] : [words.item(serialOf(coil), `, ${what}`, remark)],
      ),
    ]),
  );
  return items.length === 0 ? [] : told(words.heading, items, widthMm, measure);
}

/** Notes that are printed; all of them stand in the record. */
const MOST_NOTES = 120;

export function notes({ notes: all }: ProofRecord, widthMm: number, measure: Measure): Block[] {
  const words = PROOF.notes;
  // What counts nowhere comes first.
  const ordered = [...all].sort((a, b) => Number(a.fate === 'kept') - Number(b.fate === 'kept') || a.line - b.line);
  const items = ordered
    .slice(0, MOST_NOTES)
    .map(({ line, column, fate, got, expected, todo }) =>
      words.item(words.line(line, column), fate === 'kept' ? words.kept : words.out, got, expected, todo),
    );
  if (all.length > MOST_NOTES) items.push(words.rest(all.length - MOST_NOTES));
  return told(words.heading, items.length === 0 ? [words.none] : items, widthMm, measure);
}
