import { readFileSync, writeFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { oldCoilJsonSchema } from '../../src/job/old-coil/json-schema.ts';
import { readWritten, valueReader } from '../../src/job/old-coil/reading.ts';
import { readOldCoil } from '../../src/job/old-coil-file.ts';
import { inferredOf } from '../../src/match.ts';
import { MATCHES } from '../../templates/matches/matches.ts';

const OLD = `job: Cracked form
old:
  former-diameter: 60 mm
  wire: { bare: 0.5 mm, overall: 0.56 mm, covering: enamel }
  turns: 80
  pitch: 0.6 mm
  taps: [20, { turns: 40 }, lost, { turns: 70, position: 42 mm }]
`;

const faultOf = (text: string): Fault => {
  try {
    inferredOf(readOldCoil(text, 'old.yaml'));
  } catch (error) {
    if (error instanceof Fault) return error;
    throw error;
  }
  throw new Error('nothing was refused');
};

describe('a reading', () => {
  const read = (raw: unknown) => readWritten(raw, valueReader('length'), 'a length');
  it.each([
    ['76.2 mm', 76.2, null],
    ['3 in', 76.2, null],
    ['76.2 mm ± 0.2 mm', 76.2, 0.2],
    ['76.2 ± 0.2 mm', 76.2, 0.2],
    ['3 in +- 10 thou', 76.2, 0.254],
    ['76.2 mm ± 0.5 %', 76.2, 0.381],
    [{ value: '76.2 mm', uncertainty: '0.0002 mm' }, 76.2, 0.0002],
    [{ value: '76.2 mm', uncertainty: '1 %' }, 76.2, 0.762],
    [{ value: '76.2 mm', uncertainty: '0 mm' }, 76.2, 0],
    [{ value: '76.2 mm' }, 76.2, null],
  ])('%j', (raw, value, uncertainty) => {
    const parsed = read(raw);
    expect(parsed.ok).toBe(true);
    if (!parsed.ok) return;
    expect(parsed.value.value).toBeCloseTo(value, 9);
    if (uncertainty === null) expect(parsed.value.uncertainty).toBeNull();
    else expect(parsed.value.uncertainty).toBeCloseTo(uncertainty, 9);
  });

  it.each([
    ['76.2', /without a unit/],
    [{ value: '76.2 mm', uncertainty: '0.2' }, /uncertainty/],
    [{ value: '76.2 mm', tolerance: '0.2 mm' }, /tolerance/],
    [{ uncertainty: '0.2 mm' }, /without value/],
    ['76.2 mm ± 0.2 pF', /capacitance/],
    [[1], /list/],
  ])('is refused: %j', (raw, wanted) => {
    const parsed = read(raw);
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) expect(parsed.got).toMatch(wanted);
  });

  it('answers to anything, and throws nothing', () => {
    let tried = 0;
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string(),
          fc.jsonValue(),
          fc.tuple(fc.string(), fc.string()).map(([a, b]) => `${a}±${b}`),
        ),
        (raw) => {
          const parsed = read(raw);
          if (!parsed.ok)
            expect([parsed.got, parsed.expected, parsed.todo].every((text) => text.length > 0)).toBe(true);
          tried++;
        },
      ),
      { seed: 6, numRuns: 400 },
    );
    console.log(`readings tried: ${tried}`);
    expect(tried).toBe(400);
  });
});

describe('the file of an old coil', () => {
  it('takes the usual uncertainty where none is written, and says so', () => {
    const { old, job } = readOldCoil(OLD, 'old.yaml');
    expect(old.diameters).toEqual([{ of: 'former', how: 'caliper', mm: { value: 60, uncertainty: 0.2 } }]);
    expect(old.pitchMm).toEqual({ value: 0.6, uncertainty: 0.006 });
    expect(old.taps.map(({ turns }) => turns?.value ?? null)).toEqual([20, 40, null, 70, 80]);
    expect(old.taps[3]!.positionMm).toEqual({ value: 42, uncertainty: 0.3 });
    expect(job.assumed).toMatchObject({
      'old.former-diameter.uncertainty': '0.2 mm',
      'old.taps[4].position.uncertainty': '0.3 mm',
      'old.hand': 'right',
    });
  });

  it('turns circumferences, turns to the inch and lengths of wire into what is used', () => {
    const text = `old:
  former-circumference: 188.5 mm ± 0.5 mm
  wire: { turns-per-inch: 45, weight: 1 oz, length: 15.2 m }
  turns-per-inch: 42
  turns: 80
`;
    const { old } = readOldCoil(text, 'strip.yaml');
    expect(old.diameters[0]!.mm.value).toBeCloseTo(188.5 / Math.PI, 9);
    expect(old.diameters[0]!.mm.uncertainty).toBeCloseTo(0.5 / Math.PI, 9);
    expect(old.wire.overallMm!.value).toBeCloseTo(25.4 / 45, 9);
    expect(old.wire.massG!.value).toBeCloseTo(28.3495, 3);
    expect(old.wire.lengthM!.value).toBeCloseTo(15.2, 9);
    expect((old.pitchMm as { value: number }).value).toBeCloseTo(25.4 / 42, 9);
  });

  it('winds the new one as the old one was, unless told otherwise', () => {
    const left = OLD.replace('  turns: 80', '  turns: 80\n  hand: left\n  earthed: finish');
    expect(readOldCoil(left, 'old.yaml').job.winding).toMatchObject({ hand: 'left', earthed: 'finish' });
    expect(readOldCoil(`${left}winding: { hand: right }\n`, 'old.yaml').job.winding.hand).toBe('right');
  });

  it.each([
    ['layers: multilayer', 'more-than-a-layer', 'old.layers', /several times the capacitance/],
    ['layers: bank', 'more-than-a-layer', 'old.layers', /single layer/],
    ['turns-per-inch: 42', 'two-pitches', 'old.turns-per-inch', /besides pitch/],
    ['bannd: 1 MHz to 2 MHz', 'unknown-key', 'old.bannd', /not known/],
  ])('refuses %s', (line, code, key, wanted) => {
    const { exit, faults } = faultOf(OLD.replace('  turns: 80', `  turns: 80\n  ${line}`));
    expect(exit).toBe(3);
    expect(faults[0]).toMatchObject({ code, place: { file: 'old.yaml', line: 6, key } });
    expect(`${faults[0]!.got} ${faults[0]!.expected}`).toMatch(wanted);
  });

  it('refuses a tap of which nothing is written, and one that is lost and measured', () => {
    const empty = faultOf(OLD.replace('lost, ', '{ angle: 30 deg }, '));
    expect(empty.faults[0]).toMatchObject({ code: 'too-little', place: { key: 'old.taps[3]' } });
    const both = faultOf(OLD.replace('lost, ', '{ lost: true, turns: 55 }, '));
    expect(both.faults[0]).toMatchObject({ code: 'lost-tap' });
  });

  it('refuses measurements that contradict one another, naming both numbers and the line', () => {
    const { exit, faults } = faultOf(OLD.replace('position: 42 mm', 'position: 17.2 mm'));
    expect(exit).toBe(3);
    expect(faults[0]).toMatchObject({
      code: 'contradiction',
      place: { file: 'old.yaml', line: 7, key: 'old.taps[4].position' },
    });
    expect(faults[0]!.got).toMatch(/tap 4: 70 turns do not fit 17\.2 mm at the pitch of the others, 0\.6 mm/);
    const kept = inferredOf(
      readOldCoil(`${OLD.replace('position: 42 mm', 'position: 17.2 mm')}contradictions: leave out\n`, 'old.yaml'),
    );
    expect(kept.contradictions).toHaveLength(1);
  });

  it('ships the schema that editors use', () => {
    const shipped = new URL('../../templates/schemas/match.schema.json', import.meta.url);
    if (process.env.UPDATE === '1') writeFileSync(shipped, `${JSON.stringify(oldCoilJsonSchema(), null, 2)}\n`);
    expect(JSON.parse(readFileSync(shipped, 'utf8'))).toEqual(oldCoilJsonSchema());
  });

  it('reads its starters', () => {
    let read = 0;
    for (const { name, text } of MATCHES) {
      expect(inferredOf(readOldCoil(text, `${name}.yaml`)).taps.length).toBeGreaterThan(2);
      read++;
    }
    expect(read).toBe(MATCHES.length);
  });
});
