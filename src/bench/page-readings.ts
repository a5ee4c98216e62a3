/** The table of readings: limits, a blank each, and what the reading says, at once. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, type Column, cell, el, table } from './page-dom.ts';

export interface ShownReading {
  /** Stable: readings are kept and saved under it. */
  readonly id: string;
  readonly what: string;
  readonly low: string;
  readonly nominal: string;
  readonly high: string;
  readonly unit: string;
}

export interface ShownVerdict {
  readonly good: boolean | null;
  /** What stands in the table; never told by colour alone. */
  readonly word: string;
  /** What to do, a line each. */
  readonly advice: readonly string[];
}

export interface ReadingsTable {
  /** A heading over each table. */
  readonly caption: string;
  /** Open from the start; others are opened when wanted. */
  readonly open: boolean;
  readonly readings: readonly ShownReading[];
}

export interface ReadingsWork {
  readonly text: (id: string) => string;
  readonly entered: (id: string, text: string) => void;
  /** Of what stands in the blank; null while it is empty. */
  readonly judged: (id: string) => ShownVerdict | null;
}

/** Builds the tables once; each blank then updates its own row. */
export function showReadings(tables: readonly ReadingsTable[], work: ReadingsWork): void {
  const words = BENCH.readings;
  const columns: Column[] = [
    { head: words.what, kind: 'words' },
    ...[words.low, words.nominal, words.high].map((head) => ({ head })),
    { head: words.unit, kind: 'words' },
    { head: words.reading, kind: 'words' },
    { head: words.verdict, kind: 'wide' },
  ];
  const place = byId('readings');
  const opened = new Set([...place.querySelectorAll('details[open]')].map((one) => one.id));
  place.replaceChildren(
    ...tables.map(({ caption, open, readings }, i) => {
      const id = `readings-${i}`;
      const rows = readings.map((reading) => ({ name: reading.what, cells: rowCells(reading, work) }));
      // Tables that are opened have something in them.
      const filled = readings.some((reading) => work.text(reading.id).trim() !== '');
      return el(
        'details',
        { id, open: open || filled || opened.has(id) },
        el('summary', {}, caption),
        table(caption, columns, rows),
      );
    }),
  );
}

function rowCells({ id, what, low, nominal, high, unit }: ShownReading, work: ReadingsWork): HTMLElement[] {
  const words = BENCH.readings;
  const said = el('div', { id: `verdict-${id}`, 'aria-live': 'polite' });
  const blank = el('input', {
    inputmode: 'decimal',
    autocomplete: 'off',
    value: work.text(id),
    'aria-label': words.blank(what, unit),
    'aria-describedby': `verdict-${id}`,
  });
  const show = () => {
    const verdict = work.judged(id);
    said.replaceChildren();
    blank.removeAttribute('aria-invalid');
    if (verdict === null) return;
    if (verdict.good === null) blank.setAttribute('aria-invalid', 'true');
    const className = verdict.good === true ? 'verdict good' : 'verdict bad';
    said.append(el('div', { class: className }, verdict.word), ...verdict.advice.map((line) => el('div', {}, line)));
  };
  blank.addEventListener('input', () => {
    work.entered(id, blank.value);
    show();
  });
  show();
  return [
    cell(words.low, undefined, low),
    cell(words.nominal, undefined, nominal),
    cell(words.high, undefined, high),
    cell(words.unit, 'words', unit),
    cell(words.reading, 'words line', blank),
    cell('', 'wide line', said),
  ];
}

/** Hands a text to the browser as a file to save. */
export function saveText(name: string, text: string): void {
  const url = URL.createObjectURL(new Blob([text], { type: 'text/csv;charset=utf-8' }));
  const link = el('a', { href: url, download: name });
  link.click();
  // Given up only when the browser has surely begun to read it.
  window.setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
