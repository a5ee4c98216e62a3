/** Claims of a record on what every position does in the set: ranges by the plain circuit, coverage, curves, settings, switch kinds. */
import type { CoilRecord, Tap } from '../../src/record/schema.ts';
import { PlainCircuit, type Rest } from './circuit.ts';
import { type Claims, digit } from './claims.ts';
import type { PlainCoil } from './coil.ts';
import { ofUh } from './winding.ts';

/** A second resonance up to a third above the range is in the way. */
const NEAR_SECOND = 4 / 3;

/**
 * Root of low-frequency over working inductance, where the crowding of the current was worked out for the open coil, and how far a figure
 * at another frequency may stray from it.
 */
export function crowdingOf(record: CoilRecord, tap: Tap): { root: number; off: number } {
  const open = record.switchKinds.find(({ kind }) => kind === 'open')?.positions.find((one) => one.tap === tap.tap);
  const root = Math.sqrt(tap.inductanceUh / (open?.inductanceUh ?? tap.working.inductanceUh));
  return { root, off: 0.6 * Math.abs(root - 1) };
}

export function circuitOf(record: CoilRecord, coil: PlainCoil): PlainCircuit {
  const w = record.windings[0]!;
  return new PlainCircuit(
    coil,
    [...(w.unitTaps ?? []), ...w.taps].map(({ turn }) => turn),
  );
}

/** Resonance in the set, kHz, crowding left out. */
export function inSet(record: CoilRecord, circuit: PlainCircuit, turn: number, pf: number, rest: Rest, from = 0) {
  const w = record.windings[0]!;
  const taps = w.taps.map((tap) => tap.turn);
  const units = w.unitTaps?.length ? [0, ...w.unitTaps.map((tap) => tap.turn)] : [];
  return circuit.resonance({
    from,
    to: turn,
    earthed: record.frame.earthedEnd === 'start' ? 'from' : 'to',
    rest,
    taps: [...units, ...taps],
    selfF: w.selfCapacitancePf * 1e-12,
    tuningF: pf * 1e-12,
    strays: [...units, ...taps].map((at) => ({ turn: at, f: record.surroundings.leadPf * 1e-12 })),
  });
}

export function workingClaims(claims: Claims, record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit): void {
  const { taps, corners } = record.windings[0]!;
  const { set } = record.demand;
  const { rest, celsius } = record.surroundings;
  const p = 'windings[].taps[].';
  // What 20 °C to the temperature of work does to the resistance.
  const warm = 1 + 0.00393 * (celsius - 20);
  for (const tap of taps) {
    const about = ` of tap ${tap.tap}`;
    const { working, range, ends, curve } = tap;
    const shorted = rest !== 'open' && tap.tap < taps.length;
    for (const [at, q] of [[working, `${p}working.`], ...ends.map((end) => [end, `${p}ends[].`] as const)] as const) {
      claims.holds(`${q}frequencyKhz`, at.frequencyKhz > 0, `${at.frequencyKhz}`);
      // Crowding lowers it, the loops of dead turns more: never above the low-frequency value but by what part turns are off.
      claims.holds(
        `${q}inductanceUh`,
        at.inductanceUh <= tap.inductanceUh * 1.004 && at.inductanceUh > tap.inductanceUh * (shorted ? 0.2 : 0.7),
        `${at.inductanceUh} at low frequency ${tap.inductanceUh}${about}`,
      );
      claims.holds(
        `${q}resistanceOhm`,
        at.resistanceOhm > tap.resistanceDcOhm * warm * 0.93 - 1e-3,
        `${at.resistanceOhm}, direct current ${tap.resistanceDcOhm}${about}`,
      );
      claims.near(
        `${q}q`,
        at.q,
        (2e-3 * Math.PI * at.frequencyKhz * at.inductanceUh) / at.resistanceOhm,
        6e-4 * at.q + digit(at.q, 3),
        about,
      );
    }
    for (const end of ends) {
      claims.near(
        `${p}ends[].bandwidthKhz`,
        end.bandwidthKhz,
        end.frequencyKhz / end.q,
        0.0105 * end.bandwidthKhz,
        about,
      );
      const reactance = 2e-6 * Math.PI * end.frequencyKhz * end.inductanceUh;
      claims.near(`${p}ends[].parallelKohm`, end.parallelKohm, end.q * reactance, 0.0105 * end.parallelKohm, about);
    }
    if (set === null || range === null) {
      claims.holds(`${p}range.lowKhz`, range === null && ends.length === 0 && curve.length === 0, 'none without a set');
      continue;
    }
    const q = `${p}range.`;
    const fixed = set.strayPf + set.aerialPf;
    const [out, into] = [set.capacitorLowPf + fixed, set.capacitorHighPf + fixed];
    claims.near(`${q}capacitanceLowPf`, range.capacitanceLowPf, out, digit(out, 5));
    claims.near(`${q}capacitanceHighPf`, range.capacitanceHighPf, into, digit(into, 5));
    const [low, middle, high] = ends;
    claims.near(`${p}ends[].frequencyKhz`, low!.frequencyKhz, range.lowKhz, 0);
    claims.near(`${p}ends[].frequencyKhz`, high!.frequencyKhz, range.highKhz, 0);
    const mean = Math.sqrt(range.lowKhz * range.highKhz);
    // Five digits of each.
    claims.near(`${p}ends[].frequencyKhz`, middle!.frequencyKhz, mean, 1.1e-4 * mean);
    const crowding = crowdingOf(record, tap);
    for (const [key, half, second, pf, end] of [
      ['lowKhz', 'lowUncertaintyKhz', 'secondLowKhz', into, low!],
      ['highKhz', 'highUncertaintyKhz', 'secondHighKhz', out, high!],
    ] as const) {
      const found = inSet(record, circuit, tap.turn, pf, rest);
      // With the rest open its own end tells how the current crowds there.
      const open = rest === 'open' || tap.tap === taps.length;
      const root = open ? Math.sqrt(tap.inductanceUh / end.inductanceUh) : crowding.root;
      const off = (open ? 3e-4 : 3e-4 + crowding.off) + ofUh(corners) / 2 + 4e-4;
      const kHz = (found.hz * root) / 1e3;
      claims.near(`${q}${key}`, range[key], kHz, off * kHz + digit(kHz, 5), about);
      const halfKhz = (found.halfHz * root) / 1e3;
      claims.near(`${q}${half}`, range[half], halfKhz, 0.06 * halfKhz + 2e-5 * kHz, about);
      // The second runs on turns beyond the tap: what part turns are off counts more there.
      const secondKhz = found.secondHz === null ? null : (found.secondHz * root) / 1e3;
      claims.both(`${q}${second}`, range[second], secondKhz, (0.006 + off) * (secondKhz ?? 0), about);
    }
    curveClaims(claims, record, circuit, tap);
  }
  coverageClaims(claims, record);
  settingClaims(claims, record, coil, circuit);
  kindClaims(claims, record, circuit);
  lossClaims(claims, record);
}

function curveClaims(claims: Claims, record: CoilRecord, circuit: PlainCircuit, tap: Tap): void {
  const { curve } = tap;
  const range = tap.range!;
  const p = 'windings[].taps[].curve[].';
  const last = curve.length - 1;
  const [from, to] = [curve[0]!, curve[last]!];
  claims.near(`${p}frequencyKhz`, from.frequencyKhz, range.highKhz, 1.1e-5 * range.highKhz);
  claims.near(`${p}frequencyKhz`, to.frequencyKhz, range.lowKhz, 1.1e-5 * range.lowKhz);
  const at = (pf: number) => inSet(record, circuit, tap.turn, pf, record.surroundings.rest).hz;
  // What the ends are off bends in between; only one middle point is solved anew, the others must fall.
  const [a, b] = [at(from.capacitancePf), at(to.capacitancePf)];
  curve.forEach(({ capacitancePf, frequencyKhz }, i) => {
    const pf = range.capacitanceLowPf * (range.capacitanceHighPf / range.capacitanceLowPf) ** (i / last);
    claims.near(`${p}capacitancePf`, capacitancePf, pf, 1.1e-4 * pf);
    if (i > 0) claims.holds(`${p}frequencyKhz`, frequencyKhz < curve[i - 1]!.frequencyKhz, 'falls with capacitance');
    if (i !== last >> 1) return;
    const share = (Math.log(from.frequencyKhz / a) + Math.log(to.frequencyKhz / b)) / 2;
    claims.near(`${p}frequencyKhz`, frequencyKhz, at(capacitancePf) * Math.exp(share), 3e-4 * frequencyKhz);
  });
}

function coverageClaims(claims: Claims, record: CoilRecord): void {
  const { coverage } = record;
  const w = record.windings[0]!;
  const rows = record.settings?.length ? record.settings : w.taps.map(({ range }) => range);
  const spans = rows.map((row) =>
    row?.lowKhz == null || row.highKhz == null ? null : { low: row.lowKhz, high: row.highKhz },
  );
  claims.holds(
    'coverage.neighbours[].from',
    (coverage === null) === spans.some((span) => span === null),
    'with ranges alone',
  );
  if (coverage === null) return;
  const all = spans as { low: number; high: number }[];
  claims.holds('coverage.neighbours[].to', coverage.neighbours.length === all.length - 1, 'one less than positions');
  const gaps: number[] = [];
  coverage.neighbours.forEach(({ from, to, overlapPercent }, i) => {
    claims.near('coverage.neighbours[].from', from, i + 1, 0);
    claims.near('coverage.neighbours[].to', to, i + 2, 0);
    // Both edges have five digits: 1e-4 of them at worst.
    const want = 100 * (all[i + 1]!.high / all[i]!.low - 1);
    claims.near('coverage.neighbours[].overlapPercent', overlapPercent, want, 0.0051 + 0.011 * (1 + want / 100));
    if (overlapPercent < 0) gaps.push(i);
  });
  claims.holds(
    'coverage.gaps[].from',
    coverage.gaps.length === gaps.length ||
      Math.abs(coverage.gaps.length - gaps.length) <=
        coverage.neighbours.filter(({ overlapPercent }) => overlapPercent === 0).length,
    'a gap where nothing overlaps',
  );
  for (const gap of coverage.gaps) {
    const [before, after] = [all[gap.from - 1]!, all[gap.to - 1]!];
    claims.near('coverage.gaps[].from', gap.from, gap.to - 1, 0);
    claims.near('coverage.gaps[].to', gap.to, gap.from + 1, 0);
    claims.near('coverage.gaps[].lowKhz', gap.lowKhz, after.high, 0);
    claims.near('coverage.gaps[].highKhz', gap.highKhz, before.low, 0);
    const width = Math.min(before.high / before.low, after.high / after.low);
    const taps = Math.log(gap.highKhz / gap.lowKhz) / Math.log(width);
    claims.near(
      'coverage.gaps[].tapsToClose',
      gap.tapsToClose,
      Math.ceil(taps),
      Math.abs(taps - Math.round(taps)) < 1e-3 ? 1 : 0,
    );
  }
  if (record.settings?.length) return;
  const highest = Math.max(...all.map(({ high }) => high));
  for (const { tap, range } of w.taps) {
    const seconds = [range?.secondHighKhz, range?.secondLowKhz].filter((one) => typeof one === 'number');
    const second = range?.secondHighKhz == null ? null : Math.min(...seconds);
    const said = coverage.deadEnds.find((one) => one.tap === tap);
    const limit = NEAR_SECOND * highest;
    // On the border itself rounding decides.
    if (second !== null && Math.abs(second / limit - 1) < 1e-3) continue;
    claims.holds(
      'coverage.deadEnds[].tap',
      (said !== undefined) === (second !== null && second < limit),
      `tap ${tap}: ${second} below ${limit}`,
    );
    if (said) claims.near('coverage.deadEnds[].secondKhz', said.secondKhz, second!, 0);
  }
}

function settingClaims(claims: Claims, record: CoilRecord, coil: PlainCoil, circuit: PlainCircuit): void {
  const settings = record.settings ?? [];
  const w = record.windings[0]!;
  const units = (w.unitTaps?.length ?? -1) + 1;
  const { set } = record.demand;
  const p = 'settings[].';
  settings.forEach((setting, i) => {
    const tap = w.taps[i]!;
    claims.near(`${p}tens`, setting.tens, i + 1, 0);
    claims.near(`${p}turnsMost`, setting.turnsMost, (i + 1) * units, 0);
    claims.near(`${p}turnsLeast`, setting.turnsLeast, i * units + 1, 0);
    claims.near(`${p}frequencyKhz`, setting.frequencyKhz, tap.working.frequencyKhz, 0);
    claims.near(`${p}q`, setting.q, tap.working.q, 0);
    const starts = [0, ...w.unitTaps!.map(({ turn }) => turn)];
    const falling: number[] = [];
    starts.forEach((from, k) => {
      const matrix = coil.matrix(from === 0 ? [0, tap.turn] : [0, from, tap.turn]);
      const uh = 1e6 * matrix.at(-1)!.at(-1)!;
      falling.push(setting.inductancesUh[k]!);
      // Pieces of turns at the units are taken together: a few parts in a thousand of one turn.
      claims.near(
        `${p}inductancesUh[]`,
        setting.inductancesUh[k]!,
        uh,
        (2e-4 + ofUh(w.corners)) * uh + 0.004 * coil.uh(1),
      );
    });
    const below = settings[i - 1]?.inductancesUh[0];
    if (below !== undefined) falling.push(below);
    const step = 100 * Math.max(...falling.slice(1).map((uh, k) => falling[k]! / uh - 1));
    claims.near(`${p}stepPercent`, setting.stepPercent, step, 0.0051 + 2e-5 * step);
    if (set === null || setting.lowKhz === null || setting.highKhz === null) return;
    claims.near(`${p}lowKhz`, setting.lowKhz, tap.range!.lowKhz, 0);
    const crowding = crowdingOf(record, tap);
    const found = inSet(
      record,
      circuit,
      tap.turn,
      tap.range!.capacitanceLowPf,
      record.surroundings.rest,
      starts.at(-1)!,
    );
    const kHz = (found.hz * crowding.root) / 1e3;
    // How the current crowds in the turns left in use is not in the record.
    claims.near(
      `${p}highKhz`,
      setting.highKhz,
      kHz,
      (0.004 + 0.05 / (tap.turn - starts.at(-1)!) + 2 * crowding.off + ofUh(w.corners)) * kHz,
    );
  });
}

function kindClaims(claims: Claims, record: CoilRecord, circuit: PlainCircuit): void {
  const w = record.windings[0]!;
  const p = 'switchKinds[].positions[].';
  for (const { kind, inUse, positions } of record.switchKinds) {
    claims.holds(`${p}tap`, positions.length === w.taps.length, 'one a tap');
    positions.forEach((position, i) => {
      const tap = w.taps[i]!;
      const about = ` of tap ${tap.tap}, ${kind}`;
      claims.near(`${p}tap`, position.tap, i + 1, 0);
      claims.near(`${p}frequencyKhz`, position.frequencyKhz, tap.working.frequencyKhz, 0);
      const open = record.switchKinds.find((one) => one.kind === 'open')!.positions[i]!;
      claims.holds(
        `${p}inductanceUh`,
        position.inductanceUh <= open.inductanceUh * 1.001,
        `${position.inductanceUh} above the open one${about}`,
      );
      claims.holds(`${p}q`, position.q > 0, `${position.q}${about}`);
      if (inUse) {
        claims.near(`${p}inductanceUh`, position.inductanceUh, tap.working.inductanceUh, 0);
        claims.near(`${p}q`, position.q, tap.working.q, 0);
        claims.both(`${p}lowKhz`, position.lowKhz, tap.range?.lowKhz ?? null, 0);
        claims.both(`${p}highKhz`, position.highKhz, tap.range?.highKhz ?? null, 0);
        return;
      }
      if (tap.range === null || position.lowKhz === null || position.highKhz === null) return;
      const { root, off } = crowdingOf(record, tap);
      for (const [key, pf] of [
        ['lowKhz', tap.range.capacitanceHighPf],
        ['highKhz', tap.range.capacitanceLowPf],
      ] as const) {
        // Only of every third position: each costs two solutions.
        if ((i + (key === 'lowKhz' ? 0 : 1)) % 3 !== 0) continue;
        const kHz = (inSet(record, circuit, tap.turn, pf, kind).hz * root) / 1e3;
        claims.near(`${p}${key}`, position[key]!, kHz, (5e-4 + 0.1 * off + ofUh(w.corners)) * kHz, about);
      }
    });
  }
}

function lossClaims(claims: Claims, record: CoilRecord): void {
  const { taps, wireMassG } = record.windings[0]!;
  const { chosen } = record;
  // Of so many positions, the last among them.
  if (taps.length <= 5) {
    const loss = taps.reduce((sum, { working }) => sum + 1 / working.q, 0) / taps.length;
    claims.holds(
      'chosen.lossFactor',
      chosen.lossFactor > 0.7 * loss && chosen.lossFactor < 1.4 * loss,
      `${chosen.lossFactor}, mean of 1/Q ${loss}`,
    );
  }
  claims.near('chosen.massG', chosen.massG, wireMassG, 0);
  const worst = Math.max(...taps.map(({ deviationPercent }) => Math.abs(deviationPercent)));
  claims.near('chosen.worstTapPercent', chosen.worstTapPercent, worst, 0.0016);
  claims.holds(
    'chosen.tried',
    chosen.tried >= chosen.feasible && Number.isInteger(chosen.tried),
    `${chosen.tried} and ${chosen.feasible}`,
  );
  claims.holds('chosen.feasible', chosen.feasible >= 1, `${chosen.feasible}`);
}
