/** What a person should know before winding that no figure shows. */
import type { Job } from '../job/job.ts';
import type { Possible } from '../parts/parts.ts';
import { strandLossValid } from '../physics/loss.ts';
import { selfCapacitanceValid } from '../physics/medhurst.ts';
import { ringsValid } from '../physics/ring-sum.ts';
import { tidy } from '../quantity/format.ts';
import type { Candidate } from '../solve/candidates.ts';
import type { Found } from '../solve/search.ts';
import type { CoilRecord, Former } from './schema.ts';

type Warning = CoilRecord['warnings'][number];

/** A tap farther off than this is pointed out. */
const FAR_OFF = 0.01;
/** A pitch may be this far off whole layers: as far as a free pitch is stretched for the inductance. */
const UNEVEN_LAYERS = 0.11;

/** Said where the turns climb too steeply to be counted as rings. */
export const steepText = (pitch: string, diameter: string): string =>
  `The pitch of ${pitch} is more than a tenth of the diameter, ${diameter}: turns count as flat rings, which was tried up to a tenth (0.2 % off there); inductance and what follows from it may be off by more.`;

/** Gaps that no position tunes, and second resonances that let strong signals through. */
function coverageWarnings(coverage: CoilRecord['coverage']): Warning[] {
  if (coverage === null) return [];
  const gaps = coverage.gaps.map(({ from, to, lowKhz, highKhz, tapsToClose }) => ({
    code: 'gap',
    text: `Nothing tunes ${lowKhz.toFixed(0)} to ${highKhz.toFixed(0)} kHz between positions ${from} and ${to}: ${tapsToClose} more ${tapsToClose === 1 ? 'tap closes' : 'taps close'} the gap.`,
  }));
  const near = coverage.deadEnds.map(({ tap, secondKhz }) => `${tap} (${secondKhz.toFixed(0)} kHz)`);
  if (near.length === 0) return gaps;
  const text = `Dead turns resonate on their own near what the switch tunes, at position ${near.join(', ')}: strong signals there come through. Shorting the dead turns in sections or cutting them off moves that away.`;
  return [...gaps, { code: 'dead-end-resonance', text }];
}

/** What becomes of the winding where a former is put together. */
function sectionsText({ printer }: Job, { joints, lengthMm }: Former, close: boolean): string {
  const turns = joints.some(({ turn }) => turn !== null);
  const runs = turns
    ? `Every seam among the turns runs midway between two of them${close ? ', under the line where they touch' : ''}, and the wire crosses it once, at its step`
    : 'No seam lies under the winding';
  return `The former is ${lengthMm} mm long and the printer takes ${printer.heightMm} mm: it is glued from ${joints.length + 1} sections. ${runs}. An edge that stands proud lifts a turn, a joint that is not closed widens one pitch.`;
}

export function warningsOf(job: Job, found: Found, alternatives: number, coverage: CoilRecord['coverage']): Warning[] {
  const { chosen } = found;
  const { coil, taps, candidate, former, layout } = chosen;
  const list: Warning[] = [];
  const add = (code: string, text: string) => list.push({ code, text });
  add(
    'q-is-unloaded',
    'Q is that of the coil alone, dead turns and an estimate of the former’s loss counted; aerial and detector load it further.',
  );
  list.push(...coverageWarnings(coverage));
  if (layout === 'staggered' && job.winding.tapLayout === 'auto')
    add(
      'taps-staggered',
      'Taps do not clear one another in one line: they stand at angles, and the fractions of a turn are counted in.',
    );
  const { unitTaps } = chosen;
  const beside = Math.max(0, ...unitTaps.map((turn) => Math.abs(turn - Math.round(turn))));
  if (beside > 0)
    add(
      'units-beside-their-turns',
      `Unit taps stand up to ${beside.toFixed(3)} of a turn beside their whole turns, as they would touch in one line: the inductances of the settings are those of the taps where they stand.`,
    );
  const off = taps
    .map((tap, index) => ({ tap: index + 1, deviation: tap.deviation }))
    .filter(({ deviation }) => Math.abs(deviation) > FAR_OFF);
  if (off.length > 0) {
    const which = off
      .map(({ tap, deviation }) => `${tap} (${deviation > 0 ? '+' : ''}${(deviation * 100).toFixed(1)} %)`)
      .join(', ');
    const cure = layout === 'in line' ? '; `tap-layout: staggered` under `winding` brings them nearer' : '';
    add('taps-off-target', `Nearest places are more than 1 % off target at tap ${which}${cure}.`);
  }
  const ratio = coil.woundMm(coil.turns) / coil.equivalentDiameterMm;
  if (!selfCapacitanceValid(ratio))
    add(
      'self-capacitance-outside-table',
      `Length over diameter is ${ratio.toFixed(2)}; Medhurst’s table of self-capacitance runs from 0.1 to 50, its end value is used.`,
    );
  const { pitchMm, meanDiameterMm } = coil.shape;
  if (!ringsValid(pitchMm / 1e3, meanDiameterMm / 1e3))
    add('turns-steep', steepText(`${+pitchMm.toFixed(3)} mm`, `${+meanDiameterMm.toFixed(2)} mm`));
  const fastest = Math.max(...taps.map((tap) => tap.workingKhz));
  if (candidate.wire.strands > 1 && !strandLossValid(candidate.wire.strandMm / 1e3, fastest * 1e3))
    add(
      'strands-thick',
      `Strands of ${candidate.wire.strandMm} mm are thicker than 1.5 skin depths at ${fastest.toFixed(0)} kHz: the loss of litz is overstated there.`,
    );
  if (/estimated|memory/i.test(candidate.wire.status))
    add(
      'wire-table-status',
      `Diameters of ${candidate.wire.name}: ${candidate.wire.status}. Measure the wire at hand.`,
    );
  if (former.kind === 'printed') add('former-shrinks', `${former.stiffness}.`);
  if (former.joints.length > 0) add('former-in-sections', sectionsText(job, former, candidate.pitch.kind === 'close'));
  const layers = pitchMm / job.printer.layerMm;
  if (candidate.pitch.kind === 'groove' && Math.abs(layers - Math.round(layers)) > UNEVEN_LAYERS)
    add(
      'pitch-uneven-layers',
      `A pitch of ${+pitchMm.toFixed(3)} mm is ${layers.toFixed(2)} layers of ${job.printer.layerMm} mm: the edges of the groove fall unevenly from turn to turn. ${+(Math.round(layers) * job.printer.layerMm).toFixed(3)} mm is ${Math.round(layers)}.`,
    );
  if (job.asMade.diameterMm !== 0 || job.asMade.pitch !== 0) add('as-made', asMadeText(job, candidate.pitch.kind));
  if (former.kind === 'tube')
    add(
      'measure-the-tube',
      'A bought tube is rarely its nominal size: measure it across at three places and enter that.',
    );
  if (alternatives < 4)
    add(
      'few-alternatives',
      `Only ${alternatives} other coils within what the job permits are better in some respect; permit more wires, diameters or pitches to see others.`,
    );
  return list;
}

/** What the bench makes of a plan, which the figures count on. */
function asMadeText({ asMade }: Job, kind: Candidate['pitch']['kind']): string {
  const { diameterMm, pitch } = asMade;
  const signed = (value: number, unit: string) => `${value > 0 ? '+' : ''}${tidy(value, 4)} ${unit}`;
  const diameter = diameterMm === 0 ? [] : [`mean diameter ${signed(diameterMm, 'mm')}`];
  const laid = pitch === 0 || kind === 'groove' ? [] : [`pitch ${signed(100 * pitch, '%')}`];
  const counted = [...diameter, ...laid];
  const first = counted.length === 0 ? '' : `Worked out as this bench makes it (as-made): ${counted.join(', ')}.`;
  if (pitch === 0 || kind !== 'groove') return first;
  return `${first} The turns lie in a printed groove: as-made.pitch is not counted, the pitch follows printer.scale.`.trim();
}

/** Parts that would suit and cannot be made for this coil. */
export function leftOutWarnings(leftOut: Possible['leftOut']): Warning[] {
  return leftOut.map(({ kind, faults }) => {
    const [first] = faults;
    const why = first === undefined ? '' : `: ${first.got}; ${first.expected} would do. To have it, ${first.todo}`;
    return { code: 'part-left-out', text: `Not printed: ${kind}${why}.` };
  });
}
