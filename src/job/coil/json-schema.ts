/** The JSON Schema of a coil file, for editors; shipped as `templates/schemas/coil.schema.json`. */
import * as z from 'zod';
import { type EditorNode, forEditors } from '../editor.ts';
import { COIL_DEFAULTS } from './defaults.ts';
import { groupFileSchema, textFileSchema } from './schema.ts';

interface Node {
  properties?: Record<string, Node>;
  required?: string[];
  [key: string]: unknown;
}

/** Draft 2020-12. A key with a default is not required: it is filled in before the file is read. */
export function coilJsonSchema(): Record<string, unknown> {
  const of = (schema: z.ZodType) => z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Node;
  const schema = of(groupFileSchema);
  const words = of(textFileSchema).properties?.coil?.properties?.wire;
  const keys = schema.properties?.coil?.properties;
  if (keys?.wire !== undefined && words !== undefined) {
    const { description, ...group } = keys.wire;
    keys.wire = { description, anyOf: [words, group] };
  }
  relax(schema, '', new Set([...Object.keys(COIL_DEFAULTS), 'name', 'spread']));
  return forEditors(schema as EditorNode);
}

function relax(node: Node, prefix: string, filled: ReadonlySet<string>): void {
  if (node.required !== undefined) {
    node.required = node.required.filter((key) => !filled.has(`${prefix}${key}`));
    if (node.required.length === 0) delete node.required;
  }
  for (const [key, inner] of Object.entries(node.properties ?? {})) {
    const dotted = `${prefix}${key}`;
    if (Object.hasOwn(COIL_DEFAULTS, dotted)) inner.default = COIL_DEFAULTS[dotted as keyof typeof COIL_DEFAULTS];
    relax(inner, `${dotted}.`, filled);
  }
}
