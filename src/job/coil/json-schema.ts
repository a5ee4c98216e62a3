/** The JSON Schema of a coil file, for editors; shipped as `templates/schemas/coil.schema.json`. */
import { type EditorNode, forEditors } from '../editor.ts';
import { eitherOf, nodeOf, relax } from '../schema-node.ts';
import { COIL_DEFAULTS } from './defaults.ts';
import { groupFileSchema, textFileSchema } from './schema.ts';

/** Draft 2020-12. A key with a default is not required: it is filled in before the file is read. */
export function coilJsonSchema(): Record<string, unknown> {
  const schema = nodeOf(groupFileSchema);
  const words = nodeOf(textFileSchema).properties?.coil?.properties?.wire;
  const keys = schema.properties?.coil?.properties;
  if (keys?.wire !== undefined && words !== undefined) {
    keys.wire = eitherOf(keys.wire, words, 'other');
  }
  relax(schema, COIL_DEFAULTS, new Set([...Object.keys(COIL_DEFAULTS), 'name', 'spread']));
  return forEditors(schema as EditorNode);
}
