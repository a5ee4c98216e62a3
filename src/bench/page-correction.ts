/** What a length measured while winding changes: where taps still to come must go, and what the coil will be. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, type Column, cell, el, setText, table } from './page-dom.ts';

export interface ShownTap {
  readonly name: string;
  readonly planned: string;
  readonly now: string;
  readonly inductance: string;
  readonly off: string;
  readonly note: string;
}

export interface ShownCorrection {
  /** What the length says, a paragraph each; the last is what the finished coil will be. */
  readonly lines: readonly string[];
  readonly taps: readonly ShownTap[];
  /** The places above are the ones that the counter stops at. */
  readonly inUse: boolean;
  /** A length does not go together with what was counted. */
  readonly doubtful: boolean;
}

export interface CorrectionWork {
  readonly use: () => void;
  readonly drop: () => void;
}

/** The label of the blank, with the turns that it is about. */
export function showCorrectionLabel(label: string, ready: boolean): void {
  setText(byId('wound-label'), label);
  byId<HTMLInputElement>('wound').disabled = !ready;
  byId<HTMLButtonElement>('correction-work').disabled = !ready;
}

export function showCorrection(shown: ShownCorrection | null, work: CorrectionWork): void {
  const place = byId('corrected');
  const words = BENCH.correction;
  if (shown === null) {
    place.replaceChildren();
    return;
  }
  const use = el('button', { type: 'button', class: 'main' }, words.use);
  use.addEventListener('click', work.use);
  const drop = el('button', { type: 'button' }, shown.inUse ? words.drop : words.leave);
  drop.addEventListener('click', work.drop);
  const rows = shown.taps.map(({ name, planned, now, inductance, off, note }) => ({
    name,
    cells: [
      cell(words.planned, undefined, planned),
      cell(words.now, undefined, el('strong', {}, now)),
      cell(words.inductance, undefined, inductance),
      cell(words.off, undefined, off),
      cell('', 'words line', note),
    ],
  }));
  const columns: Column[] = [
    { head: words.tap, kind: 'words' },
    ...[words.planned, words.now, words.inductance, words.off].map((head) => ({ head })),
    { head: words.note, kind: 'words' },
  ];
  place.replaceChildren(
    ...shown.lines.map((line, i) =>
      el('p', { class: shown.doubtful && i < shown.lines.length - 2 ? 'fault' : undefined }, line),
    ),
    ...(rows.length === 0 ? [] : [table(words.caption, columns, rows)]),
    el('p', {}, el('strong', {}, shown.inUse ? words.inUse : words.notYet)),
    el('div', { class: 'row' }, ...(shown.inUse ? [drop] : [use, drop])),
  );
}
