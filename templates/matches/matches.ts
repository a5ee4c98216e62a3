/** Old coils to begin with. Each is also a test. */
import type { Starter } from '../jobs/starters.ts';
import broken from './broken-form.yaml';

export const MATCHES: readonly [Starter, ...Starter[]] = [
  { name: 'broken-form', use: 'an old coil, measured in part, and what is on hand: for match', text: broken },
];
