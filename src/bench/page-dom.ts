/** Elements of the bench page. Text only ever goes in as text, so nothing in a record can become markup. */

type Attributes = Readonly<Record<string, string | number | boolean | undefined>>;
type Child = Node | string | null;

const SVG = 'http://www.w3.org/2000/svg';

function filled<E extends Element>(element: E, attributes: Attributes, children: readonly Child[]): E {
  for (const [name, value] of Object.entries(attributes)) {
    if (value === undefined || value === false) continue;
    element.setAttribute(name, value === true ? '' : String(value));
  }
  element.append(...children.filter((child) => child !== null));
  return element;
}

/** An element with attributes (left out when `undefined` or false) and children. */
export function el<K extends keyof HTMLElementTagNameMap>(
  name: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): HTMLElementTagNameMap[K] {
  return filled(document.createElement(name), attributes, children);
}

/** The same for parts of a drawing. */
export function svgEl<K extends keyof SVGElementTagNameMap>(
  name: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): SVGElementTagNameMap[K] {
  return filled(document.createElementNS(SVG, name), attributes, children);
}

/** An element of the page's skeleton. Throws when the skeleton lacks it: our mistake, not a user's. */
export function byId<E extends HTMLElement = HTMLElement>(id: string): E {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`the page has no #${id}`);
  return found as E;
}

/** Sets a text only when it differs: live regions speak on every change of their nodes. */
export function setText(element: Element, text: string): void {
  if (element.textContent !== text) element.textContent = text;
}

/** A cell of a table. Its role is stated, because a table that is laid out as cards loses it in some browsers. */
export function cell(label: string, className: string | undefined, ...children: readonly Child[]): HTMLElement {
  return el('td', { role: 'cell', 'data-label': label, class: className }, ...children);
}

export interface TableRow {
  /** Heads the row. */
  readonly name: string;
  readonly cells: readonly HTMLElement[];
}

/** A column: its head, and `words` for text, which stands left, or `wide` for text that takes what room there is. */
export interface Column {
  readonly head: string;
  readonly kind?: 'words' | 'wide';
}

/** A table with a caption, a head a column, and rows that are headed by their first cell; cards on a narrow screen. */
export function table(caption: string, columns: readonly Column[], rows: readonly TableRow[]): HTMLElement {
  const head = ({ head, kind }: Column) => el('th', { scope: 'col', role: 'columnheader', class: kind }, head);
  return el(
    'table',
    { class: 'cards', role: 'table' },
    el('caption', {}, caption),
    el('thead', { role: 'rowgroup' }, el('tr', { role: 'row' }, ...columns.map(head))),
    el(
      'tbody',
      { role: 'rowgroup' },
      ...rows.map(({ name, cells }) =>
        el('tr', { role: 'row' }, el('th', { scope: 'row', role: 'rowheader' }, name), ...cells),
      ),
    ),
  );
}
