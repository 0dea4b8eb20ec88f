import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Route } from '#src/contracts/route.ts';
import { type RouteName, routes } from '#src/contracts/routes.ts';
import { call, openRegistry, servedFiles } from './harness.ts';
import { askers, buildFixture, type Fixture, type MatrixRow } from './matrix/fixture.ts';

// Every endpoint times every kind of asker. Rows stand in matrix/<subject>.ts under the name of their route in the
// route table; further cases of a route are named "route, case". A route without a row fails here.

const modules = import.meta.glob<{ rows: Record<string, MatrixRow> }>('./matrix/*.ts', { eager: true });
const rows = Object.assign({}, ...Object.values(modules).map((module) => module.rows ?? {})) as Record<
  string,
  MatrixRow
>;
const table = routes as unknown as Record<RouteName, Route>;

let fixture: Fixture;
let close: () => Promise<void>;

beforeAll(async () => {
  const registry = await openRegistry();
  close = registry.close;
  fixture = await buildFixture();
});
afterAll(() => close());

test('every file of src/pages/api is in the route table, and every route has its file', () => {
  const files = servedFiles.map(({ path }) => path).filter((path) => !path.includes('...'));
  const paths = [...new Set(Object.values(table).map((route) => route.path))];
  expect([...files].sort()).toEqual(paths.sort());
});

test('every route has a row', () => {
  const named = new Set(Object.keys(rows).map((name) => name.split(',')[0]));
  expect(Object.keys(table).filter((name) => !named.has(name))).toEqual([]);
  expect([...named].filter((name) => !(name! in table))).toEqual([]);
});

describe.each(Object.entries(rows))('%s', (name, row) => {
  const route = table[name.split(',')[0] as RouteName];

  test.each(askers)('%s', async (kind) => {
    const { path, json, form, headers } = await row.send(fixture, kind);
    const person = kind === 'nobody' ? null : fixture.people[kind];
    // What tokens may never do is asked with a session, so that the person's own rights are what is judged.
    const bySession = route.sessionOnly && person && kind !== 'readToken' && kind !== 'revokedToken';
    const response = await call(route.method, path, {
      ...(bySession ? { session: person.id } : { as: person?.token }),
      ...(json === undefined ? {} : { json }),
      ...(form ? { form } : {}),
      ...(headers ? { headers } : {}),
    });
    const text = await response.text();
    expect(response.status, `${route.method} ${path}: ${text.slice(0, 300)}`).toBe(row.expect[kind]);
    if (response.status >= 400) {
      expect(response.headers.get('content-type')).toBe('application/problem+json');
      expect(JSON.parse(text)).toMatchObject({
        status: response.status,
        title: expect.any(String),
        detail: expect.any(String),
      });
    }
  });
});
