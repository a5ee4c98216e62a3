/** Work that may take its time: a person who watches is told of it after a second, and the line is gone when it ends. */
import type { Terminal } from './terminal.ts';

/** @param name of what is worked on; stages are told behind it */
export async function atWork<T>(
  { ticking }: Terminal,
  name: string,
  work: (tell: (stage: string) => void) => Promise<T>,
): Promise<T> {
  const line = ticking?.(name);
  try {
    return await work((stage) => line?.tell(`${name}: ${stage}`));
  } finally {
    line?.end();
  }
}
