/** What the readings of a failing coil look like: a miscount, a tap in the wrong place, all alike, loose end turns, a bad joint. */
import { RESCUE } from '../../templates/wording/proof.ts';
import { fixed, signed } from '../quantity/decimals.ts';
import type { CoilRecord } from '../record/schema.ts';
import { isOut } from './judge.ts';
import type { Judged, ProofTap } from './schema.ts';

/** A reading as near to whole turns off as this share of a turn looks like a miscount. */
const NEAR = 0.3;
const MOST = 3;
/** Taps that differ by no more than this share of their mean are off alike. */
const ALIKE = 0.5;
/** Wires of excess at F that are loose turns rather than the rule. */
export const LOOSE_WIRES = 0.5;

export interface Seen {
  /** Index of the tap. */
  readonly index: number;
  readonly percent: number;
  /** What it reads like, against where it should lie. */
  readonly offTurns: number;
  /** Outside its limits. */
  readonly out: boolean;
}

const whole = (turns: number) => {
  const near = Math.round(turns);
  return near !== 0 && Math.abs(near) <= MOST && Math.abs(turns - near) <= NEAR ? near : null;
};

/** The first tap that is whole turns off, and whether those behind it are as well. */
function turnCauses(seen: readonly Seen[], last: number): string[] {
  const causes: string[] = [];
  let carried = 0;
  seen.forEach((one, i) => {
    if (!one.out && carried === 0) return;
    const off = whole(one.offTurns - carried);
    if (off === null) return;
    const before = seen[i - 1];
    // What is off already before the section is no fault of the section.
    const alreadyOff = before?.out === true && whole(before.offTurns) === null;
    const behind = seen.slice(i + 1);
    const stays =
      behind.length === 0
        ? one.index === last - 1
        : behind.every(({ offTurns }) => Math.abs(offTurns - carried - off) < 0.5);
    if (stays) {
      if (alreadyOff) return;
      causes.push(
        RESCUE.cause.miscount(seen[i - 1] === undefined ? 0 : seen[i - 1]!.index + 1, one.index + 1, last, off),
      );
      carried += off;
    } else if (behind.some(({ offTurns }) => Math.abs(offTurns - carried) < 0.5))
      causes.push(RESCUE.cause.placed(one.index + 1, off));
  });
  return causes;
}

function alike(seen: readonly Seen[]): string[] {
  if (seen.length < 2) return [];
  const mean = seen.reduce((sum, { percent }) => sum + percent, 0) / seen.length;
  if (seen.some(({ percent }) => Math.abs(percent - mean) > ALIKE * Math.abs(mean))) return [];
  return [RESCUE.cause.alike(signed(mean, 1))];
}

/** What the winding is longer than planned at F, beyond what it is at the tap before that was measured, mm; 0 when not read. */
export function excessAtFinish(taps: readonly ProofTap[]): number {
  const offs = taps.map(({ readings }) => {
    const length = readings.find(
      ({ quantity, nominal, verdict }) => quantity === 'length' && nominal !== null && verdict !== 'implausible',
    );
    return length === undefined ? null : length.value - length.nominal!;
  });
  const end = offs.at(-1) ?? null;
  if (end === null) return 0;
  const before = offs.slice(0, -1).findLast((off) => off !== null) ?? 0;
  return end - before;
}

const outIn = (readings: readonly Judged[], quantity: Judged['quantity']) =>
  readings.filter((one) => one.quantity === quantity && isOut(one));

/** Sentences, the likeliest first; never empty. */
export function causesOf(
  record: CoilRecord,
  taps: readonly ProofTap[],
  seen: readonly Seen[],
  apart: readonly number[],
): string[] {
  const last = taps.length;
  const counted = taps.flatMap(({ tap, readings }) =>
    outIn(readings, 'turns').map(({ value, nominal }) => RESCUE.cause.counted(tap, value - nominal!)),
  );
  const { overallMm } = record.windings[0]!.wire;
  const excess = excessAtFinish(taps);
  const end = seen.at(-1);
  const loose =
    end !== undefined && end.index === last - 1 && end.percent < 0 && excess > LOOSE_WIRES * overallMm
      ? [RESCUE.cause.loose(fixed(excess, 1))]
      : [];
  const out = seen.some((one) => one.out);
  const same = out ? alike(seen) : [];
  const counting = loose.length > 0 ? seen.slice(0, -1) : seen;
  const turns = out && same.length === 0 ? turnCauses(counting, last) : [];
  const joints = taps.flatMap(({ tap, readings }) =>
    outIn(readings, 'resistance').map(({ verdict }) =>
      RESCUE.cause.resistance(RESCUE.where(tap, last), verdict === 'high'),
    ),
  );
  const wide = taps.flatMap(({ tap, readings }) =>
    outIn(readings, 'width').map(() => RESCUE.cause.wide(RESCUE.where(tap, last))),
  );
  const contrary = apart.map((index) => RESCUE.cause.apart(RESCUE.where(index + 1, last)));
  const causes = [
    ...counted.slice(0, 1),
    ...contrary,
    ...loose,
    ...turns,
    ...same,
    ...joints.slice(0, 1),
    ...wide.slice(0, 1),
  ];
  if (causes.length > 0 || !out) return causes;
  const outside = seen.filter((one) => one.out);
  if (outside.some(({ offTurns }) => Math.abs(offTurns) >= 0.5)) return [RESCUE.cause.unknown];
  return [
    RESCUE.cause.small(
      RESCUE.several(
        outside.map(({ index }) => index + 1),
        last,
      ),
    ),
  ];
}
