/** All claims of a record that can be recomputed from it, and what it says of the job. */
import type { CoilRecord } from '../../src/record/schema.ts';
import { aroundClaims } from './around.ts';
import type { Claims } from './claims.ts';
import { adviceClaims, measuringClaims } from './measuring.ts';
import { printingClaims } from './printing.ts';
import { drawnLimits, plainCoilOf, windingClaims } from './winding.ts';
import { circuitOf, workingClaims } from './working.ts';

export interface RecordChecks {
  /** Numbers from 0 to 1; with them one tap's limits are drawn at random. */
  readonly random?: () => number;
}

export function recordClaims(claims: Claims, record: CoilRecord, { random }: RecordChecks = {}): void {
  const coil = plainCoilOf(record);
  const circuit = circuitOf(record, coil);
  printingClaims(claims, record);
  windingClaims(claims, record, coil);
  workingClaims(claims, record, coil, circuit);
  measuringClaims(claims, record, coil, circuit);
  adviceClaims(claims, record, coil);
  aroundClaims(claims, record, coil);
  demandClaims(claims, record);
  alternativeClaims(claims, record);
  if (random !== undefined) drawnLimits(claims, record, coil, random);
}

function demandClaims(claims: Claims, { demand, windings, coverage }: CoilRecord): void {
  const { taps } = windings[0]!;
  claims.near('demand.taps', demand.taps, taps.length, 0);
  const band = demand.kind === 'band';
  claims.holds('demand.bandLowKhz', (demand.bandLowKhz !== null) === band, `${demand.bandLowKhz}`);
  claims.holds('demand.bandHighKhz', (demand.bandHighKhz !== null) === band, `${demand.bandHighKhz}`);
  if (!band || coverage === null) return;
  const lowest = Math.min(...taps.map(({ range }) => range!.lowKhz));
  const highest = Math.max(...taps.map(({ range }) => range!.highKhz));
  // A band is met at both ends to a percent, its edges rounded.
  claims.holds(
    'demand.bandLowKhz',
    lowest <= demand.bandLowKhz! * 1.01,
    `tunes down to ${lowest} of ${demand.bandLowKhz}`,
  );
  claims.holds(
    'demand.bandHighKhz',
    highest >= demand.bandHighKhz! * 0.99,
    `tunes up to ${highest} of ${demand.bandHighKhz}`,
  );
}

function alternativeClaims(claims: Claims, { alternatives }: CoilRecord): void {
  for (const one of alternatives) {
    const p = 'alternatives[].';
    claims.holds(`${p}turns`, one.turns > 0, `${one.turns}`);
    claims.holds(
      `${p}pitchMm`,
      one.pitchMm > 0 && one.pitchMm * one.turns < one.lengthMm * 1.001,
      `${one.pitchMm} by ${one.turns} on ${one.lengthMm}`,
    );
    // Round the former and never shorter; on ribs a straight run from rib to rib is 5 % shorter at most.
    const round = (Math.PI * one.formerMm * one.turns) / 1e3;
    claims.holds(`${p}wireM`, one.wireM > 0.94 * round, `${one.wireM} round ${one.formerMm}`);
    const litz = /^(\d+) x ([\d.]+) mm/.exec(one.wire);
    const awg = /^(\d+) AWG/.exec(one.wire);
    const metric = /^([\d.]+) mm/.exec(one.wire);
    const bare = awg ? 0.127 * 92 ** ((36 - Number(awg[1])) / 39) : Number(metric?.[1] ?? Number.NaN);
    const section = (Math.PI / 4) * (litz ? Number(litz[1]) * Number(litz[2]) ** 2 * 1.015 : bare ** 2);
    if (Number.isFinite(section))
      claims.near(
        `${p}massG`,
        one.massG,
        one.wireM * section * 8.89,
        (0.0055 + 0.009) * one.massG + 0.0055 * section * 8.89,
      );
    claims.holds(`${p}lossFactor`, one.lossFactor > 0 && one.lossFactor < 1, `${one.lossFactor}`);
    claims.holds(`${p}worstTapPercent`, one.worstTapPercent >= 0, `${one.worstTapPercent}`);
  }
}
