import { mostUsedPasswords } from './most-used-passwords.ts';

/** Rows of the keyboard and other runs that long passwords are padded from, beyond what the list of most used ones has. */
const KEY_RUNS = [
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
  ...['1q2w3e4r5t', '1q2w3e4r', '1qaz2wsx3edc', '1qaz2wsx', 'abcdefghijklmnopqrstuvwxyz', 'abcdefgh'],
];
/** Phrases and words of other languages that a guesser has, too (common practice; NIST SP 800-63B asks for a list). */
const PHRASES = ['correcthorsebatterystaple', 'thequickbrownfox', 'passphrase', 'passwort', 'administrator'];
/** Words of this place, which a guesser would try first. */
const CONTEXT = ['zaffre', 'cobalt', 'registry', 'complex', 'spectrum', 'spectra', 'invitation', 'laboratory'];
/** How many of the most used passwords are taken out as words wherever they stand, where they have five letters or more. */
const AS_WORDS = 1000;
/** Characters that must be left when everything guessable is taken out. */
const REST = 8;

const SEVERAL_WORDS = 'take several words that do not belong together';

/**
 * Why a password is too easy to guess, or null. Length is the contract's; here it is compared with what people use
 * most, with words of this place and with the person's own name and address. No rule asks for kinds of characters
 * (NIST SP 800-63B advises against them).
 */
export async function passwordFault(password: string, person: { email: string; name: string }): Promise<string | null> {
  const plain = password.normalize('NFKC').toLowerCase();
  if (new Set(plain).size < 6) return `It repeats too few characters: ${SEVERAL_WORDS}`;
  const compact = plain.replace(/[\s._\-+!@#$%&*]+/g, '');
  if (repeats(compact)) return `It repeats one short text: ${SEVERAL_WORDS}`;
  const mostUsed = await mostUsedPasswords();
  if (mostUsed.all.has(plain) || mostUsed.all.has(compact))
    return `It is on the list of the most used passwords: ${SEVERAL_WORDS}`;
  const withoutOwn = takeOut(compact, ownWords(person));
  if (withoutOwn !== compact && restOf(withoutOwn, mostUsed) < REST)
    return `It is made of your own name or address: ${SEVERAL_WORDS}`;
  if (restOf(compact, mostUsed) < REST) return `It is made of words that are guessed first: ${SEVERAL_WORDS}`;
  return null;
}

/** Words of the person's name and address, among them the address as a whole and the name written as one word. */
function ownWords({ email, name }: { email: string; name: string }): string[] {
  const parts = `${email} ${name}`
    .normalize('NFKC')
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u);
  return parts.filter((word) => word.length >= 3);
}

function restOf(compact: string, mostUsed: { ranked: readonly string[] }): number {
  const words = mostUsed.ranked.slice(0, AS_WORDS).filter((word) => word.length >= 5 && /\p{L}/u.test(word));
  return withoutRuns(takeOut(compact, [...words, ...KEY_RUNS, ...PHRASES, ...CONTEXT])).length;
}

/** The text without the words, longest first, so that a word inside a longer one leaves no scraps of that. */
function takeOut(text: string, words: readonly string[]): string {
  const longestFirst = [...new Set(words)].sort((a, b) => b.length - a.length);
  return longestFirst.reduce((rest, word) => rest.replaceAll(word, ''), text);
}

/** Whether a text is one piece of at most eight characters over and over, the last time perhaps cut short. */
function repeats(text: string): boolean {
  for (let length = 1; length <= Math.min(8, text.length / 2); length++)
    if (text.slice(length) === text.slice(0, -length)) return true;
  return false;
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
