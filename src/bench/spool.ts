/** Wire on the coil, on the spool, and still needed. Metres. */
import type { Count, SpoolState, Stop } from './api.ts';
import { type CountedRecord, turnOf } from './counter.ts';

/**
 * Wire from the start hole to where the wire is, loops of the taps that are made included. Between two taps wire goes evenly
 * with turns: their pitch changes its length by less than a thousandth.
 */
export function wireUsedM(record: CountedRecord, stops: readonly Stop[], count: Count): number {
  const { loopM } = record.tapMethod;
  const turn = turnOf(stops, count);
  let [fromTurn, fromM] = [0, 0];
  for (const [i, stop] of stops.entries()) {
    if (stop.kind === 'check') continue;
    if (i >= count.done) {
      const share = stop.turn > fromTurn ? (turn - fromTurn) / (stop.turn - fromTurn) : 0;
      return fromM + Math.max(0, share) * (stop.wireM - fromM);
    }
    fromTurn = stop.turn;
    fromM = stop.wireM + (stop.kind === 'finish' ? 0 : loopM);
  }
  return fromM;
}

/** `spoolM`: what the spool held before anything was taken off it, both ends included; null: not known. */
export function spoolAt(
  record: CountedRecord,
  stops: readonly Stop[],
  count: Count,
  spoolM: number | null,
): SpoolState {
  const endM = record.windings[0]!.leadsM / 2;
  const usedM = wireUsedM(record, stops, count);
  const wholeM = stops.at(-1)?.wireM ?? 0;
  const neededM = Math.max(0, wholeM - usedM) + endM;
  const leftM = spoolM === null ? null : spoolM - endM - usedM;
  return { usedM, neededM, leftM, lackM: leftM === null ? null : Math.max(0, neededM - leftM) };
}
