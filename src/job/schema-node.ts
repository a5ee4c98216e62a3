/** What the JSON Schemas of all files are made with: nodes of a schema, and keys that are filled in when they are left out. */
import * as z from 'zod';

/** A part of a JSON Schema while it is made. */
export interface Node {
  properties?: Record<string, Node>;
  required?: string[];
  items?: unknown;
  [key: string]: unknown;
}

/** Draft 2020-12, of what a person writes. */
export const nodeOf = (schema: z.ZodType): Node =>
  z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Node;

/** A key that may be written as something else as well, under its own description. */
export function eitherOf({ description, ...own }: Node, other: Node, first: 'own' | 'other'): Node {
  return { description, anyOf: first === 'own' ? [own, other] : [other, own] };
}

/** Gives keys their `defaults`, by dotted key, and takes `filled` from what is required: they are there before the file is read. */
export function relax(
  node: Node,
  defaults: Readonly<Record<string, unknown>>,
  filled: ReadonlySet<string>,
  prefix = '',
): void {
  if (node.required !== undefined) {
    node.required = node.required.filter((key) => !filled.has(`${prefix}${key}`));
    if (node.required.length === 0) delete node.required;
  }
  for (const [key, inner] of Object.entries(node.properties ?? {})) {
    const dotted = `${prefix}${key}`;
    if (Object.hasOwn(defaults, dotted)) inner.default = defaults[dotted];
    relax(inner, defaults, filled, `${dotted}.`);
  }
}
