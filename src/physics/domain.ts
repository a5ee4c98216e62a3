/** Stops a law that is asked outside its domain: a mistake of the caller, never of the user, whose input was checked before. */
export function needPositive(values: Readonly<Record<string, number>>): void {
  for (const [name, value] of Object.entries(values)) {
    if (!(value > 0 && value < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`${name} must be a positive finite number, got ${value}`);
    }
  }
}

/** The same question without naming anything: laws are asked millions of times in a search, and the answer is nearly always yes. */
export function allPositive(a: number, b = 1, c = 1, d = 1): boolean {
  return a > 0 && b > 0 && c > 0 && d > 0 && a + b + c + d < Number.POSITIVE_INFINITY;
}
