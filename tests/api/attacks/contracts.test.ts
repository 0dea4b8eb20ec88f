import { describe, expect, test } from 'vitest';
import * as z from 'zod';
import type { Route } from '#src/contracts/route.ts';
import { type RouteName, routes } from '#src/contracts/routes.ts';
import { SpectrumMetadata } from '#src/contracts/spectra.ts';

// What a request may bring is what its contract names. A field of the table that nobody named (an owner, a state, a
// role) is refused, however deep in the body it stands.

type Schema = {
  type?: string;
  properties?: Record<string, Schema>;
  additionalProperties?: unknown;
  [part: string]: unknown;
};
const table = Object.entries(routes as unknown as Record<RouteName, Route>);
const bodies: [name: string, body: z.ZodType][] = [
  ...table.flatMap(([name, { body }]): [string, z.ZodType][] => (body ? [[name, body]] : [])),
  ['createSpectrum, metadata', SpectrumMetadata],
];

/** Places of objects in a schema that take fields without a name; a record of named kind of values is none. */
function openPlaces(schema: unknown, place = '#'): string[] {
  if (typeof schema !== 'object' || schema === null) return [];
  if (Array.isArray(schema)) return schema.flatMap((part, i) => openPlaces(part, `${place}/${i}`));
  const { type, properties, additionalProperties } = schema as Schema;
  const open = type === 'object' && properties !== undefined && additionalProperties !== false ? [place] : [];
  return [...open, ...Object.entries(schema).flatMap(([name, part]) => openPlaces(part, `${place}/${name}`))];
}

// What an authenticator answers is the standard's, which adds members; nothing of it is stored but what is checked.
const ours = bodies.filter(([name]) => name !== 'addPasskey');
test.each(ours)('%s takes no field that its contract does not name, at any depth', (_, body) => {
  const schema = z.toJSONSchema(body, { io: 'input', unrepresentable: 'any' });
  expect(openPlaces(schema)).toEqual([]);
});

describe.each(bodies)('%s', (_, body) => {
  test.each(['id', 'makerId', 'labId', 'steward', 'version', 'accountId', 'mergedInto', 'constructor'])(
    'refuses %s',
    (field) => {
      const smuggled = JSON.parse(`{"${field}": "attested"}`) as object;
      const isList = body instanceof z.ZodArray;
      const { success, error } = body.safeParse(isList ? [smuggled] : smuggled);
      expect(success).toBe(false);
      const named = JSON.stringify(error?.issues).includes(field);
      const known = JSON.stringify(z.toJSONSchema(body, { io: 'input', unrepresentable: 'any' })).includes(
        `"${field}"`,
      );
      expect(named || known).toBe(true);
    },
  );
});

test('what tokens never do is closed to them in the table: tokens, invitations, roles, trail', () => {
  const mustBeBySession = [
    'createToken',
    'listTokens',
    'revokeToken',
    'inviteMember',
    'inviteGuest',
    'resendInvitation',
    'addMember',
    'changeMember',
    'removeMember',
    'changePerson',
    'changePassword',
    'askAddressChange',
    'listTrail',
    'readTrailRow',
    'verifyTrail',
    'exportTrailCsv',
    'exportTrailLines',
  ];
  const open = table.filter(([name, { sessionOnly }]) => mustBeBySession.includes(name) && !sessionOnly);
  expect(open.map(([name]) => name)).toEqual([]);
  expect(mustBeBySession.filter((name) => !(name in routes))).toEqual([]);
});
