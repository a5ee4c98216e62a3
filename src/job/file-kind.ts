/** The kinds of files that people write, as messages call them. */

/** What a file is, for messages. */
export interface FileKind {
  /** `a job`. */
  readonly noun: string;
  /** `a job file`. */
  readonly file: string;
  /** What it must have. */
  readonly least: string;
  /** How to come by one. */
  readonly begin: string;
}

export const JOB_FILE: FileKind = {
  noun: 'a job',
  file: 'a job file',
  least: 'at least the keys job and want',
  begin: 'coilwright start',
};
export const COIL_FILE: FileKind = {
  noun: 'a measured coil',
  file: 'a file of a measured coil',
  least: 'at least the key coil',
  begin: 'coilwright start found-coil',
};
export const OLD_COIL_FILE: FileKind = {
  noun: 'an old coil',
  file: 'a file of an old coil',
  least: 'at least the key old',
  begin: 'coilwright start broken-form',
};
