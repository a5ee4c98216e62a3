interface Case {
  readonly base: string;
  readonly next: () => number;
  readonly wholeMs: number;
}
export function killOnce(
  one: Case & { readonly words: readonly string[]; readonly expected: string },
): Promise<boolean>;
export function meetOnce(
  one: Case & {
    readonly words: readonly (readonly string[])[];
    readonly expected: readonly string[];
    readonly count: number;
  },
): Promise<void>;
