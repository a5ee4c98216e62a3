/** What is wrong with a file that was read, and where: data for a fault. */
import type { Path } from './tree.ts';

export interface Finding {
  readonly code: string;
  readonly path: Path;
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}

export function finding(code: string, path: Path, got: string, expected: string, todo: string): Finding {
  return { code, path, got, expected, todo };
}
