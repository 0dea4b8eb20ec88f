import { mailPasswordReset } from './accounts/reset-password.ts';
import { buildBundle } from './bundles/build.ts';
import type { JobHandler } from './jobs.ts';

/** What does the work of each kind of job. A kind that is not here fails and says so. */
export const jobHandlers: Readonly<Record<string, JobHandler>> = {
  bundle: buildBundle,
  'password-reset': mailPasswordReset,
};
