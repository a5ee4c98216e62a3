/** What the page keeps of one coil, and what it keeps for all of them. */
import type { CoilRecord } from '../record/schema.ts';
import type { Count, Progress, Stop } from './api.ts';
import { NEW, parse, serialise } from './counter.ts';
import type { CountingKey } from './page-keys.ts';
import type { Look } from './page-look.ts';

export interface Session {
  readonly progress: Progress;
  /** As entered: wire on the spool at the start, and readings by their name. */
  readonly spool: string;
  readonly readings: Readonly<Record<string, string>>;
  /** Numbers of steps that are ticked. */
  readonly ticks: readonly number[];
  /** Temperature of the coil when it was measured, as entered. */
  readonly celsius: string;
  readonly woundBy: string;
  readonly coilNo: string;
}

export interface Settings {
  readonly look: Look | null;
  readonly muted: boolean;
  readonly key: CountingKey | null;
}

/** What every part of the page works on. */
export interface App {
  readonly record: CoilRecord;
  readonly session: () => Session;
  readonly keep: (change: Partial<Session>) => void;
  /** The stops as they are now, with a correction in use. */
  readonly stops: () => readonly Stop[];
  readonly count: (count: Count) => void;
  readonly settings: () => Settings;
  readonly set: (change: Partial<Settings>) => void;
}

export const SETTINGS = 'settings';
export const EMPTY: Session = {
  progress: NEW,
  spool: '',
  readings: {},
  ticks: [],
  celsius: '',
  woundBy: '',
  coilNo: '',
};

type Loose = Readonly<Record<string, unknown>>;
const loose = (value: unknown): Loose | null => (typeof value === 'object' && value !== null ? (value as Loose) : null);
const textOf = (value: unknown) => (typeof value === 'string' ? value : '');

/** What was kept, where it fits this coil; null where it does not. */
export function sessionFrom(value: unknown, record: CoilRecord): Session | null {
  const kept = loose(value);
  const parsed = parse(record, textOf(kept?.progress));
  if (kept === null || !parsed.ok) return null;
  const readings = Object.entries(loose(kept.readings) ?? {}).filter(([, text]) => typeof text === 'string');
  const ticks = Array.isArray(kept.ticks) ? kept.ticks.filter((one) => typeof one === 'number') : [];
  return {
    progress: parsed.progress,
    spool: textOf(kept.spool),
    readings: Object.fromEntries(readings) as Record<string, string>,
    ticks: ticks as number[],
    celsius: textOf(kept.celsius),
    woundBy: textOf(kept.woundBy),
    coilNo: textOf(kept.coilNo),
  };
}

/** As it is kept: the counter's own text, and the rest as it is. */
export const sessionTo = (session: Session, record: CoilRecord): unknown => ({
  ...session,
  progress: serialise(record, session.progress),
});

export function settingsFrom(value: unknown): Settings {
  const kept = loose(value);
  const look = kept?.look;
  const key = loose(kept?.key);
  return {
    look: look === 'dark' || look === 'light' ? look : null,
    muted: kept?.muted === true,
    key: key && typeof key.code === 'string' ? { code: key.code, name: textOf(key.name) || key.code } : null,
  };
}
