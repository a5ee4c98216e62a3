/** All that `start` writes: which verb each is for, and the schema that goes with it. */
import { COILS } from '../templates/coils/coils.ts';
import { STARTERS, type Starter } from '../templates/jobs/starters.ts';
import { LOTS } from '../templates/lots/lots.ts';
import { MATCHES } from '../templates/matches/matches.ts';

export interface SchemaFile {
  readonly file: string;
  /** What it is the schema of, for messages. */
  readonly of: string;
  readonly text: () => Promise<string>;
}

interface Kind {
  readonly verb: 'plan' | 'survey' | 'match' | 'lot';
  readonly schema: SchemaFile;
}

const text = (schema: object): string => `${JSON.stringify(schema, null, 2)}\n`;

const JOB: Kind = {
  verb: 'plan',
  schema: {
    file: 'job.schema.json',
    of: 'a job',
    text: async () => text((await import('../src/job/jsonSchema.ts')).jobJsonSchema()),
  },
};
const COIL: Kind = {
  verb: 'survey',
  schema: {
    file: 'coil.schema.json',
    of: 'a measured coil',
    text: async () => text((await import('../src/job/coil/json-schema.ts')).coilJsonSchema()),
  },
};
const OLD_COIL: Kind = {
  verb: 'match',
  schema: {
    file: 'match.schema.json',
    of: 'an old coil',
    text: async () => text((await import('../src/job/old-coil/json-schema.ts')).oldCoilJsonSchema()),
  },
};
const LOT: Kind = {
  verb: 'lot',
  schema: {
    file: 'lot.schema.json',
    of: 'a lot',
    text: async () => text((await import('../src/job/lot/json-schema.ts')).lotJsonSchema()),
  },
};

export interface AnyStarter extends Starter, Kind {
  /** Jobs that it names, which are written beside it. */
  readonly jobs: readonly Starter[];
}

const of = (
  kind: Kind,
  starters: readonly (Starter & { readonly jobs?: readonly Starter[] })[],
): readonly AnyStarter[] => starters.map((starter) => ({ ...starter, ...kind, jobs: starter.jobs ?? [] }));

export const ALL_STARTERS: readonly AnyStarter[] = [
  ...of(JOB, STARTERS),
  ...of(COIL, COILS),
  ...of(OLD_COIL, MATCHES),
  ...of(LOT, LOTS),
];
/** Of a job, for what a lot brings along. */
export const JOB_SCHEMA = JOB.schema;
