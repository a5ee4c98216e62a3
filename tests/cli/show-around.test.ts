import { expect, test } from 'vitest';
import { showAround } from '../../cli/show-around.ts';
import type { Around } from '../../src/record/around-schema.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

const best = (use: 'strongest' | 'most selective' | 'balanced', aerial: number, outputDb: number) => ({
  use,
  aerial,
  detector: 2,
  outputDb,
  off9Db: -4.94,
  why: '',
});
const AROUND = {
  second: {
    kind: 'inner',
    turns: 8,
    wire: { name: '0.4 mm enamel', bareMm: 0.4, overallMm: 0.44 },
    startMm: 8.69,
    coupling: 0.3,
    mutualUh: 14.12,
    slide: {
      travelMm: -42.3,
      scale: [
        { mm: 0, coupling: 0.3 },
        { mm: -42.3, coupling: 0.05 },
      ],
    },
  },
  aerial: { kind: 'horizontal wire', capacitancePf: 123.2 },
  detector: { kind: 'germanium diode', resistanceKohm: 30, capacitancePf: 3 },
  best: [best('strongest', 4, 0), best('most selective', 1, -8.2), best('balanced', 4, 0)],
} as unknown as Around;

test('the set around the coil on the terminal: uses that the same contacts serve are told together', () => {
  const lines = showAround({ around: AROUND } as CoilRecord, { columns: 200 });
  expect(lines).toEqual([
    'The set around the coil',
    '  - second winding, inner: 8 turns of 0.4 mm enamel, start at 8.69 mm; coupling 0.3, down to 0.05 when moved by 42.3 mm, M 14.12 µH',
    '  - aerial, horizontal wire: 123.2 pF',
    '  - detector, germanium diode: 30 kΩ and 3 pF',
    '  - strongest, balanced: aerial on tap 4, detector on tap 2; none gives more, -4.9 dB left 9 kHz off',
    '  - most selective: aerial on tap 1, detector on tap 2; -8.2 dB from the strongest, -4.9 dB left 9 kHz off',
  ]);
  expect(showAround({} as CoilRecord, { columns: 80 })).toEqual([]);
  for (const line of showAround({ around: AROUND } as CoilRecord, { columns: 40 }))
    expect(line.length).toBeLessThanOrEqual(40);
});
