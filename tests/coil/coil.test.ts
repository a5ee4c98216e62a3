import { describe, expect, it } from 'vitest';
import { Coil, type CoilShape } from '../../src/coil/coil.ts';
import { stream, wireOf } from '../helpers/jobs.ts';
import { COPPER, inductanceUh, oneRing, twoCircles, type Winding, wireM } from './brute.ts';

function randomShape(random: () => number): CoilShape {
  const one = wireOf(
    ['0.5 mm enamel', '22 AWG double cotton', '1 mm bare', '28 SWG single silk'][Math.floor(random() * 4)]!,
  );
  const turns = random() < 0.3 ? 3 + Math.floor(random() * 50) : Math.round((0.4 + random() * 50) * 360) / 360;
  const gapMm = random() < 0.3 ? 0 : random();
  const taps = Array.from({ length: Math.floor(random() * 6) }, () => random() * turns);
  return {
    wire: one,
    meanDiameterMm: 15 + random() * 90,
    pitchMm: one.overallMm * (1 + random() * 2),
    turns,
    gaps: taps.map((turn) => ({ turn, gapMm })),
    startMm: 5 + random() * 10,
  };
}

const windingOf = (coil: Coil): Winding => ({
  places: coil.places,
  turns: coil.turns,
  pitchMm: coil.shape.pitchMm,
  meanDiameterMm: coil.shape.meanDiameterMm,
  bareMm: coil.shape.wire.bareMm,
});

const random = stream(7);
const COILS = Array.from({ length: 30 }, () => new Coil(randomShape(random)));

describe('a coil', () => {
  it('has the inductance of its rings, taken pair by pair, at every whole turn and between', () => {
    let worst = 0;
    let cases = 0;
    for (const coil of COILS)
      for (const share of [0.03, 0.31, 0.77, 1]) {
        const turn = share * coil.turns;
        const expected = inductanceUh(windingOf(coil), turn);
        worst = Math.max(worst, Math.abs(coil.inductanceUh(turn) / expected - 1));
        cases++;
      }
    console.log(`inductance: ${cases} sections against the brute ring sum, worst ${worst.toExponential(1)}`);
    expect(cases).toBeGreaterThan(0);
    // 3000 midpoints of the arc integral are good to 1e-6; the rings themselves agree to 1e-11.
    expect(worst).toBeLessThan(3e-6);
  });

  it('is the sum of its two sections and twice what is mutual between them, at every whole turn', () => {
    let worst = 0;
    let cases = 0;
    for (const coil of COILS.filter(({ turns }) => turns > 3)) {
      const R = coil.shape.meanDiameterMm / 2e3;
      const whole = Math.floor(coil.turns);
      const z = Array.from(coil.places.slice(0, whole), (mm) => mm / 1e3);
      for (let tap = 1; tap < whole; tap += 3) {
        let upper = (whole - tap) * oneRing(R, coil.shape.wire.bareMm / 2e3);
        let mutual = 0;
        for (let i = tap; i < whole; i++)
          for (let j = 0; j < i; j++) {
            if (j < tap) mutual += twoCircles(R, z[i]! - z[j]!);
            else upper += 2 * twoCircles(R, z[i]! - z[j]!);
          }
        const sum = coil.inductanceUh(tap) + (upper + 2 * mutual) * 1e6;
        worst = Math.max(worst, Math.abs(sum / coil.inductanceUh(whole) - 1));
        cases++;
      }
    }
    console.log(`section identity: ${cases} taps, worst ${worst.toExponential(1)}`);
    expect(cases).toBeGreaterThan(0);
    expect(worst).toBeLessThan(1e-9);
  });

  it('finds the turn of an inductance, the inverse of the inductance of a turn', () => {
    let worst = 0;
    let cases = 0;
    for (const coil of COILS) {
      let before = 0;
      for (let k = 1; k <= 40; k++) {
        const turn = (k / 40) * coil.turns;
        const value = coil.inductanceUh(turn);
        expect(value).toBeGreaterThan(before);
        before = value;
        // The first hundredth of a turn has next to no inductance: there the turn is not asked.
        if (turn > 0.05) worst = Math.max(worst, Math.abs(coil.turnFor(value) - turn));
        cases++;
      }
      const whole = coil.inductanceUh(coil.turns);
      expect(coil.turnFor(whole * 1.05)).toBeGreaterThan(coil.turns);
    }
    console.log(`turn of an inductance: ${cases} turns, worst ${worst.toExponential(1)} turn`);
    expect(cases).toBeGreaterThan(0);
    // Stated to 1e-7 turn.
    expect(worst).toBeLessThan(2e-7);
  });

  it('has the wire of its helix, added up piece by piece', () => {
    let worst = 0;
    for (const coil of COILS)
      for (const share of [0.4, 1])
        worst = Math.max(
          worst,
          Math.abs(coil.wireM(share * coil.turns) / wireM(windingOf(coil), share * coil.turns) - 1),
        );
    console.log(`wire: ${2 * COILS.length} lengths, worst ${worst.toExponential(1)}`);
    // The coil takes an even climb; gaps of up to 1 mm on a turn of 47 mm at least make a difference of second order.
    expect(worst).toBeLessThan(5e-5);
  });

  it('has the resistance of its wire at 20 C', () => {
    for (const coil of COILS) {
      const { bareMm } = coil.shape.wire;
      const expected = (COPPER * coil.wireM(coil.turns)) / ((Math.PI / 4) * bareMm ** 2);
      expect(coil.resistanceOhm(coil.turns) / expected).toBeCloseTo(1, 9);
    }
    const litz = wireOf('20 x 0.1 mm litz single silk');
    const shape = { wire: litz, meanDiameterMm: 76, pitchMm: 0.7, turns: 40, gaps: [], startMm: 10 };
    const coil = new Coil(shape);
    const strands = (20 * Math.PI * 0.1 ** 2) / 4;
    // One bunching makes the strands 1.5 % longer than the bundle.
    expect(coil.resistanceOhm(40) / ((COPPER * coil.wireM(40) * 1.015) / strands)).toBeCloseTo(1, 9);
  });

  it('measures its length over the wires', () => {
    const shape = { wire: wireOf('0.5 mm enamel'), meanDiameterMm: 50, pitchMm: 1, turns: 12.5, gaps: [], startMm: 9 };
    const coil = new Coil(shape);
    expect(coil.positionMm(0)).toBeCloseTo(9, 9);
    expect(coil.positionMm(12.5)).toBeCloseTo(21.5, 9);
    expect(coil.woundMm(12.5)).toBeCloseTo(12.5 + shape.wire.overallMm, 9);
    expect(coil.meanPitchMm(7)).toBeCloseTo(1, 9);
  });

  it('is near its inductance between whole turns without working out the part turn, and finds the turn back', () => {
    let worst = 0;
    let cases = 0;
    for (const coil of COILS)
      for (const share of [0.3, 0.5, 0.61, 0.73, 0.97]) {
        const turn = share * coil.turns;
        worst = Math.max(worst, Math.abs(coil.nearUh(turn) / coil.inductanceUh(turn) - 1));
        const back = coil.nearTurn(coil.nearUh(turn));
        expect(Math.abs(coil.nearUh(back) / coil.nearUh(turn) - 1)).toBeLessThan(1e-6);
        cases++;
      }
    console.log(`near inductance: ${cases} turns, worst ${worst.toExponential(1)}`);
    expect(cases).toBeGreaterThan(50);
    // Gaps of taps make the steps between whole turns uneven; half a percent is what an estimate of tuning may lose to it.
    expect(worst).toBeLessThan(0.005);
  });

  it('tunes lower with every turn more (common practice)', () => {
    for (const coil of COILS.filter(({ turns }) => turns > 2)) {
      const longer = new Coil({ ...coil.shape, turns: coil.turns + 1 });
      expect(longer.inductanceUh(coil.turns + 1)).toBeGreaterThan(coil.inductanceUh(coil.turns));
    }
  });
});
