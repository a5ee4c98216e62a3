/** The netlist as a file of the output folder. */
import type { OutputFile } from '../record/listing.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { netlistOf } from './netlist.ts';

export function netlistFile(record: FiguresRecord): OutputFile {
  const bytes = new TextEncoder().encode(netlistOf(record));
  return { path: 'coil.cir', kind: 'netlist', bytes, note: 'the coil for a circuit simulator' };
}
