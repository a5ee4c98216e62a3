/** Debian's Chromium, where it is there: the bench page is driven in it. */
import { existsSync } from 'node:fs';
import { type Browser, chromium } from 'playwright-core';

const PATH = '/usr/bin/chromium';

/** The drive takes half a minute: `npm run check:outside` asks for it, and `npm test` says that it is left out. */
const asked = process.env.DRIVE_BENCH_PAGE === '1';

export const notDriven = !asked || !existsSync(PATH);
if (!asked) console.log('bench page: driven in a browser by npm run check:outside');
else if (notDriven) console.log(`bench page: not driven, ${PATH} is not there`);

export const openBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: PATH, args: ['--no-sandbox', '--disable-dev-shm-usage'] });
