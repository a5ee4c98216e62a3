import { expect, test } from 'vitest';
import { findWire } from '../../src/stock/find.ts';
import { linearMassGM } from '../../src/stock/linear-mass.ts';
import { allWires, wireNamed } from '../../src/stock/wires.ts';

test('a metre of wire: copper and a little more, most of it for thick fibres on thin wire', () => {
  let wires = 0;
  for (const wire of allWires()) {
    const copper = (wire.strands * Math.PI * wire.strandMm ** 2 * 8.89) / 4;
    const more = linearMassGM(wire) / copper - 1;
    if (wire.covering === 'bare') expect(more).toBeCloseTo(0, 12);
    else expect(more).toBeGreaterThan(0);
    // The most that the tables have: 0.071 mm heavy enamel, 40 AWG in double silk and in double cotton, whose cotton is thicker.
    const most = wire.covering.includes('cotton') ? 1.7 : wire.covering.includes('silk') ? 0.4 : 0.08;
    expect([wire.name, more < most]).toEqual([wire.name, true]);
    wires++;
  }
  console.log(`wires weighed: ${wires}`);
  expect(wires).toBeGreaterThan(100);
  expect(linearMassGM(wireNamed('0.5 mm enamel')!)).toBeCloseTo(1.783, 3);
  // By hand: 20 strands of 0.1 mm are 1.396 g/m of copper; their enamel (0.117 mm over all) 0.078; served to 0.62 mm or so, silk.
  const litz = findWire('20 x 0.1 mm litz single silk');
  if (!litz.ok) throw new Error('not in stock');
  expect(linearMassGM(litz.wire)).toBeGreaterThan(1.396 + 0.06);
  expect(linearMassGM(litz.wire)).toBeLessThan(1.396 + 0.16);
});
