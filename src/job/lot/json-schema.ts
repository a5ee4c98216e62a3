/** The JSON Schema of a lot file, for editors; shipped as `templates/schemas/lot.schema.json`. */
import * as z from 'zod';
import { type EditorNode, forEditors } from '../editor.ts';
import { LOT_DEFAULTS, listedLotSchema, tabledLotSchema } from './schema.ts';

interface Node {
  properties?: Record<string, Node>;
  required?: string[];
  [key: string]: unknown;
}

/** Draft 2020-12. A key with a default is not required: it is filled in before the file is read. */
export function lotJsonSchema(): Record<string, unknown> {
  const of = (schema: z.ZodType) => z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Node;
  const schema = of(listedLotSchema);
  const keys = schema.properties ?? {};
  const table = of(tabledLotSchema).properties?.coils;
  if (keys.coils !== undefined && table !== undefined) {
    const { description, ...list } = keys.coils;
    keys.coils = { description, anyOf: [list, { type: table.type, minLength: table.minLength }] };
  }
  for (const [key, value] of Object.entries(LOT_DEFAULTS)) keys[key] = { ...keys[key], default: value };
  schema.required = ['coils'];
  return forEditors(schema as EditorNode);
}
