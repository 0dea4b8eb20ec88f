import type { RunningServer } from '../server.ts';

/** What the tests of one demo server share; filled before the first of them runs. */
export interface Door {
  server: RunningServer;
  folder: string;
  /** Access token of the demo's contributor. */
  token: string;
}
