/** What an editor shows at every key of the four kinds of files, and that the starters bring what it needs. */
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { ALL_STARTERS } from '../../cli/starters.ts';
import type { EditorNode } from '../../src/job/editor.ts';

interface Key {
  readonly key: string;
  readonly node: EditorNode;
  readonly needed: boolean;
}

/** Every key below, dotted, those in lists and in one of several forms too. */
function keysOf(node: EditorNode, prefix = ''): readonly Key[] {
  const own = Object.entries(node.properties ?? {}).flatMap(([name, inner]) => [
    { key: `${prefix}${name}`, node: inner, needed: node.required?.includes(name) ?? false },
    ...keysOf(inner, `${prefix}${name}.`),
  ]);
  const others = [...(node.anyOf ?? []), ...(node.items === undefined ? [] : [node.items])];
  return [...own, ...others.flatMap((other) => keysOf(other, prefix))];
}

const SCHEMAS = [...new Map(ALL_STARTERS.map(({ schema }) => [schema.file, schema])).values()];

/** Texts that measure nothing: names, dates, wires, materials, serials, files. */
const WORDS =
  /(?:^|\.)(?:\$schema|job|name|date|wire|material|former-material|meter-name|checked-by|serials|material|lot|to|coils|parts)$/;
/** An amount and its unit, a plain number by its noun, or a share. */
const AMOUNT = /\d ?(?:mm|in|uH|µH|pF|kHz|MHz|%|ohm|deg|degC|°C|g|m|oz|ft)\b|\d ?%|without a unit|"0\.2"/;

describe.each(SCHEMAS.map((schema) => [schema.file, schema] as const))('%s', (_file, schema) => {
  it('says of every key what it is, in which unit, and what holds without it', async () => {
    const keys = keysOf(JSON.parse(await schema.text()));
    const poor = keys.flatMap(({ key, node, needed }) => {
      const { description = '', enum: words, default: taken } = node;
      const last = needed
        ? / Needed\.$/
        : taken === undefined
          ? /left out|when printed|[Nn]eeded|not read|else|nstead|^The same/
          : / Left out: .+\.$/;
      const text = node.type === 'string' || node.anyOf?.some(({ type }) => type === 'string') === true;
      const measures = text && words === undefined && !WORDS.test(key);
      return [
        ...(description.length < 10 ? [`${key}: no description`] : []),
        ...(last.test(description) ? [] : [`${key}: nothing of what holds without it: ${description}`]),
        ...(measures && !AMOUNT.test(description) ? [`${key}: no unit: ${description}`] : []),
      ];
    });
    console.log(`${schema.file}: ${keys.length} keys`);
    expect(keys.length).toBeGreaterThan(20);
    expect(poor).toEqual([]);
  });
});

describe('a starter', () => {
  it.each(ALL_STARTERS.map((starter) => [starter.name, starter] as const))(
    '%s names its schema and keeps to it',
    async (_name, { text, schema }) => {
      // The line that language servers for YAML look for, and the key that other editors do.
      expect(text.split('\n')[0]).toBe(`# yaml-language-server: $schema=./${schema.file}`);
      const data: unknown = parse(text);
      expect((data as Record<string, unknown>).$schema).toBe(`./${schema.file}`);
      const faults = misfits(data, JSON.parse(await schema.text()), '');
      expect(faults).toEqual([]);
    },
  );
});

/** What of the data the schema does not allow: the words of JSON Schema that ours use. */
function misfits(data: unknown, node: EditorNode, at: string): readonly string[] {
  if (node.anyOf !== undefined) {
    const each = node.anyOf.map((one) => misfits(data, one, at));
    return each.some((faults) => faults.length === 0) ? [] : each.flat();
  }
  if (node.const !== undefined) return data === node.const ? [] : [`${at}: not ${String(node.const)}`];
  if (Array.isArray(node.enum)) return node.enum.includes(data) ? [] : [`${at}: none of the words`];
  const type = Array.isArray(data) ? 'array' : data === null ? 'null' : typeof data;
  const wanted = node.type === undefined ? [] : [node.type].flat();
  const fits = wanted.length === 0 || wanted.includes(type) || (wanted.includes('integer') && Number.isInteger(data));
  if (!fits) return [`${at}: ${type} in place of ${wanted.join(' or ')}`];
  if (Array.isArray(data))
    return node.items === undefined ? [] : data.flatMap((one, i) => misfits(one, node.items!, `${at}[${i}]`));
  if (type !== 'object' || node.properties === undefined) return [];
  const entries = Object.entries(data as object);
  return [
    ...(node.required ?? []).flatMap((key) =>
      entries.some(([name]) => name === key) ? [] : [`${at}.${key}: missing`],
    ),
    ...entries.flatMap(([name, value]) => {
      const inner = node.properties?.[name];
      if (inner !== undefined) return misfits(value, inner, `${at}.${name}`);
      return node.additionalProperties === false ? [`${at}.${name}: not known`] : [];
    }),
  ];
}
