import { readFileSync } from 'node:fs';
import { defineConfig } from 'vitest/config';

/** As in the build: starter jobs are imported as text. */
const yamlAsText = {
  name: 'yaml-as-text',
  load: (id: string) => (id.endsWith('.yaml') ? `export default ${JSON.stringify(readFileSync(id, 'utf8'))}` : null),
};

export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  plugins: [yamlAsText],
  test: {
    include: ['tests/**/*.test.ts'],
    isolate: false,
    testTimeout: 60_000,
    maxWorkers: 2,
  },
});
