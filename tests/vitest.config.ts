import { defineConfig } from 'vitest/config';

export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  test: {
    include: ['tests/**/*.test.ts'],
    isolate: false,
    testTimeout: 60_000,
    maxWorkers: 2,
  },
});
