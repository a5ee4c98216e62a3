/** Records of coils and of lots below some folders: what readings are held against. */
import { open, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import type { LotRecord } from '../src/lot/schema.ts';
import type { CoilRecord } from '../src/record/schema.ts';

/** `out/<lot>/kinds/<kind>/plan.json` lies three folders down. */
const DEEPEST = 4;
/** Folders that are looked into; more is a home folder rather than one of a workshop. */
const MOST_FOLDERS = 5000;
/** No record is larger. */
const LARGEST_BYTES = 64_000_000;

export interface FoundRecords {
  readonly records: ReadonlyMap<string, CoilRecord>;
  readonly lots: readonly LotRecord[];
  /** Where was looked, in words, and what of it could not be used. */
  readonly searched: string;
}

async function textOf(path: string): Promise<string | null> {
  const handle = await open(path, 'r').catch(() => null);
  if (handle === null) return null;
  try {
    const found = await handle.stat();
    return found.isFile() && found.size <= LARGEST_BYTES ? await handle.readFile('utf8') : null;
  } catch {
    return null;
  } finally {
    await handle.close();
  }
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

/** Every folder with a record below, the nearest first; links and what begins with a point are passed over. */
async function foldersBelow(roots: readonly string[]): Promise<readonly string[]> {
  const found: string[] = [];
  let level = [...new Set(roots)];
  for (let depth = 0; depth <= DEEPEST && level.length > 0; depth++) {
    const next: string[] = [];
    for (const folder of level) {
      const entries = await readdir(folder, { withFileTypes: true }).catch(() => []);
      if (entries.some(({ name }) => name === 'plan.json' || name === 'lot.json')) found.push(folder);
      const below = entries.filter((entry) => entry.isDirectory() && !/^\.|^node_modules$/.test(entry.name));
      next.push(...below.map(({ name }) => join(folder, name)).sort());
    }
    level = [...new Set(next)].slice(0, MOST_FOLDERS);
  }
  return [...new Set(found)];
}

/** Of each hash the first that is found. A record that is damaged, or was changed by hand, is counted in `searched` and not used. */
export async function findRecords(roots: readonly string[], shown: (folder: string) => string): Promise<FoundRecords> {
  const { recordSchema } = await import('../src/record/schema.ts');
  const { lotSchema } = await import('../src/lot/schema.ts');
  const { hashOf } = await import('../src/record/hash.ts');
  const records = new Map<string, CoilRecord>();
  const lots: LotRecord[] = [];
  const damaged: string[] = [];
  for (const folder of await foldersBelow(roots)) {
    const plan = await textOf(join(folder, 'plan.json'));
    if (plan !== null) {
      const data = parsed(plan);
      // A measured coil has no limits to be held against.
      const surveyed = typeof data === 'object' && data !== null && 'verb' in data && data.verb === 'survey';
      const read = recordSchema.safeParse(data);
      if (read.success && read.data.hash === hashOf(read.data)) {
        if (!records.has(read.data.hash)) records.set(read.data.hash, read.data);
      } else if (!surveyed) damaged.push(join(folder, 'plan.json'));
    }
    const lot = await textOf(join(folder, 'lot.json'));
    if (lot !== null) {
      const read = lotSchema.safeParse(parsed(lot));
      if (!read.success) damaged.push(join(folder, 'lot.json'));
      else if (!lots.some(({ hash }) => hash === read.data.hash)) lots.push(read.data);
    }
  }
  const places = roots.map(shown).join(' or ');
  const count = `${records.size} ${records.size === 1 ? 'record' : 'records'}`;
  const not = damaged.length === 0 ? '' : `, and ${damaged.map(shown).slice(0, 3).join(', ')} damaged or changed`;
  return { records, lots, searched: `${places} (${count} there${not})` };
}
