/** The switch for sound, and what the spool held at the start. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, setText } from './page-dom.ts';
import { positive } from './page-number.ts';
import type { App } from './page-session.ts';

export function soundPart(app: App): void {
  const button = byId('sound');
  const show = () => setText(button, app.settings().muted ? BENCH.sound.off : BENCH.sound.on);
  button.addEventListener('click', () => {
    app.set({ muted: !app.settings().muted });
    show();
  });
  show();
}

export function spoolPart(app: App, show: () => void): void {
  const spool = byId<HTMLInputElement>('spool');
  spool.value = app.session().spool;
  spool.addEventListener('input', () => {
    app.keep({ spool: spool.value });
    const text = spool.value.trim();
    const good = text === '' || positive(text) !== null;
    setText(byId('spool-fault'), good ? '' : BENCH.setup.spoolFault(text));
    if (good) spool.removeAttribute('aria-invalid');
    else spool.setAttribute('aria-invalid', 'true');
    show();
  });
}
