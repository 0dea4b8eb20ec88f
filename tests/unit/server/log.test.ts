import { execFileSync } from 'node:child_process';
import { expect, test } from 'vitest';

/** Lines that the program's log writes for a piece of code, as text; under the test runner itself it is silent. */
function written(code: string): string[] {
  const script = `import { log } from '#src/server/log.ts'; ${code}`;
  const env = { PATH: process.env.PATH, LOG_LEVEL: 'info' };
  const args = ['--import', 'tsx', '--input-type=module', '-e', script];
  return execFileSync(process.execPath, args, { env, encoding: 'utf8' }).trimEnd().split('\n');
}

test('one event is one line of JSON in UTC, whatever it holds', () => {
  const forged = 'x\n{"level":"info","msg":"sign-in"}\u2028\r';
  const lines = written(`log.warn({ path: ${JSON.stringify(forged)} }, ${JSON.stringify(forged)})`);
  expect(lines).toHaveLength(1);
  const { level, time, path, msg } = JSON.parse(lines[0]!) as Record<string, string>;
  expect({ level, path, msg }).toEqual({ level: 'warn', path: forged, msg: forged });
  expect(time).toMatch(/^\d{4}-\d\d-\d\dT[\d:.]+Z$/);
});

test('secrets are left out, at the top and one level down', () => {
  const fields = ['password', 'token', 'secret', 'authorization', 'cookie', 'set-cookie', 'apiKey', 'authSecret'];
  const held = Object.fromEntries(fields.map((field) => [field, 's3cret']));
  const [line] = written(`log.info(${JSON.stringify({ ...held, request: held })}, 'a request')`);
  expect(line).not.toContain('s3cret');
  expect(JSON.parse(line!)).toMatchObject({ request: { 'set-cookie': '[left out]' }, msg: 'a request' });
});
