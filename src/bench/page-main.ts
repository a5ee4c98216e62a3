/** The browser's side of the bench page: holds what is counted and read, and shows it. Started by being loaded. */
import { BENCH } from '../../templates/wording/bench-page.ts';
import type { CoilRecord } from '../record/schema.ts';
import { stopsOf } from './counter.ts';
import { correctionPart } from './page-correcting.ts';
import { showTicks } from './page-counter.ts';
import { type CounterPart, counterPart } from './page-counting.ts';
import { byId, el, setText } from './page-dom.ts';
import { lookSwitch } from './page-look.ts';
import { readingsPart } from './page-reading.ts';
import { type App, EMPTY, SETTINGS, type Session, sessionFrom, sessionTo, settingsFrom } from './page-session.ts';
import { soundPart, spoolPart } from './page-setup.ts';
import { openStore } from './page-store.ts';

const record = JSON.parse(byId('record').textContent ?? '') as CoilRecord;

const store = openStore(() => notice(BENCH.kept.memory));
const name = record.hash;
const kept = store.read(name);
let session: Session = sessionFrom(kept, record) ?? EMPTY;
let settings = settingsFrom(store.read(SETTINGS));

function notice(text: string): void {
  const place = byId('kept');
  setText(place, text);
  place.hidden = false;
}
if (!store.lasting) notice(BENCH.kept.memory);
else if (kept !== null && session === EMPTY) notice(BENCH.kept.spoilt);
// Two open pages of one coil would write over one another's count.
window.addEventListener('storage', (event) => {
  if (event.key?.endsWith(name)) notice(BENCH.kept.elsewhere);
});

const keep = (change: Partial<Session>) => {
  session = { ...session, ...change };
  store.write(name, sessionTo(session, record));
};
const set = (change: Partial<typeof settings>) => {
  settings = { ...settings, ...change };
  store.write(SETTINGS, settings);
};

lookSwitch(settings.look, (look) => set({ look }));
const app: App = {
  record,
  session: () => session,
  keep,
  settings: () => settings,
  set,
  stops: () => stopsOf(record, session.progress.places),
  count: (count) => keep({ progress: { ...session.progress, count } }),
};
const correcting = correctionPart(app, () => counter.show());
const counter: CounterPart = counterPart(app, () => correcting.show());
soundPart(app);
spoolPart(app, counter.show);
readingsPart(app);

const steps = (...kinds: readonly string[]) => record.steps.filter(({ kind }) => kinds.includes(kind));
const tick = (step: number, on: boolean) =>
  keep({ ticks: on ? [...session.ticks, step] : session.ticks.filter((one) => one !== step) });
const ticked = (step: number) => session.ticks.includes(step);
showTicks('before-list', steps('prepare', 'start'), ticked, tick);
showTicks('after-list', steps('after'), ticked, tick);
byId<HTMLDetailsElement>('before').open = session.progress.count.log === '';
byId('cautions').replaceChildren(...record.cautions.map((text) => el('li', {}, text)));
counter.show();
