/** The starter jobs, one a user. Each is also a test. */

import coupled from './coupled-aerial-receiver.yaml';
import cracked from './cracked-form-replacement.yaml';
import forty from './forty-coil-lot.yaml';
import bench from './low-bench-receiver.yaml';

export interface Starter {
  readonly name: string;
  /** Whom it serves, in one line. */
  readonly use: string;
  readonly text: string;
}

/** The first is taken when none is named. */
export const STARTERS: readonly [Starter, ...Starter[]] = [
  { name: 'low-bench-receiver', use: 'one set: a band and a tuning capacitor', text: bench },
  {
    name: 'cracked-form-replacement',
    use: 'an old coil with a broken form: its inductances, on a tube',
    text: cracked,
  },
  { name: 'forty-coil-lot', use: 'a lot: an inductance range shared out among taps', text: forty },
  { name: 'coupled-aerial-receiver', use: 'an aerial on a second winding that slides, and a detector', text: coupled },
];
