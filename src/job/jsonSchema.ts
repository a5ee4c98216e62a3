/** The JSON Schema of a job file, for editors; shipped as `templates/schemas/job.schema.json`. */
import { DEFAULTS } from './defaults.ts';
import { type EditorNode, forEditors } from './editor.ts';
import { jobSchema } from './schema.ts';
import { type Node, nodeOf, relax } from './schema-node.ts';

/** Draft 2020-12. A key with a default is not required: it is filled in before the job is read. */
export const jobJsonSchema = (): Record<string, unknown> => forEditors(jobKeys() as EditorNode);

/** The same before its descriptions are completed, for files that share keys with a job. */
export function jobKeys(): Node {
  const schema = nodeOf(jobSchema);
  const filled = new Set([
    ...Object.keys(DEFAULTS),
    ...['former', 'winding', 'printer', 'shop', 'shop.capacitors'],
    ...['outside-diameter', 'longest', 'material', 'mounting', 'flanges'].map((key) => `former.${key}`),
    'second.end',
    ...['line', 'layer'].map((key) => `printer.${key}`),
  ]);
  relax(schema, DEFAULTS, filled);
  return schema;
}
