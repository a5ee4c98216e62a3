/** Claims of a record on what is round the coil: second winding, aerial, detector, table of contacts. */
import type { CoilRecord } from '../../src/record/schema.ts';
import type { Claims } from './claims.ts';
import { PlainCoil } from './coil.ts';

const EPSILON0 = 8.8541878188e-12;
const LIGHT = 299_792_458;

export function aroundClaims(claims: Claims, record: CoilRecord, coil: PlainCoil): void {
  const { around } = record;
  if (around === undefined) return;
  if (around.second !== null) secondClaims(claims, record, coil);
  aerialClaims(claims, record);
  tableClaims(claims, record);
}

function secondClaims(claims: Claims, record: CoilRecord, coil: PlainCoil): void {
  const second = record.around!.second!;
  const main = record.windings[0]!;
  const p = 'around.second.';
  const other = new PlainCoil(second);
  const { turns, wire } = second;
  claims.holds(`${p}turns`, Number.isInteger(turns) && turns === second.turnPositionsMm.length, `${turns}`);
  second.turnPositionsMm.forEach((z, i) => {
    claims.near(`${p}turnPositionsMm[]`, z, second.startMm + second.pitchMm * (i + 0.5), 2e-4 + 1e-4 * i);
  });
  claims.near(`${p}startMm`, second.startMm, other.at(0), 2.1e-4);
  claims.near(`${p}finishMm`, second.finishMm, other.at(turns), 2e-4 + 1e-4 * turns);
  claims.holds(`${p}pitchMm`, second.pitchMm > 0.9 * wire.overallMm, `${second.pitchMm}, wire ${wire.overallMm}`);
  claims.holds(
    `${p}spacerMm`,
    second.spacerMm >= 0 && second.spacerMm < second.pitchMm,
    `${second.spacerMm} of ${second.pitchMm}`,
  );
  claims.holds(`${p}wire.bareMm`, wire.bareMm > 0, `${wire.bareMm}`);
  claims.holds(`${p}wire.overallMm`, wire.overallMm >= wire.bareMm, `${wire.overallMm} over ${wire.bareMm}`);
  const metres = other.wireM(turns);
  claims.near(`${p}wireLengthM`, second.wireLengthM, metres, 1e-4 + 3e-5 * metres);
  claims.near(`${p}leadsM`, second.leadsM, main.leadsM, 0);
  const litz = / x /.test(wire.name);
  const section = (Math.PI / 4) * wire.bareMm ** 2;
  // Strands are not in the record of a second winding: of litz, mass over resistance alone is held together.
  if (!litz) {
    const ohm = (0.017241 * metres) / section;
    claims.near(`${p}resistanceDcOhm`, second.resistanceDcOhm, ohm, 2e-4 * ohm);
    claims.near(`${p}wireMassG`, second.wireMassG, metres * section * 8.89, 1e-3 * second.wireMassG);
  } else {
    const copper = (0.017241 * 1.015 * metres) / second.resistanceDcOhm;
    claims.near(`${p}wireMassG`, second.wireMassG, metres * 1.015 * copper * 8.89, 3e-3 * second.wireMassG);
  }
  const uh = other.uh(turns);
  claims.near(`${p}inductanceUh`, second.inductanceUh, uh, 5e-5 * uh);
  const ratio = Math.min(
    Math.max((second.finishMm - second.startMm + wire.overallMm) / second.meanDiameterMm, 0.1),
    50,
  );
  const medhurst = (0.1126 * ratio + 0.08 + 0.27 / Math.sqrt(ratio)) * (second.meanDiameterMm / 10);
  claims.near(`${p}selfCapacitancePf`, second.selfCapacitancePf, medhurst, 0.09 * medhurst);
  const edges = {
    low: coil.at(0) - main.wire.overallMm / 2,
    high: coil.at(main.turns) + main.wire.overallMm / 2,
  };
  const half = wire.overallMm / 2;
  const distance = Math.max(second.startMm - half - edges.high, edges.low - (second.finishMm + half));
  // What stands out of the main winding at a tap of its ends is its edge there.
  claims.near(`${p}distanceMm`, second.distanceMm, distance, 0.05);
  const same = second.kind === 'same former' || second.kind === 'beside';
  claims.holds(`${p}distanceMm`, !same || second.distanceMm > -1e-6, `${second.distanceMm} of ${second.kind}`);
  const outside = record.former.outsideDiameterMm;
  claims.holds(
    `${p}meanDiameterMm`,
    second.kind === 'sleeve'
      ? second.meanDiameterMm > outside + main.wire.overallMm
      : second.kind === 'inner'
        ? second.meanDiameterMm < record.former.boreDiameterMm
        : second.meanDiameterMm > 0,
    `${second.meanDiameterMm} of ${second.kind} on ${outside}`,
  );
  const mutual = coil.mutualUh(main.turns, other);
  const cornered = main.corners === undefined ? 0 : 0.3 / main.corners ** 2;
  claims.near(`${p}mutualUh`, second.mutualUh, mutual, (1e-4 + cornered) * mutual);
  const k = mutual / Math.sqrt(main.inductanceUh * second.inductanceUh);
  claims.near(`${p}coupling`, second.coupling, k, (2e-4 + cornered) * k);
  if (second.wanted !== null) {
    claims.holds(`${p}wanted.lowest`, second.wanted.lowest <= second.wanted.highest, `${second.wanted.lowest}`);
    const told = record.warnings.some(({ code }) => code === 'second-nearest');
    if (!told) claims.near(`${p}wanted.highest`, second.wanted.highest, second.coupling, 0.055 * second.coupling);
  }
  const { slide } = second;
  if (slide !== null) {
    const way = Math.sign(slide.travelMm);
    claims.near(`${p}slide.travelMm`, Math.abs(slide.travelMm), slide.scale.at(-1)!.mm, 2e-3);
    slide.scale.forEach(({ mm, coupling }, i) => {
      claims.holds(
        `${p}slide.scale[].mm`,
        mm >= (slide.scale[i - 1]?.mm ?? 0) && mm <= Math.abs(slide.travelMm) + 1e-6,
        `${mm}`,
      );
      const there = coil.mutualUh(main.turns, other, way * mm) / Math.sqrt(main.inductanceUh * second.inductanceUh);
      // Ends are met as `wanted` is, marks between by a search.
      claims.near(
        `${p}slide.scale[].coupling`,
        coupling,
        there,
        (i === 0 ? 0.055 : 0.02) * there + 2e-4,
        ` at ${mm} mm`,
      );
    });
  }
  const { body } = second;
  if (body !== null) {
    const turnsOn = second.meanDiameterMm - wire.overallMm - (record.asMade?.diameterMm ?? 0);
    claims.near(`${p}body.outsideDiameterMm`, body.outsideDiameterMm, turnsOn, 0.01);
    claims.holds(
      `${p}body.insideDiameterMm`,
      body.insideDiameterMm > 0 && body.insideDiameterMm < body.outsideDiameterMm,
      `${body.insideDiameterMm}`,
    );
    claims.holds(`${p}body.lowMm`, body.lowMm < second.startMm - half, `${body.lowMm}, start ${second.startMm}`);
    claims.holds(`${p}body.lengthMm`, body.lowMm + body.lengthMm > second.finishMm + half, `${body.lengthMm}`);
  }
  for (const hole of second.holes) {
    const at = hole.purpose === 'start' ? second.startMm : second.finishMm;
    // Holes of few turns are kept apart along the axis as well.
    claims.near(`${p}holes[].axialMm`, hole.axialMm, at, wire.overallMm + second.pitchMm + 6 * hole.diameterMm);
    claims.holds(`${p}holes[].angleDeg`, hole.angleDeg >= 0 && hole.angleDeg < 360, `${hole.angleDeg}`);
    claims.holds(`${p}holes[].diameterMm`, hole.diameterMm > wire.overallMm, `${hole.diameterMm}`);
  }
  betweenClaim(claims, record, coil, other);
  second.working.forEach((one, i) => {
    const tap = main.taps[i]!;
    claims.near(`${p}working[].tap`, one.tap, i + 1, 0);
    claims.near(`${p}working[].frequencyKhz`, one.frequencyKhz, tap.working.frequencyKhz, 0);
    // Crowding shifts the current in the wires of both, by less than a wire of their distance.
    const low = coil.mutualUh(tap.turn, other);
    claims.near(`${p}working[].mutualUh`, one.mutualUh, low, 0.12 * low, ` of tap ${tap.tap}`);
    const kTap = one.mutualUh / Math.sqrt(tap.inductanceUh * second.inductanceUh);
    claims.near(`${p}working[].coupling`, one.coupling, kTap, 0.12 * kTap);
    claims.holds(`${p}working[].addedOhm`, one.addedOhm > -1e-3 * tap.working.resistanceOhm, `${one.addedOhm}`);
  });
}

/** Coaxial cylinders where both lie over one another, filled as stated: 0.5 to 4 of air's capacitance. */
function betweenClaim(claims: Claims, record: CoilRecord, coil: PlainCoil, other: PlainCoil): void {
  const second = record.around!.second!;
  const main = record.windings[0]!;
  const [a, b] = [2e3 * coil.turn.radius, second.meanDiameterMm];
  const [low, high] = [Math.max(coil.at(0), other.at(0)), Math.min(coil.at(main.turns), other.at(second.turns))];
  const ratio =
    a > b ? (a - main.wire.bareMm) / (b + second.wire.bareMm) : (b - second.wire.bareMm) / (a + main.wire.bareMm);
  const air = high > low && ratio > 1 ? ((2 * Math.PI * EPSILON0 * (high - low)) / 1e3 / Math.log(ratio)) * 1e12 : 0;
  claims.holds(
    'around.second.betweenPf',
    second.betweenPf >= 0.99 * air && second.betweenPf <= 4 * air + 1e-9,
    `${second.betweenPf}, in air ${air}`,
  );
}

/** A straight wire's capacitance to earth by charges along it: mean potential of a unit of charge and of its image. */
function wirePf(lengthM: number, thicknessM: number, imageAt: (x: number, y: number) => number): number {
  const n = 1200;
  const r = thicknessM / 2;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const x = ((i + 0.5) * lengthM) / n;
    // The wire's own charge in closed form, seen from its surface.
    sum += Math.asinh((lengthM - x) / r) + Math.asinh(x / r);
    for (let j = 0; j < 60; j++) sum -= lengthM / 60 / imageAt(x, ((j + 0.5) * lengthM) / 60);
  }
  return ((4 * Math.PI * EPSILON0 * lengthM) / (sum / n)) * 1e12;
}

function aerialClaims(claims: Claims, record: CoilRecord): void {
  const { aerial, detector } = record.around!;
  const given = record.given as Readonly<Record<string, unknown>>;
  if (aerial !== null) {
    const p = 'around.aerial.';
    if (aerial.kind === 'dummy') {
      claims.near(`${p}capacitancePf`, aerial.capacitancePf, 200, 0);
      claims.near(`${p}inductanceUh`, aerial.inductanceUh, 20, 0);
      claims.holds(
        `${p}resistanceOhm`,
        aerial.resistanceOhm >= 0 && aerial.resistanceOhm <= 80,
        `${aerial.resistanceOhm}`,
      );
      if (aerial.shunt !== null) {
        claims.near(`${p}shunt.capacitancePf`, aerial.shunt.capacitancePf, 400, 0);
        claims.near(`${p}shunt.resistanceOhm`, aerial.shunt.resistanceOhm, 400, 0);
      }
    } else {
      const size = (key: string) => {
        const found = /^([\d.]+) ?(mm|m|pF)?/.exec(String(given[`aerial.${key}`] ?? ''));
        return found === null ? null : Number(found[1]);
      };
      const [length, height, thickness, capacitance] = [
        size('length'),
        size('height'),
        size('thickness') ?? 2,
        size('capacitance'),
      ];
      const want =
        capacitance ??
        (aerial.kind === 'vertical wire'
          ? wirePf(length!, thickness / 1e3, (x, y) => 2 * (height ?? 1) + x + y)
          : wirePf(length!, thickness / 1e3, (x, y) => Math.hypot(x - y, 2 * height!)));
      // The image is summed in pieces, coarsest where a vertical wire begins near the ground.
      claims.near(`${p}capacitancePf`, aerial.capacitancePf, want, (capacitance === null ? 4e-3 : 1e-4) * want);
      const own = length === null ? 0 : (length ** 2 / (3 * LIGHT ** 2 * aerial.capacitancePf * 1e-12)) * 1e6;
      claims.near(`${p}inductanceUh`, aerial.inductanceUh, own, 2e-3 * own);
      claims.holds(`${p}resistanceOhm`, aerial.resistanceOhm >= 0, `${aerial.resistanceOhm}`);
    }
    claims.holds(`${p}seriesPf`, aerial.seriesPf === null || aerial.seriesPf > 0, `${aerial.seriesPf}`);
    contact(claims, record, `${p}to`, aerial.to);
  }
  if (detector !== null) {
    claims.holds('around.detector.resistanceKohm', detector.resistanceKohm > 0, `${detector.resistanceKohm}`);
    claims.holds('around.detector.capacitancePf', detector.capacitancePf >= 0, `${detector.capacitancePf}`);
    contact(claims, record, 'around.detector.to', detector.to);
  }
}

function contact(claims: Claims, record: CoilRecord, path: string, at: number | 'second' | null): void {
  const taps = record.windings[0]!.taps.length;
  const start = record.frame.earthedEnd === 'finish' ? 0 : 1;
  const ok = at === null || (at === 'second' ? record.around!.second !== null : at >= start && at <= taps);
  claims.holds(path, ok, `${at} of ${taps}`);
}

function tableClaims(claims: Claims, record: CoilRecord): void {
  const around = record.around!;
  const { pairs, best, ranges, channelsKhz } = around;
  const { set } = record.demand;
  const taps = record.windings[0]!.taps;
  const p = 'around.pairs[].';
  channelsKhz.forEach((kHz, i) => {
    claims.holds('around.channelsKhz[]', kHz > (channelsKhz[i - 1] ?? 0), `${kHz} rises`);
    const want =
      channelsKhz[0]! *
      (channelsKhz.at(-1)! / channelsKhz[0]!) ** (channelsKhz.length > 1 ? i / (channelsKhz.length - 1) : 0);
    claims.near('around.channelsKhz[]', kHz, want, 1.2e-3 * want);
  });
  const most = new Map<number, number>();
  for (const { aerial, detector, rows } of pairs) {
    contact(claims, record, `${p}aerial`, aerial);
    contact(claims, record, `${p}detector`, detector);
    for (const row of rows) {
      const q = `${p}rows[].`;
      claims.holds(`${q}kHz`, channelsKhz.includes(row.kHz), `${row.kHz}`);
      claims.holds(`${q}tap`, row.tap >= 1 && row.tap <= taps.length, `${row.tap}`);
      claims.holds(
        `${q}tuningPf`,
        row.tuningPf >= set!.capacitorLowPf - 0.06 && row.tuningPf <= set!.capacitorHighPf + 0.06,
        `${row.tuningPf}`,
      );
      claims.holds(`${q}q`, row.q >= 4.99 && row.q < 2000, `${row.q}`);
      claims.near(`${q}bandwidthKhz`, row.bandwidthKhz, row.kHz / row.q, 0.0105 * row.bandwidthKhz);
      claims.holds(`${q}outputDb`, row.outputDb <= 0, `${row.outputDb}`);
      most.set(row.kHz, Math.max(most.get(row.kHz) ?? Number.NEGATIVE_INFINITY, row.outputDb));
      // A peak much wider than a channel may lie a little beside the frequency that is in phase.
      const slack = row.bandwidthKhz > 12 ? 0.25 : 0.011;
      claims.holds(`${q}off9Db`, row.off9Db <= slack, `${row.off9Db}`);
      claims.holds(`${q}off10Db`, row.off10Db <= row.off9Db + slack, `${row.off10Db} after ${row.off9Db}`);
      claims.holds(`${q}off18Db`, row.off18Db <= row.off10Db + slack, `${row.off18Db} after ${row.off10Db}`);
      claims.holds(`${q}off20Db`, row.off20Db <= row.off18Db + slack, `${row.off20Db} after ${row.off18Db}`);
      claims.holds(
        `${q}tap`,
        row.dead === [aerial, detector].some((at) => typeof at === 'number' && at > row.tap),
        `dead: ${row.dead}`,
      );
      // One tuned circuit 9 kHz off has at most what a single resonance leaves; not where turns resonate by themselves near by.
      if (row.q > 20 && !row.dead && 18 < row.kHz / 8) {
        const x = 2 * row.q * (9 / row.kHz);
        const single = -10 * Math.log10(1 + x * x);
        claims.near(`${q}off9Db`, row.off9Db, single, 0.35 + 0.2 * Math.abs(single));
      }
    }
  }
  for (const [kHz, db] of most) claims.near(`${p}rows[].outputDb`, db, 0, 0.0051, ` at ${kHz}, the best of all`);
  const inUse = (rows: (typeof pairs)[number]['rows']) => rows.filter(({ dead }) => !dead);
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const count = Math.max(0, ...pairs.map(({ rows }) => inUse(rows).length));
  const judged = pairs
    .filter(({ rows }) => count > 0 && inUse(rows).length === count)
    .map((pair) => ({
      ...pair,
      output: mean(inUse(pair.rows).map(({ outputDb }) => outputDb)),
      off: mean(inUse(pair.rows).map(({ off9Db }) => off9Db)),
    }));
  claims.holds(
    'around.best[].outputDb',
    (best.length === 0) === (judged.length === 0),
    `${best.length} of ${judged.length}`,
  );
  for (const one of best) {
    contact(claims, record, 'around.best[].aerial', one.aerial);
    contact(claims, record, 'around.best[].detector', one.detector);
    const pair = judged.find(({ aerial, detector }) => aerial === one.aerial && detector === one.detector);
    claims.holds('around.best[].detector', pair !== undefined, `${one.aerial} and ${one.detector} are not judged`);
    if (pair === undefined) continue;
    claims.near('around.best[].outputDb', one.outputDb, pair.output, 0.011);
    claims.near('around.best[].off9Db', one.off9Db, pair.off, 0.011);
    const strongest = Math.max(...judged.map(({ output }) => output));
    if (one.use === 'strongest') claims.near('around.best[].outputDb', pair.output, strongest, 0.011);
    if (one.use === 'balanced')
      claims.near(
        'around.best[].off9Db',
        pair.output - pair.off,
        Math.max(...judged.map(({ output, off }) => output - off)),
        0.021,
      );
    if (one.use === 'most selective')
      claims.near(
        'around.best[].off9Db',
        pair.off,
        Math.min(...judged.filter(({ output }) => output >= strongest - 12 + 0.02).map(({ off }) => off)),
        0.25,
      );
  }
  const balanced = best.find(({ use }) => use === 'balanced');
  ranges.forEach((range, i) => {
    claims.near('around.ranges[].tap', range.tap, i + 1, 0);
    claims.holds('around.ranges[].aerial', range.aerial === balanced?.aerial, `${range.aerial}`);
    claims.holds('around.ranges[].detector', range.detector === balanced?.detector, `${range.detector}`);
    claims.holds('around.ranges[].lowKhz', (range.lowKhz === null) === (range.highKhz === null), 'both or none');
    if (range.lowKhz === null || range.highKhz === null) return;
    claims.holds('around.ranges[].highKhz', range.lowKhz < range.highKhz, `${range.lowKhz} to ${range.highKhz}`);
    // What hangs on the coil adds capacitance; through a small one it may also take inductance away.
    claims.holds(
      'around.ranges[].lowKhz',
      range.lowKhz > 0.2 * taps[i]!.range!.lowKhz && range.lowKhz < 2.5 * taps[i]!.range!.highKhz,
      `${range.lowKhz}`,
    );
  });
}
