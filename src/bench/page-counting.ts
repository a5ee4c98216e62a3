/** Counting: by key, click or touch, held at every stop until what is to be done there is done. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { lengthText, unitsOf, wireText } from '../quantity/written.ts';
import type { Stop } from './api.ts';
import { plannedMm } from './correction.ts';
import { confirmStop, countTurn, heldBy, NOTHING, nextStop, takeBack, turnOf, turnsToGo } from './counter.ts';
import { type Figure, type ShownStop, showCount, showFigures } from './page-counter.ts';
import { byId, setText } from './page-dom.ts';
import { keysPart } from './page-input.ts';
import { debounced } from './page-keys.ts';
import { laidWire } from './page-laid.ts';
import { positive } from './page-number.ts';
import { pictureOf } from './page-picture.ts';
import type { App } from './page-session.ts';
import { sounds } from './page-sound.ts';
import { markOf, nameOf, turnsText } from './page-words.ts';
import { spoolAt } from './spool.ts';

/** After a stop opens nothing confirms it for so long: what was meant to count must not. */
const GUARD_MS = 500;

export interface CounterPart {
  readonly show: () => void;
}

export function counterPart(app: App, changed: () => void): CounterPart {
  const { record } = app;
  const winding = record.windings[0]!;
  const units = unitsOf(record);
  const picture = pictureOf(record);
  const noises = sounds(() => app.settings().muted);
  const mayCount = debounced();
  let heldSince = Number.NEGATIVE_INFINITY;
  const count = () => app.session().progress.count;

  const placeOf = (stop: Stop): string => {
    const height = lengthText(stop.positionMm, units, { digits: 1 });
    const angle = stop.angleDeg.toFixed(0);
    const on = stop.onDeg < 0.5 ? '' : `${BENCH.stop.onFrom(String(stop.whole), stop.onDeg.toFixed(0))} `;
    return `${on}${BENCH.stop.place(turnsText(stop.turn), angle, height)}`;
  };
  const shownStop = (stop: Stop): ShownStop => {
    const name = nameOf(stop);
    const made = stop.kind === 'tap' || stop.kind === 'unit';
    const { tap, check, finish } = BENCH.stop.goOn;
    return {
      name,
      place: placeOf(stop),
      text: stop.text === '' ? BENCH.stop.moved : stop.text,
      how: made ? record.tapMethod.how : [],
      goOn: made ? tap(name) : stop.kind === 'check' ? check : finish,
    };
  };

  const figures = (): Figure[] => {
    const words = BENCH.figures;
    const stops = app.stops();
    const { usedM, neededM, leftM, lackM } = spoolAt(record, stops, count(), positive(app.session().spool));
    const left = leftM === null ? words.unknown : leftM <= 0 ? words.out : wireText(leftM, units);
    const lacking = lackM !== null && lackM > 0;
    const turn = turnOf(stops, count());
    const long = turn === 0 ? 0 : plannedMm(record, turn, 'extent');
    return [
      { name: words.used, value: wireText(usedM, units) },
      { name: words.needed, value: wireText(neededM, units) },
      { name: words.left, value: lacking ? `${left}: ${words.short(wireText(lackM, units))}` : left, lacking },
      { name: words.long, value: lengthText(long, units, { digits: 1 }) },
    ];
  };

  const show = () => {
    const stops = app.stops();
    const next = nextStop(stops, count());
    const held = heldBy(stops, count());
    const { key } = app.settings();
    const keys = key === null ? BENCH.count.space : BENCH.count.spaceAnd(key.name);
    const turn = turnOf(stops, count());
    const turns = stops.at(-1)?.turn ?? winding.turns;
    const { log, whole, done } = count();
    showCount({
      turn: next === null ? turnsText(turn) : String(whole),
      label: `${BENCH.count.turn} ${BENCH.count.of(turnsText(turns))}`,
      nextLabel: next === null ? '' : BENCH.count.next(nameOf(next)),
      left: next === null ? BENCH.count.finished : BENCH.count.left(turnsText(turnsToGo(stops, count()))),
      hint: next === null ? BENCH.count.done : BENCH.count.hint(keys),
      stop: held === null ? null : shownStop(held),
      finished: next === null,
      undo: log === '' ? null : log.endsWith('t') ? BENCH.count.undoTurn : BENCH.count.undoStop,
    });
    picture.show(turn, next?.turn ?? null);
    const marks = stops.map((stop) => ({ turn: stop.turn, name: markOf(stop) }));
    const ahead = next === null ? null : (marks[done] ?? null);
    const laid = byId('laid');
    laid.replaceChildren(laidWire(turn, turns, marks, ahead, laid.clientWidth || 320, turnsText));
    showFigures(figures());
    changed();
  };

  const say = (text: string) => {
    setText(byId('called'), '');
    setText(byId('said'), text);
  };

  const spoken = () => {
    const stops = app.stops();
    const next = nextStop(stops, count());
    if (next === null) return BENCH.count.done;
    return BENCH.count.spoken(turnsText(turnOf(stops, count())), turnsText(turnsToGo(stops, count())), nameOf(next));
  };

  const press = () => {
    const stops = app.stops();
    const after = countTurn(stops, count());
    if (after === count()) {
      if (heldBy(stops, after) !== null) say(BENCH.count.held);
      return;
    }
    app.count(after);
    const held = heldBy(stops, after);
    if (held === null) {
      say(spoken());
      noises.turn();
    } else {
      heldSince = performance.now();
      setText(byId('said'), '');
      setText(byId('called'), BENCH.stop.called(nameOf(held), placeOf(held)));
      if (held.kind === 'finish') noises.end();
      else noises.stop();
    }
    show();
  };

  const confirm = () => {
    if (performance.now() - heldSince < GUARD_MS) return;
    const after = confirmStop(app.stops(), count());
    if (after === count()) return;
    // Two stops in one turn follow one another at once.
    heldSince = performance.now();
    app.count(after);
    say(spoken());
    show();
    if (nextStop(app.stops(), after) === null) byId<HTMLDetailsElement>('after').open = true;
  };

  byId('picture').append(picture.element);
  setText(byId('picture-words'), BENCH.picture.words);
  byId('count').addEventListener('click', () => {
    if (mayCount(performance.now())) press();
  });
  byId('go-on').addEventListener('click', confirm);

  const undo = byId('undo');
  undo.addEventListener('click', (event) => {
    app.count(takeBack(count()));
    show();
    say(BENCH.count.undone(turnsText(turnOf(app.stops(), count()))));
    // After a click or touch the space bar shall count again, not take back once more.
    if (event.detail > 0) byId(heldBy(app.stops(), count()) === null ? 'count' : 'stop').focus({ preventScroll: true });
  });

  // A count is cleared by two presses, so that a slip does not.
  const again = byId('again');
  let sure = false;
  const ask = (on: boolean) => {
    sure = on;
    setText(again, on ? BENCH.count.againSure : BENCH.count.again);
  };
  ask(false);
  again.addEventListener('click', () => {
    if (!sure) {
      ask(true);
      return;
    }
    ask(false);
    app.count(NOTHING);
    show();
    say(BENCH.count.undone('0'));
  });
  again.addEventListener('blur', () => ask(false));

  keysPart(app, press, confirm, mayCount);
  window.addEventListener('resize', show);
  return { show };
}
