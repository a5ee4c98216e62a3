import { describe, expect, it } from 'vitest';
import { runStock, STOCK_KINDS, type StockOptions } from '../../cli/stock.ts';
import { Fault } from '../../src/fault.ts';
import { byWords } from '../../src/stock/search.ts';
import { allWires } from '../../src/stock/wires.ts';

function list(options: Partial<StockOptions>): string {
  let text = '';
  runStock({
    json: false,
    columns: 80,
    ...options,
    out: (part) => {
      text += part;
    },
  });
  return text;
}

function fault(options: Partial<StockOptions>): Fault {
  try {
    list(options);
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  throw new Error('no fault');
}

const names = (options: Partial<StockOptions>): readonly string[] => {
  const parsed: { items: { name: string }[] } = JSON.parse(list({ ...options, json: true }));
  return parsed.items.map((item) => item.name);
};

describe('stock', () => {
  it.each(STOCK_KINDS)('lists %s as a table of 80 columns and as JSON of as many', (what) => {
    const lines = list({ what }).trimEnd().split('\n');
    const longest = Math.max(...lines.map((line) => line.length));
    const items = names({ what });
    console.log(`stock ${what}: ${items.length}, longest line ${longest}`);
    expect(items.length).toBeGreaterThan(0);
    expect(longest).toBeLessThanOrEqual(80);
    expect(lines).toContain(`${items.length} ${what}`);
    for (const item of items) expect(lines.some((line) => line.startsWith(item))).toBe(true);
  });

  it('keeps the longest litz name within 80 columns', () => {
    const text = list({ filter: '20 x 0.112 mm litz double silk' });
    expect(Math.max(...text.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
    expect(text).toContain('20 x 0.112 mm litz double silk');
  });

  it('prints as shown, narrow and wide', () => {
    expect(list({ filter: '24 awg enamel' })).toBe(
      [
        'wire                 bare mm  overall mm (low..high)  solders  note',
        '-------------------  -------  ----------------------  -------  ----',
        '24 AWG enamel          0.511  0.541 (0.531..0.551)    no          1',
        '24 AWG enamel heavy    0.511  0.565 (0.554..0.577)    no          2',
        '',
        ' 1  ASTM B258, NEMA MW 1000 single build (computed; limits read)',
        ' 2  ASTM B258, NEMA MW 1000 heavy build (computed; greatest overall from memory)',
        '',
        '2 wires',
        'Solders: taken to tin through; a fibre comes off first, thicker enamel is',
        'scraped. Litz is made to order, as in `coilwright stock 20 x 0.1 mm litz`.',
        '',
      ].join('\n'),
    );
    expect(list({ filter: '0.1 mm enamel heavy', columns: 120 }).split('\n').slice(0, 3)).toEqual([
      'wire                 bare mm  overall mm (low..high)  solders  standard               status',
      '-------------------  -------  ----------------------  -------  ---------------------  ------',
      '0.1 mm enamel heavy    0.100  0.120 (0.116..0.125)    yes      IEC 60317-0-1 grade 2  read',
    ]);
  });

  it('filters by words, numbers as numbers, and by diameter with both ends', () => {
    expect(names({ filter: '0.50 dcc' })).toEqual(['0.5 mm double cotton']);
    expect(names({ filter: 'cott 0.5mm doub' })).toEqual(['0.5 mm double cotton']);
    expect(names({ filter: 'mm enamel', fromMm: 0.5, toMm: 0.56 })).toEqual([
      '0.5 mm enamel',
      '0.5 mm enamel heavy',
      '0.56 mm enamel',
      '0.56 mm enamel heavy',
    ]);
    expect(names({ what: 'tubes', fromMm: 76, toMm: 77 })).toEqual(['3 in']);
    expect(names({ what: 'spacers', filter: 'line', fromMm: 2 })).toEqual(['fishing line 2 mm', 'fishing line 2.4 mm']);
    expect(names({ what: 'materials', filter: 'p' })).toEqual(['PLA', 'PETG', 'phenolic paper', 'polystyrene', 'PVC']);
    expect(names({ filter: '20 x 0.1 mm litz' })).toEqual(['20 x 0.1 mm litz single silk']);
    expect(byWords(allWires(), '').length).toBe(allWires().length);
  });

  it('writes lengths in JSON without a tail of floating point', () => {
    const numbers = list({ json: true }).match(/\d+\.\d+/g) ?? [];
    expect(numbers.length).toBeGreaterThan(1000);
    for (const number of numbers) expect(number.length).toBeLessThanOrEqual('0.1234'.length);
  });

  it('refuses what leaves nothing, naming it', () => {
    const empty = fault({ filter: '0.55 mm', toMm: 1 });
    expect(empty.exit).toBe(3);
    expect(empty.faults[0]).toMatchObject({ code: 'nothing-in-stock', got: '"0.55 mm" to 1 mm' });
    expect(empty.faults[0]!.todo).toBe('take `0.5 mm enamel` or `0.56 mm enamel`');
    expect(fault({ what: 'tubes', fromMm: 500 }).faults[0]).toMatchObject({ got: 'from 500 mm' });
    expect(fault({ what: 'materials', fromMm: 1 }).exit).toBe(2);
    expect(fault({ filter: 'tubs card' }).faults[0]).toMatchObject({ got: '"tubs card"', todo: 'did you mean tubes?' });
  });
});
