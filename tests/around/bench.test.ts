/** A coil on the bench against formulas of one inductance, and against the larger network of a position. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { BenchCoil, type Instruments } from '../../src/around/bench.ts';
import { positionNetwork } from '../../src/around/position.ts';
import { Ports, tunedTo } from '../../src/around/response.ts';
import { Coil } from '../../src/coil/coil.ts';
import { formerLossOhm } from '../../src/coil/positions.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { coupledWinding } from '../../src/physics/coupled/coupled.ts';
import { findWire } from '../../src/stock/find.ts';

/** One stretch: L and R in series, all of the self-capacitance at the hot end. */
const plain = (uh: number, ohm: number, ownPf: number, siemens = 0) =>
  new BenchCoil(coupledWinding([0, 40], [uh * 1e-6]), {
    turn: 40,
    inductanceUh: uh,
    usedOhm: ohm,
    deadOhm: 0,
    formerSiemens: siemens,
    selfPf: ownPf,
  });

const USUAL: Instruments = { generatorOhm: 50, couplingPf: 1, probePf: 10, probeOhm: 1e7 };

const circuit = fc.record({
  uh: fc.double({ min: 5, max: 500, noNaN: true }),
  q: fc.double({ min: 20, max: 400, noNaN: true }),
  ownPf: fc.double({ min: 2, max: 12, noNaN: true }),
  pf: fc.double({ min: 0, max: 500, noNaN: true }),
  siemens: fc.double({ min: 0, max: 2e-6, noNaN: true }),
  generatorOhm: fc.double({ min: 25, max: 600, noNaN: true }),
  couplingPf: fc.option(fc.double({ min: 0.2, max: 5, noNaN: true })),
  probePf: fc.double({ min: 0, max: 20, noNaN: true }),
  probeOhm: fc.double({ min: 1e5, max: 1e7, noNaN: true }),
});

/** Of L, C and the losses in series and parallel, by the textbook. */
function byFormula(uh: number, ohm: number, pf: number, siemens: number) {
  const omega = 1 / Math.sqrt(uh * pf * 1e-18);
  const reactance = omega * uh * 1e-6;
  const q = 1 / (ohm / reactance + reactance * siemens);
  const kHz = omega / (2e3 * Math.PI);
  return { kHz, q, widthKhz: kHz / q };
}

describe('a coil with instruments', () => {
  test('of one inductance with 10 pF and 10 Mohm is what the formula says', () => {
    const [uh, ohm, ownPf, pf] = [240, 4, 6, 100];
    const coil = plain(uh, ohm, ownPf);
    const loop = { ...USUAL, couplingPf: null };
    const alone = coil.seen(pf, null, 1000)!;
    const probed = coil.seen(pf, loop, 1000)!;
    const [bare, with10] = [byFormula(uh, ohm, pf + ownPf, 0), byFormula(uh, ohm, pf + ownPf + 10, 1e-7)];
    // Loss moves the peak by 1/(4 Q^2) or so: 4e-6 at Q 380. Of the width a few 1/Q^2 more.
    for (const [seen, formula] of [
      [alone, bare],
      [probed, with10],
    ] as const) {
      expect(Math.abs(seen.kHz / formula.kHz - 1)).toBeLessThan(2e-5);
      expect(Math.abs(seen.widthKhz / formula.widthKhz - 1)).toBeLessThan(1e-4);
    }
    console.log(
      `alone ${alone.kHz.toFixed(2)} kHz, ${alone.widthKhz.toFixed(3)} wide; probed ${probed.kHz.toFixed(2)}, ${probed.widthKhz.toFixed(3)}`,
    );
  });

  test('of any one inductance is what the formula says', () => {
    let ran = 0;
    fc.assert(
      fc.property(circuit, ({ uh, q, ownPf, pf, siemens, ...rest }) => {
        const { generatorOhm, couplingPf, probePf, probeOhm } = rest;
        const all = pf + ownPf + probePf + (couplingPf ?? 0);
        const omega = 1 / Math.sqrt(uh * all * 1e-18);
        const ohm = (omega * uh * 1e-6) / q;
        // A small capacitor behind a resistance is that capacitor with R (omega C)^2 across it.
        const source = couplingPf === null ? 0 : generatorOhm * (omega * couplingPf * 1e-12) ** 2;
        const formula = byFormula(uh, ohm, all, siemens + source + 1 / probeOhm);
        const seen = plain(uh, ohm, ownPf, siemens).seen(pf, rest, formula.kHz * 1.03);
        if (formula.q < 10) return;
        ran++;
        const small = 1 / formula.q ** 2;
        const behind = couplingPf === null ? 0 : (omega * generatorOhm * couplingPf * 1e-12) ** 2;
        // Series loss and the rising drive of a capacitor each move a peak by about 1/(2 Q^2), and the sides with it by 1/Q.
        expect(Math.abs(seen!.kHz / formula.kHz - 1)).toBeLessThan(small + behind + 1e-6);
        expect(Math.abs(seen!.widthKhz / formula.widthKhz - 1)).toBeLessThan(5 * small + behind + 1e-5);
        expect(seen!.formerShare + seen!.instrumentShare).toBeLessThan(1);
      }),
      { seed: 5, numRuns: 300 },
    );
    console.log(`circuits against the formula: ${ran}`);
    expect(ran).toBeGreaterThan(100);
  });

  test('more probe capacitance lowers it, less probe resistance widens it, a tighter generator lowers it too', () => {
    let ran = 0;
    fc.assert(
      fc.property(
        circuit,
        fc.double({ min: 1.1, max: 3, noNaN: true }),
        ({ uh, q, ownPf, pf, siemens, ...rest }, by) => {
          const all = pf + ownPf + rest.probePf + 1;
          const { kHz: near } = byFormula(uh, 0, all, 0);
          const ohm = (2e-3 * Math.PI * near * uh) / q;
          const coil = plain(uh, ohm, ownPf, siemens);
          const seen = (change: Partial<Instruments>) => coil.seen(pf, { ...rest, couplingPf: 1, ...change }, near)!;
          const as = seen({});
          if (as === null || as.kHz / as.widthKhz < 10) return;
          ran++;
          const heavier = seen({ probePf: rest.probePf + by });
          expect(heavier.kHz).toBeLessThan(as.kHz);
          const lossy = seen({ probeOhm: rest.probeOhm / by });
          expect(lossy.widthKhz).toBeGreaterThan(as.widthKhz);
          // Loss alone moves the peak only by its square.
          expect(Math.abs(lossy.kHz / as.kHz - 1)).toBeLessThan((lossy.widthKhz / lossy.kHz) ** 2);
          const tighter = seen({ couplingPf: by });
          expect(tighter.kHz).toBeLessThan(as.kHz);
        },
      ),
      { seed: 6, numRuns: 150 },
    );
    console.log(`circuits made heavier and lossier: ${ran}`);
    expect(ran).toBeGreaterThan(80);
  });

  test('is null where everything is damped away', () => {
    expect(plain(100, 5, 5).seen(100, { ...USUAL, probeOhm: 50 }, 1500)).toBeNull();
  });
});

test('few nodes see what all nodes of a position see', () => {
  const found = findWire('0.5 mm enamel');
  if (!found.ok) throw new Error('no wire');
  const shape = { wire: found.wire, meanDiameterMm: 60, pitchMm: 0.6, turns: 50, gaps: [], startMm: 10 };
  const taps = [12, 26.5, 50];
  const coil = new WorkingCoil(new Coil(shape), taps, { leadPf: 0, earthed: 'start', celsius: 20 });
  let ran = 0;
  let worst = 0;
  taps.forEach((turn, i) => {
    for (const kHz of [700, 1500]) {
      const ports = new Ports(positionNetwork(coil, turn, kHz, { rest: 'open', lossTangent: 0.01 }));
      const nothing = { aerial: null, detector: { at: i + 1, load: { conductance: 0, capacitance: 0 } } };
      const whole = tunedTo(ports, nothing, kHz)!;
      const { used, dead } = coil.turnOhm(turn, kHz, 'open');
      const at = coil.terminal(turn, kHz, 'open').inductanceUh;
      const few = new BenchCoil(coil.circuit(turn, 0, 'open').winding, {
        turn,
        inductanceUh: at,
        usedOhm: used * turn,
        deadOhm: dead * (50 - turn),
        formerSiemens: formerLossOhm(at, coil.coil.selfPf(turn), 0.01, kHz) / (2e-3 * Math.PI * kHz * at) ** 2,
        selfPf: coil.coil.selfPf(50),
      }).seen(whole.tuningPf, null, kHz)!;
      ran++;
      // Eight stretches of the turns beyond for up to forty.
      worst = Math.max(worst, Math.abs(few.kHz / kHz - 1));
      expect(Math.abs(few.kHz / kHz - 1), `${turn} ${kHz}`).toBeLessThan(2e-3);
      // Q by the slope of the susceptance against that by the width.
      expect(Math.abs(few.widthKhz / whole.bandwidthKhz - 1), `${turn} ${kHz}`).toBeLessThan(0.01);
    }
  });
  console.log(`taps with few nodes and with all: ${ran}, worst ${worst.toExponential(1)}`);
  expect(ran).toBe(6);
});
