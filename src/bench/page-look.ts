/** Dark or light: as the system wants it until a person chooses. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import { byId, setText } from './page-dom.ts';

export type Look = 'light' | 'dark';

const dark = () => window.matchMedia('(prefers-color-scheme: dark)');

/** The switch names what it switches to. `kept` is an earlier choice; `chosen` is told of each new one. */
export function lookSwitch(kept: Look | null, chosen: (look: Look) => void): void {
  const button = byId('look');
  let choice = kept;
  const shown = (): Look => choice ?? (dark().matches ? 'dark' : 'light');
  const show = () => {
    if (choice !== null) document.documentElement.dataset.look = choice;
    setText(button, shown() === 'dark' ? BENCH.look.light : BENCH.look.dark);
  };
  button.addEventListener('click', () => {
    choice = shown() === 'dark' ? 'light' : 'dark';
    show();
    chosen(choice);
  });
  dark().addEventListener('change', show);
  show();
}
