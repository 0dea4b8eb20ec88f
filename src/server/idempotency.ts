import { eq, lt } from 'drizzle-orm';
import type { Route } from '../contracts/route.ts';
import { isUniqueViolation } from '../db/client.ts';
import { idempotency } from '../db/schema/index.ts';
import type { Asker } from './access/asker.ts';
import { database } from './database.ts';
import { HttpError } from './http.ts';
import { sha256 } from './ids.ts';

const KEPT_FOR = 24 * 3600 * 1000; // ms
/**
 * Answers of these routes hold a secret that is shown once, or their bodies a password whose hash would be kept here:
 * neither is.
 */
const SECRET = new Set(['/api/tokens', '/api/sign-in/passkey-options']);
const SECRET_UNDER = '/api/account/';
const isSecret = ({ path }: Route) => SECRET.has(path) || path.startsWith(SECRET_UNDER);

/**
 * Run a POST once for one Idempotency-Key: the same account, token, route, key and body gives the same answer again.
 *
 * Access has been checked before this is called, also before a replay. Refusals are not kept: what was wrong may be
 * mended and sent under the same key.
 *
 * @throws {HttpError} 422 when the key came with another body, 409 while the first request still runs
 */
export async function replayOrRun(
  route: Route,
  request: Request,
  asker: Asker | null,
  body: unknown,
  run: () => Promise<Response>,
): Promise<Response> {
  const given = request.headers.get('idempotency-key');
  if (given === null || !asker || isSecret(route)) return run();
  if (given.length > 200) throw new HttpError(400, 'Idempotency-Key is longer than 200 characters');
  const key = sha256(
    [asker.accountId, asker.tokenId ?? '', route.method, new URL(request.url).pathname, given].join('\n'),
  );
  const bodyHash = sha256(JSON.stringify(body));

  const { db, write } = await database();
  try {
    await write(async (tx) => {
      await tx.delete(idempotency).where(lt(idempotency.createdAt, new Date(Date.now() - KEPT_FOR).toISOString()));
      await tx.insert(idempotency).values({ key, bodyHash });
    });
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    const [kept] = await db.select().from(idempotency).where(eq(idempotency.key, key));
    if (kept && kept.bodyHash !== bodyHash)
      throw new HttpError(422, 'This Idempotency-Key came with another body before');
    if (kept?.status == null) throw new HttpError(409, 'The first request with this Idempotency-Key still runs');
    return new Response(kept.body, { status: kept.status, headers: kept.headers ?? {} });
  }

  try {
    const response = await run();
    const text = await response.clone().text();
    const headers = Object.fromEntries(response.headers);
    await write((tx) =>
      tx.update(idempotency).set({ status: response.status, headers, body: text }).where(eq(idempotency.key, key)),
    );
    return response;
  } catch (error) {
    await write((tx) => tx.delete(idempotency).where(eq(idempotency.key, key)));
    throw error;
  }
}
