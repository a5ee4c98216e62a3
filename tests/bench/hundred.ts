/** Part of the bench: memory of a process that makes a hundred formers in a row. */
import { readFileSync } from 'node:fs';
import { makePart } from '../../src/kernel/make.ts';
import { formerParts } from '../../src/parts/former.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

const record: CoilRecord = JSON.parse(readFileSync(process.argv[2]!, 'utf8'));
const [solid] = formerParts({ ...record, former: { ...record.former, segments: 96 } });
const resident = () => Math.round(process.memoryUsage().rss / 1e6);
const seen: number[] = [];
for (let i = 1; i <= 100; i++) {
  await makePart(solid!);
  if (i === 10 || i === 50 || i === 100) seen.push(resident());
}
const [ten, fifty, hundred] = seen as [number, number, number];
console.log(
  `a hundred formers in a row: ${ten} MB resident after 10, ${fifty} MB after 50, ${hundred} MB after 100, ratio of the last to the first ${(hundred / ten).toFixed(2)} (goal 1.2 or less)`,
);
