import type { Asker } from '#src/server/access/asker.ts';

/** An account with an access token, made straight in the database. */
export async function person(
  name: string,
  {
    labs = {},
    steward = false,
    scopes = ['read', 'write'],
  }: { labs?: Record<string, 'lead' | 'contributor'>; steward?: boolean; scopes?: ('read' | 'write')[] } = {},
): Promise<{ id: string; email: string; token: string }> {
  const { database } = await import('#src/server/database.ts');
  const { newId, newSecret, nowIso, sha256 } = await import('#src/server/ids.ts');
  const { accessTokens, accounts, memberships } = await import('#src/db/schema/index.ts');
  const { write } = await database();
  const id = newId();
  const email = `${name.toLowerCase().replaceAll(' ', '.')}@test.example`;
  const token = `zft_${newSecret()}`;
  const createdAt = nowIso();
  await write(async (tx) => {
    await tx.insert(accounts).values({ id, email, name, steward, createdAt });
    for (const [labId, role] of Object.entries(labs))
      await tx.insert(memberships).values({ accountId: id, labId, role, createdAt });
    await tx.insert(accessTokens).values({
      id: newId(),
      accountId: id,
      name: 'test',
      hash: sha256(token),
      scopes,
      createdAt,
      expiresAt: '2999-01-01T00:00:00.000Z',
    });
  });
  return { id, email, token };
}

/** A lab, made straight in the database. */
export async function lab(name: string, { outsideAttest = false } = {}): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { labs } = await import('#src/db/schema/index.ts');
  const id = newId();
  await (await database()).write((tx) => tx.insert(labs).values({ id, name, outsideAttest, createdAt: nowIso() }));
  return id;
}

/** The asker behind a token, for calling a service directly. */
export async function askerBy(token: string): Promise<Asker> {
  const { askerOfToken } = await import('#src/server/access/asker.ts');
  const asker = await askerOfToken(token);
  if (!asker) throw new Error('no such token');
  return asker;
}
