/**
 * The bench page in a browser, from disk: a coil wound from end to end by key, with a reload, taking back, a correction,
 * readings and their file; what is on the page is checked against the program's own functions.
 */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { stopsOf } from '../../src/bench/counter.ts';
import { questionsOf } from '../../src/bench/judge.ts';
import { benchPage } from '../../src/bench/page.ts';
import { fromCsv } from '../helpers/readings.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { notDriven, openBrowser } from './chromium.ts';

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** Longer than a contact bounces, and than a stop that opens is guarded. */
const BEAT_MS = 90;
const GUARD_MS = 520;

const record = sampleRecord({
  turns: [5.25, 9, 14.5, 18],
  surface: 'smooth',
  job: 'Tapped coil for the <b>Hollow Hill</b> & "Fenland" sets',
});
const stops = stopsOf(record);

let browser: Browser;
let folder: string;
let address: string;

/** What the page said wrong and asked for. */
interface Watched {
  readonly page: Page;
  readonly complaints: string[];
  readonly requests: string[];
}

async function open(options: Parameters<Browser['newContext']>[0] = {}, before?: string): Promise<Watched> {
  const context: BrowserContext = await browser.newContext({ reducedMotion: 'reduce', ...options });
  if (before !== undefined) await context.addInitScript(before);
  const page = await context.newPage();
  const complaints: string[] = [];
  const requests: string[] = [];
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('request', (request) => requests.push(request.url()));
  await page.goto(address);
  return { page, complaints, requests };
}

const number = (page: Page) => page.locator('#number').textContent();

/** Presses the space bar until a stop holds the count. */
async function toStop(page: Page): Promise<number> {
  let presses = 0;
  while (!(await page.locator('#stop').isVisible())) {
    if (++presses > 50) throw new Error('no stop in fifty turns');
    await page.keyboard.press('Space');
    await page.waitForTimeout(BEAT_MS);
  }
  return presses;
}

/** Keys down in the same instant, as no test could press them. */
async function strike(page: Page, ...codes: readonly string[]): Promise<void> {
  await page.evaluate((list) => {
    const { document, KeyboardEvent } = globalThis as unknown as Browsing;
    for (const code of list)
      document.activeElement.dispatchEvent(new KeyboardEvent('keydown', { code, key: code, bubbles: true }));
  }, codes);
}

/** What is used of a browser here; the tests are typed for Node. */
interface Browsing {
  readonly document: { readonly activeElement: { dispatchEvent(event: object): void } };
  readonly KeyboardEvent: new (type: string, init: object) => object;
}

async function goOn(page: Page): Promise<void> {
  await page.waitForTimeout(GUARD_MS);
  await page.keyboard.press('Enter');
}

/** Rules that axe-core finds broken, as sentences. */
async function broken(page: Page): Promise<string[]> {
  await page.evaluate(axe);
  const { violations } = (await page.evaluate('axe.run(document, { resultTypes: ["violations"] })')) as {
    violations: { id: string; help: string; nodes: { html: string; failureSummary: string }[] }[];
  };
  return violations.flatMap(({ id, nodes }) =>
    nodes.map(({ html, failureSummary }) => `${id}: ${html}: ${failureSummary}`),
  );
}

describe.skipIf(notDriven)('bench page in Chromium', () => {
  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'coilwright-bench-'));
    const path = join(folder, 'bench-page.html');
    writeFileSync(path, await benchPage(record));
    address = pathToFileURL(path).href;
    browser = await openBrowser();
  });
  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  test('a whole coil by key: held at every stop, kept over a reload, taken back, corrected, read and saved', async () => {
    const { page, complaints, requests } = await open({ acceptDownloads: true });
    expect(await page.locator('h1').textContent()).toBe(record.job);
    let counted = 0;
    for (const [i, stop] of stops.entries()) {
      if (i === 2) {
        await page.reload();
        expect(await number(page)).toBe(String(counted));
      }
      counted += await toStop(page);
      expect(counted).toBe(stop.whole);
      expect(await page.locator('#stop-place').textContent()).toContain(`Turn ${stop.turn}`);
      if (i === 0) {
        // The counting key does not get past a stop.
        await page.keyboard.press('Space');
        expect(await page.locator('#stop').isVisible()).toBe(true);
        // Taken back and counted again.
        await page.locator('#undo').click();
        expect(await number(page)).toBe(String(counted - 1));
        await page.waitForTimeout(BEAT_MS);
        // An Enter that comes with the turn that opens the stop was not meant for it.
        await strike(page, 'Space', 'Enter');
        expect(await page.locator('#stop').isVisible()).toBe(true);
      }
      if (i === 1) {
        // A length as planned and a bit more: the taps to come move, those made stay.
        await page.locator('#wound').fill('6,4');
        await page.locator('#correction-work').click();
        const rows = page.locator('#corrected tbody tr');
        expect(await rows.count()).toBe(stops.length);
        expect(await page.locator('#corrected').textContent()).toMatch(/finished coil/);
        await page.locator('#corrected button').last().click();
        expect(await rows.count()).toBe(0);
        await page.locator('#stop').focus();
      }
      await goOn(page);
    }
    expect(await page.locator('#count').isDisabled()).toBe(true);
    expect(await page.locator('#togo').textContent()).toBe('wound');
    await page.keyboard.press('Space');
    expect(await number(page)).toBe(String(stops.at(-1)!.turn));

    const questions = questionsOf(record);
    await page.evaluate('for (const one of document.querySelectorAll("details")) one.open = true');
    const asked = questions.filter(({ nominal }) => nominal !== null);
    for (const [i, { key, nominal, low, digits }] of asked.entries()) {
      const value = i === 3 ? low! * 0.97 : nominal!;
      await page.locator(`[aria-describedby="verdict-${key}"]`).fill(value.toFixed(digits + 1));
    }
    const verdicts = await page.locator('.verdict').allInnerTexts();
    expect(verdicts).toHaveLength(asked.length);
    expect(verdicts.filter((text) => text.startsWith('within limits')).length).toBeGreaterThan(0);
    expect(verdicts.filter((text) => /too low|hardly/.test(text)).length).toBe(1);
    await page.locator('#coil-no').fill('7; "x"');
    const waiting = page.waitForEvent('download');
    await page.locator('#save').click();
    const download = await waiting;
    const rows = fromCsv(readFileSync(await download.path(), 'utf8'));
    expect(rows).toHaveLength(asked.length);
    for (const [i, row] of rows.entries()) {
      const { nominal, low, tap, digits } = asked[i]!;
      expect(row.record).toBe(record.hash);
      expect(row.serial).toBe('7; "x"');
      expect(row.tap).toBe(tap);
      // As typed, to the last digit.
      expect(row.value).toBe(Number((i === 3 ? low! * 0.97 : nominal!).toFixed(digits + 1)));
    }
    expect(complaints).toEqual([]);
    expect(requests.filter((url) => url !== address && !/^(data|blob):/.test(url))).toEqual([]);
    console.log(`bench page: ${counted} turns, ${stops.length} stops, ${rows.length} readings`);
    await page.context().close();
  });

  test('a correction in use moves the stops to come, also after a reload', async () => {
    const { page, complaints } = await open();
    await toStop(page);
    const planned = `${await page.locator('#figures dd').last().textContent()}`;
    await page.locator('#wound').fill((Number.parseFloat(planned) * 1.04).toFixed(1));
    await page.locator('#correction-work').click();
    await page.locator('#corrected button.main').click();
    expect(await page.locator('#corrected').textContent()).toContain('The counter stops at these places.');
    await page.reload();
    const now = page.locator('#corrected tbody tr').nth(1).locator('td').nth(1);
    const turn = Number.parseFloat(`${await now.textContent()}`);
    expect(turn).not.toBe(stops[1]!.turn);
    await page.keyboard.press('Enter');
    await page.waitForTimeout(BEAT_MS);
    await toStop(page);
    expect(await page.locator('#stop-place').textContent()).toContain(`Turn ${turn},`);
    expect(await number(page)).toBe(String(Math.floor(turn)));
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  test('touch, a foot switch and a key that repeats', async () => {
    const { page, complaints } = await open({ hasTouch: true, viewport: { width: 360, height: 740 } });
    await page.locator('#count').tap();
    expect(await number(page)).toBe('1');
    await page.locator('#setup summary').click();
    await page.locator('#learn').click();
    await page.keyboard.press('Enter');
    expect(await page.locator('#key-words').textContent()).toContain('work of its own');
    await page.locator('#learn').click();
    await page.keyboard.press('F9');
    expect(await page.locator('#key-words').textContent()).toContain('F9');
    await page.waitForTimeout(BEAT_MS);
    // Held down it repeats: one turn.
    await page.keyboard.down('F9');
    await page.keyboard.down('F9');
    await page.keyboard.down('F9');
    await page.keyboard.up('F9');
    expect(await number(page)).toBe('2');
    // A contact that bounces: one turn.
    await page.waitForTimeout(BEAT_MS);
    await strike(page, 'F9', 'F9');
    expect(await number(page)).toBe('3');
    await page.reload();
    expect(await number(page)).toBe('3');
    await page.waitForTimeout(BEAT_MS);
    await page.keyboard.press('F9');
    expect(await number(page)).toBe('4');
    // Where something is being written the space bar writes.
    await page.locator('#wound-by').fill('A');
    await page.keyboard.press('Space');
    expect(await number(page)).toBe('4');
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  test('where a browser keeps nothing it counts all the same and says so', async () => {
    const gone = 'Object.defineProperty(window, "localStorage", { get() { throw new Error("not allowed"); } })';
    const { page, complaints } = await open({}, gone);
    expect(await page.locator('#kept').textContent()).toContain('keeps nothing');
    await page.keyboard.press('Space');
    expect(await number(page)).toBe('1');
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  for (const colorScheme of ['light', 'dark'] as const)
    for (const width of [360, 1280])
      test(`readable ${colorScheme} at ${width} px: axe-core finds nothing, nothing runs over the edge`, async () => {
        const { page } = await open({ colorScheme, viewport: { width, height: 800 } });
        const over = () => page.evaluate<number>('document.documentElement.scrollWidth - window.innerWidth');
        await page.evaluate('for (const one of document.querySelectorAll("details")) one.open = true');
        await page.locator('#spool').fill('2');
        const { key, high } = questionsOf(record).find((question) => question.high !== null)!;
        await page.locator(`[aria-describedby="verdict-${key}"]`).fill(String(high! * 1.01));
        expect(await over()).toBeLessThanOrEqual(0);
        expect(await broken(page)).toEqual([]);
        await page.locator('#count').focus();
        await toStop(page);
        await page.locator('#wound').fill('4');
        await page.locator('#correction-work').click();
        expect(await over()).toBeLessThanOrEqual(0);
        expect(await broken(page)).toEqual([]);
        await page.context().close();
      });
});
