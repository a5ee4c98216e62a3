/**
 * What a lot has finished so far, on the disk beside its folder, so that a run that is killed at any moment is carried on by
 * the next. A unit is a folder of finished files under the name of its key; it is written under another name, synced, and
 * renamed, and its manifest lists every file with its hash. What does not match to the last byte is made again.
 */
import { lstat, mkdir, readdir, readFile, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { sync, writeSynced } from '../output/disk.ts';
import { canonicalText, sha256 } from '../record/hash.ts';
import type { OutputFile } from '../record/listing.ts';

export interface UnitFile {
  /** Relative to the unit. */
  readonly path: string;
  readonly kind: string;
  readonly sha256: string;
  readonly size: number;
  readonly note: string;
}

export interface Unit {
  readonly key: string;
  readonly files: readonly UnitFile[];
}

/** No file of a unit can have this name. */
const MANIFEST = '.unit.json';

/** The key of what comes of `what` alone: of data that can be written as JSON, and of the version of the program. */
export const keyOf = (what: unknown, version: string): string => sha256(canonicalText({ what, version })).slice(0, 40);

/** Absolute path of a file of a unit. */
export const unitPath = (work: string, key: string, path: string): string => join(work, key, path);

/** Makes the work folder where there is none; what is no folder goes. */
export async function openWork(work: string): Promise<void> {
  const there = await lstat(work).catch(() => null);
  if (there !== null && !there.isDirectory()) await rm(work, { force: true });
  await mkdir(work, { recursive: true });
}

/** The finished unit, read and checked to the last byte; null when there is none, and then nothing of it is left. */
export async function findUnit(work: string, key: string): Promise<Unit | null> {
  try {
    const unit = readManifest(await readFile(unitPath(work, key, MANIFEST), 'utf8'));
    if (unit !== null && unit.key === key && (await isWhole(work, unit))) return unit;
  } catch {
    // Unreadable is as good as not there.
  }
  await rm(join(work, key), { recursive: true, force: true });
  return null;
}

/** Writes a unit; once it is there under its name it is whole. */
export async function writeUnit(work: string, key: string, files: readonly OutputFile[]): Promise<Unit> {
  const temporary = join(work, `${key}.new`);
  await rm(temporary, { recursive: true, force: true });
  await mkdir(temporary);
  const folders = new Set([temporary]);
  for (const { path, bytes } of files) {
    const full = join(temporary, path);
    await mkdir(dirname(full), { recursive: true });
    folders.add(dirname(full));
    await writeSynced(full, bytes);
  }
  const unit: Unit = {
    key,
    files: files.map(({ path, kind, bytes, note }) => ({
      path,
      kind,
      sha256: sha256(bytes),
      size: bytes.length,
      note,
    })),
  };
  await writeSynced(
    join(temporary, MANIFEST),
    new TextEncoder().encode(JSON.stringify({ unit, hash: sha256(canonicalText(unit)) })),
  );
  for (const folder of folders) await sync(folder);
  await rename(temporary, join(work, key));
  await sync(work);
  return unit;
}

function readManifest(text: string): Unit | null {
  const { unit, hash } = JSON.parse(text) as { readonly unit: Unit; readonly hash: string };
  return sha256(canonicalText(unit)) === hash ? unit : null;
}

/** All files of the manifest, and no others. */
async function isWhole(work: string, { key, files }: Unit): Promise<boolean> {
  const below = await readdir(join(work, key), { recursive: true, withFileTypes: true });
  if (below.some((entry) => !entry.isFile() && !entry.isDirectory())) return false;
  if (below.filter((entry) => entry.isFile()).length !== files.length + 1) return false;
  for (const { path, sha256: expected, size } of files) {
    const bytes = await readFile(unitPath(work, key, path));
    if (bytes.length !== size || sha256(bytes) !== expected) return false;
  }
  return true;
}
