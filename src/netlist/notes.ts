/** What a person has to know to use the netlist, as notes in it. */
import type { Tap } from '../record/schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { shrinkOf } from './shrink.ts';
import { note, plain } from './text.ts';

const hz = (kHz: number) => `${kHz.toFixed(1)} kHz`;

/** Whose coil, what the nodes are, what the parameters mean, how another position is chosen. */
export function headNotes(record: FiguresRecord, hot: string, position: number): string[] {
  const { frame, surroundings, program, windings } = record;
  const winding = windings[0]!;
  const last = winding.taps.length;
  const units = (winding.unitTaps ?? []).length > 0;
  const startEarthed = frame.earthedEnd === 'start';
  const paragraphs = [
    `Written by ${plain(program)}. Coil of ${winding.turns} turns of ${plain(winding.wire.name)}, ${winding.meanDiameterMm} mm between wire centres, ${frame.hand} hand, start at the lower end, ${frame.earthedEnd} earthed, rest of the turns ${surroundings.rest}.`,
    `Nodes: 0 is earth${startEarthed && !units ? ' and the start S' : ''}; ${startEarthed || units ? '' : 's is the start S; '}t1 to t${last - 1} are the taps by number; f is the finish F, the last position; ${units ? 'n1, n2, ... are the contacts of the units switch and s the start; ' : ''}u and a number is the wire at that turn from the start; x and a number lies within a stretch; ${hot} is where the set is connected.`,
    surroundings.rest === 'disconnected' ? 't1d, t2d, ... are the far sides of the breaks at the taps.' : '',
    `Another position: put an asterisk before each line of the block of position ${position}, take it away from those of the other, and set shrink to its value. Resistances are those of position ${position} in use at ${hz(winding.taps[position - 1]!.working.frequencyKhz)}; they hardly move a resonance.`,
    'shrink: working inductance over low-frequency inductance, by crowding of the current. spread: 1 lays the self-capacitance along the turns, 0 puts all of it at the open end; the truth lies between, and the record states the mean. ccap: the tuning capacitor, here all in; cstray, caerial: with it across the position; clead: lead and contact of each tap to earth.',
  ];
  return paragraphs.filter((text) => text !== '').flatMap((text) => ['*', ...note(text)]);
}

/** Turns, range and shrink of a position, behind its number. */
export function positionNotes(record: FiguresRecord, tap: Tap): string {
  const shrink = (at: 'low' | 'middle' | 'high') => shrinkOf(record, tap, at).toFixed(7);
  const { range, working } = tap;
  const tuned =
    range === null
      ? ''
      : `, low ${hz(range.lowKhz)} shrink ${shrink('low')}, high ${hz(range.highKhz)} shrink ${shrink('high')}`;
  return `: turns 0 to ${tap.turn}, working ${hz(working.frequencyKhz)} shrink ${shrink('middle')}${tuned}`;
}
