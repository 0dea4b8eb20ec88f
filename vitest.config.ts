import { getViteConfig } from 'astro/config';
import type { ViteUserConfig } from 'vitest/config';

/**
 * Suites by folder: unit and checks are pure and run in the bare runner; api runs every request through the
 * middleware on a database of its own. The browser and fault suites have runners of their own (scripts/test.mjs).
 */
const config: ViteUserConfig = {
  test: {
    include: ['tests/{unit,checks,api}/**/*.test.{ts,tsx}'],
    setupFiles: ['tests/setup/silence.ts'],
    testTimeout: 20_000,
    hookTimeout: 30_000,
    pool: 'forks',
    maxWorkers: 2,
  },
};

// Astro and the test runner each bring a Vite of their own, whose types differ in what is not used here.
export default getViteConfig(config as Parameters<typeof getViteConfig>[0]);
