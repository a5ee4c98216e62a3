import { expect, test } from 'vitest';
import { type AerialCircuit, aerialElements, aerialImpedance, DUMMY } from '../../src/around/aerial.ts';
import { type Complex, inverseOf, plus, sizeOf } from '../../src/physics/circuit/complex.ts';
import { EARTH, portImpedance } from '../../src/physics/circuit/network.ts';

/** The list of elements as a network with its source earthed, seen from the contact: an evaluation of its own. */
function byNetwork(circuit: AerialCircuit, omega: number): Complex {
  const elements = aerialElements(circuit);
  const names = [...new Set(elements.flatMap(({ from, to }) => [from, to]))].filter((name) => name !== 'source');
  const node = (name: string) => (name === 'source' ? EARTH : names.indexOf(name));
  const of = (kind: 'R' | 'L' | 'C') =>
    elements
      .filter((one) => one.kind === kind)
      .map(({ from, to, value }) => ({ from: node(from), to: node(to), value }));
  const inductors = of('L');
  const inductance = new Float64Array(inductors.length ** 2);
  inductors.forEach(({ value }, i) => {
    inductance[i * inductors.length + i] = value;
  });
  const Z = portImpedance(
    {
      nodes: names.length,
      coils: inductors,
      resistance: new Float64Array(inductance.length),
      inductance,
      capacitors: of('C').map(({ from, to, value }) => ({ from, to, capacitance: value })),
      conductances: of('R').map(({ from, to, value }) => ({ from, to, conductance: 1 / value })),
    },
    omega,
    [node('contact')],
  );
  return { re: Z.re[0]!, im: Z.im[0]! };
}

test('the elements are the circuit whose impedance is worked out', () => {
  const wire: AerialCircuit = { resistanceOhm: 25, inductanceUh: 12, capacitancePf: 123, shunt: null, seriesPf: 100 };
  const plain: AerialCircuit = { resistanceOhm: 10, inductanceUh: 0, capacitancePf: 60, shunt: null, seriesPf: null };
  let ran = 0;
  for (const circuit of [wire, plain, DUMMY, { ...DUMMY, seriesPf: 47 }])
    for (const MHz of [0.15, 0.5, 1, 1.7, 2.516, 7, 30]) {
      const omega = 2e6 * Math.PI * MHz;
      const [a, b] = [aerialImpedance(circuit)(omega), byNetwork(circuit, omega)];
      // Both are exact but for rounding of a nodal solution.
      expect(sizeOf(plus(a, { re: -b.re, im: -b.im })) / sizeOf(a)).toBeLessThan(1e-9);
      ran++;
    }
  console.log(`aerials against their networks: ${ran}`);
  expect(ran).toBe(28);
});

test('the dummy aerial: 200 pF with 20 uH alone is in resonance at 2.516 MHz; the shunt takes over above', () => {
  const bare = aerialImpedance({ ...DUMMY, shunt: null });
  const at = (MHz: number) => 2e6 * Math.PI * MHz;
  expect(bare(at(2.51646)).im).toBeCloseTo(0, 1);
  expect(bare(at(2.49)).im).toBeLessThan(-5);
  expect(bare(at(2.54)).im).toBeGreaterThan(5);
  const dummy = aerialImpedance(DUMMY);
  // 400 ohm remains where the coil chokes and both capacitors pass.
  expect(dummy(at(100)).re).toBeCloseTo(400, -1);
  // And at the foot of the medium waves it is 200 pF with next to no loss.
  expect(Math.abs(dummy(at(0.2)).im / -(1 / (at(0.2) * 200e-12)) - 1)).toBeLessThan(0.01);
  expect(dummy(at(0.2)).re).toBeLessThan(1);
  expect(() => aerialImpedance({ ...DUMMY, inductanceUh: 0, capacitancePf: 0, shunt: null })).toThrow(RangeError);
  expect(inverseOf(dummy(at(1))).re).toBeGreaterThan(0);
});
