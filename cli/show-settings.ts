/** What the two switches of a two-switch coil set, for the terminal: nothing for one switch. */
import { significantText } from '../src/quantity/format.ts';
import type { CoilRecord, Setting } from '../src/record/schema.ts';
import { type Figure, hung, type Page, table } from './page.ts';

/** The most needed first; what does not fit the page is in plan.json and on the sheet. */
const COLUMNS: readonly Figure<Setting>[] = [
  ['tens', (row) => String(row.tens)],
  ['turns', (row) => `${row.turnsLeast}..${row.turnsMost}`],
  [
    'µH',
    (row) => `${significantText(row.inductancesUh.at(-1) ?? 0, 4)}..${significantText(row.inductancesUh[0] ?? 0, 4)}`,
  ],
  ['step %', (row) => row.stepPercent.toFixed(1)],
  [
    'kHz',
    (row) => (row.lowKhz === null || row.highKhz === null ? '' : `${row.lowKhz.toFixed(0)}..${row.highKhz.toFixed(0)}`),
  ],
  ['Q', (row) => row.q.toFixed(0)],
];

/** The unit taps, then a row for each tens contact, from its last unit to unit 0. */
export function settingsTable(record: CoilRecord, page: Page): string[] {
  const rows = record.settings ?? [];
  if (rows.length === 0) return [];
  const places = (record.windings[0]?.unitTaps ?? []).map((tap) => `u${tap.unit} ${tap.turn.toFixed(3)}`).join(', ');
  const used = COLUMNS.filter(([title]) => title !== 'kHz' || rows.some((row) => row.lowKhz !== null));
  const [title = '', ...lines] = table(page, 'Both switches, last unit to unit 0', used, rows);
  return [title, ...hung(page, '  ', `units switch: S as 0, then at turn ${places}`), ...lines];
}
