/** Every place of a record that can hold a number, as its schema has them: `windings[].taps[].turn`. */
import * as z from 'zod';
import { recordSchema } from '../../src/record/schema.ts';

interface Node {
  readonly type?: string | readonly string[];
  readonly const?: unknown;
  readonly properties?: Readonly<Record<string, Node>>;
  readonly items?: Node;
  readonly prefixItems?: readonly Node[];
  readonly anyOf?: readonly Node[];
  readonly $ref?: string;
}

function walk(node: Node, path: string, found: Set<string>): void {
  if (node.$ref !== undefined) throw new Error(`${path} refers elsewhere, which nobody follows here`);
  for (const one of node.anyOf ?? []) walk(one, path, found);
  const numeric = [node.type].flat().some((type) => type === 'number' || type === 'integer');
  if (numeric && node.const === undefined) found.add(path);
  for (const [key, inner] of Object.entries(node.properties ?? {}))
    walk(inner, path === '' ? key : `${path}.${key}`, found);
  for (const inner of [node.items, ...(node.prefixItems ?? [])])
    if (inner !== undefined) walk(inner, `${path}[]`, found);
}

/** Rising. */
export function numericLeaves(): string[] {
  const found = new Set<string>();
  walk(z.toJSONSchema(recordSchema) as Node, '', found);
  return [...found].sort();
}
