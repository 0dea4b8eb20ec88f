/** A text for LIKE with `escape '\'` that finds it anywhere, its own `%` and `_` as they are. */
export const likePattern = (text: string): string => `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
