/** What the page keeps of one coil, and what it keeps for all of them. */
import type { CoilRecord } from '../record/schema.ts';
import type { CountingKey } from './page-keys.ts';
import type { Look } from './page-look.ts';
import { type Count, NOTHING, replay, stopsOf } from './page-model.ts';

export interface Session {
  readonly count: Count;
  /** As entered: wire on the spool at the start, and readings by their name. */
  readonly spool: string;
  readonly readings: Readonly<Record<string, string>>;
  /** Numbers of steps that are ticked. */
  readonly ticks: readonly number[];
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
  readonly settings: () => Settings;
  readonly set: (change: Partial<Settings>) => void;
}

export const SETTINGS = 'settings';
export const EMPTY: Session = { count: NOTHING, spool: '', readings: {}, ticks: [], woundBy: '', coilNo: '' };

type Loose = Readonly<Record<string, unknown>>;
const loose = (value: unknown): Loose | null => (typeof value === 'object' && value !== null ? (value as Loose) : null);
const textOf = (value: unknown) => (typeof value === 'string' ? value : '');

/** The count, played anew from its log: whatever was kept, the result is one that this coil can have. */
function countFrom(value: unknown, record: CoilRecord): Count | null {
  const log = loose(value)?.log;
  if (typeof log !== 'string') return null;
  return replay(stopsOf(record), log);
}

/** What was kept, where it fits this coil; null where it does not. */
export function fitting(value: unknown, record: CoilRecord): Session | null {
  const kept = loose(value);
  const count = kept === null ? null : countFrom(kept.count, record);
  if (kept === null || count === null) return null;
  const readings = Object.entries(loose(kept.readings) ?? {}).filter(([, text]) => typeof text === 'string');
  const ticks = Array.isArray(kept.ticks) ? kept.ticks.filter((one) => typeof one === 'number') : [];
  return {
    count,
    spool: textOf(kept.spool),
    readings: Object.fromEntries(readings) as Record<string, string>,
    ticks: ticks as number[],
    woundBy: textOf(kept.woundBy),
    coilNo: textOf(kept.coilNo),
  };
}

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
