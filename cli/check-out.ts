/** The option that names the output folder. */
import { Fault } from '../src/fault.ts';

/** Throws a Fault with exit code 2 when it names no folder. */
export function checkOut(out: string | undefined): void {
  if (out !== '' && out !== '-') return;
  throw new Fault(2, {
    code: 'no-folder',
    place: { key: '--out' },
    got: out === '' ? 'nothing' : '-, which is standard output',
    expected: 'a folder',
    todo: out === '' ? 'name a folder, or leave the option out' : 'name a folder; --json prints the record besides',
  });
}
