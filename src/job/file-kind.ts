/** The kinds of files that people write, as messages call them, and how one is told from another. */
import { isData } from './defaults.ts';
import { looksLikeOrders } from './lot/orders.ts';

/** What a file is, for messages. */
export interface FileKind {
  /** `a job`. */
  readonly noun: string;
  /** `a job file`. */
  readonly file: string;
  /** What it is written in. */
  readonly form: string;
  /** What it must have. */
  readonly least: string;
  /** How to come by one. */
  readonly begin: string;
  /** The key that only a file of this kind has; null: it has no keys. */
  readonly mark: string | null;
  /** The verb that takes it. */
  readonly verb: string;
}

const FORM = 'YAML or JSON';

export const JOB_FILE: FileKind = {
  noun: 'a job',
  file: 'a job file',
  form: FORM,
  least: 'at least the keys job and want',
  begin: 'coilwright start',
  mark: 'want',
  verb: 'plan',
};
export const COIL_FILE: FileKind = {
  noun: 'a measured coil',
  file: 'a file of a measured coil',
  form: FORM,
  least: 'at least the key coil',
  begin: 'coilwright start found-coil',
  mark: 'coil',
  verb: 'survey',
};
export const OLD_COIL_FILE: FileKind = {
  noun: 'an old coil',
  file: 'a file of an old coil',
  form: FORM,
  least: 'at least the key old',
  begin: 'coilwright start broken-form',
  mark: 'old',
  verb: 'match',
};
export const LOT_FILE: FileKind = {
  noun: 'a lot',
  file: 'a lot file',
  form: 'YAML, JSON or CSV',
  least: 'at least the key coils; in CSV the columns job and quantity',
  begin: 'coilwright start saltmarsh-lot',
  mark: 'coils',
  verb: 'lot',
};
/** A table of jobs and quantities: the coils of a lot, or a lot by itself. */
export const ORDERS_FILE: FileKind = {
  noun: 'a table of jobs',
  file: 'a table of jobs',
  form: 'CSV',
  least: 'at least the columns job and quantity',
  begin: 'coilwright start saltmarsh-lot',
  mark: null,
  verb: 'lot',
};
/** Readings of finished coils. */
export const READINGS_FILE: FileKind = {
  noun: 'readings',
  file: 'a file of readings',
  form: 'CSV',
  least: 'titles over the columns, and a reading',
  begin: 'coilwright lot',
  mark: null,
  verb: 'prove',
};

const KINDS = [OLD_COIL_FILE, COIL_FILE, LOT_FILE, JOB_FILE] as const;

/** What the data of a file is instead of the kind that was asked for; null when nothing says that it is another. */
export function otherKind(
  data: unknown,
  asked: FileKind,
): { readonly kind: FileKind; readonly key: string | null } | null {
  if (typeof data === 'string')
    return asked !== LOT_FILE && looksLikeOrders(data) ? { kind: LOT_FILE, key: null } : null;
  if (!isData(data) || asked.mark === null || Object.hasOwn(data, asked.mark)) return null;
  for (const kind of KINDS) if (Object.hasOwn(data, kind.mark ?? '')) return { kind, key: kind.mark };
  return null;
}
