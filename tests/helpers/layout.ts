/** Records that press on a layout, and what must hold of every page that is laid out. */
import { type Box, inside, type Measure, overlap, textBox } from '../../src/drawing/boxes.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import type { Page } from '../../src/sheets/page.ts';
import { type SampleOptions, sampleRecord } from './sample.ts';

export interface TextBox {
  readonly page: number;
  readonly text: string;
  readonly box: Box;
}

/** Every text of every page with the box it takes. */
export function layoutBoxes(pages: readonly Page[], measure: Measure): TextBox[] {
  return pages.flatMap((page, i) =>
    page.shapes.flatMap((shape): TextBox[] =>
      shape.shape === 'text' ? [{ page: i + 1, text: shape.text, box: textBox(shape, measure) }] : [],
    ),
  );
}

const name = (each: TextBox) =>
  `page ${each.page} "${each.text}" at ${each.box.left.toFixed(1)}, ${each.box.bottom.toFixed(1)}`;

/**
 * Texts that stand over one another, that leave the frame, or that are smaller than 8 pt. Boxes may share 0.05 mm:
 * the box of a text counts descenders that its letters may not have.
 */
export function layoutFaults(pages: readonly Page[], frame: (page: Page) => Box, measure: Measure): string[] {
  const faults: string[] = [];
  const boxes = layoutBoxes(pages, measure);
  boxes.forEach((one, i) => {
    if (!inside(one.box, frame(pages[one.page - 1]!), 0.01)) faults.push(`outside: ${name(one)}`);
    for (const other of boxes.slice(i + 1))
      if (one.page === other.page && overlap(one.box, other.box, 0.05))
        faults.push(`overlap: ${name(one)} and ${name(other)}`);
  });
  for (const page of pages)
    for (const shape of page.shapes)
      if (shape.shape === 'text' && shape.sizeMm < (8 * 25.4) / 72 - 1e-9) faults.push(`too small: ${shape.text}`);
  return faults;
}

const WORDS =
  'Wind on to the next tap, hold the tension, lead the loop out and twist it tight before the counter is set again';

/** A record with as much text as a real one: steps of `stepWords` words, eight cautions, six alternatives. */
export function fullRecord(options: SampleOptions & { stepWords?: number } = {}): CoilRecord {
  const record = sampleRecord(options);
  const words = WORDS.split(' ');
  const count = options.stepWords ?? 18;
  const text = (n: number) => Array.from({ length: n }, (_, i) => words[i % words.length]!).join(' ');
  const alternative = record.alternatives[0]!;
  return {
    ...record,
    steps: record.steps.map((step) => ({ ...step, text: `${step.text} ${text(count)}` })),
    cautions: Array.from({ length: 8 }, (_, i) => text(10 + i)),
    checks: Array.from({ length: 7 }, (_, i) => ({ ...record.checks[i % 3]!, what: text(4 + i) })),
    corrections: Array.from({ length: 5 }, () => record.corrections[0]!),
    alternatives: Array.from({ length: 6 }, (_, i) => ({
      ...alternative,
      wire: '20 x 0.1 mm litz single silk',
      betterIn: ['more compact', 'closer taps', 'narrower limits'].slice(0, 1 + (i % 3)),
    })),
    warnings: Array.from({ length: 4 }, (_, i) => ({ code: `w${i}`, text: text(20) })),
  };
}

/** `count` taps at turns that grow evenly, at uneven angles when staggered. */
export function evenTurns(count: number, whole: number, staggered: boolean): number[] {
  return Array.from({ length: count }, (_, i) => {
    const turn = Math.round((whole * (i + 1)) / count);
    return staggered ? turn + ((i * 7) % 24) / 24 : turn;
  });
}
