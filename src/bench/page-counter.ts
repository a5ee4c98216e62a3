/** Shows the count, the stop that holds it, and what wire is used: plain text in, elements out, no arithmetic. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, el, setText } from './page-dom.ts';

export interface ShownStop {
  readonly name: string;
  readonly place: string;
  /** The step in the words of the winding sheet. */
  readonly text: string;
  readonly how: readonly string[];
  readonly goOn: string;
}

export interface ShownCount {
  /** Whole turns wound; what the big figure is. */
  readonly turn: string;
  readonly label: string;
  /** Over the turns that are left to the next stop. */
  readonly nextLabel: string;
  readonly left: string;
  readonly hint: string;
  /** Holds the count until it is confirmed. */
  readonly stop: ShownStop | null;
  readonly finished: boolean;
  readonly undo: string | null;
}

export function showCount(shown: ShownCount): void {
  const count = byId<HTMLButtonElement>('count');
  setText(byId('number'), shown.turn);
  setText(byId('turn-label'), shown.label);
  setText(byId('next-label'), shown.nextLabel);
  setText(byId('togo'), shown.left);
  setText(byId('hint'), shown.hint);
  count.hidden = shown.stop !== null;
  count.disabled = shown.finished;
  const undo = byId<HTMLButtonElement>('undo');
  setText(undo, shown.undo === null ? BENCH.count.undo : `${BENCH.count.undo} ${shown.undo}`);
  undo.disabled = shown.undo === null;
  showStop(shown.stop);
}

function showStop(stop: ShownStop | null): void {
  const box = byId('stop');
  const opens = box.hidden && stop !== null;
  const closes = !box.hidden && stop === null;
  // What has the focus must not vanish under it.
  const inside = box.contains(document.activeElement);
  box.hidden = stop === null;
  if (closes && inside) byId('count').focus({ preventScroll: true });
  if (stop === null) return;
  setText(byId('stop-label'), BENCH.stop.label);
  setText(byId('stop-head'), stop.name);
  setText(byId('stop-place'), stop.place);
  const text = byId('stop-text');
  setText(text, stop.text);
  text.hidden = stop.text === '';
  const list = byId('stop-how');
  list.replaceChildren(...stop.how.map((line) => el('li', {}, line)));
  list.hidden = stop.how.length === 0;
  setText(byId('go-on'), stop.goOn);
  if (!opens) return;
  box.focus({ preventScroll: true });
  const { top, bottom } = box.getBoundingClientRect();
  if (top < 0 || bottom > window.innerHeight) box.scrollIntoView({ block: 'nearest' });
}

export interface Figure {
  readonly name: string;
  readonly value: string;
  /** Marks a lack; the value says so in words. */
  readonly lacking?: boolean;
}

export function showFigures(figures: readonly Figure[]): void {
  byId('figures').replaceChildren(
    ...figures.map(({ name, value, lacking = false }) =>
      el('div', { class: lacking ? 'short' : undefined }, el('dt', {}, name), el('dd', {}, value)),
    ),
  );
}

/** Boxes to tick, one a line; `ticked` and `tick` know them by their place in the record's list of steps. */
export function showTicks(
  id: string,
  steps: readonly { readonly step: number; readonly text: string }[],
  ticked: (step: number) => boolean,
  tick: (step: number, on: boolean) => void,
): void {
  byId(id).replaceChildren(
    ...steps.map(({ step, text }) => {
      const box = el('input', { type: 'checkbox', checked: ticked(step) });
      box.addEventListener('change', () => tick(step, box.checked));
      return el('li', {}, el('label', {}, box, el('span', {}, text)));
    }),
  );
}
