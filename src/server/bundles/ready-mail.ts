import { eq } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { accounts, type bundles, folios } from '#src/db/schema/index.ts';
import { bundleReady } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';
import { fileUntil } from './forget.ts';

type Bundle = typeof bundles.$inferSelect;

/** How long somebody watches a bundle being made, in milliseconds; after that a mail tells that it is ready. */
const PATIENCE_MS = 60_000;

/** Whether a bundle took so long that the one who ordered it has gone on with something else. */
export const tookLong = ({ createdAt, finishedAt }: Pick<Bundle, 'createdAt' | 'finishedAt'>): boolean =>
  finishedAt !== null && Date.parse(finishedAt) - Date.parse(createdAt) > PATIENCE_MS;

/** Tell who ordered a bundle that it is ready, once. */
export async function mailReady(tx: Tx, bundle: Bundle): Promise<void> {
  const [account] = await tx.select().from(accounts).where(eq(accounts.id, bundle.requestedBy));
  if (account?.state !== 'active') return;
  const content = bundleReady({
    title: await titleOf(tx, bundle),
    size: bundle.size ?? 0,
    link: `${settings().publicOrigin}/bundles/${bundle.id}`,
    keptUntil: fileUntil(bundle)!,
  });
  await queueMail(tx, { key: `bundle:${bundle.id}`, kind: 'bundle', to: account.email, ...content });
}

/** What a bundle is called before people: its folio's name, or how many complexes were chosen. */
async function titleOf(tx: Tx, { folioId, complexes }: Bundle): Promise<string> {
  const [folio] = await tx
    .select({ name: folios.name })
    .from(folios)
    .where(eq(folios.id, folioId ?? ''));
  const chosen = complexes?.length ?? 0;
  return folio?.name ?? (chosen === 1 ? `${complexes![0]}` : `${chosen} complexes`);
}
