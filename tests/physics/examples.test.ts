import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';

const SOURCE = new URL('../../src/physics/', import.meta.url);
const EXAMPLE = /\* Example: (\w+)\(([^)]*)\)((?:\.\w+(?:\(\d+\))?)?) = (\S+)$/gm;
const LAW = /\/\*\*((?:(?!\*\/)[\s\S])*)\*\/\s*export function (\w+)/g;
/** Helpers that state no law of their own. */
const NO_LAW = ['needPositive', 'allPositive', 'countTurns', 'placeAt', 'maxwellFactor', 'gaussLegendre'];

/** Half a unit of the last digit that the example writes. */
function tolerance(written: string): number {
  const [mantissa = '', exponent = '0'] = written.split('e');
  return 0.5 * 10 ** (Number(exponent) - (mantissa.split('.')[1]?.length ?? 0));
}

/** The value, then `.key` or `.method(number)` of it. */
function follow(value: unknown, path: string): unknown {
  const [, key, argument] = /^\.(\w+)(?:\((\d+)\))?$/.exec(path) ?? [];
  if (key === undefined) return value;
  const member: unknown = Reflect.get(Object(value), key);
  return typeof member === 'function' ? member.call(value, Number(argument)) : member;
}

test('every law has a doc comment whose example runs', async () => {
  let cases = 0;
  for (const file of readdirSync(SOURCE).filter((name) => name.endsWith('.ts'))) {
    const text = readFileSync(new URL(file, SOURCE), 'utf8');
    const module: Record<string, unknown> = await import(new URL(file, SOURCE).href);
    for (const [, comment = '', name = ''] of text.matchAll(LAW)) {
      if (!NO_LAW.includes(name)) expect(comment, `${name} has no example of itself`).toContain(`Example: ${name}(`);
    }
    for (const [, name = '', args = '', path = '', written = ''] of text.matchAll(EXAMPLE)) {
      const law = module[name];
      if (typeof law !== 'function') throw new Error(`${file}: ${name} is not exported`);
      const got = follow(law(...(JSON.parse(`[${args}]`) as unknown[])), path);
      const label = `${name}(${args})${path} = ${written}`;
      if (typeof got === 'boolean') expect(String(got), label).toBe(written);
      // A hair more, since the written digits are themselves doubles.
      else
        expect(Math.abs(Number(got) - Number(written)), `${label}, got ${got}`).toBeLessThan(
          1.001 * tolerance(written),
        );
      cases++;
    }
  }
  console.log(`examples of laws: ${cases} ran`);
  expect(cases).toBeGreaterThan(25);
});
