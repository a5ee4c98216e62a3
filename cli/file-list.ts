/** What was written, as a verb tells it: name, size, what for. */
import { heading, hung, type Page } from './page.ts';

export interface Written {
  readonly path: string;
  /** Left out for a folder. */
  readonly size?: number;
  readonly note: string;
}

export function fileList(page: Page, folder: string, files: readonly Written[]): string[] {
  const name = Math.max(...files.map(({ path }) => path.length)) + 2;
  const narrow = name + 12 > page.columns / 2;
  const lines = files.flatMap(({ path, size, note }) => {
    const bytes = size === undefined ? '' : sizeText(size);
    return hung(page, narrow ? `  ${path}  ${bytes}  ` : `  ${path.padEnd(name)}${bytes.padStart(8)}  `, note);
  });
  return [...heading(page, `Written to ${folder}`), ...lines];
}

/** Decimal: 1 kB is 1000 bytes. */
const sizeText = (bytes: number): string =>
  bytes < 1e6 ? `${(bytes / 1e3).toFixed(1)} kB` : `${(bytes / 1e6).toFixed(2)} MB`;
