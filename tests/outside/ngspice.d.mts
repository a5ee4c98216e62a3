export function checkNetlist(
  path: string,
  record: unknown,
  simulate: (path: string) => string,
  check: (what: string, good: boolean, said: string) => void,
): number;
