/** Serials in words: runs of three or more that count up by one as `HS-001 to HS-012`, others one by one. */

interface Parts {
  readonly before: string;
  readonly digits: string;
  readonly after: string;
}

/** A serial parted at its last number; null without one, or with one too long to count exactly. */
function partsOf(serial: string): Parts | null {
  const found = /^(.*?)(\d+)(\D*)$/.exec(serial);
  if (found === null || found[2]!.length > 15) return null;
  return { before: found[1]!, digits: found[2]!, after: found[3]! };
}

function follows(one: Parts | null, next: Parts | null): boolean {
  if (one === null || next === null) return false;
  const counted = `${Number(one.digits) + 1}`.padStart(one.digits.length, '0');
  return next.before === one.before && next.after === one.after && next.digits === counted;
}

/** Runs in the order given, each its first and last serial and how many it holds. */
export function serialRuns(serials: readonly string[]): { first: string; last: string; count: number }[] {
  const runs: { first: string; last: string; count: number; parts: Parts | null }[] = [];
  for (const serial of serials) {
    const parts = partsOf(serial);
    const run = runs.at(-1);
    if (run !== undefined && follows(run.parts, parts)) {
      run.last = serial;
      run.count++;
      run.parts = parts;
    } else runs.push({ first: serial, last: serial, count: 1, parts });
  }
  return runs.map(({ first, last, count }) => ({ first, last, count }));
}

/** As `serialRanges(['HS-001', 'HS-002', 'HS-003', 'HS-007'])`: `HS-001 to HS-003, HS-007`. */
export function serialRanges(serials: readonly string[]): string {
  return serialRuns(serials)
    .flatMap(({ first, last, count }) =>
      count === 1 ? [first] : count === 2 ? [first, last] : [`${first} to ${last}`],
    )
    .join(', ');
}
