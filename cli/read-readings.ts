/** The bytes of a file of readings to text: UTF-8, or what spreadsheets write instead. */
import { Fault } from '../src/fault.ts';
import type { FileNote } from '../src/prove/types.ts';

/** 32 MB: some two hundred thousand readings. */
export const LARGEST_READINGS = 32_000_000;

/**
 * UTF-8 and UTF-16 by their mark; bytes that are neither are taken for the western alphabet of old spreadsheets (windows-1252), and
 * that is told. @throws Fault (exit 3) for what is too large or no text
 */
export function decodeReadings(
  bytes: Uint8Array,
  file: string,
): { readonly text: string; readonly notes: readonly FileNote[] } {
  const refuse = (code: string, got: string, todo: string) =>
    new Fault(3, { code, place: { file }, got, expected: 'readings in CSV', todo });
  if (bytes.length > LARGEST_READINGS)
    throw refuse('too-large', `more than ${LARGEST_READINGS / 1e6} MB`, 'hand in one lot at a time');
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return { text: new TextDecoder('utf-16le').decode(bytes), notes: [] };
  if (bytes.includes(0))
    throw refuse('no-text', 'bytes that are no text', 'save the table as CSV; workbooks and PDF cannot be read');
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), notes: [] };
  } catch {
    const note: FileNote = {
      line: 1,
      column: null,
      code: 'not-utf-8',
      fate: 'kept',
      figures: 0,
      got: 'bytes that are not UTF-8',
      expected: 'a file in UTF-8',
      todo: 'it was read as windows-1252; look whether serials and remarks came through, or save it as UTF-8',
    };
    return { text: new TextDecoder('windows-1252').decode(bytes), notes: [note] };
  }
}
