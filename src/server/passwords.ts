import { hash, verify } from '@node-rs/argon2';

/** Argon2id with the OWASP Password Storage figures: 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** One spelling for what a keyboard may compose in two ways (NIST SP 800-63B: normalise before hashing). */
const normalised = (password: string) => password.normalize('NFKC');

export const hashPassword = (password: string): Promise<string> => hash(normalised(password), COST);

/** Hash of nothing anybody knows, so that an unknown address costs as long as a known one. */
let decoy: Promise<string> | undefined;

/** Whether a password fits; with no hash (no such account) it takes the same time and answers no. */
export async function passwordFits(passwordHash: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword(crypto.randomUUID());
  const fits = await verify(passwordHash ?? (await decoy), normalised(password));
  return passwordHash !== null && fits;
}
