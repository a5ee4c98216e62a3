/**
 * The job for the next coil of a kind: as it was given, with what the readings found put into `as-made`. Only what is off for sure, and
 * lies in the coil: the error of a meter is no error of a coil, and a printed groove has its pitch from the printer.
 */
import { stringify } from 'yaml';
import { FIRST_OFF } from '../../templates/wording/first-off.ts';
import { Fault } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { readJob } from '../job/read.ts';
import { tidy } from '../quantity/format.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Systematic, Unknown } from './systematic-schema.ts';

export interface FirstOffChange {
  readonly key: 'as-made.diameter' | 'as-made.pitch';
  /** As written in the job before; empty: it was not there. */
  readonly before: string;
  readonly after: string;
  readonly text: string;
}

export type FirstOff =
  | {
      readonly ok: true;
      /** The job file. */
      readonly yaml: string;
      readonly changes: readonly FirstOffChange[];
      /** What was found and is not put into the job, and why. */
      readonly notes: readonly string[];
    }
  | { readonly ok: false; readonly why: string; readonly notes: readonly string[] };

type Given = Readonly<Record<string, unknown>>;

/** To a thousandth of a millimetre or of a percent, far below what any bench repeats. */
const DIGITS = 3;
const HASH_SHOWN = 12;
const SECTION = 'as-made';

const rounded = (value: number) => tidy(Number(value.toFixed(DIGITS)));
const signed = (value: number) => `${value > 0 ? '+' : ''}${rounded(value)}`;
const sizeOf = ({ estimate, half, unit }: Unknown) => FIRST_OFF.size(signed(estimate), tidy(half, 2), unit);

/** The changes; both keys are written where one is new, so that the section says all of it. */
function changesOf(record: CoilRecord, { unknowns }: Systematic): FirstOffChange[] {
  const old = record.asMade ?? { diameterMm: 0, pitch: 0 };
  const written = (key: string) => (Object.hasOwn(record.given, key) ? String(record.given[key]) : '');
  const changes: FirstOffChange[] = [];
  const add = (key: FirstOffChange['key'], one: Unknown | undefined, after: (found: number) => string) => {
    if (one === undefined || !one.significant) return;
    const before = written(key);
    changes.push({ key, before, after: after(one.estimate), text: FIRST_OFF.change(before, sizeOf(one)) });
  };
  const of = (name: Unknown['name']) => unknowns.find((one) => one.name === name);
  add('as-made.diameter', of('diameter'), (mm) => `${rounded(old.diameterMm + mm)} mm`);
  if (record.windings[0]!.pitchKind !== 'groove')
    add('as-made.pitch', of('pitch'), (percent) => `${rounded(100 * ((1 + old.pitch) * (1 + percent / 100) - 1))} %`);
  return changes;
}

function notesOf(record: CoilRecord, { unknowns, apart }: Systematic): string[] {
  const { notes } = FIRST_OFF;
  const off = (name: Unknown['name']) => unknowns.find((one) => one.name === name && one.significant);
  const list: string[] = [];
  if (off('meter') !== undefined || off('leads') !== undefined) list.push(notes.meter);
  if (off('capacitor') !== undefined) list.push(notes.capacitor);
  if (off('strays') !== undefined) list.push(notes.strays);
  const gaps = off('gaps');
  if (gaps !== undefined) list.push(notes.gaps(sizeOf(gaps)));
  const pitch = off('pitch');
  if (pitch !== undefined && record.windings[0]!.pitchKind === 'groove') {
    const now = record.printer.scale[2] ?? 1;
    list.push(notes.groove(scaleText(now), scaleText(now / (1 + pitch.estimate / 100))));
  }
  for (const { measure } of apart) list.push(notes.apart(measure));
  return list;
}

const scaleText = (scale: number) => `${tidy(100 * scale, 5)} %`;

/** A value as YAML on its own line; lists on one. */
function leafOf(value: unknown): string {
  return stringify(value, {
    collectionStyle: 'flow',
    lineWidth: 0,
    blockQuote: false,
    flowCollectionPadding: false,
  }).trimEnd();
}

const commented = (text: string, indent = '') => `${indent}# ${text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ')}`;

/** The file: keys in the order in which they were given, a section's together; `as-made` last. */
function yamlOf(record: CoilRecord, coils: number, changes: readonly FirstOffChange[]): string {
  const lines = FIRST_OFF.head(record.job, coils, record.hash.slice(0, HASH_SHOWN)).map((line) => commented(line));
  let section = '';
  const put = (key: string, text: string, comment?: string) => {
    const cut = key.indexOf('.');
    const [holder, name] = cut < 0 ? ['', key] : [key.slice(0, cut), key.slice(cut + 1)];
    if (holder !== section && holder !== '') lines.push(`${holder}:`);
    section = holder;
    const indent = holder === '' ? '' : '  ';
    if (comment !== undefined) lines.push(commented(comment, indent));
    lines.push(`${indent}${name}: ${text}`);
  };
  for (const [key, value] of inSections(record.given)) put(key, leafOf(value));
  for (const { key, after, text } of changes) put(key, leafOf(after), text);
  const kept = Object.entries(record.given).filter(
    ([key]) => key.startsWith(`${SECTION}.`) && !changes.some((change) => change.key === key),
  );
  for (const [key, value] of kept) put(key, leafOf(value), FIRST_OFF.asked);
  return `${lines.join('\n')}\n`;
}

/** Leaves with those of a section together, and without `as-made`. */
function inSections(given: Given): [string, unknown][] {
  const of = (key: string) => key.slice(0, Math.max(0, key.indexOf('.'))) || key;
  const sections = [...new Set(Object.keys(given).map(of))].filter((key) => key !== SECTION);
  return sections.flatMap((section) => Object.entries(given).filter(([key]) => of(key) === section));
}

/** The job without what this file changes, and where it was read. */
function restOf({ asMade: _made, source: _source, given, assumed, ...job }: Job): string {
  const plain = (keys: Given) =>
    Object.entries(keys)
      .filter(([key]) => !key.startsWith(`${SECTION}.`))
      .sort();
  return JSON.stringify([job, plain(given), plain(assumed)]);
}

/** The job file for the next coil; or why there is none. The file reads back as the same job but for `as-made`. */
export function firstOffJob(record: CoilRecord, systematic: Systematic): FirstOff {
  const notes = notesOf(record, systematic);
  if (record.verb !== 'plan') return { ok: false, why: FIRST_OFF.none.verb, notes };
  const changes = changesOf(record, systematic);
  if (changes.length === 0) return { ok: false, why: FIRST_OFF.none.nothing, notes };
  const yaml = yamlOf(record, systematic.coils, changes);
  try {
    const before = readJob(JSON.stringify(nested(record.given)), 'job');
    if (restOf(before) !== restOf(readJob(yaml, 'first-off')))
      throw new Error('the job for the next coil is another job');
    return { ok: true, yaml, changes, notes };
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const [first] = error.faults;
    return { ok: false, why: FIRST_OFF.none.beyond(first?.got ?? '', first?.expected ?? ''), notes };
  }
}

/** Dotted keys as sections again. */
function nested(given: Given): Record<string, unknown> {
  const data: Record<string, unknown> = {};
  for (const [key, value] of Object.entries(given)) {
    const cut = key.indexOf('.');
    if (cut < 0) data[key] = value;
    else {
      const section = (data[key.slice(0, cut)] ?? {}) as Record<string, unknown>;
      data[key.slice(0, cut)] = { ...section, [key.slice(cut + 1)]: value };
    }
  }
  return data;
}
