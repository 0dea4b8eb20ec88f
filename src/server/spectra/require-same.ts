import { entityTag, HttpError } from '#src/server/http.ts';

/**
 * Honour an If-Match that was sent where none is demanded.
 *
 * @param representations - each way in which the asker may have read what is to be changed
 * @throws {HttpError} 412 when the tag is of none of them as they are now
 */
export async function requireSame(request: Request, representations: (() => Promise<unknown>)[]): Promise<void> {
  const condition = request.headers.get('if-match');
  if (condition === null || condition.trim() === '*') return;
  const offered = condition.split(',').map((tag) => tag.trim());
  for (const represent of representations) if (offered.includes(entityTag(JSON.stringify(await represent())))) return;
  throw new HttpError(412, 'The bands changed since you read them: read them again and repeat');
}
