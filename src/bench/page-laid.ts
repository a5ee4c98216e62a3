/** The whole wire laid straight: thick where it is wound, a stroke at every stop, the next one thick. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { svgEl } from './page-dom.ts';

export interface Mark {
  readonly name: string;
  readonly turn: number;
}

const EDGE = 14;
const LINE = 14;
/** Least from one name to the next. */
const APART = 30;

/** `widePx` is the room it gets, so that its type has the size of the page's; `short` tells a count of turns. */
export function laidWire(
  turn: number,
  turns: number,
  marks: readonly Mark[],
  next: Mark | null,
  widePx: number,
  short: (turns: number) => string,
): SVGElement {
  const x = (u: number) => EDGE + ((widePx - 2 * EDGE) * Math.min(u, turns)) / turns;
  const shapes: SVGElement[] = [
    svgEl('line', { class: 'wire', x1: x(0), x2: x(turns), y1: LINE, y2: LINE }),
    svgEl('line', { class: 'done', x1: x(0), x2: x(turn), y1: LINE, y2: LINE }),
  ];
  for (const { turn: at } of marks) {
    const className = at === next?.turn ? 'mark next' : 'mark';
    shapes.push(svgEl('line', { class: className, x1: x(at), x2: x(at), y1: 2, y2: 26 }));
  }
  // The next stop is named first; others where there is room beside it.
  const named: Mark[] = [];
  const order = [...(next === null ? [] : [next]), ...[...marks].reverse()];
  for (const mark of order)
    if (named.every((other) => Math.abs(x(other.turn) - x(mark.turn)) >= APART)) named.push(mark);
  for (const mark of named) {
    const className = mark === next ? 'next' : undefined;
    shapes.push(svgEl('text', { class: className, x: x(mark.turn), y: 41 }, mark.name));
  }
  const title = BENCH.laid.title(short(turn), short(turns));
  return svgEl('svg', { class: 'laid', viewBox: `0 0 ${widePx} 44`, role: 'img', 'aria-label': title }, ...shapes);
}
