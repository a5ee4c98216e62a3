/**
 * Errors as data. Whatever a user can mend is a {@link Fault}: what was got, where, what was expected and what to do.
 * Anything else that is thrown is a mistake of the program and leaves with exit code 1.
 */

/** Where in the input a fault lies; lines count from 1; `key` is a dotted path such as `want.inductance`. */
export interface Place {
  readonly file?: string | undefined;
  readonly line?: number | undefined;
  readonly key?: string | undefined;
}

export interface FaultParts {
  /** Stable kebab-case name, for tests and for `--json`. */
  readonly code: string;
  readonly place?: Place | undefined;
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}

/** Exit codes of the command line: what kind of trouble a list of faults is. */
export const EXIT = {
  done: 0,
  program: 1,
  usage: 2,
  input: 3,
  nothingFits: 4,
  output: 5,
} as const;
export type FaultExit = 2 | 3 | 4 | 5;

/** One or more things for the user to mend, thrown together so that one run reports them all. */
export class Fault extends Error {
  readonly exit: FaultExit;
  readonly faults: readonly FaultParts[];
  constructor(exit: FaultExit, faults: FaultParts | readonly FaultParts[]) {
    const list = Array.isArray(faults) ? (faults as readonly FaultParts[]) : [faults as FaultParts];
    super(list.map((f) => `${f.code}: ${f.got}`).join('; '));
    this.name = 'Fault';
    this.exit = exit;
    this.faults = list;
  }
}
