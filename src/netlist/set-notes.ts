/** What a person has to know to use the netlist of the whole set, as notes in it. */
import type { Contact } from '../around/response.ts';
import type { FiguresRecord } from '../record/survey-schema.ts';
import { note, plain } from './text.ts';

export interface SetActive {
  readonly hot: string;
  readonly position: number;
  readonly kHz: number;
  readonly aerial: Contact;
  readonly detector: Contact;
}

const contactWords = (at: Contact): string =>
  at === 'hot' ? 'the hot end' : at === 'second' ? 'the second winding' : at === 0 ? 'the start' : `tap ${at}`;

/** Whose set, what is connected where, what the nodes and parameters mean, how something else is chosen. */
export function setNotes(record: FiguresRecord, active: SetActive): string[] {
  const { around, program, windings, surroundings } = record;
  const { second = null, aerial = null, detector = null } = around ?? {};
  const units = (windings[0]!.unitTaps ?? []).length > 0;
  const paragraphs = [
    `Written by ${plain(program)}. The coil of coil.cir, whose notes tell its nodes, in the set: ${aerial === null ? 'no aerial, so that the source is coupled by 0.01 pF' : `aerial (${plain(aerial.kind)}) at ${contactWords(active.aerial)}`}; ${detector === null ? 'no detector, so that 1 Mohm stands for it' : `detector (${plain(detector.kind)}) at ${contactWords(active.detector)}`}; position ${active.position} tuned to ${active.kHz} kHz; rest of the turns ${surroundings.rest}.`,
    `Further nodes: source is where the aerial has its 1 V; contact is the end of the aerial that goes to the coil; det is the detector; ${active.hot} is the hot end with the tuning capacitor${second === null ? '' : '; second is the start of the second winding, its finish is earthed'}.`,
    second === null
      ? ''
      : `Second winding: ${plain(second.kind)}, ${second.turns} turns of ${plain(second.wire.name)}${second.slide === null ? '' : ', at its tightest place; kshare in proportion to its coupling for a looser one'}. kshare: its working coupling over that at low frequency, all stretches alike. lsecond and rsecond: its inductance and resistance.`,
    `Another position: put an asterisk before each line of the block of position ${active.position} that has none, and take one away from each line of the other block but its first. Every block holds the parameters of its position and its sweep.`,
    'Another contact: move the asterisk among the lines of the aerial, or of the detector. The tuning capacitor then is another: ccap of each block is for the contacts that are active here, and plan.json has the others as tuningPf of around.pairs. Resistances, shrink and the rest change little.',
    `shrink, spread, cstray, caerial, clead: as in coil.cir. ccap: the tuning capacitor alone. ohm1, ohm2, ...: resistance a turn from each tap to the next, at the frequency of the block. rformer: loss of the former.${units ? ' The units switch stands at the start.' : ''}`,
  ];
  return paragraphs.filter((text) => text !== '').flatMap((text) => ['*', ...note(text)]);
}
