/** The words of the proof: judging, what saves a coil, the sheet. Percentages come with their sign. */

export const JUDGED = {
  turns: (tap: number) => `turns wound up to tap ${tap}`,
  miscount: (tap: number, off: number) => {
    const turns = Math.abs(off);
    const count = `${Number(turns.toFixed(2))} turn${turns === 1 ? '' : 's'}`;
    return `Counted ${count} ${off < 0 ? 'too few' : 'too many'} up to tap ${tap}.`;
  },
  unasked: (quantity: string) => `${quantity}, which the record has no figure for`,
} as const;

const turnsText = (turns: number) => `${Number(turns.toFixed(2))} turn${turns === 1 ? '' : 's'}`;
const where = (tap: number, last: number) => (tap === last ? 'the whole coil' : `tap ${tap}`);

/** `tap 2`; `taps 1, 3 to 6 and the whole coil`. */
function several(taps: readonly number[], last: number): string {
  const runs: [number, number][] = [];
  for (const tap of taps) {
    const run = runs.at(-1);
    if (tap === last) continue;
    if (run !== undefined && run[1] === tap - 1) run[1] = tap;
    else runs.push([tap, tap]);
  }
  const parts = runs.flatMap(([from, to]) =>
    to - from < 2 ? (from === to ? [`${from}`] : [`${from}`, `${to}`]) : [`${from} to ${to}`],
  );
  const single = parts.length === 1 && !parts[0]!.includes(' ');
  const named = parts.length === 0 ? [] : [`${single ? 'tap' : 'taps'} ${parts.join(', ')}`];
  return [...named, ...(taps.includes(last) ? ['the whole coil'] : [])].join(' and ');
}

export const RESCUE = {
  where,
  several,
  cause: {
    counted: (tap: number, off: number) =>
      `By the count ${turnsText(Math.abs(off))} ${off < 0 ? 'too few' : 'too many'} up to tap ${tap}.`,
    miscount: (from: number, tap: number, last: number, off: number) =>
      `Reads like ${turnsText(Math.abs(off))} ${off < 0 ? 'too few' : 'too many'} between ${from === 0 ? 'S' : `tap ${from}`} and ${tap === last ? 'F' : `tap ${tap}`}.`,
    placed: (tap: number, off: number) =>
      `Reads like tap ${tap} made ${turnsText(Math.abs(off))} ${off < 0 ? 'early, towards S' : 'late, towards F'}.`,
    alike: (percent: string) =>
      `All taps are off alike, about ${percent} %: diameter, pitch or meter rather than a turn.`,
    loose: (mm: string) => `The winding is ${mm} mm longer than planned at F and not before: loose end turns.`,
    apart: (tap: string) => `Readings of ${tap} do not go together: look at capacitor, clips and meter.`,
    resistance: (tap: string, high: boolean) =>
      high
        ? `The resistance of ${tap} is high: a joint, a clip, or thinner wire.`
        : `The resistance of ${tap} is low: turns that touch bare, or thicker wire.`,
    wide: (tap: string) =>
      `The resonance of ${tap} is more than twice as wide as it may be: a shorted turn, or a joint that is not through.`,
    small: (taps: string) =>
      `Off by less than half a turn at ${taps}: the place of the tap, the wire about it, or the reading itself.`,
    unknown: 'No one fault explains these readings.',
  },
  doing: {
    turns: (by: number, hole: string | null) =>
      `${turnsText(Math.abs(by))} ${by < 0 ? 'off' : 'on'} at the finish${hole === null ? '' : `, into ${hole}`}`,
    finish: (count: number, mm: string, press: boolean) =>
      `${press ? 'press' : 'spread'} the last ${count} turns ${press ? 'together' : 'apart'} by ${mm} mm in all`,
    start: (count: number, mm: string) => `spread the first ${count} turns apart by ${mm} mm in all`,
    tap: (tap: number, turns: number) => {
      const size = Math.abs(turns);
      const whole = Math.abs(size - Math.round(size)) < 1e-6;
      const far = whole ? turnsText(Math.round(size)) : `${Number((360 * size).toFixed(0))}°`;
      return `move tap ${tap} by ${far} along the wire, ${turns < 0 ? 'back towards S' : 'on towards F'}`;
    },
  },
  why: {
    acts: 'Worked out from the readings as they stand; measure every tap again afterwards.',
    held: 'The taps are held in holes or cut: they cannot be moved on this former.',
    nothing: 'Nothing that can be done to the wound coil brings these taps within their limits.',
    electrical: 'Electrically every tap is within its limits; whether the other readings matter is for whoever checks.',
    unread: 'A tap that fails has no electrical reading that can be judged: measure it first.',
    again: 'Take the readings marked R again first: they are not of this coil.',
    length: 'Measure the winding at F: if it is longer than planned, press the end turns instead.',
  },
} as const;

/** Marks of the table, coil by coil. */
export const MARK = { pass: 'P', fail: 'F', missing: '–', again: 'R' } as const;

export const PROOF = {
  document: 'Proof sheet',
  parts: {
    summary: 'what passed, what did not',
    marks: 'coil by coil',
    file: 'the file of readings',
  },
  record: (hash: string) => `proof ${hash}`,
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  of: 'readings',
  tally: {
    heading: 'Coils',
    kind: 'kind',
    hash: 'record',
    coils: 'coils',
    pass: 'pass',
    fail: 'fail',
    missing: 'missing',
    saved: 'can be saved',
    all: 'all',
    more: 'Coils, continued',
  },
  input: (file: string, figures: number, readings: number, dial: number, missing: number, leftOut: number) =>
    `Read from ${file}: ${figures} places for readings, of them ${readings} readings${dial > 0 ? ` and ${dial} of a dial` : ''}, ${missing} blank, ${leftOut} left out.`,
  meaning:
    'P pass: an inductance or a resonance within its limits, and nothing outside. F fail: a reading outside its limits; a meter that the record does not trust at a tap fails nothing, nor does a width below twice its upper limit. R: a reading so far off that it is not of this coil, to be taken again. – missing: no electrical reading that can be judged. A coil passes when every tap has P; it fails with one F, in the column “other” too (former, 20 turns).',
  table: {
    heading: (job: string) => `Coil by coil: ${job}`,
    more: (job: string) => `Coil by coil: ${job}, continued`,
    part: (job: string, from: number, to: number) => `${job}, taps ${from} to ${to}`,
    serial: 'serial',
    state: 'coil',
    other: 'other',
    tap: (tap: number) => `${tap}`,
    off: 'farthest off %',
    at: (percent: string, tap: number) => `${percent} at ${tap}`,
    none: 'no serial',
  },
  failing: {
    head: { heading: 'Coils that fail, and what to do', more: 'Coils that fail, continued' },
    none: 'No coil fails.',
    serial: 'serial',
    saved: 'saved',
    outside: 'outside its limits',
    looks: 'looks like',
    toDo: 'what to do',
    can: { yes: 'yes', partly: 'in part', no: 'no' },
    one: (tap: string, percent: string) => `${tap}, ${percent} %`,
    far: (taps: string, percent: string, tap: number) => `${taps}; farthest ${percent} % at ${tap}`,
    reading: (what: string, value: string, low: string, high: string) => `${what} ${value} (${low} to ${high})`,
    more: (count: number) => `and ${count} more`,
    out: (taps: string) => `Outside stay ${taps}.`,
    expected: (figures: string) => `Then ${figures}.`,
    tap: (tap: string, before: string, after: string) => `${tap} ${before} to ${after} %`,
    figures:
      'Percent: of the inductance, against what the meter or the capacitor should show; every reading with its limits and its line stands in proof.json.',
  },
  again: {
    heading: 'To be read again',
    item: (serial: string, what: string, written: string, line: number, advice: string) =>
      `${serial}, ${what}: ${written} (line ${line}). ${advice}`,
  },
  lines: {
    heading: 'By two capacitors',
    item: (serial: string, where: string, uh: string, half: string, pf: string, off: string) =>
      `${serial}, ${where}: ${uh} µH ± ${half} %, ${pf} pF of its own${off}`,
    off: (percent: string) => `; ${percent} % against the record`,
  },
  notes: {
    heading: 'Lines of the file',
    none: 'Every line was understood.',
    out: 'left out',
    kept: 'kept',
    item: (place: string, fate: string, got: string, expected: string, todo: string) =>
      `${place}, ${fate}: ${got}; expected ${expected}; ${todo}.`,
    line: (line: number, column: string | null) => (column === null ? `line ${line}` : `line ${line}, ${column}`),
    rest: (count: number) => `and ${count} more, all in proof.json.`,
  },
  systematic: {
    heading: (job: string) => `What the coils have in common: ${job}`,
    left: (serial: string, text: string) => `${serial} left out: ${text}`,
    few: 'Too little was read to tell what the coils have in common.',
    next: (path: string, changes: string) => `The job for the next lot, centred by this: ${path}, with ${changes}.`,
    none: (why: string) => `No job for the next lot: ${why}`,
  },
  remarks: {
    heading: 'Remarks',
    item: (serial: string, where: string, remark: string) => `${serial}${where}: ${remark}`,
  },
} as const;

export const DIAL_NOTE = {
  none: {
    got: 'no reading of a dial in the file',
    expected: 'rows of quantity dial: a frequency, and how far the dial was turned as condition, such as 30 deg',
    todo: 'read the dial at four angles or more of every position, or leave --dial out',
  },
} as const;
