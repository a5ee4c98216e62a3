/** Paths of files that a lot names. */
import type { Parsed } from '../../quantity/parse.ts';
import { shown } from '../field.ts';

const LONGEST_PATH = 500;

/** Path of a file, as written: relative or absolute, it is only read. */
export function readPath(raw: unknown): Parsed<string> {
  const expected = 'the path of a file, from the folder of the file that names it';
  const refuse = (got: string, todo: string): Parsed<string> => ({ ok: false, got, expected, todo });
  if (typeof raw !== 'string' || raw.trim() === '') return refuse(shown(raw), 'write the name of the file');
  const text = raw.trim();
  if (text === '-') return refuse('standard input', 'put it into a file and name that');
  if (/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]/u.test(text))
    return refuse(`${shown(text)}, which holds control characters`, 'write the path again');
  if (text.length > LONGEST_PATH) return refuse(`${text.length} characters`, 'write a shorter path');
  return { ok: true, value: text };
}
