import { asc, eq } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { centres } from '#src/db/schema/index.ts';

/**
 * Which centre of another complex stands for each centre of this one: the one in the same place where it is of the same
 * element, else the only one of that element, else none.
 */
export async function centrePlaces(
  tx: Tx,
  fromId: string,
  intoId: string,
): Promise<(ordinal: number) => number | null> {
  const of = (id: string) =>
    tx
      .select({ ordinal: centres.ordinal, element: centres.element })
      .from(centres)
      .where(eq(centres.complexId, id))
      .orderBy(asc(centres.ordinal));
  const [before, after] = [await of(fromId), await of(intoId)];
  return (ordinal) => {
    const element = before.find((centre) => centre.ordinal === ordinal)?.element;
    const alike = after.filter((centre) => centre.element === element);
    const same = alike.find((centre) => centre.ordinal === ordinal) ?? (alike.length === 1 ? alike[0] : undefined);
    return same?.ordinal ?? null;
  };
}
