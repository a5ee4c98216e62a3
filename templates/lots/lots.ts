/** Lots to begin with. Each is also a test. */
import { STARTERS, type Starter } from '../jobs/starters.ts';
import saltmarsh from './saltmarsh-lot.yaml';

export interface LotStarter extends Starter {
  /** The jobs that it names, which are written beside it. */
  readonly jobs: readonly Starter[];
}

export const LOTS: readonly [LotStarter, ...LotStarter[]] = [
  {
    name: 'saltmarsh-lot',
    use: 'forty coils of three jobs, with reels and printers: for lot',
    text: saltmarsh,
    jobs: STARTERS.filter(({ name }) => saltmarsh.includes(`job: ${name}.yaml`)),
  },
];
