import { asc, inArray } from 'drizzle-orm';
import { labs } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { type Asker, labsWith } from './asker.ts';

/** Who is named at the head of a page. */
export interface FrameUser {
  name: string;
  /** The lab the asker leads, or the first by name, and how many more there are; none for guests. */
  lab: string | undefined;
  role: 'steward' | 'lead' | 'contributor' | 'guest';
}

/** What the head of a page says of the asker; null for nobody. */
export async function frameUser(asker: Asker | null): Promise<FrameUser | null> {
  if (!asker) return null;
  const own = await ownLabs(asker);
  const first = own.find(({ role }) => role === 'lead') ?? own[0];
  const lab = first && (own.length > 1 ? `${first.name} + ${own.length - 1}` : first.name);
  return { name: asker.name, lab, role: roleOf(asker) };
}

/** The asker's labs by name, with the role held in each. */
export async function ownLabs(asker: Asker): Promise<{ id: string; name: string; role: 'lead' | 'contributor' }[]> {
  const ids = [...asker.labs.keys()];
  if (ids.length === 0) return [];
  const { db } = await database();
  const rows = await db
    .select({ id: labs.id, name: labs.name })
    .from(labs)
    .where(inArray(labs.id, ids))
    .orderBy(asc(labs.name));
  return rows.map((lab) => ({ ...lab, role: asker.labs.get(lab.id)! }));
}

/** The highest part somebody has. */
export function roleOf(asker: Asker): FrameUser['role'] {
  if (asker.steward) return 'steward';
  if (labsWith(asker, 'lead').length > 0) return 'lead';
  return asker.labs.size > 0 ? 'contributor' : 'guest';
}
