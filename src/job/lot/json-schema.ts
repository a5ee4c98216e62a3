/** The JSON Schema of a lot file, for editors; shipped as `templates/schemas/lot.schema.json`. */
import { type EditorNode, forEditors } from '../editor.ts';
import { eitherOf, nodeOf } from '../schema-node.ts';
import { LOT_DEFAULTS, listedLotSchema, tabledLotSchema } from './schema.ts';

/** Draft 2020-12. A key with a default is not required: it is filled in before the file is read. */
export function lotJsonSchema(): Record<string, unknown> {
  const schema = nodeOf(listedLotSchema);
  const keys = schema.properties ?? {};
  const table = nodeOf(tabledLotSchema).properties?.coils;
  if (keys.coils !== undefined && table !== undefined) {
    keys.coils = eitherOf(keys.coils, { type: table.type, minLength: table.minLength }, 'own');
  }
  for (const [key, value] of Object.entries(LOT_DEFAULTS)) keys[key] = { ...keys[key], default: value };
  schema.required = ['coils'];
  return forEditors(schema as EditorNode);
}
