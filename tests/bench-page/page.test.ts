/** The bench page as a file: what is in it, and that it lets nothing in or out. How it works is driven in browser.test.ts. */
import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { benchPage, embedded } from '../../src/bench/page.ts';
import { sampleRecord } from '../helpers/sample.ts';

const pageOf = async (record = sampleRecord()) => new TextDecoder().decode(await benchPage(record));
const between = (text: string, from: string, to: string) => {
  const start = text.indexOf(from) + from.length;
  return text.slice(start, text.indexOf(to, start));
};
const NASTY = `</script><script>alert(1)</script><img src=x onerror=alert(2)> & "quoted" 'too' {{title}} \u2028`;

test('holds the record it was made of, without the list of files', async () => {
  const record = { ...sampleRecord(), files: [{ path: 'a', kind: 'pdf', sha256: 'b' }] };
  const page = await pageOf(record);
  const data: unknown = JSON.parse(between(page, '<script type="application/json" id="record">', '</script>'));
  expect(data).toEqual({ ...record, files: [] });
  expect(page).toContain(`record ${record.hash.slice(0, 12)}`);
});

test('names from a job stay text wherever they stand', async () => {
  const page = await pageOf(sampleRecord({ job: NASTY }));
  expect(page.match(/<script/g)).toHaveLength(2);
  expect(page).not.toContain('<img');
  expect(between(page, '<h1>', '</h1>')).toContain('&lt;/script&gt;');
  expect(JSON.parse(embedded({ text: NASTY }))).toEqual({ text: NASTY });
});

test('its policy lets its own style and script run and nothing else', async () => {
  const page = await pageOf();
  const policy = between(page, 'http-equiv="Content-Security-Policy" content="', '"').replaceAll('&apos;', "'");
  expect(policy).toMatch(/^default-src 'none';/);
  expect(policy).not.toMatch(/unsafe|https?:|\*/);
  const hash = (text: string) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
  expect(policy).toContain(`script-src ${hash(between(page, '</script>\n<script>', '</script>'))};`);
  expect(policy).toContain(`style-src ${hash(between(page, '<style>', '</style>'))};`);
  // The policy takes no style and no handler in an attribute.
  expect(between(page, '<body>', '<script')).not.toMatch(/\s(style|on[a-z]+)=/);
});

test('points nowhere: no address in the skeleton, none in the style', async () => {
  const page = await pageOf();
  expect(between(page, '<style>', '</style>')).not.toMatch(/url\(|@import/);
  const skeleton = page.replace(/<script[\s\S]*?<\/script>/g, '').replace(/<style>[\s\S]*?<\/style>/, '');
  expect([...skeleton.matchAll(/\s(?:src|href)="([^"]*)"/g)].map((found) => found[1])).toEqual(['data:,']);
  expect(skeleton).not.toMatch(/\{\{/);
});

test('same record, same bytes; small enough to send to a phone', async () => {
  const [one, two] = [await benchPage(sampleRecord()), await benchPage(sampleRecord())];
  expect(Buffer.compare(one, two)).toBe(0);
  // 400 kB is a few seconds on a slow line.
  expect(one.length).toBeLessThan(400_000);
  console.log(`bench page: ${Math.round(one.length / 1000)} kB`);
});
