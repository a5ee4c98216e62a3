/** UPDATE=1 writes the shipped schema anew; without it the test fails when it is not up to date. */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { jobJsonSchema } from '../../src/job/jsonSchema.ts';
import { readJob } from '../../src/job/read.ts';

const shipped = new URL('../../templates/schemas/job.schema.json', import.meta.url);

interface Node {
  readonly description?: string;
  readonly default?: unknown;
  readonly required?: readonly string[];
  readonly properties?: Readonly<Record<string, Node>>;
}

/** Every key, dotted, with its node. */
function keys(node: Node, prefix = ''): readonly (readonly [string, Node])[] {
  return Object.entries(node.properties ?? {}).flatMap(([key, inner]) => [
    [`${prefix}${key}`, inner] as const,
    ...keys(inner, `${prefix}${key}.`),
  ]);
}

describe('the JSON Schema of a job', () => {
  it('is shipped up to date', () => {
    const text = `${JSON.stringify(jobJsonSchema(), null, 2)}\n`;
    if (process.env.UPDATE === '1') writeFileSync(shipped, text);
    expect(existsSync(shipped) ? readFileSync(shipped, 'utf8') : '').toBe(text);
  });

  it('describes every key, and asks only for job, want the capacitor of a set and the kind of a second winding', () => {
    const schema = jobJsonSchema() as Node;
    const all = keys(schema);
    console.log(`keys in the schema: ${all.length}`);
    expect(all.length).toBeGreaterThan(35);
    expect(all.filter(([, node]) => (node.description ?? '').length < 10).map(([key]) => key)).toEqual([]);
    expect([
      schema.required,
      ...all.flatMap(([key, node]) => (node.required ? [[key, ...node.required]] : [])),
    ]).toEqual([
      ['job', 'want'],
      ['set', 'capacitor'],
      ['second', 'kind'],
    ]);
  });

  it('shows the defaults that the reader takes', () => {
    const least = readJob(
      'job: x\nwant: { inductance: 9 uH }\nset: { capacitor: 15 pF to 380 pF }\nas-made: {}\nsecond: { kind: sleeve, turns: 5 }\naerial: {}\ndetector: {}',
      'x',
    ).assumed;
    const shown = keys(jobJsonSchema() as Node).filter(([, node]) => node.default !== undefined);
    expect(shown.length).toBeGreaterThan(15);
    for (const [key, node] of shown) expect([key, least[key]]).toEqual([key, node.default]);
  });
});
