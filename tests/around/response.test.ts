import { beforeAll, describe, expect, test } from 'vitest';
import { positionNetwork } from '../../src/around/position.ts';
import { type Connected, leftOf, Ports, tunedTo } from '../../src/around/response.ts';
import { secondSide } from '../../src/around/second-side.ts';
import { Coil } from '../../src/coil/coil.ts';
import { CoilPair } from '../../src/coil/pair.ts';
import { atFrequency } from '../../src/coil/positions.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { findWire } from '../../src/stock/find.ts';
import { resonanceOf } from './resonance.ts';

const LOSS = 0.01;
const TAPS = [14, 22, 32.5, 48];
const nothing = (at: number): Connected => ({
  aerial: null,
  detector: { at, load: { conductance: 0, capacitance: 0 } },
});
/** 200 pF in series with 20 uH and a little resistance. */
const series = (ohm: number) => (omega: number) => ({ re: ohm, im: omega * 20e-6 - 1 / (omega * 200e-12) });

let coil: WorkingCoil;
const ends = ['start', 'finish'] as const;
const made = (earthed: (typeof ends)[number]) => {
  const found = findWire('0.5 mm enamel');
  if (!found.ok) throw new Error('no wire');
  const { wire } = found;
  const shape = { wire, meanDiameterMm: 60, pitchMm: 0.6, turns: 48, gaps: [], startMm: 10 };
  return new WorkingCoil(new Coil(shape), TAPS, { leadPf: 2, earthed, celsius: 20 });
};
beforeAll(() => {
  coil = made('start');
});
const portsOf = (
  turn: number,
  kHz: number,
  rest: 'open' | 'shorted' | 'shorted in sections' | 'disconnected' = 'open',
) => new Ports(positionNetwork(coil, turn, kHz, { rest, lossTangent: LOSS }));

describe('a position as a network', () => {
  test('tunes and loses as the coil at work, whichever way the rest and the earth are', () => {
    let ran = 0;
    for (const earthed of ends) {
      coil = made(earthed);
      for (const rest of ['open', 'shorted', 'shorted in sections', 'disconnected'] as const) {
        TAPS.forEach((turn, i) => {
          const kHz = 900;
          const ports = portsOf(turn, kHz, rest);
          const tuned = tunedTo(ports, nothing(earthed === 'start' ? i + 1 : TAPS.length), kHz);
          if (tuned === null) return;
          // With that capacitance the coupled circuit without losses resonates there too: the mean of two distributions of the
          // self-capacitance stands against one of them, which its uncertainty covers; crowding is taken as at this frequency, and loss moves it by 1/(2 Q^2).
          const shorted = rest === 'shorted' || rest === 'shorted in sections';
          const found = coil.tuned(turn, tuned.tuningPf, rest, coil.crowding(turn, kHz));
          expect(Math.abs(found.kHz - kHz), `${earthed} ${rest} ${turn}`).toBeLessThan(
            found.uncertaintyKhz + (1e-3 + 1 / tuned.q ** 2) * kHz,
          );
          const q = atFrequency(coil, turn, kHz, rest, LOSS).q;
          // Resistance evenly along the stretches and the former's loss at one node: 10 % where loops leave Q near 20, 3 % without.
          expect(Math.abs(tuned.q / q - 1), `${earthed} ${rest} ${turn} Q ${tuned.q} ${q}`).toBeLessThan(
            shorted ? 0.1 : 0.03,
          );
          ran++;
        });
      }
    }
    coil = made('start');
    console.log(`positions as networks: ${ran}`);
    expect(ran).toBeGreaterThan(20);
  });

  test('the width at 0.707 is frequency over Q, and the peak lies where it was tuned', () => {
    let ran = 0;
    for (const turn of TAPS) {
      const ports = portsOf(turn, 900);
      const tuned = tunedTo(ports, nothing(1), 900)!;
      const seen = resonanceOf(ports, tuned.tuningPf, 900)!;
      // A coil with resistance has no reactance 1/(2 Q^2) below the peak of its impedance.
      expect(Math.abs(seen.kHz / 900 - 1)).toBeLessThan(0.6 / tuned.q ** 2);
      expect(Math.abs(seen.widthKhz / tuned.bandwidthKhz - 1)).toBeLessThan(0.01);
      ran++;
    }
    expect(ran).toBe(TAPS.length);
  });

  test('a resistance at the hot end adds its own damping; at a tap it counts by the square of the voltage there', () => {
    const kHz = 900;
    const ports = portsOf(48, kHz);
    const bare = tunedTo(ports, nothing(4), kHz)!;
    const at = (where: number, conductance: number) =>
      tunedTo(ports, { aerial: null, detector: { at: where, load: { conductance, capacitance: 0 } } }, kHz)!;
    const reactance = 1 / (2e3 * Math.PI * kHz * bare.tuningPf * 1e-12);
    // Parallel conductances add; the tuning is within 3 % of all the capacitance there is (the coil has its own).
    const added = (loaded: { q: number }) => 1 / loaded.q - 1 / bare.q;
    expect(Math.abs(added(at(4, 1e-5)) / (1e-5 * reactance) - 1)).toBeLessThan(0.05);
    const share = added(at(1, 1e-5)) / added(at(4, 1e-5));
    // Voltage of the tap over that of the whole: M of the turns up to it with the whole, over the whole.
    const mutual = (coil.coil.inductanceUh(48) + coil.coil.inductanceUh(14) - coil.inductanceUh(14, 48)) / 2;
    expect(Math.abs(share / (mutual / coil.coil.inductanceUh(48)) ** 2 - 1)).toBeLessThan(0.02);
  });

  test('the dummy aerial resonates by itself at 2.516 MHz (200 pF with 20 uH, IRE 1948, from memory)', () => {
    const source = series(0);
    const omega = 2e6 * Math.PI * 2.516;
    expect(Math.abs(source(omega).im)).toBeLessThan(0.2);
    expect(source(omega * 0.99).im).toBeLessThan(-5);
    expect(source(omega * 1.01).im).toBeGreaterThan(5);
  });

  test('a neighbouring channel is left by the law of one tuned circuit; weaker for a higher tap of the aerial', () => {
    const kHz = 900;
    const ports = portsOf(48, kHz);
    let ran = 0;
    let before = Number.POSITIVE_INFINITY;
    for (const aerial of [1, 2, 3, 4]) {
      const connected: Connected = {
        aerial: { at: aerial, source: series(25) },
        detector: { at: 4, load: { conductance: 1e-6, capacitance: 0 } },
      };
      const tuned = tunedTo(ports, connected, kHz)!;
      for (const off of [9, 18]) {
        const x = (kHz + off) / kHz - kHz / (kHz + off);
        const law = 1 / Math.hypot(1, tuned.q * x);
        // One resonance alone obeys it; the aerial's own reactance and the stronger side make up to 8 % here.
        expect(Math.abs(leftOf(ports, connected, tuned, off) / law - 1)).toBeLessThan(0.08);
        ran++;
      }
      expect(tuned.tuningPf).toBeLessThan(before);
      before = tuned.tuningPf;
    }
    console.log(`channels beside: ${ran}`);
    expect(ran).toBe(8);
  });

  test('a second winding: none of it felt when it is far, power through it when it is near', () => {
    const kHz = 900;
    const { wire } = coil.coil.shape;
    const other = (startMm: number) =>
      new CoilPair(coil, new Coil({ wire, meanDiameterMm: 66, pitchMm: 0.6, turns: 8, gaps: [], startMm }));
    const through = (startMm: number) => {
      const pair = other(startMm);
      const second = secondSide(pair, 48, kHz, 2);
      const ports = new Ports(positionNetwork(coil, 48, kHz, { rest: 'open', lossTangent: LOSS, second }));
      const load = { conductance: 1e-6, capacitance: 0 };
      return {
        coupling: pair.coupling(),
        ...tunedTo(ports, { aerial: { at: 'second', source: series(25) }, detector: { at: 4, load } }, kHz)!,
      };
    };
    const [near, far] = [through(10), through(800)];
    const alone = tunedTo(
      portsOf(48, kHz),
      { aerial: null, detector: { at: 4, load: { conductance: 1e-6, capacitance: 0 } } },
      kHz,
    )!;
    expect(near.coupling).toBeGreaterThan(0.3);
    expect(far.coupling).toBeLessThan(1e-4);
    expect(far.gain).toBeLessThan(1e-3 * near.gain);
    // The second winding's own capacitance is the only thing left of it.
    expect(Math.abs(far.q / alone.q - 1)).toBeLessThan(1e-3);
    expect(Math.abs(far.tuningPf - alone.tuningPf)).toBeLessThan(0.05);
    expect(near.q).toBeLessThan(0.9 * alone.q);
  });
});
