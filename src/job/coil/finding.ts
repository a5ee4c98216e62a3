/** Short ways to say what is wrong with a measured coil, and where. */
import type { Finding } from '../checks.ts';
import type { Path } from '../tree.ts';

/** A path below `coil`. */
export const at = (...rest: (string | number)[]): Path => ['coil', ...rest];

export const finding = (code: string, path: Path, got: string, expected: string, todo: string): Finding => ({
  code,
  path,
  got,
  expected,
  todo,
});
