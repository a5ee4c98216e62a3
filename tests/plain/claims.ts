/** What was found wrong with the claims of a record, and which of them were looked at. */

export class Claims {
  readonly faults: string[] = [];
  readonly reached = new Set<string>();
  count = 0;

  #looked(path: string): void {
    this.reached.add(path);
    this.count++;
  }

  /** A figure against its recomputation, to so much. */
  near(path: string, got: number, want: number, within: number, what = ''): void {
    this.#looked(path);
    // Not a number is never near.
    if (!(Math.abs(got - want) <= within + 1e-12 * Math.abs(want)))
      this.faults.push(
        `${path}${what}: ${got}, recomputed ${Number(want.toPrecision(9))}, within ${Number(within.toPrecision(3))}`,
      );
  }

  /** What must hold, with what was found. */
  holds(path: string, ok: boolean, what: string): void {
    this.#looked(path);
    if (!ok) this.faults.push(`${path}: ${what}`);
  }

  /** null exactly where there is nothing to recompute. */
  both(path: string, got: number | null, want: number | null, within: number, what = ''): void {
    if (got !== null && want !== null) this.near(path, got, want, within, what);
    else this.holds(path, got === want, `${got}, recomputed ${want}${what}`);
  }
}

/** Half of the last of so many significant digits. */
export const digit = (value: number, digits: number): number =>
  value === 0 ? 0 : 0.5000001 * 10 ** (Math.floor(Math.log10(Math.abs(value)) + 1e-9) + 1 - digits);
