import { expect, test } from 'vitest';
import { type OpenApi, operationsByTag } from '#src/components/api-reference/document.ts';
import { curlOf, exampleOf } from '#src/components/api-reference/example.ts';
import { limitsOf, schemaRows, typeParts } from '#src/components/api-reference/schema-rows.ts';
import { routes } from '#src/contracts/routes.ts';
import { openApiDocument } from '#src/server/openapi.ts';

const document = openApiDocument() as unknown as OpenApi;
const operations = [...operationsByTag(document).values()].flat();
const find = (id: string) => operations.find((operation) => operation.id === id)!;

test('every route of the table is shown once, under its own tag', () => {
  expect(operations.map(({ id }) => id).sort()).toEqual(Object.keys(routes).sort());
});

test('types read as words, named schemas are pointed at', () => {
  expect(typeParts({ type: ['string', 'null'] })).toEqual(['string', ' or ', 'null']);
  expect(typeParts({ enum: ['view', 'download'] })).toEqual(['"view"', ' or ', '"download"']);
  expect(typeParts({ type: 'array', items: { $ref: '#/components/schemas/Band' } })).toEqual([
    'list of ',
    { schema: 'Band' },
  ]);
  expect(typeParts({ anyOf: [{ type: 'number' }, { type: 'number' }, { type: 'null' }] })).toEqual([
    'number',
    ' or ',
    'null',
  ]);
  expect(typeParts({})).toEqual(['any value']);
});

test('limits leave out those of the number format itself', () => {
  expect(limitsOf({ type: 'integer', minimum: 1, maximum: Number.MAX_SAFE_INTEGER })).toBe('at least 1');
  expect(limitsOf({ exclusiveMinimum: 0, default: 50 })).toBe('above 0, 50 unless told');
});

test('fields of nested objects stand right after the field they belong to', () => {
  const rows = schemaRows({
    type: 'object',
    required: ['a'],
    properties: {
      a: { type: 'array', items: { type: 'object', properties: { b: { type: 'string' } } } },
      c: { $ref: '#/components/schemas/Lab' },
    },
  });
  expect(rows.map(({ name, depth, required }) => [name, depth, required])).toEqual([
    ['a', 0, true],
    ['b', 1, false],
    ['c', 0, false],
  ]);
});

// The contracts themselves judge the examples: what the page tells people to send is taken by the server's check.
const withBody = Object.entries(routes).filter(([, route]) => route.body !== undefined);
test.each(withBody)('the example body of %s fits its contract', (name, route) => {
  const body = exampleOf(document, find(name).body!.schema);
  expect(route.body!.safeParse(body).error?.issues ?? []).toEqual([]);
});

test('the shell line carries token, condition and body, and survives an apostrophe', () => {
  const line = curlOf(document, find('changeLab'), 'http://localhost:4321')!;
  expect(line).toContain('curl -X PATCH');
  expect(line).toContain('-H "Authorization: Bearer $TOKEN"');
  expect(line).toContain(`-H 'If-Match: "ETAG"'`);
  expect(line).toContain("'http://localhost:4321/api/labs/ID'");
  const vibrations = { ...find('createLab'), body: { mediaType: 'application/json', schema: { const: "A1'" } } };
  expect(curlOf(document, vibrations, '')).toContain(`-d '"A1'\\''"'`);
});

test('what no token opens has no shell line', () => {
  expect(curlOf(document, find('createToken'), '')).toBeNull();
  expect(curlOf(document, find('health'), '')).not.toContain('Authorization');
});
