/** The line that tells how far a lot is, and how long it may still take. */
import type { LotProgress } from '../src/lot.ts';

export interface ProgressLine {
  readonly tell: (progress: LotProgress) => void;
  /** Takes the line away. */
  readonly end: () => void;
}

/** Beds and papers take about this part of the time that the kinds take; from the runs of `npm run bench -- --lot`. */
const AFTER_KINDS = 0.35;

/** @param clock milliseconds */
export function lotProgress(status: ((text: string) => void) | undefined, clock: () => number): ProgressLine {
  if (status === undefined) return { tell: () => undefined, end: () => undefined };
  let stage: LotProgress['stage'] | null = null;
  let since = 0;
  return {
    tell: (progress) => {
      if (progress.stage !== stage) {
        stage = progress.stage;
        since = clock();
      }
      status(progressText(progress, clock() - since));
    },
    end: () => status(''),
  };
}

/** @param elapsedMs since the stage began */
export function progressText({ stage, done, of, found }: LotProgress, elapsedMs: number): string {
  const made = done - found;
  const parts = [`${stage}: ${done} of ${of} done`];
  if (found > 0) parts.push(`${found} found finished`);
  if (made > 0) {
    const each = elapsedMs / made;
    const left = each * (of - done) + (stage === 'kinds' ? AFTER_KINDS * each * of : 0);
    parts.push(`${timeText(left)} left`);
  }
  return parts.join(', ');
}

/** Rounded, as an estimate is: seconds below two minutes by fives, then minutes. */
function timeText(ms: number): string {
  const seconds = ms / 1000;
  if (seconds < 10) return 'a few seconds';
  return seconds < 120 ? `about ${5 * Math.round(seconds / 5)} s` : `about ${Math.round(seconds / 60)} min`;
}
