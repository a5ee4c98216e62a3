/** The JSON Schema of an old coil's file, for editors; shipped as `templates/schemas/match.schema.json`. */
import * as z from 'zod';
import { type EditorNode, forEditors } from '../editor.ts';
import { jobKeys } from '../jsonSchema.ts';
import { OLD_DEFAULTS } from './defaults.ts';
import { groupFileSchema, textFileSchema } from './schema.ts';

interface Node {
  properties?: Record<string, Node>;
  required?: string[];
  items?: unknown;
  [key: string]: unknown;
}

/** Draft 2020-12. The sections of a job are those of its schema; a key with a default is not required. */
export function oldCoilJsonSchema(): Record<string, unknown> {
  const of = (schema: z.ZodType) => z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }) as Node;
  const schema = of(groupFileSchema);
  const job = jobKeys() as Node;
  const own = schema.properties ?? {};
  for (const key of Object.keys(own)) {
    const shared = job.properties?.[key];
    if (shared !== undefined) own[key] = shared;
  }
  const words = of(textFileSchema).properties?.old?.properties?.wire;
  const old = own.old?.properties ?? {};
  if (old.wire !== undefined && words !== undefined) {
    const { description, ...group } = old.wire;
    old.wire = { description, anyOf: [words, group] };
  }
  for (const keys of [(old.taps?.items as Node | undefined)?.properties, old.whole?.properties])
    if (keys?.inductance !== undefined) {
      const { description, ...group } = keys.inductance;
      keys.inductance = { description, anyOf: [{ type: 'string' }, group] };
    }
  if (old.taps !== undefined) old.taps.items = { anyOf: [old.taps.items, { const: 'lost' }, { type: 'number' }] };
  schema.required = ['old'];
  for (const [dotted, value] of Object.entries(OLD_DEFAULTS)) {
    const [first = '', second] = dotted.split('.');
    const node = second === undefined ? own[first] : own[first]?.properties?.[second];
    if (node !== undefined) node.default = value;
    const holder = second === undefined ? undefined : own[first];
    if (holder?.required === undefined) continue;
    holder.required = holder.required.filter((key) => key !== second);
    if (holder.required.length === 0) delete holder.required;
  }
  return forEditors(schema as EditorNode);
}
