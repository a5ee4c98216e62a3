/** Name and date of a job. */
import { createHash } from 'node:crypto';
import { cut, type Parsed } from '../quantity/parse.ts';
import { shown } from './field.ts';

const LONGEST_NAME = 80;
const LONGEST_SLUG = 60;
/** Names that some systems keep for devices, with any ending. */
const RESERVED = /^(?:con|prn|aux|nul|com\d|lpt\d)$/;

/** The name: one line of visible text. */
export function readName(raw: unknown): Parsed<string> {
  const refuse = (got: string, todo: string): Parsed<string> => ({
    ok: false,
    got,
    expected: `a name of 1 to ${LONGEST_NAME} characters, on one line`,
    todo,
  });
  if (typeof raw !== 'string') return refuse(shown(raw), 'write a name; put one that is only a number in quotes');
  const name = raw.normalize('NFC').trim();
  if (name === '') return refuse('nothing', 'write a name for the job');
  if (/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/u.test(name)) {
    return refuse(`${shown(raw)}, which holds control characters`, 'write the name again, in visible characters');
  }
  const length = [...name].length;
  return length > LONGEST_NAME ? refuse(`${length} characters`, 'write a shorter name') : { ok: true, value: name };
}

/** The name of the file without its ending, for what has no name of its own. */
export function nameOfFile(file: string, fallback: string): string {
  const base = (file.split(/[\\/]/).at(-1) ?? '').replace(/\.(?:ya?ml|json|csv|tsv)$/i, '').trim();
  const plain = cut(base.normalize('NFC').replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/gu, ''), 60).trim();
  return plain === '' || plain === '-' ? fallback : plain;
}

/** A day of the calendar, YYYY-MM-DD. */
export function readDate(raw: unknown): Parsed<string> {
  const match = typeof raw === 'string' ? /^(\d{4})-(\d{2})-(\d{2})$/.exec(raw) : null;
  if (match) {
    const day = new Date(Date.UTC(Number(match[1]), Number(match[2]) - 1, Number(match[3])));
    if (day.toISOString().slice(0, 10) === match[0]) return { ok: true, value: match[0] };
  }
  return {
    ok: false,
    got: shown(raw),
    expected: 'a date such as 2031-05-17',
    todo: 'write year, month and day, or leave the key out',
  };
}

/**
 * Folder name of a job: lower-case letters, digits and hyphens, 1 to 60 of them, never a device name. It cannot lead
 * anywhere but into the folder it is put in. Names without a usable letter give `job-` and eight digits of their hash.
 */
export function slug(name: string): string {
  const plain = name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[\p{M}]/gu, '')
    .replace(/ß/g, 'ss')
    .replace(/[æœ]/g, (letter) => (letter === 'æ' ? 'ae' : 'oe'))
    .replace(/ø/g, 'o')
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, LONGEST_SLUG)
    .replace(/^-+|-+$/g, '');
  if (plain !== '' && !RESERVED.test(plain)) return plain;
  return `job-${createHash('sha256').update(name, 'utf8').digest('hex').slice(0, 8)}`;
}
