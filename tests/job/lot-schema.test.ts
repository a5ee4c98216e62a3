/** UPDATE=1 writes the shipped schema anew; without it the test fails when it is not up to date. */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { lotJsonSchema } from '../../src/job/lot/json-schema.ts';
import { readLotFile } from '../../src/job/lot-file.ts';

const shipped = new URL('../../templates/schemas/lot.schema.json', import.meta.url);

interface Node {
  readonly description?: string;
  readonly default?: unknown;
  readonly required?: readonly string[];
  readonly items?: Node;
  readonly anyOf?: readonly Node[];
  readonly properties?: Readonly<Record<string, Node>>;
}

/** Every key, dotted, with its node; those of the entries of a list behind the list. */
function keys(node: Node, prefix = ''): readonly (readonly [string, Node])[] {
  const inner = node.items ?? node.anyOf?.[0]?.items;
  return [
    ...(inner?.properties === undefined ? [] : keys(inner, prefix)),
    ...Object.entries(node.properties ?? {}).flatMap(([key, one]) => [
      [`${prefix}${key}`, one] as const,
      ...keys(one, `${prefix}${key}.`),
    ]),
  ];
}

describe('the JSON Schema of a lot file', () => {
  it('is shipped up to date', () => {
    const text = `${JSON.stringify(lotJsonSchema(), null, 2)}\n`;
    if (process.env.UPDATE === '1') writeFileSync(shipped, text);
    expect(existsSync(shipped) ? readFileSync(shipped, 'utf8') : '').toBe(text);
  });

  it('describes every key, asks for what the reader asks for, and shows the defaults that it takes', () => {
    const schema = lotJsonSchema() as Node;
    const all = keys(schema);
    console.log(`keys in the schema: ${all.length}`);
    expect(all.length).toBe(22);
    expect(all.filter(([, node]) => (node.description ?? '').length < 10).map(([key]) => key)).toEqual([]);
    expect(schema.required).toEqual(['coils']);
    const entries = ['coils', 'spools', 'printers'].map((key) => {
      const node = schema.properties?.[key];
      return (node?.items ?? node?.anyOf?.[0]?.items)?.required;
    });
    expect(entries).toEqual([['job'], ['name', 'wire', 'left'], ['name', 'bed', 'height']]);
    const least = readLotFile('coils: [{ job: x, quantity: 1 }]', 'x');
    expect(all.filter(([, node]) => node.default !== undefined).map(([key, node]) => [key, node.default])).toEqual([
      ['first-serial', least.firstSerial],
      ['jigs', least.jigs],
    ]);
  });
});
