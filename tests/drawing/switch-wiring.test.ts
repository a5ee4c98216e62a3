import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inside, overlap, textBox } from '../../src/drawing/boxes.ts';
import type { Shape, Text } from '../../src/drawing/drawing.ts';
import { placesFor, positionDeg, stepFor } from '../../src/drawing/switch-angles.ts';
import { drawWafer, type Wafer } from '../../src/drawing/switch-wiring.ts';
import { Paper } from '../../src/sheets/page.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const RESTS = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;

const waferArb: fc.Arbitrary<Wafer> = fc
  .record({
    count: fc.integer({ min: 2, max: 60 }),
    rest: fc.constantFrom(...RESTS),
    at: fc.double({ min: 0, max: 1, noNaN: true }),
  })
  .map(({ count, rest, at }) => ({
    contacts: Array.from({ length: count }, (_, i) => ({
      number: `${i + 1}`,
      name: i === count - 1 ? 'F' : `tap ${i + 1}`,
    })),
    stepDeg: stepFor(placesFor(count, rest)),
    shown: Math.min(count - 2, Math.floor(at * (count - 1))),
    common: rest === 'disconnected' ? null : { words: 'common: to the set' },
    link: rest === 'shorted' ? ('last' as const) : null,
    bridge: rest === 'shorted in sections' ? ('behind' as const) : null,
  }));

const textsOf = (shapes: readonly Shape[]) => shapes.filter((shape): shape is Text => shape.shape === 'text');
/** Degrees clockwise from the top, 0 to 360. */
const clock = ([x, y]: readonly [number, number]) => ((Math.atan2(x, y) * 180) / Math.PI + 360) % 360;

describe('angles of switch positions', () => {
  test('are the widest that a switch has for so many places', () => {
    const wanted = [
      [2, 30],
      [12, 30],
      [13, 22.5],
      [16, 22.5],
      [18, 20],
      [20, 18],
      [24, 15],
      [30, 12],
      [36, 10],
      [48, 7.5],
      [60, 6],
      [72, 5],
    ] as const;
    for (const [places, deg] of wanted) expect(stepFor(places)).toBeCloseTo(deg, 12);
    // With a rotor over all contacts beyond, 6 positions take 11 places and still 30 degrees; 7 no more.
    expect([6, 7].map((count) => stepFor(placesFor(count, 'shorted in sections')))).toEqual([30, 22.5]);
    expect(positionDeg(0, 3, 30)).toBe(-30);
    expect(positionDeg(2, 3, 30)).toBe(30);
  });
});

describe('a wafer', () => {
  test('has its contacts in turning order, mirrored from behind, no text over another, within its half', () => {
    let checked = 0;
    fc.assert(
      fc.property(waferArb, (wafer) => {
        const front = drawWafer(wafer, 'front', 45, measure);
        const behind = drawWafer(wafer, 'behind', 45, measure);
        expect(behind.contacts.map(([x, y]) => [-x, y])).toEqual(front.contacts.map(([x, y]) => [x, y]));
        const step = wafer.stepDeg;
        for (const [i, place] of front.contacts.entries()) {
          const next = front.contacts[i + 1];
          // 1e-6 degrees: nothing but rounding of sines.
          if (next !== undefined) expect((clock(next) - clock(place) + 360) % 360).toBeCloseTo(step, 6);
        }
        for (const drawn of [front, behind]) {
          const texts = textsOf(drawn.shapes);
          const boxes = texts.map((text) => textBox(text, measure));
          boxes.forEach((box, i) => {
            expect(inside(box, { ...drawn.box, left: -45, right: 45 }, 0.7)).toBe(true);
            for (const other of boxes.slice(i + 1)) expect(overlap(box, other, 0.05)).toBe(false);
          });
          // Every name or number stands beside its own contact: nearest to it of all, 0.2 mm for dots 2 mm apart.
          for (const text of texts) {
            const index = wafer.contacts.findIndex(({ name, number }) => text.text === name || text.text === number);
            if (index < 0) continue;
            const { left, right, bottom, top } = textBox(text, measure);
            const off = drawn.contacts.map(([x, y]) => Math.hypot((left + right) / 2 - x, (bottom + top) / 2 - y));
            const near = drawn.contacts.map(([x, y]) =>
              Math.hypot(Math.max(left - x, x - right, 0), Math.max(bottom - y, y - top, 0)),
            );
            expect(Math.min(off[index]! - Math.min(...off), near[index]! - Math.min(...near))).toBeLessThan(0.2);
            checked++;
          }
        }
      }),
      { seed: 20261201, numRuns: 120 },
    );
    console.log(`wafers: ${checked} words beside their contacts`);
    expect(checked).toBeGreaterThan(2000);
  });

  test('joins what its kind says: a link to F past the rotor, a rotor over the contacts beyond, pairs but one', () => {
    const contacts = ['1', '2', '3', '4', '5'].map((number) => ({
      number,
      name: number === '5' ? 'F' : `tap ${number}`,
    }));
    const base = { contacts, stepDeg: 30, shown: 2, common: 'earth', link: null, bridge: null } as const;
    const bandOf = (shapes: readonly Shape[]) =>
      shapes.find((shape) => shape.shape === 'polyline' && shape.fill === 0.75) as
        | { points: [number, number][] }
        | undefined;
    for (const side of ['front', 'behind'] as const) {
      const sign = side === 'front' ? 1 : -1;
      const plain = drawWafer(base, side, 45, measure);
      expect(bandOf(plain.shapes)).toBeUndefined();
      const bridged = drawWafer({ ...base, bridge: 'behind' }, side, 45, measure);
      const covered = bandOf(bridged.shapes)!.points.map(([x, y]) => sign * ((Math.atan2(x, y) * 180) / Math.PI));
      // From contact 3 at the top to contact 5 at 60 degrees, not as far as contact 2 at -30 or a sixth place at 90.
      expect(Math.min(...covered)).toBeGreaterThan(-15);
      expect(Math.min(...covered)).toBeLessThanOrEqual(0);
      expect(Math.max(...covered)).toBeGreaterThanOrEqual(60);
      expect(Math.max(...covered)).toBeLessThan(75);
      const linked = drawWafer({ ...base, link: 'last' }, side, 45, measure);
      const link = linked.shapes.find((shape) => shape.shape === 'polyline' && shape.points.length > 4);
      const [first] = link?.shape === 'polyline' ? link.points : [];
      expect(sign * ((Math.atan2(first![0], first![1]) * 180) / Math.PI)).toBeCloseTo(60, 6);
      const cut = contacts.map((contact) => ({ ...contact, name: contact.name === 'F' ? '' : contact.name }));
      const pairs = drawWafer({ ...base, contacts: cut, common: null }, side, 45, measure);
      const bridges = pairs.shapes.filter((shape) => shape.shape === 'line' && shape.weight === 'outline');
      expect(bridges.length).toBe(3);
      expect(textsOf(pairs.shapes).map(({ text }) => text)).not.toContain('5');
    }
  });
});
