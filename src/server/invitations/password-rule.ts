/** Words and runs that long passwords are most often padded from (common practice; NIST SP 800-63B asks for such a list). */
const COMMON = [
  ...['password', 'passwort', 'passphrase', 'secret', 'letmein', 'welcome', 'iloveyou', 'sunshine', 'princess'],
  ...['dragon', 'monkey', 'football', 'baseball', 'superman', 'batman', 'trustno', 'admin', 'administrator', 'login'],
  ...[
    'qwertyuiop',
    'qwertzuiop',
    'azertyuiop',
    'asdfghjkl',
    'zxcvbnm',
    'yxcvbnm',
    'qwerty',
    'qwertz',
    'azerty',
    'asdf',
  ],
  ...['1q2w3e4r5t', '1q2w3e4r', '1qaz2wsx3edc', '1qaz2wsx', 'abcdefghijklmnopqrstuvwxyz', 'abcdefgh', 'abc123'],
  ...[
    'correcthorsebatterystaple',
    'thequickbrownfox',
    'changeme',
    'default',
    'computer',
    'internet',
    'summer',
    'winter',
  ],
];
/** Words of this place, which a guesser would try first. */
const CONTEXT = ['zaffre', 'cobalt', 'registry', 'complex', 'spectrum', 'spectra', 'invitation', 'laboratory'];
/** Characters that must be left when everything guessable is taken out. */
const REST = 8;

/**
 * Why a password is too easy to guess, or null. Length is the contract's; here it is compared with what people use
 * most, with words of this place and with the person's own name and address. No rule asks for kinds of characters
 * (NIST SP 800-63B advises against them).
 */
export function passwordFault(password: string, person: { email: string; name: string }): string | null {
  const plain = password.normalize('NFKC').toLowerCase();
  if (new Set(plain).size < 6) return 'It repeats too few characters: take several words that do not belong together';
  const own = `${person.email} ${person.name}`.toLowerCase().split(/[^\p{L}\p{N}]+/u);
  const guessable = [...COMMON, ...CONTEXT, ...own.filter((word) => word.length >= 3)].sort(
    (a, b) => b.length - a.length,
  );
  const compact = plain.replace(/[\s._\-+!@#$%&*]+/g, '');
  const rest = guessable.reduce((text, word) => text.replaceAll(word, ''), compact);
  if (withoutRuns(rest).length < REST)
    return 'It is made of words that are guessed first: take several words that do not belong together';
  return null;
}

/** The text with runs such as 12345, 9876 or aaaa taken out (four characters at least). */
function withoutRuns(text: string): string {
  let kept = '';
  let start = 0;
  const step = (i: number) => (text.codePointAt(i) ?? 0) - (text.codePointAt(i - 1) ?? 0);
  for (let i = 1; i <= text.length; i++) {
    const goesOn = i < text.length && Math.abs(step(i)) <= 1 && (i - start < 2 || step(i) === step(i - 1));
    if (goesOn) continue;
    if (i - start < 4) kept += text.slice(start, i);
    start = i;
  }
  return kept;
}
