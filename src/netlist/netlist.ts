/**
 * The tapped coil as a netlist for a general circuit simulator, in the card format that most of them read: `coil.cir`.
 * The circuit is that of the record's ranges: nodes at taps and turns, every stretch coupled to every other,
 * self-capacitance along the turns or at the open end, leads, the set's capacitor.
 */
import { FORMER_SHARE, formerShuntOhm } from '../coil/positions.ts';
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { capacitanceFor } from '../physics/tuning.ts';
import { workingCoilOf } from '../record/rebuild.ts';
import type { Tap } from '../record/schema.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { capacitanceCards, NodeNames, positionCards, unitCard, windingCards } from './circuit.ts';
import { headNotes, positionNotes } from './notes.ts';
import { shrinkOf } from './shrink.ts';
import { exact, plain } from './text.ts';

export interface NetlistOptions {
  /** Position that is active, counted from 1; the middle one when left out. */
  readonly position?: number;
  /** 1 along the turns (default), 0 all at the open end. */
  readonly spread?: 0 | 1;
}

/** The set's parts, F; without a set, one capacitor that tunes the position to the frequency that it is judged at. */
function tuningOf(record: FiguresRecord, tap: Tap): Record<'ccap' | 'cstray' | 'caerial', number> {
  const { set } = record.demand;
  if (set !== null) {
    return { ccap: set.capacitorHighPf * 1e-12, cstray: set.strayPf * 1e-12, caerial: set.aerialPf * 1e-12 };
  }
  const ccap = capacitanceFor(tap.working.frequencyKhz * 1e3, tap.working.inductanceUh * 1e-6);
  return { ccap, cstray: 0, caerial: 0 };
}

/** A resistance across the set that loses what the former does at the working frequency. */
function formerCard(record: FiguresRecord, coil: WorkingCoil, tap: Tap, hot: string): string[] {
  const { formerLossTangent } = record.surroundings;
  const { frequencyKhz, inductanceUh } = tap.working;
  const shunt = formerShuntOhm(inductanceUh, coil.coil.selfPf(tap.turn), formerLossTangent, frequencyKhz);
  if (!Number.isFinite(shunt)) return [];
  return [
    `* loss of the former: ${FORMER_SHARE * 100} percent of the self-capacitance has its loss tangent`,
    `Rformer ${hot} 0 ${exact(shunt)}`,
  ];
}

/** From well below the active position's resonance to well above, kHz. */
function sweepOf(tap: Tap): { fromKhz: number; toKhz: number } {
  const { range, working } = tap;
  return {
    fromKhz: 0.7 * (range?.lowKhz ?? working.frequencyKhz),
    toKhz: 1.3 * (range?.highKhz ?? working.frequencyKhz),
  };
}

/** The block of the units switch; with turns shorted or cut off, only its contact at the start is offered. */
function unitLines(coil: WorkingCoil, names: NodeNames, rest: Rest): string[] {
  if (names.nodeOfUnit.length === 0) return [];
  const offered = rest === 'open' ? names.nodeOfUnit : names.nodeOfUnit.slice(0, 1);
  const cards = offered.map((_, unit) => `${unit === 0 ? '' : '*'}${unitCard(coil, names, unit)}`);
  return ['', '* ---- contact of the units switch: one line is active', ...cards];
}

/** Whole text of the file. RangeError for a position that the coil has not. */
export function netlistOf(record: FiguresRecord, options: NetlistOptions = {}): string {
  const coil = workingCoilOf(record);
  const { rest } = record.surroundings;
  const taps = record.windings[0]!.taps;
  const position = options.position ?? Math.ceil(taps.length / 2);
  const tap = taps[position - 1];
  if (tap === undefined) throw new RangeError(`position ${position} is not one of ${taps.length}`);
  const { winding } = coil.circuit(coil.coil.turns, 0, rest);
  const names = new NodeNames(winding, coil, rest);
  const { ccap, cstray, caerial } = tuningOf(record, tap);
  const { fromKhz, toKhz } = sweepOf(tap);
  const ohm = coil.turnOhm(coil.taps[tap.tap - 1]!, tap.working.frequencyKhz, rest);
  const lines = [
    `* ${plain(record.job)} - tapped coil, record ${plain(record.hash, 16)}`,
    ...headNotes(record, names.hot, position),
    '',
    `.param shrink=${exact(shrinkOf(record, tap, 'middle'))}`,
    `.param spread=${options.spread ?? 1}`,
    `.param ccap=${exact(ccap)}`,
    `.param cstray=${exact(cstray)}`,
    `.param caerial=${exact(caerial)}`,
    `.param clead=${exact(coil.around.leadPf * 1e-12)}`,
    '',
    '* ---- positions: one block is active, the lines of the others begin with an asterisk',
    ...taps.flatMap((one) => [
      `* position ${one.tap}${positionNotes(record, one)}`,
      ...positionCards(coil, names, one.tap, rest).map((card) => (one.tap === position ? card : `*${card}`)),
    ]),
    '* end of positions',
    ...unitLines(coil, names, rest),
    '',
    '* ---- the set: one ampere into it, so that the voltage at the node is the impedance in ohm',
    `Iset 0 ${names.hot} DC 0 AC 1`,
    `Cset ${names.hot} 0 {ccap+cstray+caerial}`,
    ...formerCard(record, coil, tap, names.hot),
    '',
    '* ---- self-capacitance along the turns; leads and switch contacts of the taps',
    ...capacitanceCards(coil, names),
    '',
    '* ---- the winding: inductance and resistance of each stretch, couplings between all of them',
    ...windingCards(winding, names, (from, to) => exact((to - from) * (to <= tap.turn + 1e-9 ? ohm.used : ohm.dead))),
    '',
    `.ac lin 2001 ${exact(fromKhz * 1e3)} ${exact(toKhz * 1e3)}`,
    `.save v(${names.hot})`,
    `.meas ac impedance MAX vm(${names.hot})`,
    `.meas ac resonance MAX_AT vm(${names.hot})`,
    '.end',
  ];
  return `${lines.join('\n')}\n`;
}
