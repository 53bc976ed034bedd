import { defineConfig } from 'vitest/config'

/** Journeys in a real browser against the built server, one after the other: they share two cores with Chromium. */
export default defineConfig({
  test: {
    root: new URL('../..', import.meta.url).pathname,
    include: ['tests/e2e/**/*.test.ts'],
    environment: 'node',
    fileParallelism: false,
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
})
