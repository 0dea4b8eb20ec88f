/** Why the chemistry refused: a short closed union for programs; the message, with place and value, is for people. */
export type DomainErrorCode =
  | 'empty'
  | 'unbalanced-bracket'
  | 'unknown-symbol'
  | 'f-block-metal'
  | 'no-d-block-metal'
  | 'malformed-hydrate'
  | 'unreadable'
  | 'out-of-range'
  | 'unsupported'
  | 'too-large'
  | 'ambiguous';

/**
 * A request that the chemistry cannot serve. Knows nothing of HTTP.
 *
 * `field` names the input it is about (`formula`, `file`, `geometry` …), `position` is the character offset in a
 * formula or the 1-based line in a file, where there is one.
 */
export class DomainError extends Error {
  override readonly name = 'DomainError';

  constructor(
    readonly code: DomainErrorCode,
    message: string,
    readonly field: string,
    readonly position?: number,
  ) {
    super(message);
  }
}
