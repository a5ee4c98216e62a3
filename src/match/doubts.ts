/** Old coils that cannot be inferred: too little was measured, or what was measured cannot be of one single-layer winding. */
import { Fault, type FaultParts } from '../fault.ts';
import { frequencyText, lengthText, percentText, tidy } from '../quantity/format.ts';
import { nameOf } from './contradictions.ts';
import { figure, type Solved, spreadsOf } from './figures.ts';
import { nextMeasurements } from './next.ts';
import type { LostTap } from './patterns.ts';
import { BOUND, type Problem, tapKey } from './problem.ts';
import { resonantKhz } from './readings.ts';
import type { State } from './state.ts';
import type { OldCoil } from './types.ts';

/** A limit this wide, half over value, is no answer. */
const WIDEST = 0.35;
/** A figure whose limits are still this part of the bound that keeps it within reason was not measured by anything. */
const UNBOUND = 0.5;

/** What each kind of reading would do, for a coil of which nothing else is known. */
const ADDITIONS = {
  diameter: 'old.former-diameter: 76 mm (or a circumference, or the diameter over the wire)',
  wire: 'old.wire: its bare or overall diameter, or its name',
  pitch: 'old.pitch, old.turns-per-inch, or old.winding-length with the turns of the whole coil',
  turns: 'old.turns, or old.winding-length with a pitch, or old.whole with an inductance or a resistance',
};

/** A fault when too little is known to decide; null when it is enough. */
export function tooLittle(problem: Problem, untold: readonly number[], solved: null, lost?: readonly LostTap[]): Fault;
export function tooLittle(problem: Problem, untold: readonly number[], solved: Solved): Fault | null;
export function tooLittle(
  problem: Problem,
  untold: readonly number[],
  solved: Solved | null,
  lost: readonly LostTap[] = [],
): Fault | null {
  const { old, known } = problem;
  const parts: FaultParts[] = untold.map((t) => {
    const { index } = known[t]!;
    const whole = index === old.taps.length - 1;
    const key = `old.${tapKey(old, index)}`;
    return {
      code: 'too-little',
      place: { key: whole ? 'old.turns' : key },
      got: `${nameOf(problem, index)} without anything that tells its turns`,
      expected: whole ? ADDITIONS.turns : 'turns, a position, an inductance, a resonance or a resistance',
      todo: whole
        ? 'add one of them: each alone decides how long the coil is'
        : old.sections.some(({ endsAtTap }) => endsAtTap === index + 1)
          ? 'add one of them, or the length of the section that ends there'
          : 'add one of them, or write lost: then it is proposed from the others',
    };
  });
  for (const { index, name } of lost)
    parts.push({
      code: 'too-little',
      place: { key: `old.taps[${index + 1}]` },
      got: `tap ${name} lost, and ${known.length} other ${known.length === 1 ? 'tap' : 'taps'} known, the whole coil among them`,
      expected:
        'two taps or more whose turns are known, so that a pattern can be seen; or room for a turn between its neighbours',
      todo: 'add the turns or the place of another tap, or take this one out of the list',
    });
  if (solved !== null) parts.push(...vague(solved));
  if (parts.length === 0) return solved === null ? new Fault(3, nothing(old)) : null;
  return new Fault(3, parts);
}

const nothing = (old: OldCoil): FaultParts => ({
  code: 'too-little',
  place: { key: 'old' },
  got: `${old.taps.length} taps whose measurements do not tie the coil down`,
  expected: [ADDITIONS.diameter, ADDITIONS.wire, ADDITIONS.pitch].join('; '),
  todo: 'add the measurements that are easiest to make',
});

function vague(solved: Solved): FaultParts[] {
  const { problem, state } = solved;
  const figures = [
    { name: 'diameter', text: 'mean diameter', row: figure((s) => s.measures.meanMm) },
    { name: 'pitch', text: 'pitch', row: figure((s) => s.measures.pitchMm[0]!) },
    { name: 'wire', text: 'wire', row: figure((s) => s.measures.overallMm) },
  ] as const;
  const inductances = spreadsOf(
    solved,
    problem.known.map((_, t) => figure((s) => s.inductanceUh(s.turns[t]!), t, true)),
  );
  const widths = inductances.map(({ value, sigma, shifts }) => {
    const weights = solved.candidates.map((one) => one.weight);
    const mean = weights.reduce((sum, w, i) => sum + w * shifts[i]!, 0);
    const by = weights.reduce((sum, w, i) => sum + w * (shifts[i]! - mean) ** 2, 0);
    return (1.96 * Math.sqrt(sigma ** 2 + by)) / value;
  });
  const widest = Math.max(...widths);
  if (widest < WIDEST) return [];
  const t = widths.indexOf(widest);
  const missing = spreadsOf(
    solved,
    figures.map(({ row }) => row),
  ).flatMap(({ value, sigma }, i) => (sigma > UNBOUND * BOUND * value ? [figures[i]!] : []));
  const next = nextMeasurements(solved, inductances);
  const gains = next.map(({ key, text, thenPercent }) => `${key} (${text}): to ± ${tidy(thenPercent, 2)} %`);
  return [
    {
      code: 'too-little',
      place: { key: 'old' },
      got: `the inductance of ${nameOf(problem, problem.known[t]!.index)} only to ± ${percentText(widest)}, about ${tidy(inductances[t]!.value, 3)} µH${missing.length === 0 ? '' : `; nothing tells the ${missing.map(({ text }) => text).join(', the ')} (${lengthText(state.measures.meanMm)} on a guess)`}`,
      expected:
        missing.length === 0
          ? `measurements that bring it within ± ${percentText(WIDEST)}`
          : missing.map(({ name }) => ADDITIONS[name]).join('; '),
      todo: gains.length === 0 ? 'add two of the measurements at once' : `add one: ${gains.join('; ')}`,
    },
  ];
}

/** Slack of turns that lie closer than their covering, part of it: cotton gives way. */
const GIVES = 0.85;

/** Throws for what no single-layer winding can show, whatever the uncertainty. */
export function refuseImpossible(old: OldCoil): void {
  const parts: FaultParts[] = [];
  const ordered = (what: 'turns' | 'positionMm', unit: string, key: string) => {
    let before: { name: string; value: number } | null = null;
    old.taps.forEach((tap, index) => {
      const reading = tap[what];
      if (reading === null) return;
      if (before !== null && reading.value + reading.uncertainty < before.value)
        parts.push({
          code: 'not-ascending',
          place: { key: `old.${tapKey(old, index)}.${key}` },
          got: `${tidy(reading.value)} ${unit} at ${index === old.taps.length - 1 ? 'the whole coil' : `tap ${tap.name}`}, behind ${tidy(before.value)} ${unit} at tap ${before.name}`,
          expected: 'taps in their order from the start',
          todo: 'sort the taps, or check the two numbers',
        });
      before = { name: tap.name, value: reading.value };
    });
  };
  ordered('turns', 'turns', 'turns');
  ordered('positionMm', 'mm', 'position');
  const wire = old.wire.overallMm?.value ?? old.wire.bareMm?.value ?? old.wire.named?.overallMm ?? null;
  const turns = old.taps[old.taps.length - 1]?.turns?.value ?? null;
  const length = old.windingLengthMm;
  if (wire !== null && turns !== null && length !== null && old.sections.length === 0) {
    const least = turns * wire * GIVES;
    if (length.value + length.uncertainty < least) {
      const layers = (turns * wire) / length.value;
      parts.push({
        code: 'more-than-a-layer',
        place: { key: 'old.winding-length' },
        got: `${tidy(turns)} turns of ${lengthText(wire, 3)} wire in ${lengthText(length.value)}, ${tidy(layers, 3)} layers of it`,
        expected: `a single layer: ${lengthText(turns * wire)} or more, or at most ${Math.floor(length.value / wire)} turns`,
        todo: 'check turns, wire and length; multilayer and bank windings are outside the formulas that this program rests on',
      });
    }
  }
  if (
    wire !== null &&
    old.pitchMm !== null &&
    old.pitchMm !== 'close' &&
    old.pitchMm.value + old.pitchMm.uncertainty < wire * GIVES
  )
    parts.push({
      code: 'pitch-below-wire',
      place: { key: 'old.pitch' },
      got: `a pitch of ${lengthText(old.pitchMm.value, 4)} for wire of ${lengthText(wire, 3)}`,
      expected: 'a pitch no less than the wire over its covering',
      todo: 'measure over many turns and divide; check the diameter of the wire',
    });
  for (const { of, mm } of old.diameters) {
    const former = wire === null ? mm.value : mm.value - { former: 0, mean: 1, 'over wire': 2 }[of] * wire;
    if (wire !== null && former < 2 * wire) {
      parts.push({
        code: 'wire-too-thick',
        place: { key: 'old.wire' },
        got: `wire of ${lengthText(wire, 3)} on a form of ${lengthText(Math.max(0, former), 3)}`,
        expected: `a wire no thicker than half the form, ${lengthText(Math.max(0, former) / 2, 3)}`,
        todo: 'check both diameters and their units',
      });
      break;
    }
  }
  if (parts.length > 0) throw new Fault(3, parts);
}

/** A meter this near to the coil's own resonance, in inductance shown over inductance, no longer tells it. */
const MOST_RAISED = 2;

/** A fault for an inductance read near or above the own resonance of the coil; null when none was. */
export function tooNearResonance({ old, known, atWork }: Problem, state: State): Fault | null {
  const parts = known.flatMap(({ tap, index }, t): FaultParts[] => {
    const work = atWork.get(`${tapKey(old, index)}.inductance`);
    if (tap.inductance === null || work === undefined) return [];
    const { kHz } = tap.inductance;
    const uh = state.inductanceUh(state.turns[t]!) * work.crowded;
    const own = resonantKhz(uh, 0, { crowded: 1, ownPf: work.ownPf });
    if (!(work.ownPf > 0) || (kHz / own) ** 2 < 1 - 1 / MOST_RAISED) return [];
    return [
      {
        code: 'meter-near-resonance',
        place: { key: `old.${tapKey(old, index)}.inductance` },
        got: `an inductance read at ${frequencyText(kHz)} on ${index === old.taps.length - 1 ? 'the whole coil' : `tap ${tap.name}`}, which resonates by itself at about ${frequencyText(own)}`,
        expected: `a meter at ${frequencyText(own / 4)} or less`,
        todo: 'check the frequency of the meter, or read at a lower one; or give the resonance with a known capacitor',
      },
    ];
  });
  return parts.length === 0 ? null : new Fault(3, parts);
}
