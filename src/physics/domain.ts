/** Stops a law that is asked outside its domain: a mistake of the caller, never of the user, whose input was checked before. */
export function needPositive(values: Readonly<Record<string, number>>): void {
  for (const [name, value] of Object.entries(values)) {
    if (!(value > 0 && value < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`${name} must be a positive finite number, got ${value}`);
    }
  }
}
