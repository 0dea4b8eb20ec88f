import { getViteConfig } from 'astro/config';
import type { ViteUserConfig } from 'vitest/config';

/** Processes killed, disks full, stores away: one after another, against the built program where they need one. */
const config: ViteUserConfig = {
  test: {
    include: ['tests/faults/**/*.test.ts'],
    setupFiles: ['tests/setup/silence.ts'],
    testTimeout: 120_000,
    hookTimeout: 120_000,
    pool: 'forks',
    fileParallelism: false,
    passWithNoTests: true,
  },
};

// Astro and the test runner each bring a Vite of their own, whose types differ in what is not used here.
export default getViteConfig(config as Parameters<typeof getViteConfig>[0]);
