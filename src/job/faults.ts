/** From the issues of the schema to faults with file, line and key. */
import type * as z from 'zod';
import type { FaultParts } from '../fault.ts';
import { cut, visible } from '../quantity/parse.ts';
import { shown } from './field.ts';
import { nearest } from './nearest.ts';
import { jobSchema } from './schema.ts';
import type { Path, Tree } from './tree.ts';

type Issue = z.core.$ZodIssue;

/** `want.inductance`, `wire[2]`: list entries count from 0 in data and from 1 for people. */
export function keyText(path: Path): string {
  return path
    .map((step, index) => (typeof step === 'number' ? `[${step + 1}]` : index === 0 ? step : `.${step}`))
    .join('');
}

/** The keys of a schema, by name. */
type Keys = Readonly<Record<string, unknown>>;

/** All faults of one issue of a file whose keys are those of `shape`. */
export function faultsOf(issue: Issue, tree: Tree, file: string, shape: Keys = jobSchema.shape): readonly FaultParts[] {
  const path = issue.path.map((step) => (typeof step === 'number' ? step : String(step)));
  if (issue.code === 'unrecognized_keys') return issue.keys.map((key) => unknownKey([...path, key], tree, file, shape));
  const place = { file, line: tree.lineOf(path), key: path.length === 0 ? undefined : keyText(path) };
  const raw = valueAt(tree.data, path);
  if (raw === undefined) return [missing(place, path, issue, shape)];
  if (issue.code === 'custom') {
    const { got, expected, todo } = issue.params as { got: string; expected: string; todo: string };
    return [{ code: 'value', place, got, expected, todo }];
  }
  const known = knownKeys(path, shape);
  if (issue.code === 'invalid_type' && issue.expected === 'array') {
    const expected = `a list of groups of keys: ${known.join(', ')}`;
    return [{ code: 'not-a-list', place, got: shown(raw), expected, todo: `write a list below ${keyText(path)}` }];
  }
  if (issue.code === 'too_small' || issue.code === 'too_big') {
    const most = issue.code === 'too_big' ? `at most ${issue.maximum}` : `at least ${issue.minimum}`;
    return [{ code: 'list-length', place, got: shown(raw), expected: `${most} entries`, todo: 'mend the list' }];
  }
  return [
    {
      code: 'not-a-group',
      place,
      got: shown(raw),
      expected: `a group of keys: ${known.join(', ')}`,
      todo: path.length === 0 ? 'begin with: coilwright start' : `write the keys below ${keyText(path)}, indented`,
    },
  ];
}

function missing(place: FaultParts['place'], path: Path, issue: Issue, shape: Keys): FaultParts {
  const params = issue.code === 'custom' ? (issue.params as { expected?: string }) : {};
  const key = String(path.at(-1) ?? '');
  return {
    code: 'missing-key',
    place,
    got: 'nothing: the key is missing',
    expected: params.expected ?? `a group of keys: ${knownKeys(path, shape).join(', ')}`,
    todo: `add the key ${key}`,
  };
}

function unknownKey(path: Path, tree: Tree, file: string, shape: Keys): FaultParts {
  const key = String(path.at(-1));
  const known = knownKeys(path.slice(0, -1), shape);
  const near = nearest(key, known);
  // `76,2 mm` inside braces is the value 76 and the key `2 mm`.
  const comma = /^\d/.test(key) ? 'write the decimal point as a point: a comma parts two keys' : null;
  return {
    code: 'unknown-key',
    place: { file, line: tree.lineOf(path), key: visible(cut(keyText(path), 80)) },
    got: 'a key that is not known',
    expected: `one of: ${known.join(', ')}`,
    todo: near === null ? (comma ?? 'remove the key, or put it where it belongs') : `did you mean ${near}?`,
  };
}

/** Keys of the section at a path; `$schema`, which is for editors, is not offered. */
function knownKeys(path: Path, root: Keys): readonly string[] {
  let shape = root;
  for (const step of path) {
    // Entries of a list all have the keys of the list.
    if (typeof step === 'number') continue;
    const inner = unwrap(shape[step]);
    if (inner === null) return [];
    shape = inner;
  }
  return Object.keys(shape).filter((key) => key !== '$schema');
}

function unwrap(schema: unknown): Keys | null {
  if (typeof schema !== 'object' || schema === null) return null;
  if ('shape' in schema) return schema.shape as Keys;
  return 'unwrap' in schema && typeof schema.unwrap === 'function' ? unwrap(schema.unwrap()) : null;
}

function valueAt(data: unknown, path: Path): unknown {
  let value = data;
  for (const step of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, step)) return undefined;
    value = (value as Record<string | number, unknown>)[step];
  }
  return value;
}
