/** Keys of the page: what counts, what confirms, and learning the key of a foot switch. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, setText } from './page-dom.ts';
import { counts, isControl, isTaken, isWriting, keyOf } from './page-keys.ts';
import type { App } from './page-session.ts';

export function keysPart(app: App, press: () => void, confirm: () => void, mayCount: (now: number) => boolean): void {
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
