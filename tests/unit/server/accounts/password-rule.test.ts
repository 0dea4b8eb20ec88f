import { describe, expect, test } from 'vitest';
import { NewPassword } from '#src/contracts/account.ts';
import { passwordFault } from '#src/server/accounts/password-rule.ts';

const person = { email: 'ada.nordby@test.example', name: 'Ada Nordby' };

describe('what is refused, and why', () => {
  test.each([
    ['aaaaaaaaaaaaaaaaaaaa', /repeats too few characters/],
    ['abcabcabcabcabcabc', /repeats too few characters/],
    ['kestrel kestrel kestrel', /repeats one short text/],
    ['Kestrel-kestrel-kes', /repeats one short text/],
    ['momsanaladventure', /list of the most used/],
    ['1qaz2wsx3edc4rfv', /list of the most used/],
    ['1qaz 2wsx 3edc 4rfv', /list of the most used/],
    ['１ＱＡＺ2wsx3edc4rfv', /list of the most used/],
    ['passwordpassword1', /guessed first/],
    ['123456789012345', /guessed first/],
    ['qwertyuiopasdfghjkl', /guessed first/],
    ['zaffre cobalt spectra', /guessed first/],
    ['Dragon monkey football 7', /guessed first/],
    ['ada.nordby@test', /own name or address/],
    ['Nordby-Nordby-2026', /own name or address/],
    ['ada nordby 123456', /own name or address/],
  ])('%j', async (password, reason) => expect(await passwordFault(password, person)).toMatch(reason));

  test('the reason says what to do', async () =>
    expect(await passwordFault('passwordpassword1', person)).toMatch(/several words that do not belong together$/));
});

describe('what is taken', () => {
  test.each([
    'tundra velvet osmosis kettle',
    'Kz7 wollte nie Flöte spielen',
    'pN3vRq81TzLmX0c',
    'nordby keeps eleven kettles',
    '   spaces   at   both   ends  ',
    '氷河の上の三つの古い薬缶と青い猫',
  ])('%j', async (password) => expect(await passwordFault(password, person)).toBeNull());
});

describe('length', () => {
  const fits = (password: string) => NewPassword.safeParse(password).success;

  test('fifteen characters, each code point one', () => {
    expect(fits('pN3vRq81TzLmX0')).toBe(false);
    expect(fits('pN3vRq81TzLmX0c')).toBe(true);
    expect(fits('🜁🜂🜃🜄🜅🜆🜇🜈🜉🜊🜋🜌🜍🜎')).toBe(false);
    expect(fits('🜁🜂🜃🜄🜅🜆🜇🜈🜉🜊🜋🜌🜍🜎🜏')).toBe(true);
  });

  test('counted as it is hashed: an accent written apart is no character of its own', () =>
    expect(fits('e\u0301'.repeat(14))).toBe(false));

  test('long ones are taken up to 1000 bytes, untrimmed', () => {
    expect(NewPassword.parse(` ${'kettle osmosis '.repeat(60)} `)).toHaveLength(902);
    expect(fits('x'.repeat(1001))).toBe(false);
    expect(fits('é'.repeat(501))).toBe(false);
  });
});
