/** What each column of a file of readings holds, by its title. */
import { quote } from '../quantity/parse.ts';
import { type Conditions, conditionsIn, unitOf, type What, type Words, whatOf, wordsOf } from './read-words.ts';
import type { FileNote } from './types.ts';

export type Role = 'record' | 'serial' | 'tap' | 'quantity' | 'condition' | 'unit' | 'low' | 'high' | 'remark';

/** A column in which readings stand, and what its title says of them. */
export interface FigureColumn {
  readonly index: number;
  readonly title: string;
  readonly what: What | null;
  readonly key: string | null;
  readonly tap: Words['tap'];
  readonly unit: Words['unit'];
  readonly conditions: Conditions;
}

export interface Columns {
  readonly roles: Readonly<Partial<Record<Role, number>>>;
  /** Columns such as `capacitor (pF)`: the unit that their figures want. */
  readonly conditions: readonly { readonly index: number; readonly unit: string }[];
  readonly figures: readonly FigureColumn[];
  /** Title of each. */
  readonly titles: readonly string[];
  readonly notes: readonly FileNote[];
}

/** The bench page's own titles first, then what people write. */
const ROLES: Readonly<Record<Role, readonly string[]>> = {
  record: ['record', 'hash', 'record hash'],
  serial: ['serial', 'serial number', 'serial no', 'coil', 'coil serial', 'sn', 's/n'],
  tap: ['tap', 'position', 'contact', 'switch position'],
  quantity: ['quantity', 'what', 'measurement'],
  condition: ['condition', 'conditions', 'with', 'at', 'measured with', 'measured at'],
  unit: ['unit', 'units'],
  low: ['low', 'lower limit'],
  high: ['high', 'upper limit'],
  remark: ['remark', 'remarks', 'note', 'notes', 'comment', 'comments'],
};
const VALUE = ['value', 'reading', 'measured', 'measured value', 'figure'];
const CONDITION = ['capacitor', 'known capacitor', 'capacitance', 'temperature', 'meter', 'meter frequency'];
/** What lots and the bench page write for people; nothing here is asked of it. */
const PASSED = [
  'verdict',
  'nominal',
  'limits',
  'kind',
  'job',
  'lot',
  'date',
  'result',
  'checked',
  'checked by',
  'signature',
];

/** Columns of the header. A title that is not understood is told in a note, and its column passed over. */
export function columnsOf(header: readonly string[], line: number, cellsIn: (index: number) => number): Columns {
  const roles: Partial<Record<Role, number>> = {};
  const conditions: { index: number; unit: string }[] = [];
  const figures: FigureColumn[] = [];
  const notes: FileNote[] = [];
  const titles = header.map((title) => title.trim());
  const passed = (index: number, code: string, expected: string, todo: string) => {
    const cells = cellsIn(index);
    if (titles[index] === '' && cells === 0) return;
    const got = `${titles[index] === '' ? 'a column without a title' : quote(titles[index]!)}, ${cells} cells filled in`;
    notes.push({ line, column: titles[index]!, code, fate: 'kept', figures: 0, got, expected, todo });
  };
  titles.forEach((title, index) => {
    const { name, unit } = nameOf(title);
    const role = (Object.keys(ROLES) as Role[]).find((one) => ROLES[one].includes(name));
    if (role !== undefined) {
      if (roles[role] === undefined) roles[role] = index;
      else passed(index, 'column-twice', `one column for ${role}`, 'the first one counts; rename or remove the other');
      return;
    }
    if (PASSED.includes(name)) return;
    if (CONDITION.includes(name) && unit !== null) {
      conditions.push({ index, unit });
      return;
    }
    const words = wordsOf(title);
    const value = VALUE.includes(name) || (VALUE.includes(words.rest) && words.what === null);
    const what = value ? null : (words.what ?? (words.unit === null ? null : whatOf(words.unit)));
    if (!value && (what === null || words.rest !== '')) {
      passed(
        index,
        'column-unknown',
        'serial, tap, quantity, value, or a quantity with its unit',
        'it was passed over; rename it if readings stand in it, such as "tap 3 (uH)"',
      );
      return;
    }
    figures.push({
      index,
      title,
      what,
      key: words.key,
      tap: words.tap,
      unit: words.unit,
      conditions: words.conditions,
    });
  });
  return { roles, conditions, figures, titles, notes };
}

/** A title without its unit, in small letters. */
function nameOf(title: string): { name: string; unit: string | null } {
  const bracket = /[([]([^)\]]*)[)\]]\s*$/.exec(title);
  const inside = bracket === null ? null : unitOf(bracket[1]!);
  const plain = inside === null ? title : title.slice(0, bracket!.index);
  const name = conditionsIn(plain)
    .rest.toLowerCase()
    .replace(/[.:#]+$/, '')
    .trim();
  // `conditionsIn` takes `with` and `at` out, which are titles of their own here.
  return { name: name === '' ? plain.trim().toLowerCase() : name, unit: inside?.name ?? null };
}
