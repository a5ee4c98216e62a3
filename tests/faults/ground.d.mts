/** Words of the command line by verb; see ground.mjs. */
export function jobsIn(base: string, verbs: readonly string[]): Promise<Map<string, readonly string[]>>;
export function must(folder: string, given: readonly string[], how?: object): Promise<unknown>;
export function told(folder: string): string;
export function random(seed: number): () => number;
