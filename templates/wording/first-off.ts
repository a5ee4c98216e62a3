/** The job for the next coil, put right by the readings of those before. */

export const FIRST_OFF = {
  head: (job: string, coils: number, hash: string) => [
    `${job}, put right for the next coil by the readings of ${coils} ${coils === 1 ? 'coil' : 'coils'} of record ${hash}.`,
    'All keys are those of the job it was planned from, but for as-made: what this bench makes of a plan. The former is made to its',
    'nominal diameter all the same; holes, template and turns are those of the coil as it comes out. What the job leaves free is chosen anew.',
  ],
  change: (before: string, size: string) => `${before === '' ? '' : `Was ${before}. `}The readings add ${size}.`,
  asked: 'What the job had before.',
  size: (value: string, half: string, unit: string) => `${value} ± ${half} ${unit}`,

  /** What is not put into the job. */
  notes: {
    meter:
      'What the meter and its leads read wrong is not in the coil and is not put into the job: mend it at the meter.',
    capacitor: 'What a known capacitor has more or less is not in the coil: state it as it is in shop.capacitors.',
    strays: 'What clips put across the readings is not in the coil.',
    gaps: (size: string) =>
      `Gaps at taps come out ${size} of what is planned: no key of a job sets them, make the taps as the sheet shows them.`,
    groove: (now: string, then: string) =>
      `The pitch is that of the printed groove: it is mended by the z of printer.scale, ${then} in place of ${now}, in the print and not in the plan.`,
    apart: (measure: string) => `Not put in, as the readings do not tell the cause: ${measure}`,
  },
  none: {
    nothing: 'Nothing is off for all coils alike that a job could put right.',
    verb: 'The coil was not planned from a job of its own: state as-made in the job of its replacement by hand.',
    beyond: (got: string, expected: string) => `The job would not be read: ${got}; expected ${expected}.`,
  },
} as const;
