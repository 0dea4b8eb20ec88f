/// <reference types="vitest/config" />
import { getViteConfig } from 'astro/config';

/** Processes killed, disks full, stores away: one after another, against the built program where they need one. */
export default getViteConfig({
  test: {
    include: ['tests/faults/**/*.test.ts'],
    setupFiles: ['tests/setup/silence.ts'],
    testTimeout: 120_000,
    hookTimeout: 120_000,
    pool: 'forks',
    fileParallelism: false,
    passWithNoTests: true,
  },
});
