/** Where things are in a coil file. */
import type { Path } from '../tree.ts';

/** A path below `coil`. */
export const at = (...rest: (string | number)[]): Path => ['coil', ...rest];

export { finding } from '../finding.ts';
