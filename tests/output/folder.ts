/** Folders for the tests of the transaction. */
import { lstatSync, mkdtempSync, readdirSync, readFileSync, readlinkSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { Fault, type FaultParts } from '../../src/fault.ts';
import type { FromMemory } from '../../src/output/transaction.ts';

const made: string[] = [];
afterAll(() => {
  for (const path of made.splice(0)) rmSync(path, { recursive: true, force: true });
});

export function scratch(): string {
  const path = mkdtempSync(join(tmpdir(), 'coilwright-test-'));
  made.push(path);
  return path;
}

/** A set of files as a run makes them: a record that lists the others. */
export function output(others: Readonly<Record<string, string>>): FromMemory[] {
  const files = Object.keys(others).map((path) => ({ path, kind: 'text', sha256: '0' }));
  const record = { record: 1, program: 'coilwright 0.0.0', files };
  return [
    { path: 'plan.json', bytes: Buffer.from(JSON.stringify(record)) },
    ...Object.entries(others).map(([path, text]) => ({ path, bytes: Buffer.from(text) })),
  ];
}

/** Everything below a folder: relative path to text, `-> target` for a link, `folder` for an empty folder. */
export function below(folder: string, prefix = ''): Record<string, string> {
  const found: Record<string, string> = {};
  for (const name of readdirSync(folder).sort()) {
    const path = join(folder, name);
    const kind = lstatSync(path);
    if (kind.isSymbolicLink()) found[prefix + name] = `-> ${readlinkSync(path)}`;
    else if (!kind.isDirectory()) found[prefix + name] = name === 'plan.json' ? 'record' : readFileSync(path, 'utf8');
    else {
      const inner = below(path, `${prefix}${name}/`);
      Object.assign(found, Object.keys(inner).length === 0 ? { [prefix + name]: 'folder' } : inner);
    }
  }
  return found;
}

/** The one fault with which a promise is refused. */
export async function faultOf(promise: Promise<unknown>): Promise<FaultParts & { exit: number }> {
  const error = await promise.then(
    () => new Error('nothing was refused'),
    (reason: unknown) => reason,
  );
  if (!(error instanceof Fault) || error.faults[0] === undefined) throw error;
  return { ...error.faults[0], exit: error.exit };
}
