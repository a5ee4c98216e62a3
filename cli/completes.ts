/** What a shell offers for what a word or an option takes. */
import type { Takes } from './verbs.ts';

/** Words that complete what is taken; null: files or folders do, or nothing. */
export type WordsFor = (takes: Takes) => readonly string[] | null;

const DATA = ['yaml', 'yml', 'json'] as const;

/** Endings of the files that are offered; null: nothing, or any file. */
export const endingsOf = (takes: Takes): readonly string[] | null =>
  takes === 'data file' ? DATA : takes === 'table' ? [...DATA, 'csv'] : null;
