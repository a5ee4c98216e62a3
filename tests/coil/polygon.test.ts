/** Turns that run straight from rib to rib: the coil and the coil at work. */
import { describe, expect, it } from 'vitest';
import { Coil, type CoilShape } from '../../src/coil/coil.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { stream, wireOf } from '../helpers/jobs.ts';
import { lengthOf, ribbed } from '../physics/elements.ts';
import { COPPER } from './brute.ts';

const random = stream(11);
const COILS = Array.from({ length: 24 }, (): Coil => {
  const wire = wireOf(['0.5 mm enamel', '22 AWG double cotton', '1 mm bare'][Math.floor(random() * 3)]!);
  const turns = random() < 0.4 ? 3 + Math.floor(random() * 40) : Math.round((1 + random() * 40) * 360) / 360;
  const gaps = Array.from({ length: Math.floor(random() * 4) }, () => ({ turn: random() * turns, gapMm: random() }));
  return new Coil({
    wire,
    meanDiameterMm: 25 + random() * 80,
    corners: 6 + Math.floor(random() * 19),
    bendMm: random() < 0.3 ? undefined : random() * 4,
    pitchMm: wire.overallMm * (1.05 + random()),
    turns,
    gaps,
    startMm: 10,
  });
});
const around = { leadPf: 3, earthed: 'start', celsius: 20 } as const;

describe('a coil from rib to rib', () => {
  it('has the wire of its sides and bends, and the resistance of that', () => {
    let worst = 0;
    for (const { shape } of COILS) {
      const { corners, bendMm = 0, meanDiameterMm, pitchMm } = shape;
      const coil = new Coil({ ...shape, turns: 7, gaps: [] });
      const wire = ribbed(meanDiameterMm / 2e3, corners!, bendMm / 1e3, 7 * corners!, pitchMm / 1e3, 2e-4);
      worst = Math.max(worst, Math.abs(coil.wireM(7) / lengthOf(wire) - 1));
      const ohm = (COPPER * lengthOf(wire)) / ((Math.PI / 4) * shape.wire.bareMm ** 2);
      expect(coil.resistanceOhm(7) / ohm).toBeCloseTo(1, 3);
      const round = new Coil({ ...coil.shape, corners: undefined });
      expect(coil.wireM(7)).toBeLessThan(round.wireM(7));
    }
    console.log(`wire from rib to rib: ${COILS.length} lengths, worst ${worst.toExponential(1)}`);
    // Elements of 0.2 mm are chords of bends of 0.1 mm and more.
    expect(worst).toBeLessThan(2e-4);
  });

  it('rises with every part of a turn, and finds the turn of an inductance', () => {
    let cases = 0;
    for (const coil of COILS) {
      let before = 0;
      for (let k = 1; k <= 40; k++) {
        const turn = (k / 40) * coil.turns;
        const value = coil.inductanceUh(turn);
        expect(value).toBeGreaterThan(before);
        before = value;
        if (turn > 0.05) expect(Math.abs(coil.turnFor(value) - turn)).toBeLessThan(2e-7);
        cases++;
      }
      for (let k = 1; k < coil.turns; k++)
        expect(Math.abs(coil.inductanceUh(k - 1e-6) / coil.inductanceUh(k) - 1)).toBeLessThan(1e-5);
    }
    console.log(`turns of coils from rib to rib: ${cases}`);
    expect(cases).toBeGreaterThan(0);
  });

  it('lies between the round coil inside its sides and the one around its ribs', () => {
    for (const coil of COILS) {
      const { corners, bendMm = 0, meanDiameterMm } = coil.shape;
      const whole = (diameterMm: number) => {
        const shape: CoilShape = { ...coil.shape, meanDiameterMm: diameterMm, corners: undefined };
        return new Coil(shape).inductanceUh(coil.turns);
      };
      const sides = (meanDiameterMm - 2 * bendMm) * Math.cos(Math.PI / corners!) + 2 * bendMm;
      const value = coil.inductanceUh(coil.turns);
      expect(value).toBeGreaterThan(whole(sides));
      expect(value).toBeLessThan(whole(meanDiameterMm));
      expect(coil.equivalentDiameterMm).toBeGreaterThan(sides);
      expect(coil.equivalentDiameterMm).toBeLessThan(meanDiameterMm);
      expect(Math.abs(value / whole(coil.equivalentDiameterMm) - 1)).toBeLessThan(0.01);
    }
  });

  it('keeps its corners when a measure is changed', () => {
    const coil = COILS[0]!;
    const wider = coil.changed({ meanDiameterMm: coil.shape.meanDiameterMm + 1 });
    expect(wider.shape.corners).toBe(coil.shape.corners);
    expect(wider.inductanceUh(3)).toBeGreaterThan(coil.inductanceUh(3));
  });
});

describe('a coil from rib to rib at work', () => {
  it('has at low frequency the inductance and resistance of the coil', () => {
    let worst = 0;
    let cases = 0;
    for (const coil of COILS) {
      const tap = Math.max(1, Math.round(coil.turns / 3));
      const working = new WorkingCoil(coil, [tap, coil.turns], around);
      for (const turn of [tap, coil.turns]) {
        const { inductanceUh, resistanceOhm } = working.terminal(turn, 0, 'open');
        worst = Math.max(worst, Math.abs(inductanceUh / coil.inductanceUh(turn) - 1));
        // Rings of the coil's own length: what a helix is longer by is left out, 0.3 % at most of these.
        expect(resistanceOhm / coil.resistanceOhm(turn)).toBeCloseTo(1, 2);
        expect(working.crowding(turn, 1e-3)).toBeCloseTo(1, 6);
        cases++;
      }
      const parts = working.sections(0, [tap]);
      const total = parts.inductance.reduce((sum, value) => sum + value, 0) * 1e6;
      expect(Math.abs(total / coil.inductanceUh(coil.turns) - 1)).toBeLessThan(1e-9);
    }
    console.log(`low frequency from rib to rib: ${cases} positions, worst ${worst.toExponential(1)}`);
    expect(cases).toBeGreaterThan(0);
    expect(worst).toBeLessThan(1e-9);
  });

  it('comes to the round coil with many ribs, and loses less with few', () => {
    const wire = wireOf('0.5 mm enamel');
    const shape = { wire, meanDiameterMm: 70, pitchMm: 0.8, turns: 40, gaps: [], startMm: 10 };
    const at = (corners: number | undefined) =>
      new WorkingCoil(new Coil({ ...shape, corners }), [20, 40], around).terminal(40, 1000, 'open');
    const [round, many, few] = [at(undefined), at(200), at(6)];
    // The circle of 200 corners has an area 0.016 % smaller.
    expect(many.inductanceUh / round.inductanceUh).toBeCloseTo(1, 3);
    expect(many.resistanceOhm / round.resistanceOhm).toBeCloseTo(1, 3);
    expect(few.inductanceUh).toBeLessThan(0.87 * round.inductanceUh);
    expect(few.resistanceOhm).toBeLessThan(round.resistanceOhm);
    const tuned = (corners: number | undefined) =>
      new WorkingCoil(new Coil({ ...shape, corners }), [20, 40], around).tuned(40, 200, 'open').kHz;
    expect(tuned(6)).toBeGreaterThan(tuned(undefined));
  });
});
