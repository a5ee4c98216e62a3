/** How the second winding is wound and put in its place, after all steps of the main one. */
import { SECOND_STEP } from '../../templates/wording/second-winding.ts';
import type { Job } from '../job/job.ts';
import { tidy } from '../quantity/format.ts';
import { lengthText, wireText } from '../quantity/written.ts';
import type { SecondPlaces } from './around-second.ts';
import type { Step } from './schema.ts';
import { LEAD_MM } from './steps.ts';

/** `before` steps come first; `mainUh` is the whole main coil, low frequency. */
export function secondStepsOf(job: Job, second: SecondPlaces, before: number, mainUh: number): Step[] {
  const { units } = job;
  const length = (mm: number, digits: number) => lengthText(mm, units, { digits });
  const { kind, body, slide } = second;
  const texts: string[] = [];
  const size = body === null ? null : `${length(body.outsideDiameterMm, 2)} outside, ${length(body.lengthMm, 1)} long`;
  const wire = wireText(second.wireLengthM + second.leadsM, units, 1);
  texts.push(SECOND_STEP.start(kind, size, wire, second.wire.name, length(LEAD_MM, 0)));
  const spacer = second.spacerMm === 0 ? null : length(second.spacerMm, 2);
  texts.push(SECOND_STEP.wind(second.turns, job.winding.hand, spacer));
  if (kind !== 'same former' && body !== null) {
    const { lowMm } = body;
    const edge = lowMm < 0 ? SECOND_STEP.below(length(-lowMm, 1)) : SECOND_STEP.above(length(lowMm, 1));
    const then =
      slide === null
        ? SECOND_STEP.fixed
        : SECOND_STEP.slides(
            slide.travelMm < 0 ? 'down' : 'up',
            length(Math.abs(slide.travelMm), 1),
            tidy(slide.scale[0]!.coupling, 3),
            tidy(slide.scale.at(-1)!.coupling, 3),
          );
    texts.push(`${SECOND_STEP.place[kind](edge)} ${then}`);
  }
  const { inductanceUh, mutualUh } = second;
  const uh = (value: number) => tidy(value, 4);
  texts.push(
    SECOND_STEP.measure(
      uh(mainUh + inductanceUh + 2 * mutualUh),
      uh(mainUh + inductanceUh - 2 * mutualUh),
      uh(mutualUh),
    ),
  );
  return texts.map((text, i) => ({ step: before + i + 1, kind: 'after', tap: null, turn: null, wireM: null, text }));
}
