import { HttpError } from '#src/server/http.ts';

/** A 422 about one place of the request. */
export const refuse = (pointer: string, detail: string): HttpError =>
  new HttpError(422, detail, { errors: [{ pointer, detail }] });
