/** Counting: by key, click or touch, held at every stop until what is to be done there is done. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { Coil } from '../coil/coil.ts';
import { short } from '../sheets/text.ts';
import { lengthText, unitsOf, wireText } from '../sheets/units.ts';
import { type Figure, type ShownStop, showCount, showFigures } from './page-counter.ts';
import { byId, setText } from './page-dom.ts';
import { counts, debounced, isControl, isTaken, isWriting, keyOf } from './page-keys.ts';
import { laidWire } from './page-laid.ts';
import {
  confirmStop,
  countTurn,
  heldBy,
  NOTHING,
  nextStop,
  type Stop,
  stopsOf,
  takeBack,
  turnOf,
} from './page-model.ts';
import { pictureOf } from './page-picture.ts';
import type { App } from './page-session.ts';
import { sounds } from './page-sound.ts';

/** After a stop opens nothing confirms it for so long: what was meant to count must not. */
const GUARD_MS = 500;

const turnsText = (turns: number) => short(turns, 2);

export interface CounterPart {
  readonly show: () => void;
}

export function counterPart(app: App): CounterPart {
  const { record } = app;
  const winding = record.windings[0]!;
  const units = unitsOf(record);
  const stops = stopsOf(record);
  const picture = pictureOf(record);
  const noises = sounds(() => app.settings().muted);
  const mayCount = debounced();
  let heldSince = Number.NEGATIVE_INFINITY;

  const nameOf = (stop: Stop): string => {
    if (stop.kind === 'tap') return BENCH.stop.tap(stop.number!);
    if (stop.kind === 'unit') return BENCH.stop.unit(stop.number!);
    return BENCH.stop[stop.kind];
  };
  const placeOf = (stop: Stop): string => {
    const whole = Math.floor(stop.turn + 1e-6);
    const angle = stop.angleDeg.toFixed(0);
    const height = lengthText(stop.positionMm, units, { digits: 1 });
    const place = BENCH.stop.place(turnsText(stop.turn), angle, height);
    if (stop.turn - whole < 1e-6) return place;
    return `${BENCH.stop.onFrom(String(whole), turnsText(stop.turn - whole), angle)} ${place}`;
  };
  const shownStop = (stop: Stop): ShownStop => {
    const name = nameOf(stop);
    const made = stop.kind === 'tap' || stop.kind === 'unit';
    const { tap, check, finish } = BENCH.stop.goOn;
    return {
      name,
      place: placeOf(stop),
      text: stop.text,
      how: made ? record.tapMethod.how : [],
      goOn: made ? tap(name) : stop.kind === 'check' ? check : finish,
    };
  };

  const coil = coilOf(app);
  const loops = (turn: number) =>
    stops.filter((stop) => (stop.kind === 'tap' || stop.kind === 'unit') && stop.turn < turn).length;
  const figures = (): Figure[] => {
    const words = BENCH.figures;
    const count = app.session().count;
    const turn = turnOf(stops, count);
    const used = turn === 0 ? 0 : coil.wireM(turn) + loops(turn) * record.tapMethod.loopM;
    const spool = Number(app.session().spool.replace(',', '.'));
    const known = app.session().spool.trim() !== '' && Number.isFinite(spool) && spool > 0;
    const left = spool - used - winding.leadsM / 2;
    const need = Math.max(0, winding.wireLengthM - used) + winding.leadsM / 2;
    const lack = known && left < need;
    return [
      { name: words.used, value: wireText(used, units) },
      { name: words.needed, value: wireText(need, units) },
      {
        name: words.left,
        value: !known
          ? words.unknown
          : lack
            ? `${wireText(left, units)}: ${words.short(wireText(need - left, units))}`
            : wireText(left, units),
        lacking: lack,
      },
      {
        name: words.height,
        value: turn === 0 ? lengthText(0, units, { digits: 1 }) : lengthText(coil.woundMm(turn), units, { digits: 1 }),
      },
    ];
  };

  const show = () => {
    const { count } = app.session();
    const next = nextStop(stops, count);
    const held = heldBy(stops, count);
    const { key } = app.settings();
    const keys = key === null ? BENCH.count.space : BENCH.count.spaceAnd(key.name);
    const left = next === null ? 0 : Math.floor(next.turn + 1e-6) - count.whole;
    showCount({
      turn: next === null ? turnsText(winding.turns) : String(count.whole),
      label: `${BENCH.count.turn} ${BENCH.count.of(turnsText(winding.turns))}`,
      nextLabel: next === null ? '' : BENCH.count.next(nameOf(next)),
      left: next === null ? BENCH.count.finished : BENCH.count.left(String(left)),
      hint: next === null ? BENCH.count.done : BENCH.count.hint(keys),
      stop: held === null ? null : shownStop(held),
      finished: next === null,
      undo: count.log === '' ? null : count.log.endsWith('t') ? BENCH.count.undoTurn : BENCH.count.undoStop,
    });
    const turn = turnOf(stops, count);
    picture.show(turn, next?.turn ?? null);
    const marks = stops.map((stop) => ({ turn: stop.turn, name: shortName(stop) }));
    const laid = byId('laid');
    const ahead = next === null ? null : (marks[count.done] ?? null);
    laid.replaceChildren(laidWire(turn, winding.turns, marks, ahead, laid.clientWidth || 320, turnsText));
    showFigures(figures());
  };

  const say = (text: string) => {
    setText(byId('called'), '');
    setText(byId('said'), text);
  };

  const press = () => {
    const { count } = app.session();
    const after = countTurn(stops, count);
    if (after === count) {
      if (heldBy(stops, count) !== null) say(BENCH.count.held);
      return;
    }
    app.keep({ count: after });
    const held = heldBy(stops, after);
    if (held === null) {
      const next = nextStop(stops, after)!;
      const left = Math.floor(next.turn + 1e-6) - after.whole;
      say(BENCH.count.spoken(String(after.whole), String(left), nameOf(next)));
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
    const { count } = app.session();
    const after = confirmStop(stops, count);
    if (after === count) return;
    heldSince = performance.now();
    app.keep({ count: after });
    const next = nextStop(stops, after);
    say(
      next === null
        ? BENCH.count.done
        : BENCH.count.spoken(
            turnsText(turnOf(stops, after)),
            String(Math.max(0, Math.floor(next.turn + 1e-6) - after.whole)),
            nameOf(next),
          ),
    );
    show();
    if (next === null) byId<HTMLDetailsElement>('after').open = true;
  };

  byId('picture').append(picture.element);
  setText(byId('picture-words'), BENCH.picture.words);
  byId('count').addEventListener('click', () => {
    if (mayCount(performance.now())) press();
  });
  byId('go-on').addEventListener('click', confirm);

  const undo = byId('undo');
  undo.addEventListener('click', (event) => {
    app.keep({ count: takeBack(app.session().count) });
    show();
    say(BENCH.count.undone(turnsText(turnOf(stops, app.session().count))));
    // After a click or touch the space bar shall count again, not take back once more.
    if (event.detail > 0)
      byId(heldBy(stops, app.session().count) === null ? 'count' : 'stop').focus({ preventScroll: true });
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
    app.keep({ count: NOTHING });
    show();
    say(BENCH.count.undone('0'));
  });
  again.addEventListener('blur', () => ask(false));

  keysPart(app, press, confirm, mayCount);
  soundPart(app);
  setupPart(app, show);
  window.addEventListener('resize', show);
  return { show };
}

const shortName = (stop: Stop) =>
  stop.kind === 'tap'
    ? String(stop.number)
    : stop.kind === 'unit'
      ? `u${stop.number}`
      : stop.kind === 'finish'
        ? 'F'
        : '✓';

/** The record's coil, turns where the record states them. */
function coilOf({ record }: App): Coil {
  const { wire, meanDiameterMm, corners, bendMm, pitchMm, turns, startMm, turnPositionsMm } = record.windings[0]!;
  return new Coil({ wire, meanDiameterMm, corners, bendMm, pitchMm, turns, gaps: [], startMm }, turnPositionsMm);
}

function keysPart(app: App, press: () => void, confirm: () => void, mayCount: (now: number) => boolean): void {
  let learning = false;
  const learn = byId('learn');
  const forget = byId<HTMLButtonElement>('forget');
  const words = BENCH.setup;
  const show = (said?: string) => {
    const { key } = app.settings();
    setText(learn, learning ? words.learning : words.learn);
    forget.hidden = key === null;
    setText(byId('key-words'), said ?? (key === null ? words.noKey : words.key(key.name)));
  };
  learn.addEventListener('click', () => {
    learning = true;
    show();
  });
  learn.addEventListener('blur', () => {
    learning = false;
    show();
  });
  forget.addEventListener('click', () => {
    app.set({ key: null });
    learn.focus();
    show();
  });
  show();

  // Before anything on the page acts on a key: a foot switch counts wherever the focus is.
  window.addEventListener(
    'keydown',
    (event) => {
      const { target } = event;
      if (learning && event.key !== 'Tab') {
        event.preventDefault();
        event.stopPropagation();
        if (event.repeat) return;
        learning = false;
        if (event.key === 'Escape') return show();
        const key = keyOf(event);
        if (isTaken(event)) return show(words.notThis(key.name.trim() || words.spaceName));
        app.set({ key });
        return show();
      }
      if (isWriting(target)) return;
      const onCount = target === byId('count') || target === byId('go-on');
      if (counts(event, app.settings().key)) {
        // The space bar works a button that has the focus; a learned key counts wherever nothing is being written.
        if (event.code === 'Space' && isControl(target) && !onCount) return;
        event.preventDefault();
        if (!event.repeat && mayCount(performance.now())) press();
      } else if (event.key === 'Enter' && (onCount || !isControl(target))) {
        event.preventDefault();
        if (!event.repeat) confirm();
      }
    },
    true,
  );
  // A button acts on the space bar when it comes up.
  window.addEventListener(
    'keyup',
    (event) => {
      const { target } = event;
      if (event.code === 'Space' && (target === byId('count') || target === byId('go-on'))) event.preventDefault();
    },
    true,
  );
}

function soundPart(app: App): void {
  const button = byId('sound');
  const show = () => setText(button, app.settings().muted ? BENCH.sound.off : BENCH.sound.on);
  button.addEventListener('click', () => {
    app.set({ muted: !app.settings().muted });
    show();
  });
  show();
}

function setupPart(app: App, show: () => void): void {
  const spool = byId<HTMLInputElement>('spool');
  spool.value = app.session().spool;
  spool.addEventListener('input', () => {
    app.keep({ spool: spool.value });
    const text = spool.value.trim();
    const good = text === '' || Number(text.replace(',', '.')) > 0;
    setText(byId('spool-fault'), good ? '' : BENCH.setup.spoolFault(text));
    if (good) spool.removeAttribute('aria-invalid');
    else spool.setAttribute('aria-invalid', 'true');
    show();
  });
}
