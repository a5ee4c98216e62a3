/** What must hold of every refusal, and of every file that was read. */
import { showFault } from '../../cli/show-fault.ts';
import type { Fault } from '../../src/fault.ts';

const PAGE = { columns: 80 };
/** Longer ones bury what they say. */
const LONGEST_PART = 700;
const STEERS = /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/u;
/** A surrogate without its other half: no text that can be written. */
const HALF = /\p{Cs}/u;

/** What a refusal lacks; empty when it is as it should be. `lines`: of the file, for what has one. */
export function faultFlaws({ exit, faults }: Fault, lines: number, read: string): string[] {
  const flaws: string[] = [];
  if (![2, 3, 4, 5].includes(exit)) flaws.push(`exit ${exit}`);
  if (faults.length === 0) flaws.push('a refusal without a fault');
  for (const { code, place, got, expected, todo } of faults.slice(0, 200)) {
    const told = `${code} at ${place?.line} ${place?.key}`;
    if (!/^[a-z][a-z0-9-]*$/.test(code)) flaws.push(`${told}: no code`);
    for (const [part, text] of Object.entries({ got, expected, todo })) {
      if (typeof text !== 'string' || text.trim() === '') flaws.push(`${told}: ${part} is empty`);
      else if (text.length > LONGEST_PART) flaws.push(`${told}: ${part} of ${text.length} characters`);
      else if (HALF.test(text)) flaws.push(`${told}: ${part} has half a character`);
      else if (/\[object |undefined/.test(text) && !/\[object |undefined/.test(read))
        flaws.push(`${told}: ${part} is ${text}`);
    }
    // What no value of the file is at fault for, such as the choice of all of them, has no place.
    if (exit === 3 && (place?.file ?? '') === '' && (place?.key ?? '') === '') flaws.push(`${told}: no place`);
    if (place?.line !== undefined && !(Number.isInteger(place.line) && place.line >= 1 && place.line <= lines))
      flaws.push(`${told}: a line that is not there`);
    if ((place?.key ?? '').length > 200) flaws.push(`${told}: a key of ${place!.key!.length} characters`);
  }
  return flaws;
}

/** What is wrong with a refusal as it is shown. */
export function shownFlaws(fault: Fault): string[] {
  const flaws: string[] = [];
  const text = showFault(fault, PAGE);
  const rows = text.split('\n');
  if (rows.some((row) => STEERS.test(row))) flaws.push('shown with characters that steer a terminal');
  if (rows.length > 800) flaws.push(`shown in ${rows.length} lines`);
  for (const label of ['got', 'expected', 'to do'])
    if (!rows.some((row) => row.startsWith(`  ${label} `))) flaws.push(`shown without ${label}`);
  return flaws;
}

/** Numbers that are none, texts that steer, and keys of a prototype, anywhere in plain data. */
export function dataFlaws(data: unknown, path = '$'): string[] {
  if (typeof data === 'number') return Number.isFinite(data) ? [] : [`${path} is ${data}`];
  if (typeof data === 'string') return [];
  if (data instanceof Map) return dataFlaws([...data], path);
  if (Array.isArray(data)) return data.flatMap((one, i) => dataFlaws(one, `${path}[${i}]`));
  if (typeof data !== 'object' || data === null) return [];
  const proto: unknown = Object.getPrototypeOf(data);
  const strange = proto === Object.prototype || proto === null ? [] : [`${path} has a prototype of its own`];
  return [...strange, ...Object.entries(data).flatMap(([key, one]) => dataFlaws(one, `${path}.${key}`))];
}

/** A name that goes on sheets and into a path. */
export function nameFlaws(name: string, slug: string): string[] {
  const flaws: string[] = [];
  if (name.trim() === '' || STEERS.test(name) || HALF.test(name)) flaws.push(`the name ${JSON.stringify(name)}`);
  if (!/^[a-z0-9](?:[a-z0-9-]{0,58}[a-z0-9])?$/.test(slug)) flaws.push(`the folder ${JSON.stringify(slug)}`);
  return flaws;
}
