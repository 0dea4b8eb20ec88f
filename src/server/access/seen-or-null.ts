import { HttpError } from '../http.ts';

/** For pages: a proof of access, or null where the record is not in sight, which is answered by the 404 page. */
export async function seenOrNull<Access>(access: Promise<Access>): Promise<Access | null> {
  try {
    return await access;
  } catch (error) {
    if (error instanceof HttpError && error.status === 404) return null;
    throw error;
  }
}
