export interface Surroundings {
  readonly env?: Readonly<Record<string, string>>;
  readonly by?: readonly string[];
  readonly umask?: string;
  readonly moved?: boolean;
  readonly old?: boolean;
  readonly inputs?: readonly string[];
}
export function surroundings(): Readonly<Record<string, Surroundings>>;
export function outcomeIn(base: string, words: readonly string[], how?: Surroundings, out?: string): Promise<string>;
export function programsIn(folder: string, files: string): string[];
export function differences(one: string, other: string): string[];
