/**
 * What an editor is told of a file: the JSON Schema of its one definition, each key with what is taken when it is left out, or that
 * it is needed. Whoever fills in a key sees its meaning, its unit and its default at once.
 */

/** A part of a JSON Schema. */
export interface EditorNode {
  readonly description?: string;
  readonly default?: unknown;
  readonly required?: readonly string[];
  readonly properties?: Readonly<Record<string, EditorNode>>;
  readonly items?: EditorNode;
  readonly anyOf?: readonly EditorNode[];
  readonly [key: string]: unknown;
}

/** A description that says by itself what holds without the key. */
const TELLS = /\bleft out\b|\bwhen printed\b|\bneeded (?:for|in)\b|\bnot read\b|\belse\b|^instead\b|^the same as\b/i;

/** The same schema with every description completed. */
export function forEditors(schema: EditorNode): Record<string, unknown> {
  const { properties, items, anyOf, required = [] } = schema;
  return {
    ...schema,
    ...(properties === undefined
      ? {}
      : {
          properties: Object.fromEntries(
            Object.entries(properties).map(([key, node]) => [key, forEditors(told(node, required.includes(key)))]),
          ),
        }),
    ...(items === undefined ? {} : { items: forEditors(items) }),
    ...(anyOf === undefined ? {} : { anyOf: anyOf.map(forEditors) }),
  };
}

function told(node: EditorNode, needed: boolean): EditorNode {
  const { description = '' } = node;
  const { default: taken } = node;
  if (needed) return { ...node, description: `${description} Needed.` };
  if (taken !== undefined) return { ...node, description: `${description} Left out: ${written(taken)}.` };
  return TELLS.test(description) ? node : { ...node, description: `${description} May be left out.` };
}

const written = (value: unknown): string => (Array.isArray(value) ? value.join(', ') : String(value));
