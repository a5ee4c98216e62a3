/** Measured coils to begin with. Each is also a test. */
import type { Starter } from '../jobs/starters.ts';
import coil from './found-coil.yaml';
import sections from './found-sections.yaml';

export const COILS: readonly [Starter, ...Starter[]] = [
  { name: 'found-coil', use: 'a measured coil, for survey: one even winding with taps', text: coil },
  { name: 'found-sections', use: 'a measured coil, for survey: a winding in sections', text: sections },
];
