/** Debian's Chromium, where it is there: the bench page is driven in it. */
import { existsSync } from 'node:fs';
import { type Browser, chromium } from 'playwright-core';

const PATH = '/usr/bin/chromium';

/** Says so when tests that need a browser are left out. */
export const noBrowser = !existsSync(PATH);
if (noBrowser) console.log(`bench page: not driven, ${PATH} is not there`);

export const openBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: PATH, args: ['--no-sandbox', '--disable-dev-shm-usage'] });
