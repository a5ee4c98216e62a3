/**
 * The bench page: one HTML file that counts turns at the bench, with the record inside it. Nothing in it points
 * elsewhere, and its policy lets it load nothing. Same record, same bytes.
 *
 * Its script is the program's own code in one bundle, written beside the program by the build; a program that runs from
 * its sources makes it when asked.
 */
import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { BENCH } from '../../templates/wording/bench-page.ts';
import { TITLE } from '../../templates/wording/winding-sheet.ts';
import { escaped } from '../drawing/svg.ts';
import type { CoilRecord } from '../record/schema.ts';

/** What the page is put together from. */
export interface BenchAssets {
  readonly html: string;
  readonly style: string;
  readonly script: string;
}

/** How the browser's side is bundled, here and in `.build.mjs`: for browsers since 2020. */
export const BUNDLE = {
  bundle: true,
  minify: true,
  format: 'iife',
  platform: 'browser',
  target: 'es2020',
  legalComments: 'none',
  charset: 'utf8',
} as const;

let loading: Promise<BenchAssets> | null = null;

export function benchAssets(): Promise<BenchAssets> {
  loading ??= load();
  return loading;
}

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

async function load(): Promise<BenchAssets> {
  if (existsSync(here('./bench-page.js'))) {
    const [html, style, script] = await Promise.all(
      ['html', 'css', 'js'].map((kind) => readFile(here(`./bench-page.${kind}`), 'utf8')),
    );
    return { html: html!, style: style!, script: script! };
  }
  // Under a name that the build does not see: the bundled program has its page ready and carries no bundler.
  const name = 'esbuild';
  const { build } = (await import(/* @vite-ignore */ name)) as typeof import('esbuild');
  const made = async (entry: string) => {
    const { outputFiles } = await build({ ...BUNDLE, entryPoints: [here(entry)], write: false });
    return outputFiles[0]!.text;
  };
  const [html, style, script] = await Promise.all([
    readFile(here('../../templates/bench/page.html'), 'utf8'),
    made('../../templates/bench/page.css'),
    made('./page-main.ts'),
  ]);
  return { html, style, script };
}

/** A source for the policy that lets exactly this text run. */
const hashSource = (text: string) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;

/** JSON that cannot end the script element that it stands in. */
export function embedded(value: unknown): string {
  return JSON.stringify(value).replace(
    /[<\u2028\u2029]/g,
    (sign) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

/** A word of the page by its path, `count.turn`. */
function word(path: string): string | undefined {
  const [part, name] = path.split('.');
  const words = (BENCH as Readonly<Record<string, unknown>>)[part!];
  const found = name === undefined ? words : (words as Readonly<Record<string, unknown>> | undefined)?.[name];
  return typeof found === 'string' ? found : undefined;
}

/** Fills `{{name}}` with escaped text and `{{{name}}}` as it is. A name without a text is our mistake. */
function fill(html: string, values: Readonly<Record<string, string>>): string {
  return html.replace(/\{\{\{([\w.]+)\}\}\}|\{\{([\w.]+)\}\}/g, (_, raw: string | undefined, name: string) => {
    const text = values[raw ?? name] ?? (raw === undefined ? word(name) : undefined);
    if (text === undefined) throw new Error(`the bench page has no text for ${raw ?? name}`);
    return raw === undefined ? escaped(text) : text;
  });
}

/** The page of a record as the bytes of an HTML file in UTF-8. */
export async function benchPage(record: CoilRecord): Promise<Uint8Array> {
  const { html, style, script } = await benchAssets();
  // The list of files is of the folder, not of the coil, and is not in the hash.
  const data = embedded({ ...record, files: [] });
  const policy = [
    "default-src 'none'",
    `style-src ${hashSource(style)}`,
    `script-src ${hashSource(script)}`,
    'img-src data:',
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  const text = fill(html, {
    policy,
    style,
    script,
    data,
    job: record.job,
    title: `${BENCH.head.document}: ${record.job}`,
    record: TITLE.record(record.hash.slice(0, 12)),
    program: record.program,
    date: record.date === null ? '' : TITLE.date(record.date),
  });
  return new TextEncoder().encode(text);
}
