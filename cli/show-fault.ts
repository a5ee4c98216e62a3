/** Faults for people: one block each, wrapped to the page. */
import type { Fault, FaultParts } from '../src/fault.ts';
import { hung, type Page, shown, styled } from './page.ts';
import { wrap } from './table.ts';

const HEADINGS: Readonly<Record<Fault['exit'], string>> = {
  2: 'not a command',
  3: 'not accepted',
  4: 'nothing fits',
  5: 'not written',
};

/** More than these would bury the first. */
const MOST = 20;

/**
 * Printed example:
 *
 *     coilwright: job.yaml, line 2, want.inductance
 *       got       "20 mm", whose unit measures a length
 *       expected  an inductance, such as 240 uH
 *       to do     give an inductance in uH or mH
 */
export function showFault(fault: Fault, page: Page): string {
  const blocks = fault.faults.slice(0, MOST).map((parts) => block(parts, fault.exit, page));
  const left = fault.faults.length - MOST;
  if (left > 0) blocks.push(`coilwright: ${left} more of this kind; mend these first\n`);
  return blocks.join('\n');
}

function block(parts: FaultParts, exit: Fault['exit'], page: Page): string {
  const { file, line, key } = parts.place ?? {};
  const place = [file === '-' ? 'standard input' : file, line === undefined ? undefined : `line ${line}`, key].filter(
    (part) => part !== undefined && part !== '',
  );
  const heading = place.length === 0 ? HEADINGS[exit] : place.join(', ');
  return [
    ...wrap(shown(page, `coilwright: ${visible(heading)}`), page.columns).map((line) => styled(page, 'trouble', line)),
    ...row('got', parts.got, page),
    ...row('expected', parts.expected, page),
    ...row('to do', parts.todo, page),
    '',
  ].join('\n');
}

const LABEL = 12;

const row = (label: string, text: string, page: Page): readonly string[] =>
  hung(page, `  ${label}`.padEnd(LABEL), visible(text));

/** Nothing from a file or an argument may steer the terminal. */
const visible = (text: string): string => text.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, '?');

/** A mistake of the program itself. */
export function showMistake(error: unknown, page: Page): string {
  const text = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return `${styled(page, 'trouble', 'coilwright: a fault of the program itself')}\n${text}\n`;
}
