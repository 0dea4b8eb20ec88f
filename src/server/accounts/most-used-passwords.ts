interface MostUsed {
  /** The most used first, in small letters. */
  ranked: readonly string[];
  all: ReadonlySet<string>;
}

let loaded: Promise<MostUsed> | undefined;

/**
 * Some 49 000 passwords that turn up most in published breaches (@zxcvbn-ts/language-common, MIT). Read with the first
 * new password: it takes a few megabytes, and most processes of this program never need it.
 */
export function mostUsedPasswords(): Promise<MostUsed> {
  loaded ??= import('@zxcvbn-ts/language-common').then(({ dictionary }) => {
    const ranked = dictionary['passwords-common'] as string[];
    return { ranked, all: new Set(ranked) };
  });
  return loaded;
}
