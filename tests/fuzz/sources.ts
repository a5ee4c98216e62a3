/** Files to be damaged: every starter, tables of jobs, readings of coils, and files generated from the schemas. */

import * as fc from 'fast-check';
import { stringify } from 'yaml';
import { questionsOf } from '../../src/bench/questions.ts';
import { COLUMNS, rowOf, toCsv } from '../../src/bench/readings-csv.ts';
import { coilJsonSchema } from '../../src/job/coil/json-schema.ts';
import { jobJsonSchema } from '../../src/job/jsonSchema.ts';
import { lotJsonSchema } from '../../src/job/lot/json-schema.ts';
import { oldCoilJsonSchema } from '../../src/job/old-coil/json-schema.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { COILS } from '../../templates/coils/coils.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { LOTS } from '../../templates/lots/lots.ts';
import { MATCHES } from '../../templates/matches/matches.ts';
import { lotOf } from '../helpers/lot.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { HOSTILE } from './mutate.ts';

export const KINDS = ['job', 'coil', 'old', 'lot', 'orders', 'readings'] as const;
export type Kind = (typeof KINDS)[number];

const texts = (list: readonly { readonly text: string }[]) => list.map(({ text }) => text);
export const JOBS: ReadonlyMap<string, string> = new Map(STARTERS.map(({ name, text }) => [`${name}.yaml`, text]));

const ORDERS = [
  'job,quantity,serials,first-serial\r\nlow-bench-receiver.yaml,3,HS-###,1\r\nforty-coil-lot.yaml,2,,\r\n',
  'job;quantity\ncracked-form-replacement.yaml;12\n"forty-coil-lot.yaml";4\n',
];

/** Two kinds, hand made, so that readings have somewhere to belong. */
const records = [sampleRecord({ job: 'First kind' }), sampleRecord({ job: 'Second kind', turns: [10, 30.5] })].map(
  (record, i): CoilRecord => ({ ...record, hash: (i === 0 ? 'a1b2' : 'c3d4').repeat(16), parts: [] }),
);
export const RECORDS: ReadonlyMap<string, CoilRecord> = new Map(records.map((record) => [record.hash, record]));
export const LOT = lotOf(records.map((record, i) => ({ record, quantity: 6, prefix: 'PQ'[i]! }))).lot;

/** As the bench page saves them: what a meter might show of six coils a kind. */
function readingsOf(record: CoilRecord, prefix: string): string {
  const rows = Array.from({ length: 6 }, (_, n) =>
    questionsOf(record).map((question, i) => {
      const { low, nominal, high } = question;
      const value = i % 7 === 3 ? null : Number(((nominal ?? 5) * (1 + 0.004 * Math.sin(n + 3 * i))).toPrecision(5));
      const judgement = { verdict: 'pass', low, nominal, high, deviationPercent: null, advice: [] } as never;
      return rowOf(record, question, value, judgement, {
        serial: `${prefix}-00${n + 1}`,
        celsius: 21,
        remark: n === 2 ? 'rewound' : '',
      });
    }),
  ).flat();
  return toCsv(rows);
}
const WIDE = [
  'serial,tap 1 (uH),tap 2 (uH),whole 100 pF (kHz),remark',
  ...Array.from({ length: 6 }, (_, n) => `P-00${n + 1},"${20 + n / 10}",${40 + n / 7},${900 + n},"a, ""b"""`),
  '',
].join('\n');
const SEMICOLONS = `serial;record;tap;quantity;value;unit;condition\nP-001;${records[0]!.hash.slice(0, 12)};2;inductance;40,2;uH;\n1;c3d4c3d4;1;dial;900;kHz;30 deg\n1;c3d4c3d4;1;dial;800;kHz;60 deg\n`;

export const SOURCES: Readonly<Record<Kind, readonly string[]>> = {
  job: texts(STARTERS),
  coil: texts(COILS),
  old: texts(MATCHES),
  lot: [...texts(LOTS), 'lot: By table\ncoils: orders.csv\nserials: T-##\n'],
  orders: ORDERS,
  readings: [...records.map((record, i) => readingsOf(record, 'PQ'[i]!)), WIDE, SEMICOLONS],
};

interface Node {
  readonly properties?: Readonly<Record<string, Node>>;
  readonly anyOf?: readonly Node[];
  readonly items?: Node;
  readonly enum?: readonly string[];
  readonly type?: string | readonly string[];
}

const quantities = fc
  .tuple(
    fc.constantFrom('1', '2', '5', '12', '20', '76', '100', '240', '0.5', '0.05', '1000', '3 1/2', '-3', '0'),
    fc.constantFrom(' mm', ' in', ' uH', ' kHz', ' MHz', ' pF', ' %', '', ' m', ' g'),
    fc.constantFrom('', '', '', ' to 500 uH', ' to 90 mm', ' x 200 mm', ' ± 1 mm', ' enamel', ' to 2 MHz'),
  )
  .map((parts) => parts.join(''));
const scalars: fc.Arbitrary<unknown> = fc.oneof(
  { weight: 6, arbitrary: quantities },
  { weight: 2, arbitrary: fc.oneof(fc.integer({ min: -2, max: 300 }), fc.double()) },
  { weight: 2, arbitrary: fc.constantFrom(...HOSTILE) },
  { weight: 1, arbitrary: fc.constantFrom(null, true, false, '', [], {}) },
  { weight: 1, arbitrary: fc.string({ unit: 'binary', maxLength: 100 }) },
  { weight: 1, arbitrary: fc.constantFrom('lost', 'best', '24 AWG enamel', '0.5 mm', 'low-bench-receiver.yaml') },
);

/** A value where the schema has this node: mostly of its form. */
function schemaValue(node: Node): fc.Arbitrary<unknown> {
  const { properties, anyOf, items } = node;
  if (anyOf !== undefined) return fc.oneof(...anyOf.map(schemaValue));
  const strange = { weight: 1, arbitrary: scalars };
  if (properties !== undefined) {
    const keys = Object.keys(properties).filter((key) => key !== '$schema');
    const group = fc
      .record(Object.fromEntries(keys.map((key) => [key, schemaValue(properties[key]!)])), { requiredKeys: [] })
      .map((made) => ({ ...made }));
    return fc.oneof({ weight: 20, arbitrary: group }, strange);
  }
  if (items !== undefined)
    return fc.oneof({ weight: 6, arbitrary: fc.array(schemaValue(items), { maxLength: 6 }) }, strange);
  if (node.enum !== undefined) return fc.oneof({ weight: 12, arbitrary: fc.constantFrom(...node.enum) }, strange);
  if (node.type === 'integer') return fc.oneof({ weight: 8, arbitrary: fc.integer({ min: -1, max: 70 }) }, strange);
  if (node.type === 'boolean') return fc.oneof({ weight: 8, arbitrary: fc.boolean() }, strange);
  return scalars;
}

const cells = fc.oneof(
  quantities,
  fc.constantFrom('serial', 'tap', 'value', 'unit', 'P-001', 'Q-002', 'inductance', 'job', 'quantity'),
  fc.constantFrom(...HOSTILE),
);
const tables = (titles: readonly string[]): fc.Arbitrary<string> =>
  fc
    .tuple(
      fc.constantFrom(',', ';', '\t'),
      fc.oneof(
        { weight: 3, arbitrary: fc.shuffledSubarray([...titles], { minLength: 1 }) },
        { weight: 1, arbitrary: fc.array(cells, { maxLength: 12 }) },
      ),
      fc.array(fc.array(cells, { maxLength: 12 }), { maxLength: 20 }),
      fc.constantFrom('\n', '\r\n', '\r'),
    )
    .map(([separator, head, rows, end]) =>
      [head, ...rows]
        .map((row) =>
          row.map((cell) => (/[",;\t\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join(separator),
        )
        .join(end),
    );

const schemas: Readonly<Partial<Record<Kind, () => object>>> = {
  job: jobJsonSchema,
  coil: coilJsonSchema,
  old: oldCoilJsonSchema,
  lot: lotJsonSchema,
};
const arbitraries = new Map<Kind, fc.Arbitrary<string>>();

function arbitraryOf(kind: Kind): fc.Arbitrary<string> {
  const known = arbitraries.get(kind);
  if (known !== undefined) return known;
  const schema = schemas[kind];
  const made =
    schema === undefined
      ? tables(
          kind === 'orders'
            ? ['job', 'quantity', 'serials', 'first-serial']
            : [...COLUMNS.filter((column) => column !== 'verdict'), 'tap 1 (uH)'],
        )
      : fc
          .tuple(schemaValue(schema() as Node), fc.boolean())
          .map(([data, yaml]) => (yaml ? stringify(data) : (JSON.stringify(data) ?? '')));
  arbitraries.set(kind, made);
  return made;
}

/** A file made up from the schema of its kind. */
export const generated = (kind: Kind, seed: number): string => fc.sample(arbitraryOf(kind), { seed, numRuns: 1 })[0]!;
