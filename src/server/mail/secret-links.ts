/**
 * Kinds of mail whose link opens an account to whoever holds it. The outbox of a demo, which everybody at the machine
 * may read, shows them without it.
 */
export const ACCOUNT_LINK_KINDS: ReadonlySet<string> = new Set(['password-reset', 'address-change']);

/**
 * Kinds of mail that hold a token of any sort. In production these are kept without it once nobody will send them any
 * more, so that neither the database nor a backup of it opens what a mailbox was meant to.
 */
export const TOKEN_LINK_KINDS: ReadonlySet<string> = new Set([...ACCOUNT_LINK_KINDS, 'invitation']);

/** The text with each address replaced by a remark. */
export const withoutLinks = (text: string, remark: string): string => text.replace(/https?:\/\/\S+/g, `(${remark})`);
