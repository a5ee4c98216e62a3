import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';

const FOLDERS = ['field', 'coupled'];
const EXAMPLE = /\* Example: (.+) = (-?[\d.]+(?:e-?\d+)?)$/gm;

/** Half a unit of the last digit that the example writes. */
function tolerance(written: string): number {
  const [mantissa = '', exponent = '0'] = written.split('e');
  return 0.5 * 10 ** (Number(exponent) - (mantissa.split('.')[1]?.length ?? 0));
}

test('examples in the doc comments of the field and of coupled circuits run', async () => {
  const scope: Record<string, unknown> = {};
  const examples: [file: string, expression: string, written: string][] = [];
  for (const folder of FOLDERS) {
    const place = new URL(`../../../src/physics/${folder}/`, import.meta.url);
    for (const file of readdirSync(place)) {
      const module: Record<string, unknown> = await import(new URL(file, place).href);
      Object.assign(scope, module);
      const text = readFileSync(new URL(file, place), 'utf8');
      for (const [, expression = '', written = ''] of text.matchAll(EXAMPLE))
        examples.push([file, expression, written]);
    }
  }
  const wrong: string[] = [];
  for (const [file, expression, written] of examples) {
    const got: unknown = new Function(...Object.keys(scope), `return ${expression}`)(...Object.values(scope));
    // A hair more, since the written digits are themselves doubles.
    const near = Math.abs(Number(got) - Number(written)) < 1.001 * tolerance(written);
    if (!near) wrong.push(`${file}: ${expression} = ${written}, got ${got}`);
  }
  console.log(`examples of the field and of coupled circuits: ${examples.length} ran`);
  expect(wrong).toEqual([]);
  expect(examples.length).toBeGreaterThan(8);
});
