/** How the pages of the reference sheets of the starters are filled. */
import { expect, test } from 'vitest';
import { shapeBox } from '../../src/drawing/boxes.ts';
import { recordOf } from '../../src/plan.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutReferenceSheet, referenceFrame } from '../../src/sheets/reference-sheet.ts';
import { starterJob } from '../helpers/jobs.ts';
import { layoutFaults } from '../helpers/layout.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

test.each(['low-bench-receiver', 'cracked-form-replacement'])('%s: no last page with next to nothing on it', (name) => {
  for (const paper of ['A4', 'Letter'] as const) {
    const pages = layOutReferenceSheet({ ...recordOf(starterJob(name), '1.2.3'), paper }, measure);
    expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
    const last = pages.at(-1)!;
    const lowest = Math.min(...last.shapes.map((shape) => shapeBox(shape, measure).bottom));
    // Its text comes down past the upper fifth of the page.
    expect((last.heightMm - lowest) / last.heightMm, `${paper}, ${pages.length} pages`).toBeGreaterThan(0.2);
    console.log(
      `reference sheet of ${name} on ${paper}: ${pages.length} pages, the last ${((100 * (last.heightMm - lowest)) / last.heightMm).toFixed(0)} % full`,
    );
  }
});
