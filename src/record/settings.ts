/** What the two switches of a two-switch coil set: a row for each tens contact, with every unit. */
import { type Conditions, endOf, type Position, type Span } from '../coil/positions.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import { decimals, significant } from './rounding.ts';
import type { Setting } from './schema.ts';

export interface SettingRow {
  readonly setting: Setting;
  /** From the lower edge of unit 0 to the upper edge of the last unit; null without a set. */
  readonly span: Span | null;
}

/** One row a position (the tens contacts with unit 0), none for one switch. Units are a turn apart, tens as many as there are units. */
export function settingsOf(coil: WorkingCoil, positions: readonly Position[], conditions: Conditions): SettingRow[] {
  if (coil.unitTaps.length === 0) return [];
  const from = [0, ...coil.unitTaps];
  const units = from.length;
  const table = coil.taps.map((to) => from.map((start) => coil.inductanceUh(start, to)));
  return positions.map((position, i) => {
    const inductances = table[i]!;
    const below = table[i - 1]?.[0];
    const falling = below === undefined ? inductances : [...inductances, below];
    const step = Math.max(...falling.slice(1).map((uh, k) => falling[k]! / uh - 1));
    const { span, working } = position;
    const tuning = conditions.tuning;
    const all =
      span === null || tuning === null
        ? null
        : { low: span.low, high: endOf(coil, position.turn, tuning.outPf, conditions.rest, from[units - 1]) };
    const turnsMost = (i + 1) * units;
    const setting: Setting = {
      tens: i + 1,
      turnsLeast: turnsMost - units + 1,
      turnsMost,
      inductancesUh: inductances.map((uh) => significant(uh)),
      stepPercent: decimals(100 * step, 2),
      frequencyKhz: significant(working.kHz, 5),
      q: significant(working.q, 3),
      lowKhz: all === null ? null : significant(all.low.kHz, 5),
      highKhz: all === null ? null : significant(all.high.kHz, 5),
    };
    return { setting, span: all };
  });
}
