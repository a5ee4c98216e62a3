/** The fixed words of the hole pattern for machines. */

export const PATTERN = {
  title: (job: string) => `Hole pattern: ${job}`,
  record: (hash: string) => `record ${hash}`,
  view: 'Surface of the former, developed flat, seen from outside: drill from outside. All lengths in mm.',
  across: (radius: string, round: string) =>
    `Across: angle × outside radius ${radius}, no paper thickness added; ${round} once round.`,
  left: (seam: string) =>
    `Left edge at ${seam}°; angles grow to the right. 0° is the start hole S. Heights count from the datum.`,
  unbored: 'X: place of a tap without a hole.',
  unlabelled: (names: string) => `No room for the label of ${names}.`,
  datum: 'datum, Z = 0',
  zero: '0°',
  svg: 'holes developed flat at the outside radius, no paper added, mm',
  dxf: 'the same for drilling and cutting by machine, mm, holes on a layer of their own',
} as const;
