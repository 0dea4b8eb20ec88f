/** The text file in which recovery codes are kept: for which registry, from when, and how they are used. */
export function recoveryCodesFile(codes: readonly string[], origin: string, made: Date): string {
  return [
    `Recovery codes for Zaffre at ${origin}`,
    `Made on ${made.toISOString().slice(0, 10)}. Codes made before no longer work.`,
    'Each signs you in once, after your password, in place of a second factor.',
    '',
    ...codes,
    '',
  ].join('\r\n');
}
