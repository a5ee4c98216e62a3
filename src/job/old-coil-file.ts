/**
 * A file of an old coil to a {@link MatchFile}: text -> tree with lines -> defaults -> schema -> checks across keys -> plain data.
 * Every fault of the file is reported in one go, in the order of its lines.
 */
import { Fault, type FaultParts } from '../fault.ts';
import type { OldCoil } from '../match/types.ts';
import { crossCheck } from './checks.ts';
import { isData } from './defaults.ts';
import { faultsOf, keyText } from './faults.ts';
import { OLD_COIL_FILE } from './file-kind.ts';
import type { Job } from './job.ts';
import { nameOfFile } from './name.ts';
import { completeOld } from './old-coil/defaults.ts';
import { measuredOld } from './old-coil/measured.ts';
import { groupFileSchema, textFileSchema, type WAYS } from './old-coil/schema.ts';
import { toJob } from './read.ts';
import { readTree } from './tree.ts';

export interface MatchFile {
  /** What is on hand for the replacement; its wish is empty until the old coil is inferred. */
  readonly job: Job;
  readonly old: OldCoil;
  readonly replacement: (typeof WAYS)[number];
  /** Readings that do not go with the others are left out rather than refused. */
  readonly leaveOut: boolean;
  /** What must go through the new former, mm; null: nothing. */
  readonly boreMm: number | null;
  /** Former and wire were left to the program: then the old coil's own. */
  readonly asOld: { readonly diameter: boolean; readonly wire: boolean };
}

/** Reads an old coil, YAML or JSON. Throws a {@link Fault} with exit code 3. `file` is for messages and for a name. */
export function readOldCoil(text: string, file: string): MatchFile {
  const tree = readTree(text, file, OLD_COIL_FILE);
  const { data, assumed } = completeOld(tree.data, nameOfFile(file, 'Old coil'));
  const inWords = isData(data) && isData(data.old) && typeof data.old.wire === 'string';
  const schema = inWords ? textFileSchema : groupFileSchema;
  const parsed = schema.safeParse(data);
  const faults: FaultParts[] = (parsed.error?.issues ?? [])
    .filter((issue) => !Object.hasOwn(assumed, issue.path.join('.')))
    .flatMap((issue) => faultsOf(issue, tree, file, schema.shape));
  const placed = (
    found: readonly { code: string; path: readonly (string | number)[]; got: string; expected: string; todo: string }[],
  ) =>
    found.map(({ code, path, got, expected, todo }) => ({
      code,
      place: { file, line: tree.lineOf(path), key: keyText(path) },
      got,
      expected,
      todo,
    }));
  if (!parsed.success) throw inOrder(faults);
  const read = parsed.data;
  faults.push(...placed(crossCheck(read)));
  // The wish is made of what is inferred; until then any will do.
  const job = toJob({ ...read, want: { inductance: { list: [1] } } }, tree, assumed, file);
  const measured = measuredOld(read, job.set);
  if (!('old' in measured)) throw inOrder([...faults, ...placed(measured)]);
  if (faults.length > 0) throw inOrder(faults);
  const asOld = {
    diameter: Object.hasOwn(assumed, 'former.outside-diameter') || !hasKey(tree.data, 'former', 'outside-diameter'),
    wire: read.wire === undefined,
  };
  return {
    job: { ...job, assumed: { ...job.assumed, ...measured.taken } },
    old: measured.old,
    replacement: read.replacement,
    leaveOut: read.contradictions === 'leave out',
    boreMm: read.fits.bore ?? null,
    asOld,
  };
}

const inOrder = (faults: readonly FaultParts[]): Fault =>
  new Fault(
    3,
    [...faults].sort((a, b) => (a.place?.line ?? 0) - (b.place?.line ?? 0)),
  );

const hasKey = (data: unknown, section: string, key: string): boolean =>
  isData(data) && isData(data[section]) && Object.hasOwn(data[section], key);
