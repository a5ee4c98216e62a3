/**
 * The whole set around a tapped coil as a netlist: `set.cir`. Coil, second winding, aerial with its source, detector and tuning
 * capacitor, at one frequency of the record's table. The same circuit as that of the table (`around/position.ts` and
 * `around/response.ts`), written from the record by itself: only the capacitance that tunes it is asked for there.
 */
import { aerialElements } from '../around/aerial.ts';
import { type Contact, type TunedTo, tunedTo } from '../around/response.ts';
import { secondSide } from '../around/second-side.ts';
import { type Arrangement, portsOf } from '../around/table.ts';
import { formerShuntOhm } from '../coil/positions.ts';
import { arrangementOf, NO_AERIAL, setOf } from '../record/around-arrangement.ts';
import type { Around } from '../record/around-schema.ts';
import type { OutputFile } from '../record/listing.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { capacitanceCards, NodeNames, positionCards, unitCard, windingCards } from './circuit.ts';
import { aerialCards, contactLines, detectorCards, placesOf, secondCards, secondHenry } from './set-cards.ts';
import { setNotes } from './set-notes.ts';
import { exact, plain } from './text.ts';

export interface SetNetlistOptions {
  /** Position that is active, counted from 1; that of the middle row of the contacts when left out. */
  readonly position?: number;
  /** What the active position is tuned to; a row of the contacts when left out. */
  readonly kHz?: number;
  /** Contacts; those of the balanced pair when left out. */
  readonly aerial?: Contact;
  readonly detector?: Contact;
}

/** Contacts that are active and what the record's table says of them. */
interface Chosen {
  readonly aerial: Contact;
  readonly detector: Contact;
  readonly rows: Around['pairs'][number]['rows'];
}

function chosenOf(around: Around, options: SetNetlistOptions): Chosen {
  const { aerialAt, detectorAt } = arrangementOf(around);
  const aerial = options.aerial ?? aerialAt ?? 'hot';
  const detector = options.detector ?? detectorAt ?? 'hot';
  const pair = around.pairs.find((one) => (one.aerial ?? 'hot') === aerial && one.detector === detector);
  return { aerial, detector, rows: pair?.rows ?? [] };
}

const middle = <T>(list: readonly T[]): T | undefined => list[Math.floor((list.length - 1) / 2)];

/** Where a position is tuned to: a row of the contacts, else the middle of its range in the set, else where it is judged. */
function frequencyOf(record: FiguresRecord, chosen: Chosen, position: number): number {
  const rows = chosen.rows.filter(({ tap }) => tap === position);
  const row = middle(rows.filter(({ dead }) => !dead)) ?? middle(rows);
  if (row !== undefined) return row.kHz;
  const range = record.around!.ranges.find(({ tap }) => tap === position);
  if (range && range.lowKhz !== null && range.highKhz !== null) return Math.sqrt(range.lowKhz * range.highKhz);
  return record.windings[0]!.taps[position - 1]!.working.frequencyKhz;
}

/** How far the sweep goes either way at most and at least, of the frequency. */
const SWEEP = { least: 0.02, most: 0.6 } as const;

interface Tuned {
  readonly kHz: number;
  readonly ccapPf: number;
  readonly words: string;
  readonly tuned: TunedTo | null;
}

/** The capacitor within what it has; words tell where that does not tune the position. */
function tuneTo(set: Arrangement, chosen: Chosen, turn: number, kHz: number): Tuned {
  const connected = {
    aerial: { at: chosen.aerial, source: set.source },
    detector: { at: chosen.detector, load: set.load },
  };
  const tuned = tunedTo(portsOf(set, turn, kHz), connected, kHz);
  const least = set.capacitorLowPf;
  if (tuned === null) return { kHz, ccapPf: least, words: ' where a contact is on earth', tuned };
  const wanted = tuned.tuningPf - set.strayPf;
  const ccapPf = Math.min(Math.max(wanted, least), set.capacitorHighPf);
  const words =
    ccapPf === wanted
      ? ` tuned to ${kHz.toFixed(1)} kHz`
      : ` at ${kHz.toFixed(1)} kHz, which the capacitor does not reach`;
  return { kHz, ccapPf, words, tuned: ccapPf === wanted ? tuned : null };
}

/** Parameters of a position where it is tuned, and the sweep. */
function positionParams(set: Arrangement, turn: number, { kHz, ccapPf, tuned }: Tuned): string[] {
  const { coil, rest, lossTangent, second } = set;
  const side = second === null ? null : secondSide(second.pair, turn, kHz, second.permittivity);
  const shrink = 1 / coil.crowding(turn, kHz);
  const { used, dead } = coil.turnOhm(turn, kHz, rest);
  const { inductanceUh } = coil.terminal(turn, kHz, 'open');
  const rformer = formerShuntOhm(inductanceUh, coil.coil.selfPf(turn), lossTangent, kHz);
  const params: [name: string, value: number][] = [
    ['ccap', ccapPf * 1e-12],
    ['shrink', shrink],
    ...coil.taps.map((tap, k): [string, number] => [
      `ohm${k + 1}`,
      tap <= turn + 1e-9 ? used + (side?.added ?? 0) / turn : dead,
    ]),
    ...(Number.isFinite(rformer) ? [['rformer', rformer] as [string, number]] : []),
  ];
  if (side !== null) {
    const { turns } = coil.coil;
    const share = side.mutual(0, turns) / (second!.pair.mutualUh(0, turns) * 1e-6);
    const kshare = share * Math.sqrt(secondHenry(second!) / (shrink * side.inductance));
    params.push(['lsecond', side.inductance], ['rsecond', side.resistance], ['kshare', kshare]);
  }
  const reach = Math.min(Math.max(tuned === null ? SWEEP.most : 4 / tuned.q, SWEEP.least), SWEEP.most);
  return [
    ...params.map(([name, value]) => `.param ${name}=${exact(value)}`),
    `.ac lin 2001 ${exact(kHz * 1e3 * (1 - reach))} ${exact(kHz * 1e3 * (1 + reach))}`,
  ];
}

/** Whole text of the file. RangeError for a record without `around`, a position that the coil has not, or a contact that is not there. */
export function setNetlistOf(record: FiguresRecord, options: SetNetlistOptions = {}): string {
  const set = setOf(record);
  const { coil, rest, second, lossTangent } = set;
  const around = record.around!;
  const chosen = chosenOf(around, options);
  const { taps } = record.windings[0]!;
  const position =
    options.position ?? middle(chosen.rows.filter(({ dead }) => !dead))?.tap ?? Math.ceil(taps.length / 2);
  if (taps[position - 1] === undefined) throw new RangeError(`position ${position} is not one of ${taps.length}`);
  const { winding } = coil.circuit(coil.coil.turns, 0, rest);
  const names = new NodeNames(winding, coil, rest);
  const places = placesOf(coil, names, second !== null);
  for (const at of [chosen.aerial, chosen.detector])
    if (!places.some((place) => place.at === at)) throw new RangeError(`no contact ${at}`);
  const kHzOf = (of: number) =>
    of === position && options.kHz !== undefined ? options.kHz : frequencyOf(record, chosen, of);
  const { strayPf = 0, aerialPf = 0 } = record.demand.set ?? {};
  const lines = [
    `* ${plain(record.job)} - the set around the tapped coil, record ${plain(record.hash, 16)}`,
    ...setNotes(record, { hot: names.hot, position, kHz: kHzOf(position), ...chosen }),
    '',
    '.param spread=1',
    `.param cstray=${exact(strayPf * 1e-12)}`,
    `.param caerial=${exact(aerialPf * 1e-12)}`,
    `.param clead=${exact(coil.around.leadPf * 1e-12)}`,
    '',
    '* ---- positions: one block is active, the lines of the others begin with an asterisk',
    ...coil.taps.flatMap((turn, i) => {
      const tuned = tuneTo(set, chosen, turn, kHzOf(i + 1));
      const lines = [...positionParams(set, turn, tuned), ...positionCards(coil, names, i + 1, rest)];
      return [
        `* position ${i + 1}: turns 0 to ${turn},${tuned.words}`,
        ...lines.map((line) => (i + 1 === position ? line : `*${line}`)),
      ];
    }),
    '* end of positions',
    ...(names.nodeOfUnit.length === 0 ? [] : ['', '* ---- the units switch at the start', unitCard(coil, names, 0)]),
    '',
    '* ---- contact of the aerial: one line is active',
    ...contactLines('aerial', 'contact', places, chosen.aerial),
    '',
    '* ---- contact of the detector: one line is active',
    ...contactLines('detector', 'det', places, chosen.detector),
    '',
    '* ---- the aerial, with a source of one volt, so that the voltage at the detector is the gain',
    ...aerialCards(aerialElements(around.aerial ?? NO_AERIAL)),
    '',
    '* ---- the detector, and what it feeds',
    ...detectorCards(set.load),
    '',
    '* ---- the tuning capacitor, and what is always across it',
    `Ctune ${names.hot} 0 {ccap+cstray+caerial}`,
    ...(lossTangent > 0 ? [`Rformer ${names.hot} 0 {rformer}`] : []),
    '',
    '* ---- self-capacitance along the turns; leads and switch contacts of the taps',
    ...capacitanceCards(coil, names),
    ...(second === null
      ? []
      : ['', '* ---- the second winding, its couplings and its capacitance', ...secondCards(second, winding, names)]),
    '',
    '* ---- the main winding: inductance and resistance of each stretch, couplings between all of them',
    ...windingCards(winding, names, (from, to) => {
      const tap = coil.taps.findIndex((turn) => to <= turn + 1e-6);
      return `{${exact(to - from)}*ohm${tap + 1}}`;
    }),
    '',
    `.save v(det) v(${names.hot})`,
    '.meas ac gain MAX vm(det)',
    '.meas ac resonance MAX_AT vm(det)',
    '.end',
  ];
  return `${lines.join('\n')}\n`;
}

/** The set as a file of the output folder; none where the record has none. */
export function setNetlistFiles(record: FiguresRecord): OutputFile[] {
  if (record.around === undefined) return [];
  const bytes = new TextEncoder().encode(setNetlistOf(record));
  return [{ path: 'set.cir', kind: 'netlist', bytes, note: 'the coil in its set for a circuit simulator' }];
}
