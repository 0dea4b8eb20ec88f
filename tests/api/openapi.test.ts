import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Route } from '#src/contracts/route.ts';
import { routes } from '#src/contracts/routes.ts';
import { call, json, openRegistry, servedFiles } from './harness.ts';

type Json = Record<string, never>;
interface Operation {
  operationId: string;
  security: Record<string, unknown>[];
  parameters?: ({ name: string; in: string } | { $ref: string })[];
  requestBody?: { content: Record<string, { schema: Json }> };
  responses: Record<string, { $ref?: string; description?: string; headers?: Json; content?: Json }>;
}
interface Document {
  openapi: string;
  info: { version: string };
  paths: Record<string, Record<string, Operation>>;
  components: Record<string, Record<string, unknown>>;
}

let registry: Awaited<ReturnType<typeof openRegistry>>;
let document: Document;
beforeAll(async () => {
  registry = await openRegistry();
  document = await json<Document>(call('GET', '/api/openapi.json'));
});
afterAll(() => registry.close());

const table = Object.entries(routes) as unknown as [string, Route][];

test('is OpenAPI 3.1 of this release', () => {
  const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };
  expect(document).toMatchObject({ openapi: '3.1.1', info: { version } });
});

test('tells of every file of src/pages/api, and of every method of it', async () => {
  const modules = import.meta.glob<Record<string, unknown>>('/src/pages/api/**/*.ts');
  for (const { file, path } of servedFiles.filter(({ path }) => !path.includes('...'))) {
    const methods = Object.keys(await modules[file]!()).filter((name) => /^[A-Z]+$/.test(name));
    expect(Object.keys(document.paths[path] ?? {}).sort(), path).toEqual(
      methods.map((name) => name.toLowerCase()).sort(),
    );
  }
});

test('every reference leads somewhere', () => {
  const seek = (value: unknown): string[] => {
    if (Array.isArray(value)) return value.flatMap(seek);
    if (typeof value !== 'object' || value === null) return [];
    return Object.entries(value).flatMap(([key, inner]) => (key === '$ref' ? [String(inner)] : seek(inner)));
  };
  const references = new Set(seek(document));
  expect(references.size).toBeGreaterThan(20);
  for (const reference of references) {
    const [, kind, name] = /^#\/components\/(\w+)\/([\w.-]+)$/.exec(reference) ?? [];
    expect(document.components[kind!]?.[name!], reference).toBeDefined();
  }
});

test.each(table)('%s', (name, route) => {
  const operation = document.paths[route.path]![route.method.toLowerCase()]!;
  expect(operation.operationId).toBe(name);
  expect(operation.responses[route.status]).toBeDefined();
  const refused = Object.entries(operation.responses).filter(([status]) => Number(status) >= 400);
  for (const [status, { $ref }] of refused) expect($ref).toBe(`#/components/responses/Problem${status}`);
  const statuses = refused.map(([status]) => Number(status));
  if (route.who !== 'anyone') expect(statuses).toEqual(expect.arrayContaining([401, 403]));
  if (route.conditional) expect(statuses).toEqual(expect.arrayContaining([412, 428]));
  const headers = (operation.parameters ?? []).flatMap((p) => ('$ref' in p ? [p.$ref.split('/').at(-1)] : []));
  expect(headers.includes('IfMatch')).toBe(route.conditional === true);
  if (route.body) expect(operation.requestBody?.content['application/json']?.schema).toBeDefined();
  const inPath = (operation.parameters ?? []).flatMap((p) => ('in' in p && p.in === 'path' ? [p.name] : []));
  expect(inPath).toEqual([...route.path.matchAll(/\{(\w+)\}/g)].map((match) => match[1]));
  const byToken = operation.security.some((means) => 'token' in means);
  expect(byToken).toBe(!route.sessionOnly);
});

test('what enters is told as it may be sent, what leaves as it comes', () => {
  const schemas = document.components.schemas as Record<
    string,
    { required?: string[]; properties: Record<string, unknown> }
  >;
  // A field with a default need not be sent.
  expect(schemas.FolioInput!.required).toEqual(['name', 'lab', 'licence']);
  expect(schemas.Folio!.required).toContain('shows');
  expect(schemas.Problem!.required).toEqual(expect.arrayContaining(['type', 'title', 'status', 'detail']));
});
