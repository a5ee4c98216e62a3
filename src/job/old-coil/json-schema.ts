/** The JSON Schema of an old coil's file, for editors; shipped as `templates/schemas/match.schema.json`. */
import { type EditorNode, forEditors } from '../editor.ts';
import { jobKeys } from '../jsonSchema.ts';
import { eitherOf, type Node, nodeOf, relax } from '../schema-node.ts';
import { OLD_DEFAULTS } from './defaults.ts';
import { groupFileSchema, textFileSchema } from './schema.ts';

/** Draft 2020-12. The sections of a job are those of its schema; a key with a default is not required. */
export function oldCoilJsonSchema(): Record<string, unknown> {
  const schema = nodeOf(groupFileSchema);
  const job = jobKeys();
  const own = schema.properties ?? {};
  for (const key of Object.keys(own)) {
    const shared = job.properties?.[key];
    if (shared !== undefined) own[key] = shared;
  }
  const words = nodeOf(textFileSchema).properties?.old?.properties?.wire;
  const old = own.old?.properties ?? {};
  if (old.wire !== undefined && words !== undefined) {
    old.wire = eitherOf(old.wire, words, 'other');
  }
  for (const keys of [(old.taps?.items as Node | undefined)?.properties, old.whole?.properties])
    if (keys?.inductance !== undefined) keys.inductance = eitherOf(keys.inductance, { type: 'string' }, 'other');
  if (old.taps !== undefined) old.taps.items = { anyOf: [old.taps.items, { const: 'lost' }, { type: 'number' }] };
  relax(schema, OLD_DEFAULTS, new Set(Object.keys(OLD_DEFAULTS)));
  schema.required = ['old'];
  return forEditors(schema as EditorNode);
}
