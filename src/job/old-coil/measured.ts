/** From the file as read to an {@link OldCoil}: uncertainties filled in, other units turned into the ones that are used. */

import type { DiameterReading, OldCoil, OldSection, OldTap, OldWire, Reading } from '../../match/types.ts';
import { INDUCTANCE_FLOOR_UH, RESISTANCE_FLOOR_OHM, TAP_GAP_OF_WIRE, UNCERTAINTY } from '../../match/uncertainty.ts';
import { tidy } from '../../quantity/format.ts';
import { parseQuantity } from '../../quantity/parse.ts';
import type { FoundWire } from '../../stock/find.ts';
import type { Finding } from '../finding.ts';
import { finding } from '../finding.ts';
import type { ReceivingSet } from '../job.ts';
import type { Path } from '../tree.ts';
import type { Written } from './reading.ts';
import type { ReadOld, ReadOldFile } from './schema.ts';

type Key = keyof typeof UNCERTAINTY;

/** Uncertainties that were taken, by dotted key. */
export type Taken = Record<string, string>;

const share = (text: string): number | null => (text.endsWith('%') ? Number(text.replace(/ *%/, '')) / 100 : null);

/** The half width of a default, in the unit of the value. */
function halfOf(key: Key, value: number): number {
  const text = UNCERTAINTY[key];
  const part = share(text);
  if (part !== null) return part * Math.abs(value);
  const parsed = parseQuantity(text, text.endsWith('deg') ? 'angle' : 'length');
  return parsed.ok ? parsed.value : 0;
}

export interface Filling {
  readonly taken: Taken;
}

function filled({ taken }: Filling, written: Written, key: Key, path: string, floor = 0): Reading {
  if (written.uncertainty !== null) return { value: written.value, uncertainty: written.uncertainty };
  taken[`${path}.uncertainty`] = floor > 0 ? `${UNCERTAINTY[key]} and ${floor} of its unit` : UNCERTAINTY[key];
  return { value: written.value, uncertainty: halfOf(key, written.value) + floor };
}

const optional = (into: Filling, written: Written | undefined, key: Key, path: string, floor = 0): Reading | null =>
  written === undefined ? null : filled(into, written, key, path, floor);

const inverse = ({ value, uncertainty }: Reading, mm: number): Reading => ({
  value: mm / value,
  uncertainty: (mm / value) * (uncertainty / value),
});

function diametersOf(old: ReadOld, into: Filling): DiameterReading[] {
  const of = (key: string, list: readonly Written[] | undefined, what: DiameterReading['of'], round: boolean) =>
    (list ?? []).map((written, i): DiameterReading => {
      const path = `old.${key}${(list?.length ?? 0) > 1 ? `[${i + 1}]` : ''}`;
      const { value, uncertainty } = filled(into, written, round ? 'circumference' : 'diameter', path);
      const by = round ? Math.PI : 1;
      return {
        of: what,
        how: round ? 'circumference' : 'caliper',
        mm: { value: value / by, uncertainty: uncertainty / by },
      };
    });
  return [
    ...of('former-diameter', old['former-diameter'], 'former', false),
    ...of('former-circumference', old['former-circumference'], 'former', true),
    ...of('over-wire-diameter', old['over-wire-diameter'], 'over wire', false),
    ...of('over-wire-circumference', old['over-wire-circumference'], 'over wire', true),
    ...of('mean-diameter', old['mean-diameter'], 'mean', false),
  ];
}

function wireOf(old: ReadOld, into: Filling, faults: Finding[]): OldWire {
  const nothing = { named: null, covering: null, bareMm: null, overallMm: null, massG: null, lengthM: null };
  if ('wire' in old.wire) {
    const { wire, coveringAssumed } = old.wire as FoundWire;
    if (coveringAssumed) into.taken['old.wire'] = wire.name;
    return { ...nothing, named: wire, covering: wire.covering };
  }
  const group = old.wire;
  const counted = (['turns-per-inch', 'turns-per-cm'] as const).filter((key) => group[key] !== undefined);
  const overall = optional(into, group.overall, 'wire', 'old.wire.overall');
  const byCount = counted.map((key) =>
    inverse(filled(into, group[key]!, 'turns-per-inch', `old.wire.${key}`), key === 'turns-per-inch' ? 25.4 : 10),
  );
  if (byCount.length + (overall === null ? 0 : 1) > 1)
    faults.push(
      finding(
        'two-diameters',
        ['old', 'wire', counted[0]!],
        `${counted.join(' and ')}${overall === null ? '' : ' besides overall'}`,
        'one measure of the covered wire',
        'keep the one that was measured best',
      ),
    );
  return {
    ...nothing,
    covering: group.covering ?? null,
    bareMm: optional(into, group.bare, 'wire', 'old.wire.bare'),
    overallMm: overall ?? byCount[0] ?? null,
    massG: optional(into, group.weight, 'weight', 'old.wire.weight'),
    lengthM: optional(into, group.length, 'wire-length', 'old.wire.length'),
  };
}

function pitchOf(old: ReadOld, into: Filling, faults: Finding[]): OldCoil['pitchMm'] {
  const keys = (['pitch', 'turns-per-inch', 'turns-per-cm'] as const).filter((key) => old[key] !== undefined);
  if (keys.length > 1)
    faults.push(
      finding('two-pitches', ['old', keys[1]!], `${keys[1]} besides ${keys[0]}`, 'one of the two', 'remove one'),
    );
  const [key] = keys;
  if (key === undefined) return null;
  if (key === 'pitch') {
    const { pitch } = old;
    return pitch === 'close' || pitch === undefined ? (pitch ?? null) : filled(into, pitch, 'pitch', 'old.pitch');
  }
  return inverse(filled(into, old[key]!, 'turns-per-inch', `old.${key}`), key === 'turns-per-inch' ? 25.4 : 10);
}

type Electrical = Pick<OldTap, 'angleDeg' | 'inductance' | 'resonance' | 'resistanceOhm'>;

function electricalOf(
  tap: NonNullable<ReadOld['whole']>,
  path: string,
  meterKhz: number,
  into: Filling,
  faults: Finding[],
  at: Path,
): Electrical {
  const { inductance, resonance } = tap;
  let uh: Reading | null = null;
  if (inductance !== undefined) {
    const half = uncertaintyOf(inductance.uncertainty, inductance.value);
    if (half === null && inductance.uncertainty !== undefined)
      faults.push(
        finding(
          'uncertainty',
          [...at, 'inductance', 'uncertainty'],
          String(inductance.uncertainty),
          'an inductance or a percentage',
          'write 1 uH or 0.5 %',
        ),
      );
    const written = { value: inductance.value, uncertainty: half };
    uh = filled(into, written, 'inductance', `${path}.inductance`, INDUCTANCE_FLOOR_UH);
  }
  return {
    angleDeg: optional(into, tap.angle, 'angle', `${path}.angle`),
    inductance: uh === null || inductance === undefined ? null : { uh, kHz: inductance.at ?? meterKhz },
    resonance:
      resonance === undefined
        ? null
        : {
            kHz: filled(into, resonance.frequency, 'resonance', `${path}.resonance.frequency`),
            capacitorPf: filled(into, resonance.capacitor, 'capacitor', `${path}.resonance.capacitor`),
          },
    resistanceOhm: optional(into, tap.resistance, 'resistance', `${path}.resistance`, RESISTANCE_FLOOR_OHM),
  };
}

/** Null when it cannot be read. */
function uncertaintyOf(raw: unknown, value: number): number | null {
  if (raw === undefined || raw === null) return null;
  const text = String(raw);
  const part = parseQuantity(text, /%/.test(text) ? 'ratio' : 'inductance', { zero: true });
  return part.ok ? (/%/.test(text) ? part.value * value : part.value) : null;
}

const readingOfTurns = (written: Written | null | undefined): Reading | null =>
  written === undefined || written === null ? null : { value: written.value, uncertainty: written.uncertainty ?? 0 };

function tapsOf(file: ReadOldFile, into: Filling, faults: Finding[]): OldTap[] {
  const { old, meter } = file;
  const taps = (old.taps ?? []).map((tap, i): OldTap => {
    const path = `old.taps[${i + 1}]`;
    const at: Path = ['old', 'taps', i];
    const rest = electricalOf(tap, path, meter.frequency, into, faults, at);
    const found: OldTap = {
      name: tap.name ?? `${i + 1}`,
      turns: readingOfTurns(tap.turns),
      positionMm: optional(into, tap.position, 'position', `${path}.position`),
      ...rest,
    };
    const told = [found.turns, found.positionMm, rest.inductance, rest.resonance, rest.resistanceOhm].some(
      (one) => one !== null,
    );
    if (tap.lost === true && told)
      faults.push(
        finding('lost-tap', [...at, 'lost'], `tap ${found.name} lost, and measured`, 'one of the two', 'remove lost'),
      );
    if (tap.lost !== true && !told)
      faults.push(
        finding(
          'too-little',
          at,
          `tap ${found.name} without anything that tells its turns`,
          'turns, a position, an inductance, a resonance or a resistance',
          'add one of them, or write lost: then it is proposed from the others',
        ),
      );
    return found;
  });
  const whole: Electrical =
    old.whole === undefined
      ? { angleDeg: null, inductance: null, resonance: null, resistanceOhm: null }
      : electricalOf(old.whole, 'old.whole', meter.frequency, into, faults, ['old', 'whole']);
  return [...taps, { name: 'whole', turns: readingOfTurns(old.turns), positionMm: null, ...whole }];
}

interface Sections {
  readonly sections: readonly OldSection[];
  readonly taps: readonly OldTap[];
}

/** Counted sections tell the turns of the taps at which they end. */
function sectionsOf(old: ReadOld, taps: readonly OldTap[], into: Filling, faults: Finding[]): Sections {
  const list = old.sections ?? [];
  const told = [...taps];
  let from: number | null = 0;
  const count = (index: number, turns: number, path: Path) => {
    const known = told[index]!;
    if (known.turns === null) told[index] = { ...known, turns: { value: turns, uncertainty: 0 } };
    else if (known.turns.uncertainty === 0 && Math.abs(known.turns.value - turns) > 1e-6)
      faults.push(
        finding(
          'turns-of-sections',
          path,
          `${tidy(turns)} turns up to here by the sections, and ${tidy(known.turns.value)} counted`,
          'the same number',
          'count again, or leave one of the two out',
        ),
      );
  };
  const sections = list.map((section, s): OldSection => {
    const path: Path = ['old', 'sections', s];
    const key = `old.sections[${s + 1}]`;
    const last = s === list.length - 1;
    const tap = section['ends-at-tap'];
    if (!last && section.turns === undefined && tap === undefined)
      faults.push(
        finding(
          'missing-key',
          path,
          `section ${s + 1} without an end`,
          'turns, or ends-at-tap',
          'count its turns, or say at which tap it ends',
        ),
      );
    if (tap !== undefined && tap >= taps.length)
      faults.push(
        finding(
          'no-such-tap',
          [...path, 'ends-at-tap'],
          `tap ${tap} of ${taps.length - 1}`,
          'a tap of the list; the last section ends with the coil',
          'mend the number, or leave it out',
        ),
      );
    if (!last && section['gap-after'] === undefined)
      faults.push(
        finding(
          'missing-key',
          path,
          `section ${s + 1} of ${list.length} without a gap behind it`,
          'the clear distance to the next section',
          'add gap-after: 3 mm, or 0 mm where there is none',
        ),
      );
    if (!last && section.turns !== undefined && !Number.isInteger(section.turns))
      faults.push(
        finding(
          'part-turn',
          [...path, 'turns'],
          `${tidy(section.turns)} turns in section ${s + 1} of ${list.length}`,
          'whole turns in all sections but the last',
          'count the crossing wire to the section before',
        ),
      );
    const atTap = tap === undefined ? undefined : taps[tap - 1];
    const counted = atTap?.turns?.uncertainty === 0 ? atTap.turns.value : null;
    from = section.turns !== undefined && from !== null ? from + section.turns : counted;
    if (from !== null && section.turns !== undefined) {
      if (last) count(taps.length - 1, from, [...path, 'turns']);
      else if (tap !== undefined && tap < taps.length) count(tap - 1, from, [...path, 'turns']);
    }
    return {
      turns: section.turns ?? null,
      endsAtTap: tap !== undefined && tap < taps.length && !last ? tap : null,
      pitchMm: optional(into, section.pitch, 'pitch', `${key}.pitch`),
      lengthMm: optional(into, section.length, 'length', `${key}.length`),
      gapAfterMm: last ? null : optional(into, section['gap-after'], 'gap', `${key}.gap-after`),
    };
  });
  return { sections, taps: told };
}

export interface MeasuredOld {
  readonly old: OldCoil;
  /** Uncertainties and other things taken, by dotted key. */
  readonly taken: Taken;
}

/** The old coil, or all that is wrong with it. */
export function measuredOld(file: ReadOldFile, set: ReceivingSet | null): MeasuredOld | Finding[] {
  const { old } = file;
  const faults: Finding[] = [];
  const into: Filling = { taken: {} };
  if (old.layers !== 'single')
    faults.push(
      finding(
        'more-than-a-layer',
        ['old', 'layers'],
        `a ${old.layers} winding`,
        'a single layer: inductance, capacitance and loss are summed over turns side by side, and turns on top of one another have several times the capacitance, which no formula here gives',
        'take off and measure each layer for itself, or have the coil measured whole',
      ),
    );
  const diameters = diametersOf(old, into);
  const wire = wireOf(old, into, faults);
  const pitchMm = pitchOf(old, into, faults);
  const all = tapsOf(file, into, faults);
  const { sections, taps } = sectionsOf(old, all, into, faults);
  if (sections.length > 0 && pitchMm !== null && pitchMm !== 'close')
    faults.push(
      finding(
        'key-with-sections',
        ['old', 'pitch'],
        'a pitch besides sections',
        'a pitch in each section, or pitch: close',
        'move it into the sections',
      ),
    );
  if (faults.length > 0) return faults;
  const thick = wire.overallMm?.value ?? wire.named?.overallMm ?? (wire.bareMm?.value ?? 0.5) * 1.1;
  const gap = old['tap-gap'];
  const tapGapMm: Reading =
    gap === undefined
      ? { value: 0, uncertainty: TAP_GAP_OF_WIRE * thick }
      : { value: gap.value, uncertainty: gap.uncertainty ?? halfOf('gap', gap.value) };
  if (gap === undefined) into.taken['old.tap-gap'] = `0 mm ± ${tidy(tapGapMm.uncertainty, 2)} mm, a tenth of the wire`;
  const selfCapacitance = share(UNCERTAINTY['self-capacitance']) ?? 0.15;
  if (taps.some((tap) => tap.inductance !== null || tap.resonance !== null))
    into.taken['old.self-capacitance'] = `by Medhurst and the dead turns, ± ${UNCERTAINTY['self-capacitance']}`;
  return {
    taken: into.taken,
    old: {
      diameters,
      wire,
      pitchMm,
      windingLengthMm: optional(into, old['winding-length'], 'length', 'old.winding-length'),
      sections,
      tapGapMm,
      taps,
      hand: old.hand,
      earthed: old.earthed,
      formerMaterial: old['former-material'],
      meterSystematic: file.meter.accuracy,
      selfCapacitance,
      band: old.band === undefined ? null : { lowKhz: old.band.low, highKhz: old.band.high },
      set,
      celsius: file.temperature,
    },
  };
}
