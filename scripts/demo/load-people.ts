import { accounts, labs as labTable, memberships } from '#src/db/schema/index.ts';
import { type Asker, askerAgain } from '#src/server/access/asker.ts';
import { database } from '#src/server/database.ts';
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '#src/server/demo-accounts.ts';
import { newId, nowIso } from '#src/server/ids.ts';
import { hashPassword } from '#src/server/passwords.ts';
import { record } from '#src/server/trail.ts';
import { type LabKey, labs, people } from './people.ts';

export interface DemoPeople {
  labId: Record<LabKey, string>;
  asker: (email: string) => Promise<Asker>;
}

/** Make the labs and the people; only the four published addresses get a password. */
export async function loadPeople(): Promise<DemoPeople> {
  const { write } = await database();
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const published = new Set<string>(DEMO_ACCOUNTS.map(({ email }) => email));
  const labId = Object.fromEntries(labs.map(({ key }) => [key, newId()])) as Record<LabKey, string>;
  const accountId = new Map(people.map(({ email }) => [email, newId()]));
  const createdAt = nowIso();
  await write(async (tx) => {
    await tx.insert(labTable).values(labs.map(({ key, ...lab }) => ({ id: labId[key], ...lab, createdAt })));
    for (const { email, name, steward = false, labs: roles = {} } of people) {
      const id = accountId.get(email)!;
      await tx
        .insert(accounts)
        .values({ id, email, name, steward, passwordHash: published.has(email) ? passwordHash : null, createdAt });
      for (const [key, role] of Object.entries(roles))
        await tx.insert(memberships).values({ accountId: id, labId: labId[key as LabKey], role, createdAt });
    }
    await record(tx, { accountId: null }, { action: 'load-demo', subjectType: 'registry', subjectId: 'demo' });
  });
  return {
    labId,
    asker: async (email) => {
      const asker = await askerAgain({ accountId: accountId.get(email) ?? '' });
      if (!asker) throw new Error(`no demo account ${email}`);
      return asker;
    },
  };
}
