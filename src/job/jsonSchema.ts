/** The JSON Schema of a job file, for editors; shipped as `templates/schemas/job.schema.json`. */
import * as z from 'zod';
import { DEFAULTS } from './defaults.ts';
import { type EditorNode, forEditors } from './editor.ts';
import { jobSchema } from './schema.ts';

interface Node {
  properties?: Record<string, Node>;
  required?: string[];
  [key: string]: unknown;
}

/** Draft 2020-12. A key with a default is not required: it is filled in before the job is read. */
export const jobJsonSchema = (): Record<string, unknown> => forEditors(jobKeys());

/** The same before its descriptions are completed, for files that share keys with a job. */
export function jobKeys(): EditorNode {
  const schema = z.toJSONSchema(jobSchema, { io: 'input', unrepresentable: 'any' }) as Node;
  const filled = new Set([
    ...Object.keys(DEFAULTS),
    ...['former', 'winding', 'printer', 'shop', 'shop.capacitors'],
    ...['outside-diameter', 'longest', 'material', 'mounting', 'flanges'].map((key) => `former.${key}`),
    'second.end',
    ...['line', 'layer'].map((key) => `printer.${key}`),
  ]);
  relax(schema, '', filled);
  return schema;
}

function relax(node: Node, prefix: string, filled: ReadonlySet<string>): void {
  if (node.required !== undefined) {
    node.required = node.required.filter((key) => !filled.has(`${prefix}${key}`));
    if (node.required.length === 0) delete node.required;
  }
  for (const [key, inner] of Object.entries(node.properties ?? {})) {
    const dotted = `${prefix}${key}`;
    if (Object.hasOwn(DEFAULTS, dotted)) inner.default = DEFAULTS[dotted as keyof typeof DEFAULTS];
    relax(inner, `${dotted}.`, filled);
  }
}
