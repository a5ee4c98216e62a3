/** Part of the bench: the former of a plan, from its record to checked bytes, in a fresh process. `former.mjs plan.json [segments]`. */
import { readFileSync } from 'node:fs';
import { makePart } from '../../src/kernel/make.ts';
import { formerParts } from '../../src/parts/former.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

const record: CoilRecord = JSON.parse(readFileSync(process.argv[2]!, 'utf8'));
const segments = Number(process.argv[3] ?? record.former.segments);
const [solid] = formerParts({ ...record, former: { ...record.former, segments } });
const { report, bytes } = await makePart(solid!);
console.log(report.triangles, bytes.length);
