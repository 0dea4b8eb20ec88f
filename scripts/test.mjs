import { ensureBuild } from './lib/build.mjs';
import { ensureChromium } from './lib/chromium.mjs';
import { giveUp, parseOptions, ROOT } from './lib/options.mjs';
import { ensurePackages, requireNode } from './lib/packages.mjs';
import { playwright, runNode, single, vitest } from './lib/suites.mjs';
import { aloneInCheckout } from './lib/work-lock.mjs';

// `npm test`: everything that must hold, in one command. Node built-ins only, since it installs the packages.

const say = (/** @type {string} */ line) => console.log(line);

const CHECKERS = {
  biome: 'node_modules/@biomejs/biome/bin/biome',
  astro: 'node_modules/astro/astro.js',
};

/**
 * The suites in their order, each with its budget in seconds.
 *
 * @type {{ name: string, budget: number, needsBuild?: boolean, run(seconds: number): Promise<import('./lib/suites.mjs').Totals> }[]}
 */
const suites = [
  { name: 'lint', budget: 60, run: async (s) => single(await runNode(CHECKERS.biome, ['check', '.'], s)) },
  // It judges every file of tsconfig.json, scripts and tests among them, but no source that a package ships.
  { name: 'types', budget: 300, run: async (s) => single(await runNode(CHECKERS.astro, ['check'], s)) },
  { name: 'unit, checks, API', budget: 600, run: (s) => vitest([], s) },
  {
    name: 'build',
    budget: 300,
    run: async (s) => {
      aloneInCheckout(say, () => ensureBuild(say, { seconds: s }));
      return single(true);
    },
  },
  { name: 'faults', budget: 600, needsBuild: true, run: (s) => vitest(['--config', 'vitest.faults.config.ts'], s) },
  {
    name: 'browser',
    budget: 900,
    needsBuild: true,
    run: async (s) => {
      if (process.env.ZAFFRE_NO_BROWSER === '1') return { passed: 0, failed: 0, skipped: 1 };
      ensureChromium(say);
      return playwright(s);
    },
  },
];

try {
  requireNode();
  const { long = false } = parseOptions('test --', { long: { type: 'boolean' } });
  if (long) process.env.ZAFFRE_LONG = '1';
  process.chdir(ROOT);
  aloneInCheckout(say, () => ensurePackages(say));
  process.exitCode = await runAll(long ? 4 : 1);
} catch (error) {
  giveUp(error);
}

/**
 * @param {number} stretch - by how much every budget is multiplied
 * @returns {Promise<number>} the exit code
 */
async function runAll(stretch) {
  const sum = { passed: 0, failed: 0, skipped: 0 };
  const lines = [];
  let built = true;
  for (const { name, budget, needsBuild, run } of suites) {
    say(`\n── ${name}`);
    const started = performance.now();
    const totals = needsBuild && !built ? single(false) : await attempt(() => run(budget * stretch));
    if (name === 'build') built = totals.failed === 0;
    const seconds = (performance.now() - started) / 1000;
    lines.push(`${name}: ${describe(totals)} in ${seconds.toFixed(1)} s of ${budget * stretch} s`);
    for (const key of /** @type {const} */ (['passed', 'failed', 'skipped'])) sum[key] += totals[key];
  }
  say(`\n${lines.join('\n')}`);
  if (process.env.ZAFFRE_NO_BROWSER === '1')
    say('The browser suite was left out, since ZAFFRE_NO_BROWSER is 1; it counts as one skipped.');
  say(describe(sum));
  return sum.failed === 0 ? 0 : 1;
}

/** @param {() => Promise<import('./lib/suites.mjs').Totals>} run */
async function attempt(run) {
  try {
    return await run();
  } catch (error) {
    console.error(error instanceof Error ? error.message : error);
    return single(false);
  }
}

/** @param {import('./lib/suites.mjs').Totals} totals */
function describe({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
