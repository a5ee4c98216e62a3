import { expect, test } from 'vitest';
import { readJob } from '../../src/job/read.ts';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Claims } from '../plain/claims.ts';
import { BOUNDED, NOT_RECOMPUTED, reasonFor } from '../plain/fields.ts';
import { numericLeaves } from '../plain/leaves.ts';
import { planted } from '../plain/plant.ts';
import { recordClaims } from '../plain/record.ts';
import { type DesignOutcome, designOutcome } from './designs.ts';

// A short run of `npm run check:designs`, other seeds than its own, and a few coils that between them have every number of the schema.
const FROM = 900_004;
const COUNT = 1;
/** Where no dead end resonates in the way: the long run comes by many. */
const RARE = ['coverage.deadEnds[].secondKhz'];

const SHOP =
  'shop: { capacitors: [100 pF, 330 pF], meter: 100 kHz, generator: 50 ohm, generator-coupling: 1 pF, probe-capacitance: 10 pF, probe-resistance: 1 Mohm }';
const JOBS = [
  `
job: Everything round it
want: { inductance: [9 uH, 30 uH], spacing: even ratio }
set: { capacitor: 15 pF to 90 pF, stray: 10 pF, switch: open }
former: { outside-diameter: 40 mm }
wire: 0.4 mm enamel
winding: { pitch: 1.2 mm }
second: { kind: inner, coupling: 0.05 to 0.2 }
aerial: { kind: dummy, series: 100 pF }
detector: { kind: germanium diode }
prefer: closest taps
${SHOP}
parts: [former, coupon]
`,
  `
job: Two switches
want: { inductance: 3 uH to 30 uH, taps: 3 }
set: { capacitor: 15 pF to 380 pF, stray: 10 pF, switch: open }
former: { outside-diameter: 68 mm }
wire: 0.4 mm enamel
winding: { units: 5 }
`,
  `
job: On ribs
want: { inductance: [4 uH, 14 uH] }
former: { outside-diameter: 50 mm, body: ribbed, ribs: 12 }
wire: 0.5 mm enamel
winding: { tap-method: auto }
parts: [former]
`,
  `
job: Litz with a dead end
want: { inductance: [4 uH, 20 uH, 40 uH] }
set: { capacitor: 10 pF to 25 pF, switch: open }
former: { outside-diameter: 60 mm, kind: tube }
wire: 20 x 0.1 mm litz single silk
`,
  `
job: A band
want: { band: 3 MHz to 11 MHz, taps: 2 }
set: { capacitor: 15 pF to 380 pF, stray: 10 pF, aerial: 20 pF }
former: { outside-diameter: 60 mm }
wire: 0.5 mm enamel
`,
];

const found: CoilRecord[] = [];
const reached = new Set<string>();

test('coils that have every number of the schema: each is recomputed, or excused by name', () => {
  let figures = 0;
  for (const job of JOBS) {
    const record = recordOf(readJob(job, 'job.yaml'), '0.0.0');
    found.push(record);
    const claims = new Claims();
    recordClaims(claims, record);
    expect(claims.faults, record.job).toEqual([]);
    figures += claims.count;
    for (const path of claims.reached) reached.add(path);
  }
  const leaves = numericLeaves();
  const due = leaves.filter((path) => reasonFor(path) === null);
  console.log(
    `designs: ${found.length} coils, ${figures} figures recomputed; ${leaves.length} numbers in the schema, ${due.length} looked at (${BOUNDED.length} of them only bounded), ${leaves.length - due.length} excused`,
  );
  expect(due.filter((path) => !reached.has(path) && !RARE.includes(path))).toEqual([]);
  expect([...reached].filter((path) => !leaves.includes(path) || reasonFor(path) !== null)).toEqual([]);
  for (const path of Object.keys(NOT_RECOMPUTED))
    expect(
      leaves.some((leaf) => leaf.startsWith(path)),
      path,
    ).toBe(true);
  for (const path of BOUNDED) expect(due).toContain(path);
  expect(figures).toBeGreaterThan(1000);
});

test('a number that is moved is found', () => {
  const paths = [...reached].filter((path) => !BOUNDED.includes(path)).sort();
  let moved = 0;
  // Every so many of them: all take minutes.
  for (let i = 7; i < paths.length; i += 24) {
    const path = paths[i]!;
    const record = found.map((one) => planted(one, path, 0.1)).find((one) => one !== null);
    if (!record) continue;
    const claims = new Claims();
    recordClaims(claims, record);
    // The hash tells of any change: what else is found counts.
    expect(claims.faults.filter((fault) => !fault.startsWith('hash')).length, path).toBeGreaterThan(0);
    moved++;
  }
  console.log(`faults planted in ${moved} fields, all found`);
  expect(moved).toBeGreaterThan(6);
});

test('random designs: every claim of their records recomputed', async () => {
  const outcomes: DesignOutcome[] = [];
  for (let i = 0; i < COUNT; i++) outcomes.push(await designOutcome(FROM + i, false));
  const of = (result: DesignOutcome['result']) => outcomes.filter((one) => one.result === result);
  const figures = of('made').reduce((sum, one) => sum + one.figures, 0);
  console.log(
    `random designs: ${outcomes.length}, ${of('made').length} made (${figures} figures), ${of('refused').length} refused`,
  );
  expect(of('failed')).toEqual([]);
  expect(figures).toBeGreaterThan(0);
});
