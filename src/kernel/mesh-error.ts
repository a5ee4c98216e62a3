/** A part that did not come out as it should: a mistake of the program, never of the user. */
export class MeshError extends Error {
  /** @param got what was found and what was expected, with numbers */
  constructor(
    readonly part: string,
    readonly operation: string,
    readonly got: string,
  ) {
    super(`part ${part}, ${operation}: ${got}`);
    this.name = 'MeshError';
  }
}
