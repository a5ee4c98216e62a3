import type { Tap } from '../record/schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';

/** Share of the low-frequency inductance that is left at the working frequency of a position: crowding of the current. */
export function shrinkOf(record: FiguresRecord, tap: Tap, at: 'low' | 'middle' | 'high'): number {
  const { rest } = record.surroundings;
  // With turns shorted the working inductance holds their loop as well: the open switch tells the crowding alone.
  const open = record.switchKinds.find(({ kind }) => kind === 'open')?.positions.find((one) => one.tap === tap.tap);
  const loops = rest === 'shorted' || rest === 'shorted in sections';
  if (loops && open !== undefined) return open.inductanceUh / tap.inductanceUh;
  const end = tap.ends.find((one) => one.at === at);
  return (end ?? tap.working).inductanceUh / tap.inductanceUh;
}
